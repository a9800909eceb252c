package walk

import (
	"context"

	"enfilade/solver/exact"
	"enfilade/solver/mesh"
	"enfilade/solver/pulse"
)

// leanMesh triangulates the edges of m that stop someone on the floor, and nothing else. O(n log n) expected.
func leanMesh(ctx context.Context, m *mesh.Mesh) (*mesh.Mesh, error) {
	pts, borders := bordersOf(m)
	edges, tags := make([][2]int32, len(borders)), make([]mesh.Tag, len(borders))
	for i, b := range borders {
		edges[i], tags[i].Walk = b.ends, true
	}
	tr, err := mesh.Triangulate(pulse.Part(ctx, 0, 0.7), pts, edges)
	if err != nil {
		return nil, err
	}
	return tr.Finish(pulse.Part(ctx, 0.7, 1), tags, solidsOf(tr, borders))
}

// border is an edge that stops walking, with floor on its left.
type border struct {
	ends   [2]int32
	double bool // there is floor on its right too
}

// bordersOf lists the edges of m that stop someone on the floor, with their points in the order of m.
func bordersOf(m *mesh.Mesh) (pts []exact.Pt, borders []border) {
	index := make([]int32, len(m.Pts))
	fill(index, -1)
	each := func(do func(a, b int32, double bool)) {
		for t := range m.Tris {
			tri := &m.Tris[t]
			if tri.Flags&mesh.FlagNoWalk != 0 {
				continue
			}
			for i := range 3 {
				twin := tri.N[i]
				double := twin != mesh.None && m.Tris[twin.Tri()].Flags&mesh.FlagNoWalk == 0
				if tri.StopsWalk(i) && !(double && twin < mesh.EdgeOf(int32(t), i)) {
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

// solidsOf finds the triangles without floor: a border tells it of those beside it, and where no border lies between two
// triangles they are alike.
func solidsOf(tr *mesh.Triangulation, borders []border) []mesh.Tag {
	solid, known := make([]mesh.Tag, tr.Len()), make([]bool, tr.Len())
	var stack []int32
	mark := func(t int32, walk bool) {
		if !known[t] {
			known[t] = true
			solid[t] = mesh.Tag{Walk: !walk}
			stack = append(stack, t)
		}
	}
	for t := range int32(tr.Len()) {
		v := tr.Corners(t)
		for i := range 3 {
			switch n, k := tr.Neighbour(t, i); {
			case n < 0:
				mark(t, false) // at the box, which lies off the floor
			case k >= 0:
				mark(t, borders[k].double || borders[k].ends[0] == v[i])
			}
		}
		for len(stack) > 0 {
			u := stack[len(stack)-1]
			stack = stack[:len(stack)-1]
			for i := range 3 {
				if n, k := tr.Neighbour(u, i); n >= 0 && k < 0 {
					mark(n, !solid[u].Walk)
				}
			}
		}
	}
	return solid
}
