package arrange

import (
	"context"

	"enfilade/solver/mesh"
	"enfilade/solver/plan"
	"enfilade/solver/pulse"
)

// Grown is the ground for a walker with a body: the mesh of obstacles as Grow leaves them. Unlike a Site it follows no change,
// and keeps of its graph no more than what runs along each edge.
type Grown struct {
	Mesh  *mesh.Mesh
	Items []plan.Ref // the last one is the walker
	lines []int32    // for each edge the item that runs along it, or its complement when no line there stops walking
}

// NewGrown grows, rounds and triangulates the obstacles of o, of whose rounded graph m is the mesh.
//
//   - Errors: *TooLarge; the context's when it is cancelled.
//   - Cost: as Grow, Round and Build. What one step leaves to the next is all that lasts.
func NewGrown(ctx context.Context, o *Outline, m *mesh.Mesh, radius int32, sides int) (*Grown, error) {
	graph, err := roundGrown(pulse.Part(ctx, 0, 0.3), o, m, radius, sides)
	if err != nil {
		return nil, err
	}
	g := &Grown{Items: graph.Items, lines: make([]int32, len(graph.Edges))}
	for i, e := range graph.Edges {
		if g.lines[i] = e.Item; !e.Walk {
			g.lines[i] = ^e.Item
		}
	}
	if g.Mesh, err = Build(pulse.Part(ctx, 0.3, 1), graph); err != nil {
		return nil, err
	}
	g.Mesh.Fix()
	return g, nil
}

// roundGrown returns the rounded graph of the obstacles grown.
func roundGrown(ctx context.Context, o *Outline, m *mesh.Mesh, radius int32, sides int) (*Graph, error) {
	grown := Grow(o, m, radius, sides)
	if err := grown.tooLarge(len(grown.Segments)); err != nil {
		return nil, err
	}
	r, err := heat(pulse.Part(ctx, 0, 0.5), grown, grown.limit())
	if err != nil {
		return nil, err
	}
	if err := r.draw(pulse.Part(ctx, 0.5, 1), grown); err != nil {
		return nil, err
	}
	r.compact()
	return r.graph, grown.tooLarge(len(r.graph.Edges))
}

// Line returns what runs along an edge, by its number in the mesh's constraints: the first item in the plan, and whether a line
// there stops walking.
func (g *Grown) Line(edge int32) (item int32, walk bool) {
	if l := g.lines[edge]; l < 0 {
		return ^l, false
	}
	return g.lines[edge], true
}
