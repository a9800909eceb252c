package plantest_test

import (
	"testing"

	"enfilade/solver/plantest"
)

// Random plans are worth nothing when they miss what they are for: each kind of degeneracy must turn up at least once in
// ten plans, most of them many times in each.
func TestAim(t *testing.T) {
	for name, g := range plantest.Small() {
		var a plantest.Aim
		for seed := range 400 {
			a.Add(g.Example(seed))
		}
		t.Logf("%s: %+v", name, a)
		low := a.Plans / 10
		if a.SharedEnds < low || a.Tees < low || a.Crosses < low || a.Overlaps < low || a.Collinear < low ||
			a.OnFaces < low || a.OnEnds < low || a.OnCrossing < low {
			t.Errorf("%s lost their aim: %+v", name, a)
		}
		if name != "lines" && a.DoorEnds < low {
			t.Errorf("%s lost their aim at doors on wall ends: %+v", name, a)
		}
	}
}
