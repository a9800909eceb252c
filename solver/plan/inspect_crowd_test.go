package plan

import (
	"fmt"
	"math"
	"math/rand/v2"
	"testing"

	"enfilade/solver/exact"
)

// crowds are drawings of n walls that lie as badly as can be for whoever compares neighbours.
func crowds(n int) map[string]*Plan {
	r := rand.New(rand.NewPCG(3, 9))
	draw := func(wall func(i int) (a, b exact.Pt)) *Plan {
		var parts Parts
		for i := range n {
			a, b := wall(i)
			parts.Walls = append(parts.Walls, Wall{ID: fmt.Sprint("W", i), Line: ChainOf(a, b), Height: Ceiling, Thickness: int32(i%3) * 100})
		}
		return From(parts)
	}
	around := func(i int, far float64) exact.Pt {
		s, c := math.Sincos(2 * math.Pi * float64(i) / float64(n))
		return exact.Pt{X: int32(math.Round(far * c)), Y: int32(math.Round(far * s))}
	}
	ring := Parts{Walls: []Wall{{ID: "W", Height: Ceiling}}}
	var pts []exact.Pt
	for i := range n {
		pts = append(pts, around(i, 4e6))
		at := exact.Pt{X: r.Int32N(1e6), Y: r.Int32N(1e6)}
		ring.Walls = append(ring.Walls, Wall{ID: fmt.Sprint("W", i), Line: ChainOf(at, at.Add(exact.Vec{X: 500})), Height: Ceiling})
	}
	ring.Walls[0].Line, ring.Floor = ChainOf(pts...), ChainOf(pts...)
	return map[string]*Plan{
		"a fan":        draw(func(i int) (a, b exact.Pt) { return exact.Pt{}, around(i, 200_000) }),
		"in one place": draw(func(int) (a, b exact.Pt) { return exact.Pt{}, exact.Pt{X: 50_000} }),
		"on one line":  draw(func(int) (a, b exact.Pt) { a.X, b.X = r.Int32N(1e8), r.Int32N(1e8); b.X += 5000; return a, b }),
		"a grid": draw(func(i int) (a, b exact.Pt) {
			k := int32(i/2) * 500
			if i%2 == 0 {
				return exact.Pt{X: -1000, Y: k}, exact.Pt{X: int32(n) * 250, Y: k}
			}
			return exact.Pt{X: k, Y: -1000}, exact.Pt{X: k, Y: int32(n) * 250}
		}),
		"a ring": From(ring),
	}
}

// TestInspectGrowth: with five times as many walls Inspect compares not much more than five times as many, and between two
// questions whether to stop it never compares many.
func TestInspectGrowth(t *testing.T) {
	few, many := crowds(4000), crowds(20_000)
	for name, p := range few {
		once, _ := compared(p)
		again, most := compared(many[name])
		t.Logf("%s: %d compared, then %d; at most %d without a question", name, once, again, most)
		if again > 8*once+1000 {
			t.Errorf("%s: %d compared for 4,000 walls, %d for 20,000", name, once, again)
		}
		if most > 60_000 {
			t.Errorf("%s: %d compared without asking whether to stop", name, most)
		}
	}
}

// compared returns how many comparisons Inspect makes, and how many between two questions at most.
func compared(p *Plan) (all, most int) {
	var s *survey
	last := 0
	s = newSurvey(p, func() bool {
		if s != nil {
			most, last = max(most, s.compared-last), s.compared
		}
		return false
	})
	s.findings()
	return s.compared, max(most, s.compared-last)
}

func BenchmarkInspectCrowds(b *testing.B) {
	for _, n := range []int{2000, 20_000, 100_000} {
		for name, p := range crowds(n) {
			b.Run(fmt.Sprintf("plan=%s/walls=%d", name, n), func(b *testing.B) {
				for b.Loop() {
					Inspect(p, nil)
				}
			})
		}
	}
}
