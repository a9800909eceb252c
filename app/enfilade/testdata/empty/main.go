// Empty is a window with nothing but a spot that follows the pointer: what the toolkit's own painting costs where it runs.
package main

import (
	"image"
	"image/color"
	"image/draw"

	"fyne.io/fyne/v2"
	"fyne.io/fyne/v2/app"
	"fyne.io/fyne/v2/canvas"
	"fyne.io/fyne/v2/driver/desktop"
	"fyne.io/fyne/v2/widget"
)

// sheet is one raster over the whole window.
type sheet struct {
	widget.BaseWidget
	raster *canvas.Raster
	img    *image.RGBA
	spot   image.Rectangle
	at     fyne.Position
}

func (s *sheet) draw(w, h int) image.Image {
	if r := image.Rect(0, 0, w, h); s.img == nil || s.img.Rect != r {
		s.img = image.NewRGBA(r)
		draw.Draw(s.img, r, image.White, image.Point{}, draw.Src)
	}
	draw.Draw(s.img, s.spot, image.White, image.Point{}, draw.Src)
	x, y := int(s.at.X), int(s.at.Y)
	s.spot = image.Rect(x-8, y-8, x+9, y+9)
	draw.Draw(s.img, s.spot, image.NewUniform(color.RGBA{20, 40, 120, 255}), image.Point{}, draw.Src)
	return s.img
}

func (s *sheet) MouseIn(e *desktop.MouseEvent) { s.MouseMoved(e) }
func (s *sheet) MouseMoved(e *desktop.MouseEvent) {
	s.at = e.Position
	s.raster.Refresh()
}
func (s *sheet) MouseOut() {}

func (s *sheet) CreateRenderer() fyne.WidgetRenderer { return widget.NewSimpleRenderer(s.raster) }

func main() {
	w := app.NewWithID("enfilade.empty").NewWindow("Empty")
	s := &sheet{}
	s.raster = canvas.NewRaster(s.draw)
	s.ExtendBaseWidget(s)
	w.SetPadded(false)
	w.SetContent(s)
	w.Resize(fyne.NewSize(1440, 900))
	w.ShowAndRun()
}
