package plantest

import (
	"slices"

	"enfilade/solver/arrange"
	"enfilade/solver/exact"
	"enfilade/solver/plan"
)

// Twin answers on a rounded graph, slowly and exactly, what the fast solver answers on its mesh. Not for concurrent use.
//
// What a place is filled with follows from the winding numbers about the bodies, found by casting a ray from it against
// every edge: a body fills the places it winds about, and outside the floor all is solid to the ceiling.
type Twin struct {
	g           *arrange.Graph
	left, right []filling // of the two sides of each edge
	around      [][]spoke // the edges at each point, counter-clockwise
	spots       []Spot    // the graph's points
	fans        []*fan    // the sectors about each point, nil until asked for
	legs        map[[2]int32][]link
}

// filling is what a place is filled with.
type filling struct {
	walk bool  // walking stops there
	top  int32 // sight stops there up to this height
}

// spoke is an edge seen from one of its ends.
type spoke struct {
	edge int32
	to   exact.Vec
	out  bool // the edge runs away from this end, from A to B
}

// NewTwin prepares the slow answers on g. It takes time quadratic in the number of edges.
func NewTwin(g *arrange.Graph) *Twin {
	w := &Twin{g: g, left: make([]filling, len(g.Edges)), right: make([]filling, len(g.Edges)),
		around: make([][]spoke, len(g.Pts)), fans: make([]*fan, len(g.Pts)), legs: make(map[[2]int32][]link)}
	for _, p := range g.Pts {
		w.spots = append(w.spots, SpotOf(p))
	}
	for i, e := range g.Edges {
		w.left[i], w.right[i] = w.fill(w.besideEdge(i, true)), w.fill(w.besideEdge(i, false))
		to := g.Pts[e.B].Sub(g.Pts[e.A])
		w.around[e.A] = append(w.around[e.A], spoke{int32(i), to, true})
		w.around[e.B] = append(w.around[e.B], spoke{int32(i), to.Neg(), false})
	}
	for _, spokes := range w.around {
		slices.SortFunc(spokes, func(a, b spoke) int { return compareAngles(a.to, b.to) })
	}
	return w
}

// compareAngles orders directions counter-clockwise from +x.
func compareAngles(a, b exact.Vec) int {
	upper := func(v exact.Vec) bool { return v.Y > 0 || v.Y == 0 && v.X > 0 }
	if upper(a) != upper(b) {
		if upper(a) {
			return -1
		}
		return 1
	}
	return -exact.Sign(a.Cross(b))
}

// fill tells what a place with these winding numbers is filled with.
func (w *Twin) fill(winding []int32) filling {
	f := filling{}
	for i, b := range w.g.Bodies {
		if i == 0 && winding[0] == 0 {
			return filling{walk: true, top: plan.Ceiling}
		}
		if i > 0 && winding[i] != 0 {
			f.walk = f.walk || b.Walk
			f.top = max(f.top, b.Top)
		}
	}
	return f
}

// besideEdge returns the winding numbers just to the left or to the right of the middle of edge i.
//
// A ray is cast from there towards +x. Coordinates are doubled, so that the middle is whole. The step aside is
// infinitely small: across an edge that is not level it is one along x, and decides whether the ray meets the edge
// itself; at a level edge it is one along y, and decides to which side ends at the ray's height are counted.
func (w *Twin) besideEdge(i int, left bool) []int32 {
	e := w.g.Edges[i]
	a, b := w.g.Pts[e.A], w.g.Pts[e.B]
	mx, my := int64(a.X)+int64(b.X), int64(a.Y)+int64(b.Y)
	level := a.Y == b.Y
	winding := w.cast(mx, my, !level || left, i)
	if rising := b.Y > a.Y; !level && rising == left {
		w.cross(winding, e, rising) // the ray starts on the -x side of the edge
	}
	return winding
}

// windingAt returns the winding numbers at a grid point that lies on no edge.
func (w *Twin) windingAt(p exact.Pt) []int32 { return w.cast(2*int64(p.X), 2*int64(p.Y), true, -1) }

// cast sends a ray towards +x from (x, y)/2, lifted by nothing and yet above the points at its height if up is true,
// below them if not, and adds up what it crosses; edge skip is left out.
func (w *Twin) cast(x, y int64, up bool, skip int) []int32 {
	winding := make([]int32, len(w.g.Bodies))
	for i, e := range w.g.Edges {
		if i == skip {
			continue
		}
		a, b := w.g.Pts[e.A], w.g.Pts[e.B]
		ay, by := 2*int64(a.Y), 2*int64(b.Y)
		aboveA, aboveB := y > ay || up && y == ay, y > by || up && y == by
		if aboveA == aboveB {
			continue
		}
		// The crossing lies to the right of (x, y) when (x, y) lies to the left of the edge taken upwards.
		turn := (2*int64(b.X)-2*int64(a.X))*(y-ay) - (by-ay)*(x-2*int64(a.X))
		rising := by > ay
		if rising && turn > 0 || !rising && turn < 0 {
			w.cross(winding, e, rising)
		}
	}
	return winding
}

// cross counts an edge met by a ray towards +x, seen from far out inwards: coming from +x, a rising edge is crossed from
// its right to its left.
func (w *Twin) cross(winding []int32, e arrange.Edge, rising bool) {
	for _, d := range w.g.Winds[e.Wind0:e.Wind1] {
		if rising {
			winding[d.Body] += d.Delta
		} else {
			winding[d.Body] -= d.Delta
		}
	}
}

// stopsWalk reports whether edge i stops walking: as a line, or as the face of something solid.
func (w *Twin) stopsWalk(i int32) bool {
	return w.g.Edges[i].Walk || w.left[i].walk != w.right[i].walk
}

// StopsSight reports whether edge i of the graph stops sight at a height above the floor: as a line, or as the face of
// something solid there.
func (w *Twin) StopsSight(i int, height int32) bool { return w.stopsSight(int32(i), height) }

// Free reports whether sight passes at a height through a grid point that lies on no edge.
func (w *Twin) Free(p exact.Pt, height int32) bool { return w.fill(w.windingAt(p)).top < height }

func (w *Twin) stopsSight(i int32, height int32) bool {
	return w.g.Edges[i].Top >= height || (w.left[i].top >= height) != (w.right[i].top >= height)
}
