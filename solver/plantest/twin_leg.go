package plantest

import (
	"math/big"
	"slices"
)

// link says that a straight leg joins a sector of its first point with a sector of its last.
type link struct{ from, to int }

// run is how a walk moves on between two neighbouring points of the graph: through open floor, or along an edge that stops
// walking, on its left or on its right.
type run uint8

const (
	runOpen run = 1 << iota
	runLeft
	runRight
)

// leg returns which sectors about p a straight walk to q can leave and which sector about q it then reaches; p and q are
// different places.
//
// A walk may run along walls and graze corners, yet at every point of the graph on its way it must come in and go out by
// one and the same sector: what meets there leaves no gap. Along an edge that stops walking it keeps to one side.
func (w *Twin) leg(p, q Spot, atP, atQ *fan) []link {
	if w.blocked(p, q) {
		return nil
	}
	d := p.arrow(q)
	back := d.back()
	through := w.between(p, q, d)
	var links []link
	for from, free := range atP.free {
		if !free {
			continue
		}
		runs := atP.leave(from, d)
		for _, v := range through {
			f := w.fanAt(v)
			next := run(0)
			for _, in := range f.arrive(runs, back) {
				next |= f.leave(in, d)
			}
			runs = next
		}
		for _, to := range atQ.arrive(runs, back) {
			links = append(links, link{from, to})
		}
	}
	return links
}

// leave returns the ways in which a walk can go on from a sector in direction d.
func (f *fan) leave(sector int, d arrow) run {
	b := f.bear(d)
	if b.ray < 0 {
		if b.sector == sector {
			return runOpen
		}
		return 0
	}
	ways := run(0)
	if f.leftOf(b.ray) == sector {
		ways |= runLeft
	}
	if f.rightOf(b.ray) == sector {
		ways |= runRight
	}
	return ways
}

// arrive returns the free sectors that a walk going in these ways reaches when it comes from direction back. Its left is
// the right of back.
func (f *fan) arrive(ways run, back arrow) []int {
	b := f.bear(back)
	var sectors []int
	add := func(way run, sector int) {
		if ways&way != 0 && f.free[sector] && !slices.Contains(sectors, sector) {
			sectors = append(sectors, sector)
		}
	}
	if b.ray < 0 {
		add(runOpen, b.sector)
	} else {
		add(runLeft, f.rightOf(b.ray))
		add(runRight, f.leftOf(b.ray))
	}
	return sectors
}

// blocked reports whether an edge that stops walking crosses pq inside both.
func (w *Twin) blocked(p, q Spot) bool {
	loX, hiX := bounds(p.X, p.W, q.X, q.W)
	loY, hiY := bounds(p.Y, p.W, q.Y, q.W)
	for i, e := range w.g.Edges {
		a, b := w.g.Pts[e.A], w.g.Pts[e.B]
		if max(a.X, b.X) < loX || min(a.X, b.X) > hiX || max(a.Y, b.Y) < loY || min(a.Y, b.Y) > hiY || !w.stopsWalk(int32(i)) {
			continue
		}
		sa, sb := w.spots[e.A], w.spots[e.B]
		if side(p, q, sa)*side(p, q, sb) < 0 && side(sa, sb, p)*side(sa, sb, q) < 0 {
			return true
		}
	}
	return false
}

// bounds returns whole numbers below and above both fractions.
func bounds(x, xw, y, yw *big.Int) (lo, hi int32) {
	a := int32(new(big.Int).Div(x, xw).Int64())
	b := int32(new(big.Int).Div(y, yw).Int64())
	return min(a, b), max(a, b) + 1
}

// between returns the points of the graph inside pq at which edges stop walking, in order from p.
func (w *Twin) between(p, q Spot, d arrow) []int32 {
	loX, hiX := bounds(p.X, p.W, q.X, q.W)
	loY, hiY := bounds(p.Y, p.W, q.Y, q.W)
	var on []int32
	for v, at := range w.g.Pts {
		if at.X < loX || at.X > hiX || at.Y < loY || at.Y > hiY {
			continue
		}
		s := w.spots[v]
		if onSegment(p, q, s) && !s.Equal(p) && !s.Equal(q) && len(w.fanAt(int32(v)).rays) > 0 {
			on = append(on, int32(v))
		}
	}
	slices.SortFunc(on, func(a, b int32) int { return w.spots[b].arrow(w.spots[a]).dot(d).Sign() })
	return on
}
