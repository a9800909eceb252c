package gui

import (
	"image/color"

	"fyne.io/fyne/v2"
	"fyne.io/fyne/v2/canvas"
	"fyne.io/fyne/v2/driver/desktop"
	"fyne.io/fyne/v2/widget"

	"enfilade/assets"
)

// picker is a field that shows one of a few choices and drops down the others.
type picker struct {
	widget.BaseWidget
	heeded
	text    *inkText
	chevron *icon
	choices []string
	hovered bool
	focused bool
	picked  func(i int)
}

func newPicker(choices []string, picked func(i int)) *picker {
	p := &picker{text: newText("", assets.Regular, 12.5, roleInk).shrinking(), chevron: newIcon("chevron-down", 14, roleInk2),
		choices: choices, picked: picked}
	p.ExtendBaseWidget(p)
	return p
}

// put shows a choice; -1 says that several items have different ones.
func (p *picker) put(i int) {
	text, r := mixed, roleInk3
	if i >= 0 && i < len(p.choices) {
		text, r = p.choices[i], roleInk
	}
	p.text.role = r
	p.text.set(text)
}

func (p *picker) drop() {
	var items []*fyne.MenuItem
	for i, c := range p.choices {
		item := fyne.NewMenuItem(c, func() { p.picked(i) })
		item.Checked = c == p.text.text
		items = append(items, item)
	}
	c := fyne.CurrentApp().Driver().CanvasForObject(p)
	menu := widget.NewPopUpMenu(fyne.NewMenu("", items...), c)
	menu.ShowAtRelativePosition(fyne.NewPos(0, p.Size().Height+2), p)
	menu.Resize(fyne.NewSize(max(p.Size().Width, menu.MinSize().Width), menu.MinSize().Height))
}

// Tapped drops the choices down.
func (p *picker) Tapped(*fyne.PointEvent) { p.drop() }

// FocusGained draws the focus ring.
func (p *picker) FocusGained() { p.focused = true; p.Refresh(); p.heed() }

// FocusLost takes the focus ring away.
func (p *picker) FocusLost() { p.focused = false; p.Refresh() }

// TypedRune does nothing.
func (p *picker) TypedRune(rune) {}

// TypedKey drops the choices down on Space, Enter and Down; the rest is the window's.
func (p *picker) TypedKey(e *fyne.KeyEvent) {
	switch e.Name {
	case fyne.KeySpace, fyne.KeyReturn, fyne.KeyEnter, fyne.KeyDown:
		p.drop()
	default:
		passOn(p, e)
	}
}

// MouseIn tints the field.
func (p *picker) MouseIn(*desktop.MouseEvent) { p.hovered = true; p.Refresh() }

// MouseMoved does nothing.
func (p *picker) MouseMoved(*desktop.MouseEvent) {}

// MouseOut takes the tint away.
func (p *picker) MouseOut() { p.hovered = false; p.Refresh() }

// CreateRenderer is for the toolkit.
func (p *picker) CreateRenderer() fyne.WidgetRenderer {
	r := &pickerRenderer{p: p, ground: canvas.NewRectangle(nil), tint: canvas.NewRectangle(nil)}
	r.ground.CornerRadius, r.tint.CornerRadius = 4, 4
	r.Refresh()
	return r
}

type pickerRenderer struct {
	p            *picker
	ground, tint *canvas.Rectangle
}

func (r *pickerRenderer) Layout(s fyne.Size) {
	r.ground.Resize(s)
	r.tint.Resize(s)
	r.p.text.Move(fyne.NewPos(10, 0))
	r.p.text.Resize(fyne.NewSize(s.Width-34, s.Height))
	r.p.chevron.Move(fyne.NewPos(s.Width-23, (s.Height-14)/2))
	r.p.chevron.Resize(fyne.NewSquareSize(14))
}

func (r *pickerRenderer) MinSize() fyne.Size { return fyne.NewSize(92, 27) }

func (r *pickerRenderer) Refresh() {
	c := themed()
	r.ground.FillColor, r.ground.StrokeColor, r.ground.StrokeWidth = c.Field, c.FieldBorder, 1
	if r.p.focused {
		r.ground.StrokeColor, r.ground.StrokeWidth = c.Ink, 2
	}
	r.tint.FillColor = color.Transparent
	if r.p.hovered {
		r.tint.FillColor = faded(c.Ink, 7)
	}
	r.p.text.Refresh()
	r.p.chevron.Refresh()
	canvas.Refresh(r.ground)
	canvas.Refresh(r.tint)
}

func (r *pickerRenderer) Objects() []fyne.CanvasObject {
	return []fyne.CanvasObject{r.ground, r.tint, r.p.text, r.p.chevron}
}
func (r *pickerRenderer) Destroy() {}
