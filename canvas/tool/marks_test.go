package tool_test

import (
	"strings"
	"testing"

	"enfilade/canvas/pick"
	"enfilade/canvas/tool"
	"enfilade/solver/exact"
	"enfilade/solver/plan"
)

// wallOf is a plan with one level wall 0.2 m thick through the middle.
func wallOf() plan.Parts {
	return plan.Parts{Walls: []plan.Wall{{ID: "W1", Line: plan.ChainOf(m(-4, 0), m(4, 0)), Thickness: 2000}}}
}

func TestMarksTurnByDrag(t *testing.T) {
	h := newHost(t, wallOf())
	o := &tool.Mark{Kind: plan.KindObserver}
	h.press(o, 1, 2)
	h.dragTo(o, 1, 3.5)
	if k := o.Sketch(h); k.Label != "90°" || k.Show != ref(plan.KindObserver, "O1") {
		t.Errorf("while it turns: %+v", k)
	}
	o.Up(h, h.at(1, 3.5))
	if q, _ := h.plan.Observer("O1"); q.At != m(1, 2) || q.Heading != 90 {
		t.Errorf("observer %+v", q)
	}
	s := &tool.Mark{Kind: plan.KindStart}
	h.drag(s, -2, -3, -3, -3)
	if q, _ := h.plan.Start("S1"); q.At != m(-2, -3) || q.Facing == nil || *q.Facing != 180 {
		t.Errorf("start %+v", q)
	}
	h.steps("place observer", "place start")
}

// TestFaceByDrag: dragged along a wall a target's face lies on the wall's face with its front away from it, from whichever
// end it is drawn; in the open J turns it round.
func TestFaceByDrag(t *testing.T) {
	h := newHost(t, wallOf())
	face := func(id string) [2]exact.Pt {
		q, ok := h.plan.Target(id)
		if !ok || q.Face == nil {
			t.Fatalf("target %s has no face: %+v", id, q)
		}
		return *q.Face
	}
	tg := &tool.Mark{Kind: plan.KindTarget}
	h.drag(tg, -2, 0.3, 1, 0.25)
	if got := face("T1"); got != [2]exact.Pt{m(-2, 0.1), m(1, 0.1)} {
		t.Errorf("above the wall: %v", got)
	}
	h.drag(tg, 1, -0.3, 3, -0.9) // from the other end, and the pointer strays off the wall
	if got := face("T2"); got != [2]exact.Pt{m(3, -0.1), m(1, -0.1)} {
		t.Errorf("below the wall: %v", got)
	}
	h.drag(tg, -3, 3, -3, 5)
	if got := face("T3"); got != [2]exact.Pt{m(-3, 3), m(-3, 5)} {
		t.Errorf("in the open: %v", got)
	}
	h.press(tg, 0, 3)
	h.dragTo(tg, 0, 4)
	h.typed(tg, "j")
	h.dragTo(tg, 0, 5)
	tg.Up(h, h.at(0, 5))
	if got := face("T4"); got != [2]exact.Pt{m(0, 5), m(0, 3)} {
		t.Errorf("turned round: %v", got)
	}
	if q, _ := h.plan.Target("T3"); q.At != m(-3, 4) || q.Normal != nil {
		t.Errorf("target %+v", q)
	}
	h.steps("place target", "place target", "place target", "place target")
}

func TestFaceIsCarriedAndStretched(t *testing.T) {
	parts := wallOf()
	parts.Targets = []plan.Target{{ID: "T1", At: m(-2, 3), Face: &[2]exact.Pt{m(-3, 3), m(-1, 3)}, Colour: -1}}
	h := newHost(t, parts)
	s := &tool.Select{}
	h.drag(s, -2, 3, 1, -0.3) // onto the lower face
	if q, _ := h.plan.Target("T1"); *q.Face != [2]exact.Pt{m(2, -0.1), m(0, -0.1)} || q.At != m(1, -0.1) {
		t.Errorf("carried to the wall: %v", *q.Face)
	}
	if k := s.Sketch(h); len(k.Knobs) != 2 {
		t.Fatalf("a face has %d handles", len(k.Knobs))
	}
	h.Select(ref(plan.KindTarget, "T1"), ref(plan.KindWall, "W1"))
	if k := s.Sketch(h); len(k.Knobs)+len(k.Handles) != 0 {
		t.Errorf("two items have %d handles", len(k.Knobs)+len(k.Handles))
	}
	h.Select(ref(plan.KindTarget, "T1"))
	h.drag(s, 0, -0.1, -1.52, -0.6)
	if q, _ := h.plan.Target("T1"); *q.Face != [2]exact.Pt{m(2, -0.1), m(-1.5, -0.1)} {
		t.Errorf("stretched: %v", *q.Face)
	}
	h.steps("move target", "change face")
}

