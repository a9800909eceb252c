package gui

import (
	"slices"
	"testing"

	"enfilade/app/session"
	"enfilade/solver/plan"
)

// formRow returns a field of the selection's form by its label.
func (r *rig) formRow(label string) *formRow {
	r.t.Helper()
	i := slices.IndexFunc(r.form.rows, func(row *formRow) bool { return row.field.label == label })
	if i < 0 {
		r.t.Fatalf("the form has no %q", label)
	}
	return r.form.rows[i]
}

// typeInto types a text into a field of the form and leaves it.
func (r *rig) typeInto(label, text string) {
	r.t.Helper()
	e := r.formRow(label).entry
	e.SetText(text)
	e.take()
}

func TestFormOfManyWalls(t *testing.T) {
	r := newCross(t)
	before := text(t, r.session.Plan())
	r.selectItems(plan.KindWall, "W1", "W2", "W4")
	if row := r.formRow("Kind"); row.pick.text.text != mixed || !sameRole(row.pick.text.role, roleInk3) {
		t.Errorf("walls and glazing are shown as %q", row.pick.text.text)
	}
	if row := r.formRow("Thickness"); row.entry.Text != "0.20" {
		t.Errorf("shared thickness %q", row.entry.Text)
	}
	r.typeInto("Thickness", "0,3")
	for _, id := range []string{"W1", "W2", "W4"} {
		if w, _ := r.session.Plan().Wall(id); w.Thickness != 3000 {
			t.Errorf("wall %s is %d thick", id, w.Thickness)
		}
	}
	r.wantUndo("change thickness")
	r.selectItems(plan.KindWall, "W1", "W3")
	if e := r.formRow("Thickness").entry; e.Text != "" || e.PlaceHolder != mixed {
		t.Errorf("differing thickness %q, %q", e.Text, e.PlaceHolder)
	}
	r.formRow("Body").pick.picked(1)
	r.wantUndo("move bodies of walls")
	if w, _ := r.session.Plan().Wall("W3"); w.Justify != plan.Left || w.Thickness != 2000 {
		t.Errorf("%+v: a field that says mixed leaves what it is of", w)
	}
	r.typeInto("Height", "2,5")
	if e := r.formRow("Height").entry; e.Text != "2.50" {
		t.Errorf("height %q", e.Text)
	}
	r.typeInto("Height", "ceiling")
	if w, _ := r.session.Plan().Wall("W1"); w.Height != plan.Ceiling {
		t.Errorf("height %d", w.Height)
	}
	for range 4 {
		r.undo()
	}
	if text(t, r.session.Plan()) != before {
		t.Error("four undos do not give the plan back")
	}
}

func TestFormOfManyKinds(t *testing.T) {
	r := newGallery(t)
	var eyes []plan.Ref
	for ref := range session.OfKind(r.session.Plan(), plan.KindObserver) {
		eyes = append(eyes, ref)
	}
	r.session.Select(eyes...)
	r.acted()
	r.typeInto("Eye height", "1.2")
	r.typeInto("Range", "6")
	r.typeInto("View angle", "120")
	for _, o := range r.session.Plan().Observers() {
		if o.Eye != 12_000 || o.Range != 60_000 || o.View != 120 {
			t.Errorf("%+v", o)
		}
	}
	if err := r.formRow("Eye height").field.set("0"); err == nil {
		t.Error("an eye on the floor is taken")
	}
	for ref := range session.OfKind(r.session.Plan(), plan.KindTarget) {
		eyes = append(eyes, ref)
	}
	r.session.Select(eyes...)
	r.acted()
	if len(r.form.rows) != 2 {
		t.Errorf("observers and targets share %d fields, want what everything has", len(r.form.rows))
	}
	r.session.Select(eyes[3:]...)
	r.acted()
	r.typeInto("Not farther", "9")
	r.typeInto("Not farther", "")
	r.wantUndo("change far limit")
	for _, x := range r.session.Plan().Targets() {
		if x.Far != nil {
			t.Errorf("%+v", x)
		}
	}
}

func TestFormLocks(t *testing.T) {
	r := newCross(t)
	r.selectItems(plan.KindWall, "W1", "W2")
	r.formRow("Changes").pick.picked(1)
	r.wantUndo("lock items")
	r.selectItems(plan.KindWall, "W1", "W3")
	if row := r.formRow("Changes"); row.pick.text.text != mixed {
		t.Errorf("one locked, one free: %q", row.pick.text.text)
	}
	r.typeInto("Thickness", "0.5")
	one, _ := r.session.Plan().Wall("W1")
	three, _ := r.session.Plan().Wall("W3")
	if one.Thickness != 2000 || three.Thickness != 5000 {
		t.Errorf("the locked wall is %d thick, the free one %d", one.Thickness, three.Thickness)
	}
	r.selectItems(plan.KindWall, "W1")
	r.formRow("Changes").pick.picked(0)
	r.wantUndo("unlock wall")
}
