package exact_test

import (
	"testing"

	"enfilade/solver/exact"
)

// TestInRing: corners and edges belong to the ring, a bay does not, either way round; what is wound around twice does.
func TestInRing(t *testing.T) {
	pt := func(x, y int32) exact.Pt { return exact.Pt{X: x, Y: y} }
	bay := []exact.Pt{pt(0, 0), pt(8, 0), pt(8, 8), pt(4, 2), pt(0, 8)}
	twice := []exact.Pt{pt(0, 0), pt(8, 0), pt(8, 8), pt(0, 8), pt(0, 0), pt(8, 0), pt(8, 8), pt(0, 8)}
	for _, c := range []struct {
		ring []exact.Pt
		p    exact.Pt
		in   bool
	}{
		{bay, pt(1, 1), true}, {bay, pt(7, 5), true}, {bay, pt(4, 1), true}, {bay, pt(4, 2), true}, {bay, pt(8, 4), true},
		{bay, pt(0, 0), true}, {bay, pt(2, 5), true}, {bay, pt(4, 3), false}, {bay, pt(4, 8), false}, {bay, pt(9, 2), false},
		{bay, pt(-1, 2), false}, {bay, pt(-1, 0), false}, {bay, pt(4, -1), false}, {twice, pt(3, 3), true}, {twice, pt(9, 3), false},
	} {
		back := make([]exact.Pt, len(c.ring))
		for i, p := range c.ring {
			back[len(back)-1-i] = p
		}
		if exact.InRing(c.ring, c.p) != c.in || exact.InRing(back, c.p) != c.in {
			t.Errorf("%v in %v: want %v both ways round", c.p, c.ring, c.in)
		}
	}
	if exact.InRing(nil, pt(0, 0)) {
		t.Error("no ring holds a point")
	}
}
