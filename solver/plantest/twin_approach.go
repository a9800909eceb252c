package plantest

import (
	"math"
	"math/big"
	"slices"

	"enfilade/solver/exact"
)

// Approach is the shortest walk to where a target is first seen.
type Approach struct {
	Walk       // Length 0 when the start sees the target, +Inf when no walk leads to a place that does
	Other bool // another end is as near, to the last few bits
}

// front is a stretch of a region's border that a walker can step over: both ends, and the sector about each in which it
// lies.
type front struct {
	a, b     Spot
	atA, atB *fan
	inA, inB int
}

// Approach returns the shortest walk from s to the region of places that see t in the plane of an eye at a height.
func (w *Twin) Approach(s, t exact.Pt, eye int32) Approach { return w.ApproachTo(s, w.Region(t, eye)) }

// ApproachTo returns the shortest walk from s to a region.
//
// Places are points with a sector. A place sees the target when the region holds points next to it within its own sector, so the
// back of a wall whose front is seen does not. The region is entered over its border where that does not run along
// something that stops walking; such a stretch, cut where edges that stop walking meet it, is a [front]. The last leg of a
// shortest walk ends at a front's end or square to it: were its end decided by what stands in the way, the walk would
// bend there and the corner would be the better last point. Every corner is tried with every front.
func (w *Twin) ApproachTo(s exact.Pt, r *Region) Approach {
	f := w.flood(s)
	best := Approach{Walk: Walk{Length: math.Inf(1)}}
	for i, p := range f.places {
		if f.length[i] < best.Length && w.placeSees(r, f.nodes[p.node], p.sector) {
			best = Approach{Walk: Walk{f.length[i], f.path(i)}}
		}
	}
	if best.Length == 0 {
		return best
	}
	for _, c := range f.candidates(w.fronts(r)) {
		if c.length > best.Length+nearlyEqual(best.Length) {
			break
		}
		if !f.valid(c) {
			continue
		}
		if c.length < best.Length {
			best.Walk = Walk{c.length, append(f.path(c.place), c.end)}
		} else if !c.end.Equal(best.Points[len(best.Points)-1]) {
			best.Other = true
		}
	}
	return best
}

// nearlyEqual is how much longer a walk of the same length may come out of sums of rounded roots: a walk of fewer than a
// hundred legs gathers less than 128 roundings of 2^-52 each.
func nearlyEqual(length float64) float64 {
	if math.IsInf(length, 1) {
		return 0
	}
	return length * 0x1p-45
}

// placeSees reports whether the region holds points next to a node within a sector.
func (w *Twin) placeSees(r *Region, n node, sector int) bool {
	from, to := n.fan.span(sector)
	for _, g := range r.Gaps {
		if g.Edge < 0 {
			continue
		}
		a, b, ok := g.wedge(SpotOf(r.Eye), n.spot)
		if ok && overlap(a, b, from, to) {
			return true
		}
	}
	return false
}

// span returns the directions that bound a sector, counter-clockwise from from to to; both nil when it goes all round.
func (f *fan) span(sector int) (from, to *arrow) {
	if len(f.rays) == 0 {
		return nil, nil
	}
	return &f.rays[sector], &f.rays[(sector+1)%len(f.rays)]
}

// wedge returns the directions in which the gap's triangle lies about a point of it, counter-clockwise from a to b; both
// nil when it lies all round, and ok false when the point is not in the triangle.
func (g Gap) wedge(eye, p Spot) (a, b *arrow, ok bool) {
	corners := [3]Spot{eye, g.P1, g.P2}
	var sides [3]int // of p, with respect to the side from corner i to corner i+1
	for i := range corners {
		sides[i] = side(corners[i], corners[(i+1)%3], p)
		if sides[i] < 0 {
			return nil, nil, false
		}
	}
	for i, c := range corners {
		if c.Equal(p) {
			return ref(c.arrow(corners[(i+1)%3])), ref(c.arrow(corners[(i+2)%3])), true
		}
	}
	for i, s := range sides {
		if s == 0 { // inside a side: half the places, those to its left
			d := corners[i].arrow(corners[(i+1)%3])
			return ref(d), ref(d.back()), true
		}
	}
	return nil, nil, true
}

func ref(a arrow) *arrow { return &a }

// overlap reports whether two open wedges have a direction in common; nil bounds mean all round. They have exactly when
// one of them begins within the other or together with it.
func overlap(a, b, c, d *arrow) bool {
	if a == nil || c == nil {
		return true
	}
	begins := func(x, from, to *arrow) bool { return from.same(*to) || from.before(*x, *to) }
	return begins(a, c, d) || begins(c, a, b)
}

