package paint_test

import (
	"fmt"
	"testing"

	"enfilade/canvas/paint"
	"enfilade/solver/exact"
	"enfilade/solver/plan"
)

// TestSelectionOfMany: every selected wall has an outline, however the list cuts them up; where more are in sight than can be
// told apart one frame goes about them all, and from nearer each has its own again.
func TestSelectionOfMany(t *testing.T) {
	var parts plan.Parts
	for x := range int32(40) {
		for y := range int32(20) {
			parts.Walls = append(parts.Walls, plan.Wall{ID: fmt.Sprintf("W%d", len(parts.Walls)+1), Thickness: 1000, Height: plan.Ceiling,
				Line: plan.ChainOf(exact.Pt{X: x * 10000, Y: y * 10000}, exact.Pt{X: x*10000 + 5000, Y: y * 10000})})
		}
	}
	p := plan.From(parts)
	s := sceneOf(t, p, 1200, 700, 1)
	outlines := func(n int) int {
		s.Selected = nil
		for _, w := range parts.Walls[:n] {
			s.Selected = append(s.Selected, plan.Ref{Kind: plan.KindWall, ID: w.ID})
		}
		with := pieces(overlayOf(s))
		s.Selected = nil
		return with - pieces(overlayOf(s))
	}
	for _, n := range []int{1, 15, 16, 17, 600} {
		if got := outlines(n); got != n {
			t.Errorf("%d selected walls have %d outlines", n, got)
		}
	}
	if got := outlines(800); got != 1 {
		t.Errorf("800 selected walls in sight have %d outlines, want one frame", got)
	}
	s.Camera = s.Camera.ZoomAt(600, 350, 4)
	if got := outlines(800); got < 40 || got > 200 {
		t.Errorf("from near 800 selected walls have %d outlines", got)
	}
}

// pieces counts the pieces of path that a list draws.
func pieces(l *paint.List) (n int) {
	for _, op := range l.Ops {
		n += int(op.Subs[1] - op.Subs[0])
	}
	return n
}
