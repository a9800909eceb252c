package gui

import (
	"testing"
	"time"

	"fyne.io/fyne/v2/test"

	"enfilade/solver/plantest"
)

// BenchmarkManySelected is what the window does at each move of the pointer while everything in an office of 20,000 walls is
// selected: bringing its parts up to date, and the frame.
func BenchmarkManySelected(b *testing.B) {
	d := newDesk(parts{app: test.NewTempApp(b), solver: realSolver, do: func(func()) {}, now: time.Now, inline: true}, &look{choice: themeLight})
	b.Cleanup(d.close)
	w := d.open()
	w.session.Open(plantest.Office(1, 20_000), "")
	w.view.fitNow()
	draw := func() { w.picture.draw(int(w.view.Size().Width), int(w.view.Size().Height)) }
	draw()
	w.selectAll()
	b.Run("what=update", func(b *testing.B) {
		for b.Loop() {
			w.acted()
		}
	})
	b.Run("what=frame", func(b *testing.B) {
		for b.Loop() {
			draw()
		}
	})
	b.Run("what=menu", func(b *testing.B) {
		for b.Loop() {
			w.editMenu()
		}
	})
}

// TestManySelected locks, keeps, frees and deletes everything in an office at once.
func TestManySelected(t *testing.T) {
	r := newRig(t, realSolver)
	r.session.Open(plantest.Office(1, 4000), "")
	r.view.fitNow()
	r.selectAll()
	n := len(r.session.Selection())
	if n < 4000 || r.form.title.text != counted(n, "item") {
		t.Fatalf("%d selected, the form says %q", n, r.form.title.text)
	}
	r.formRow("Changes").pick.picked(1)
	if _, locked := marked(r.session.Plan()); len(locked) != n {
		t.Errorf("%d of %d are locked", len(locked), n)
	}
	walls := r.session.Plan().NumWalls()
	r.deleteSelection()
	if r.session.Plan().NumWalls() != walls {
		t.Error("what is locked was deleted")
	}
	r.undo()
	r.selectAll()
	r.deleteSelection()
	if p := r.session.Plan(); p.NumWalls() != 0 || p.NumOpenings() != 0 {
		t.Errorf("%d walls are left", p.NumWalls())
	}
	r.wantUndo("delete items")
}
