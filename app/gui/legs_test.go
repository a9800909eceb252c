package gui

import (
	"strings"
	"testing"

	"enfilade/canvas/pick"
	"enfilade/solver/exact"
	"enfilade/solver/plan"
)

// routed is the gallery with a route from its first start over two points of the floor to its first target, selected.
func routed(t *testing.T) *rig {
	r := newGallery(t)
	via := plan.ChainOf(exact.Pt{X: 40000, Y: 20000}, exact.Pt{X: 200000, Y: 30000})
	if err := r.doEdit(plan.AddRoute{Route: plan.Route{From: "S1", Via: via, To: "T1"}}); err != nil {
		t.Fatal(err)
	}
	r.session.Select(plan.Ref{Kind: plan.KindRoute, ID: "R1"})
	r.acted()
	r.settle()
	return r
}

func (r *rig) via() []exact.Pt {
	x, _ := r.session.Plan().Route("R1")
	return x.Via.Points()
}

// TestRouteForm: the form tells how long a route is on foot, leg by leg; its buttons take waypoints out and reorder them.
func TestRouteForm(t *testing.T) {
	r := routed(t)
	walk, ok := r.results.route("R1")
	if !ok || walk.Problem != "" || walk.Closed > 0 || len(walk.Legs) != 3 {
		t.Fatalf("%+v", walk)
	}
	f := r.form
	if len(f.facts) != 2 || f.facts[0].value.text != r.host.FormatLength(walk.Length*exact.PerMM) || f.facts[1].value.text != number(walk.Seconds, 1)+" s" {
		t.Errorf("facts %q, %q", f.facts[0].value.text, f.facts[1].value.text)
	}
	if f.legs == nil || len(f.legs.rows) != 3 {
		t.Fatalf("legs %+v", f.legs)
	}
	for i, l := range f.legs.rows {
		if l.far.text != r.host.FormatLength(walk.Legs[i].Length*exact.PerMM) || l.row.old || l.sooner.Visible() != (i == 1) || l.remove.Visible() != (i < 2) {
			t.Errorf("leg %d: %q, %+v", i+1, l.far.text, l.row)
		}
	}
	was := r.via()
	f.legs.rows[1].sooner.Tapped(nil)
	r.settle()
	if now := r.via(); len(now) != 2 || now[0] != was[1] || now[1] != was[0] {
		t.Errorf("reordered: %v, from %v", now, was)
	}
	r.wantUndo("reorder waypoints")
	f.legs.rows[0].remove.Tapped(nil)
	r.settle()
	if now := r.via(); len(now) != 1 || now[0] != was[0] || len(f.legs.rows) != 2 {
		t.Errorf("%v is left, %d legs in the form", now, len(f.legs.rows))
	}
	r.wantUndo("delete waypoint")
}

// TestRouteFormClosed: where a leg is closed the form says which, and by what; where a waypoint stands in a wall, which.
func TestRouteFormClosed(t *testing.T) {
	r := routed(t)
	x, _ := r.session.Plan().Route("R1")
	at := x.Via.At(1)
	around := func(d int32) plan.Chain {
		return plan.ChainOf(at.Add(exact.Vec{X: -d, Y: -d}), at.Add(exact.Vec{X: d, Y: -d}), at.Add(exact.Vec{X: d, Y: d}), at.Add(exact.Vec{X: -d, Y: d}), at.Add(exact.Vec{X: -d, Y: -d}))
	}
	if err := r.doEdit(plan.AddWall{Wall: plan.Wall{ID: "X1", Kind: plan.Glazing, Height: plan.Ceiling, Line: around(5000)}}); err != nil {
		t.Fatal(err)
	}
	r.settle()
	f := r.form
	if f.facts[0].value.text != "no way" || !strings.Contains(f.fault.text, "aypoint 2: glazing X1 closes the way") || f.legs.rows[1].far.text != "closed" || f.legs.rows[2].far.text != "–" {
		t.Errorf("%q, %q, %q, %q", f.facts[0].value.text, f.fault.text, f.legs.rows[1].far.text, f.legs.rows[2].far.text)
	}
	r.until("the closed leg is listed", func() bool { return len(r.problems.found) > 0 })
	if got := r.problems.found[0]; got.Kind != plan.ProblemClosed || got.At != at || got.Text != "no walk leads to waypoint 2: glazing X1 closes the way" {
		t.Errorf("listed is %+v", got.Problem)
	}
	ring := plan.ChainOf(around(6000).Points()[:4]...)
	if err := r.doEdit(plan.AddBlock{Block: plan.Block{Ring: ring, Height: plan.Ceiling}}); err != nil {
		t.Fatal(err)
	}
	r.settle()
	if !strings.Contains(f.fault.text, "aypoint 2 is inside ") {
		t.Errorf("in a block the form says %q", f.fault.text)
	}
	if walk, _ := r.results.route("R1"); len(walk.Legs) != 1 || f.legs.rows[0].far.text != r.host.FormatLength(walk.Legs[0].Length*exact.PerMM) ||
		f.legs.rows[1].far.text != "closed" || f.facts[0].value.text != "no way" {
		t.Errorf("up to the block it is walked by %+v; the form says %q, %q", walk.Legs, f.legs.rows[0].far.text, f.legs.rows[1].far.text)
	}
}

// TestRouteByHand drags a new waypoint out of a leg where it is walked, and takes it out again with the pointer over it.
func TestRouteByHand(t *testing.T) {
	r := routed(t)
	k := pick.Knobs(r.session.Plan(), r.view.cam, plan.Ref{Kind: plan.KindRoute, ID: "R1"}, r.host.Walked)
	if len(k) != 3 {
		t.Fatalf("%d handles", len(k))
	}
	q := r.view.cam.Grid(k[1].X, k[1].Y)
	x, y := float64(q.X)/10000, float64(q.Y)/10000
	r.move(x, y)
	r.wantHint("new waypoint")
	before, _ := r.results.route("R1")
	r.press(x, y)
	r.dragTo(x, y+0.5)
	r.dragTo(x, y+1)
	r.until("the dragged route is walked", func() bool { w, _ := r.results.route("R1"); return len(w.Legs) == 4 })
	r.release(x, y+1)
	r.settle()
	if n := len(r.via()); n != 3 {
		t.Fatalf("%d waypoints", n)
	}
	if now, _ := r.results.route("R1"); now.Length <= before.Length {
		t.Errorf("a detour of a metre makes %v mm of %v", now.Length, before.Length)
	}
	q = r.via()[1]
	r.move(float64(q.X)/10000, float64(q.Y)/10000)
	r.wantHint("Delete takes it away")
	r.keys("Delete")
	if n := len(r.via()); n != 2 {
		t.Errorf("after Delete over a waypoint %d are left", n)
	}
}
