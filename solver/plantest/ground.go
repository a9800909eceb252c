package plantest

import (
	"context"
	"math/rand/v2"

	"enfilade/solver/arrange"
	"enfilade/solver/exact"
	"enfilade/solver/mesh"
	"enfilade/solver/plan"
)

// Kinds are the seeded plans by name, for tests and benchmarks that go through all of them.
var Kinds = []struct {
	Name string
	Make func(seed uint64, walls int) *plan.Plan
}{{"office", Office}, {"clutter", Clutter}, {"comb", Comb}, {"maze", Maze}}

// Eye is the height of a person's eyes in plans that say nothing else, in grid units.
const Eye = 1600 * exact.PerMM

// Ground is a plan made ready for measuring.
type Ground struct {
	Plan    *plan.Plan
	Outline *arrange.Outline
	Graph   *arrange.Graph
	Mesh    *mesh.Mesh
}

// NewGround draws, rounds and triangulates p.
func NewGround(p *plan.Plan) (*Ground, error) {
	g := &Ground{Plan: p}
	g.Outline, _ = arrange.Draw(p)
	g.Graph = arrange.Round(g.Outline)
	var err error
	g.Mesh, err = arrange.Build(context.Background(), g.Graph)
	return g, err
}

// Places draws n places on open floor, strictly inside triangles where one can stand and a person's eye is free, spread
// evenly over the plan's box. The same seed draws the same places.
func (g *Ground) Places(seed uint64, n int) []exact.Pt {
	random := rand.New(rand.NewPCG(seed, 5))
	lo, hi := g.Graph.Pts[0], g.Graph.Pts[0]
	for _, p := range g.Graph.Pts {
		lo = pt(min(lo.X, p.X), min(lo.Y, p.Y))
		hi = pt(max(hi.X, p.X), max(hi.Y, p.Y))
	}
	list := make([]exact.Pt, 0, n)
	for len(list) < n {
		p := pt(lo.X+random.Int32N(hi.X-lo.X), lo.Y+random.Int32N(hi.Y-lo.Y))
		place, ok := g.Mesh.Locate(p)
		if !ok || place.Corner >= 0 || place.Edge != mesh.None {
			continue
		}
		if g.Mesh.Solid[place.Tri] == 0 && g.Mesh.Tris[place.Tri].Flags&mesh.FlagNoWalk == 0 {
			list = append(list, p)
		}
	}
	return list
}
