package walk

import (
	"context"

	"enfilade/solver/exact"
	"enfilade/solver/mesh"
	"enfilade/solver/pulse"
)

// side says on which sides of an edge there is floor.
type side struct{ left, right bool }

// leanMesh triangulates the edges of m that stop someone on the floor, and nothing else. O(n log n) expected.
func leanMesh(ctx context.Context, m *mesh.Mesh) (*mesh.Mesh, error) {
	pts, edges, sides := bordersOf(m)
	tr, err := mesh.Triangulate(pulse.Part(ctx, 0, 0.7), pts, edges)
	if err != nil {
		return nil, err
	}
	tags := make([]mesh.Tag, len(edges))
	for i := range tags {
		tags[i].Walk = true
	}
	return tr.Finish(pulse.Part(ctx, 0.7, 1), tags, solidsOf(tr, edges, sides))
}

// bordersOf lists the edges of m that stop walking and have floor on either side, with their points in the order of m.
func bordersOf(m *mesh.Mesh) (pts []exact.Pt, edges [][2]int32, sides []side) {
	index := make([]int32, len(m.Pts))
	fill(index, -1)
	each := func(do func(e, twin mesh.Edge, s side)) {
		for t := range m.Tris {
			tri := &m.Tris[t]
			for i := range 3 {
				e := mesh.EdgeOf(int32(t), i)
				twin := tri.N[i]
				if !tri.StopsWalk(i) || twin != mesh.None && twin < e {
					continue
				}
				s := side{left: tri.Flags&mesh.FlagNoWalk == 0}
				s.right = twin != mesh.None && m.Tris[twin.Tri()].Flags&mesh.FlagNoWalk == 0
				if s.left || s.right {
					do(e, twin, s)
				}
			}
		}
	}
	each(func(e, _ mesh.Edge, _ side) {
		t, i := &m.Tris[e.Tri()], e.Corner()
		index[t.V[i]], index[t.V[inc[i]]] = 0, 0
	})
	for v, used := range index {
		if used == 0 {
			index[v] = int32(len(pts))
			pts = append(pts, m.Pts[v])
		}
	}
	each(func(e, _ mesh.Edge, s side) {
		t, i := &m.Tris[e.Tri()], e.Corner()
		edges = append(edges, [2]int32{index[t.V[i]], index[t.V[inc[i]]]})
		sides = append(sides, s)
	})
	return pts, edges, sides
}

// solidsOf finds the triangles without floor: the sides of the edges say it of those beside one, and where no edge lies
// between two triangles they are alike.
func solidsOf(tr *mesh.Triangulation, edges [][2]int32, sides []side) []mesh.Tag {
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
			case k >= 0 && edges[k][0] == v[i]:
				mark(t, sides[k].left)
			case k >= 0:
				mark(t, sides[k].right)
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
