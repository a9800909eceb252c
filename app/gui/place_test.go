package gui

import (
	"strings"
	"testing"

	"fyne.io/fyne/v2"

	"enfilade/canvas/pick"
	"enfilade/solver/exact"
	"enfilade/solver/plan"
)

// TestPlaceByDrag puts down marks with the pointer: an observer that is turned, a target with a face on a wall, a start with
// a direction.
func TestPlaceByDrag(t *testing.T) {
	r := newEmpty(t)
	r.runes("w")
	r.click(0, 0)
	r.click(6, 0)
	r.keys(fyne.KeyReturn)
	r.runes("o")
	r.drag(2, 3, 2, 1)
	r.runes("t")
	r.drag(1, 0.2, 3, 0.2)
	r.runes("b")
	r.drag(5, 5, 4, 5)
	p := r.session.Plan()
	if o := r.observer("O1"); o.At != m(2, 3) || o.Heading != 270 {
		t.Errorf("observer %+v", o)
	}
	if x, _ := p.Target("T1"); x.Face == nil || *x.Face != [2]exact.Pt{m(1, 0.1), m(3, 0.1)} {
		t.Errorf("target %+v", x)
	}
	if s, _ := p.Start("S1"); s.At != m(5, 5) || s.Facing == nil || *s.Facing != 180 {
		t.Errorf("start %+v", s)
	}
}

// TestHandlesOfAnObserver: the handle of the view angle is there to be dragged and the wash follows it.
func TestHandlesOfAnObserver(t *testing.T) {
	r := newGallery(t)
	at := r.observer("O1").At
	x, y := float64(at.X)/10000, float64(at.Y)/10000
	r.click(x, y)
	all, _ := r.results.sightOf("O1")
	knobs := pick.Knobs(r.session.Plan(), r.view.cam, plan.Ref{Kind: plan.KindObserver, ID: "O1"})
	for _, k := range knobs {
		if k.Part == pick.View && k.Index == 0 {
			q := r.view.cam.Grid(k.X, k.Y)
			r.move(float64(q.X)/10000, float64(q.Y)/10000)
			if !strings.Contains(r.status.hint.text, "view angle") {
				t.Errorf("over the handle: %q", r.status.hint.text)
			}
			r.drag(float64(q.X)/10000, float64(q.Y)/10000, x+1, y+3)
		}
	}
	r.settle()
	now, _ := r.results.sightOf("O1")
	if o := r.observer("O1"); o.View >= 360 || now.Area >= all.Area {
		t.Errorf("view %g°, seen %.1f m² of %.1f", o.View, now.Area, all.Area)
	}
	if label, _ := r.session.UndoLabel(); label != "change view angle" {
		t.Errorf("the step is %q", label)
	}
}

// TestDrawRoute draws a route in the gallery, and its form tells how long it is.
func TestDrawRoute(t *testing.T) {
	r := newGallery(t)
	s, _ := r.session.Plan().Start("S1")
	x, _ := r.session.Plan().Target("T1")
	sx, sy, tx, ty := float64(s.At.X)/10000, float64(s.At.Y)/10000, float64(x.At.X)/10000, float64(x.At.Y)/10000
	r.runes("p")
	r.click(sx, sy)
	r.click(11, 9)
	if !strings.Contains(r.status.hint.text, "then the target") {
		t.Errorf("on the way: %q", r.status.hint.text)
	}
	r.click(tx, ty)
	r.settle()
	got, ok := r.session.Plan().Route("R1")
	if !ok || got.From != "S1" || got.To != "T1" || got.Via.Len() != 1 {
		t.Fatalf("route %+v", got)
	}
	if r.form.title.text != "Route R1" || len(r.form.facts) != 2 || !strings.HasSuffix(r.form.facts[0].value.text, " m") {
		t.Errorf("form of a %q", r.form.title.text)
	}
	before := r.form.facts[0].value.text
	r.keys(fyne.KeyEscape)
	r.drag(11, 9, 12, 9)
	r.settle()
	if r.form.facts[0].value.text == before {
		t.Error("the form does not follow the waypoint")
	}
	r.keys(fyne.KeyDelete, fyne.KeyDelete) // the waypoint under the pointer, then the route
	if _, ok := r.session.Plan().Route("R1"); ok {
		t.Error("Delete left the route")
	}
}

// TestMeasureAnArea clicks round a square and reads its area, and nothing changes.
func TestMeasureAnArea(t *testing.T) {
	r := newGallery(t)
	before := text(t, r.session.Plan())
	r.runes("m")
	for _, p := range [][2]float64{{-5, 20}, {-3, 20}, {-3, 18}, {-5, 18}, {-5, 20}} {
		r.click(p[0], p[1])
	}
	if got := r.sketch.Label; got != "4.00 m² · 8.00 m around" || r.view.over.label.text != got {
		t.Errorf("measured %q, shown %q", got, r.view.over.label.text)
	}
	if text(t, r.session.Plan()) != before || r.session.Dirty() {
		t.Error("measuring changed the plan")
	}
}

// TestJunctionInTheWindow: a wall drawn onto another slanted one meets it: the two halves of the floor are apart.
func TestJunctionInTheWindow(t *testing.T) {
	r := newEmpty(t)
	r.runes("f")
	for _, p := range [][2]float64{{0, 0}, {9, 0}, {9, 7}, {0, 7}, {0, 0}} {
		r.click(p[0], p[1])
	}
	r.runes("wh") // thin: nothing but the snapped end closes the gap
	r.click(0, 1)
	r.click(9, 4.37)
	r.keys(fyne.KeyReturn)
	r.click(4, 7)
	r.click(5.03, 2.9)
	if s := r.sketch.Snap; s == nil || s.Kind != pick.SnapAlong && s.Kind != pick.SnapSquare {
		t.Fatalf("the end snapped to %+v", s)
	}
	r.keys(fyne.KeyReturn)
	r.runes("b")
	r.click(2, 5)
	r.runes("t")
	r.click(7, 6)
	r.settle()
	if len(r.table.rows) != 1 || r.results.result.Approaches[0].HasFullWalk {
		t.Errorf("a walk leads through the junction: %+v", r.results.result.Approaches)
	}
}
