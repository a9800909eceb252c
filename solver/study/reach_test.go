package study_test

import (
	"context"
	"math"
	"reflect"
	"strings"
	"testing"

	"github.com/paulmach/orb"

	"enfilade/solver/exact"
	"enfilade/solver/plan"
	"enfilade/solver/plantest"
	"enfilade/solver/study"
)

// TestReachByHand holds how near and how far zones are against figures worked out by hand, in m.
func TestReachByHand(t *testing.T) {
	ten := math.Sqrt(10)
	for _, c := range []struct {
		name, plan    string
		near, far     float64
		nearAt, farAt orb.Point
		cut           bool
		problem       string
	}{
		{"round the bend", roomL + "start 5,1; zone 0,5 1,5 1,6 0,6", 2 * ten, ten + math.Hypot(2, 4), orb.Point{1, 5}, orb.Point{0, 6}, false, ""},
		{"between two ways", pillar10 + "start 5,1; zone 4.5,8 5.5,8 5.5,9 4.5,9", ten + 2 + math.Hypot(.5, 2), 2 + 2*ten, orb.Point{4.5, 8}, orb.Point{5, 9}, false, ""},
		{"a bow tie", room10 + "start 5,5; zone 1,1 9,9 9,1 1,9", 0, 4 * math.Sqrt2, orb.Point{5, 5}, orb.Point{1, 1}, false, ""},
		{"partly off the floor", room10 + "start 1,1; zone 9,9 12,9 12,12 9,12", 8 * math.Sqrt2, 9 * math.Sqrt2, orb.Point{9, 9}, orb.Point{10, 10}, false, ""},
		{"partly behind glass", room10 + "glass 5,0 5,10; start 1,1; zone 4,0 8,0 8,2 4,2", 3, math.Hypot(4, 1), orb.Point{4, 1}, orb.Point{5, 0}, true, ""},
		{"all behind glass", room10 + "glass 5,0 5,10; start 1,1; zone 6,0 8,0 8,2 6,2", math.NaN(), 0, orb.Point{}, orb.Point{}, false, ""},
		{"from within a block", pillar10 + "start 5,5; zone 6,0 8,0 8,2 6,2", math.NaN(), 0, orb.Point{}, orb.Point{}, false, "start S1 is inside block B1"},
	} {
		rows := solve(t, c.plan).Reach
		if len(rows) != 1 {
			t.Fatalf("%s: %d rows", c.name, len(rows))
		}
		r := rows[0]
		if !strings.HasPrefix(r.Problem, c.problem) || (c.problem == "") != (r.Problem == "") {
			t.Errorf("%s: problem %q", c.name, r.Problem)
		}
		if math.IsNaN(c.near) {
			if r.Found || r.Nearest != 0 || r.Farthest != 0 || r.Cut {
				t.Errorf("%s: %+v", c.name, r)
			}
			continue
		}
		near := func(got orb.Point, want orb.Point) bool {
			return math.Abs(got[0]/1000-want[0]) < 1e-9 && math.Abs(got[1]/1000-want[1]) < 1e-9
		}
		if !r.Found || math.Abs(r.Nearest/1000-c.near) > 1e-9 || !agree(r.Farthest/1000, c.far) || !near(r.NearestAt, c.nearAt) ||
			!near(r.FarthestAt, c.farAt) || r.Cut != c.cut {
			t.Errorf("%s: %+v, want %v to %v m", c.name, r, c.near, c.far)
		}
	}
}

// TestReachWithABody: a body walks round a pillar farther out, so its zone is farther; how near a wall it gets bounds the rest.
func TestReachWithABody(t *testing.T) {
	const plan = pillar10 + "start 5,1; zone 0,8 10,8 10,10 0,10"
	point, body := solve(t, plan).Reach[0], solve(t, plan+"; walker radius=0.5").Reach[0]
	if body.Nearest <= point.Nearest || body.Nearest > point.Nearest+500 {
		t.Errorf("nearest %v mm with a body, %v for a point", body.Nearest, point.Nearest)
	}
	if body.FarthestAt[1] > 9500 || body.FarthestAt[1] < 9490 {
		t.Errorf("the farthest point at which a body stands is %v", body.FarthestAt)
	}
}

