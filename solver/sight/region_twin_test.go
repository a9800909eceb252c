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

// tangles are the generators of small degenerate plans.
var tangles = map[string]*rapid.Generator[*plan.Plan]{
	"tangles": plantest.Tangles(), "specks": plantest.Specks(), "lines": plantest.Lines(),
}

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

func near(a, b float64) bool { return math.Abs(a-b) <= 1e-9*math.Max(math.Abs(a), math.Abs(b)) }

// TestRegionAgainstTwin holds the fast region against the slow exact one on plans full of degeneracies, from eyes on
// faces, ends, corners and crossings: area, border by kind, and the ring corner by corner.
func TestRegionAgainstTwin(t *testing.T) {
	for name, plans := range tangles {
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

func sameRegion(t *rapid.T, got *sight.Region, want *plantest.Region) {
	l := got.Lengths()
	if !near(got.Area(), want.Area()) || !near(l[sight.Wall], want.WallLength()) || !near(l[sight.Occluding], want.OccludingLength()) {
		t.Errorf("area, wall, occluding: %v %v %v, want %v %v %v", got.Area(), l[sight.Wall], l[sight.Occluding],
			want.Area(), want.WallLength(), want.OccludingLength())
	}
	exactly, _ := want.ExactArea().Float64()
	if !near(exactly, want.Area()) {
		t.Errorf("the twin's area %v, exactly %v", want.Area(), exactly)
	}
	var fast, slow []corner
	for i := range got.Len() {
		x, y := got.Point(i)
		fast = append(fast, corner{x, y, got.Kind(i) == sight.Wall})
	}
	for _, p := range want.Ring() {
		x, y := p.A.Float()
		slow = append(slow, corner{x, y, p.Wall})
	}
	if !sameRing(fast, slow) {
		t.Errorf("ring %v, want %v", fast, slow)
	}
}

// corner is a corner of a ring, and whether the piece that begins there is wall.
type corner struct {
	x, y float64
	wall bool
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
			ok = ok && math.Abs(p.x-q.x) < 1e-6 && math.Abs(p.y-q.y) < 1e-6 && p.wall == q.wall
		}
		if ok {
			return true
		}
	}
	return false
}

// TestSeesAgainstTwin asks both solvers who sees whom, for every pair of a few places.
func TestSeesAgainstTwin(t *testing.T) {
	for name, plans := range tangles {
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
