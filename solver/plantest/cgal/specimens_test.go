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
	"enfilade/solver/plantest/cgal"
)

// specimen is one plan to compare on, as both sides get it.
type specimen struct {
	name    string
	walls   int
	plan    *plan.Plan
	outline *arrange.Outline
	graph   *arrange.Graph
	mesh    *mesh.Mesh
	*rand.Rand
}

// ladder is how many seeded plans there are of each size. Most are small: they are quick, and a wrong turn shows in them as
// well; a few are large enough for what only happens in the middle of thousands of walls.
var ladder = []struct{ from, to, plans int }{
	{20, 60, 250}, {60, 150, 200}, {150, 400, 40}, {1000, 1000, 8}, {2000, 2000, 4}, {5000, 5000, 4},
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

// shards is how many copies of CGAL are asked at once.
const shards = 2

// sharded calls ask in parallel for each shard of the plans, with a copy of CGAL of its own, and adds up what was compared.
func sharded(t *testing.T, what string, ask func(t *testing.T, r *cgal.Reference, shard uint64, c *tally)) (sum tally) {
	t.Helper()
	parts := make([]tally, shards)
	t.Run(what, func(t *testing.T) {
		for shard := range parts {
			t.Run(strconv.Itoa(shard), func(t *testing.T) {
				t.Parallel()
				ask(t, cgal.Start(t), uint64(shard), &parts[shard])
			})
		}
	})
	for _, p := range parts {
		sum.plans, sum.questions, sum.walls = sum.plans+p.plans, sum.questions+p.questions, sum.walls+p.walls
		sum.glazing, sum.screens = sum.glazing+p.glazing, sum.screens+p.screens
	}
	t.Logf("%d plans of %d walls in all, with %d pieces of glazing and %d of screens: %d %s agree with CGAL",
		sum.plans, sum.walls, sum.glazing, sum.screens, sum.questions, what)
	if sum.glazing < sum.plans/4 || sum.screens < sum.plans/4 {
		t.Errorf("only %d pieces of glazing and %d of screens in %d plans", sum.glazing, sum.screens, sum.plans)
	}
	return sum
}

// mine shares seeds out evenly within each of the four kinds.
func mine(seed, shard uint64) bool { return (seed^seed>>2)%shards == shard }

// eachSpecimen calls f for every seeded plan of a shard with at most the given number of walls, largest last.
func eachSpecimen(t *testing.T, shard uint64, most int, f func(s *specimen)) {
	t.Helper()
	seed := batch(t) * 1000
	for _, step := range ladder {
		for range step.plans {
			seed++
			kind := plantest.Kinds[seed%uint64(len(plantest.Kinds))]
			random := rand.New(rand.NewPCG(seed, 77))
			walls := step.from + random.IntN(step.to-step.from+1)
			if walls > most || !mine(seed, shard) {
				continue
			}
			name := fmt.Sprintf("%s seed %d, %d walls", kind.Name, seed, walls)
			f(newSpecimen(t, name, walls, kind.Make(seed, walls), random))
		}
	}
}

// eachTangle calls f for the shard's part of count small plans full of degeneracies.
func eachTangle(t *testing.T, shard uint64, count int, f func(s *specimen)) {
	t.Helper()
	first := int(batch(t)) * count
	for seed := first; seed < first+count; seed++ {
		if !mine(uint64(seed), shard) {
			continue
		}
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
	s := &specimen{name: name, walls: walls, plan: p, outline: outline, Rand: random}
	s.lay(t, outline)
	return s
}

// lay rounds and triangulates an outline.
func (s *specimen) lay(t *testing.T, o *arrange.Outline) {
	t.Helper()
	s.graph = arrange.Round(o)
	var err error
	if s.mesh, err = arrange.Build(t.Context(), s.graph); err != nil {
		t.Fatalf("%s: %v", s.name, err)
	}
}

// grow makes the floor narrower by the radius of a walker's body. CGAL gets the grown obstacles as one more polygon that
// stops walking: all of its outline does, where Grow leaves that to the triangles on its inside.
func (s *specimen) grow(t *testing.T, radius int32) {
	t.Helper()
	sides := []int{arrange.FineSides, arrange.CoarseSides}[s.IntN(2)]
	s.name = fmt.Sprintf("%s, radius %d, %d sides", s.name, radius, sides)
	s.lay(t, arrange.Grow(s.outline, s.mesh, radius, sides))
	for i, e := range s.graph.Edges {
		for _, w := range s.graph.Winds[e.Wind0:e.Wind1] {
			if int(w.Body) == len(s.graph.Bodies)-1 {
				s.graph.Edges[i].Walk = true
			}
		}
	}
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

func (s *specimen) starts() (at []exact.Pt) {
	for _, x := range s.plan.Starts() {
		at = append(at, x.At)
	}
	return at
}

func (s *specimen) targets() (at []exact.Pt) {
	for _, x := range s.plan.Targets() {
		at = append(at, x.At)
	}
	return at
}

func (s *specimen) observers() (at []exact.Pt) {
	for _, x := range s.plan.Observers() {
		at = append(at, x.At)
	}
	return at
}

// radius draws the radius of a body that has to squeeze through a tangle, which is a metre wide, or a few grid units.
func (s *specimen) radius() int32 { return []int32{1, 2, 300, 500, 1000, 1500}[s.IntN(6)] }

// agree holds two measures against each other to nine digits: both sides decide exactly and then measure in float64.
func agree(got, want float64) bool {
	return got == want || math.Abs(got-want) <= 1e-9*math.Abs(want)
}

// tally counts what has been compared.
type tally struct {
	plans, questions, walls int
	glazing, screens        int // edges
}

// add counts a plan.
func (c *tally) add(s *specimen) {
	c.plans++
	c.walls += s.walls
	for _, e := range s.graph.Edges {
		switch {
		case e.Walk && e.Top == 0 && e.Wind0 == e.Wind1:
			c.glazing++
		case !e.Walk && e.Top > 0:
			c.screens++
		}
	}
}
