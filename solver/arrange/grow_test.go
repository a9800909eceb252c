package arrange_test

import (
	"context"
	"math"
	"math/rand/v2"
	"slices"
	"testing"

	"enfilade/solver/arrange"
	"enfilade/solver/exact"
	"enfilade/solver/mesh"
	"enfilade/solver/plantest"
)

func TestDisc(t *testing.T) {
	for _, sides := range allSides {
		testDisc(t, sides)
	}
}

// allSides are the numbers of sides that a walker's polygon may have.
var allSides = []int{arrange.FineSides, arrange.CoarseSides}

func testDisc(t *testing.T, sides int) {
	for _, r := range []int32{1, 7, 3000, 3001, 4567, arrange.MaxRadius} {
		ring, excess := arrange.Disc(r, sides)
		if len(ring) != sides || sides < 16 {
			t.Fatalf("radius %d: %d sides", r, len(ring))
		}
		far := 0.0
		for i, a := range ring {
			b := ring[(i+1)%len(ring)]
			// Distance of the side from the origin, and the turns that map the ring on itself.
			if d := float64(a.Cross(b)) / math.Hypot(float64(b.X-a.X), float64(b.Y-a.Y)); d < float64(r)+2-1e-6 {
				t.Errorf("radius %d: side %d passes at %v", r, i, d)
			}
			if q := ring[(i+len(ring)/4)%len(ring)]; q != a.Left() {
				t.Errorf("radius %d: corner %d does not turn into %v", r, i, q)
			}
			if !slices.Contains(ring, exact.Vec{X: a.X, Y: -a.Y}) {
				t.Errorf("radius %d: corner %d has no mirror image", r, i)
			}
			if c := a.Cross(ring[(i+1)%sides]); c <= 0 {
				t.Errorf("radius %d: the ring does not run on at corner %d", r, i)
			}
			far = max(far, math.Hypot(float64(a.X), float64(a.Y)))
		}
		most := 1/math.Cos(math.Pi/float64(sides)) - 1
		if math.Abs(far-float64(r)-excess) > 1e-6 || excess > 1.1*most*float64(r)+6 {
			t.Errorf("radius %d: excess %v, farthest corner at %v", r, excess, far)
		}
	}
}

// grown builds the meshes of a plan for a point and for a body of the given radius.
func grown(t testing.TB, text string, radius int32, sides int) (plain, wide *mesh.Mesh) {
	t.Helper()
	o, _ := arrange.Draw(plantest.Parse(t, text))
	plain, err := arrange.Build(context.Background(), arrange.Round(o))
	if err != nil {
		t.Fatal(err)
	}
	wide, err = arrange.Build(context.Background(), arrange.Round(arrange.Grow(o, plain, radius, sides)))
	if err != nil {
		t.Fatal(err)
	}
	return plain, wide
}

func closed(m *mesh.Mesh, p exact.Pt) bool {
	place, ok := m.Locate(p)
	return !ok || m.Tris[place.Tri].Flags&mesh.FlagNoWalk != 0
}

// openArea returns the area of the triangles on which one can stand, in square metres.
func openArea(m *mesh.Mesh) float64 {
	sum := int64(0)
	for i := range m.Tris {
		if p := m.Tris[i].P; m.Tris[i].Flags&mesh.FlagNoWalk == 0 {
			sum += exact.Area2(p[0], p[1], p[2])
		}
	}
	return float64(sum) / 2 / 1e8
}

// TestGrowK17 holds the area of a grown square pillar against Steiner's formula A + P r + pi r^2 (Steiner 1840): a square
// of 2 m grown by 0.5 m has 4 + 4 + pi/4. The polygon may exceed the disc by its stated excess, never fall short.
func TestGrowK17(t *testing.T) {
	const radius = 5000
	for _, sides := range allSides {
		plain, wide := grown(t, "floor -50,-50 50,-50 50,50 -50,50; block 4,4 6,4 6,6 4,6", radius, sides)
		_, excess := arrange.Disc(radius, sides)
		rim := func(r float64) float64 { return 400*r - 4*r*r } // the strip along the floor's edge, which has inward corners only
		steiner := func(r float64) float64 { return 8*r + math.Pi*r*r + rim(r) }
		got := openArea(plain) - openArea(wide)
		if lo, hi := steiner(.5), steiner(.5+excess/1e4); got < lo || got > hi {
			t.Errorf("%d sides: grown by %v m², not between %v and %v", sides, got, lo, hi)
		}
	}
}

// TestGrowAgainstDistances holds for random places that those nearer than the radius to an obstacle are shut, and those
// farther than radius and excess are not.
func TestGrowAgainstDistances(t *testing.T) {
	plans := []string{
		"floor 0,0 10,0 10,10 0,10; wall 2,2 5,3 4,7 th=0.3; wall 7,1 7,9; block 8,8 9,7 9.5,9; glass 1,8 4,9; screen 5,1 6,9",
		"floor 0,0 10,0 10,4 6,4 6,6 10,6 10,10 0,10 0,6 3,5.5 0,4; low 4,2 5,8 h=1; wall 8,1 8,2.6 7.9,2.7",
	}
	r := rand.New(rand.NewPCG(7, 7))
	for _, text := range plans {
		for i, radius := range []int32{50, 1500, 3300, 9000, 50, 1500, 3300, 9000} {
			sides := allSides[i/4]
			plain, wide := grown(t, text, radius, sides)
			_, excess := arrange.Disc(radius, sides)
			near, far := 0, 0
			for range 4000 {
				p := exact.Pt{X: r.Int32N(100000), Y: r.Int32N(100000)}
				d := clearance(plain, p)
				switch got := closed(wide, p); {
				case d <= float64(radius) && !got:
					t.Fatalf("%s: radius %d: %v is %v from an obstacle and open", text, radius, p, d)
				case d > float64(radius)+excess+1 && got:
					t.Fatalf("%s: radius %d: %v is %v from an obstacle and shut", text, radius, p, d)
				case got:
					near++
				default:
					far++
				}
			}
			if near == 0 || far == 0 && radius < 9000 {
				t.Errorf("%s: radius %d: %d near, %d far", text, radius, near, far)
			}
		}
	}
}

// clearance returns the distance of p from whatever stops walking, 0 inside it.
func clearance(m *mesh.Mesh, p exact.Pt) float64 {
	if closed(m, p) {
		return 0
	}
	best := math.Inf(1)
	for t := range m.Tris {
		for i := range 3 {
			if tri := &m.Tris[t]; tri.StopsWalk(i) {
				best = min(best, toSegment(p, tri.P[i], tri.P[mesh.Inc(i)]))
			}
		}
	}
	return best
}

func toSegment(p, a, b exact.Pt) float64 {
	d := b.Sub(a)
	t := min(max(float64(p.Sub(a).Dot(d))/float64(d.Len2()), 0), 1)
	return math.Hypot(float64(p.X-a.X)-t*float64(d.X), float64(p.Y-a.Y)-t*float64(d.Y))
}
