package paint_test

import (
	"strings"
	"testing"

	"enfilade/canvas/paint"
	"enfilade/solver/exact"
	"enfilade/solver/plan"
	"enfilade/solver/study"
)

// TestRoutesGolden: a route lies on its walk round the walls with a number at each waypoint; selected it is stronger, hidden gone.
func TestRoutesGolden(t *testing.T) {
	p := named(t, twoRooms)
	parts := p.Parts()
	parts.Routes = []plan.Route{{ID: "R1", From: parts.Starts[0].ID, To: parts.Targets[0].ID,
		Via: plan.ChainOf(exact.Pt{X: 20000, Y: 15000}, exact.Pt{X: 80000, Y: 10000})}}
	s := sceneOf(t, plan.From(parts), 520, 360, 1)
	rest := overlayOf(s)
	s.Selected = []plan.Ref{{Kind: plan.KindRoute, ID: "R1"}}
	golden(t, "overlay_route", overlayOf(s))
	plain := overlayOf(sceneOf(t, p, 520, 360, 1))
	if n, m := len(rest.Ops), len(plain.Ops); n != m+1+2*3 {
		t.Errorf("a route with two waypoints adds %d steps, want 7", n-m)
	}
	if walked := s.Result.Routes[0]; len(walked.Points) < 5 { // else the walk goes round nothing
		t.Errorf("the route is walked over %v", walked.Points)
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

// TestRouteClosed: from a closed leg on a route is dashed behind a bar, and what closes the leg stands beside it. Of a route that
// is not solved all is dashed; of one not solved yet nothing is.
func TestRouteClosed(t *testing.T) {
	parts := named(t, twoRooms).Parts()
	parts.Walls = append(parts.Walls, plan.Wall{ID: "G1", Kind: plan.Glazing, Height: plan.Ceiling, Line: plan.ChainOf(exact.Pt{X: 30000}, exact.Pt{X: 30000, Y: 60000})})
	parts.Routes = []plan.Route{{ID: "R1", From: parts.Starts[0].ID, To: parts.Targets[0].ID,
		Via: plan.ChainOf(exact.Pt{X: 20000, Y: 15000}, exact.Pt{X: 40000, Y: 30000})}}
	s := sceneOf(t, plan.From(parts), 520, 360, 1)
	if r := s.Result.Routes[0]; r.Closed != 2 || r.Reason != "glazing G1 closes the way" {
		t.Fatalf("%+v", r)
	}
	s.Target = "" // no approach, so that its bar and reason are none of these
	l := overlayOf(s)
	golden(t, "overlay_route_closed", l)
	dashes := func() int { return strings.Count(overlayOf(s).String(), "width 1.3 dash 6-4") }
	if n := dashes(); n != 1 || !strings.Contains(l.String(), s.Result.Routes[0].Reason) {
		t.Errorf("%d dashed lines, want 1, and the reason beside it:\n%s", n, l)
	}
	// A waypoint that nobody can come to: walked up to there, and what is wrong is said where it stands, by the problem.
	walked := &s.Result.Routes[0]
	walked.Problem, walked.Reason = "waypoint 2 is inside block B1", ""
	if n := dashes(); n != 1 || !strings.Contains(overlayOf(s).String(), "width 1.3 round roundjoin") {
		t.Errorf("%d dashed lines of a route with a waypoint in a block, want 1 behind the legs up to there", n)
	}
	if strings.Contains(overlayOf(s).String(), walked.Problem) {
		t.Error("what is wrong with the waypoint is said twice")
	}
	s.Result.Routes[0] = study.Route{ID: "R1", From: parts.Starts[0].ID, To: parts.Targets[0].ID, Problem: "waypoint 2 is inside block B1"}
	if n := dashes(); n != 1 {
		t.Errorf("%d dashed lines of a route that is not solved, want 1", n)
	}
	s.Result.Routes = nil
	if n := dashes(); n != 0 {
		t.Errorf("%d dashed lines of a route that is not solved yet, want none", n)
	}
}
