package gui

import (
	"fyne.io/fyne/v2"
	"fyne.io/fyne/v2/canvas"
	"fyne.io/fyne/v2/driver/desktop"
	"fyne.io/fyne/v2/widget"
)

// textEntry is the toolkit's field for one line of text with the face of the other fields: their box and focus ring, and its text
// as far from the box's side and on the same line as theirs.
type textEntry struct {
	widget.Entry
	lit bool // it has the focus
}

// How far the text is moved from where the toolkit has it, in px at 100 %.
const (
	entryRight = 4.5
	entryDown  = 1
)

// oneLine sets the field up for one line.
func (e *textEntry) oneLine() { e.Wrapping, e.Scroll = fyne.TextWrapOff, fyne.ScrollHorizontalOnly }

// FocusGained draws the focus ring.
func (e *textEntry) FocusGained() { e.lit = true; e.Entry.FocusGained() }

// FocusLost takes the focus ring away.
func (e *textEntry) FocusLost() { e.lit = false; e.Entry.FocusLost() }

// MouseDown puts the cursor where the text stands under the pointer.
func (e *textEntry) MouseDown(m *desktop.MouseEvent) {
	moved := *m
	moved.Position = m.Position.SubtractXY(entryRight, entryDown)
	e.Entry.MouseDown(&moved)
}

// Dragged chooses the text up to the pointer.
func (e *textEntry) Dragged(d *fyne.DragEvent) {
	moved := *d
	moved.Position = d.Position.SubtractXY(entryRight, entryDown)
	e.Entry.Dragged(&moved)
}

// CreateRenderer is for the toolkit.
func (e *textEntry) CreateRenderer() fyne.WidgetRenderer {
	r := &entryFace{WidgetRenderer: e.Entry.CreateRenderer(), e: e, ground: canvas.NewRectangle(nil)}
	r.ground.CornerRadius = 4
	r.dress()
	return r
}

// entryFace draws a field's box in place of the toolkit's.
type entryFace struct {
	fyne.WidgetRenderer
	e      *textEntry
	ground *canvas.Rectangle
}

// Layout is for the toolkit.
func (r *entryFace) Layout(s fyne.Size) {
	r.ground.Resize(s)
	r.WidgetRenderer.Layout(s.SubtractWidthHeight(2*entryRight, 0))
	for _, o := range r.text() {
		o.Move(o.Position().AddXY(entryRight, entryDown))
	}
}

// Refresh is for the toolkit.
func (r *entryFace) Refresh() {
	r.WidgetRenderer.Refresh()
	r.dress()
}

// dress gives the box its colours.
func (r *entryFace) dress() {
	c := themed()
	r.ground.FillColor, r.ground.StrokeColor, r.ground.StrokeWidth = c.Field, c.FieldBorder, 1
	if r.e.lit {
		r.ground.StrokeColor, r.ground.StrokeWidth = c.Ink, 2
	}
	canvas.Refresh(r.ground)
}

// Objects is for the toolkit.
func (r *entryFace) Objects() []fyne.CanvasObject {
	return append([]fyne.CanvasObject{r.ground}, r.text()...)
}

// text is what the toolkit draws in its box and border.
func (r *entryFace) text() []fyne.CanvasObject { return r.WidgetRenderer.Objects()[2:] }
