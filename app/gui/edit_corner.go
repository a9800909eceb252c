package gui

import (
	"fyne.io/fyne/v2"
	"github.com/paulmach/orb"
)

// The panel of an edit in the picture, in px at 100 %.
const (
	panelWidth = 286
	panelSide  = 14 // from the picture's right edge
	panelTop   = 34 // from its upper edge, and from the left one: below and beside the rulers
)

// cornered puts a panel into an upper corner of the picture: the right one, unless the panel keeps at the left.
type cornered struct{ left bool }

// MinSize is for the toolkit.
func (cornered) MinSize([]fyne.CanvasObject) fyne.Size { return fyne.Size{} }

// Layout is for the toolkit.
func (c cornered) Layout(o []fyne.CanvasObject, s fyne.Size) {
	o[0].Resize(fyne.NewSize(panelWidth, o[0].MinSize().Height))
	o[0].Move(fyne.NewPos(panelPlace(c.left, s.Width), panelTop))
}

// panelPlace is where a panel begins in a picture of that width.
func panelPlace(left bool, width float32) float32 {
	if left {
		return panelTop
	}
	return max(0, width-panelWidth-panelSide)
}

// panelAtLeft reports whether a panel of that height hides less of the box around the selection at the left than at the right.
func (w *window) panelAtLeft(height float32) bool {
	b, ok := w.selectionBounds()
	if !ok {
		return false
	}
	pix, cam := float64(max(w.view.pix, 0.01)), w.view.cam
	x, y := cam.PixelMM(b.Min)
	x2, y2 := cam.PixelMM(b.Max)
	chosen := orb.MultiPoint{{x / pix, y / pix}, {x2 / pix, y2 / pix}}.Bound()
	hidden := func(left bool) float64 {
		at := float64(panelPlace(left, w.view.Size().Width))
		wide := min(chosen.Max[0], at+panelWidth) - max(chosen.Min[0], at)
		high := min(chosen.Max[1], panelTop+float64(height)) - max(chosen.Min[1], panelTop)
		return max(0, wide) * max(0, high)
	}
	return hidden(true) < hidden(false)
}
