package mesh

import (
	"context"

	"enfilade/solver/exact"
	"enfilade/solver/pulse"
)

// Lean triangulates those edges of m that stop someone, and nothing else: the edges that stops accepts and that have an open
// triangle on either side. What they stop is tag; triangles that are not open are solid for it. Other corners of m are left
// out; when there are none, m itself is returned if same says that it will do. O(n log n) expected.
func Lean(ctx context.Context, m *Mesh, open func(t int32) bool, stops func(e Edge) bool, tag Tag, same bool) (*Mesh, error) {
	pts, borders := m.borders(open, stops)
	if same && len(pts) == len(m.Pts)-4 {
		return m, nil
	}
	edges, tags := make([][2]int32, len(borders)), make([]Tag, len(borders))
	for i, b := range borders {
		edges[i], tags[i] = b.ends, tag
	}
	tr, err := Triangulate(pulse.Part(ctx, 0, 0.7), pts, edges)
	if err != nil {
		return nil, err
	}
	return tr.Finish(pulse.Part(ctx, 0.7, 1), tags, tr.solids(borders, tag))
}

// border is an edge that stops someone, with an open triangle on its left.
type border struct {
	ends   [2]int32
	double bool // there is one on its right too
}

// borders lists the edges that stop someone, with their points in the order of m.
func (m *Mesh) borders(open func(t int32) bool, stops func(e Edge) bool) (pts []exact.Pt, borders []border) {
	index := make([]int32, len(m.Pts))
	for i := range index {
		index[i] = -1
	}
	each := func(do func(a, b int32, double bool)) {
		for t := range m.Tris {
			if !open(int32(t)) {
				continue
			}
			tri := &m.Tris[t]
			for i := range 3 {
				e, twin := EdgeOf(int32(t), i), tri.N[i]
				double := twin != None && open(twin.Tri())
				if stops(e) && !(double && twin < e) {
					do(tri.V[i], tri.V[inc[i]], double)
				}
			}
		}
	}
	each(func(a, b int32, _ bool) { index[a], index[b] = 0, 0 })
	for v, used := range index {
		if used == 0 {
			index[v] = int32(len(pts))
			pts = append(pts, m.Pts[v])
		}
	}
	each(func(a, b int32, double bool) {
		borders = append(borders, border{[2]int32{index[a], index[b]}, double})
	})
	return pts, borders
}

// solids finds the triangles that are not open: a border tells it of those beside it, and where no border lies between two
// triangles they are alike.
func (tr *Triangulation) solids(borders []border, tag Tag) []Tag {
	solid, known := make([]Tag, tr.Len()), make([]bool, tr.Len())
	var stack []int32
	mark := func(t int32, s Tag) {
		if !known[t] {
			known[t], solid[t] = true, s
			stack = append(stack, t)
		}
	}
	for t := range int32(tr.Len()) {
		v := tr.Corners(t)
		for i := range 3 {
			switch n, k := tr.Neighbour(t, i); {
			case n < 0: // at the box, which lies off the floor
				mark(t, tag)
			case k >= 0 && !borders[k].double && borders[k].ends[0] != v[i]:
				mark(t, tag)
			case k >= 0:
				mark(t, Tag{})
			}
		}
		for len(stack) > 0 {
			u := stack[len(stack)-1]
			stack = stack[:len(stack)-1]
			for i := range 3 {
				if n, k := tr.Neighbour(u, i); n >= 0 && k < 0 {
					mark(n, solid[u])
				}
			}
		}
	}
	return solid
}
