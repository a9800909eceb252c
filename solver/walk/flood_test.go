package walk_test

import (
	"context"
	"errors"
	"math"
	"testing"

	"enfilade/solver/arrange"
	"enfilade/solver/exact"
	"enfilade/solver/mesh"
	"enfilade/solver/plantest"
	"enfilade/solver/sight"
	"enfilade/solver/walk"
)

const (
	metre = 10000
	eye   = 16000
)

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

// both floods for the approach to a target and for the walk to it.
func both(t testing.TB, m *mesh.Mesh, start, target exact.Pt) (approach, full walk.Path) {
	t.Helper()
	cones, err := sight.New(m).Cones(target, eye, sight.Clip{})
	if err != nil {
		t.Fatal(err)
	}
	paths, err := walk.New(m).Flood(context.Background(), start, []walk.Goal{{Eye: target, Cones: cones}, {Spot: walk.At(target)}})
	if err != nil {
		t.Fatal(err)
	}
	return paths[0], paths[1]
}

const (
	lRoom  = "floor 0,0 6,0 6,2 2,2 2,6 0,6"
	uRoom  = "floor 0,0 10,0 10,10 8,10 8,2 2,2 2,10 0,10"
	pillar = "floor 0,0 10,0 10,10 0,10; block 4,4 6,4 6,6 4,6"
)

// TestFlood holds walks against figures worked out by hand, in metres.
func TestFlood(t *testing.T) {
	for _, c := range []struct {
		name, plan     string
		start, target  exact.Pt
		approach       float64
		endX, endY     float64
		approachTurns  int
		full           float64
		tieOne, tieTwo bool
	}{
		{"perpendicular to the window", lRoom, at(5, 1), at(1, 5), 8 / math.Sqrt(10), 2.6, .2, 1, math.Hypot(3, 1) + math.Hypot(1, 3), false, false},
		{"end of the window", lRoom, at(6, .5), at(1, 5), math.Sqrt(409) / 6, 8. / 3, 0, 1, math.Hypot(4, 1.5) + math.Hypot(1, 3), false, false},
		{"around a corner", uRoom, at(9, 8), at(1, 8), 73 / math.Sqrt(37), 80. / 37, 38. / 37, 2, 2*math.Sqrt(37) + 6, false, false},
		{"two ways", pillar, at(5, 1), at(5, 9), 8 / math.Sqrt(10), 2.6, 1.8, 1, 2 + 2*math.Sqrt(10), true, true},
		{"seen through glass", "floor 0,0 10,0 10,10 0,10; glass 5,0 5,8", at(4, 1), at(6, 1), 0, 4, 1, 1, 10 * math.Sqrt2, false, false},
	} {
		a, f := both(t, build(t, c.plan), c.start, c.target)
		near := func(what string, got, want float64) {
			t.Helper()
			if math.Abs(got-want) > 1e-9*max(want, 1) {
				t.Errorf("%s: %s is %.12g, want %.12g", c.name, what, got, want)
			}
		}
		near("approach", a.Length/metre, c.approach)
		near("end x", a.End[0]/metre, c.endX)
		near("end y", a.End[1]/metre, c.endY)
		near("full walk", f.Length/metre, c.full)
		if len(a.Turns) != c.approachTurns {
			t.Errorf("%s: the approach turns at %v", c.name, a.Turns)
		}
		if a.Ties != c.tieOne || f.Ties != c.tieTwo {
			t.Errorf("%s: ties %v %v, want %v %v", c.name, a.Ties, f.Ties, c.tieOne, c.tieTwo)
		}
	}
}

// TestFloodThinWalls walks around thin walls, whose two sides are different places.
func TestFloodThinWalls(t *testing.T) {
	room := "floor 0,0 10,0 10,10 0,10; "
	for _, c := range []struct {
		name, plan    string
		start, target exact.Pt
		full          float64
	}{
		{"around a free end", "wall 5,0 5,8", at(4, 1), at(6, 1), 2 * math.Hypot(1, 7)},
		{"from the wall itself, either side", "wall 5,0 5,8", at(5, 1), at(6, 1), 1},
		{"to the wall itself, either side", "wall 5,0 5,8", at(6, 1), at(5, 3), math.Hypot(1, 2)},
		{"along the wall around its end", "wall 5,0 5,8; wall 5,8 9,8", at(5, 8), at(6, 7), math.Sqrt2},
		{"through no gap of zero width", "wall 5,0 5,5; wall 5,5 5,10", at(4, 5), at(6, 5), math.NaN()},
		{"past a cross", "wall 5,3 5,7; wall 3,5 7,5", at(4, 4), at(6, 6), 4 * math.Sqrt2},
	} {
		_, f := both(t, build(t, room+c.plan), c.start, c.target)
		if math.IsNaN(c.full) {
			if f.Found {
				t.Errorf("%s: a walk of %v m", c.name, f.Length/metre)
			}
			continue
		}
		if math.Abs(f.Length/metre-c.full) > 1e-9 {
			t.Errorf("%s: %v m over %v, want %v", c.name, f.Length/metre, f.Turns, c.full)
		}
	}
}

func TestFloodErrors(t *testing.T) {
	m := build(t, pillar)
	f := walk.New(m)
	if _, err := f.Flood(context.Background(), at(5, 5), []walk.Goal{{Spot: walk.At(at(1, 1))}}); !errors.Is(err, walk.ErrInside) {
		t.Errorf("from inside the pillar: %v", err)
	}
	paths, err := f.Flood(context.Background(), at(4, 5), []walk.Goal{{Spot: walk.At(at(1, 1))}, {Spot: walk.At(at(5, 5))}})
	if err != nil || !paths[0].Found || paths[1].Found {
		t.Errorf("from the pillar's face: %v %v", paths, err)
	}
}