// fronts returns the stretches of the region's border that a walker can step over.
func (w *Twin) fronts(r *Region) []front {
	var fronts []front
	for _, p := range r.Border {
		cuts := w.cuts(p)
		for i := 1; i < len(cuts); i++ {
			f := front{a: cuts[i-1], b: cuts[i], atA: w.fanOf(cuts[i-1]), atB: w.fanOf(cuts[i])}
			inA, inB := f.atA.bear(f.a.arrow(f.b)), f.atB.bear(f.b.arrow(f.a))
			if inA.ray >= 0 || inB.ray >= 0 || !f.atA.free[inA.sector] {
				continue // along something that stops walking, or within it
			}
			f.inA, f.inB = inA.sector, inB.sector
			fronts = append(fronts, f)
		}
	}
	return fronts
}

// cuts returns the ends of a piece of border and every place between where an edge that stops walking meets it, in order.
func (w *Twin) cuts(p Piece) []Spot {
	type cut struct {
		at *big.Rat
		s  Spot
	}
	cuts := []cut{{new(big.Rat), p.A}, {big.NewRat(1, 1), p.B}}
	d := p.A.arrow(p.B)
	share := func(s Spot) *big.Rat { // of the way from A to B, by projection: (s-A).d / d.d, both brought to whole numbers
		k := new(big.Rat).SetFrac(p.A.arrow(s).dot(d), d.dot(d))
		return k.Mul(k, new(big.Rat).SetFrac(p.B.W, s.W))
	}
	for i, e := range w.g.Edges {
		if !w.stopsWalk(int32(i)) {
			continue
		}
		a, b := w.spots[e.A], w.spots[e.B]
		for _, end := range []Spot{a, b} {
			if onSegment(p.A, p.B, end) {
				cuts = append(cuts, cut{share(end), end})
			}
		}
		if side(p.A, p.B, a)*side(p.A, p.B, b) < 0 && side(a, b, p.A)*side(a, b, p.B) < 0 {
			k := share2(p, a, b)
			cuts = append(cuts, cut{k, p.A.toward(p.B, k)})
		}
	}
	slices.SortFunc(cuts, func(a, b cut) int { return a.at.Cmp(b.at) })
	cuts = slices.CompactFunc(cuts, func(a, b cut) bool { return a.at.Cmp(b.at) == 0 })
	spots := make([]Spot, len(cuts))
	for i, c := range cuts {
		spots[i] = c.s
	}
	return spots
}

// share2 returns where the line ab crosses a piece, as a share of the way from A to B: area(a,b,A) / (area(a,b,A) -
// area(a,b,B)).
func share2(p Piece, a, b Spot) *big.Rat {
	area := func(s Spot) *big.Rat {
		return new(big.Rat).SetFrac(a.arrow(b).cross(a.arrow(s)), s.W)
	}
	u, v := area(p.A), area(p.B)
	return u.Quo(u, v.Sub(u, v))
}

// candidate is a last leg: from a place to an end, into a sector there.
type candidate struct {
	length float64
	place  int
	end    Spot
	fan    *fan
	sector int
}

// candidates returns all last legs, shortest walk first.
func (f *flood) candidates(fronts []front) []candidate {
	var list []candidate
	for i, p := range f.places {
		if math.IsInf(f.length[i], 1) {
			continue
		}
		root := f.nodes[p.node].spot
		for _, fr := range fronts {
			add := func(end Spot, at *fan, sector int) {
				list = append(list, candidate{f.length[i] + dist(root, end), i, end, at, sector})
			}
			add(fr.a, fr.atA, fr.inA)
			add(fr.b, fr.atB, fr.inB)
			if foot, ok := footOf(root, fr.a, fr.b); ok {
				add(foot, &fan{free: []bool{true}}, 0)
			}
		}
	}
	slices.SortFunc(list, func(a, b candidate) int {
		switch {
		case a.length < b.length:
			return -1
		case a.length > b.length:
			return 1
		}
		return 0
	})
	return list
}

// footOf returns the foot of the perpendicular from p on ab, if it falls between the ends.
func footOf(p, a, b Spot) (Spot, bool) {
	d := a.arrow(b)
	k := new(big.Rat).SetFrac(a.arrow(p).dot(d), d.dot(d))
	k.Mul(k, new(big.Rat).SetFrac(b.W, p.W))
	if k.Sign() <= 0 || k.Cmp(big.NewRat(1, 1)) >= 0 {
		return Spot{}, false
	}
	return a.toward(b, k), true
}

// valid reports whether the candidate's last leg can be walked into its sector.
func (f *flood) valid(c candidate) bool {
	p := f.places[c.place]
	n := f.nodes[p.node]
	if n.spot.Equal(c.end) {
		return false // a root on a front sees the target itself, which placeSees has found
	}
	return slices.Contains(f.w.leg(n.spot, c.end, n.fan, c.fan), link{p.sector, c.sector})
}
