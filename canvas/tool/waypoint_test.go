package tool_test

import (
	"strings"
	"testing"

	"enfilade/canvas/tool"
	"enfilade/solver/exact"
	"enfilade/solver/plan"
)

// walkedHost is a host with a route that is walked, before it comes to its waypoint, round a corner at 0, -4.
func walkedHost(t *testing.T) *host {
	h := newHost(t, plan.Parts{
		Starts:  []plan.Start{{ID: "S1", At: m(-5, 0)}},
		Targets: []plan.Target{{ID: "T1", At: m(5, 5), Colour: -1}},
		Routes:  []plan.Route{{ID: "R1", From: "S1", Via: plan.ChainOf(m(5, 0)), To: "T1"}},
	})
	h.walked = [][]exact.Pt{{m(-5, 0), m(0, -4), m(5, 0)}, {m(5, 0), m(5, 5)}}
	return h
}

func (h *host) via(want ...exact.Pt) {
	h.t.Helper()
	r, _ := h.plan.Route("R1")
	h.points("waypoints", r.Via.Points(), want...)
}

// TestRoutePickedWhereItIsWalked: a route is hit where it is drawn, and not where the straight leg would be.
func TestRoutePickedWhereItIsWalked(t *testing.T) {
	h := walkedHost(t)
	s := &tool.Select{}
	h.click(s, -2, 0)
	if len(h.selected) != 0 {
		t.Errorf("on the straight leg %v is hit", h.selected)
	}
	h.click(s, -2.5, -2)
	if len(h.selected) != 1 || h.selected[0] != ref(plan.KindRoute, "R1") {
		t.Errorf("on the walk %v is hit", h.selected)
	}
	h.walked = nil
	h.click(s, -2.5, -2)
	h.click(s, -2, 0)
	if len(h.selected) != 1 {
		t.Error("while no walk is known the straight leg is not hit")
	}
}

// TestWaypointInserted: the handle at a leg's middle pulls a new waypoint out of it, a double click puts one where it is.
func TestWaypointInserted(t *testing.T) {
	h := walkedHost(t)
	s := &tool.Select{}
	h.click(s, -2.5, -2)
	if k := s.Sketch(h); len(k.Knobs) != 2 {
		t.Fatalf("%d handles, want one on each leg; selected %v", len(k.Knobs), h.selected)
	}
	h.move(s, 0, -4)
	if hint := s.Hint(h); !strings.Contains(hint, "new waypoint") {
		t.Errorf("over the handle: %q", hint)
	}
	h.press(s, 0, -4) // half way along the walk
	h.dragTo(s, 0.5, -3)
	h.dragTo(s, 1, -2)
	if r, _ := h.shown.Route("R1"); r.Via.Len() != 2 || r.Via.At(0) != m(1, -2) || s.Sketch(h).Label != "waypoint 1" {
		t.Errorf("on the way the route is %v, %q beside the pointer", r.Via, s.Sketch(h).Label)
	}
	s.Up(h, h.at(1, -2))
	h.via(m(1, -2), m(5, 0))
	h.walked = [][]exact.Pt{{m(-5, 0), m(1, -2)}, {m(1, -2), m(5, 0)}, {m(5, 0), m(5, 5)}}
	e := h.at(5, 4)
	h.click(s, 5, 4)
	e.Clicks = 2
	s.Down(h, e)
	s.Up(h, e)
	h.via(m(1, -2), m(5, 0), m(5, 4))
	h.steps("add waypoint", "add waypoint")

	r, _ := h.plan.Route("R1")
	r.Locked = true
	h.plan, _ = plan.SetRoute{Route: r}.Apply(h.plan)
	e = h.at(-2, -1)
	e.Clicks = 2
	s.Down(h, e)
	s.Up(h, e)
	if len(s.Sketch(h).Knobs) != 0 {
		t.Error("a locked route has handles")
	}
	h.via(m(1, -2), m(5, 0), m(5, 4))
}

// TestWaypointDeleted: Delete on a waypoint of the selected route takes out the waypoint, elsewhere the route; the last waypoint of
// a route without a target takes the route with it.
func TestWaypointDeleted(t *testing.T) {
	h := walkedHost(t)
	s := &tool.Select{}
	h.click(s, 5, 0)
	if hint := s.Hint(h); !strings.Contains(hint, "Delete takes it away") {
		t.Errorf("over the waypoint: %q", hint)
	}
	h.key(s, tool.KeyDelete)
	h.via()
	h.walked = nil
	h.click(s, 2.5, 3.75)
	h.key(s, tool.KeyDelete)
	if _, ok := h.plan.Route("R1"); ok {
		t.Error("Delete on a leg left the route")
	}
	h.steps("delete waypoint", "delete route")

	p, err := tool.WithoutWaypoint(plan.Route{ID: "R2", From: "S1", Via: plan.ChainOf(m(1, 1))}, 0).Apply(
		plan.From(plan.Parts{Starts: []plan.Start{{ID: "S1"}}, Routes: []plan.Route{{ID: "R2", From: "S1", Via: plan.ChainOf(m(1, 1))}}}))
	if err != nil || p.NumRoutes() != 0 {
		t.Errorf("a route that leads nowhere stays: %v", err)
	}
	r := plan.Route{ID: "R3", From: "S1", Via: plan.ChainOf(m(1, 1), m(2, 2), m(3, 3))}
	q := plan.From(plan.Parts{Starts: []plan.Start{{ID: "S1"}}, Routes: []plan.Route{r}})
	if q, err = tool.WaypointSooner(r, 2).Apply(q); err != nil {
		t.Fatal(err)
	}
	if got, _ := q.Route("R3"); !got.Via.Equal(plan.ChainOf(m(1, 1), m(3, 3), m(2, 2))) || r.Via.At(1) != m(2, 2) {
		t.Errorf("reordered: %v, from %v", got.Via, r.Via)
	}
}
