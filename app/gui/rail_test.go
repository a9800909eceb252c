package gui

import (
	"testing"

	"fyne.io/fyne/v2"
)

// TestRailInALowWindow: every tool's button is in sight in a window as low as a small display at twice the size, and none lies on
// another.
func TestRailInALowWindow(t *testing.T) {
	r := newRig(t, realSolver)
	for _, height := range []float32{900, 700, 450} {
		r.win.Resize(fyne.NewSize(1024, height))
		bottom := float32(0)
		for i, b := range r.rail {
			if shapeOf(i) != i {
				continue
			}
			at := r.app.Driver().AbsolutePositionForObject(b)
			if at.Y < bottom || at.Y+b.Size().Height > height-26 {
				t.Errorf("%g high: %s lies from %g to %g, the one above to %g", height, tools[i].name, at.Y, at.Y+b.Size().Height, bottom)
			}
			bottom = at.Y + b.Size().Height
		}
	}
}
