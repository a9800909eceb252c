package gui

import (
	"strings"
	"testing"

	"fyne.io/fyne/v2"
	"fyne.io/fyne/v2/driver/desktop"

	"enfilade/solver/exact"
	"enfilade/solver/plan"
)

// line returns the form's line with a label.
func (r *rig) line(label string) *formRow {
	r.t.Helper()
	for _, x := range r.form.rows {
		if x.field.label == label {
			return x
		}
	}
	r.t.Fatalf("the form has no %q", label)
	return nil
}

// enter types a text into a line of the form and presses Enter.
func (r *rig) enter(label, text string) *formRow {
	x := r.line(label)
	r.win.Canvas().Focus(x.entry)
	x.entry.SetText(text)
	x.entry.TypedKey(&fyne.KeyEvent{Name: fyne.KeyReturn})
	return x
}

func TestObserverForm(t *testing.T) {
	r := newGallery(t)
	r.click(11.35, 8.75)
	if r.form.title.text != "Observer" || r.line("Name").entry.Text != "Rotunda attendant" || r.line("Eye height").entry.Text != "1.60" {
		t.Fatalf("form of %q, %q, %q", r.form.title.text, r.line("Name").entry.Text, r.line("Eye height").entry.Text)
	}
	if r.form.where.text != "at 11.35, 8.75 m in Rotunda" { // not "in Public floor", the larger zone around it
		t.Errorf("where %q", r.form.where.text)
	}
	r.settle()
	if r.form.facts[0].value.text != "104.8" || r.form.facts[1].value.text != "4 of 7" {
		t.Errorf("facts %q, %q", r.form.facts[0].value.text, r.form.facts[1].value.text)
	}
	for text, want := range map[string]exact.Pt{"11.5; 8.75": m(11.5, 8.75), "11,35; 8,75": m(11.35, 8.75)} {
		if r.enter("At", text); r.observer("O1").At != want {
			t.Errorf("at %q stands at %v", text, r.observer("O1").At)
		}
	}
	if x := r.enter("At", "11"); x.wrong.text == "" || !x.wrong.Visible() {
		t.Error("one number is taken for a place")
	}
	r.line("At").entry.TypedKey(&fyne.KeyEvent{Name: fyne.KeyEscape})
	r.enter("Eye height", "1,2")
	r.enter("Heading", "90,5")
	r.enter("View angle", "120")
	r.enter("Range", "8")
	r.enter("Name", "  Night watch ")
	if o := r.observer("O1"); o.Eye != 12000 || o.Heading != 90.5 || o.View != 120 || o.Range != 80000 || o.Name != "Night watch" {
		t.Errorf("observer %+v", o)
	}
	if r.line("Eye height").entry.Text != "1.20" {
		t.Errorf("what was typed is shown as %q", r.line("Eye height").entry.Text)
	}
	r.enter("Range", "")
	if o := r.observer("O1"); o.Range != 0 {
		t.Errorf("an empty range is %d", o.Range)
	}
	if err := r.line("Colour").field.pick(5); err != nil || r.observer("O1").Colour != 5 {
		t.Errorf("colour %d, %v", r.observer("O1").Colour, err)
	}
}

func TestFormRefusesInPlace(t *testing.T) {
	r := newGallery(t)
	r.click(11.35, 8.75)
	rev := r.session.Rev()
	for label, text := range map[string]string{"Eye height": "tall", "View angle": "400", "Range": "-3", "Heading": "north"} {
		x := r.enter(label, text)
		if x.wrong.text == "" || x.entry.Text != text {
			t.Errorf("%s %q: note %q, text %q: want the reason beside what was typed", label, text, x.wrong.text, x.entry.Text)
		}
		x.entry.TypedKey(&fyne.KeyEvent{Name: fyne.KeyEscape})
		if x.wrong.text != "" || x.entry.Text == text {
			t.Errorf("%s: after Escape note %q, text %q", label, x.wrong.text, x.entry.Text)
		}
	}
	if r.session.Rev() != rev {
		t.Error("a refused text changed the plan")
	}
}

