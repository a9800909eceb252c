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
		if g.point {
			d := g.eye.Sub(root.at)
			if r.Cross(d) >= 0 && d.Cross(l) >= 0 && (d != exact.Vec{} || root.sector < 0) {
				f.offer(k.goal, n, root.g+math.Sqrt(float64(d.Len2())), [2]float64{float64(d.X), float64(d.Y)})
			}
			continue
		}
		if end, ok := f.clip.nearest(&f.m.Tris[t], root.at, r, l, g.eye, k.r, k.l); ok {
			f.offer(k.goal, n, root.g+math.Hypot(end[0], end[1]), end)
		}
	}
}

// clipper cuts convex polygons given by the lines of their edges. Its buffers make it free of allocation.
type clipper struct {
	line [7]exact.Line
	ring []uint8 // indices into line, counter-clockwise
	side []int
	next []uint8
}

// nearest returns the point nearest to root, as an offset from it, of the part of triangle t between the directions r and l
// from root and between sr and sl from eye. It reports false when that part has no inside.
//
// Every corner of the part is where two of at most seven lines meet, and on which side of a third line it lies is decided
// exactly; only the distance is measured.
func (c *clipper) nearest(t *mesh.Tri, root exact.Pt, r, l exact.Vec, eye exact.Pt, sr, sl exact.Vec) ([2]float64, bool) {
	for i := range 3 {
		c.line[i] = exact.Through(t.P[i], t.P[inc[i]])
	}
	c.line[3] = exact.Line{At: root, Dir: r}
	c.line[4] = exact.Line{At: root, Dir: l.Neg()}
	c.line[5] = exact.Line{At: eye, Dir: sr}
	c.line[6] = exact.Line{At: eye, Dir: sl.Neg()}
	c.ring = append(c.ring[:0], 0, 1, 2)
	for k := uint8(3); k < 7; k++ {
		if !c.cut(k) {
			return [2]float64{}, false
		}
	}
	return c.closest(root), true
}

// cut keeps the part of the polygon to the left of line k, and reports whether it has an inside.
func (c *clipper) cut(k uint8) bool {
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

// closest returns the polygon's point nearest to p, as an offset from it.
func (c *clipper) closest(p exact.Pt) [2]float64 {
	best, found := math.Inf(1), false
	var end [2]float64
	n := len(c.ring)
	for i, e := range c.ring {
		on := c.line[e]
		if on.Side(p) >= 0 {
			continue // seen from p, the polygon does not begin at this edge
		}
		found = true
		x, y := on.Point(p, c.nearestAlong(on, c.line[c.ring[(i+n-1)%n]], c.line[c.ring[(i+1)%n]], p))
		if d := math.Hypot(x, y); d < best {
			best, end = d, [2]float64{x, y}
		}
	}
	if !found {
		return [2]float64{} // p lies in the polygon
	}
	return end
}

// nearestAlong returns the parameter on line l, between where it meets lines a and b, of the point nearest to p.
func (c *clipper) nearestAlong(l, a, b exact.Line, p exact.Pt) float64 {
	foot := float64(p.Sub(l.At).Dot(l.Dir)) / float64(l.Dir.Len2())
	n0, d0 := l.Meet(a)
	n1, d1 := l.Meet(b)
	return min(max(foot, float64(n0)/float64(d0)), float64(n1)/float64(d1))
}
