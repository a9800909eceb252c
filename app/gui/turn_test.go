package gui

import (
	"strings"
	"testing"

	"fyne.io/fyne/v2"
)

func TestATargetIsHungOnTheOtherFaceByItsForm(t *testing.T) {
	r := newRig(t, realSolver)
	r.runes("w")
	r.click(2, 5)
	r.click(6, 5)
	r.keys(fyne.KeyReturn, fyne.KeyEscape)
	r.runes("t")
	r.move(4, 5)
	if want := "the wall's middle: click to hang the target on its upper face, J: its lower"; r.status.hint.text != want {
		t.Errorf("the status line says %q, want %q", r.status.hint.text, want)
	}
	r.click(4, 5)
	r.keys(fyne.KeyEscape)
	press := func(want string) {
		t.Helper()
		if len(r.form.offered) != 1 || !strings.HasPrefix(r.form.offered[0].text, want) {
			t.Fatalf("the form offers %v, want %s", r.form.offered, want)
		}
		r.form.offered[0].do()
	}
	press("To the other face")
	if q, _ := r.session.Plan().Target("T1"); q.At != m(4, 4.9) || *q.Normal != -90 {
		t.Errorf("target at %v, looking to %v", q.At, *q.Normal)
	}
	if label, _ := r.session.UndoLabel(); label != "move target to other face" {
		t.Errorf("the step is %q", label)
	}
	r.drag(4, 4.9, 4, 2)
	r.enter("Faces", "45")
	press("Turn round")
	if q, _ := r.session.Plan().Target("T1"); q.At != m(4, 2) || *q.Normal != -135 {
		t.Errorf("target at %v, looking to %v", q.At, *q.Normal)
	}
	r.enter("Faces", "")
	if len(r.form.offered) != 0 {
		t.Errorf("a target that looks nowhere may be turned: %v", r.form.offered)
	}
}
