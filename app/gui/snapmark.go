package gui

import (
	"math"

	"fyne.io/fyne/v2"

	"enfilade/canvas/pick"
	"enfilade/solver/exact"
)

// markWeight is the weight of a snap mark's lines, in px at 100 %.
const markWeight = 1.4

// snap marks where the pointer snapped: a diamond on a corner, a triangle on a middle, a slanted cross on a crossing, a bar
// along a wall, an angle where two things are square, two bars where they are parallel, a cross on the grid.
func (o *overlay) snap(s pick.Snap) {
	c := o.place(s.At)
	switch s.Kind {
	case pick.SnapCorner:
		o.path(c, -6, 0, 0, -6, 6, 0, 0, 6, -6, 0)
	case pick.SnapMiddle:
		o.path(c, -6, 4.5, 0, -6, 6, 4.5, -6, 4.5)
	case pick.SnapCrossing:
		o.path(c, -5, -5, 5, 5)
		o.path(c, -5, 5, 5, -5)
	case pick.SnapAlong:
		if ux, uy, ok := o.way(s.Edge); ok {
			o.line(c.SubtractXY(ux*8, uy*8), c.AddXY(ux*8, uy*8), markWeight+1, o.ink)
		}
	case pick.SnapSquare:
		if ux, uy, ok := o.way(s.Edge); ok {
			o.line(c.SubtractXY(ux*8, uy*8), c.AddXY(ux*8, uy*8), markWeight, o.ink)
			o.path(c, ux*7, uy*7, ux*7+uy*7, uy*7-ux*7, uy*7, -ux*7)
		}
	case pick.SnapParallel:
		if ux, uy, ok := o.way(s.Edge); ok {
			for _, side := range []float32{-3, 3} {
				o.path(c, -ux*7-uy*side, -uy*7+ux*side, ux*7-uy*side, uy*7+ux*side)
			}
			o.line(o.place(s.Edge[0]), o.place(s.Edge[1]), 1, faded(o.ink, quiet))
		}
	case pick.SnapGrid, pick.SnapInLine:
		o.path(c, -5, 0, 5, 0)
		o.path(c, 0, -5, 0, 5)
	}
}

// quiet is the strength of guide lines, per cent of ink.
const quiet = 38

// guides draws what a place is in line with: a thin line from each point of the drawing, with a dot on the point.
func (o *overlay) guides(list []pick.Guide) {
	for _, g := range list {
		if g.Shown() {
			from := o.place(g.From)
			o.line(from, o.place(g.To), 1, faded(o.ink, quiet))
			o.dot(from, 2.2, faded(o.ink, 2*quiet))
		}
	}
}

// path draws a line through places given by their distances from a middle, in px.
func (o *overlay) path(c fyne.Position, d ...float32) {
	for i := 0; i+3 < len(d); i += 2 {
		o.line(c.AddXY(d[i], d[i+1]), c.AddXY(d[i+2], d[i+3]), markWeight, o.ink)
	}
}

// way returns the direction of a straight piece on the screen.
func (o *overlay) way(e [2]exact.Pt) (ux, uy float32, ok bool) {
	a, b := o.place(e[0]), o.place(e[1])
	l := float32(math.Hypot(float64(b.X-a.X), float64(b.Y-a.Y)))
	if l == 0 {
		return 0, 0, false
	}
	return (b.X - a.X) / l, (b.Y - a.Y) / l, true
}
