package gui

import (
	"testing"

	"enfilade/canvas/pick"
	"enfilade/solver/exact"
)

// command does a line of a menu by its name.
func (r *rig) command(list []command, label string) {
	r.t.Helper()
	for _, c := range list {
		if c.label == label {
			c.do()
			return
		}
	}
	r.t.Fatalf("the menu has no line %q", label)
}

// TestSnapMenu: a kind of snapping that is switched off is snapped to no more, and is remembered.
func TestSnapMenu(t *testing.T) {
	r := newGallery(t)
	r.runes("w")
	r.move(4.03, 0.02) // near no corner
	if s := r.sketch.Snap; s == nil || s.Kind == pick.SnapNone {
		t.Fatalf("nothing is snapped to: %+v", s)
	}
	r.command(r.snapMenu(), "Nothing")
	if s := r.sketch.Snap; s.Kind != pick.SnapNone || r.status.snap.text != "Snap: off" {
		t.Errorf("with all snapping off: %+v, %q", s, r.status.snap.text)
	}
	r.command(r.snapMenu(), "Grid")
	if s := r.sketch.Snap; s.Kind != pick.SnapGrid || s.At != (exact.Pt{X: 40000, Y: 0}) {
		t.Errorf("with the grid on: %+v", s)
	}
	if on := r.snapSet(); on != pick.Set(0).With(pick.SnapGrid, true) {
		t.Errorf("remembered as on: %b", on)
	}
	for _, c := range r.snapMenu() {
		if c.checked != (c.label == "Grid") {
			t.Errorf("%q is checked: %v", c.label, c.checked)
		}
	}
	r.command(r.snapMenu(), "Everything")
	if r.snapSet() != pick.AllSnaps {
		t.Errorf("after all on: %b", r.snapSet())
	}
}
