package plan_test

import (
	"math"
	"testing"

	"enfilade/solver/exact"
	"enfilade/solver/plan"
)

// TestRoundRing: every point of the ring lies within 1 mm of the circle, and with four corners fewer it would not.
func TestRoundRing(t *testing.T) {
	at := exact.Pt{X: 123456, Y: -98765}
	for _, r := range []int32{100, 1500, 2000, 3333, 10000, 50000, 200000, plan.MaxRound} {
		ring := plan.RoundRing(at, r)
		worst := 0.0
		for i, p := range ring.All() {
			q := ring.At((i + 1) % ring.Len())
			mx, my := (float64(p.X)+float64(q.X))/2-float64(at.X), (float64(p.Y)+float64(q.Y))/2-float64(at.Y)
			worst = max(worst, math.Abs(float64(r)-math.Hypot(mx, my)), math.Abs(float64(r)-exact.Dist(at, p)))
		}
		if worst > exact.PerMM {
			t.Errorf("radius %d: a ring of %d corners is off by %g mm", r, ring.Len(), worst/exact.PerMM)
		}
		if n := ring.Len() - 4; n >= 12 && float64(r)*(1-math.Cos(math.Pi/float64(n))) < 0.9*exact.PerMM {
			t.Errorf("radius %d: %d corners are more than needed", r, ring.Len())
		}
	}
}
