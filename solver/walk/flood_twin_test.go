package walk_test

import (
	"context"
	"errors"
	"math"
	"slices"
	"testing"

	"pgregory.net/rapid"

	"enfilade/solver/arrange"
	"enfilade/solver/exact"
	"enfilade/solver/mesh"
	"enfilade/solver/plan"
	"enfilade/solver/plantest"
	"enfilade/solver/sight"
	"enfilade/solver/walk"
)

// tester is what the checks need of *testing.T and *rapid.T.
type tester interface {
	Errorf(string, ...any)
	Fatal(...any)
}

func graphAndMesh(t interface{ Fatal(...any) }, p *plan.Plan) (*arrange.Graph, *mesh.Mesh) {
	o, _ := arrange.Draw(p)
	g := arrange.Round(o)
	m, err := arrange.Build(context.Background(), g)
	if err != nil {
		t.Fatal(err)
	}
	return g, m
}

// places returns every place worth walking from or to: marks, points of the graph, and middles of edges on the grid.
func places(p *plan.Plan, g *arrange.Graph) []exact.Pt {
	var at []exact.Pt
	for _, s := range p.Starts() {
		at = append(at, s.At)
	}
	for _, t := range p.Targets() {
		at = append(at, t.At)
	}
	at = append(at, g.Pts...)
	for _, e := range g.Edges {
		a, b := g.Pts[e.A], g.Pts[e.B]
		if (a.X+b.X)%2 == 0 && (a.Y+b.Y)%2 == 0 {
			at = append(at, exact.Pt{X: (a.X + b.X) / 2, Y: (a.Y + b.Y) / 2})
		}
	}
	slices.SortFunc(at, exact.Pt.Compare)
	return slices.Compact(at)
}

var heights = rapid.SampledFrom([]int32{16000, 9000, 17000, 19000})

// near reports whether two lengths agree to 1e-9 of the larger or to a millionth of a grid unit: an end may lie that near
// to its root, on a line given by points thousands of units away.
func near(a, b float64) bool {
	return a == b || math.Abs(a-b) <= math.Max(1e-6, 1e-9*math.Max(math.Abs(a), math.Abs(b)))
}

// TestFloodAgainstTwin holds full walks and approaches against the slow exact ones on plans full of degeneracies, from and
// to faces, ends, corners and crossings.
func TestFloodAgainstTwin(t *testing.T) {
	for name, plans := range plantest.Small() {
		t.Run(name, rapid.MakeCheck(func(t *rapid.T) {
			p := plans.Draw(t, "plan")
			t.Log(plantest.Text(p))
			g, m := graphAndMesh(t, p)
			twin := plantest.NewTwin(g)
			at := places(p, g)
			height := heights.Draw(t, "height")
			pick := rapid.IntRange(0, len(at)-1)
			start, one, two := at[pick.Draw(t, "start")], at[pick.Draw(t, "one")], at[pick.Draw(t, "two")]
			sameWalks(t, m, twin, start, []exact.Pt{one, two}, height)
		}))
	}
}

// TestFloodOfBodiesAgainstTwin does the same for walkers with a body, on the ground grown by their radius.
func TestFloodOfBodiesAgainstTwin(t *testing.T) {
	for _, name := range []string{"tangles", "specks"} {
		t.Run(name, rapid.MakeCheck(func(t *rapid.T) {
			p := plantest.Small()[name].Draw(t, "plan")
			t.Log(plantest.Text(p))
			o, _ := arrange.Draw(p)
			_, plain := graphAndMesh(t, p)
			radius := rapid.SampledFrom([]int32{1, 2, 300, 500, 1000, 1500}).Draw(t, "radius")
			sides := rapid.SampledFrom([]int{arrange.FineSides, arrange.CoarseSides}).Draw(t, "sides")
			g := arrange.Round(arrange.Grow(o, plain, radius, sides))
			if len(g.Edges) > 120 {
				t.Skip("too large for the twin")
			}
			m, err := arrange.Build(context.Background(), g)
			if err != nil {
				t.Fatal(err)
			}
			at := places(p, g)
			pick := rapid.IntRange(0, len(at)-1)
			start, one, two := at[pick.Draw(t, "start")], at[pick.Draw(t, "one")], at[pick.Draw(t, "two")]
			sameWalks(t, m, plantest.NewTwin(g), start, []exact.Pt{one, two}, heights.Draw(t, "height"))
		}))
	}
}

