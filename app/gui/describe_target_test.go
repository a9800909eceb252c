package gui

import (
	"math"
	"strings"
	"testing"

	"fyne.io/fyne/v2"

	"enfilade/canvas/paint"
	"enfilade/solver/exact"
	"enfilade/solver/plan"
)

// TestWhatCountsAsSeen: the form sets how much of a face must be in view, and the walk says what was asked.
func TestWhatCountsAsSeen(t *testing.T) {
	r := newRig(t, realSolver)
	r.openSample("training")
	r.results.target = "T4"
	r.settle()
	length := func() float64 {
		r.settle()
		a, ok := r.results.approach(r.results.shownPair())
		if !ok {
			t.Fatal("no approach")
		}
		return a.Length
	}
	some := length()
	if !strings.Contains(r.foot.line.text, "some of the face") {
		t.Errorf("any part: %q", r.foot.line.text)
	}
	if err := r.line("Seen is").field.pick(2); err != nil {
		t.Fatal(err)
	}
	all := length()
	if !strings.Contains(r.foot.line.text, "of the whole face after") || r.session.Plan().Walker().Seen != plan.SeenAll {
		t.Errorf("all: %q", r.foot.line.text)
	}
	if err := r.line("Seen is").field.pick(1); err != nil {
		t.Fatal(err)
	}
	if x := r.line("Share"); x.entry.Text != "50" {
		t.Errorf("a share begins as %q", x.entry.Text)
	}
	half := length()
	if !(some < half && half < all) {
		t.Errorf("any part after %v mm, half after %v, all after %v; want them to rise", some, half, all)
	}
	for _, bad := range []string{"0", "101", "much"} {
		if x := r.enter("Share", bad); x.wrong.text == "" || r.session.Plan().Walker().Share != 0.5 {
			t.Errorf("a share of %q was taken", bad)
		}
	}
	r.enter("Share", "12,5 %")
	if length(); !strings.Contains(r.foot.line.text, "12.5 % of the face") || r.session.Plan().Walker().Share != 0.125 {
		t.Errorf("a share of 12.5 %%: %q", r.foot.line.text)
	}
}

// TestTargetForm: a point becomes a face across its front, is turned, widened and moved by an end, and is limited.
func TestTargetForm(t *testing.T) {
	r := newRig(t, realSolver)
	r.openSample("training")
	target := func() plan.Target { x, _ := r.session.Plan().Target("T4"); return x }
	r.session.Select(plan.Ref{Kind: plan.KindTarget, ID: "T4"})
	r.acted()
	r.settle()
	if r.line("Faces").entry.Text != "-90" || r.line("Width").entry.Text != "2.00" {
		t.Errorf("a face south of 2 m is shown as %q, %q", r.line("Faces").entry.Text, r.line("Width").entry.Text)
	}
	if got := r.line("Left end").entry.Text; got != "7.40; 8.84" {
		t.Errorf("left of someone who looks at it lies %q", got)
	}
	free := r.form.facts[0].value.text
	r.enter("At most", "30")
	r.enter("Not farther", "4")
	r.enter("Not nearer", "1")
	r.settle()
	if x := target(); *x.MaxAngle != 30 || *x.Far != 40000 || *x.Near != 10000 || r.form.facts[0].value.text == free {
		t.Errorf("limits %v %v %v, %q m² see it, before %q", x.MaxAngle, x.Far, x.Near, r.form.facts[0].value.text, free)
	}
	for label, text := range map[string]string{"At most": "91", "Not farther": "0.5", "Not nearer": "4"} {
		if x := r.enter(label, text); x.wrong.text == "" {
			t.Errorf("%s %q was taken", label, text)
		}
		r.line(label).entry.TypedKey(&fyne.KeyEvent{Name: fyne.KeyEscape})
	}
	r.enter("Faces", "0")
	if x := target(); *x.Face != [2]exact.Pt{{X: 84000, Y: 98400}, {X: 84000, Y: 78400}} {
		t.Errorf("turned east it is %v", *x.Face)
	}
	r.enter("Width", "1")
	r.enter("Left end", "8.4; 8")
	if x := target(); *x.Face != [2]exact.Pt{{X: 84000, Y: 93400}, {X: 84000, Y: 80000}} || x.At != (exact.Pt{X: 84000, Y: 86700}) {
		t.Errorf("moved by its left end it is %v about %v", *x.Face, x.At)
	}
	if err := r.line("Shape").field.pick(0); err != nil {
		t.Fatal(err)
	}
	if x := target(); x.Face != nil || x.Normal == nil || *x.Normal != 0 {
		t.Errorf("a point of it is %+v", x)
	}
	r.enter("Faces", "")
	if x := target(); x.Normal != nil {
		t.Errorf("it still faces %v", *x.Normal)
	}
	if err := r.line("Shape").field.pick(1); err != nil {
		t.Fatal(err)
	}
	if x := target(); x.Face == nil || math.Abs(exact.Dist(x.Face[0], x.Face[1])-firstFace) > 2 {
		t.Errorf("a face of it is %+v", x)
	}
}

// TestPlaces: a place is read as it is written, and what could mean two things is not read.
func TestPlaces(t *testing.T) {
	for _, text := range []string{"1,2; 3", "1.2 3", "1.2, 3", "120 cm; 3 m"} {
		if q, err := parsePlace(text, "m"); err != nil || q != m(1.2, 3) {
			t.Errorf("%q is %v, %v", text, q, err)
		}
	}
	for _, text := range []string{"", "1", "1,2", "1,2,3", "a; b", "60000; 1"} {
		if q, err := parsePlace(text, "m"); err == nil {
			t.Errorf("%q is read as %v", text, q)
		}
	}
}

// TestSelectedTargetShowsWhoSeesIt: the floor that sees the selected target is washed in place of what the observer sees, with
// its hole.
func TestSelectedTargetShowsWhoSeesIt(t *testing.T) {
	r := newRig(t, realSolver)
	near := int32(10000)
	p := plan.From(plan.Parts{Floor: plan.ChainOf(m(0, 0), m(10, 0), m(10, 8), m(0, 8)), Walker: plan.DefaultWalker(),
		Targets: []plan.Target{{ID: "T1", At: m(5, 4), Near: &near, Colour: -1}}})
	r.show(func() { r.session.Open(p, "") })
	plain := r.pixel(8.3, 6.3)
	r.session.Select(plan.Ref{Kind: plan.KindTarget, ID: "T1"})
	r.acted()
	if got := r.pixel(8.3, 6.3); got == plain {
		t.Error("the floor that sees the target is not washed")
	}
	if got := r.pixel(5.4, 4.5); got != paint.Light().Floor {
		t.Errorf("nearer than it may be seen from the floor is %v", got)
	}
}
