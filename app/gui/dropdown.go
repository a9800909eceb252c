package gui

import (
	"fyne.io/fyne/v2"
	"fyne.io/fyne/v2/canvas"
	"fyne.io/fyne/v2/driver/desktop"
	"fyne.io/fyne/v2/widget"

	"enfilade/assets"
)

// dropDown is the open menu: a layer over the whole window that holds the commands, closes on a click elsewhere, and goes
// on to another menu when the pointer or the arrow keys do.
type dropDown struct {
	widget.BaseWidget
	bar      *menuBar
	at       int // the open menu
	commands []command
	lines    []dropLine
	alt      bool   // Alt is down and nothing else has happened since
	under    int    // the command under the pointer or chosen by keys, -1 for none
	back     func() // gives the focus back
	page     *canvas.Rectangle
	tint     *canvas.Rectangle
}

// dropLine is one command on the window.
type dropLine struct {
	label, key *inkText
	icon       *icon
	rule       *paper
	y, height  float32
}

// The drop-down, in px at 100 %.
const (
	dropLineHeight = 27
	dropRule       = 9
	dropSide       = 12
	dropIcon       = 26 // room for icons and check marks
)

func newDropDown(b *menuBar) *dropDown {
	d := &dropDown{bar: b, under: -1, page: canvas.NewRectangle(nil), tint: canvas.NewRectangle(nil), back: func() {}}
	d.page.CornerRadius, d.tint.CornerRadius = 4, 3
	d.ExtendBaseWidget(d)
	d.Hide()
	return d
}

// open drops a menu down.
func (d *dropDown) open(i int) {
	d.at, d.under = i, -1
	d.commands = d.bar.menus[i].commands()
	d.lines = nil
	y := float32(5)
	for _, c := range d.commands {
		l := dropLine{label: newText(c.label, assets.Regular, 13, c.role()), key: newText(c.key, assets.Regular, 12, roleInk3).right()}
		if c.do == nil {
			l.label = newText(c.label, assets.Semibold, 11.5, roleInk2)
		}
		switch {
		case c.checked:
			l.icon = newIcon("check", 16, roleInk)
		case c.icon != "":
			l.icon = newIcon(c.icon, 16, c.role())
		}
		if c.rule {
			l.rule = hairline()
			y += dropRule
		}
		l.y, l.height = y, dropLineHeight
		y += dropLineHeight
		d.lines = append(d.lines, l)
	}
	d.Show()
	d.Refresh()
	d.bar.Refresh()
	if c := fyne.CurrentApp().Driver().CanvasForObject(d); c != nil {
		c.Focus(d)
	}
}

// role is the colour of a command's words.
func (c command) role() role {
	if c.dead {
		return roleInk3
	}
	return roleInk
}

// close puts the menu away.
func (d *dropDown) close() {
	if d.Visible() {
		d.Hide()
		d.bar.under = -1
		d.bar.Refresh()
		d.back()
	}
}

// run does a command and puts the menu away.
func (d *dropDown) run(i int) {
	if i < 0 || i >= len(d.commands) || d.commands[i].do == nil || d.commands[i].dead {
		return
	}
	do := d.commands[i].do
	d.close()
	do()
}

// box returns where the page of commands lies.
func (d *dropDown) box() (at fyne.Position, size fyne.Size) {
	from, _ := d.bar.span(d.at)
	labels, keys := float32(0), float32(0)
	for _, l := range d.lines {
		labels, keys = max(labels, l.label.MinSize().Width), max(keys, l.key.MinSize().Width)
	}
	last := d.lines[len(d.lines)-1]
	return fyne.NewPos(from+2, barHeight), fyne.NewSize(max(180, dropSide*2+dropIcon+labels+28+keys), last.y+last.height+5)
}

// lineAt returns the command at a place of the layer, -1 for none.
func (d *dropDown) lineAt(p fyne.Position) int {
	at, size := d.box()
	if p.X < at.X || p.X >= at.X+size.Width {
		return -1
	}
	for i, l := range d.lines {
		if y := p.Y - at.Y - l.y; y >= 0 && y < l.height {
			return i
		}
	}
	return -1
}

// MouseDown does nothing: the command is done when the button is let go, so that one can press, slide and release.
func (d *dropDown) MouseDown(*desktop.MouseEvent) {}

// MouseUp does the command under the pointer; elsewhere it puts the menu away, but for the title it was opened by.
func (d *dropDown) MouseUp(e *desktop.MouseEvent) {
	switch i := d.lineAt(e.Position); {
	case i >= 0:
		d.run(i)
	case d.bar.titleAt(e.Position) != d.at:
		at, size := d.box()
		if p := e.Position; p.X < at.X || p.Y < at.Y || p.X > at.X+size.Width || p.Y > at.Y+size.Height {
			d.close()
		}
	}
}

// MouseIn is for the toolkit.
func (d *dropDown) MouseIn(e *desktop.MouseEvent) { d.MouseMoved(e) }

