package study

import (
	"cmp"
	"fmt"
	"slices"

	"enfilade/solver/exact"
	"enfilade/solver/mesh"
	"enfilade/solver/plan"
	"enfilade/solver/sight"
)

// barrierFinder tells what closes the way from a start: the first thing to be crossed on a way that crosses as few edges
// that stop walking as can be. What only the walker's body is too wide for costs nothing to cross; when nothing else is in
// the way, it is too narrow a gap. It searches the mesh once, when first asked, in O(n).
type barrierFinder struct {
	scene *scene
	start exact.Pt
	first []int32 // for each triangle the item crossed first on the way there, -1 for none, -2 for not reached
}

// unreached marks a triangle that no way leads to.
const unreached int32 = -2

func (b *barrierFinder) search() {
	m := b.scene.wide.mesh
	b.first = make([]int32, len(m.Tris))
	for i := range b.first {
		b.first[i] = unreached
	}
	type step struct{ tri, first int32 }
	var now, later []step
	b.scene.wide.holding(b.start, func(t int32) {
		if !b.scene.wide.shut(t) {
			now = append(now, step{t, -1})
		}
	})
	for len(now) > 0 || len(later) > 0 {
		if len(now) == 0 {
			// Of several ways that cross equally little, the one over the item that comes first in the plan is told.
			slices.SortFunc(later, func(a, b step) int { return cmp.Compare(b.first, a.first) })
			now, later = later, now
		}
		s := now[len(now)-1]
		now = now[:len(now)-1]
		if b.first[s.tri] != unreached {
			continue
		}
		b.first[s.tri] = s.first
		t := &m.Tris[s.tri]
		for i := range 3 {
			if t.N[i] == mesh.None {
				continue
			}
			next := step{t.N[i].Tri(), s.first}
			con := m.Constraint(mesh.EdgeOf(s.tri, i))
			if b.offFloor(con) {
				continue
			}
			if !b.hard(con) {
				now = append(now, next)
				continue
			}
			if next.first < 0 {
				next.first = b.scene.wide.graph.Edges[con].Item
			}
			later = append(later, next)
		}
	}
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

// beforeCones says what closes the way to a region.
func (b *barrierFinder) beforeCones(cones []sight.Cone) string {
	label := unreached
	for _, c := range cones {
		label = b.better(label, c.Tri)
	}
	return b.says(label)
}

// beforePoint says what closes the way to a point.
func (b *barrierFinder) beforePoint(p exact.Pt) string {
	label := unreached
	b.scene.wide.holding(p, func(t int32) { label = b.better(label, t) })
	return b.says(label)
}

// better returns the label of triangle t when someone can stand in it and its label comes before the given one.
func (b *barrierFinder) better(label, t int32) int32 {
	if b.first == nil {
		b.search()
	}
	if own := b.first[t]; !b.scene.wide.shut(t) && own != unreached && (label == unreached || own < label) {
		return own
	}
	return label
}

func (b *barrierFinder) says(item int32) string {
	if item == unreached {
		return "no way leads there"
	}
	if item < 0 {
		return fmt.Sprintf("every way there is too narrow for a body of radius %.0f mm", mm(b.scene.radius))
	}
	return nameOf(b.scene.wide.outline.Items[item]) + " closes the way"
}
