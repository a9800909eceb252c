package plantest

import (
	"math/big"
	"slices"

	"enfilade/solver/exact"
)

// Gap is the part of a region between two neighbouring critical directions: the triangle from the eye to the piece of one
// edge that stops sight there, or nothing.
type Gap struct {
	D1, D2 exact.Vec // the directions, D2 less than half a turn counter-clockwise of D1
	Edge   int32     // the edge that stops sight, or -1 when nothing is seen
	K1, K2 *big.Rat  // the edge is met at eye + K1 D1 and eye + K2 D2; zero when nothing is seen
	P1, P2 Spot      // those places; the eye when nothing is seen
}

// Region is what an eye sees, regularised: a fan of triangles with no sliver of zero width among them.
type Region struct {
	Eye    exact.Pt
	Gaps   []Gap // all round, counter-clockwise
	Border []Piece
}

// Region returns what an eye at a grid point sees at a height above the floor.
//
// The critical directions are those to every point of the graph. Between two of them every ray meets the same edges in
// the same order, so one ray decides. An eye on an edge or a point of the graph is no special case: what it stands on is
// met at distance zero and does not count, and a gap that begins in something solid sees nothing.
func (w *Twin) Region(eye exact.Pt, height int32) *Region { return w.RegionWithin(eye, height, nil) }

// RegionWithin is Region within a view.
func (w *Twin) RegionWithin(eye exact.Pt, height int32, v *View) *Region {
	r := &Region{Eye: eye}
	dirs := w.criticalDirections(eye, v)
	for i, d := range dirs {
		next := dirs[(i+1)%len(dirs)]
		if v.holds(d, next) {
			r.Gaps = append(r.Gaps, w.gap(eye, d, next, height))
		} else {
			r.Gaps = append(r.Gaps, blind(eye, d, next))
		}
	}
	w.border(r, height, v)
	return r
}

// View is the sweep from Right over Mid to Left, counter-clockwise, no two neighbours more than half a turn apart. The nil
// View is all round.
type View struct{ Right, Mid, Left exact.Vec }

// holds reports whether a gap between neighbouring critical directions lies in the view.
func (v *View) holds(d1, d2 exact.Vec) bool {
	if v == nil {
		return true
	}
	inside := func(r, l exact.Vec) bool {
		return r.Cross(d1)+r.Cross(d2) > 0 && d1.Cross(l)+d2.Cross(l) > 0
	}
	return inside(v.Right, v.Mid) || inside(v.Mid, v.Left)
}

// side reports whether a direction is a side of the view.
func (v *View) side(d exact.Vec) bool {
	return v != nil && (compareAngles(d, v.Right) == 0 || compareAngles(d, v.Left) == 0)
}

// criticalDirections returns the directions from eye to all points of the graph, along the sides of the view and along
// the axes, each once, in counter-clockwise order. The axes keep every gap to a quarter turn at most.
func (w *Twin) criticalDirections(eye exact.Pt, v *View) []exact.Vec {
	dirs := []exact.Vec{{X: 1}, {Y: 1}, {X: -1}, {Y: -1}}
	if v != nil {
		dirs = append(dirs, v.Right, v.Mid, v.Left)
	}
	for _, p := range w.g.Pts {
		if p != eye {
			dirs = append(dirs, p.Sub(eye))
		}
	}
	slices.SortFunc(dirs, compareAngles)
	return slices.CompactFunc(dirs, func(a, b exact.Vec) bool { return compareAngles(a, b) == 0 })
}

// gap finds what is seen between two neighbouring critical directions, along the ray d1 + d2.
func (w *Twin) gap(eye exact.Pt, d1, d2 exact.Vec, height int32) Gap {
	g := blind(eye, d1, d2)
	first, firstBlock := int32(-1), int32(-1)
	var kFirst, kBlock *big.Rat
	for i := range w.g.Edges {
		k := w.meet(eye, d1, d2, int32(i))
		if k == nil {
			continue
		}
		if first < 0 || k.Cmp(kFirst) < 0 {
			first, kFirst = int32(i), k
		}
		if w.stopsSight(int32(i), height) && (firstBlock < 0 || k.Cmp(kBlock) < 0) {
			firstBlock, kBlock = int32(i), k
		}
	}
	if first < 0 || firstBlock < 0 || w.facing(first, eye).top >= height {
		return g // off the floor, or inside something solid
	}
	g.Edge = firstBlock
	g.K1, g.K2 = w.reach(eye, d1, firstBlock), w.reach(eye, d2, firstBlock)
	g.P1, g.P2 = spotAt(eye, d1, g.K1), spotAt(eye, d2, g.K2)
	return g
}