// TestFloodToFrontsAgainstTwin walks to where the front of an edge is first seen from, its eye at either end or the middle.
func TestFloodToFrontsAgainstTwin(t *testing.T) {
	for name, plans := range plantest.Small() {
		t.Run(name, rapid.MakeCheck(func(t *rapid.T) {
			p := plans.Draw(t, "plan")
			t.Log(plantest.Text(p))
			g, m := graphAndMesh(t, p)
			twin := plantest.NewTwin(g)
			at := places(p, g)
			height := heights.Draw(t, "height")
			e := g.Edges[rapid.IntRange(0, len(g.Edges)-1).Draw(t, "edge")]
			a, b := g.Pts[e.A], g.Pts[e.B]
			if rapid.Bool().Draw(t, "back") {
				a, b = b, a
			}
			eye := rapid.SampledFrom([]exact.Pt{a, b, {X: (a.X + b.X) / 2, Y: (a.Y + b.Y) / 2}}).Draw(t, "eye")
			c := sight.Front(a, b)
			cones, err := sight.New(m).Cones(eye, height, c)
			r := twin.RegionWithin(eye, height, &plantest.View{Right: c.Right, Mid: c.Mid, Left: c.Left})
			if (err != nil) != r.Empty() {
				t.Fatalf("front %v %v from %v: %v, the twin's region is empty: %v", a, b, eye, err, r.Empty())
			}
			if err != nil {
				return
			}
			start := at[rapid.IntRange(0, len(at)-1).Draw(t, "start")]
			t.Logf("front %v %v", a, b)
			paths, err := walk.New(m).Flood(context.Background(), start, []walk.Goal{{Eye: eye, Cones: cones}})
			if err != nil {
				if !errors.Is(err, walk.ErrInside) {
					t.Fatal(err)
				}
				paths = make([]walk.Path, 1)
			}
			want := twin.ApproachTo(start, r)
			samePath(t, "approach to a front", start, eye, height, paths[0], want.Walk, !want.Other)
		}))
	}
}

// TestFloodOfPlansAgainstTwin does the same on whole floors of an office, of clutter and a maze.
func TestFloodOfPlansAgainstTwin(t *testing.T) {
	for seed := range plantest.Seeds(1) {
		for name, p := range map[string]*plan.Plan{
			"office": plantest.Office(seed, 20), "clutter": plantest.Clutter(seed, 25), "maze": plantest.Maze(seed, 30),
		} {
			g, m := graphAndMesh(t, p)
			twin := plantest.NewTwin(g)
			var targets []exact.Pt
			for _, q := range p.Targets() {
				targets = append(targets, q.At)
			}
			for _, s := range p.Parts().Starts[:3] {
				t.Logf("%s, seed %d", name, seed)
				sameWalks(t, m, twin, s.At, targets, eye)
			}
		}
	}
}