// TestViewAndRangeByHandles: the handles of a selected observer open its view angle and stretch its range.
func TestViewAndRangeByHandles(t *testing.T) {
	h := newHost(t, plan.Parts{Observers: []plan.Observer{{ID: "O1", At: m(0, 0), View: 360, Eye: 16000, Range: 50000}}})
	s := &tool.Select{}
	h.click(s, 0, 0)
	at := func(part pick.Part) (float64, float64) {
		for _, k := range pick.Knobs(h.plan, h.Camera(), ref(plan.KindObserver, "O1")) {
			if k.Part == part {
				p := h.Camera().Grid(k.X, k.Y)
				return float64(p.X) / 10000, float64(p.Y) / 10000
			}
		}
		t.Fatalf("no handle %d", part)
		return 0, 0
	}
	x, y := at(pick.View)
	h.press(s, x, y)
	h.dragTo(s, 0, 3)
	if k := s.Sketch(h); k.Label != "view 180°" {
		t.Errorf("label %q", k.Label)
	}
	h.dragTo(s, 3, 3.02)
	s.Up(h, h.at(3, 3.02))
	if o, _ := h.plan.Observer("O1"); o.View != 90 || o.Heading != 0 {
		t.Errorf("observer %+v, want a view of 90°", o)
	}
	if k := s.Sketch(h); len(k.Knobs) != 3 {
		t.Errorf("%d handles, want two of the view and one of the range", len(k.Knobs))
	}
	x, y = at(pick.Range)
	h.drag(s, x, y, 3.02, 1)
	if o, _ := h.plan.Observer("O1"); o.Range != 30000 {
		t.Errorf("range %d, want 30000", o.Range)
	}
	x, y = at(pick.View)
	h.drag(s, x, y, -3, 0.05)
	if o, _ := h.plan.Observer("O1"); o.View != 360 {
		t.Errorf("view %g, want all round", o.View)
	}
	h.steps("change view angle", "change range", "change view angle")
}

func TestRoute(t *testing.T) {
	parts := wallOf()
	parts.Starts = []plan.Start{{ID: "S1", At: m(-5, -3)}}
	parts.Targets = []plan.Target{{ID: "T1", At: m(5, 3), Colour: -1}}
	h := newHost(t, parts)
	r := &tool.Route{}
	h.click(r, 2, 2)
	if r.Sketch(h).Fault == "" {
		t.Error("a route that begins nowhere is not told")
	}
	h.click(r, -5, -3)
	h.click(r, -5, 1)
	h.click(r, 3, 2)
	h.key(r, tool.KeyUndo)
	h.click(r, 0, 2)
	h.move(r, 4, 2)
	if k := r.Sketch(h); k.Label != "13.10 m" || len(k.Handles) != 2 {
		t.Errorf("on the way: %q, %d waypoints", k.Label, len(k.Handles))
	}
	h.move(r, 5, 3.05)
	if got, _ := h.shown.Route("R1"); got.To != "T1" {
		t.Errorf("over the target the preview goes to %q", got.To)
	}
	h.click(r, 5, 3)
	got, ok := h.plan.Route("R1")
	if !ok || got.From != "S1" || got.To != "T1" {
		t.Fatalf("route %+v", got)
	}
	h.points("waypoints", got.Via.Points(), m(-5, 1), m(0, 2))
	h.click(r, -5, -3)
	h.click(r, -6, 1)
	h.key(r, tool.KeyEnter)
	if got, ok := h.plan.Route("R2"); !ok || got.To != "" || got.Via.Len() != 1 {
		t.Errorf("a route without a target: %+v", got)
	}
	h.steps("draw route", "draw route")

	s := &tool.Select{}
	h.drag(s, 0, 2, 1, 3) // a waypoint
	if got, _ := h.plan.Route("R1"); got.Via.At(1) != m(1, 3) {
		t.Errorf("the waypoint went to %v", got.Via.At(1))
	}
	h.click(s, -2, 2) // on the leg between the waypoints
	if len(h.selected) != 1 || h.selected[0] != ref(plan.KindRoute, "R1") {
		t.Errorf("selected %v, want the route", h.selected)
	}
}