func TestUndoInAFieldIsTheFields(t *testing.T) {
	r := newGallery(t)
	r.drag(11.35, 8.75, 12, 8)
	r.settle()
	x := r.line("Name")
	r.win.Canvas().Focus(x.entry)
	x.entry.TypedRune('!')
	r.undo()
	if x.entry.Text != "Rotunda attendant" {
		t.Errorf("undo in the field left %q", x.entry.Text)
	}
	if o := r.observer("O1"); o.At != (exact.Pt{X: 120000, Y: 80000}) {
		t.Error("undo in a field took back a step of the plan")
	}
}

func TestWallForm(t *testing.T) {
	r := newRig(t, realSolver)
	r.runes("w")
	r.click(2, 5)
	r.click(6, 5)
	r.keys(fyne.KeyReturn)
	r.enter("Thickness", "30 cm")
	r.enter("Height", "2.1")
	w, _ := r.session.Plan().Wall("W1")
	if w.Thickness != 3000 || w.Height != 21000 {
		t.Errorf("wall %+v", w)
	}
	if err := r.line("Kind").field.pick(int(plan.Glazing)); err != nil {
		t.Fatal(err)
	}
	if w, _ := r.session.Plan().Wall("W1"); w.Kind != plan.Glazing || r.form.title.text != "Glazing W1" {
		t.Errorf("wall %+v, form of %q", w, r.form.title.text)
	}
	if err := r.line("Kind").field.pick(int(plan.Low)); err != nil {
		t.Fatal(err)
	}
	if w, _ := r.session.Plan().Wall("W1"); w.Kind != plan.Low || w.Height != 9500 {
		t.Errorf("a low wall needs a height: %+v", w)
	}
}

func TestNewWallsTakeTheirMeasures(t *testing.T) {
	r := newRig(t, realSolver)
	r.enter("Thickness", "0,4")
	r.runes("w")
	r.click(2, 5)
	r.click(6, 5)
	r.keys(fyne.KeyReturn)
	if w, _ := r.session.Plan().Wall("W1"); w.Thickness != 4000 {
		t.Errorf("thickness %d", w.Thickness)
	}
}

func TestDoorAndMarkForms(t *testing.T) {
	r := newRig(t, realSolver)
	r.runes("w")
	r.click(2, 5)
	r.click(6, 5)
	r.keys(fyne.KeyReturn)
	r.runes("d")
	r.click(4, 5.05)
	if !strings.HasPrefix(r.form.title.text, "Opening D") {
		t.Fatalf("form of %q", r.form.title.text)
	}
	r.enter("Width", "1.2")
	if err := r.line("State").field.pick(1); err != nil {
		t.Fatal(err)
	}
	o, _ := r.session.Plan().Opening("D1")
	if o.Width != 12000 || !o.Shut {
		t.Errorf("door %+v", o)
	}
	if x := r.enter("Width", "9"); x.wrong.text == "" {
		t.Error("a door wider than its wall was taken")
	}
	r.runes("b")
	r.click(3, 8)
	r.enter("Name", "Gate")
	r.enter("Facing", "45")
	s, _ := r.session.Plan().Start("S1")
	if s.Name != "Gate" || s.Facing == nil || *s.Facing != 45 {
		t.Errorf("start %+v", s)
	}
	r.runes("t")
	r.click(8, 8)
	r.enter("Name", "Vase")
	r.settle()
	if r.table.rows[0].from != "Gate" || r.table.rows[0].to != "Vase" {
		t.Errorf("row %+v", r.table.rows[0])
	}
}

