package walk

import (
	"cmp"
	"context"
	"math"
	"slices"

	"enfilade/solver/exact"
	"enfilade/solver/mesh"
)

// Field knows how far every point of the floor is from one start, by the shortest walk. It never changes and is good for as
// long as its mesh is.
//
// It keeps what a flood finds: for each triangle the roots (corners, or the start) from which walks enter it straight on, each
// with the cone in which it does. The distance of a point is the least, over the roots whose closed cone holds it, of the
// root's distance and the straight line from there. Within a triangle cones may overlap; together they cover it, since a
// flood stops a cone only where another walk is shorter to all that lies beyond.
type Field struct {
	m     *mesh.Mesh
	roots []root
	first []int32 // the parts of triangle t are parts[first[t]:first[t+1]]
	parts []part
	tris  []int32 // while the flood runs, the triangle of each part
}

// root is a point from which walks go straight on.
type root struct {
	at exact.Pt
	g  float64 // distance from the start
}

// part says that a triangle is entered from a root, between the directions r and l from it.
type part struct {
	root int32
	r, l exact.Vec
}

// Field returns the distances from start. Errors as Flood; cost as a Flood over all of the floor, O(k) memory for k cones.
func (f *Finder) Field(ctx context.Context, start exact.Pt) (*Field, error) {
	_, field, err := f.FloodField(ctx, start, nil)
	return field, err
}

// FloodField is Flood that goes on over all of the floor and keeps the distances, so that both cost one flood.
func (f *Finder) FloodField(ctx context.Context, start exact.Pt, goals []Goal) ([]Path, *Field, error) {
	defer f.reset()
	field := &Field{m: f.m}
	f.setGoals(goals)
	f.field = field
	if err := f.run(ctx, start); err != nil {
		return nil, nil, err
	}
	field.settle(f.nodes)
	return f.paths(), field, nil
}

// add keeps a cone that enters a triangle.
func (d *Field) add(t, node int32, r, l exact.Vec) {
	d.tris = append(d.tris, t)
	d.parts = append(d.parts, part{node, r, l})
}

// settle takes over the roots and sorts the parts by triangle, by counting.
func (d *Field) settle(nodes []node) {
	d.roots = make([]root, len(nodes))
	for i := range nodes {
		d.roots[i] = root{nodes[i].at, nodes[i].g}
	}
	d.first = make([]int32, len(d.m.Tris)+1)
	for _, t := range d.tris {
		d.first[t+1]++
	}
	for t := range d.m.Tris {
		d.first[t+1] += d.first[t]
	}
	sorted := make([]part, len(d.parts))
	next := append([]int32(nil), d.first...)
	for i, t := range d.tris {
		sorted[next[t]] = d.parts[i]
		next[t]++
	}
	d.parts, d.tris = sorted, nil
	order := d.order
	for t := range d.m.Tris {
		slices.SortFunc(d.of(int32(t)), order)
	}
}

// order puts parts in an order that does not depend on that of the flood, so that what is measured is the same to the last bit.
func (d *Field) order(a, b part) int {
	return cmp.Or(d.roots[a.root].at.Compare(d.roots[b.root].at), cmp.Compare(d.roots[a.root].g, d.roots[b.root].g),
		cmp.Compare(a.r.X, b.r.X), cmp.Compare(a.r.Y, b.r.Y))
}

// of returns the parts of triangle t.
func (d *Field) of(t int32) []part { return d.parts[d.first[t]:d.first[t+1]] }

// At returns the distance of p from the start in grid units, by the side of a wall that is nearer. It reports false where no
// walk leads. Expected time is that of finding p in the mesh.
func (d *Field) At(p exact.Pt) (float64, bool) {
	least := math.Inf(1)
	holders(d.m, p, func(t int32) {
		for _, k := range d.of(t) {
			from := &d.roots[k.root]
			if v := p.Sub(from.at); k.r.Cross(v) >= 0 && v.Cross(k.l) >= 0 {
				least = min(least, from.g+math.Sqrt(float64(v.Len2())))
			}
		}
	})
	return least, !math.IsInf(least, 1)
}

// from returns the distance of the point at offset x, y from part k's root, if its cone holds it; it only measures.
func (d *Field) from(k *part, x, y float64) (float64, bool) {
	if float64(k.r.X)*y-float64(k.r.Y)*x < 0 || x*float64(k.l.Y)-y*float64(k.l.X) < 0 {
		return 0, false
	}
	return d.roots[k.root].g + math.Hypot(x, y), true
}
