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
	gaps, doubles := 0, 0
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
		c := newCells(From(parts))
		one := newCells(From(parts))
		one.side, one.in = 1e9, nil
		for i := range one.pieces {
			for x := int32(-1); x < 1; x++ {
				for y := int32(-1); y < 1; y++ {
					one.in = append(one.in, entry{x, y, int32(i)})
				}
			}
		}
		slices.SortFunc(one.in, entry.compare)
		if got, want := c.gaps(), one.gaps(); !reflect.DeepEqual(got, want) {
			t.Fatalf("seed %d: gaps\n%+v\nwant\n%+v", seed, got, want)
		}
		got, want := pairsOf(c.doubles()), pairsOf(one.doubles())
		if !slices.Equal(got, want) {
			t.Fatalf("seed %d: doubles %v, want %v", seed, got, want)
		}
		gaps, doubles = gaps+len(c.gaps()), doubles+len(got)
	}
	if gaps < 300 || doubles < 300 {
		t.Errorf("%d gaps, %d doubles: the generator lost its aim", gaps, doubles)
	}
}

func pairsOf(list []Finding) (out []string) {
	for _, f := range list {
		out = append(out, fmt.Sprint(f.Items))
	}
	slices.Sort(out)
	return out
}
