package walk

import (
	"math"

	"enfilade/solver/exact"
	"enfilade/solver/mesh"
	"enfilade/solver/sight"
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

// clipper cuts triangles by cones and measures how near what is left comes. Its buffers make it free of allocation.
type clipper struct{ sight.Convex }

// nearest returns the point nearest to root, as an offset from it, of the part of triangle t between the directions r and l
// from root and between sr and sl from eye. It reports false when that part has no inside.
//
// Every corner of the part is where two of at most seven lines meet, and on which side of a third line it lies is decided
// exactly; only the distance is measured.
func (c *clipper) nearest(t *mesh.Tri, root exact.Pt, r, l exact.Vec, eye exact.Pt, sr, sl exact.Vec) ([2]float64, bool) {
	c.Start(t)
	if !c.CutCone(root, r, l) || !c.CutCone(eye, sr, sl) {
		return [2]float64{}, false
	}
	spot := c.closest(root)
	x, y := spot.Offset(root)
	return [2]float64{x, y}, true
}

// nearestSeen returns the point nearest to eye of the part of triangle t between the directions r and l from it. It reports
// false when that part has no inside.
func (c *clipper) nearestSeen(t *mesh.Tri, eye exact.Pt, r, l exact.Vec) (Spot, bool) {
	c.Start(t)
	if !c.CutCone(eye, r, l) {
		return Spot{}, false
	}
	return c.closest(eye), true
}

// closest returns the polygon's point nearest to p.
func (c *clipper) closest(p exact.Pt) Spot {
	best, found := math.Inf(1), false
	spot := Spot{On: exact.Line{At: p}, Den: 1} // p lies in the polygon
	for i := range c.Len() {
		on := c.Line(i)
		if on.Side(p) >= 0 {
			continue // seen from p, the polygon does not begin at this edge
		}
		s := nearestAlong(on, c.Line(i-1), c.Line(i+1), p)
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
