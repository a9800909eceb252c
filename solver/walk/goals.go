package walk

import (
	"math"

	"enfilade/solver/exact"
	"enfilade/solver/mesh"
)

// meetGoals looks for ends of walks within triangle t and the cone from r to l of node n.
func (f *Finder) meetGoals(n, t int32, r, l exact.Vec, key float64) {
	for i := f.heads[t]; i >= 0; i = f.marks[i].next {
		k := &f.marks[i]
		g := &f.goals[k.goal]
		if key*tieSlack > g.g {
			continue
		}
		root := &f.nodes[n]
		if g.spot != nil {
			if g.spot.within(root.at, r, l) {
				x, y := g.spot.Offset(root.at)
				f.offer(k.goal, n, root.g+math.Hypot(x, y), [2]float64{x, y}, -1)
			}
			continue
		}
		end, ok := [2]float64{}, false
		if k.piece < 0 {
			end, ok = f.clip.nearest(&f.m.Tris[t], root.at, r, l, g.eye, k.r, k.l)
		} else {
			end, ok = f.clip.nearestOf(&f.m.Tris[t], root.at, r, l, &g.pieces[k.piece])
		}
		if ok {
			f.offer(k.goal, n, root.g+math.Hypot(end[0], end[1]), end, k.piece)
		}
	}
}

// clipper cuts convex polygons given by the lines of their edges. Its buffers make it free of allocation.
type clipper struct {
	line []exact.Line
	ring []int32 // indices into line, counter-clockwise
	side []int
	next []int32
}

// nearest returns the point nearest to root, as an offset from it, of the part of triangle t between the directions r and l
// from root and between sr and sl from eye. It reports false when that part has no inside.
//
// Every corner of the part is where two of at most seven lines meet, and on which side of a third line it lies is decided
// exactly; only the distance is measured.
func (c *clipper) nearest(t *mesh.Tri, root exact.Pt, r, l exact.Vec, eye exact.Pt, sr, sl exact.Vec) ([2]float64, bool) {
	c.begin(t)
	c.addCone(root, r, l)
	c.addCone(eye, sr, sl)
	if !c.cutTriangle() {
		return [2]float64{}, false
	}
	spot := c.closest(root)
	x, y := spot.Offset(root)
	return [2]float64{x, y}, true
}

// nearestSeen returns the point nearest to eye of the part of triangle t between the directions r and l from it. It reports
// false when that part has no inside.
func (c *clipper) nearestSeen(t *mesh.Tri, eye exact.Pt, r, l exact.Vec) (Spot, bool) {
	c.begin(t)
	c.addCone(eye, r, l)
	if !c.cutTriangle() {
		return Spot{}, false
	}
	return c.closest(eye), true
}

// begin takes the lines of a triangle's edges as the first three.
func (c *clipper) begin(t *mesh.Tri) {
	c.line = c.line[:0]
	for i := range 3 {
		c.line = append(c.line, exact.Through(t.P[i], t.P[inc[i]]))
	}
}

// addCone adds the lines of a cone from r to l, less than half a turn.
func (c *clipper) addCone(at exact.Pt, r, l exact.Vec) {
	c.line = append(c.line, exact.Line{At: at, Dir: r}, exact.Line{At: at, Dir: l.Neg()})
}

// cutTriangle cuts the triangle of the first three lines by the others, and reports whether an inside is left.
func (c *clipper) cutTriangle() bool {
	c.ring = append(c.ring[:0], 0, 1, 2)
	for k := 3; k < len(c.line); k++ {
		if !c.cut(int32(k)) {
			return false
		}
	}
	return true
}

// cut keeps the part of the polygon to the left of line k, and reports whether it has an inside.
func (c *clipper) cut(k int32) bool {
	n := len(c.ring)
	c.side = c.side[:0]
	some, none := false, true
	for i, e := range c.ring { // side[i] belongs to the corner between edge i and the next
		s := exact.SideOfMeet(c.line[e], c.line[c.ring[(i+1)%n]], c.line[k])
		c.side = append(c.side, s)
		some = some || s > 0
		none = none && s >= 0
	}
	if !some || none {
		return some
	}
	c.next = c.next[:0]
	for i, e := range c.ring {
		from, to := c.side[(i+n-1)%n], c.side[i]
		if from <= 0 && to <= 0 {
			continue
		}
		c.next = append(c.next, e)
		if to <= 0 { // the polygon leaves the half-plane along this edge and goes on along the line
			c.next = append(c.next, k)
		}
	}
	c.ring, c.next = c.next, c.ring
	return true
}

// closest returns the polygon's point nearest to p.
func (c *clipper) closest(p exact.Pt) Spot {
	best, found := math.Inf(1), false
	spot := Spot{On: exact.Line{At: p}, Den: 1} // p lies in the polygon
	n := len(c.ring)
	for i, e := range c.ring {
		on := c.line[e]
		if on.Side(p) >= 0 {
			continue // seen from p, the polygon does not begin at this edge
		}
		s := nearestAlong(on, c.line[c.ring[(i+n-1)%n]], c.line[c.ring[(i+1)%n]], p)
		if d := math.Hypot(s.Offset(p)); !found || d < best {
			best, spot, found = d, s, true
		}
	}
	return spot
}

// nearestAlong returns the point nearest to p on line l between where it meets a and where it meets b, exactly: the foot of
// the perpendicular, or one of the ends.
func nearestAlong(l, a, b exact.Line, p exact.Pt) Spot {
	foot := Spot{On: l, Num: p.Sub(l.At).Dot(l.Dir), Den: l.Dir.Len2()}
	from, to := meeting(l, a), meeting(l, b)
	switch {
	case exact.CompareFractions(foot.Num, foot.Den, from.Num, from.Den) < 0:
		return from
	case exact.CompareFractions(foot.Num, foot.Den, to.Num, to.Den) > 0:
		return to
	}
	return foot
}

// meeting returns where line l meets line k.
func meeting(l, k exact.Line) Spot {
	num, den := l.Meet(k)
	if den < 0 {
		num, den = -num, -den
	}
	return Spot{On: l, Num: num, Den: den}
}
