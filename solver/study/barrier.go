package study

import (
	"cmp"
	"fmt"
	"slices"

	"enfilade/solver/exact"
	"enfilade/solver/mesh"
	"enfilade/solver/plan"
)

// barrierFinder tells what closes the way from a start: the first thing to be crossed on a way that crosses as few edges
// that stop walking as can be. What only the walker's body is too wide for costs nothing to cross; when nothing else is in
// the way, it is too narrow a gap. It searches the mesh once, when first asked, in O(n).
type barrierFinder struct {
	scene *scene
	start exact.Pt
	ways  []way // for each triangle the best way there
}

// way is how a place is reached: over how many edges that stop anyone, and which item is crossed first, -1 for none.
type way struct{ crossed, first int32 }

// noWay is worse than every way.
var noWay = way{1<<31 - 1, 1<<31 - 1}

// before reports whether a crosses less than b, or as much and its item comes first in the plan.
func (a way) before(b way) bool {
	return a.crossed < b.crossed || a.crossed == b.crossed && a.first < b.first
}

// step is a way that leads into a triangle.
type step struct {
	tri int32
	way
}

// search finds the best way to every triangle: all that cross nothing first, then all that cross one thing, those of the item
// that comes first in the plan before the others, and so on.
func (b *barrierFinder) search() {
	b.ways = make([]way, len(b.scene.wide.mesh.Tris))
	for i := range b.ways {
		b.ways[i] = noWay
	}
	var now, later []step
	b.scene.wide.holding(b.start, func(t int32) {
		if !b.scene.wide.shut(t) {
			now = append(now, step{t, way{0, -1}})
		}
	})
	for len(now) > 0 || len(later) > 0 {
		if len(now) == 0 {
			slices.SortFunc(later, func(a, b step) int { return cmp.Compare(b.first, a.first) })
			now, later = later, now
		}
		s := now[len(now)-1]
		now = now[:len(now)-1]
		if b.ways[s.tri] == noWay {
			b.ways[s.tri] = s.way
			now, later = b.spread(s, now, later)
		}
	}
}

// spread appends the ways from s into the neighbours of its triangle: to now where nothing is crossed, else to later.
func (b *barrierFinder) spread(s step, now, later []step) ([]step, []step) {
	m := b.scene.wide.mesh
	t := &m.Tris[s.tri]
	for i := range 3 {
		con := m.Constraint(mesh.EdgeOf(s.tri, i))
		if t.N[i] == mesh.None || b.offFloor(con) {
			continue
		}
		next := step{t.N[i].Tri(), s.way}
		if !b.hard(con) {
			now = append(now, next)
			continue
		}
		next.crossed++
		if next.first < 0 {
			next.first = b.scene.wide.graph.Edges[con].Item
		}
		later = append(later, next)
	}
	return now, later
}

// hard reports whether graph edge con, or -1 for none, stops walkers of any width.
func (b *barrierFinder) hard(con int32) bool {
	if con < 0 {
		return false
	}
	g := b.scene.wide
	e := &g.graph.Edges[con]
	return e.Walk && g.outline.Items[e.Item].Kind != plan.KindWalker
}

// offFloor reports whether graph edge con, or -1 for none, is the floor's own: no way leads off it and back.
func (b *barrierFinder) offFloor(con int32) bool {
	g := b.scene.wide
	return con >= 0 && g.outline.Items[g.graph.Edges[con].Item].Kind == plan.KindFloor
}

// beforeTriangles says what closes the way to a region that has parts in these triangles.
func (b *barrierFinder) beforeTriangles(tris []int32) string {
	best := noWay
	for _, t := range tris {
		best = b.better(best, t)
	}
	return b.says(best)
}

// beforePoint says what closes the way to a point.
func (b *barrierFinder) beforePoint(p exact.Pt) string {
	best := noWay
	b.scene.wide.holding(p, func(t int32) { best = b.better(best, t) })
	return b.says(best)
}

// better returns the better of a way and the one to triangle t.
func (b *barrierFinder) better(w way, t int32) way {
	if b.ways == nil {
		b.search()
	}
	if own := b.ways[t]; own.before(w) {
		return own
	}
	return w
}

func (b *barrierFinder) says(w way) string {
	switch {
	case w == noWay:
		return "no way leads there"
	case w.first < 0:
		return fmt.Sprintf("every way there is too narrow for a body of radius %.0f mm", mm(b.scene.radius))
	}
	return b.scene.nameOf(b.scene.wide.outline.Items[w.first]) + " closes the way"
}
