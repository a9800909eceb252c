package gui

import (
	"fyne.io/fyne/v2"
	"fyne.io/fyne/v2/canvas"

	"enfilade/canvas/paint"
)

// pack sets the commands below one another: closer together in a window too low for them, and where that is not enough they are
// scrolled.
func (d *dropDown) pack() {
	d.scroll = 0
	for height := float32(dropLineHeight); height >= dropLineLeast; height-- {
		y := float32(5)
		for i := range d.lines {
			l := &d.lines[i]
			if l.rule != nil {
				y += dropRule
			}
			l.y, l.height = y, height
			y += height
		}
		if y+5 <= d.room() {
			return
		}
	}
}

// room is how high the page of commands may be.
func (d *dropDown) room() float32 { return d.Size().Height - barHeight - 4 }

// beyond is how far the commands can be scrolled.
func (d *dropDown) beyond() float32 {
	_, size := d.box()
	return max(0, size.Height-d.room())
}

// shows reports whether a command is in sight as a whole.
func (d *dropDown) shows(i int) bool {
	top, bottom := float32(0), d.room()
	if d.scroll > 0 {
		top += dropMore
	}
	if d.scroll < d.beyond() {
		bottom -= dropMore
	}
	y := d.lines[i].y - d.scroll
	return d.beyond() == 0 || y >= top && y+d.lines[i].height <= bottom
}

// Scrolled moves the commands of a menu that is too long for the window.
func (d *dropDown) Scrolled(e *fyne.ScrollEvent) { d.moveBy(-e.Scrolled.DY) }

func (d *dropDown) moveBy(dy float32) {
	d.scroll = min(max(0, d.scroll+dy), d.beyond())
	d.Refresh()
}

// reveal scrolls a command into sight.
func (d *dropDown) reveal(i int) {
	l := d.lines[i]
	switch {
	case d.shows(i):
	case l.y-d.scroll < dropMore:
		d.moveBy(l.y - d.scroll - dropMore - 5)
	default:
		d.moveBy(l.y + l.height - d.scroll - d.room() + dropMore + 5)
	}
}

// CreateRenderer is for the toolkit.
func (d *dropDown) CreateRenderer() fyne.WidgetRenderer { return &dropRenderer{d: d} }

type dropRenderer struct {
	d     *dropDown
	drawn *paint.Theme // the lines were last drawn in
}

func (r *dropRenderer) Layout(fyne.Size) {
	d := r.d
	if len(d.lines) == 0 {
		return
	}
	at, size := d.box()
	size.Height -= d.beyond()
	d.page.Move(at)
	d.page.Resize(size)
	d.tint.Hidden = true
	for i, l := range d.lines {
		r.line(i, l, at.SubtractXY(0, d.scroll), size.Width)
	}
	for i, m := range d.more {
		m.Hidden = i == 0 && d.scroll == 0 || i == 1 && d.scroll >= d.beyond()
		m.Resize(fyne.NewSquareSize(14))
		m.Move(fyne.NewPos(at.X+(size.Width-14)/2, at.Y+1+float32(i)*(size.Height-16)))
	}
}

// line sets a command into its place, if that is in sight.
func (r *dropRenderer) line(i int, l dropLine, at fyne.Position, width float32) {
	d := r.d
	shown := d.shows(i)
	l.label.Hidden, l.key.Hidden = !shown, !shown
	y := at.Y + l.y
	x := at.X + dropSide + dropIcon
	if d.commands[i].do == nil {
		x = at.X + dropSide
	}
	l.label.Move(fyne.NewPos(x, y))
	l.label.Resize(fyne.NewSize(l.label.MinSize().Width, l.height))
	l.key.Move(fyne.NewPos(at.X+width-dropSide-90, y))
	l.key.Resize(fyne.NewSize(90, l.height))
	if l.icon != nil {
		l.icon.Hidden = !shown
		l.icon.Move(fyne.NewPos(at.X+dropSide, y+(l.height-16)/2))
		l.icon.Resize(fyne.NewSquareSize(16))
	}
	if l.rule != nil {
		l.rule.Hidden = !shown
		l.rule.Move(fyne.NewPos(at.X+1, y-dropRule/2-0.5))
		l.rule.Resize(fyne.NewSize(width-2, 1))
	}
	if i == d.under && shown {
		d.tint.Hidden = d.commands[i].do == nil || d.commands[i].dead
		d.tint.Move(fyne.NewPos(at.X+4, y))
		d.tint.Resize(fyne.NewSize(width-8, l.height))
	}
}

func (r *dropRenderer) MinSize() fyne.Size { return fyne.Size{} }

func (r *dropRenderer) Refresh() {
	d := r.d
	p := themed()
	d.page.FillColor, d.page.StrokeColor, d.page.StrokeWidth = p.Panel, p.Rule, 1
	d.page.Shadow = canvas.Shadow{Color: colour{A: 60}, BlurRadius: 12, Offset: fyne.NewPos(0, 4), Variant: canvas.DropShadow}
	d.tint.FillColor = faded(p.Ink, 10)
	r.Layout(d.Size())
	canvas.Refresh(d)
	if r.drawn != p {
		r.drawn = p
		for _, o := range r.Objects()[2:] {
			o.Refresh()
		}
	}
}

func (r *dropRenderer) Objects() []fyne.CanvasObject {
	o := []fyne.CanvasObject{r.d.page, r.d.tint, r.d.more[0], r.d.more[1]}
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
