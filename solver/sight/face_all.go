package sight

import (
	"sort"

	"enfilade/solver/exact"
)

// hem is a bound on the places that see a whole face: counter-clockwise from direction from, as seen from A, they lie to the
// left of the line from B in direction to.
type hem struct{ from, to exact.Vec }

// Whole appends to dst the places that see all of a face from its front, as convex pieces; together they are one region
// without a hole. Where the front of the face itself is not free, nobody sees all of it.
//
// A place p sees all of AB when nothing stands in the triangle ABp. Name p by two directions: that from A, turning
// counter-clockwise from AB, and that from B, turning clockwise from BA. A thing at (u, v) stands in the triangles of just
// the places beyond it in both. So it is enough to look around once from A: what A sees bounds the places in A's direction,
// and of the things seen so far the one nearest to AB bounds them in B's. What A does not see hides behind things that bound
// more. All bounds are lines through A or B and another grid point.
//
//   - Units: grid points, exact.
//   - Errors: ErrOutside, ErrBlind.
//   - Cost: a region from A, and a binary search among the bounds for each of its cones.
func (f *Finder) Whole(dst []Piece, c Face, height int32) ([]Piece, error) {
	cones, err := f.Cones(c.A, height, Front(c.A, c.B))
	if err != nil || !f.Free(c, height) {
		return dst, err
	}
	f.findHems(c)
	for _, k := range cones {
		dst = f.hemmed(dst, c, k)
	}
	return dst, nil
}

// findHems goes through what A sees, counter-clockwise from the direction of B, and keeps each thing that is seen from B
// nearer to AB than all before it. Of every edge its ends are enough: where it begins or stops being seen between them, the
// corner that hides the rest comes nearer.
func (f *Finder) findHems(c Face) {
	d := c.B.Sub(c.A)
	f.faces.hems = append(f.faces.hems[:0], hem{d, d})
	note := func(from exact.Vec, p exact.Pt) {
		last := &f.faces.hems[len(f.faces.hems)-1]
		to := p.Sub(c.B)
		switch {
		case d.Cross(from) <= 0 || last.to.Cross(to) <= 0 && p != c.A: // things level with the face hide nothing of it
		case last.from.Cross(from) == 0:
			last.to = to
		default:
			f.faces.hems = append(f.faces.hems, hem{from, to})
		}
	}
	for _, h := range f.hits {
		if h.in == breakEdge {
			continue
		}
		if h.in < 0 { // seen edge-on: its near end
			p, q := f.m.Ends(^h.in)
			if p.Sub(c.A).Dot(h.r) > q.Sub(c.A).Dot(h.r) {
				p = q
			}
			if p.Sub(c.A).Dot(h.r) <= 0 {
				p = c.A
			}
			note(h.r, p)
			continue
		}
		p, q := f.m.Ends(h.in)
		if h.r.Cross(p.Sub(c.A)) == 0 {
			note(h.r, p)
		}
		if h.l.Cross(q.Sub(c.A)) == 0 {
			note(h.l, q)
		}
	}
}

// hemmed appends what of cone k lies within the hems: in one piece what no hem cuts, and a piece for each hem that does.
func (f *Finder) hemmed(dst []Piece, c Face, k Cone) []Piece {
	hems := f.faces.hems
	// The hems that begin at the cone's right side or before it, and those before its left side. They grow tighter.
	first := max(sort.Search(len(hems), func(i int) bool { return hems[i].from.Cross(k.R) < 0 })-1, 0)
	last := sort.Search(len(hems), func(i int) bool { return hems[i].from.Cross(k.L) <= 0 }) - 1
	t := &f.m.Tris[k.Tri]
	uncut := first + sort.Search(last+1-first, func(i int) bool { return !hems[first+i].leaves(c.B, t.P) })
	whole := k // what is not cut so far
	if uncut > first && uncut <= last {
		whole.L = hems[uncut].from
	}
	open := uncut > first
	for i := uncut; i <= last && !hems[i].leavesNothing(c.B, t.P); i++ {
		part := k
		if i > first {
			part.R = hems[i].from
		}
		if i < last {
			part.L = hems[i+1].from
		}
		p := c.seenBy(part, &hems[i])
		inside := f.faces.convex.Take(t, &p)
		if inside && !f.faces.convex.bounded(2) { // the hem passes by
			if !open {
				whole, open = part, true
			}
			whole.L = part.L
			continue
		}
		if open {
			dst = append(dst, c.seenBy(whole, nil))
			open = false
		}
		if inside {
			dst = append(dst, p)
		}
	}
	if open {
		dst = append(dst, c.seenBy(whole, nil))
	}
	return dst
}

// leaves reports whether the hem leaves all of a triangle in.
func (h *hem) leaves(b exact.Pt, corners [3]exact.Pt) bool {
	for _, p := range corners {
		if h.to.Cross(p.Sub(b)) < 0 {
			return false
		}
	}
	return true
}

// leavesNothing reports whether the hem leaves nothing of a triangle in; those that follow do not either.
func (h *hem) leavesNothing(b exact.Pt, corners [3]exact.Pt) bool {
	for _, p := range corners {
		if h.to.Cross(p.Sub(b)) > 0 {
			return false
		}
	}
	return true
}

// seenBy returns the piece of a cone from A within a hem, or within none.
func (c Face) seenBy(k Cone, h *hem) Piece {
	d := c.B.Sub(c.A)
	p := Piece{Tri: k.Tri}
	p.add(exact.Line{At: c.A, Dir: k.R}, sameWay(k.R, d))
	p.add(exact.Line{At: c.A, Dir: k.L.Neg()}, sameWay(k.L.Neg(), d))
	if h != nil {
		p.add(exact.Line{At: c.B, Dir: h.to}, false)
	}
	return p
}
