package pick

import (
	"math"

	"enfilade/solver/exact"
	"enfilade/solver/plan"
)

// ray is a line that a place may be in line with.
type ray struct {
	from exact.Pt // a point of the drawing on it
	dir  exact.Vec
	off  float64 // of the place from it
	far  float64 // of the place from the point
	kind SnapKind
	edge [2]exact.Pt
	ok   bool
}

// offer takes the nearer line, and of two as near the one whose point is nearer.
func (r *ray) offer(c ray) {
	if !r.ok || c.off < r.off || c.off == r.off && c.far < r.far {
		*r = c
		r.ok = true
	}
}

// lineUp offers the upright and the level line through a point that is not farther than far.
func (f *search) lineUp(q exact.Pt, far float64) {
	dx, dy := math.Abs(f.s.x-float64(q.X)), math.Abs(f.s.y-float64(q.Y))
	if dx > f.guide && dy > f.guide || dx > far || dy > far {
		return
	}
	if dx <= f.guide {
		f.up.offer(ray{from: q, dir: exact.Vec{Y: 1}, off: dx, far: dy, kind: SnapInLine})
	}
	if dy <= f.guide {
		f.level.offer(ray{from: q, dir: exact.Vec{X: 1}, off: dy, far: dx, kind: SnapInLine})
	}
}

// slanted offers the lines that a slanted piece gives: itself going on beyond its ends, and from the line's beginning its
// parallel and, when the line begins on it, its square.
func (f *search) slanted(a, b exact.Pt) {
	v := b.Sub(a)
	if f.n.On.Has(SnapInLine) && f.nears(a, v) {
		near := a
		if f.s.dist2(spotOf(b)) < f.s.dist2(spotOf(a)) {
			near = b
		}
		if d := f.s.dist(spotOf(near)); d <= f.far {
			f.slant.offer(f.through(near, v, d, SnapInLine, a, b))
		}
	}
	if f.to.From == nil || f.begun < f.least {
		return
	}
	from := *f.to.From
	if f.n.On.Has(SnapParallel) && f.nears(from, v) && !f.touches(a, b) && f.s.isNear(a, b, f.far) {
		f.slant.offer(f.through(from, v, f.begun, SnapParallel, a, b))
	}
	if f.n.On.Has(SnapSquare) && f.nears(from, v.Left()) && f.touches(a, b) {
		f.slant.offer(f.through(from, v.Left(), f.begun, SnapSquare, a, b))
	}
}

// touches reports whether the line was begun on a piece.
func (f *search) touches(a, b exact.Pt) bool {
	from := spotOf(*f.to.From)
	on, _ := from.foot(a, b)
	return from.dist2(on) < 1
}

// isNear reports whether s is no farther than r from a piece.
func (s spot) isNear(a, b exact.Pt, r float64) bool {
	foot, _ := s.foot(a, b)
	return s.dist2(foot) <= r*r
}

// nears reports whether the place is near the line through a point in a direction; most are not, and are told so soon.
func (f *search) nears(q exact.Pt, v exact.Vec) bool {
	dx, dy := float64(v.X), float64(v.Y)
	c := dx*(f.s.y-float64(q.Y)) - dy*(f.s.x-float64(q.X))
	return c*c <= f.guide*f.guide*(dx*dx+dy*dy)
}

// through makes the line through a point in a direction, which is near.
func (f *search) through(q exact.Pt, v exact.Vec, far float64, kind SnapKind, a, b exact.Pt) ray {
	off := math.Abs(f.s.beside(q, float64(v.X), float64(v.Y)))
	return ray{from: q, dir: v, off: off, far: far, kind: kind, edge: [2]exact.Pt{a, b}}
}

// guided returns the place on the guide lines: where two meet, if that is near, else on the nearest.
func (f *search) guided() (Snap, bool) {
	best := closest{best: f.reach}
	both := func(r, q *ray) {
		if !r.ok || !q.ok {
			return
		}
		at, ok := f.meet(r, q)
		if !ok {
			return
		}
		best.offer(f.s.dist(spotOf(at)), Snap{At: at, Kind: r.kind, Edge: r.edge, Guides: [2]Guide{{r.from, at}, {q.from, at}}})
	}
	both(&f.up, &f.level)
	both(&f.slant, &f.up)
	both(&f.slant, &f.level)
	if best.ok {
		return best.snap, true
	}
	var r *ray
	for _, c := range []*ray{&f.slant, &f.up, &f.level} {
		if c.ok && (r == nil || c.off < r.off) {
			r = c
		}
	}
	if r == nil {
		return Snap{}, false
	}
	at := f.onRay(r)
	s := Snap{At: at, Kind: r.kind, Edge: r.edge, Guides: [2]Guide{{r.from, at}}}
	return s, f.s.dist(spotOf(at)) <= f.reach+1
}

// onRay returns the place on one guide line; along an upright or level one it takes the grid.
func (f *search) onRay(r *ray) exact.Pt {
	switch {
	case r.dir.X == 0:
		return exact.Pt{X: r.from.X, Y: rounded(f.s.y, f.step)}
	case r.dir.Y == 0:
		return exact.Pt{X: rounded(f.s.x, f.step), Y: r.from.Y}
	}
	dx, dy := float64(r.dir.X), float64(r.dir.Y)
	t := ((f.s.x-float64(r.from.X))*dx + (f.s.y-float64(r.from.Y))*dy) / (dx*dx + dy*dy)
	return spot{float64(r.from.X) + t*dx, float64(r.from.Y) + t*dy}.grid()
}

// meet returns where two guide lines meet, measured in floating point but exact for an upright and a level one.
func (f *search) meet(r, q *ray) (exact.Pt, bool) {
	if r.dir.X == 0 && q.dir.Y == 0 {
		return exact.Pt{X: r.from.X, Y: q.from.Y}, true
	}
	l := exact.Line{At: r.from, Dir: r.dir}
	num, den := l.Meet(exact.Line{At: q.from, Dir: q.dir})
	if den == 0 {
		return exact.Pt{}, false
	}
	x, y := l.Point(exact.Pt{}, float64(num)/float64(den))
	at := spot{x, y}
	if f.s.dist(at) > f.reach || math.Abs(x) > float64(plan.MaxCoord) || math.Abs(y) > float64(plan.MaxCoord) {
		return exact.Pt{}, false
	}
	return at.grid(), true
}
