package sight

import (
	"math"
	"slices"

	"enfilade/solver/exact"
)

// Limits narrows the places that see a target by where they lie about one point of it: within the sweep from Right over Mid
// to Left, inside the polygon Far, and outside the polygon Near. Both polygons run counter-clockwise around At.
type Limits struct {
	At               exact.Pt
	Sides            bool
	Right, Mid, Left exact.Vec  // no two neighbours more than a quarter turn apart
	Far, Near        []exact.Pt // nil for no limit
}

// NearPolygon returns a polygon with grid corners around the circle of the given radius, at least 1 unit, about eye,
// counter-clockwise and nowhere more than 1 mm from it, so that places nearer than the radius never count. It is the same
// under quarter turns and mirroring.
//
// A regular polygon around the circle reaches r/cos(pi/n) - r beyond it, which n keeps below 8; taking its corners outwards
// to the grid adds at most sqrt 2 units, and leaves every edge on the outer side of the edge it was, off the circle.
func NearPolygon(eye exact.Pt, radius int32) []exact.Pt {
	r := float64(radius)
	n := 8 * int(math.Ceil(math.Pi/math.Acos(r/(r+8))/8))
	out := r / math.Cos(math.Pi/float64(n))
	return octants(eye, n, func(i int) exact.Vec {
		s, c := math.Sincos(2 * math.Pi * float64(i) / float64(n))
		return exact.Vec{X: int32(math.Ceil(out * c)), Y: int32(math.Ceil(out * s))}
	})
}

// wedge is the part of the limits between two directions from At, less than half a turn apart, within which one edge each of
// the polygons bounds it.
type wedge struct {
	r, l          exact.Vec
	side          [2]bool // r, l is a side of the sweep
	far, near     exact.Line
	isFar, isNear bool
}

// wedges cuts the limits into wedges.
func (m *Limits) wedges() []wedge {
	var cuts []exact.Vec
	for _, ring := range [2][]exact.Pt{m.Far, m.Near} {
		for _, p := range ring {
			cuts = append(cuts, p.Sub(m.At))
		}
	}
	first := m.Right
	if m.Sides {
		sides := Clip{Sides: true, Right: m.Right, Mid: m.Mid, Left: m.Left}
		cuts = slices.DeleteFunc(cuts, func(d exact.Vec) bool { return !sides.holds(m.At, d) })
		cuts = append(cuts, m.Right, m.Mid, m.Left)
	} else {
		first = cuts[0]
	}
	slices.SortStableFunc(cuts, func(a, b exact.Vec) int {
		switch {
		case turnsBefore(first, a, b):
			return -1
		case turnsBefore(first, b, a):
			return 1
		}
		return 0
	})
	cuts = slices.CompactFunc(cuts, sameWay)
	if !m.Sides {
		cuts = append(cuts, cuts[0])
	}
	list := make([]wedge, 0, len(cuts))
	for i := 1; i < len(cuts); i++ {
		w := wedge{r: cuts[i-1], l: cuts[i]}
		w.side = [2]bool{m.Sides && i == 1, m.Sides && i == len(cuts)-1}
		w.far, w.isFar = edgeOf(m.Far, m.At, w.r)
		w.near, w.isNear = edgeOf(m.Near, m.At, w.r)
		list = append(list, w)
	}
	return list
}

// edgeOf returns the line of a ring's edge that direction d meets.
func edgeOf(ring []exact.Pt, eye exact.Pt, d exact.Vec) (exact.Line, bool) {
	if ring == nil {
		return exact.Line{}, false
	}
	i := rangeEdge(ring, eye, d)
	return exact.Through(ring[i], ring[(i+1)%len(ring)]), true
}

// None reports whether nothing is limited.
func (m *Limits) None() bool { return !m.Sides && m.Far == nil && m.Near == nil }

// Holds reports whether a place keeps to the limits.
func (m *Limits) Holds(p exact.Pt) bool {
	c := Clip{Sides: m.Sides, Right: m.Right, Mid: m.Mid, Left: m.Left, Range: m.Far}
	d := p.Sub(m.At)
	if d == (exact.Vec{}) {
		return m.Near == nil
	}
	if !c.holds(p, d) {
		return false
	}
	near, some := edgeOf(m.Near, m.At, d)
	return !some || near.Side(p) <= 0
}

// Limited appends to dst what of the pieces lies within limits, in convex pieces again. O(pieces · corners of the limits), of
// which pieces that no limit cuts cost little.
func (f *Finder) Limited(dst, pieces []Piece, m *Limits) []Piece {
	if m.None() {
		return append(dst, pieces...)
	}
	wedges := m.wedges()
	reach2 := int64(0) // of Near from At, squared
	for _, p := range m.Near {
		reach2 = max(reach2, exact.Dist2(m.At, p))
	}
	for i := range pieces {
		p := &pieces[i]
		t := f.m.Tris[p.Tri].P
		if m.leaves(t, reach2) {
			dst = append(dst, *p)
			continue
		}
		r, l, apart := spread(m.At, t)
		for j := range wedges {
			w := &wedges[j]
			if apart {
				if _, _, ok := clipCone(w.r, w.l, r, l); !ok {
					continue
				}
			}
			q := w.cut(m.At, p)
			if f.faces.convex.Take(&f.m.Tris[q.Tri], &q) {
				dst = append(dst, q)
			}
		}
	}
	return dst
}

// cut returns what of p lies within the wedge.
func (w *wedge) cut(at exact.Pt, p *Piece) Piece {
	q := *p
	q.add(exact.Line{At: at, Dir: w.r}, w.side[0])
	q.add(exact.Line{At: at, Dir: w.l.Neg()}, w.side[1])
	if w.isFar {
		q.add(w.far, true)
	}
	if w.isNear {
		q.add(exact.Line{At: w.near.At, Dir: w.near.Dir.Neg()}, true)
	}
	return q
}

// leaves reports whether the limits leave all of a triangle in; it may miss that a triangle lies just outside Near.
func (m *Limits) leaves(t [3]exact.Pt, reach2 int64) bool {
	c := Clip{Sides: m.Sides, Right: m.Right, Mid: m.Mid, Left: m.Left, Range: m.Far}
	for _, p := range t {
		if m.Sides && p == m.At || !c.holds(p, p.Sub(m.At)) {
			return false
		}
	}
	if m.Near == nil {
		return true
	}
	for i, p := range t {
		q := t[inc[i]]
		// Near lies beyond the line of this edge when At is farther behind it than Near reaches.
		if s := exact.Area2(p, q, m.At); s < 0 && exact.Mul(s, s).Sub(exact.Mul(reach2, exact.Dist2(p, q))).Sign() >= 0 {
			return true
		}
	}
	return false
}

// spread returns the directions from at between which a triangle lies; it reports false when at is in the triangle.
func spread(at exact.Pt, t [3]exact.Pt) (r, l exact.Vec, apart bool) {
	for i, p := range t {
		if exact.Area2(p, t[inc[i]], at) < 0 {
			apart = true
		}
	}
	r, l = t[0].Sub(at), t[0].Sub(at)
	for _, p := range t[1:] {
		d := p.Sub(at)
		if d.Cross(r) > 0 {
			r = d
		}
		if l.Cross(d) > 0 {
			l = d
		}
	}
	return r, l, apart
}
