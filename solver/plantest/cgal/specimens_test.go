package cgal_test

import (
	"fmt"
	"math"
	"math/rand/v2"
	"os"
	"strconv"
	"testing"

	"enfilade/solver/arrange"
	"enfilade/solver/exact"
	"enfilade/solver/mesh"
	"enfilade/solver/plan"
	"enfilade/solver/plantest"
)

// specimen is one plan to compare on, as both sides get it.
type specimen struct {
	name  string
	walls int
	plan  *plan.Plan
	graph *arrange.Graph
	mesh  *mesh.Mesh
	*rand.Rand
}

// ladder is how many seeded plans there are of each size. Most are small: they are quick, and a wrong turn shows in them as
// well; a few are large enough for what only happens in the middle of thousands of walls.
var ladder = []struct{ from, to, plans int }{
	{20, 60, 240}, {60, 150, 200}, {150, 400, 60}, {1000, 1000, 12}, {2000, 2000, 8}, {5000, 5000, 4},
}

// batch shifts the seeds, to look further than the tests do by themselves: CGAL_BATCH=7 go test ./solver/plantest/cgal.
func batch(t *testing.T) uint64 {
	t.Helper()
	text := os.Getenv("CGAL_BATCH")
	if text == "" {
		return 0
	}
	n, err := strconv.ParseUint(text, 10, 32)
	if err != nil {
		t.Fatalf("CGAL_BATCH: %v", err)
	}
	return n
}

// eachSpecimen calls f for every seeded plan, largest last.
func eachSpecimen(t *testing.T, f func(s *specimen)) {
	t.Helper()
	seed := batch(t) * 1000
	for _, step := range ladder {
		for range step.plans {
			seed++
			kind := plantest.Kinds[seed%uint64(len(plantest.Kinds))]
			random := rand.New(rand.NewPCG(seed, 77))
			walls := step.from + random.IntN(step.to-step.from+1)
			name := fmt.Sprintf("%s seed %d, %d walls", kind.Name, seed, walls)
			f(newSpecimen(t, name, walls, kind.Make(seed, walls), random))
		}
	}
}

// eachTangle calls f for small plans full of degeneracies.
func eachTangle(t *testing.T, count int, f func(s *specimen)) {
	t.Helper()
	first := int(batch(t)) * count
	for seed := first; seed < first+count; seed++ {
		gen, name := plantest.Tangles(), "tangle"
		if seed%4 == 3 {
			gen, name = plantest.Specks(), "speck"
		}
		p := gen.Example(seed)
		f(newSpecimen(t, fmt.Sprintf("%s %d", name, seed), p.NumWalls(), p, rand.New(rand.NewPCG(uint64(seed), 78))))
	}
}

func newSpecimen(t *testing.T, name string, walls int, p *plan.Plan, random *rand.Rand) *specimen {
	t.Helper()
	outline, _ := arrange.Draw(p)
	s := &specimen{name: name, walls: walls, plan: p, graph: arrange.Round(outline), Rand: random}
	var err error
	if s.mesh, err = arrange.Build(t.Context(), s.graph); err != nil {
		t.Fatalf("%s: %v", name, err)
	}
	return s
}

// onWalls draws n places on walls: points of the graph and, where there is one on the grid, middles of its edges.
func (s *specimen) onWalls(n int) []exact.Pt {
	var list []exact.Pt
	for range n {
		e := s.graph.Edges[s.IntN(len(s.graph.Edges))]
		a, b := s.graph.Pts[e.A], s.graph.Pts[e.B]
		if x, y := a.X+b.X, a.Y+b.Y; x%2 == 0 && y%2 == 0 && s.IntN(2) == 0 {
			a = exact.Pt{X: x / 2, Y: y / 2}
		}
		list = append(list, a)
	}
	return list
}

// agree holds two measures against each other to nine digits: both sides decide exactly and then measure in float64.
func agree(got, want float64) bool {
	return got == want || math.Abs(got-want) <= 1e-9*math.Abs(want)
}

// tally counts what has been compared.
type tally struct {
	plans, questions, walls int
}

func (c *tally) log(t *testing.T, what string) {
	t.Logf("%d plans of %d walls in all: %d %s agree with CGAL", c.plans, c.walls, c.questions, what)
}