// TestReaches: the rows are the same whether the flood is shared with the approaches or not, with targets or without, and
// whether a solver follows an edit or begins anew.
func TestReaches(t *testing.T) {
	ctx := context.Background()
	const zones = "; zone 0,0 20,0 20,14 0,14; zone 2,2 9,9 9,2 2,9; zone -9,-9 -8,-9 -8,-8"
	for seed := range plantest.Seeds(3) {
		parts := plantest.Office(seed, 80).Parts()
		z, err := plantest.Read(strings.TrimPrefix(zones, "; "))
		if err != nil {
			t.Fatal(err)
		}
		parts.Zones = z.Parts().Zones
		p := plan.From(parts)
		full, err := study.Solve(ctx, p)
		if err != nil {
			t.Fatal(err)
		}
		if want := len(parts.Starts) * len(parts.Zones); len(full.Reach) != want {
			t.Fatalf("%d rows, want %d", len(full.Reach), want)
		}
		s := study.NewSolver()
		alone, err := s.Reaches(ctx, p)
		if err != nil || !reflect.DeepEqual(alone, full.Reach) {
			t.Errorf("seed %d: %v alone, %v with the approaches: %v", seed, alone, full.Reach, err)
		}
		moved, err := plan.MoveItems{Items: []plan.Ref{{Kind: plan.KindWall, ID: parts.Walls[len(parts.Walls)/2].ID}}, By: exact.Vec{X: 1000, Y: 500}}.Apply(p)
		if err != nil {
			t.Fatal(err)
		}
		followed, err := s.Reaches(ctx, moved)
		if err != nil {
			t.Fatal(err)
		}
		if anew, err := study.NewSolver().Reaches(ctx, moved); err != nil || !reflect.DeepEqual(followed, anew) {
			t.Errorf("seed %d: %v followed, %v anew: %v", seed, followed, anew, err)
		}
	}
}

// TestField asks for single distances and contours.
func TestField(t *testing.T) {
	ctx := context.Background()
	p := plantest.Parse(t, roomL+"start 5,1; start 4,4")
	s := study.NewSolver()
	f, err := s.Field(ctx, p, "S1")
	if err != nil {
		t.Fatal(err)
	}
	if far, ok := f.At(exact.Pt{X: 10000, Y: 50000}); !ok || !agree(far, 2000*math.Sqrt(10)) {
		t.Errorf("1, 5 is %v mm away, %v", far, ok)
	}
	if far, ok := f.At(exact.Pt{X: 40000, Y: 40000}); ok {
		t.Errorf("a point off the floor is %v mm away", far)
	}
	lines, err := f.Contours(ctx, 500)
	if err != nil || len(lines) == 0 {
		t.Fatalf("%d contours: %v", len(lines), err)
	}
	levels := map[float64]bool{}
	for _, c := range lines {
		levels[c.Level] = true
		for _, q := range c.Line {
			if q[0] > 2000 && math.Abs(math.Hypot(q[0]-5000, q[1]-1000)-c.Level) > 1e-6 {
				t.Errorf("the contour of %v mm passes %v", c.Level, q)
			}
		}
	}
	if want := int((math.Sqrt(10) + math.Hypot(2, 4)) * 2); len(levels) != want {
		t.Errorf("%d levels, want %d", len(levels), want)
	}
	for start, want := range map[string]string{"S2": "start S2 lies outside the floor", "S3": "no start S3"} {
		if _, err := s.Field(ctx, p, start); err == nil || !strings.Contains(err.Error(), want) {
			t.Errorf("from %s: %v, want %q", start, err, want)
		}
	}
	stopped, cancel := context.WithCancel(ctx)
	cancel()
	if _, err := f.Contours(stopped, 500); err == nil {
		t.Error("cancelled contours returned no error")
	}
}
