package gui

import (
	"time"

	"fyne.io/fyne/v2"
	"fyne.io/fyne/v2/canvas"
	"fyne.io/fyne/v2/container"

	"enfilade/assets"
)

// How long the pointer rests on a button, or on an item of the plan, before its name is shown.
const (
	tipDelay  = 600 * time.Millisecond
	nameDelay = 300 * time.Millisecond
)

// tips shows one small line of text near the pointer, on a layer over the window that takes no events.
type tips struct {
	layer *fyne.Container
	box   *canvas.Rectangle
	text  *inkText
	timer *time.Timer
	do    func(func()) // runs a function on the toolkit's goroutine
}

func newTips(do func(func())) *tips {
	t := &tips{box: canvas.NewRectangle(nil), text: newText("", assets.Regular, 12, roleInk), do: do}
	t.box.CornerRadius, t.box.StrokeWidth = 4, 1
	t.layer = container.NewWithoutLayout(t.box, t.text)
	t.layer.Hide()
	return t
}

// after shows text at a place when the pointer has rested for a while.
func (t *tips) after(delay time.Duration, text string, at func() fyne.Position) {
	t.hide()
	t.timer = time.AfterFunc(delay, func() { t.do(func() { t.show(text, at()) }) })
}

func (t *tips) show(text string, at fyne.Position) {
	if t.timer == nil {
		return
	}
	p := themed()
	t.box.FillColor, t.box.StrokeColor = p.Field, p.FieldBorder
	t.text.set(text)
	size := textSize(text, assets.Regular, 12)
	window := t.layer.Size()
	at.X = max(4, min(at.X, window.Width-size.Width-20))
	at.Y = max(4, min(at.Y, window.Height-size.Height-12))
	t.box.Move(at)
	t.box.Resize(size.AddWidthHeight(16, 8))
	t.text.Move(at.AddXY(8, 4))
	t.text.Resize(size)
	t.layer.Show()
	t.layer.Refresh()
}

func (t *tips) hide() {
	if t.timer != nil {
		t.timer.Stop()
		t.timer = nil
	}
	if t.layer.Visible() {
		t.layer.Hide()
	}
}
