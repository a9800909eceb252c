package gui

import (
	"image/color"

	"fyne.io/fyne/v2"
	"fyne.io/fyne/v2/canvas"
	"fyne.io/fyne/v2/driver/desktop"
	"fyne.io/fyne/v2/widget"

	"enfilade/assets"
)

// toolButton is one button of the rail: an icon and the letter that chooses it.
type toolButton struct {
	widget.BaseWidget
	icon    *icon
	letter  *inkText
	tip     string
	chosen  bool
	hovered bool
	focused bool
	tapped  func()
	typed   func(rune) // takes characters while the button has the focus
	tips    *tips
}

// The rail's button, in px at 100 %.
const (
	toolWidth  = 43
	toolHeight = 37
)

func newToolButton(iconName, letter, tip string, t *tips, tapped func()) *toolButton {
	b := &toolButton{
		icon:   newIcon(iconName, 20, roleInk),
		letter: newText(letter, assets.Semibold, 11.5, roleInk2),
		tip:    tip, tapped: tapped, tips: t, typed: func(rune) {},
	}
	b.ExtendBaseWidget(b)
	return b
}

// choose shows the button as the tool in hand.
func (b *toolButton) choose(chosen bool) {
	if b.chosen != chosen {
		b.chosen = chosen
		b.Refresh()
	}
}

// put shows another icon and tip: those of the shape in hand.
func (b *toolButton) put(icon, tip string) {
	b.tip = tip
	if b.icon.name != icon {
		b.icon.name = icon
		b.Refresh()
	}
}

// Tapped chooses the tool.
func (b *toolButton) Tapped(*fyne.PointEvent) { b.tips.hide(); b.tapped() }

// MouseIn tints the button and shows its name after a while.
func (b *toolButton) MouseIn(*desktop.MouseEvent) {
	b.hovered = true
	b.tell()
	b.Refresh()
}

// tell shows the tool's name and its key after a while.
func (b *toolButton) tell() {
	tip := b.tip
	if b.letter.text != "" {
		tip += " (" + b.letter.text + ")"
	}
	b.tips.after(tipDelay, tip, func() fyne.Position {
		return fyne.CurrentApp().Driver().AbsolutePositionForObject(b).AddXY(toolWidth+8, 7)
	})
}

// FocusGained draws the focus ring and shows the tool's name after a while.
func (b *toolButton) FocusGained() { b.focused = true; b.tell(); b.Refresh() }

// FocusLost takes the focus ring away.
func (b *toolButton) FocusLost() { b.focused = false; b.tips.hide(); b.Refresh() }

// TypedRune chooses a tool by its letter, as in the picture.
func (b *toolButton) TypedRune(r rune) {
	if r != ' ' {
		b.typed(r)
	}
}

// TypedKey takes the tool in hand on Space and Enter.
func (b *toolButton) TypedKey(e *fyne.KeyEvent) {
	if e.Name == fyne.KeySpace || e.Name == fyne.KeyReturn || e.Name == fyne.KeyEnter {
		b.Tapped(nil)
		return
	}
	passOn(b, e)
}

// MouseMoved does nothing.
func (b *toolButton) MouseMoved(*desktop.MouseEvent) {}

// MouseOut takes the tint away.
func (b *toolButton) MouseOut() {
	b.hovered = false
	b.tips.hide()
	b.Refresh()
}

// CreateRenderer is for the toolkit.
func (b *toolButton) CreateRenderer() fyne.WidgetRenderer {
	r := &toolButtonRenderer{b: b, ground: canvas.NewRectangle(nil), ring: canvas.NewRectangle(nil)}
	r.ground.CornerRadius, r.ring.CornerRadius = 6, 8
	r.Refresh()
	return r
}

type toolButtonRenderer struct {
	b      *toolButton
	ground *canvas.Rectangle
	ring   *canvas.Rectangle // keyboard focus
}

func (r *toolButtonRenderer) Layout(s fyne.Size) {
	r.ground.Resize(s)
	r.ring.Move(fyne.NewPos(-3, -3))
	r.ring.Resize(s.AddWidthHeight(6, 6))
	l := r.b.letter.MinSize()
	x := float32(3.5)
	if r.b.letter.text == "" {
		x = (s.Width - 20) / 2
	}
	r.b.icon.Move(fyne.NewPos(x, (s.Height-20)/2))
	r.b.icon.Resize(fyne.NewSquareSize(20))
	r.b.letter.Move(fyne.NewPos(33.5-l.Width/2, (s.Height-l.Height)/2)) // one below the other by their middles
	r.b.letter.Resize(l)
}

func (r *toolButtonRenderer) MinSize() fyne.Size { return fyne.NewSize(toolWidth, toolHeight) }

func (r *toolButtonRenderer) Refresh() {
	p := themed()
	r.b.icon.role, r.b.letter.role = roleInk, roleInk2
	r.ground.FillColor = color.Transparent
	switch {
	case r.b.chosen:
		r.ground.FillColor = p.ToolFill
		r.b.icon.role, r.b.letter.role = roleToolIcon, roleToolIcon
	case r.b.hovered:
		r.ground.FillColor = faded(p.Ink, 7)
	}
	r.b.icon.Refresh()
	r.b.letter.Refresh()
	showFocus(r.ring, r.b.focused)
	canvas.Refresh(r.ground)
}

func (r *toolButtonRenderer) Objects() []fyne.CanvasObject {
	return []fyne.CanvasObject{r.ring, r.ground, r.b.icon, r.b.letter}
}
func (r *toolButtonRenderer) Destroy() {}
