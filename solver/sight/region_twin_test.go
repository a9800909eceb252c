package sight_test

import (
	"context"
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
)

// graphAndMesh returns the rounded graph of a plan and the mesh over it.
func graphAndMesh(t interface{ Fatal(...any) }, p *plan.Plan) (*arrange.Graph, *mesh.Mesh) {
	o, _ := arrange.Draw(p)
	g := arrange.Round(o)
	m, err := arrange.Build(context.Background(), g)
	if err != nil {
		t.Fatal(err)
	}
	return g, m
}

// places returns every place at which a plan is worth looking from: its marks, the points of its graph and the middles of
// its edges as far as they lie on the grid.
func places(p *plan.Plan, g *arrange.Graph) []exact.Pt {
	var at []exact.Pt
	for _, o := range p.Observers() {
		at = append(at, o.At)
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

// near reports whether two lengths agree to 1e-9 of the larger or to a millionth of a grid unit: a border may be that short
// between points tens of kilometres away.
func near(a, b float64) bool {
	return math.Abs(a-b) <= math.Max(1e-6, 1e-9*math.Max(math.Abs(a), math.Abs(b)))
}

// TestRegionAgainstTwin holds the fast region against the slow exact one on plans full of degeneracies, from eyes on
// faces, ends, corners and crossings: area, border by kind, and the ring corner by corner.
func TestRegionAgainstTwin(t *testing.T) {
	for name, plans := range plantest.Small() {
		t.Run(name, rapid.MakeCheck(func(t *rapid.T) {
			p := plans.Draw(t, "plan")
			t.Log(plantest.Text(p))
			g, m := graphAndMesh(t, p)
			twin, fast := plantest.NewTwin(g), sight.New(m)
			at := places(p, g)
			height := heights.Draw(t, "height")
			for range 4 {
				eye := at[rapid.IntRange(0, len(at)-1).Draw(t, "eye")]
				t.Logf("eye %v, height %v", eye, height)
				got, err := fast.Region(eye, height)
				want := twin.Region(eye, height)
				if (err != nil) != want.Empty() {
					t.Fatalf("fast says %v, the twin's region is empty: %v", err, want.Empty())
				}
				if err == nil {
					sameRegion(t, got, want)
				}
			}
		}))
	}
}

// TestRegionOfPlansAgainstTwin does the same on whole floors of an office, of clutter, a comb and a maze.
func TestRegionOfPlansAgainstTwin(t *testing.T) {
	for seed := range plantest.Seeds(2) {
		for name, p := range map[string]*plan.Plan{
			"office": plantest.Office(seed, 60), "clutter": plantest.Clutter(seed, 60), "comb": plantest.Comb(seed, 40), "maze": plantest.Maze(seed, 60),
		} {
			g, m := graphAndMesh(t, p)
			twin, fast := plantest.NewTwin(g), sight.New(m)
			for _, o := range p.Observers() {
				got, err := fast.Region(o.At, o.Eye)
				want := twin.Region(o.At, o.Eye)
				if (err != nil) != want.Empty() {
					t.Errorf("%s, seed %d, eye %v: %v, the twin's region is empty: %v", name, seed, o.At, err, want.Empty())
				} else if err == nil {
					sameRegion(t, got, want)
				}
				for _, q := range p.Targets() {
					if got, want := fast.Sees(o.At, q.At, o.Eye), want.Holds(q.At); got != want {
						t.Errorf("%s, seed %d: %v sees %v: %v, want %v", name, seed, o.At, q.At, got, want)
					}
				}
			}
		}
	}
}

func sameRegion(t interface{ Errorf(string, ...any) }, got *sight.Region, want *plantest.Region) {
	l, k := got.Lengths(), want.Lengths()
	slack := 1e-6 * (k[0] + k[1] + k[2]) // a millionth of a unit all along the border
	if math.Abs(got.Area()-want.Area()) > math.Max(slack, 1e-9*want.Area()) || !near(l[sight.Wall], k[plantest.OnWall]) ||
		!near(l[sight.Occluding], k[plantest.Occluding]) || !near(l[sight.ClipSide], k[plantest.OnSide]) {
		t.Errorf("area %v, border by kind %v, want %v, %v", got.Area(), l, want.Area(), k)
	}
	var fast, slow []corner
	for i := range got.Len() {
		x, y := got.Point(i)
		fast = append(fast, corner{x, y, kindOf[got.Kind(i)]})
	}
	for _, p := range want.Ring() {
		x, y := p.A.Float()
		slow = append(slow, corner{x, y, p.Kind})
	}
	if !sameRing(fast, slow) {
		t.Errorf("ring %v, want %v", fast, slow)
	}
}

var kindOf = map[sight.Kind]plantest.Kind{sight.Wall: plantest.OnWall, sight.Occluding: plantest.Occluding, sight.ClipSide: plantest.OnSide}

// corner is a corner of a ring, and the kind of the piece that begins there.
type corner struct {
	x, y float64
	kind plantest.Kind
}

// sameRing reports whether two rings run through the same corners, wherever they begin.
func sameRing(a, b []corner) bool {
	if len(a) != len(b) {
		return false
	}
	for shift := range a {
		ok := true
		for i, p := range a {
			q := b[(i+shift)%len(b)]
			ok = ok && same(p.x, q.x) && same(p.y, q.y) && p.kind == q.kind
		}
		if ok {
			return true
		}
	}
	return false
}

// same reports whether two coordinates agree to a millionth of a grid unit, and to what measuring takes far out.
func same(a, b float64) bool { return math.Abs(a-b) <= 1e-6+1e-13*math.Max(math.Abs(a), math.Abs(b)) }

// views draws a view by angles, or the front of one of the graph's edges, at whose middle or ends the eye may well stand.
func views(t *rapid.T, g *arrange.Graph) sight.Clip {
	if rapid.Bool().Draw(t, "front") {
		e := g.Edges[rapid.IntRange(0, len(g.Edges)-1).Draw(t, "edge")]
		a, b := g.Pts[e.A], g.Pts[e.B]
		if rapid.Bool().Draw(t, "back") {
			a, b = b, a
		}
		return sight.Front(a, b)
	}
	heading := 15 * rapid.IntRange(0, 23).Draw(t, "heading")
	return sight.View(float64(heading), float64(rapid.SampledFrom([]int{1, 30, 45, 90, 180, 270, 359}).Draw(t, "view")))
}

// TestClippedAgainstTwin holds regions within a view, and sight within it, against the twin.
func TestClippedAgainstTwin(t *testing.T) {
	for name, plans := range plantest.Small() {
		t.Run(name, rapid.MakeCheck(func(t *rapid.T) {
			p := plans.Draw(t, "plan")
			t.Log(plantest.Text(p))
			g, m := graphAndMesh(t, p)
			twin, fast := plantest.NewTwin(g), sight.New(m)
			at := places(p, g)
			height := heights.Draw(t, "height")
			for range 4 {
				eye := at[rapid.IntRange(0, len(at)-1).Draw(t, "eye")]
				c := views(t, g)
				t.Logf("eye %v, height %v, view %+v", eye, height, c)
				want := twin.RegionWithin(eye, height, &plantest.View{Right: c.Right, Mid: c.Mid, Left: c.Left})
				got, err := fast.Clipped(eye, height, c)
				if (err != nil) != want.Empty() {
					t.Fatalf("fast says %v, the twin's region is empty: %v", err, want.Empty())
				}
				if err != nil {
					continue
				}
				sameRegion(t, got, want)
				for _, b := range at {
					if got, want := fast.SeesWithin(eye, b, height, c), want.Holds(b); got != want {
						t.Errorf("%v sees %v: %v, want %v", eye, b, got, want)
					}
				}
			}
		}))
	}
}

// TestSeesAgainstTwin asks both solvers who sees whom, for every pair of a few places.
func TestSeesAgainstTwin(t *testing.T) {
	for name, plans := range plantest.Small() {
		t.Run(name, rapid.MakeCheck(func(t *rapid.T) {
			p := plans.Draw(t, "plan")
			t.Log(plantest.Text(p))
			g, m := graphAndMesh(t, p)
			twin, fast := plantest.NewTwin(g), sight.New(m)
			at := places(p, g)
			height := heights.Draw(t, "height")
			var some []exact.Pt
			for range 5 {
				some = append(some, at[rapid.IntRange(0, len(at)-1).Draw(t, "place")])
			}
			for _, a := range some {
				r := twin.Region(a, height)
				for _, b := range some {
					got, want := fast.Sees(a, b, height), r.Holds(b)
					if got != want {
						t.Errorf("height %v: %v sees %v: %v, want %v", height, a, b, got, want)
					}
					if back := twin.Sees(b, a, height); back != want {
						t.Errorf("height %v: %v sees %v: %v, but the other way %v", height, a, b, want, back)
					}
				}
			}
		}))
	}
}
