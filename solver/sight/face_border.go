package sight

import (
	"cmp"
	"slices"

	"enfilade/solver/exact"
	"enfilade/solver/mesh"
)

// Outline returns the border of the union of pieces, as rings: counter-clockwise around a part, clockwise around a hole, the
// largest part first. Distances are measured from origin.
//
//   - Shape: rings that may touch themselves and each other; what is seen on both sides, a thin wall too, is no border.
//   - Units: grid units; every corner is found exactly, so the same pieces' union has the same bits whatever the pieces.
//   - Cost: O(k² m) for m triangles with k pieces each.
func (f *Finder) Outline(pieces []Piece, origin exact.Pt, height int32) []Region {
	u := union{m: f.m, height: height}
	u.fill(pieces)
	for i := range u.shapes {
		u.inside(i)
	}
	u.alongEdges()
	return u.rings(origin)
}

// union is pieces on their way to become a border.
type union struct {
	m         *mesh.Mesh
	height    int32
	shapes    []shape // in the order of their triangles
	stretches []stretch
}

// shape is a piece as the lines of its edges, counter-clockwise.
type shape struct {
	piece int // its index
	tri   int32
	lines []exact.Line
	from  []int        // Convex.Source of each line
	clip  []exact.Line // all of the piece's limits, whether they bound it or not
	bits  uint16
}

// stretch is a piece of border with the union to its left: from t0 to t1 of its line.
type stretch struct {
	line   exact.Line
	t0, t1 fraction
	kind   Kind
}

// fill takes the pieces that have an inside and do not lie in another one.
func (u *union) fill(pieces []Piece) {
	var c Convex
	for i := range pieces {
		p := &pieces[i]
		if !c.Take(&u.m.Tris[p.Tri], p) {
			continue
		}
		s := shape{piece: i, tri: p.Tri, bits: p.Clip}
		for k := range c.Len() {
			s.lines = append(s.lines, c.Line(k))
			s.from = append(s.from, c.Source(k))
		}
		for k, l := range p.Lines[:p.N] {
			if p.Clip>>k&1 != 0 {
				s.clip = append(s.clip, l)
			}
		}
		u.shapes = append(u.shapes, s)
	}
	slices.SortStableFunc(u.shapes, func(a, b shape) int { return cmp.Compare(a.tri, b.tri) })
	kept := u.shapes[:0]
	for i := 0; i < len(u.shapes); {
		n := i
		for n < len(u.shapes) && u.shapes[n].tri == u.shapes[i].tri {
			n++
		}
		kept = append(kept, outermost(u.shapes[i:n])...)
		i = n
	}
	u.shapes = kept
}

// Reduced returns the pieces, in the order of their triangles, without those that have no inside or lie in another one.
func (f *Finder) Reduced(pieces []Piece) []Piece {
	u := union{m: f.m}
	u.fill(pieces)
	list := make([]Piece, len(u.shapes))
	for i := range u.shapes {
		list[i] = pieces[u.shapes[i].piece]
	}
	return list
}

// outermost returns the shapes that do not lie in another one, in place.
func outermost(all []shape) []shape {
	kept := all[:0]
next:
	for i := range all {
		s := all[i]
		for k := range kept {
			if kept[k].covers(&s) {
				continue next
			}
		}
		n := 0
		for k := range kept {
			if !s.covers(&kept[k]) {
				kept[n] = kept[k]
				n++
			}
		}
		kept = append(kept[:n], s)
	}
	return kept
}

// covers reports whether all of o lies in s.
func (s *shape) covers(o *shape) bool {
	n := len(o.lines)
	for _, l := range s.lines {
		for i := range o.lines {
			if exact.SideOfMeet(o.lines[i], o.lines[(i+1)%n], l) < 0 {
				return false
			}
		}
	}
	return true
}

// edge returns where edge i of the shape begins and ends, along the line l that it lies on.
func (s *shape) edge(i int, l exact.Line) (t0, t1 fraction) {
	n := len(s.lines)
	return meetAt(l, s.lines[(i+n-1)%n]), meetAt(l, s.lines[(i+1)%n])
}

// meetAt returns where line l meets k.
func meetAt(l, k exact.Line) fraction {
	num, den := l.Meet(k)
	if den < 0 {
		num, den = -num, -den
	}
	return fraction{num, den}
}

