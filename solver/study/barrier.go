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
// the way, it is too narrow a gap. It searches the mesh as far as it is asked, and once: O(n log n).
type barrierFinder struct {
	scene *scene
	start exact.Pt
	reach []int32 // for each triangle the best way there, an index into ways, or -1
	ways  []way   // from the best on
	now   []int32 // triangles that the last of the ways leads into
	wave  []step  // into triangles by other ways that cross as much, the best one last
	later []step  // by ways that cross one thing more
	floor []bool  // for each item whether it is the floor
	soft  []bool  // for each item whether it is the walker, whose outlines stop nobody
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

// begin makes the search ready.
func (b *barrierFinder) begin() {
	g := b.scene.wide
	b.reach = make([]int32, len(g.mesh.Tris))
	for i := range b.reach {
		b.reach[i] = -1
	}
	b.floor, b.soft = make([]bool, len(g.items)), make([]bool, len(g.items))
	for i, item := range g.items {
		b.floor[i], b.soft[i] = item.Kind == plan.KindFloor, item.Kind == plan.KindWalker
	}
	b.ways = append(b.ways, way{0, -1})
	g.holding(b.start, func(t int32) {
		if !g.shut(t) {
			b.now = append(b.now, t)
		}
	})
}

// next finds the best way to one triangle more and returns that: first all those to which a way crosses nothing, then all to
// which one crosses one thing, those of the item that comes first in the plan before the others, and so on. It returns -1 when
// there are no more.
func (b *barrierFinder) next() int32 {
	for {
		if n := len(b.now); n > 0 {
			t := b.now[n-1]
			b.now = b.now[:n-1]
			if b.reach[t] < 0 {
				b.reach[t] = int32(len(b.ways) - 1)
				b.spread(t)
				return t
			}
			continue
		}
		if len(b.wave) == 0 {
			if len(b.later) == 0 {
				return -1
			}
			slices.SortFunc(b.later, func(a, b step) int { return cmp.Compare(b.first, a.first) })
			b.wave, b.later = b.later, b.wave[:0]
		}
		s := b.wave[len(b.wave)-1]
		b.wave = b.wave[:len(b.wave)-1]
		if b.reach[s.tri] < 0 {
			if s.way != b.ways[len(b.ways)-1] {
				b.ways = append(b.ways, s.way)
			}
			b.now = append(b.now, s.tri)
		}
	}
}

// spread notes the ways on into the neighbours of triangle t: for now where nothing is crossed, else for later.
func (b *barrierFinder) spread(t int32) {
	g := b.scene.wide
	own := b.ways[len(b.ways)-1]
	for i, n := range g.mesh.Tris[t].N {
		if n == mesh.None || b.reach[n.Tri()] >= 0 {
			continue
		}
		con := g.mesh.Constraint(mesh.EdgeOf(t, i))
		if con < 0 {
			b.now = append(b.now, n.Tri())
			continue
		}
		item, walk := g.line(con)
		switch {
		case b.floor[item]: // no way leads off it and back
		case !walk || b.soft[item]:
			b.now = append(b.now, n.Tri())
		case own.first < 0:
			b.later = append(b.later, step{n.Tri(), way{own.crossed + 1, item}})
		default:
			b.later = append(b.later, step{n.Tri(), way{own.crossed + 1, own.first}})
		}
	}
}

// known returns the best way to triangle t as far as the search went.
func (b *barrierFinder) known(t int32) way {
	if b.reach[t] < 0 {
		return noWay
	}
	return b.ways[b.reach[t]]
}

// best returns the best of the ways to some triangles. The search goes on until it has come to one of them: all that it finds
// later is as good at most.
func (b *barrierFinder) best(tris []int32) way {
	if b.reach == nil {
		b.begin()
	}
	best, wanted := noWay, make(map[int32]bool, len(tris))
	for _, t := range tris {
		wanted[t] = true
		if w := b.known(t); w.before(best) {
			best = w
		}
	}
	for best == noWay && len(tris) > 0 {
		t := b.next()
		if t < 0 {
			break
		}
		if wanted[t] {
			best = b.known(t)
		}
	}
	return best
}

// beforeTriangles says what closes the way to a region that has parts in these triangles.
func (b *barrierFinder) beforeTriangles(tris []int32) string { return b.says(b.best(tris)) }

// beforePoint says what closes the way to a point.
func (b *barrierFinder) beforePoint(p exact.Pt) string {
	var tris []int32
	b.scene.wide.holding(p, func(t int32) { tris = append(tris, t) })
	return b.says(b.best(tris))
}

func (b *barrierFinder) says(w way) string {
	switch {
	case w == noWay:
		return "no way leads there"
	case w.first < 0:
		return fmt.Sprintf("every way there is too narrow for a body of radius %.0f mm", mm(b.scene.radius))
	}
	return b.scene.nameOf(b.scene.wide.items[w.first]) + " closes the way"
}
