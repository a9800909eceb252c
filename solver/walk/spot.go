package walk

import (
	"math"

	"enfilade/solver/exact"
	"enfilade/solver/mesh"
	"enfilade/solver/sight"
)

// Spot is a place to walk to: the point On.At + On.Dir·Num/Den. With Tri it is that point of one triangle, which tells the
// sides of a thin wall apart; without, Tri -1, it is reached from any side.
type Spot struct {
	On       exact.Line
	Num, Den int64 // Den > 0
	Tri      int32
}

// At returns the spot at a grid point, reached from any side.
func At(p exact.Pt) *Spot { return &Spot{On: exact.Line{At: p}, Den: 1, Tri: -1} }

// Offset returns the spot minus origin in grid units; it only measures.
func (s *Spot) Offset(origin exact.Pt) (x, y float64) {
	return s.On.Point(origin, float64(s.Num)/float64(s.Den))
}

// within reports whether the spot lies in the closed cone from r to l of root, less than half a turn. The products stay
// below 2^123.
func (s *Spot) within(root exact.Pt, r, l exact.Vec) bool {
	d := s.On.At.Sub(root)
	right := exact.Mul(r.Cross(d), s.Den).Add(exact.Mul(r.Cross(s.On.Dir), s.Num))
	left := exact.Mul(d.Cross(l), s.Den).Add(exact.Mul(s.On.Dir.Cross(l), s.Num))
	return right.Sign() >= 0 && left.Sign() >= 0
}

// grid returns the spot's grid point when it is one as written: the start or the end of the line's direction.
func (s *Spot) grid() (exact.Pt, bool) {
	switch s.Num {
	case 0:
		return s.On.At, true
	case s.Den:
		return s.On.At.Add(s.On.Dir), true
	}
	return exact.Pt{}, false
}

// eachHolder calls do for the triangles in which a walk to the spot may end.
func (f *Finder) eachHolder(s *Spot, do func(tri int32)) {
	p, onGrid := s.grid()
	if s.Tri < 0 {
		f.eachCorner(p, do)
		return
	}
	do(s.Tri)
	if !onGrid {
		return
	}
	// At a corner of the triangle the spot is as well reached through the others of the same sector.
	for i, c := range f.m.Tris[s.Tri].P {
		if c == p {
			f.eachInSector(mesh.EdgeOf(s.Tri, i), do)
		}
	}
}

// eachInSector calls do for the triangles around the starting corner of e that no edge which stops walking parts from its
// triangle.
func (f *Finder) eachInSector(e mesh.Edge, do func(tri int32)) {
	for now := e; !f.m.Tris[now.Tri()].StopsWalk(now.Prev().Corner()); {
		if now = f.m.Twin(now.Prev()); now == e {
			return
		}
		do(now.Tri())
	}
	for now := e; !f.m.Tris[now.Tri()].StopsWalk(now.Corner()); {
		now = f.m.Twin(now).Next()
		do(now.Tri())
	}
}

// Nearest returns the standing point of a region that lies nearest to its eye in a straight line, among the triangles that
// ok accepts, and its distance. It reports false when the region holds no such place. The region is given as cones of sight;
// of equally near points the leftmost, then the lowest is taken. O(cones).
func (f *Finder) Nearest(eye exact.Pt, cones []sight.Cone, ok func(tri int32) bool) (*Spot, float64, bool) {
	best, found := math.Inf(1), false
	var spot Spot
	for _, c := range cones {
		t := &f.m.Tris[c.Tri]
		if t.Flags&mesh.FlagNoWalk != 0 || !ok(c.Tri) {
			continue
		}
		s, some := f.clip.nearestSeen(t, eye, c.R, c.L)
		if !some {
			continue
		}
		s.Tri = c.Tri
		d := math.Hypot(s.Offset(eye))
		if !found || d < best || d == best && s.before(&spot, eye) {
			best, spot, found = d, s, true
		}
	}
	return &spot, best, found
}

func (s *Spot) before(o *Spot, eye exact.Pt) bool {
	sx, sy := s.Offset(eye)
	ox, oy := o.Offset(eye)
	return sx < ox || sx == ox && sy < oy
}
