package gui

import (
	"fyne.io/fyne/v2"
	"fyne.io/fyne/v2/canvas"
	"fyne.io/fyne/v2/driver/desktop"
	"fyne.io/fyne/v2/widget"
)

// checkRow is a line of text with a box that is ticked or not.
type checkRow struct {
	widget.BaseWidget
	on      bool
	text    *inkText
	tick    *icon
	hovered bool
	focused bool
}

func newCheckRow(text string, on bool) *checkRow {
	r := &checkRow{text: body(text).shrinking(), tick: newIcon("check", 14, roleInk), on: on}
	r.ExtendBaseWidget(r)
	return r
}

func (r *checkRow) set(on bool) {
	if r.on != on {
		r.on = on
		r.Refresh()
	}
}

// Tapped ticks the box, or takes the tick away.
func (r *checkRow) Tapped(*fyne.PointEvent) { r.set(!r.on) }

// FocusGained draws the focus ring.
func (r *checkRow) FocusGained() { r.focused = true; r.Refresh() }

// FocusLost takes the focus ring away.
func (r *checkRow) FocusLost() { r.focused = false; r.Refresh() }

// TypedRune does nothing.
func (r *checkRow) TypedRune(rune) {}

// TypedKey ticks on Space.
func (r *checkRow) TypedKey(e *fyne.KeyEvent) {
	if e.Name == fyne.KeySpace {
		r.set(!r.on)
		return
	}
	passOn(r, e)
}

// MouseIn tints the line.
func (r *checkRow) MouseIn(*desktop.MouseEvent) { r.hovered = true; r.Refresh() }

// MouseMoved does nothing.
func (r *checkRow) MouseMoved(*desktop.MouseEvent) {}

// MouseOut takes the tint away.
func (r *checkRow) MouseOut() { r.hovered = false; r.Refresh() }

// CreateRenderer is for the toolkit.
func (r *checkRow) CreateRenderer() fyne.WidgetRenderer {
	c := &checkRenderer{r: r, box: canvas.NewRectangle(nil), tint: canvas.NewRectangle(nil), ring: canvas.NewRectangle(nil)}
	c.box.CornerRadius, c.tint.CornerRadius, c.ring.CornerRadius = 3, 4, 5
	c.Refresh()
	return c
}

type checkRenderer struct {
	r               *checkRow
	box, tint, ring *canvas.Rectangle
}

func (c *checkRenderer) Layout(s fyne.Size) {
	y := (s.Height - 16) / 2
	c.tint.Resize(s)
	c.box.Move(fyne.NewPos(4, y))
	c.box.Resize(fyne.NewSquareSize(16))
	c.ring.Move(fyne.NewPos(0, y-4))
	c.ring.Resize(fyne.NewSquareSize(24))
	c.r.tick.Move(fyne.NewPos(5, y+1))
	c.r.tick.Resize(fyne.NewSquareSize(14))
	c.r.text.Move(fyne.NewPos(30, 0))
	c.r.text.Resize(fyne.NewSize(s.Width-30, s.Height))
}

func (c *checkRenderer) MinSize() fyne.Size { return fyne.NewSize(120, 26) }

func (c *checkRenderer) Refresh() {
	p := themed()
	c.box.FillColor, c.box.StrokeColor, c.box.StrokeWidth = p.Field, p.FieldBorder, 1
	c.tint.FillColor = faded(p.Ink, 7)
	c.tint.Hidden = !c.r.hovered
	showFocus(c.ring, c.r.focused)
	c.r.tick.Hidden = !c.r.on
	c.r.text.Refresh()
	c.r.tick.Refresh()
	canvas.Refresh(c.r)
}

func (c *checkRenderer) Objects() []fyne.CanvasObject {
	return []fyne.CanvasObject{c.tint, c.ring, c.box, c.r.tick, c.r.text}
}
func (c *checkRenderer) Destroy() {}
