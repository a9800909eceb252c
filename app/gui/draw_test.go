package gui

import (
	"slices"
	"strings"
	"testing"

	"fyne.io/fyne/v2"

	"enfilade/solver/exact"
	"enfilade/solver/plan"
)

// newEmpty is a window with an empty plan, solved.
func newEmpty(t *testing.T) *rig {
	t.Helper()
	r := newRig(t, realSolver)
	r.settle()
	return r
}

// points returns the points of a wall of the plan that is shown.
func (r *rig) points(id string) []exact.Pt {
	r.t.Helper()
	w, ok := r.session.Plan().Wall(id)
	if !ok {
		r.t.Fatalf("no wall %s", id)
	}
	return w.Line.Points()
}

// TestDrawRoomByTypedLengths draws a room of four walls and a door in it by lengths alone, as typed into the fields.
func TestDrawRoomByTypedLengths(t *testing.T) {
	r := newEmpty(t)
	r.runes("w")
	r.click(0, 0)
	r.move(1, 0)
	for _, side := range []struct{ length, angle string }{{"4.2", "0"}, {"3", "90"}, {"4,2", "180"}, {"300cm", "270"}} {
		r.runes(side.length)
		if f := r.sketch.Fields; len(f) != 2 || f[0].Text != side.length || !f[0].Here {
			t.Fatalf("the fields hold %+v, want %q typed", f, side.length)
		}
		if !r.view.over.fields[0].box.Visible() || r.view.over.fields[0].text.text != side.length || r.view.over.label.Visible() {
			t.Fatalf("the picture does not show the fields in place of the label")
		}
		if !r.view.AcceptsTab() {
			t.Fatal("Tab is not for the fields")
		}
		r.keys(fyne.KeyTab)
		r.runes(side.angle)
		r.keys(fyne.KeyReturn)
	}
	if got, want := r.points("W1"), []exact.Pt{{}, m(4.2, 0), m(4.2, 3), m(0, 3), {}}; !slices.Equal(got, want) {
		t.Fatalf("room %v, want %v", got, want)
	}
	if r.view.over.fields[0].box.Visible() || r.view.over.fields[1].text.Visible() {
		t.Error("the fields stay when the room is closed")
	}
	r.runes("d")
	r.move(1.2, 0)
	r.runes("0.8")
	r.keys(fyne.KeyTab)
	r.runes("0.5")
	r.keys(fyne.KeyReturn)
	for _, o := range r.session.Plan().Openings() {
		if o.At != 5000 || o.Width != 8000 || o.Segment != 0 {
			t.Errorf("door %+v", o)
		}
	}
	if r.session.Plan().NumOpenings() != 1 {
		t.Error("no door")
	}
}

// TestShapesOfOneLetter: the letter, and the button, go from shape to shape; the menu names each.
func TestShapesOfOneLetter(t *testing.T) {
	r := newEmpty(t)
	var seen []string
	for range 4 {
		r.runes("c")
		seen = append(seen, tools[r.toolAt].name)
		if !r.rail[r.toolAt].chosen || r.rail[r.toolAt].icon.name != tools[r.toolAt].icon {
			t.Errorf("the button does not show %s", tools[r.toolAt].name)
		}
	}
	if got := strings.Join(seen, ", "); got != "Column, Block, Block of any outline, Column" {
		t.Errorf("C chose %s", got)
	}
	if !strings.HasSuffix(r.status.hint.text, "C again: block") {
		t.Errorf("hint %q", r.status.hint.text)
	}
	r.rail[shapeOf(r.toolAt)].Tapped(nil)
	if tools[r.toolAt].name != "Block" {
		t.Errorf("the button chose %s", tools[r.toolAt].name)
	}
	r.runes("r")
	if r.rail[0].chosen || tools[r.toolAt].name != "Room" {
		t.Error("R did not choose the room tool")
	}
	r.command(r.toolMenu("Draw"), "Zone of any outline")
	if tools[r.toolAt].name != "Zone of any outline" {
		t.Errorf("the menu chose %s", tools[r.toolAt].name)
	}
}

// TestAnotherToolFinishesTheRun: what is drawn is not lost when another tool is taken, and undo in a run goes corner by corner.
func TestAnotherToolFinishesTheRun(t *testing.T) {
	r := newEmpty(t)
	r.runes("w")
	r.click(0, 0)
	r.click(2, 0)
	r.click(2, 2)
	r.shortcut(&fyne.ShortcutUndo{})
	r.runes("o")
	if got := r.points("W1"); !slices.Equal(got, []exact.Pt{{}, m(2, 0)}) {
		t.Errorf("the wall runs through %v", got)
	}
	r.shortcut(&fyne.ShortcutUndo{})
	if r.session.Plan().NumWalls() != 0 {
		t.Error("undo left the wall")
	}
}

// TestBodyOfNewWalls: J and H while drawing are what the form of new walls shows, and the form what is drawn.
func TestBodyOfNewWalls(t *testing.T) {
	r := newEmpty(t)
	body := func() int {
		for _, f := range r.form.rows {
			if f.field.label == "Body" {
				return f.field.chosen
			}
		}
		return -1
	}
	r.runes("rj")
	if body() != 1 || !strings.Contains(r.status.hint.text, "body inside (J)") {
		t.Errorf("after J the form shows %d, the hint %q", body(), r.status.hint.text)
	}
	r.runes("h")
	if body() != 3 {
		t.Errorf("after H the form shows %d", body())
	}
	if err := r.newBody().pick(2); err != nil {
		t.Fatal(err)
	}
	r.drag(0, 0, 3, 2)
	w, _ := r.session.Plan().Wall("W1")
	if w.Justify != plan.Right || w.Thickness != 2000 || !w.Line.Closed() {
		t.Errorf("drew %+v", w)
	}
}

// TestTypedInFeet: in a plan in feet and inches a typed length is one, and the label and the field tell it so.
func TestTypedInFeet(t *testing.T) {
	r := newEmpty(t)
	sheet := r.session.Plan().Sheet()
	sheet.Unit = "ft"
	if err := r.doEdit(plan.SetSheet{Sheet: sheet}); err != nil {
		t.Fatal(err)
	}
	r.runes("w")
	r.click(0, 0)
	r.move(3.048, 0)
	if got := r.sketch.Label; got != `10' 0" · 0°` || !strings.HasPrefix(r.status.snap.text, "Snap: ") {
		t.Errorf("label %q, snap %q", got, r.status.snap.text)
	}
	r.runes(`10'6"`)
	r.keys(fyne.KeyTab)
	r.runes("90")
	if got := r.sketch.Fields[0].Live; got != `10' 6"` {
		t.Errorf("the field stands for %q", got)
	}
	r.keys(fyne.KeyReturn, fyne.KeyReturn)
	if got := r.points("W1"); !slices.Equal(got, []exact.Pt{{}, {Y: 10*3048 + 6*254}}) {
		t.Errorf("the wall runs through %v", got)
	}
}
