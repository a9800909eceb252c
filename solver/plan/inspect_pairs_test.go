package plan

import (
	"fmt"
	"math/rand/v2"
	"reflect"
	"slices"
	"testing"

	"enfilade/solver/exact"
)

// TestInspectAgainstAllPairs holds what the cells find against what comparing every piece with every other finds: one cell that
// holds them all.
func TestInspectAgainstAllPairs(t *testing.T) {
	gaps, doubles, piles := 0, 0, 0
	for seed := range uint64(300) {
		r := rand.New(rand.NewPCG(seed, 7))
		var parts Parts
		at := func(n int32) exact.Pt { return exact.Pt{X: r.Int32N(n) - n/2, Y: r.Int32N(n) - n/2} }
		for i := range 40 {
			a := at(20_000)
			b := a.Add(exact.Vec{X: r.Int32N(9000) - 4500, Y: r.Int32N(9000) - 4500})
			if r.IntN(3) == 0 {
				b.Y = a.Y
			}
			if i > 0 { // near an end of another wall, or on it
				w := parts.Walls[r.IntN(i)].Line
				switch r.IntN(4) {
				case 0:
					a = w.At(1).Add(exact.Vec{X: r.Int32N(300) - 150, Y: r.Int32N(300) - 150})
				case 1:
					a, b = w.At(0), w.At(1)
				}
			}
			if a != b {
				parts.Walls = append(parts.Walls, Wall{ID: fmt.Sprint("W", i), Line: ChainOf(a, b), Height: 9, Thickness: []int32{0, 100, 301}[r.IntN(3)], Justify: Justify(r.IntN(3))})
			} else {
				parts.Walls = append(parts.Walls, Wall{ID: fmt.Sprint("W", i), Line: ChainOf(a, a.Add(exact.Vec{X: 1})), Height: 9})
			}
		}
		v := newSurvey(From(parts), nil)
		got, want := v.gaps(), gapsOfAllPairs(v)
		if !reflect.DeepEqual(got, want) {
			t.Fatalf("seed %d: gaps\n%+v\nwant\n%+v", seed, got, want)
		}
		found, all := v.doubles(), doublesOfAllPairs(v)
		told, pairs := pairsOf(found), pairsOf(all)
		walls, most := partners(all)
		if most <= few && !slices.Equal(told, pairs) {
			t.Fatalf("seed %d: doubles %v, want %v", seed, told, pairs)
		}
		if some, _ := partners(found); len(some) != len(walls) {
			t.Fatalf("seed %d: %d walls lie on others, %d are told", seed, len(walls), len(some))
		}
		for _, f := range told {
			if !slices.Contains(pairs, f) {
				t.Fatalf("seed %d: %s do not lie on one another", seed, f)
			}
		}
		if most > few {
			piles++
		}
		gaps, doubles = gaps+len(got), doubles+len(told)
	}
	if gaps < 300 || doubles < 300 || piles < 1 || piles > 250 {
		t.Errorf("%d gaps, %d doubles, %d piles: the generator lost its aim", gaps, doubles, piles)
	}
}

// gapsOfAllPairs looks from every end at every piece.
func gapsOfAllPairs(v *survey) (out []Finding) {
	t := v.newTips()
	for i := range t.list {
		p := &t.list[i]
		for j := range v.pieces {
			v.look(p, int32(j))
		}
		if !p.touches && p.best.wide <= float64(GapLimit) {
			out = append(out, v.tellGap(p))
		}
	}
	return v.once(out)
}

// doublesOfAllPairs compares every two pieces.
func doublesOfAllPairs(v *survey) (out []Finding) {
	told := map[[2]int32]bool{}
	for j := range v.pieces {
		for i := range j {
			s, t := &v.pieces[i], &v.pieces[j]
			k := [2]int32{min(s.wall, t.wall), max(s.wall, t.wall)}
			if s.wall >= 0 && t.wall >= 0 && s.wall != t.wall && overlap(s.a, s.b, t.a, t.b) && !told[k] {
				told[k] = true
				out = append(out, v.double(k[0], k[1], between(s, t)))
			}
		}
	}
	return out
}

// partners returns with how many others each wall is told, and the greatest of those numbers.
func partners(list []Finding) (with map[string]int, most int) {
	with = map[string]int{}
	for _, f := range list {
		for _, r := range f.Items {
			with[r.ID]++
			most = max(most, with[r.ID])
		}
	}
	return with, most
}

func pairsOf(list []Finding) (out []string) {
	for _, f := range list {
		out = append(out, fmt.Sprint(f.Items))
	}
	slices.Sort(out)
	return out
}

// overlap reports whether two segments share more than a point.
func overlap(a, b, c, d exact.Pt) bool {
	if a == b || c == d || exact.Area2(a, b, c) != 0 || exact.Area2(a, b, d) != 0 {
		return false
	}
	lo := func(p, q exact.Pt) exact.Pt {
		if q.Less(p) {
			return q
		}
		return p
	}
	hi := func(p, q exact.Pt) exact.Pt {
		if q.Less(p) {
			return p
		}
		return q
	}
	from, to := lo(a, b), hi(a, b)
	if l := lo(c, d); from.Less(l) {
		from = l
	}
	if h := hi(c, d); h.Less(to) {
		to = h
	}
	return from.Less(to)
}
