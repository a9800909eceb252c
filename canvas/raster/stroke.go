package raster

import (
	"math"

	"enfilade/canvas/paint"
)

// stroke adds the outline of an op's stroked path: a rectangle for each straight piece, a patch for each corner and cap.
// They overlap and are filled by winding number.
func (f *filler) stroke(l *paint.List, op *paint.Op, s paint.StrokeStyle) {
	for _, sub := range l.Path(op) {
		f.strokeLine(l.Points[sub.First:sub.Last], sub.Closed, sub.Phase, s)
	}
}

func (f *filler) strokeLine(pts []paint.Pt, closed bool, phase float32, s paint.StrokeStyle) {
	if s.On <= 0 {
		f.strokeRun(pts, closed, s)
		return
	}
	d := dasher{f: f, style: s, run: f.run[:0]}
	d.begin(phase)
	n := len(pts)
	last := n - 1
	if closed {
		last = n
	}
	d.point(pts[0])
	for i := 1; i <= last; i++ {
		d.line(pts[i-1], pts[i%n])
	}
	d.end()
	f.run = d.run
}

// dasher cuts a line into dashes; a dash may go round corners.
type dasher struct {
	f     *filler
	style paint.StrokeStyle
	run   []paint.Pt
	on    bool
	left  float32 // of the dash or gap it is in
}

func (d *dasher) begin(phase float32) {
	period := d.style.On + d.style.Off
	phase = float32(math.Mod(float64(phase), float64(period)))
	d.on, d.left = true, d.style.On-phase
	if phase >= d.style.On {
		d.on, d.left = false, period-phase
	}
}

func (d *dasher) point(p paint.Pt) {
	if d.on {
		d.run = append(d.run, p)
	}
}

func (d *dasher) line(a, b paint.Pt) {
	dx, dy := b.X-a.X, b.Y-a.Y
	length := float32(math.Hypot(float64(dx), float64(dy)))
	if length == 0 {
		return
	}
	at := float32(0)
	for length-at > d.left {
		at += d.left
		q := paint.Pt{X: a.X + dx*at/length, Y: a.Y + dy*at/length}
		if d.on {
			d.run = append(d.run, q)
			d.end()
			d.on, d.left = false, d.style.Off
		} else {
			d.run = append(d.run[:0], q)
			d.on, d.left = true, d.style.On
		}
	}
	d.left -= length - at
	d.point(b)
}

func (d *dasher) end() {
	if d.on && len(d.run) > 1 {
		d.f.strokeRun(d.run, false, d.style)
	}
	d.run = d.run[:0]
}

// strokeRun strokes one line without dashes.
func (f *filler) strokeRun(pts []paint.Pt, closed bool, s paint.StrokeStyle) {
	h := s.Width / 2
	n := len(pts)
	if n == 1 {
		if s.Cap == paint.RoundCap {
			f.dot(pts[0], h)
		}
		return
	}
	last := n - 1
	if closed {
		last = n
	}
	var before, first direction
	for i := 1; i <= last; i++ {
		a, b := pts[i-1], pts[i%n]
		u, ok := directionOf(a, b)
		if !ok {
			continue
		}
		a2, b2 := a, b
		if !closed && s.Cap == paint.Square {
			if !first.set {
				a2 = paint.Pt{X: a.X - u.x*h, Y: a.Y - u.y*h}
			}
			if i == last {
				b2 = paint.Pt{X: b.X + u.x*h, Y: b.Y + u.y*h}
			}
		}
		nx, ny := -u.y*h, u.x*h
		f.polygon(paint.Pt{X: a2.X + nx, Y: a2.Y + ny}, paint.Pt{X: b2.X + nx, Y: b2.Y + ny},
			paint.Pt{X: b2.X - nx, Y: b2.Y - ny}, paint.Pt{X: a2.X - nx, Y: a2.Y - ny})
		if before.set {
			f.join(a, before, u, h, s.Join)
		} else {
			first = u
		}
		before = u
	}
	switch {
	case closed && before.set:
		f.join(pts[0], before, first, h, s.Join)
	case s.Cap == paint.RoundCap:
		f.dot(pts[0], h)
		f.dot(pts[n-1], h)
	}
}

// direction is a unit vector.
type direction struct {
	x, y float32
	set  bool
}

func directionOf(a, b paint.Pt) (direction, bool) {
	dx, dy := b.X-a.X, b.Y-a.Y
	length := float32(math.Hypot(float64(dx), float64(dy)))
	if length == 0 {
		return direction{}, false
	}
	return direction{dx / length, dy / length, true}, true
}

// mitreLimit is how many half widths a mitre may reach.
const mitreLimit = 4

// join fills the wedge outside a corner.
func (f *filler) join(c paint.Pt, in, out direction, h float32, j paint.Join) {
	cross, dot := in.x*out.y-in.y*out.x, in.x*out.x+in.y*out.y
	if cross == 0 && dot > 0 {
		return
	}
	if j == paint.RoundJoin && dot < 0.99 {
		f.dot(c, h)
		return
	}
	side := h
	if cross > 0 { // turning right on the picture: the wedge lies on the left
		side = -h
	}
	a := paint.Pt{X: c.X - in.y*side, Y: c.Y + in.x*side}
	b := paint.Pt{X: c.X - out.y*side, Y: c.Y + out.x*side}
	if 1+dot < 2.0/(mitreLimit*mitreLimit) { // the tip lies sqrt(2 / (1 + dot)) half widths away
		f.polygon(c, a, b)
		return
	}
	m := side / (1 + dot)
	tip := paint.Pt{X: c.X - (in.y+out.y)*m, Y: c.Y + (in.x+out.x)*m}
	f.polygon(c, a, tip, b)
}

// dot adds a disc.
func (f *filler) dot(c paint.Pt, r float32) {
	n := min(int(10*math.Sqrt(float64(r)))+4, 64) // no side strays by more than 0.05 px from the circle
	for i := range n + 1 {
		sin, cos := math.Sincos(2 * math.Pi * float64(i%n) / float64(n))
		q := f.fixed(c.X+r*float32(cos), c.Y+r*float32(sin))
		if i == 0 {
			f.r.Start(q)
		} else {
			f.r.Add1(q)
		}
	}
}
