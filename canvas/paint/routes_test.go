package paint_test

import (
	"strings"
	"testing"

	"enfilade/canvas/paint"
	"enfilade/solver/exact"
	"enfilade/solver/plan"
)

// TestRoutesGolden: a route lies on its straight legs with a number at each waypoint; selected it is stronger, hidden gone.
func TestRoutesGolden(t *testing.T) {
	p := named(t, twoRooms)
	parts := p.Parts()
	parts.Routes = []plan.Route{{ID: "R1", From: parts.Starts[0].ID, To: parts.Targets[0].ID,
		Via: plan.ChainOf(exact.Pt{X: 20000, Y: 15000}, exact.Pt{X: 40000, Y: 30000})}}
	s := sceneOf(t, plan.From(parts), 520, 360, 1)
	rest := overlayOf(s)
	s.Selected = []plan.Ref{{Kind: plan.KindRoute, ID: "R1"}}
	golden(t, "overlay_route", overlayOf(s))
	plain := overlayOf(sceneOf(t, p, 520, 360, 1))
	if n, m := len(rest.Ops), len(plain.Ops); n != m+1+2*3 {
		t.Errorf("a route with two waypoints adds %d steps, want 7", n-m)
	}
	parts.Routes[0].Hidden = true
	if got := overlayOf(sceneOf(t, plan.From(parts), 520, 360, 1)); strings.TrimSpace(got.String()) != strings.TrimSpace(plain.String()) {
		t.Error("a hidden route is drawn")
	}
	var l paint.List
	s = sceneOf(t, plan.From(parts), 520, 360, 1)
	paint.Overlay(s, &l)
	if n := testing.AllocsPerRun(20, func() { paint.Overlay(s, &l) }); n > 5 {
		t.Errorf("a frame with a route allocates %g times", n)
	}
}
