package plantest_test

import (
	"math"
	"math/rand/v2"
	"testing"

	"enfilade/solver/arrange"
	"enfilade/solver/exact"
	"enfilade/solver/plan"
	"enfilade/solver/plantest"
)

const eye = 1600 * exact.PerMM

func twinOf(t testing.TB, p *plan.Plan) *plantest.Twin {
	t.Helper()
	o, problems := arrange.Draw(p)
	for _, q := range problems {
		t.Errorf("%v: %s", q.Items, q.Text)
	}
	g := plantest.Rounded(o)
	if err := plantest.CheckGraph(g); err != nil {
		t.Fatal(err)
	}
	return plantest.NewTwin(g)
}

// near reports whether two figures agree to 1e-9 of the larger.
func near(a, b float64) bool {
	return a == b || math.Abs(a-b) <= 1e-9*math.Max(math.Abs(a), math.Abs(b))
}

const (
	shapeL   = "floor 0,0 6,0 6,2 2,2 2,6 0,6;"
	shapeS10 = "floor 0,0 10,0 10,10 0,10;"
	pillar   = "block 4,4 6,4 6,6 4,6;"
	shapeU   = "floor 0,0 10,0 10,10 8,10 8,2 2,2 2,10 0,10;"
	rooms    = "floor 0,0 12,0 12,4 0,4; wall 6,0 6,4; door W1 at=1.5 w=1 leaf=solid"
)

// The twin itself against figures worked out by hand; areas in m², lengths in m.
func TestTwinRegionByHand(t *testing.T) {
	for _, c := range []struct {
		name, plan            string
		area, wall, occluding float64
	}{
		{"unit square", "floor 0,0 1,0 1,1 0,1; observer 0.5,0.5", 1, 4, 0},
		{"rectangle", "floor 0,0 8,0 8,5 0,5; observer 2,1", 40, 26, 0},
		{"L from its bend", shapeL + "observer 1,1", 20, 24, 0},
		{"L from an arm", shapeL + "observer 5,1", 38. / 3, 44. / 3, 2 * math.Sqrt(10) / 3},
		{"pillar", shapeS10 + pillar + "observer 5,1", 76, 36, 4 * math.Sqrt(10)},
		{"thin screen", "floor -4,-4 4,-4 4,4 -4,4; screen 2,-1 2,1; observer 0,0", 58, 30, 2 * math.Sqrt(5)},
		{"door open", rooms + "; observer 3,2", 36, 22, 2 * math.Sqrt(37)},
		{"door shut", rooms + " shut; observer 3,2", 24, 20, 0},
		{"eye in the doorway", rooms + "; observer 6,2", 48, 32, 0},
		{"thin wall edge-on", "floor 0,0 8,0 8,4 0,4; wall 4,2 6,2; observer 1,2", 32, 24, 0},
		{"eye on a thin wall", "floor 0,0 8,0 8,4 0,4; wall 4,0 4,4; observer 4,2", 32, 24, 0},
		{"eye on a wall end", "floor 0,0 8,0 8,4 0,4; wall 4,2 4,4; observer 4,2", 32, 24, 0},
		{"eye on a corner", shapeL + "observer 2,2", 20, 24, 0},
		{"eye on a block's face", shapeS10 + pillar + "observer 5,4", 40, 20, 8},
		{"glazing and a low wall", "floor 0,0 8,0 8,4 0,4; glass 4,0 4,4; low 6,0 6,4 h=1.5; observer 1,2", 32, 24, 0},
		{"a low wall as high as the eye", "floor 0,0 8,0 8,4 0,4; low 6,0 6,4 h=1.6; observer 1,2", 24, 20, 0},
	} {
		p := plantest.Parse(t, c.plan)
		o, _ := p.Observer("O1")
		r := twinOf(t, p).Region(o.At, o.Eye)
		const m2 = 1e8
		if got := r.Area() / m2; !near(got, c.area) {
			t.Errorf("%s: area %v, want %v", c.name, got, c.area)
		}
		if got, _ := r.ExactArea().Float64(); !near(got, r.Area()) {
			t.Errorf("%s: exact area %v beside %v", c.name, got, r.Area())
		}
		if got := r.Lengths()[plantest.OnWall] / 1e4; !near(got, c.wall) {
			t.Errorf("%s: wall %v, want %v", c.name, got, c.wall)
		}
		if got := r.Lengths()[plantest.Occluding] / 1e4; !near(got, c.occluding) {
			t.Errorf("%s: occluding %v, want %v", c.name, got, c.occluding)
		}
	}
}