// inside adds the border along those edges of shape i that do not lie on an edge of its triangle: what no other shape covers
// from the far side. Where two shapes share a stretch of border on the same side, it is the first one's.
func (u *union) inside(i int) {
	s := &u.shapes[i]
	lo, hi := i, i+1
	for lo > 0 && u.shapes[lo-1].tri == s.tri {
		lo--
	}
	for hi < len(u.shapes) && u.shapes[hi].tri == s.tri {
		hi++
	}
	for k, l := range s.lines {
		if s.from[k] < 3 {
			continue
		}
		t0, t1 := s.edge(k, l)
		open := []interval{{t0, t1}}
		for j := lo; j < hi && len(open) > 0; j++ {
			if j == i {
				continue
			}
			if v, ok := u.shapes[j].along(l, j < i); ok {
				open = without(open, v)
			}
		}
		kind := Occluding
		if s.bits>>(s.from[k]-3)&1 != 0 {
			kind = ClipSide
		}
		for _, v := range open {
			u.stretches = append(u.stretches, stretch{l, v.t0, v.t1, kind})
		}
	}
}

// interval is a stretch of a line, from t0 to t1.
type interval struct{ t0, t1 fraction }

// along returns the stretch of line l on whose right side the shape lies; with same also that on whose left side it ends.
func (s *shape) along(l exact.Line, same bool) (interval, bool) {
	var v interval
	loSet, hiSet := false, false
	for _, h := range s.lines {
		c0, c1 := h.Dir.Cross(l.At.Sub(h.At)), h.Dir.Cross(l.Dir)
		switch {
		case c1 == 0 && (c0 < 0 || c0 == 0 && !same && h.Dir.Dot(l.Dir) > 0):
			return v, false
		case c1 > 0:
			if t := (fraction{-c0, c1}); !loSet || t.compare(v.t0) > 0 {
				v.t0, loSet = t, true
			}
		case c1 < 0:
			if t := (fraction{c0, -c1}); !hiSet || t.compare(v.t1) < 0 {
				v.t1, hiSet = t, true
			}
		}
	}
	return v, v.t0.compare(v.t1) < 0
}

// without takes v out of the intervals.
func without(open []interval, v interval) []interval {
	var left []interval
	for _, o := range open {
		if v.t1.compare(o.t0) <= 0 || o.t1.compare(v.t0) <= 0 {
			left = append(left, o)
			continue
		}
		if o.t0.compare(v.t0) < 0 {
			left = append(left, interval{o.t0, v.t0})
		}
		if v.t1.compare(o.t1) < 0 {
			left = append(left, interval{v.t1, o.t1})
		}
	}
	return left
}

// alongEdges adds the border along the edges of the mesh: what is covered from one side only.
func (u *union) alongEdges() {
	cover := map[mesh.Edge][]int{} // for each half-edge with an index in twin pairs the shapes along it, as index·8 + edge
	var edges []mesh.Edge
	for i := range u.shapes {
		s := &u.shapes[i]
		for k := range s.lines {
			if s.from[k] > 2 {
				continue
			}
			e := mesh.EdgeOf(s.tri, s.from[k])
			if twin := u.m.Twin(e); twin != mesh.None && twin < e {
				e = twin
			}
			if cover[e] == nil {
				edges = append(edges, e)
			}
			cover[e] = append(cover[e], i<<4|k)
		}
	}
	slices.Sort(edges)
	for _, e := range edges {
		u.alongEdge(e, cover[e])
	}
}

func (u *union) alongEdge(e mesh.Edge, cover []int) {
	a, b := u.m.Ends(e)
	l := exact.Through(a, b)
	var left, right []interval
	kind := Occluding
	for _, c := range cover {
		s, k := &u.shapes[c>>4], c&15
		for _, h := range s.clip {
			if h.Dir.Cross(l.Dir) == 0 && h.Side(a) == 0 {
				kind = ClipSide
			}
		}
		t0, t1 := s.edge(k, l)
		if s.tri == e.Tri() {
			left = append(left, interval{t0, t1})
		} else {
			right = append(right, interval{t1, t0})
		}
	}
	if u.m.Tris[e.Tri()].Top[e.Corner()] >= u.height {
		kind = Wall
	}
	left, right = joined(left), joined(right)
	for _, v := range minus(left, right) {
		u.stretches = append(u.stretches, stretch{l, v.t0, v.t1, kind})
	}
	for _, v := range minus(right, left) {
		u.stretches = append(u.stretches, stretch{exact.Line{At: l.At, Dir: l.Dir.Neg()}, v.t1.neg(), v.t0.neg(), kind})
	}
}

func (a fraction) neg() fraction { return fraction{-a.num, a.den} }

func minus(a, b []interval) []interval {
	for _, v := range b {
		a = without(a, v)
	}
	return a
}

// joined makes intervals that meet or overlap one.
func joined(all []interval) []interval {
	slices.SortFunc(all, func(a, b interval) int { return a.t0.compare(b.t0) })
	n := 0
	for _, v := range all {
		if n > 0 && v.t0.compare(all[n-1].t1) <= 0 {
			if v.t1.compare(all[n-1].t1) > 0 {
				all[n-1].t1 = v.t1
			}
			continue
		}
		all[n] = v
		n++
	}
	return all[:n]
}