func TestManyWallsAtOnce(t *testing.T) {
	r := newRig(t, realSolver)
	for _, y := range []float64{3, 6} {
		r.runes("w")
		r.click(2, y)
		r.click(6, y)
		r.keys(fyne.KeyReturn)
	}
	r.selectAll()
	if r.form.title.text != "2 items" {
		t.Fatalf("form of %q", r.form.title.text)
	}
	r.enter("Thickness", "0.5")
	for _, w := range r.session.Plan().Walls() {
		if w.Thickness != 5000 {
			t.Errorf("wall %s is %d thick", w.ID, w.Thickness)
		}
	}
	r.undo()
	if w, _ := r.session.Plan().Wall("W2"); w.Thickness != 2000 {
		t.Error("the change is not one step")
	}
}

func TestMixedThickness(t *testing.T) {
	r := newRig(t, realSolver)
	for i, y := range []float64{3, 6} {
		r.measures.Thickness = int32(1000 + 1000*i)
		r.runes("w")
		r.click(2, y)
		r.click(6, y)
		r.keys(fyne.KeyReturn)
	}
	r.selectAll()
	if x := r.line("Thickness"); x.entry.Text != "" || x.entry.PlaceHolder != "mixed" {
		t.Errorf("two thicknesses are shown as %q, %q", x.entry.Text, x.entry.PlaceHolder)
	}
}

func TestPlanForm(t *testing.T) {
	r := newGallery(t)
	r.keys(fyne.KeyEscape)
	r.enter("Title", "Lower gallery")
	r.enter("Pace", "0,8")
	if p := r.session.Plan(); p.Sheet().Title != "Lower gallery" || p.Walker().Pace != 0.8 {
		t.Errorf("title %q, pace %g", p.Sheet().Title, p.Walker().Pace)
	}
	if x := r.enter("Pace", "0"); x.wrong.text == "" {
		t.Error("a pace of nothing was taken")
	}
	if err := r.line("Unit").field.pick(3); err != nil {
		t.Fatal(err)
	}
	if got := r.line("Door width").entry.Text; got != `2' 11.433"` {
		t.Errorf("a door of 0.90 m is shown as %s", got)
	}
	r.enter("Door width", `3' 6 1/2"`)
	if r.measures.DoorWidth != 3*3048+6*254+127 || r.line("Door width").entry.Text != `3' 6 1/2"` {
		t.Errorf("typed feet gave %d, shown as %s", r.measures.DoorWidth, r.line("Door width").entry.Text)
	}
	r.move(3.048, 6.096)
	if got := r.status.place.text; !strings.HasPrefix(got, "x 10' ") || !strings.Contains(got, "y 20' ") {
		t.Errorf("place in feet %q", got)
	}
}

// TestTableKeepsUp: what the table shows follows every change, though it is made anew only for some.
func TestTableKeepsUp(t *testing.T) {
	r := newGallery(t)
	r.click(4.9, 0.41) // the astrolabe
	r.enter("Name", "Sextant")
	if got := r.table.rows[0].to; got != "Sextant" {
		t.Errorf("a renamed target is still %q", got)
	}
	r.keys(fyne.KeyDelete)
	r.settle()
	if len(r.table.rows) != 12 {
		t.Errorf("%d rows after a target is deleted, want 12", len(r.table.rows))
	}
}

// TestCursorUnderPointer: a click into a field puts the cursor where the text stands that is under the pointer.
func TestCursorUnderPointer(t *testing.T) {
	r := newGallery(t)
	r.click(11.35, 8.75)
	e := r.line("Name").entry
	for n, text := range []string{"", "R", "Rotunda", "Rotunda att"} {
		x := 10 + fyne.MeasureText(text, 12.5, fyne.TextStyle{}).Width
		e.MouseDown(&desktop.MouseEvent{PointEvent: fyne.PointEvent{Position: fyne.NewPos(x+0.5, 13)}, Button: desktop.MouseButtonPrimary})
		if e.CursorColumn != len(text) {
			t.Errorf("%d: a click behind %q puts the cursor at %d", n, text, e.CursorColumn)
		}
	}
}