func TestTwinWalkByHand(t *testing.T) {
	for _, c := range []struct {
		name, plan string
		full       float64
	}{
		{"straight", shapeL + "start 5,1; target 1,1", 4},
		{"round the bend", shapeL + "start 5,1; target 1,5", 2 * math.Sqrt(10)},
		{"round a pillar", shapeS10 + pillar + "start 5,1; target 5,9", 2 + 2*math.Sqrt(10)},
		{"round glazing", shapeS10 + "glass 5,0 5,8; start 4,1; target 6,1", 10 * math.Sqrt2},
		{"through a screen", shapeS10 + "screen 5,0 5,10; start 4,1; target 6,1", 2},
		{"shut out", rooms + " shut; start 1,1; target 7,1", math.Inf(1)},
		{"two walls that touch at a point", shapeS10 + "wall 5,0 5,5; wall 5,5 5,10; start 4,5; target 6,5", math.Inf(1)},
		{"two blocks that touch at a corner", shapeS10 + "block 0,0 5,0 5,5 0,5; block 5,5 10,5 10,10 5,10; start 4,6; target 6,4", math.Inf(1)},
		{"along a wall to its back", shapeS10 + "wall 2,5 8,5; start 2,5; target 5,5", 3},
		{"from one side to the other", shapeS10 + "wall 5,0 5,8; start 5,4; target 6,4", 1},
	} {
		p := plantest.Parse(t, c.plan)
		s, _ := p.Start("S1")
		g, _ := p.Target("T1")
		if got := twinOf(t, p).Walk(s.At, g.At); !near(got.Length/1e4, c.full) {
			t.Errorf("%s: %v, want %v", c.name, got.Length/1e4, c.full)
		}
	}
}

func TestTwinApproachByHand(t *testing.T) {
	for _, c := range []struct {
		name, plan   string
		length, x, y float64
	}{
		{"square to the edge", shapeL + "start 5,1; target 1,5", 8 / math.Sqrt(10), 2.6, 0.2},
		{"to the edge's end", shapeL + "start 6,0.5; target 1,5", math.Sqrt(409) / 6, 8. / 3, 0},
		{"round a corner", shapeU + "start 9,8; target 1,8", 73 / math.Sqrt(37), 80. / 37, 38. / 37},
		{"seen at once", shapeS10 + "glass 5,0 5,8; start 4,1; target 6,1", 0, 4, 1},
		{"in through a screen", shapeS10 + "screen 5,0 5,10; start 3,1; target 6,1", 2, 5, 1},
		{"a wall's back is not its front", shapeS10 + "wall 5,0 5,8; start 4,1; target 6,1", math.Hypot(1, 7), 5, 8},
		{"a start on the wall stands in front", shapeS10 + "wall 5,0 5,8; start 5,1; target 6,1", 0, 5, 1},
		{"never", shapeS10 + "glass 5,0 5,10; screen 6,0 6,10; start 4,1; target 7,1", math.Inf(1), 0, 0},
	} {
		p := plantest.Parse(t, c.plan)
		s, _ := p.Start("S1")
		g, _ := p.Target("T1")
		a := twinOf(t, p).Approach(s.At, g.At, eye)
		if !near(a.Length/1e4, c.length) {
			t.Errorf("%s: %v, want %v", c.name, a.Length/1e4, c.length)
		}
		if math.IsInf(c.length, 1) || len(a.Points) == 0 {
			continue
		}
		if x, y := a.Points[len(a.Points)-1].Float(); !near(x/1e4, c.x) || !near(y/1e4, c.y) {
			t.Errorf("%s: ends at %v, %v, want %v, %v", c.name, x/1e4, y/1e4, c.x, c.y)
		}
	}
}

// TestTwinRegionBySampling tries random points one by one: a point that is in line with no corner is seen exactly when no
// edge that stops sight crosses the line to it and it is in nothing solid itself.
func TestTwinRegionBySampling(t *testing.T) {
	for name, plans := range plantest.Small() {
		seen, hidden := 0, 0
		for seed := range 40 {
			p := plans.Example(seed)
			o, _ := arrange.Draw(p)
			g := plantest.Rounded(o)
			w := plantest.NewTwin(g)
			at := p.Parts().Observers[0].At
			r := w.Region(at, eye)
			rng := rand.New(rand.NewPCG(uint64(seed), 1))
			lo, hi := g.Pts[0], g.Pts[len(g.Pts)-1]
			for range 60 {
				q := exact.Pt{X: lo.X + rng.Int32N(hi.X-lo.X+1), Y: lo.Y + rng.Int32N(hi.X-lo.X+1)}
				sees, sure := sampled(g, w, at, q)
				if !sure {
					continue
				}
				if r.Holds(q) != sees {
					t.Errorf("%s: %v sees %v: %v, want %v in\n%s", name, at, q, !sees, sees, plantest.Text(p))
				}
				if sees {
					seen++
				} else {
					hidden++
				}
			}
		}
		if seen < 100 || hidden < 100 {
			t.Errorf("%s: %d points seen, %d hidden: too few to tell", name, seen, hidden)
		}
	}
}

// sampled looks along one line; it is not sure when a corner lies on it.
func sampled(g *arrange.Graph, w *plantest.Twin, at, q exact.Pt) (sees, sure bool) {
	for _, v := range g.Pts {
		if v == q || v != at && exact.OnSegment(at, q, v) {
			return false, false
		}
	}
	for i, e := range g.Edges {
		a, b := g.Pts[e.A], g.Pts[e.B]
		if exact.OnSegment(a, b, q) {
			return false, false
		}
		if exact.Orient(a, b, at)*exact.Orient(a, b, q) < 0 && exact.Orient(at, q, a)*exact.Orient(at, q, b) < 0 && w.StopsSight(i, eye) {
			return false, true
		}
	}
	return w.Free(q, eye), true
}
