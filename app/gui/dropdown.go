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
	alt      bool    // Alt is down and nothing else has happened since
	under    int     // the command under the pointer or chosen by keys, -1 for none
	take     func()  // takes the focus
	back     func()  // gives the focus back
	scroll   float32 // how far the commands are moved up in a window too low for all
	page     *canvas.Rectangle
	tint     *canvas.Rectangle
	more     [2]*icon // commands are left out above, and below
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
	dropLineLeast  = 22 // in a low window
	dropMore       = 15 // the strip that says that there are more commands
	dropRule       = 9
	dropSide       = 12
	dropIcon       = 26 // room for icons and check marks
)

func newDropDown(b *menuBar) *dropDown {
	d := &dropDown{bar: b, under: -1, page: canvas.NewRectangle(nil), tint: canvas.NewRectangle(nil), take: func() {}, back: func() {},
		more: [2]*icon{newIcon("chevron-up", 14, roleInk2), newIcon("chevron-down", 14, roleInk2)}}
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
		}
		d.lines = append(d.lines, l)
	}
	d.pack()
	d.Show()
	d.Refresh()
	d.bar.Refresh()
	d.take()
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

// box returns where the page of all commands lies; what does not fit into the window is scrolled to.
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
		if y := p.Y - at.Y - l.y + d.scroll; y >= 0 && y < l.height && d.shows(i) {
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
	d.reveal(d.under)
	d.Refresh()
}
