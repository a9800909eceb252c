package gui

import (
	"testing"

	"fyne.io/fyne/v2"

	"enfilade/solver/plan"
)

// space taps the space bar over the picture.
func (r *rig) space() {
	r.view.KeyDown(&fyne.KeyEvent{Name: fyne.KeySpace})
	r.runes(" ")
	r.view.KeyUp(&fyne.KeyEvent{Name: fyne.KeySpace})
}

func times(n int, k fyne.KeyName) (all []fyne.KeyName) {
	for range n {
		all = append(all, k)
	}
	return all
}

// TestAWallIsDrawnByKeysAlone: arrows move the pointer in steps of 0.1 m, Space clicks there; an observer is put down, selected
// and moved the same way.
func TestAWallIsDrawnByKeysAlone(t *testing.T) {
	r := newRig(t, realSolver)
	r.runes("w")
	r.keys(fyne.KeyUp)
	from := r.view.cam.Grid(r.view.place())
	if from.X%1000 != 0 || from.Y%1000 != 0 || r.view.keyed.cross[0].Hidden {
		t.Fatalf("the pointer begins at %v, with a cross: %v; want it on the grid in the picture's middle", from, !r.view.keyed.cross[0].Hidden)
	}
	r.space()
	r.keys(times(20, fyne.KeyRight)...)
	r.space()
	r.keys(times(15, fyne.KeyDown)...)
	r.space()
	r.keys(fyne.KeyReturn)
	b, c := from, from
	b.X += 20000
	c.X, c.Y = c.X+20000, c.Y-15000
	r.wantWall("W1", from, b, c)
	r.runes("o")
	r.keys(times(10, fyne.KeyLeft)...)
	r.space()
	at := c
	at.X -= 10000
	if o := r.observer("O1"); o.At != at {
		t.Errorf("the observer stands at %v, want %v", o.At, at)
	}
	r.keys(fyne.KeyEscape, fyne.KeyEscape)
	r.session.Select()
	r.acted()
	r.space() // the pointer is still over it
	if sel := r.session.Selection(); len(sel) != 1 || sel[0].Kind != plan.KindObserver {
		t.Errorf("Space selects %v", sel)
	}
	r.keys(fyne.KeyLeft)
	if o := r.observer("O1"); o.At.X != at.X-1000 {
		t.Errorf("a selected observer is nudged to %v", o.At)
	}
}

// TestKeysMoveThePlanAtThePicturesEdge, and Space is for panning once the mouse has the pointer again.
func TestKeysMoveThePlanAtThePicturesEdge(t *testing.T) {
	r := newRig(t, realSolver)
	was := r.view.cam
	r.keys(times(300, fyne.KeyRight)...)
	if x, _ := r.view.place(); r.view.cam == was || x > float64(r.view.cam.W) {
		t.Errorf("after 30 m to the right the pointer is at %v px of %v", x, r.view.cam.W)
	}
	r.runes("o")
	r.move(r.view.cam.CX/1000, r.view.cam.CY/1000)
	if !r.view.keyed.cross[0].Hidden {
		t.Error("the cross stays where the mouse is not")
	}
	r.space()
	if r.session.Committed().NumObservers() != 0 {
		t.Error("Space puts an observer down where the mouse is")
	}
}
