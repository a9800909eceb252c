package plantest

import (
	"math"
	"slices"

	"enfilade/solver/exact"
)

// Walk is a shortest walk.
type Walk struct {
	Length float64 // grid units; +Inf when there is none
	Points []Spot  // from start to end; nil when there is none
}

// place is a sector about a node: where a walker can be.
type place struct {
	node   int // index into flood.nodes
	sector int
}

// flood is the shortest walks from one start to every corner: the visibility graph of places, searched by Dijkstra's
// method without a queue.
type flood struct {
	w      *Twin
	nodes  []node
	places []place
	length []float64 // of each place
	from   []int     // the place before, or -1
}

// node is a point where walks begin, end or bend.
type node struct {
	spot   Spot
	fan    *fan
	vertex int32 // index of the graph's point, or -1
}

// Walk returns the shortest walk from s to t. A start on a wall stands on any side of it; a target on a wall is reached
// from any side.
func (w *Twin) Walk(s, t exact.Pt) Walk {
	f := w.flood(s, t)
	best := Walk{Length: math.Inf(1)}
	for i, p := range f.places {
		if p.node == 1 && f.length[i] < best.Length {
			best = Walk{f.length[i], f.path(i)}
		}
	}
	if s == t && len(f.places) > 0 && f.places[0].node == 0 {
		return Walk{0, []Spot{SpotOf(s)}}
	}
	return best
}

// flood finds the shortest walks from s to the corners and the extra points; node 0 is s, the extras follow.
func (w *Twin) flood(s exact.Pt, extra ...exact.Pt) *flood {
	f := &flood{w: w}
	for _, p := range append([]exact.Pt{s}, extra...) {
		f.add(SpotOf(p), w.fanOf(SpotOf(p)), w.vertexAt(p))
	}
	for v := range w.g.Pts {
		if c := w.fanAt(int32(v)); len(c.rays) > 0 {
			f.add(w.spots[v], c, int32(v))
		}
	}
	f.search()
	return f
}

func (f *flood) add(s Spot, c *fan, vertex int32) {
	for sector, free := range c.free {
		if free {
			f.places = append(f.places, place{len(f.nodes), sector})
			f.length = append(f.length, math.Inf(1))
			f.from = append(f.from, -1)
			if len(f.nodes) == 0 {
				f.length[len(f.length)-1] = 0
			}
		}
	}
	f.nodes = append(f.nodes, node{s, c, vertex})
}

func (f *flood) search() {
	done := make([]bool, len(f.places))
	for {
		at := -1
		for i := range f.places {
			if !done[i] && !math.IsInf(f.length[i], 1) && (at < 0 || f.length[i] < f.length[at]) {
				at = i
			}
		}
		if at < 0 {
			return
		}
		done[at] = true
		for i, p := range f.places {
			if done[i] {
				continue
			}
			a, b := f.nodes[f.places[at].node], f.nodes[p.node]
			long := f.length[at] + dist(a.spot, b.spot)
			if long < f.length[i] && f.joins(f.places[at], p) {
				f.length[i], f.from[i] = long, at
			}
		}
	}
}

// joins reports whether a straight leg leads from one place to the other. Two sectors about one point are not joined.
func (f *flood) joins(a, b place) bool {
	p, q := f.nodes[a.node], f.nodes[b.node]
	if p.spot.Equal(q.spot) {
		return a.sector == b.sector
	}
	return slices.Contains(f.w.legBetween(p, q), link{a.sector, b.sector})
}

// legBetween is leg, remembered where both ends are points of the graph.
func (w *Twin) legBetween(p, q node) []link {
	if p.vertex < 0 || q.vertex < 0 {
		return w.leg(p.spot, q.spot, p.fan, q.fan)
	}
	key := [2]int32{p.vertex, q.vertex}
	links, ok := w.legs[key]
	if !ok {
		links = w.leg(p.spot, q.spot, p.fan, q.fan)
		w.legs[key] = links
	}
	return links
}

// path returns the points of the walk to place i.
func (f *flood) path(i int) []Spot {
	var points []Spot
	for ; i >= 0; i = f.from[i] {
		if s := f.nodes[f.places[i].node].spot; len(points) == 0 || !points[len(points)-1].Equal(s) {
			points = append(points, s)
		}
	}
	slices.Reverse(points)
	return points
}
