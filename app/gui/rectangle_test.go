package gui

import (
	"math"
	"testing"

	"pgregory.net/rapid"

	"enfilade/solver/exact"
	"enfilade/solver/plan"
)

// TestRectangleLaws: a rectangle turned by any angle and rounded to the grid is read as one, from whichever corner and whichever
// way round; given its own sides it stays where it is, given others it has them, and keeps its lowest corner.
func TestRectangleLaws(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		turn := rapid.OneOf(rapid.Float64Range(0, 2*math.Pi), rapid.SampledFrom([]float64{0, math.Pi / 4, math.Pi / 2, math.Pi})).Draw(t, "turn")
		size := rapid.Int32Range(100, 200_000)
		w, d := size.Draw(t, "width"), size.Draw(t, "depth")
		sin, cos := math.Sincos(turn)
		corner := func(x, y int32) exact.Pt {
			return exact.Pt{X: int32(math.Round(float64(x)*cos - float64(y)*sin)), Y: int32(math.Round(float64(x)*sin + float64(y)*cos))}
		}
		pts := []exact.Pt{corner(0, 0), corner(w, 0), corner(w, d), corner(0, d)}
		first, back := rapid.IntRange(0, 3).Draw(t, "first"), rapid.Bool().Draw(t, "back")
		ring := make([]exact.Pt, 4)
		for i := range ring {
			if ring[i] = pts[(first+i)%4]; back {
				ring[i] = pts[(first+4-i)%4]
			}
		}
		r, ok := rectangleOf(plan.ChainOf(ring...))
		if !ok {
			t.Fatalf("%v is no rectangle", ring)
		}
		for _, p := range ring {
			if p.Y < r.at.Y || p.Y == r.at.Y && p.X < r.at.X {
				t.Fatalf("%v lies below %v", p, r.at)
			}
		}
		a, b := size.Draw(t, "along"), size.Draw(t, "across")
		sized, ok := r.sized(a, b)
		s, again := rectangleOf(sized)
		if !ok || !again {
			t.Fatalf("sized to %d and %d: %v", a, b, sized)
		}
		along, across := s.sides()
		if s.at != r.at || math.Abs(along-float64(a)) > 1 || math.Abs(across-float64(b)) > 1 {
			t.Fatalf("sized to %d and %d: %f and %f at %v, want them at %v", a, b, along, across, s.at, r.at)
		}
	})
}

// TestNoRectangle: rings that are none.
func TestNoRectangle(t *testing.T) {
	for name, ring := range map[string][]exact.Pt{
		"triangle": {{}, {X: 100}, {X: 100, Y: 100}},
		"slanted":  {{}, {X: 1000}, {X: 1100, Y: 1000}, {X: 100, Y: 1000}},
		"trapeze":  {{}, {X: 1000}, {X: 900, Y: 1000}, {X: 100, Y: 1000}},
		"crossed":  {{}, {X: 1000, Y: 1000}, {X: 1000}, {Y: 1000}},
		"flat":     {{}, {X: 1000}, {X: 1000}, {}},
		"five":     {{}, {X: 1000}, {X: 1000, Y: 500}, {X: 1000, Y: 1000}, {Y: 1000}},
	} {
		if r, ok := rectangleOf(plan.ChainOf(ring...)); ok {
			t.Errorf("%s: %v", name, r)
		}
	}
	r, _ := rectangleOf(plan.ChainOf(exact.Pt{}, exact.Pt{X: 10}, exact.Pt{X: 10, Y: 10}, exact.Pt{Y: 10}))
	if ring, ok := r.sized(plan.MaxCoord+1, 10); ok {
		t.Errorf("beyond the range: %v", ring)
	}
}
