package sight_test

import (
	"context"
	"math"
	"testing"

	"enfilade/solver/arrange"
	"enfilade/solver/exact"
	"enfilade/solver/mesh"
	"enfilade/solver/plantest"
	"enfilade/solver/sight"
)

const metre = 10000

func build(t testing.TB, text string) *mesh.Mesh {
	t.Helper()
	o, problems := arrange.Draw(plantest.Parse(t, text))
	if len(problems) > 0 {
		t.Fatalf("the plan has problems: %v", problems)
	}
	m, err := arrange.Build(context.Background(), arrange.Round(o))
	if err != nil {
		t.Fatal(err)
	}
	return m
}

func at(x, y float64) exact.Pt {
	return exact.Pt{X: int32(math.Round(x * metre)), Y: int32(math.Round(y * metre))}
}

// TestRegion holds regions against figures worked out by hand, in metres.
func TestRegion(t *testing.T) {
	const lRoom = "floor 0,0 6,0 6,2 2,2 2,6 0,6; "
	const pillar = "floor 0,0 10,0 10,10 0,10; block 4,4 6,4 6,6 4,6; "
	for _, c := range []struct {
		name, plan      string
		eye             exact.Pt
		clip            sight.Clip
		area            float64
		wall, occluding float64
		side            float64
	}{
		{"unit square", "floor 0,0 1,0 1,1 0,1", at(.5, .5), sight.Clip{}, 1, 4, 0, 0},
		{"L from the corner", lRoom, at(1, 1), sight.Clip{}, 20, 24, 0, 0},
		{"L from an arm", lRoom, at(5, 1), sight.Clip{}, 38. / 3, 44. / 3, 2 * math.Sqrt(10) / 3, 0},
		{"L along a wall's face", lRoom, at(1, 2), sight.Clip{}, 20, 24, 0, 0},
		{"L on a wall's face", lRoom, at(4, 2), sight.Clip{}, 12, 6 + 2 + 2 + 4, 2, 0},
		{"L in the inner corner", lRoom, at(2, 2), sight.Clip{}, 20, 24, 0, 0},
		{"L in an outer corner", lRoom, at(6, 0), sight.Clip{}, 13, 6 + 2 + 4 + 3, math.Hypot(2, 1), 0},
		{"pillar", pillar, at(5, 1), sight.Clip{}, 76, 0, 4 * math.Sqrt(10), 0},
		{"screen", "floor -4,-4 4,-4 4,4 -4,4; screen 2,-1 2,1", at(0, 0), sight.Clip{}, 58, 0, 2 * math.Sqrt(5), 0},
		{"edge-on wall", "floor -4,-4 4,-4 4,4 -4,4; wall 1,0 2,0", at(0, 0), sight.Clip{}, 64, 32, 0, 0},
		{"eye on a thin wall", "floor -4,-4 4,-4 4,4 -4,4; wall -1,0 2,0", at(0, 0), sight.Clip{}, 64, 32, 0, 0},
		{"eye on a thin wall's end", "floor -4,-4 4,-4 4,4 -4,4; wall 0,0 2,0", at(0, 0), sight.Clip{}, 64, 32, 0, 0},
		{"sector", "floor -5,-5 5,-5 5,5 -5,5", at(0, 0), sight.View(0, 60), 25 / math.Sqrt(3), 10 / math.Sqrt(3), 0, 20 / math.Sqrt(3)},
		{"three quarters", "floor -5,-5 5,-5 5,5 -5,5", at(0, 0), sight.View(0, 270), 75, 30, 0, 10 * math.Sqrt2},
		{"front of a wall", "floor -4,-4 4,-4 4,4 -4,4; wall -1,0 2,0", at(0, 0), sight.Front(at(-1, 0), at(1, 0)), 32, 8 + 4 + 4 + 3, 0, 5},
	} {
		r, err := sight.New(build(t, c.plan)).Clipped(c.eye, 16000, c.clip)
		if err != nil {
			t.Errorf("%s: %v", c.name, err)
			continue
		}
		l := r.Lengths()
		near := func(what string, got, want, tol float64) {
			if math.Abs(got-want) > tol*want+1e-12 {
				t.Errorf("%s: %s is %.12g, want %.12g", c.name, what, got, want)
			}
		}
		near("area", r.Area()/metre/metre, c.area, 1e-8)
		if c.wall > 0 {
			near("wall", l[sight.Wall]/metre, c.wall, 1e-8)
		}
		near("occluding", l[sight.Occluding]/metre, c.occluding, 1e-8)
		near("sides", l[sight.ClipSide]/metre, c.side, 1e-8)
	}
}

func TestRegionRange(t *testing.T) {
	m := build(t, "floor -5,-5 5,-5 5,5 -5,5")
	for _, radius := range []int32{300, 20000, 49999, 52000, 60000, 72000} {
		r, err := sight.New(m).Clipped(at(0, 0), 16000, sight.Clip{Range: sight.RangePolygon(at(0, 0), radius)})
		if err != nil {
			t.Fatal(err)
		}
		// The circle cut by the square, between the circle itself and one smaller by 1 mm.
		if lo, hi, got := discInSquare(float64(radius)-10, 50000), discInSquare(float64(radius), 50000), r.Area(); got < lo || got > hi {
			t.Errorf("range %d: area %v is not between %v and %v", radius, got, lo, hi)
		}
	}
}

// discInSquare is the area of a disc of radius r within a square of half side h around the same centre.
func discInSquare(r, h float64) float64 {
	if r <= h {
		return math.Pi * r * r
	}
	if r >= h*math.Sqrt2 {
		return 4 * h * h
	}
	a := math.Acos(h / r)
	return math.Pi*r*r - 4*(r*r*a-h*math.Sqrt(r*r-h*h))
}

func TestSees(t *testing.T) {
	f := sight.New(build(t, "floor 0,0 10,0 10,10 0,10; block 4,4 6,4 6,6 4,6; wall 2,8 2,9"))
	for _, c := range []struct {
		a, b exact.Pt
		want bool
	}{
		{at(5, 1), at(5, 4), true}, {at(5, 1), at(5, 9), false}, {at(5, 1), at(4, 5), false},
		{at(2, 2), at(6, 4), true}, {at(4, 2), at(4, 8), true}, {at(3, 3), at(6, 6), false}, {at(3, 3), at(4, 4), true},
		{at(2, 7), at(2, 10), true}, {at(2, 8.5), at(1, 1), true}, {at(2, 8.5), at(2, 8), true}, {at(1, 8.5), at(3, 8.5), false},
		{at(5, 5), at(1, 1), false}, {at(1, 1), at(5, 5), false}, {at(4, 5), at(1, 5), true}, {at(4, 5), at(5, 5), false},
	} {
		if got := f.Sees(c.a, c.b, 16000); got != c.want {
			t.Errorf("%v sees %v: %v, want %v", c.a, c.b, got, c.want)
		}
	}
}
