package arrange

import (
	"cmp"
	"math"
	"math/bits"
	"slices"

	"enfilade/solver/exact"
)

// corner is the outline of a wall where it turns, on either side, in the direction of travel. A side has one point (a mitre,
// or the clean corner within), two (a bevel), or three: the end of the leg before, the turning point itself, and the
// beginning of the leg after, when a leg is too short for the clean corner. In that case the outline overlaps itself, which
// the winding number forgives: the outline is always the sum of the legs' rectangles and the wedges between them, each
// counter-clockwise.
type corner struct{ right, left cornerSide }

type cornerSide struct {
	pts [3]exact.Pt
	n   int
}

// through returns the points for an outline that goes on round the corner.
func (c *cornerSide) through() []exact.Pt { return c.pts[:c.n] }

// arriving returns the points for the body of the leg before the corner alone; the turning point closes it.
func (c *cornerSide) arriving() []exact.Pt {
	if c.n == 3 {
		return c.pts[:1]
	}
	return c.pts[:c.n]
}

// leaving returns the points for the body of the leg after the corner alone.
func (c *cornerSide) leaving() []exact.Pt {
	if c.n == 3 {
		return c.pts[2:]
	}
	return c.pts[:c.n]
}

// turn returns the corner at p between two legs of a wall that reaches right2 and left2 half units to its sides.
func turn(p exact.Pt, in, out room, right2, left2 int32) corner {
	side := in.d.Cross(out.d)
	dot := in.d.Dot(out.d)
	if sharp(in.d, out.d, dot) {
		bevel := func(side2 int32) cornerSide {
			return cornerSide{[3]exact.Pt{beside(p, in.d, 0, side2), beside(p, out.d, 0, side2)}, 2}
		}
		switch {
		case side > 0:
			return corner{bevel(-right2), around(p, in, out, left2)}
		case side < 0:
			return corner{around(p, in, out, -right2), bevel(left2)}
		}
		return corner{around(p, in, out, -right2), around(p, in, out, left2)} // a u-turn has no outside
	}
	c := corner{mitre(p, in, out, dot, -right2), mitre(p, in, out, dot, left2)}
	if side > 0 && !clean(p, in, out, c.left.pts[0]) {
		c.left = around(p, in, out, left2)
	}
	if side < 0 && !clean(p, in, out, c.right.pts[0]) {
		c.right = around(p, in, out, -right2)
	}
	return c
}

// sharp reports whether a mitre would reach farther than four times the side's reach: 1/cos(t/2) > 4 for a turn by t, that
// is cos t < -7/8. Exact: 8·dot and 7·len2 stay below 2^64.
func sharp(in, out exact.Vec, dot int64) bool {
	if dot >= 0 {
		return false
	}
	h1, l1 := bits.Mul64(uint64(-8*dot), uint64(-8*dot))
	h2, l2 := bits.Mul64(7*uint64(in.Len2()), 7*uint64(out.Len2()))
	return h1 > h2 || h1 == h2 && l1 > l2
}

// clean reports whether the corner on the inside of a turn lies beside both legs, so that it can stand for the crossing of
// their sides.
func clean(p exact.Pt, in, out room, inner exact.Pt) bool {
	v := inner.Sub(p)
	return in.holds(-v.Dot(in.d)) && out.holds(v.Dot(out.d))
}

// around returns the inside of a turn by way of the turning point.
func around(p exact.Pt, in, out room, side2 int32) cornerSide {
	return cornerSide{[3]exact.Pt{beside(p, in.d, 0, side2), p, beside(p, out.d, 0, side2)}, 3}
}

// mitre returns the crossing of the two legs' sides.
//
// With unit normals m and n and reach s it lies at p + s (m + n) / (1 + m·n); multiplied out with both lengths it stays
// exact as long as those are whole numbers, and swapping or turning both legs changes no bit of it.
func mitre(p exact.Pt, in, out room, dot int64, side2 int32) cornerSide {
	l1, l2 := length(in.d), length(out.d)
	s := float64(side2) / 2
	below := float64(l1*l2) + float64(dot)
	x := -(float64(float64(in.d.Y)*l2) + float64(float64(out.d.Y)*l1))
	y := float64(float64(in.d.X)*l2) + float64(float64(out.d.X)*l1)
	return cornerSide{[3]exact.Pt{p.Add(roundVec(float64(s*x)/below, float64(s*y)/below))}, 1}
}

// beside returns the point dist units along direction d from p and side2 half units to the left of it (negative: right).
func beside(p exact.Pt, d exact.Vec, dist, side2 int32) exact.Pt {
	if dist == 0 && side2 == 0 {
		return p
	}
	l := length(d)
	s := float64(side2) / 2
	x := float64(float64(dist)*float64(d.X)) - float64(s*float64(d.Y))
	y := float64(float64(dist)*float64(d.Y)) + float64(s*float64(d.X))
	return p.Add(roundVec(x/l, y/l))
}

func length(d exact.Vec) float64 { return math.Sqrt(float64(d.Len2())) }

// roundVec rounds to the nearest grid vector, halves away from zero on either axis.
func roundVec(x, y float64) exact.Vec {
	return exact.Vec{X: int32(math.Round(x)), Y: int32(math.Round(y))}
}

// mate is what a wall's end is mitred to; the zero mate is nothing.
type mate struct {
	s     *strand
	atEnd bool
}

// wallEnd is one end of an open thick wall.
type wallEnd struct {
	at    uint64 // key of its point
	index int
	mate
}

// joinEnds pairs the wall ends that mitre: two and no more at one point, alike in kind and in the reach of their sides,
// with no opening that takes either.
func (d *drawer) joinEnds() {
	ends := d.ends
	for i := range d.strands {
		if s := &d.strands[i]; s.thick() && !s.closed {
			ends = append(ends, wallEnd{key(s.pts[0]), i, mate{s, false}}, wallEnd{key(s.pts[len(s.pts)-1]), i, mate{s, true}})
		}
	}
	slices.SortFunc(ends, func(a, b wallEnd) int {
		if a.at != b.at {
			return cmp.Compare(a.at, b.at)
		}
		return cmp.Compare(a.index, b.index)
	})
	for i := 0; i < len(ends); {
		j := i + 1
		for j < len(ends) && ends[j].at == ends[i].at {
			j++
		}
		if j-i == 2 && ends[i].fits(ends[i+1].mate) {
			ends[i].join(ends[i+1].mate)
			ends[i+1].join(ends[i].mate)
		}
		i = j
	}
}

func (a mate) fits(b mate) bool {
	right2, left2 := b.s.right2, b.s.left2
	if a.atEnd == b.atEnd {
		right2, left2 = left2, right2 // seen against its direction
	}
	return a.s.wall.Kind == b.s.wall.Kind && a.s.right2 == right2 && a.s.left2 == left2 &&
		a.room().kind != roomNone && b.room().kind != roomNone
}

func (a mate) join(b mate) {
	i := 0
	if a.atEnd {
		i = 1
	}
	a.s.mates[i] = b
}

// room returns what stands of the wall at this end.
func (a mate) room() room {
	if a.atEnd {
		return a.s.roomAt(a.s.legCount()-1, true)
	}
	return a.s.roomAt(0, false)
}

// onward returns the mate's room in the direction of travel of someone who comes to it along the other wall; backward, of
// someone who comes from it.
func (a mate) onward() room {
	r := a.room()
	if a.atEnd {
		r.d = r.d.Neg()
	}
	return r
}

func (a mate) backward() room {
	r := a.onward()
	r.d = r.d.Neg()
	return r
}
