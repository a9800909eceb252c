package sight

import (
	"math"

	"enfilade/solver/exact"
)

// Direction returns the direction of the given angle in degrees, counter-clockwise from +x, rounded once to a long grid
// vector; it is exact from there on. Multiples of 45 degrees come out exact.
func Direction(degrees float64) exact.Vec {
	const long = 1 << 29
	d := math.Mod(degrees, 360)
	if d < 0 {
		d += 360
	}
	if d == 360 { // a tiny negative angle plus 360
		d = 0
	}
	if k := d / 45; k == math.Trunc(k) {
		eighths := [8]exact.Vec{{X: 1}, {X: 1, Y: 1}, {Y: 1}, {X: -1, Y: 1}, {X: -1}, {X: -1, Y: -1}, {Y: -1}, {X: 1, Y: -1}}
		v := eighths[int(k)]
		return exact.Vec{X: v.X * long, Y: v.Y * long}
	}
	s, c := math.Sincos(d * math.Pi / 180)
	return exact.Vec{X: int32(math.Round(c * long)), Y: int32(math.Round(s * long))}
}

// View returns the clip of an eye with the given heading and view angle in degrees; 360 or more is all round.
func View(heading, view float64) Clip {
	if view >= 360 {
		return Clip{}
	}
	return Clip{Sides: true, Right: Direction(heading - view/2), Mid: Direction(heading), Left: Direction(heading + view/2)}
}

// Front returns the clip of a face seen from its front, which lies to the left of the line from a to b: half a turn.
func Front(a, b exact.Pt) Clip {
	d := b.Sub(a)
	return Clip{Sides: true, Right: d, Mid: d.Left(), Left: d.Neg()}
}

// holds reports whether the clip leaves direction d and the point p in.
func (c *Clip) holds(p exact.Pt, d exact.Vec) bool {
	if c.Sides && !within(c.Right, c.Mid, d) && !within(c.Mid, c.Left, d) {
		return false
	}
	for i, a := range c.Range {
		b := c.Range[(i+1)%len(c.Range)]
		if exact.Area2(a, b, p) < 0 {
			return false
		}
	}
	return true
}

// within reports whether d lies in the closed sector from r to l, at most half a turn.
func within(r, l, d exact.Vec) bool {
	return r.Cross(d) >= 0 && d.Cross(l) >= 0 && (r.Cross(l) > 0 || r.Cross(d) > 0 || sameWay(r, d) || sameWay(l, d))
}