// sameWalks floods once from start for the approaches and the full walks to all targets, and compares each with the twin.
func sameWalks(t tester, m *mesh.Mesh, twin *plantest.Twin, start exact.Pt, targets []exact.Pt, height int32) {
	var goals []walk.Goal
	eyes := sight.New(m)
	for _, at := range targets {
		cones, err := eyes.Cones(at, height, sight.Clip{})
		if err != nil || cones == nil {
			cones = []sight.Cone{} // nothing sees it; nil would ask for the point
		}
		goals = append(goals, walk.Goal{Eye: at, Cones: slices.Clone(cones)}, walk.Goal{Spot: walk.At(at)})
	}
	paths, err := walk.New(m).Flood(context.Background(), start, goals)
	if err != nil && !errors.Is(err, walk.ErrInside) {
		t.Fatal(err)
	}
	if err != nil {
		paths = make([]walk.Path, len(goals))
	}
	for i, at := range targets {
		a := twin.Approach(start, at, height)
		samePath(t, "approach", start, at, height, paths[2*i], a.Walk, !a.Other)
		w := twin.Walk(start, at)
		samePath(t, "walk", start, at, height, paths[2*i+1], w, true)
	}
}

func samePath(t tester, what string, from, to exact.Pt, height int32, got walk.Path, want plantest.Walk, sameEnd bool) {
	length := math.Inf(1)
	if got.Found {
		length = got.Length
	}
	if !near(length, want.Length) {
		t.Errorf("%s from %v to %v at height %v: %v over %v to %v, want %v over %v", what, from, to, height, length, got.Turns,
			got.End, want.Length, floats(want.Points))
		return
	}
	if !got.Found {
		return
	}
	if got.Turns[0] != from {
		t.Errorf("%s from %v to %v begins at %v", what, from, to, got.Turns[0])
	}
	sum, last := 0.0, [2]float64{float64(from.X), float64(from.Y)}
	for _, p := range append(floatsOf(got.Turns[1:]), got.End) {
		sum += math.Hypot(p[0]-last[0], p[1]-last[1])
		last = p
	}
	if !near(sum, got.Length) {
		t.Errorf("%s from %v to %v: says %v, its points make %v", what, from, to, got.Length, sum)
	}
	// Square to a border 27 km away, ends a thousandth of a unit apart are equally far to the last bit.
	if end := floats(want.Points[len(want.Points)-1:])[0]; sameEnd && !got.Ties && math.Hypot(end[0]-last[0], end[1]-last[1]) > 1.0/512 {
		t.Errorf("%s from %v to %v at height %v ends at %v, want %v", what, from, to, height, last, end)
	}
}

func floats(spots []plantest.Spot) [][2]float64 {
	var list [][2]float64
	for _, s := range spots {
		x, y := s.Float()
		list = append(list, [2]float64{x, y})
	}
	return list
}

func floatsOf(pts []exact.Pt) [][2]float64 {
	var list [][2]float64
	for _, p := range pts {
		list = append(list, [2]float64{float64(p.X), float64(p.Y)})
	}
	return list
}

// TestFloodTurnsBack walks along one side of a thin wall to its end and back along the other.
func TestFloodTurnsBack(t *testing.T) {
	m := build(t, "floor 0,0 10,0 10,10 0,10; wall 2,0 2,4 6,4; wall 3.5,0 3.5,2")
	a, _ := both(t, m, at(1, 1), at(3, 1))
	want := []exact.Pt{at(1, 1), at(2, 4), at(6, 4)}
	if !near(a.Length, 10000*(math.Sqrt(10)+5.5)) || !slices.Equal(a.Turns, want) || !near(a.End[0], 45000) || !near(a.End[1], 40000) {
		t.Errorf("%v over %v to %v", a.Length, a.Turns, a.End)
	}
}

// TestFloodTiedTurns reaches a corner by two equally long ways, of which one goes straight on there and the other turns: the
// walk that is told must be one of the two.
func TestFloodTiedTurns(t *testing.T) {
	m := build(t, "wall 7,6 0,2; glass 7,1 7,5; block 7,1 8,1 8,5 7,5; floor -5,-5 15,-5 15,15 -5,15")
	_, full := both(t, m, at(8, 0), at(5, 8))
	if want := 10000 * (5 + 3*math.Sqrt2); !near(full.Length, want) || len(full.Turns) < 2 || !full.Ties {
		t.Errorf("%v over %v, ties %v, want %v", full.Length, full.Turns, full.Ties, want)
	}
}
