package gui

import (
	"slices"
	"testing"

	"enfilade/solver/plan"
)

// TestDraggedCornerShowsWhatFollows drags the corner in which three walls meet: all three are outlined on the way, and only what
// is selected once it is let go.
func TestDraggedCornerShowsWhatFollows(t *testing.T) {
	r := newRig(t, realSolver)
	wall := func(id string, x, y float64) plan.Wall {
		return plan.Wall{ID: id, Line: plan.ChainOf(m(0, 0), m(x, y)), Height: plan.Ceiling, Thickness: 2000}
	}
	r.session.Open(plan.From(plan.Parts{Walls: []plan.Wall{wall("W1", 5, 0), wall("W2", 0, 5), wall("W3", -5, -1),
		{ID: "W4", Line: plan.ChainOf(m(6, 6), m(9, 6)), Height: plan.Ceiling}}, Walker: plan.DefaultWalker(), Sheet: plan.Sheet{Unit: "m"}}), "")
	r.view.fitNow()
	r.frame()
	r.press(0, 0)
	r.dragTo(0.5, 0.5)
	r.dragTo(1, 1)
	got := r.picture.scene().Selected
	for _, id := range []string{"W1", "W2", "W3"} {
		if !slices.Contains(got, plan.Ref{Kind: plan.KindWall, ID: id}) {
			t.Errorf("on the way %v are outlined, without %s", got, id)
		}
	}
	if len(got) != 3 || len(r.session.Selection()) != 1 {
		t.Errorf("outlined %v, selected %v", got, r.session.Selection())
	}
	r.release(1, 1)
	if got := r.picture.scene().Selected; len(got) != 1 {
		t.Errorf("let go, %v are outlined", got)
	}
	r.wantUndo("move corner")
}