func TestMeasureLinesAnglesAreas(t *testing.T) {
	h := newHost(t, plan.Parts{})
	g := &tool.Measure{}
	h.click(g, 0, 0)
	h.click(g, 4, 0)
	h.move(g, 4, 3)
	if k := g.Sketch(h); k.Label != "3.00 m · 7.00 m in all · corner 90°" || len(k.Band) != 3 {
		t.Errorf("two legs: %q", k.Label)
	}
	h.click(g, 4, 3)
	h.click(g, 0, 3)
	h.key(g, tool.KeyBackspace)
	h.click(g, 0, 3)
	h.click(g, 0, 0)
	if k := g.Sketch(h); k.Label != "12.00 m² · 14.00 m around" || len(k.Band) != 5 {
		t.Errorf("closed: %q, %d points", k.Label, len(k.Band))
	}
	h.move(g, 9, 9)
	if k := g.Sketch(h); k.Label != "12.00 m² · 14.00 m around" {
		t.Error("a closed measure must stay")
	}
	h.drag(g, 1, 1, 1, 3) // a new one
	h.move(g, 5, 5)
	if k := g.Sketch(h); k.Label != "2.00 m · 90°" {
		t.Errorf("dragged: %q", k.Label)
	}
	h.key(g, tool.KeyEscape)
	if k := g.Sketch(h); k.Label != "" || len(k.Band) != 0 {
		t.Error("Escape left the measure")
	}
	h.steps()
}

// TestHintsTell: every state of every tool says what the next click does, in a line that fits the window.
func TestHintsTell(t *testing.T) {
	h := newHost(t, corner())
	most := 118
	hint := func(what string, u tool.Tool, words ...string) {
		t.Helper()
		s := u.Hint(h)
		if s == "" || len([]rune(s)) > most {
			t.Errorf("%s: the hint %q has %d characters, want 1 to %d", what, s, len([]rune(s)), most)
		}
		for _, w := range words {
			if !strings.Contains(s, w) {
				t.Errorf("%s: the hint %q does not say %q", what, s, w)
			}
		}
	}
	s := &tool.Select{}
	hint("select", s, "click", "box")
	h.move(s, 3, 3)
	hint("over a block", s, "drag to move")
	h.press(s, -3, -5)
	h.dragTo(s, 0, 0)
	hint("in a box", s, "inside", "Ctrl")
	s.Up(h, h.at(0, 0))
	h.click(s, -2.5, 0)
	hint("a door selected", s)
	for name, u := range map[string]tool.Tool{"wall": &tool.Chain{}, "floor": &tool.Chain{Ring: plan.KindFloor}, "room": &tool.Rect{Kind: plan.KindWall},
		"column": &tool.Round{}, "door": &tool.Door{}, "observer": &tool.Mark{Kind: plan.KindObserver}, "target": &tool.Mark{Kind: plan.KindTarget},
		"start": &tool.Mark{Kind: plan.KindStart}, "route": &tool.Route{}, "measure": &tool.Measure{}} {
		hint(name, u)
		h.press(u, -4.5, 0)
		hint(name+" pressed", u)
		h.dragTo(u, -3, 0)
		hint(name+" dragged", u)
		u.Up(h, h.at(-3, 0))
		h.typed(u, "2")
		hint(name+" typed", u)
		u.Stop(h)
	}
}
