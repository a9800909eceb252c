package gui

import (
	"math"
	"sort"

	"fyne.io/fyne/v2"
	"fyne.io/fyne/v2/canvas"
	"fyne.io/fyne/v2/widget"

	"enfilade/assets"
)

// inkText is one line of text in a weight, a size and a role's colour. It is shortened with an ellipsis where there is no
// room for it.
type inkText struct {
	widget.BaseWidget
	text   string
	weight assets.Weight
	size   float32
	role   role
	align  fyne.TextAlign
	soft   bool   // its minimum width is nothing
	brief  string // what stands for the text where there is no room for it; empty to cut it
}

func newText(text string, weight assets.Weight, size float32, r role) *inkText {
	t := &inkText{text: text, weight: weight, size: size, role: r}
	t.ExtendBaseWidget(t)
	return t
}

// heading is a panel's heading, body its text, caption a small line.
func heading(text string) *inkText { return newText(text, assets.Bold, 14, roleInk) }
func body(text string) *inkText    { return newText(text, assets.Regular, 12.5, roleInk) }
func caption(text string) *inkText { return newText(text, assets.Regular, 12, roleInk2) }

// shrinking lets the text be cut to whatever room there is.
func (t *inkText) shrinking() *inkText { t.soft = true; return t }

func (t *inkText) right() *inkText { t.align = fyne.TextAlignTrailing; return t }

// set changes the text; the same text costs nothing.
func (t *inkText) set(text string) {
	if t.text != text {
		t.text = text
		t.Refresh()
	}
}

func textSize(text string, w assets.Weight, size float32) fyne.Size {
	s, _ := fyne.CurrentApp().Driver().RenderedTextSize(text, size, fyne.TextStyle{}, fontOf(w))
	return s
}

// fitted returns as much of text as width has room for.
func fitted(text string, w assets.Weight, size, width float32) string {
	if textSize(text, w, size).Width <= width+0.5 {
		return text
	}
	r := []rune(text)
	cut := func(n int) string { return string(r[:n]) + "…" }
	n := sort.Search(len(r)-1, func(n int) bool { return textSize(cut(n+1), w, size).Width > width }) // more letters are wider
	if n == 0 {
		return ""
	}
	return cut(n)
}

// CreateRenderer is for the toolkit.
func (t *inkText) CreateRenderer() fyne.WidgetRenderer {
	r := &textRenderer{t: t, c: canvas.NewText(t.text, t.role(themed()))}
	r.Refresh()
	return r
}

type textRenderer struct {
	t *inkText
	c *canvas.Text
}

func (r *textRenderer) Layout(s fyne.Size) {
	r.c.Text = r.t.text
	if r.t.soft {
		r.c.Text = fitted(r.t.text, r.t.weight, r.t.size, s.Width)
		if r.c.Text != r.t.text && r.t.brief != "" {
			r.c.Text = fitted(r.t.brief, r.t.weight, r.t.size, s.Width)
		}
	}
	h := r.c.MinSize().Height
	r.c.Move(fyne.NewPos(0, (s.Height-h)/2))
	r.c.Resize(fyne.NewSize(s.Width, h))
}

func (r *textRenderer) MinSize() fyne.Size {
	s := textSize(r.t.text, r.t.weight, r.t.size)
	s.Height = float32(math.Ceil(float64(s.Height))) // whole pixels, so that what stands in one line is rounded alike
	if r.t.soft {
		s.Width = 0
	}
	return s
}

func (r *textRenderer) Refresh() {
	r.c.FontSource, r.c.TextSize, r.c.Alignment = fontOf(r.t.weight), r.t.size, r.t.align
	r.c.Color = r.t.role(themed())
	r.Layout(r.t.Size())
	canvas.Refresh(r.c)
}

func (r *textRenderer) Objects() []fyne.CanvasObject { return []fyne.CanvasObject{r.c} }
func (r *textRenderer) Destroy()                     {}
