package gui

import (
	"image/color"

	"fyne.io/fyne/v2"
	"fyne.io/fyne/v2/canvas"
	"fyne.io/fyne/v2/widget"
)

// wheel lies over a form that scrolls and hands it the mouse wheel, which text fields under the pointer would keep for
// themselves. It takes no other events.
type wheel struct {
	widget.BaseWidget
	scroll fyne.Scrollable
}

func newWheel(scroll fyne.Scrollable) *wheel {
	w := &wheel{scroll: scroll}
	w.ExtendBaseWidget(w)
	return w
}

// Scrolled is for the toolkit.
func (w *wheel) Scrolled(e *fyne.ScrollEvent) { w.scroll.Scrolled(e) }

// CreateRenderer is for the toolkit.
func (w *wheel) CreateRenderer() fyne.WidgetRenderer {
	return widget.NewSimpleRenderer(canvas.NewRectangle(color.Transparent))
}