// MouseMoved tints the command under the pointer, or goes on to the menu under it.
func (d *dropDown) MouseMoved(e *desktop.MouseEvent) {
	if t := d.bar.titleAt(e.Position); t >= 0 && t != d.at {
		d.open(t)
		return
	}
	if i := d.lineAt(e.Position); i != d.under {
		d.under = i
		d.Refresh()
	}
}

// MouseOut does nothing.
func (d *dropDown) MouseOut() {}

// FocusGained is for the toolkit.
func (d *dropDown) FocusGained() {}

// FocusLost puts the menu away.
func (d *dropDown) FocusLost() {
	if d.Visible() {
		d.Hide()
		d.bar.under = -1
		d.bar.Refresh()
	}
}

// TypedRune does nothing.
func (d *dropDown) TypedRune(rune) {}

// TypedKey goes through the menus by arrows.
func (d *dropDown) TypedKey(e *fyne.KeyEvent) {
	n := len(d.bar.menus)
	switch e.Name {
	case fyne.KeyEscape, fyne.KeyF10:
		d.close()
	case fyne.KeyLeft:
		d.open((d.at + n - 1) % n)
	case fyne.KeyRight:
		d.open((d.at + 1) % n)
	case fyne.KeyUp:
		d.step(-1)
	case fyne.KeyDown:
		d.step(1)
	case fyne.KeyReturn, fyne.KeyEnter, fyne.KeySpace:
		d.run(d.under)
	}
}

// KeyDown notes that Alt is pressed.
func (d *dropDown) KeyDown(e *fyne.KeyEvent) { d.alt = isAlt(e.Name) }

// KeyUp puts the menu away when Alt was pressed alone, as it was opened.
func (d *dropDown) KeyUp(e *fyne.KeyEvent) {
	if d.alt && isAlt(e.Name) {
		d.close()
	}
	d.alt = false
}

// step goes to the next command that can be done.
func (d *dropDown) step(by int) {
	n := len(d.commands)
	if d.under < 0 && by < 0 {
		d.under = 0
	}
	for range n {
		d.under = (d.under + by + n) % n
		if c := d.commands[d.under]; c.do != nil && !c.dead {
			break
		}
	}
	d.Refresh()
}

// CreateRenderer is for the toolkit.
func (d *dropDown) CreateRenderer() fyne.WidgetRenderer { return &dropRenderer{d} }

type dropRenderer struct{ d *dropDown }

func (r *dropRenderer) Layout(fyne.Size) {
	d := r.d
	if len(d.lines) == 0 {
		return
	}
	at, size := d.box()
	d.page.Move(at)
	d.page.Resize(size)
	for i, l := range d.lines {
		y := at.Y + l.y
		x := at.X + dropSide + dropIcon
		if d.commands[i].do == nil {
			x = at.X + dropSide
		}
		l.label.Move(fyne.NewPos(x, y))
		l.label.Resize(fyne.NewSize(l.label.MinSize().Width, l.height))
		l.key.Move(fyne.NewPos(at.X+size.Width-dropSide-90, y))
		l.key.Resize(fyne.NewSize(90, l.height))
		if l.icon != nil {
			l.icon.Move(fyne.NewPos(at.X+dropSide, y+(l.height-16)/2))
			l.icon.Resize(fyne.NewSquareSize(16))
		}
		if l.rule != nil {
			l.rule.Move(fyne.NewPos(at.X+1, y-dropRule/2-0.5))
			l.rule.Resize(fyne.NewSize(size.Width-2, 1))
		}
		if i == d.under {
			d.tint.Move(fyne.NewPos(at.X+4, y))
			d.tint.Resize(fyne.NewSize(size.Width-8, l.height))
		}
	}
}

func (r *dropRenderer) MinSize() fyne.Size { return fyne.Size{} }

func (r *dropRenderer) Refresh() {
	d := r.d
	p := themed()
	d.page.FillColor, d.page.StrokeColor, d.page.StrokeWidth = p.Panel, p.Rule, 1
	d.page.Shadow = canvas.Shadow{Color: colour{A: 60}, BlurRadius: 12, Offset: fyne.NewPos(0, 4), Variant: canvas.DropShadow}
	d.tint.FillColor = faded(p.Ink, 10)
	d.tint.Hidden = d.under < 0 || d.commands[d.under].do == nil || d.commands[d.under].dead
	r.Layout(d.Size())
	canvas.Refresh(d)
}

func (r *dropRenderer) Objects() []fyne.CanvasObject {
	o := []fyne.CanvasObject{r.d.page, r.d.tint}
	for _, l := range r.d.lines {
		o = append(o, l.label, l.key)
		if l.icon != nil {
			o = append(o, l.icon)
		}
		if l.rule != nil {
			o = append(o, l.rule)
		}
	}
	return o
}
func (r *dropRenderer) Destroy() {}
