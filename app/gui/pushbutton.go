package gui

import (
	"image/color"

	"fyne.io/fyne/v2"
	"fyne.io/fyne/v2/canvas"
	"fyne.io/fyne/v2/driver/desktop"
	"fyne.io/fyne/v2/widget"

	"enfilade/assets"
)

// pushButton is a button with words, a thin border and no colour; the primary one is filled with ink.
type pushButton struct {
	widget.BaseWidget
	heeded
	text    *inkText
	primary bool
	hovered bool
	focused bool
	tapped  func()
}

func newPushButton(text string, tapped func()) *pushButton {
	b := &pushButton{text: newText(text, assets.Semibold, 12.5, roleInk), tapped: tapped}
	b.text.align = fyne.TextAlignCenter
	b.ExtendBaseWidget(b)
	return b
}

// first makes the button the one that Enter means.
func (b *pushButton) first() *pushButton { b.primary = true; return b }

// Tapped does what the button says.
func (b *pushButton) Tapped(*fyne.PointEvent) { b.tapped() }

// FocusGained draws the focus ring.
func (b *pushButton) FocusGained() { b.focused = true; b.Refresh(); b.heed() }

// FocusLost takes the focus ring away.
func (b *pushButton) FocusLost() { b.focused = false; b.Refresh() }

// TypedRune does nothing.
func (b *pushButton) TypedRune(rune) {}

// TypedKey does what the button says on Space and Enter.
func (b *pushButton) TypedKey(e *fyne.KeyEvent) {
	if e.Name == fyne.KeySpace || e.Name == fyne.KeyReturn || e.Name == fyne.KeyEnter {
		b.tapped()
		return
	}
	passOn(b, e)
}

// passOn gives a key that a widget has no use for to its window: Escape puts a dialog away wherever the focus is in it.
func passOn(o fyne.CanvasObject, e *fyne.KeyEvent) {
	if c := fyne.CurrentApp().Driver().CanvasForObject(o); c != nil && c.OnTypedKey() != nil {
		c.OnTypedKey()(e)
	}
}

// MouseIn tints the button.
func (b *pushButton) MouseIn(*desktop.MouseEvent) { b.hovered = true; b.Refresh() }

// MouseMoved does nothing.
func (b *pushButton) MouseMoved(*desktop.MouseEvent) {}

// MouseOut takes the tint away.
func (b *pushButton) MouseOut() { b.hovered = false; b.Refresh() }

// CreateRenderer is for the toolkit.
func (b *pushButton) CreateRenderer() fyne.WidgetRenderer {
	r := &pushRenderer{b: b, ground: canvas.NewRectangle(nil), tint: canvas.NewRectangle(nil), ring: canvas.NewRectangle(nil)}
	r.ground.CornerRadius, r.tint.CornerRadius, r.ring.CornerRadius = 4, 4, 6
	r.Refresh()
	return r
}

type pushRenderer struct {
	b                  *pushButton
	ground, tint, ring *canvas.Rectangle
}

func (r *pushRenderer) Layout(s fyne.Size) {
	r.ground.Resize(s)
	r.tint.Resize(s)
	r.ring.Move(fyne.NewPos(-3, -3))
	r.ring.Resize(s.AddWidthHeight(6, 6))
	r.b.text.Resize(s)
}

func (r *pushRenderer) MinSize() fyne.Size {
	return fyne.NewSize(r.b.text.MinSize().Width+26, 29)
}

func (r *pushRenderer) Refresh() {
	p := themed()
	r.ground.FillColor, r.ground.StrokeColor, r.ground.StrokeWidth = p.Field, p.FieldBorder, 1
	r.b.text.role = roleInk
	if r.b.primary {
		r.ground.FillColor, r.ground.StrokeColor = p.ToolFill, p.ToolFill
		r.b.text.role = roleToolIcon
	}
	r.tint.FillColor = color.Transparent
	if r.b.hovered {
		r.tint.FillColor = faded(p.Ink, 7)
		if r.b.primary {
			r.tint.FillColor = faded(p.ToolIcon, 13)
		}
	}
	showFocus(r.ring, r.b.focused)
	r.b.text.Refresh()
	canvas.Refresh(r.ground)
	canvas.Refresh(r.tint)
}

func (r *pushRenderer) Objects() []fyne.CanvasObject {
	return []fyne.CanvasObject{r.ring, r.ground, r.tint, r.b.text}
}
func (r *pushRenderer) Destroy() {}
