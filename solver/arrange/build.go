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
	loose, err := mesh.TriangulatePoints(pulse.Part(ctx, 0, 0.4), g.Pts)
	if err != nil {
		return nil, err
	}
	ends, tags := g.split()
	return g.finish(pulse.Part(ctx, 0.4, 1), loose, ends, tags)
}

// split returns the edges as the mesh takes them: their ends and what they stop.
func (g *Graph) split() (ends [][2]int32, tags []mesh.Tag) {
	ends = make([][2]int32, len(g.Edges))
	tags = make([]mesh.Tag, len(g.Edges))
	for i := range g.Edges {
		e := &g.Edges[i]
		ends[i] = [2]int32{e.A, e.B}
		tags[i] = mesh.Tag{Top: e.Top, Walk: e.Walk}
	}
	return ends, tags
}

// finish puts the edges into the triangulation of the points and finds out which triangles are solid.
func (g *Graph) finish(ctx context.Context, loose *mesh.Loose, ends [][2]int32, tags []mesh.Tag) (*mesh.Mesh, error) {
	tr, err := loose.Constrain(pulse.Part(ctx, 0, 0.3), ends)
	if err != nil {
		return nil, err
	}
	solid, err := g.solids(pulse.Part(ctx, 0.3, 0.5), tr)
	if err != nil {
		return nil, err
	}
	return tr.Finish(pulse.Part(ctx, 0.5, 1), tags, solid)
}

// solids returns what each triangle stops.
func (g *Graph) solids(ctx context.Context, tr *mesh.Triangulation) ([]mesh.Tag, error) {
	w := winding{count: make([]int32, len(g.Bodies)), bodies: g.Bodies}
	return tr.Faces(ctx, func(edge, from int32) { w.cross(g, edge, g.leaving(edge, from)) }, w.stops)
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
