package plantest

import (
	"math/big"
	"slices"

	"enfilade/solver/exact"
)

// Stretch is a part of a face, from share Lo to share Hi of the way from its first end to its second.
type Stretch struct{ Lo, Hi *big.Rat }

// FaceSeen returns the parts of the face ab, its front to the left, that are seen from a grid point at a height, in order and
// none with a common end. From behind, and level with it, nothing is seen of a face.
//
// The directions to both ends are critical ones too, so that every gap between neighbouring directions lies before the face or
// beside it; within a gap, what of the edge that stops sight lies behind the face's line lets it be seen.
func (w *Twin) FaceSeen(p, a, b exact.Pt, height int32) []Stretch {
	return w.FaceSeenWithin(p, a, b, height, nil)
}

// FaceSeenWithin is FaceSeen within a view.
func (w *Twin) FaceSeenWithin(p, a, b exact.Pt, height int32, v *View) []Stretch {
	if exact.Orient(a, b, p) <= 0 {
		return nil
	}
	r, l := a.Sub(p), b.Sub(p)
	face := &View{Right: r, Mid: l, Left: l}
	dirs := w.criticalDirections(p, face)
	if v != nil {
		dirs = append(dirs, v.Right, v.Mid, v.Left)
	}
	slices.SortFunc(dirs, compareAngles)
	dirs = slices.CompactFunc(dirs, func(a, b exact.Vec) bool { return compareAngles(a, b) == 0 })
	var seen []Stretch
	for i, d := range dirs {
		next := dirs[(i+1)%len(dirs)]
		if !face.holds(d, next) || !v.holds(d, next) {
			continue
		}
		g := w.gap(p, d, next, height)
		if g.Edge < 0 {
			continue
		}
		s, ok := g.behind(p, a, b)
		if !ok {
			continue
		}
		if n := len(seen); n > 0 && seen[n-1].Hi.Cmp(s.Lo) == 0 {
			seen[n-1].Hi = s.Hi
		} else {
			seen = append(seen, s)
		}
	}
	if n := len(seen); n > 1 && seen[n-1].Hi.Cmp(seen[0].Lo) == 0 { // the list of gaps began before the face
		seen[0].Lo = seen[n-1].Lo
		seen = seen[:n-1]
	}
	return seen
}

// behind returns the part of the face before the place where the gap's edge lies behind it.
func (g Gap) behind(eye, a, b exact.Pt) (Stretch, bool) {
	from, to := shareAlong(eye, g.D1, a, b), shareAlong(eye, g.D2, a, b)
	s1, s2 := side(SpotOf(a), SpotOf(b), g.P1), side(SpotOf(a), SpotOf(b), g.P2)
	switch {
	case s1 <= 0 && s2 <= 0:
		return Stretch{from, to}, true
	case s1 >= 0 && s2 >= 0:
		return Stretch{}, false
	}
	// The edge crosses the face's line: there the face begins to be seen, or ends.
	x := crossOf(SpotOf(a), SpotOf(b), g.P1, g.P2)
	if s1 < 0 {
		return Stretch{from, x}, from.Cmp(x) < 0
	}
	return Stretch{x, to}, x.Cmp(to) < 0
}

// shareAlong returns where the line from eye in direction d meets the line ab, as a share of the way from a to b.
func shareAlong(eye exact.Pt, d exact.Vec, a, b exact.Pt) *big.Rat {
	return big.NewRat(d.Cross(eye.Sub(a)), d.Cross(b.Sub(a)))
}

// crossOf returns where the line pq meets the line ab, as a share of the way from a to b.
func crossOf(a, b, p, q Spot) *big.Rat {
	area := func(s Spot) *big.Rat { // of p, q, s, up to a factor that is the same for all s
		return new(big.Rat).SetFrac(p.arrow(q).cross(p.arrow(s)), s.W)
	}
	u, v := area(a), area(b)
	return new(big.Rat).Quo(u, new(big.Rat).Sub(u, v))
}

// Widest returns the length of the longest of the stretches as a share of the face, 0 when there is none.
func Widest(seen []Stretch) *big.Rat {
	widest := new(big.Rat)
	for _, s := range seen {
		if d := new(big.Rat).Sub(s.Hi, s.Lo); d.Cmp(widest) > 0 {
			widest = d
		}
	}
	return widest
}
