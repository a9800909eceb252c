package gui

import (
	"testing"

	"fyne.io/fyne/v2"
)

func TestDrawingByHandDoesNotMoveThePicture(t *testing.T) {
	r := newRig(t, realSolver)
	was := r.view.cam
	if per := was.PerMetre(); per != 37 {
		t.Fatalf("an empty plan opens at %v px a metre at 1440 x 900, want 37", per)
	}
	r.runes("r")
	r.click(2, 2)
	r.click(7, 6)
	r.keys(fyne.KeyEscape)
	if r.session.Plan().NumWalls() == 0 {
		t.Fatal("no room was drawn")
	}
	// A strip under the menu bar makes the picture lower and higher again, as a notice does.
	r.view.resized(was.W, was.H-40, r.view.pix)
	r.view.resized(was.W, was.H, r.view.pix)
	if r.view.cam != was {
		t.Errorf("the picture moved from %v to %v", was, r.view.cam)
	}
	r.runes("w")
	r.click(0.5, 1)
	r.runes("80")
	r.keys(fyne.KeyReturn)
	r.keys(fyne.KeyEscape, fyne.KeyEscape)
	if r.view.cam != was {
		t.Error("the picture moved for what is not the first thing drawn")
	}
}

func TestTheFirstTypedMeasuresAreBroughtIntoView(t *testing.T) {
	r := newRig(t, realSolver)
	was := r.view.cam
	r.runes("r")
	r.click(2, 2)
	r.runes("60")
	r.keys(fyne.KeyTab)
	r.runes("45")
	r.keys(fyne.KeyReturn)
	if r.session.Plan().NumWalls() == 0 {
		t.Fatal("no room was drawn")
	}
	if r.view.cam == was || !r.view.shows(r.bounds()) {
		t.Errorf("60 by 45 m are drawn and the picture shows %v", r.view.cam)
	}
	r.keys(fyne.KeyEscape)
	if !r.view.fitted {
		t.Error("the picture does not follow the window's size")
	}
}
