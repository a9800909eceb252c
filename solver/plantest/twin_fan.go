package plantest

import (
	"slices"

	"enfilade/solver/exact"
)

// fan is how the places about a point hang together for walking: the directions of the edges there that stop walking, in
// counter-clockwise order, and the sectors between them. Sector i lies between ray i and ray i+1; with no rays there is
// the one sector 0. Two sectors are different places: no walk passes from one to the other at the point.
type fan struct {
	rays []arrow
	free []bool // of each sector: can one walk there
}

// bearing says where a direction lies in a fan: inside a sector, or along ray Ray.
type bearing struct {
	sector int
	ray    int // -1 when inside the sector
}

// bear finds a direction in the fan.
func (f *fan) bear(d arrow) bearing {
	for i, r := range f.rays {
		if r.same(d) {
			return bearing{-1, i}
		}
	}
	for i, r := range f.rays {
		next := f.rays[(i+1)%len(f.rays)]
		if next.same(r) || r.before(d, next) {
			return bearing{i, -1}
		}
	}
	return bearing{0, -1}
}

// leftOf and rightOf return the sectors on both sides of ray i, looking along it.
func (f *fan) leftOf(i int) int  { return i }
func (f *fan) rightOf(i int) int { return (i + len(f.rays) - 1) % len(f.rays) }

// fanAt returns the fan about point v of the graph.
func (w *Twin) fanAt(v int32) *fan {
	if w.fans[v] != nil {
		return w.fans[v]
	}
	f := &fan{}
	for _, s := range w.around[v] {
		if w.stopsWalk(s.edge) {
			f.rays = append(f.rays, arrowOf(s.to))
			f.free = append(f.free, !w.leftAlong(s).walk)
		}
	}
	if len(f.rays) == 0 {
		if len(w.around[v]) > 0 {
			f.free = []bool{!w.leftAlong(w.around[v][0]).walk}
		} else {
			f.free = []bool{!w.fill(w.windingAt(w.g.Pts[v])).walk}
		}
	}
	w.fans[v] = f
	return f
}

// leftAlong returns what fills the left side of an edge, looking along it from the spoke's end.
func (w *Twin) leftAlong(s spoke) filling {
	if s.out {
		return w.left[s.edge]
	}
	return w.right[s.edge]
}

// fanOf returns the fan about any spot: a point of the graph, a place inside an edge, or one on no edge, which must then
// be on the grid.
func (w *Twin) fanOf(s Spot) *fan {
	for v, p := range w.spots {
		if p.Equal(s) {
			return w.fanAt(int32(v))
		}
	}
	for i, e := range w.g.Edges {
		if !onSegment(w.spots[e.A], w.spots[e.B], s) {
			continue
		}
		if !w.stopsWalk(int32(i)) {
			return &fan{free: []bool{!w.left[i].walk}}
		}
		to := w.g.Pts[e.B].Sub(w.g.Pts[e.A])
		return &fan{rays: []arrow{arrowOf(to), arrowOf(to.Neg())}, free: []bool{!w.left[i].walk, !w.right[i].walk}}
	}
	return &fan{free: []bool{!w.fill(w.windingAt(s.at)).walk}}
}

// vertexAt returns the index of the graph's point at p, or -1.
func (w *Twin) vertexAt(p exact.Pt) int32 {
	for i, q := range w.g.Pts {
		if p == q {
			return int32(i)
		}
	}
	return -1
}

// Stands reports whether a walker can be at p: whether some sector about it is free.
func (w *Twin) Stands(p exact.Pt) bool { return slices.Contains(w.fanOf(SpotOf(p)).free, true) }
