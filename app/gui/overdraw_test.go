package gui

import (
	"image/color"
	"testing"

	"fyne.io/fyne/v2"
	"fyne.io/fyne/v2/canvas"
	"fyne.io/fyne/v2/test"
)

// TestPixelsArePaintedOnce: without a GPU each pixel that the toolkit fills costs about as much as one of the picture, and it
// fills the whole window for each frame. So what the window shows at rest, the picture included, fills hardly more than the
// window's own area: no ground lies under another, and what is not seen has no colour.
func TestPixelsArePaintedOnce(t *testing.T) {
	r := newGallery(t)
	filled, pictures := float32(0), 0
	var walk func(o fyne.CanvasObject)
	walk = func(o fyne.CanvasObject) {
		if !o.Visible() {
			return
		}
		size := o.Size()
		switch x := o.(type) {
		case *canvas.Raster:
			pictures++
			filled += size.Width * size.Height
		case *canvas.Rectangle:
			if x.FillColor != nil && x.FillColor != color.Transparent {
				filled += size.Width * size.Height
			}
		case *fyne.Container:
			for _, c := range x.Objects {
				walk(c)
			}
		case fyne.Widget:
			for _, c := range test.WidgetRenderer(x).Objects() {
				walk(c)
			}
		}
	}
	content := r.win.Content()
	walk(content)
	size := content.Size()
	if share := filled / (size.Width * size.Height); pictures != 1 || share > 1.2 {
		t.Errorf("%d pictures, and %.2f of the window's area is filled, want 1 and at most 1.2", pictures, share)
	} else {
		t.Logf("%.2f of the window's area is filled", share)
	}
}
