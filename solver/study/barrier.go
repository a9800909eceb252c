package study

import (
	"enfilade/solver/exact"
	"enfilade/solver/mesh"
	"enfilade/solver/plan"
	"enfilade/solver/sight"
)

// barrierFinder tells what closes the way from a start: the first thing to be crossed on a way that crosses as few edges
// that stop walking as can be. It searches the mesh once, when first asked, in O(n).
type barrierFinder struct {
	scene *scene
	start exact.Pt
	first []int32 // for each triangle the graph edge crossed first on the way there, -1 for none, -2 for not reached
}

// unreached marks a triangle that no way leads to.
const unreached int32 = -2

func (b *barrierFinder) search() {
	m := b.scene.mesh
	b.first = make([]int32, len(m.Tris))
	for i := range b.first {
		b.first[i] = unreached
	}
	type step struct{ tri, first int32 }
	var now, later []step
	place, ok := m.Locate(b.start)
	if !ok {
		return
	}
	if place.Corner >= 0 {
		m.Around(mesh.EdgeOf(place.Tri, place.Corner), func(e mesh.Edge) { now = append(now, step{e.Tri(), -1}) })
	} else {
		now = append(now, step{place.Tri, -1})
		if place.Edge != mesh.None && m.Twin(place.Edge) != mesh.None {
			now = append(now, step{m.Twin(place.Edge).Tri(), -1})
		}
	}
	for len(now) > 0 || len(later) > 0 {
		if len(now) == 0 {
			now, later = later, now
		}
		s := now[len(now)-1]
		now = now[:len(now)-1]
		if b.first[s.tri] != unreached || s.first < 0 && b.scene.shut(s.tri) {
			continue
		}
		b.first[s.tri] = s.first
		t := &m.Tris[s.tri]
		for i := range 3 {
			if t.N[i] == mesh.None {
				continue
			}
			next := step{t.N[i].Tri(), s.first}
			if !t.StopsWalk(i) {
				now = append(now, next)
				continue
			}
			if con := m.Con[mesh.EdgeOf(s.tri, i)]; next.first < 0 {
				next.first = con
			}
			later = append(later, next)
		}
	}
}

// beforeCones says what closes the way to a region.
func (b *barrierFinder) beforeCones(cones []sight.Cone) string {
	if b.first == nil {
		b.search()
	}
	for _, c := range cones {
		if !b.scene.shut(c.Tri) {
			return b.says(b.first[c.Tri])
		}
	}
	return "it is seen only from places where nobody walks"
}

// beforePoint says what closes the way to a point.
func (b *barrierFinder) beforePoint(p exact.Pt) string {
	if b.first == nil {
		b.search()
	}
	if place, ok := b.scene.mesh.Locate(p); ok {
		return b.says(b.first[place.Tri])
	}
	return ""
}

func (b *barrierFinder) says(edge int32) string {
	if edge < 0 {
		return "no way leads there"
	}
	item := b.scene.outline.Items[b.scene.graph.Edges[edge].Item]
	if item.Kind == plan.KindFloor {
		return "the floor ends before it"
	}
	return nameOf(item) + " closes the way"
}
