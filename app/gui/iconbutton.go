package gui

import (
	"image/color"

	"fyne.io/fyne/v2"
	"fyne.io/fyne/v2/canvas"
	"fyne.io/fyne/v2/driver/desktop"
	"fyne.io/fyne/v2/widget"

	"enfilade/assets"
)

// iconButton is a small button with a sign alone, for the end of a line; its tip says what it does.
type iconButton struct {
	widget.BaseWidget
	heeded
	icon             *icon
	tip              string
	tips             *tips
	tapped           func()
	hovered, focused bool
}

// iconSide is the button's side, in px at 100 %.
const iconSide = 22

func newIconButton(name, tip string, t *tips, tapped func()) *iconButton {
	b := &iconButton{icon: newIcon(name, 14, roleInk2), tip: tip, tips: t, tapped: tapped}
	b.ExtendBaseWidget(b)
	return b
}

// Tapped does what the button says.
func (b *iconButton) Tapped(*fyne.PointEvent) { b.tips.hide(); b.tapped() }

// TypedRune does nothing.
func (b *iconButton) TypedRune(rune) {}

// TypedKey does what the button says on Space and Enter.
func (b *iconButton) TypedKey(e *fyne.KeyEvent) {
	if e.Name == fyne.KeySpace || e.Name == fyne.KeyReturn || e.Name == fyne.KeyEnter {
		b.Tapped(nil)
		return
	}
	passOn(b, e)
}

// FocusGained draws the focus ring and shows the tip after a while.
func (b *iconButton) FocusGained() { b.focused = true; b.tell(); b.Refresh(); b.heed() }

// FocusLost takes the focus ring away.
func (b *iconButton) FocusLost() { b.focused = false; b.tips.hide(); b.Refresh() }

// MouseIn tints the button and shows its tip after a while.
func (b *iconButton) MouseIn(*desktop.MouseEvent) { b.hovered = true; b.tell(); b.Refresh() }

// MouseMoved does nothing.
func (b *iconButton) MouseMoved(*desktop.MouseEvent) {}

// MouseOut takes the tint away.
func (b *iconButton) MouseOut() { b.hovered = false; b.tips.hide(); b.Refresh() }

func (b *iconButton) tell() {
	b.tips.after(tipDelay, b.tip, func() fyne.Position {
		return fyne.CurrentApp().Driver().AbsolutePositionForObject(b).AddXY(-textSize(b.tip, assets.Regular, 12).Width-24, 0)
	})
}

// CreateRenderer is for the toolkit.
func (b *iconButton) CreateRenderer() fyne.WidgetRenderer {
	r := &iconButtonRenderer{b: b, tint: canvas.NewRectangle(nil), ring: canvas.NewRectangle(nil)}
	r.tint.CornerRadius, r.ring.CornerRadius = 4, 5
	r.Refresh()
	return r
}

type iconButtonRenderer struct {
	b          *iconButton
	tint, ring *canvas.Rectangle
}

func (r *iconButtonRenderer) Layout(s fyne.Size) {
	r.tint.Resize(s)
	r.ring.Resize(s)
	side := r.b.icon.MinSize()
	r.b.icon.Resize(side)
	r.b.icon.Move(fyne.NewPos((s.Width-side.Width)/2, (s.Height-side.Height)/2))
}

func (r *iconButtonRenderer) MinSize() fyne.Size { return fyne.NewSize(iconSide, iconSide) }

func (r *iconButtonRenderer) Refresh() {
	p := themed()
	r.tint.FillColor = color.Transparent
	if r.b.hovered {
		r.tint.FillColor = faded(p.Ink, 10)
	}
	showFocus(r.ring, r.b.focused)
	r.b.icon.Refresh()
	canvas.Refresh(r.tint)
}

func (r *iconButtonRenderer) Objects() []fyne.CanvasObject {
	return []fyne.CanvasObject{r.tint, r.b.icon, r.ring}
}
func (r *iconButtonRenderer) Destroy() {}
