package paint

import (
	"math"
	"testing"

	"enfilade/solver/plan"
)

func TestDistance(t *testing.T) {
	for _, tc := range []struct {
		mm   float64
		unit string
		want string
	}{
		{9862, "m", "9.9 m"}, {9862, "cm", "986 cm"}, {9862, "mm", "9862 mm"}, {9862, "ft", "32.4 ft"},
		{0, "m", "0.0 m"}, {-40, "m", "0.0 m"}, {-60, "m", "−0.1 m"}, {50, "m", "0.1 m"}, {9862, "", "9.9 m"},
	} {
		var l List
		l.distance(tc.mm, unitOf(plan.From(plan.Parts{Sheet: plan.Sheet{Unit: tc.unit}})))
		if got := string(l.Chars); got != tc.want {
			t.Errorf("%g mm in %q is %q, want %q", tc.mm, tc.unit, got, tc.want)
		}
	}
}

func TestLetter(t *testing.T) {
	for i, want := range map[int]string{0: "A", 25: "Z", 26: "AA", 27: "AB", 701: "ZZ"} {
		var l List
		if l.letter(i); string(l.Chars) != want {
			t.Errorf("observer %d is %q, want %q", i, l.Chars, want)
		}
	}
}

func TestRingStep(t *testing.T) {
	for r := 1; r < 6; r++ {
		seen := map[[2]float64]bool{}
		for i := range 8 * r {
			dx, dy := ringStep(r, i)
			if max(math.Abs(dx), math.Abs(dy)) != float64(r) {
				t.Fatalf("place %d of ring %d is %g, %g", i, r, dx, dy)
			}
			seen[[2]float64{dx, dy}] = true
		}
		if len(seen) != 8*r {
			t.Errorf("ring %d has %d places, want %d", r, len(seen), 8*r)
		}
	}
	if dx, dy := ringStep(3, 0); dx != 0 || dy != -3 {
		t.Errorf("the first place is %g, %g, want straight above", dx, dy)
	}
}

func TestRamp(t *testing.T) {
	for _, tc := range [][2]float64{{11, 0}, {12, 0}, {20, 0.5}, {28, 1}, {99, 1}} {
		if got := ramp(tc[0], 12, 28); got != tc[1] {
			t.Errorf("at %g px a metre the grid has strength %g, want %g", tc[0], got, tc[1])
		}
	}
}
