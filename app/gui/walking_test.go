package gui

import (
	"math"
	"strings"
	"testing"

	"enfilade/app/live"
	"enfilade/canvas/paint"
	"enfilade/solver/exact"
	"enfilade/solver/plan"
)

// TestWalkingDistance: the lines come when they are switched on, follow the chosen start and how far they are apart, and the
// status line tells the pointer's place on foot.
func TestWalkingDistance(t *testing.T) {
	r := newGallery(t)
	if r.distances() != nil || r.results.state.Latest[live.StageDistances].Plan != nil {
		t.Fatal("distances before anyone asked for them")
	}
	bare := r.picture.scene()
	r.toggleWalking()
	r.settle()
	d := r.distances()
	if d == nil || d.Start != "S1" || d.Step != 5000 || len(d.Lines) == 0 {
		t.Fatalf("distances %+v", d)
	}
	if s := r.picture.scene(); len(s.Contours) != len(d.Lines) || s.ContourStep != 5000 || keyOf(s) == keyOf(bare) {
		t.Errorf("the picture has %d lines every %v mm, want %d", len(s.Contours), s.ContourStep, len(d.Lines))
	}
	r.move(20, 8)
	want, ok := d.At(m(20, 8))
	if s, _ := r.session.Plan().Start("S1"); !ok || math.Abs(want-exact.Dist(s.At, m(20, 8))/exact.PerMM) > 1e-6 {
		t.Errorf("20, 8 is %v mm away, %v", want, ok)
	}
	if got := r.status.hint.text; !strings.HasPrefix(got, metres(want, 2)+" m on foot from East door") {
		t.Errorf("the status line says %q of %v mm", got, want)
	}
	r.move(18.9, 9) // in the case of the east hall
	if got := r.status.hint.text; strings.Contains(got, "on foot") {
		t.Errorf("in a case the status line says %q", got)
	}
	r.session.Select(plan.Ref{Kind: plan.KindStart, ID: "S2"})
	r.acted()
	r.settle()
	if d := r.distances(); d == nil || d.Start != "S2" {
		t.Errorf("of another start: %+v", d)
	}
	r.enter("A line every", "1.5")
	r.settle()
	if d := r.distances(); d == nil || d.Step != 1500 {
		t.Errorf("lines every 1.5 m: %+v", d)
	}
	if x := r.enter("A line every", "1 cm"); x.wrong.text == "" || r.walkingStep() != 1500 {
		t.Error("lines every centimetre were taken")
	}
	r.toggleWalking()
	r.settle()
	if s := r.picture.scene(); len(s.Contours) != 0 {
		t.Error("switched off the lines are still there")
	}
}

// TestWalkingLinesAreRed: a pixel on a line differs from the floor, and of an observer's wash nothing is lost.
func TestWalkingLinesAreRed(t *testing.T) {
	r := newRig(t, realSolver)
	p := plan.From(plan.Parts{Floor: plan.ChainOf(m(0, 0), m(20, 0), m(20, 10), m(0, 10)), Walker: plan.DefaultWalker(),
		Starts: []plan.Start{{ID: "S1", At: m(0, 5)}}})
	r.show(func() { r.session.Open(p, "") })
	r.toggleWalking()
	r.settle()
	line, beside := r.pixel(5, 5), r.pixel(5.5, 5.2)
	if beside != paint.Light().Floor || line == beside || line.R <= line.B {
		t.Errorf("on the line %v, beside it %v", line, beside)
	}
}

// TestZoneOnFoot: the form of a zone tells how near and how far it is from every start.
func TestZoneOnFoot(t *testing.T) {
	r := newRig(t, realSolver)
	p := plan.From(plan.Parts{Floor: plan.ChainOf(m(0, 0), m(20, 0), m(20, 10), m(0, 10)), Walker: plan.DefaultWalker(),
		Starts: []plan.Start{{ID: "S1", Name: "Gate", At: m(0, 5)}, {ID: "S2", At: m(30, 5)}},
		Zones:  []plan.Zone{{ID: "Z1", Ring: plan.ChainOf(m(4, 4), m(8, 4), m(8, 6), m(4, 6))}}})
	r.show(func() { r.session.Open(p, "") })
	r.settle()
	if len(r.results.result.Reach) != 0 {
		t.Error("how far zones are was worked out unasked")
	}
	r.session.Select(plan.Ref{Kind: plan.KindZone, ID: "Z1"})
	r.acted()
	r.settle()
	far := metres(1000*math.Hypot(8, 1), 1) + " m"
	rows := r.form.reach.rows
	if len(rows) != 2 || rows[0][0].text != "Gate" || rows[0][1].text != "4.0 m" || rows[0][2].text != far {
		t.Errorf("rows %v", rows)
	}
	if rows[1][1].text != "no way" {
		t.Errorf("from off the floor %q", rows[1][1].text)
	}
	z, _ := p.Zone("Z1")
	z.Ring = plan.ChainOf(m(5, 4), m(8, 4), m(8, 6), m(5, 6))
	if err := r.session.Do(set(z)); err != nil {
		t.Fatal(err)
	}
	r.settle()
	if got := r.form.reach.rows[0][1].text; got != "5.0 m" {
		t.Errorf("after a change of the zone %q", got)
	}
}
