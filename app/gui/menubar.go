package gui

import (
	"fyne.io/fyne/v2"
	"fyne.io/fyne/v2/canvas"
	"fyne.io/fyne/v2/driver/desktop"
	"fyne.io/fyne/v2/widget"

	"enfilade/assets"
)

// menuBar is the line of menu titles along the top of the window. Its drop-down is a layer over the window.
type menuBar struct {
	widget.BaseWidget
	menus   []menu
	titles  []*inkText
	under   int // the title under the pointer or chosen by keys, -1 for none
	drop    *dropDown
	focused bool
}

// The menu bar, in px at 100 %.
const (
	barHeight = 30
	barSide   = 14 // left of the first title
	barGap    = 26 // between titles
)

func newMenuBar(menus []menu) *menuBar {
	b := &menuBar{menus: menus, under: -1}
	for _, m := range menus {
		b.titles = append(b.titles, newText(m.title, assets.Regular, 13, roleInk))
	}
	b.drop = newDropDown(b)
	b.ExtendBaseWidget(b)
	return b
}

// span returns where a title can be hit, from left to right.
func (b *menuBar) span(i int) (from, to float32) {
	x := float32(barSide)
	for j := range i {
		x += b.titles[j].MinSize().Width + barGap
	}
	return x - barGap/2, x + b.titles[i].MinSize().Width + barGap/2
}

// titleAt returns the title at a place of the bar, -1 for none.
func (b *menuBar) titleAt(p fyne.Position) int {
	for i := range b.titles {
		if from, to := b.span(i); p.X >= from && p.X < to && p.Y >= 0 && p.Y < barHeight {
			return i
		}
	}
	return -1
}

// MouseDown opens the menu under the pointer.
func (b *menuBar) MouseDown(e *desktop.MouseEvent) {
	if i := b.titleAt(e.Position); i >= 0 {
		b.drop.open(i)
	}
}

// FocusGained tints the first title.
func (b *menuBar) FocusGained() { b.focused = true; b.under = max(b.under, 0); b.Refresh() }

// FocusLost takes the tint away.
func (b *menuBar) FocusLost() { b.focused = false; b.under = -1; b.Refresh() }

// TypedRune does nothing.
func (b *menuBar) TypedRune(rune) {}

// TypedKey goes along the titles by arrows, and opens one by Down, Space or Enter. Escape leads back to the picture.
func (b *menuBar) TypedKey(e *fyne.KeyEvent) {
	n := len(b.titles)
	switch e.Name {
	case fyne.KeyRight:
		b.under = (b.under + 1) % n
	case fyne.KeyLeft:
		b.under = (b.under + n - 1) % n
	case fyne.KeyDown, fyne.KeySpace, fyne.KeyReturn, fyne.KeyEnter:
		at := max(b.under, 0)
		b.drop.open(at)
		b.drop.step(1)
		return
	case fyne.KeyEscape:
		b.drop.back()
		return
	}
	b.Refresh()
}

// MouseUp does nothing.
func (b *menuBar) MouseUp(*desktop.MouseEvent) {}

// MouseIn tints the title under the pointer.
func (b *menuBar) MouseIn(e *desktop.MouseEvent) { b.MouseMoved(e) }

// MouseMoved tints the title under the pointer.
func (b *menuBar) MouseMoved(e *desktop.MouseEvent) {
	if i := b.titleAt(e.Position); i != b.under {
		b.under = i
		b.Refresh()
	}
}

// MouseOut takes the tint away.
func (b *menuBar) MouseOut() {
	b.under = -1
	b.Refresh()
}

// CreateRenderer is for the toolkit.
func (b *menuBar) CreateRenderer() fyne.WidgetRenderer {
	r := &barRenderer{b: b, tint: canvas.NewRectangle(nil)}
	r.tint.CornerRadius = 4
	r.Refresh()
	return r
}

type barRenderer struct {
	b    *menuBar
	tint *canvas.Rectangle
}

func (r *barRenderer) Layout(s fyne.Size) {
	for i, t := range r.b.titles {
		from, _ := r.b.span(i)
		t.Move(fyne.NewPos(from+barGap/2, 0))
		t.Resize(fyne.NewSize(t.MinSize().Width, barHeight))
	}
	if i := r.lit(); i >= 0 {
		from, to := r.b.span(i)
		r.tint.Move(fyne.NewPos(from+3, 3))
		r.tint.Resize(fyne.NewSize(to-from-6, barHeight-6))
	}
}

// lit is the title that is tinted: the open one, else the one under the pointer.
func (r *barRenderer) lit() int {
	if r.b.drop.Visible() {
		return r.b.drop.at
	}
	return r.b.under
}

func (r *barRenderer) MinSize() fyne.Size { return fyne.NewSize(200, barHeight) }

func (r *barRenderer) Refresh() {
	p := themed()
	r.tint.FillColor = faded(p.Ink, 7)
	r.tint.StrokeColor, r.tint.StrokeWidth = faded(p.Ink, 0), 0
	if r.b.drop.Visible() {
		r.tint.FillColor = faded(p.Ink, 13)
	}
	if r.b.focused {
		r.tint.StrokeColor, r.tint.StrokeWidth = p.Ink, 2
	}
	r.tint.Hidden = r.lit() < 0
	r.Layout(r.b.Size())
	for _, t := range r.b.titles {
		t.Refresh()
	}
	canvas.Refresh(r.tint)
}

func (r *barRenderer) Objects() []fyne.CanvasObject {
	o := []fyne.CanvasObject{r.tint}
	for _, t := range r.b.titles {
		o = append(o, t)
	}
	return o
}
func (r *barRenderer) Destroy() {}