// blind returns a gap in which nothing is seen.
func blind(eye exact.Pt, d1, d2 exact.Vec) Gap {
	return Gap{D1: d1, D2: d2, Edge: -1, K1: new(big.Rat), K2: new(big.Rat), P1: SpotOf(eye), P2: SpotOf(eye)}
}

// meet returns k > 0 such that eye + k (d1 + d2) lies on edge i, or nil. As no end of the edge lies in the gap, the ray
// meets the edge between its ends or not at all.
func (w *Twin) meet(eye exact.Pt, d1, d2 exact.Vec, i int32) *big.Rat {
	a, b := w.g.Pts[w.g.Edges[i].A].Sub(eye), w.g.Pts[w.g.Edges[i].B].Sub(eye)
	ca := exact.Sign(d1.Cross(a)+d2.Cross(a)) * exact.Sign(d1.Cross(b)+d2.Cross(b))
	if ca >= 0 {
		return nil
	}
	along := exact.Vec{X: b.X - a.X, Y: b.Y - a.Y}
	k := big.NewRat(a.Cross(along), 1)
	k.Quo(k, big.NewRat(d1.Cross(along)+d2.Cross(along), 1))
	if k.Sign() <= 0 {
		return nil
	}
	return k
}

// reach returns k such that eye + k d lies on the line of edge i.
func (w *Twin) reach(eye exact.Pt, d exact.Vec, i int32) *big.Rat {
	a, b := w.g.Pts[w.g.Edges[i].A].Sub(eye), w.g.Pts[w.g.Edges[i].B].Sub(eye)
	along := exact.Vec{X: b.X - a.X, Y: b.Y - a.Y}
	k := big.NewRat(a.Cross(along), 1)
	return k.Quo(k, big.NewRat(d.Cross(along), 1))
}

// facing returns what fills the side of edge i that looks to a point off its line.
func (w *Twin) facing(i int32, p exact.Pt) filling {
	e := w.g.Edges[i]
	if exact.Orient(w.g.Pts[e.A], w.g.Pts[e.B], p) > 0 {
		return w.left[i]
	}
	return w.right[i]
}

// Sees reports whether b lies in the region of a at a height: in the closed triangle of a gap.
func (w *Twin) Sees(a, b exact.Pt, height int32) bool {
	return w.Region(a, height).Holds(b)
}

// Holds reports whether p lies in the region.
func (r *Region) Holds(p exact.Pt) bool {
	d := p.Sub(r.Eye)
	for _, g := range r.Gaps {
		switch {
		case g.Edge < 0:
		case p == r.Eye:
			return true
		case g.D1.Cross(d) >= 0 && d.Cross(g.D2) >= 0 && g.D1.Dot(d)+g.D2.Dot(d) > 0:
			if side(g.P1, g.P2, SpotOf(p)) >= 0 {
				return true
			}
		}
	}
	return false
}

// Area returns the region's area in square grid units: exact triangles, each rounded once, and summed.
func (r *Region) Area() float64 {
	sum := 0.0
	for _, g := range r.Gaps {
		if g.Edge >= 0 {
			f, _ := g.area2().Float64()
			sum += f / 2
		}
	}
	return sum
}

// ExactArea returns the region's area as a fraction, whose size grows with every gap.
func (r *Region) ExactArea() *big.Rat {
	sum := new(big.Rat)
	for _, g := range r.Gaps {
		if g.Edge >= 0 {
			sum.Add(sum, g.area2())
		}
	}
	return sum.Mul(sum, big.NewRat(1, 2))
}

// area2 is twice the area of the gap's triangle: K1 K2 (D1 x D2).
func (g Gap) area2() *big.Rat {
	k := new(big.Rat).Mul(g.K1, g.K2)
	return k.Mul(k, big.NewRat(g.D1.Cross(g.D2), 1))
}

// Empty reports whether nothing is seen.
func (r *Region) Empty() bool {
	return !slices.ContainsFunc(r.Gaps, func(g Gap) bool { return g.Edge >= 0 })
}
