package gui

import (
	"fyne.io/fyne/v2"
	"fyne.io/fyne/v2/canvas"
	"fyne.io/fyne/v2/widget"
)

// swatches is a row of the eight observers' colours: four discs, then the same as rings. Arrows go from one to the next.
type swatches struct {
	widget.BaseWidget
	heeded
	chosen  int
	focused bool
	picked  func(i int)
}

const (
	swatchCount = 8
	swatchPitch = 22.5
)

func newSwatches(picked func(i int)) *swatches {
	s := &swatches{picked: picked, chosen: -1}
	s.ExtendBaseWidget(s)
	return s
}

func (s *swatches) put(i int) {
	if s.chosen != i {
		s.chosen = i
		s.Refresh()
	}
}

// Tapped picks the colour under the pointer.
func (s *swatches) Tapped(e *fyne.PointEvent) {
	if i := int(e.Position.X / swatchPitch); i >= 0 && i < swatchCount {
		s.picked(i)
	}
}

// FocusGained draws the focus ring.
func (s *swatches) FocusGained() { s.focused = true; s.Refresh(); s.heed() }

// FocusLost takes the focus ring away.
func (s *swatches) FocusLost() { s.focused = false; s.Refresh() }

// TypedRune does nothing.
func (s *swatches) TypedRune(rune) {}

// TypedKey picks the colour beside the chosen one, or the first or the last; other keys are the window's.
func (s *swatches) TypedKey(e *fyne.KeyEvent) {
	switch e.Name {
	case fyne.KeyRight, fyne.KeyDown:
		s.picked(min(s.chosen+1, swatchCount-1))
	case fyne.KeyLeft, fyne.KeyUp:
		s.picked(max(s.chosen-1, 0))
	case fyne.KeyHome:
		s.picked(0)
	case fyne.KeyEnd:
		s.picked(swatchCount - 1)
	default:
		passOn(s, e)
	}
}

// CreateRenderer is for the toolkit.
func (s *swatches) CreateRenderer() fyne.WidgetRenderer {
	r := &swatchRenderer{s: s, ring: canvas.NewCircle(nil), frame: canvas.NewRectangle(nil)}
	r.frame.CornerRadius = 4
	for range swatchCount {
		r.dots = append(r.dots, canvas.NewCircle(nil))
	}
	r.Refresh()
	return r
}

type swatchRenderer struct {
	s    *swatches
	ring *canvas.Circle
	dots []*canvas.Circle

	frame *canvas.Rectangle // keyboard focus
}

func (r *swatchRenderer) Layout(size fyne.Size) {
	circle := func(c *canvas.Circle, x, radius float32) {
		c.Move(fyne.NewPos(x-radius, size.Height/2-radius))
		c.Resize(fyne.NewSquareSize(2 * radius))
	}
	for i, d := range r.dots {
		circle(d, 9+float32(i)*swatchPitch, 6)
	}
	circle(r.ring, 9+float32(r.s.chosen)*swatchPitch, 9)
	r.frame.Move(fyne.NewPos(-4, 0))
	r.frame.Resize(fyne.NewSize(swatchCount*swatchPitch+3, size.Height))
}

func (r *swatchRenderer) MinSize() fyne.Size { return fyne.NewSize(swatchCount*swatchPitch, 27) }

func (r *swatchRenderer) Refresh() {
	p := themed()
	for i, d := range r.dots {
		c := p.ObserverColour(i)
		d.FillColor, d.StrokeColor, d.StrokeWidth = c, c, 2
		if i >= swatchCount/2 {
			d.FillColor = faded(c, 0)
		}
	}
	r.ring.FillColor, r.ring.StrokeColor, r.ring.StrokeWidth = faded(p.Ink, 0), p.Ink, 1.5
	r.ring.Hidden = r.s.chosen < 0
	showFocus(r.frame, r.s.focused)
	r.Layout(r.s.Size())
	canvas.Refresh(r.s)
}

func (r *swatchRenderer) Objects() []fyne.CanvasObject {
	o := []fyne.CanvasObject{r.frame, r.ring}
	for _, d := range r.dots {
		o = append(o, d)
	}
	return o
}
func (r *swatchRenderer) Destroy() {}
