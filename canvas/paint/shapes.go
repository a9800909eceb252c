package paint

import "math"

// disc adds a circle.
func (l *List) disc(c place, r float64) {
	l.arcOf(c, r, 0, 2*math.Pi)
	l.close()
}

// arcOf adds an arc about c from one angle over so many radians, in the picture's sense: positive is clockwise. A full turn
// does not repeat its first point.
func (l *List) arcOf(c place, r, from, over float64) {
	n := max(arcSteps(r, math.Abs(over)), 8)
	last := n
	if math.Abs(over) >= 2*math.Pi {
		last = n - 1
	}
	for i := 0; i <= last; i++ {
		sin, cos := math.Sincos(from + over*float64(i)/float64(n))
		if i == 0 {
			l.move(c.x+r*cos, c.y+r*sin)
		} else {
			l.line(c.x+r*cos, c.y+r*sin)
		}
	}
}

// turtle places points of a glyph: x along its direction, y to the right of it, as seen on the picture.
type turtle struct {
	at       place
	cos, sin float64
	k        float64
}

// turtleAt returns the frame of a glyph that points along an angle of the plan, in degrees counter-clockwise.
func (p *pen) turtleAt(c place, degrees float64) turtle {
	sin, cos := math.Sincos(-degrees * math.Pi / 180)
	return turtle{c, cos, sin, p.k}
}

func (t turtle) to(x, y float64) place {
	x, y = x*t.k, y*t.k
	return place{t.at.x + x*t.cos - y*t.sin, t.at.y + x*t.sin + y*t.cos}
}

// angle returns the glyph's direction in the picture's sense.
func (t turtle) angle() float64 { return math.Atan2(t.sin, t.cos) }

func (l *List) moveTo(q place) { l.move(q.x, q.y) }
func (l *List) lineTo(q place) { l.line(q.x, q.y) }

// strip adds an open line through glyph points.
func (l *List) strip(t turtle, pts ...[2]float64) {
	for i, q := range pts {
		if i == 0 {
			l.moveTo(t.to(q[0], q[1]))
		} else {
			l.lineTo(t.to(q[0], q[1]))
		}
	}
}

// slottedDisc adds a disc with a slot cut from x = 2 to the rim.
func (l *List) slottedDisc(t turtle, r, slot float64) {
	k := t.k
	half := math.Asin(slot / 2 / r)
	l.arcOf(t.at, r*k, t.angle()+half, 2*math.Pi-2*half)
	// The slot's round inner end, from the side the arc stopped at back to the other.
	for i := range 9 {
		sin, cos := math.Sincos(-math.Pi/2 - math.Pi*float64(i)/8)
		l.lineTo(t.to(2+slot/2+slot/2*cos, slot/2*sin))
	}
	l.close()
}

// roundRect adds a rectangle about the glyph's point with rounded corners.
func (l *List) roundRect(t turtle, w, h, r float64) {
	first := true
	for corner := range 4 {
		cx, cy := corners[corner][0]*(w/2-r), corners[corner][1]*(h/2-r)
		for i := range 4 {
			sin, cos := math.Sincos(math.Pi/2*float64(corner) + math.Pi/6*float64(i) - math.Pi/2)
			q := t.to(cx+r*cos, cy+r*sin)
			if first {
				l.moveTo(q)
				first = false
			} else {
				l.lineTo(q)
			}
		}
	}
	l.close()
}

// corners are the signs of a rectangle's corners, upper right first, clockwise on the picture.
var corners = [4][2]float64{{1, -1}, {1, 1}, {-1, 1}, {-1, -1}}
