package arrange

import (
	"context"

	"enfilade/solver/mesh"
	"enfilade/solver/plan"
	"enfilade/solver/pulse"
)

// Build triangulates the graph and finds out which triangles are solid.
//
//   - Errors: the context's when it is cancelled; mesh.ErrCrossing if g is not planar, which Round never yields.
//   - Cost: O(n log n) expected; the solid triangles are found in one pass over the mesh.
func Build(ctx context.Context, g *Graph) (*mesh.Mesh, error) {
	ends := make([][2]int32, len(g.Edges))
	tags := make([]mesh.Tag, len(g.Edges))
	for i, e := range g.Edges {
		ends[i] = [2]int32{e.A, e.B}
		tags[i] = mesh.Tag{Top: e.Top, Walk: e.Walk}
	}
	tr, err := mesh.Triangulate(pulse.Part(ctx, 0, 0.6), g.Pts, ends)
	if err != nil {
		return nil, err
	}
	solid, err := g.solids(pulse.Part(ctx, 0.6, 0.7), tr)
	if err != nil {
		return nil, err
	}
	return tr.Finish(pulse.Part(ctx, 0.7, 1), tags, solid)
}

// solids returns what each triangle stops.
func (g *Graph) solids(ctx context.Context, tr *mesh.Triangulation) ([]mesh.Tag, error) {
	solid := make([]mesh.Tag, tr.Len())
	seen := make([]bool, tr.Len())
	w := winding{count: make([]int32, len(g.Bodies)), bodies: g.Bodies}
	count := 0
	var err error
	g.flood(tr, &w, g.outside(tr), func(t int32) bool { return !seen[t] && err == nil }, func(t int32, s mesh.Tag) {
		seen[t] = true
		solid[t] = s
		if e := pulse.Step(ctx, count, tr.Len()); e != nil {
			err = e
		}
		count++
	})
	return solid, err
}

// triangles is a triangulation as flood walks over it.
type triangles interface {
	Corners(t int32) [3]int32
	Neighbour(t int32, i int) (tri, constraint int32)
}

// flood walks over the mesh for as long as enter accepts the next triangle, face by face, a face being what no edge of the
// graph parts. It keeps the winding numbers of the place in w, which hold for the first triangle, tells what each triangle
// stops, and takes every step across an edge back when it has seen what lies behind it. O(triangles entered).
func (g *Graph) flood(f triangles, w *winding, first int32, enter func(t int32) bool, found func(t int32, s mesh.Tag)) {
	type border struct {
		tri  int32 // behind it
		edge int32 // of the graph, or -1
		sign int32 // +1 when it is crossed from its right to its left
		back bool
	}
	borders := []border{{tri: first, edge: -1}}
	var face []int32
	for len(borders) > 0 {
		b := borders[len(borders)-1]
		borders = borders[:len(borders)-1]
		if b.back {
			w.cross(g, b.edge, -b.sign)
			continue
		}
		if !enter(b.tri) {
			continue
		}
		if b.edge >= 0 {
			w.cross(g, b.edge, b.sign)
			borders = append(borders, border{edge: b.edge, sign: b.sign, back: true})
		}
		stops := w.stops()
		found(b.tri, stops)
		for face = append(face, b.tri); len(face) > 0; {
			t := face[len(face)-1]
			face = face[:len(face)-1]
			for i := range 3 {
				next, edge := f.Neighbour(t, i)
				if next < 0 || !enter(next) {
					continue
				}
				if edge >= 0 {
					borders = append(borders, border{tri: next, edge: edge, sign: g.leaving(edge, f.Corners(t)[i])})
					continue
				}
				found(next, stops)
				face = append(face, next)
			}
		}
	}
}

// leaving returns the sign with which a triangle is left through graph edge e, or -1 for none, of which its half-edge starts
// at point v: the triangle lies to the left of its half-edge, so it is left from left to right.
func (g *Graph) leaving(e, v int32) int32 {
	switch {
	case e < 0:
		return 0
	case v == g.Edges[e].A:
		return -1
	}
	return 1
}

// outside returns a triangle at a corner of the box, which lies outside every body.
func (g *Graph) outside(tr *mesh.Triangulation) int32 {
	corner := int32(len(g.Pts))
	for t := range int32(tr.Len()) {
		v := tr.Corners(t)
		if v[0] == corner || v[1] == corner || v[2] == corner {
			return t
		}
	}
	panic("arrange: the box has no triangle")
}

// winding is the winding number of a place about every body.
type winding struct {
	bodies []Body
	count  []int32
	inside []int32 // the bodies other than the floor about which it is not zero
}

// cross takes the place across a graph edge, from its right to its left when sign is +1.
func (w *winding) cross(g *Graph, edge, sign int32) {
	if edge < 0 {
		return
	}
	e := &g.Edges[edge]
	for _, x := range g.Winds[e.Wind0:e.Wind1] {
		was := w.count[x.Body]
		w.count[x.Body] += sign * x.Delta
		if x.Body == 0 {
			continue
		}
		switch {
		case was == 0:
			w.inside = append(w.inside, x.Body)
		case w.count[x.Body] == 0:
			w.drop(x.Body)
		}
	}
}

func (w *winding) drop(body int32) {
	for i, b := range w.inside {
		if b == body {
			w.inside[i] = w.inside[len(w.inside)-1]
			w.inside = w.inside[:len(w.inside)-1]
			return
		}
	}
}

// stops returns what the bodies around the place stop together; off the floor nothing passes.
func (w *winding) stops() mesh.Tag {
	if w.count[0] == 0 {
		return mesh.Tag{Top: plan.Ceiling, Walk: true}
	}
	var t mesh.Tag
	for _, b := range w.inside {
		t.Top = max(t.Top, w.bodies[b].Top)
		t.Walk = t.Walk || w.bodies[b].Walk
	}
	return t
}
