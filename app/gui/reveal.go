package gui

import (
	"fyne.io/fyne/v2"
	"fyne.io/fyne/v2/canvas"
)

// heeded is a widget that tells when it gets the focus, so that what holds it can bring it into sight.
type heeded struct {
	gained func() // may be nil
}

// heed is called when the widget gets the focus.
func (h *heeded) heed() {
	if h.gained != nil {
		h.gained()
	}
}

// showFocus draws the ring of a widget that has the focus, and takes it away from others.
func showFocus(ring *canvas.Rectangle, focused bool) {
	ink := themed().Ink
	ring.FillColor, ring.StrokeColor, ring.StrokeWidth = faded(ink, 0), ink, 2
	ring.Hidden = !focused
	canvas.Refresh(ring)
}

// ringRoom is how far a focus ring reaches beyond its widget, in px at 100 %.
const ringRoom = 3

// reveal scrolls the form as little as brings a part of it into sight that has got the focus by Tab. A click on a part that is half
// out of sight stays on it.
func (f *form) reveal(o fyne.CanvasObject) {
	d := f.w.app.Driver()
	top := d.AbsolutePositionForObject(o).Y - d.AbsolutePositionForObject(f.scroll).Y
	below := top + o.Size().Height + ringRoom - f.scroll.Size().Height
	by := float32(0)
	switch {
	case top < ringRoom:
		by = top - ringRoom
	case below > 0:
		by = below
	default:
		return
	}
	f.scroll.ScrollToOffset(f.scroll.Offset.AddXY(0, by))
}
