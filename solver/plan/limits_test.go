package plan_test

import (
	"strings"
	"testing"

	"enfilade/solver/exact"
	"enfilade/solver/plan"
)

// TestEditsStayInRange: an edit that would lead beyond 50 km is refused with a message that says so, and the plan stays as it
// was.
func TestEditsStayInRange(t *testing.T) {
	edge := plan.MaxCoord - 1000
	p := plan.From(plan.Parts{Walker: plan.DefaultWalker(),
		Walls:     []plan.Wall{{ID: "W1", Line: plan.ChainOf(exact.Pt{X: edge}, exact.Pt{X: edge, Y: 5000}), Height: plan.Ceiling}},
		Observers: []plan.Observer{{ID: "O1", At: exact.Pt{X: edge}, Eye: 16000, View: 360, Colour: -1}}})
	wall, mark := plan.Ref{Kind: plan.KindWall, ID: "W1"}, plan.Ref{Kind: plan.KindObserver, ID: "O1"}
	for _, far := range []bool{true, false} {
		by := exact.Vec{X: 1000}
		if far {
			by.X++
		}
		for _, e := range []plan.Edit{
			plan.MoveItems{Items: []plan.Ref{wall}, By: by},
			plan.MoveItems{Items: []plan.Ref{wall, mark}, By: by},
			plan.MoveItems{Items: []plan.Ref{mark}, By: by},
			plan.MoveCorner{Corner: plan.Corner{Item: wall, Index: 0}, To: exact.Pt{X: edge}.Add(by)},
			plan.MoveCorners{Corners: []plan.Corner{{Item: wall, Index: 1}}, By: by},
		} {
			q, err := e.Apply(p)
			switch {
			case !far && err != nil:
				t.Errorf("%#v: %v", e, err)
			case far && (err == nil || !strings.Contains(err.Error(), "legal range of 50 km")):
				t.Errorf("%#v: error %v, plan %v", e, err, q != nil)
			case far && q != nil && q != p:
				t.Errorf("%#v: refused, and changed the plan", e)
			}
		}
	}
	if w, _ := p.Wall("W1"); w.Line.At(0).X != edge {
		t.Errorf("the plan changed: %v", w.Line)
	}
}
