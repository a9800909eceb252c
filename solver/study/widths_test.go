package study_test

import (
	"context"
	"math"
	"reflect"
	"testing"

	"github.com/paulmach/orb"

	"enfilade/solver/plan"
	"enfilade/solver/plantest"
	"enfilade/solver/study"
)

// TestClearWidthByHand holds clear widths against figures worked out by hand; widths in m.
func TestClearWidthByHand(t *testing.T) {
	const (
		pillars  = "floor 0,0 9,0 9,9 0,9; block 0,0 4,0 4,4 0,4; block 5,5 9,5 9,9 5,9; "
		oneDoor  = room10 + "wall 5,0 5,4; wall 5,4.8 5,10; "
		twoDoors = "floor 0,0 12,0 12,4 0,4; wall 4,0 4,0.3; wall 4,1.2 4,4; wall 8,0 8,2.5; wall 8,3.2 8,4; "
	)
	none := math.NaN()
	for _, c := range []struct {
		name, plan     string
		approach, full float64
		tightest       [2]orb.Point
	}{
		{"between two pillars", pillars + "start 2,7; target 7,2", none, math.Sqrt2, [2]orb.Point{{4, 4}, {5, 5}}},
		{"a door", oneDoor + "start 2,5; target 5.2,9.5", 5, .8, [2]orb.Point{{5, 4}, {5, 4.8}}},
		{"a door too narrow for the walker", oneDoor + "start 2,5; target 5.2,9.5; walker radius=0.5", 5, .8, [2]orb.Point{{5, 4}, {5, 4.8}}},
		{"two doors, first sight between them", twoDoors + "start 1,3; target 10,3", .9, .7, [2]orb.Point{{8, 2.5}, {8, 3.2}}},
		{"two doors, the walker passes neither", twoDoors + "start 1,3; target 10,3; walker radius=0.5", .9, .7, [2]orb.Point{{8, 2.5}, {8, 3.2}}},
		{"a target in a low case", twoDoors + "block 9,2 11,2 11,3.5 9,3.5 h=0.9; start 1,3; target 10,3", .9, none, [2]orb.Point{{4, .3}, {4, 1.2}}},
		{"no way at all", room10 + "glass 5,0 5,10; start 1,1; target 9,9", none, none, [2]orb.Point{}},
		{"one open room", room10 + "start 1,1; target 9,9", none, none, [2]orb.Point{}},
		{"from a wall's face to a wall", oneDoor + "start 5,2; target 10,2", none, none, [2]orb.Point{}},
	} {
		a := solve(t, c.plan).Approaches[0]
		for _, f := range []struct {
			what string
			got  float64
			ok   bool
			want float64
		}{{"approach", a.ClearWidth, a.HasClearWidth, c.approach}, {"full walk", a.FullClearWidth, a.HasFullClearWidth, c.full}} {
			if f.ok == math.IsNaN(f.want) || f.ok && !agree(f.got/1000, f.want) {
				t.Errorf("%s: the %s is clear for %v m, told %v; want %v", c.name, f.what, f.got/1000, f.ok, f.want)
			}
		}
		for i, p := range a.Tightest {
			if math.Abs(p[0]/1000-c.tightest[i][0]) > 1e-9 || math.Abs(p[1]/1000-c.tightest[i][1]) > 1e-9 {
				t.Errorf("%s: tightest between %v, want %v", c.name, a.Tightest, c.tightest)
			}
		}
	}
}

// TestClearWidthAgainstBodies: a body narrower than the clear width finds a full walk, a wider one does not. Half a percent
// and 2 mm cover the polygon that stands for a body.
func TestClearWidthAgainstBodies(t *testing.T) {
	passed, stuck := 0, 0
	for seed := range plantest.Seeds(2) {
		p := plantest.Office(seed, 60)
		parts := p.Parts()
		parts.Starts = parts.Starts[:4]
		for i := range parts.Starts { // no narrower at the ends than the bodies tried
			parts.Targets[i].At = parts.Starts[i].At
		}
		parts.Targets = parts.Targets[:4]
		for _, radius := range []int32{2000, 3000, 3500, 3900, 4400, 4800} {
			parts.Walker.Radius = radius
			r, err := study.Solve(context.Background(), plan.From(parts))
			if err != nil {
				t.Fatal(err)
			}
			for _, a := range r.Approaches {
				switch body := 2 * float64(radius) / 10; {
				case a.Problem != "" || !a.HasFullClearWidth:
				case body*1.005+4 < a.FullClearWidth:
					passed++
					if !a.HasFullWalk {
						t.Errorf("seed %d: %s to %s is clear for %v mm, yet a body %v mm wide finds no walk", seed, a.Start, a.Target, a.FullClearWidth, body)
					}
				case body >= a.FullClearWidth:
					stuck++
					if a.HasFullWalk {
						t.Errorf("seed %d: %s to %s is clear for %v mm, yet a body %v mm wide finds a walk", seed, a.Start, a.Target, a.FullClearWidth, body)
					}
				}
			}
		}
	}
	t.Logf("%d bodies pass, %d do not", passed, stuck)
	if passed < 20 || stuck < 20 {
		t.Errorf("only %d bodies pass, %d do not", passed, stuck)
	}
}

// TestClearWidthsOnlyWhenAsked: approaches alone come without them, and adding them later gives what Solve gives.
func TestClearWidthsOnlyWhenAsked(t *testing.T) {
	p := plantest.Parse(t, room10+"wall 5,0 5,4; wall 5,4.8 5,10; start 2,5; target 8,9.5; target 1,1; start 12,12")
	s := study.NewSolver()
	rows, err := s.Approaches(context.Background(), p)
	if err != nil {
		t.Fatal(err)
	}
	if rows[0].HasFullClearWidth {
		t.Error("clear widths were worked out though nobody asked")
	}
	if err := s.ClearWidths(context.Background(), p, rows); err != nil {
		t.Fatal(err)
	}
	if want := solve(t, plantest.Text(p)).Approaches; !reflect.DeepEqual(rows, want) {
		t.Errorf("got %+v, want %+v", rows, want)
	}
	ctx, cancel := context.WithCancel(context.Background())
	cancel()
	if err := study.NewSolver().ClearWidths(ctx, p, rows); err == nil {
		t.Error("cancelled work returned no error")
	}
}

// TestWidthsUnknown: where clear widths are given up, rows say so and give no number, and everything else is solved.
func TestWidthsUnknown(t *testing.T) {
	p := plantest.Parse(t, room10+"wall 5,0 5,4; wall 5,4.8 5,10; start 2,5; start 50,50; target 5.2,9.5")
	s := study.NewSolver()
	want, err := s.Solve(context.Background(), p)
	if err != nil {
		t.Fatal(err)
	}
	s.GiveUpWidths()
	got, err := s.Solve(context.Background(), p)
	if err != nil {
		t.Fatal(err)
	}
	a := &got.Approaches[0]
	if !a.WidthsUnknown || a.HasClearWidth || a.HasFullClearWidth || !want.Approaches[0].HasClearWidth {
		t.Errorf("given up: %+v", a)
	}
	if got.Approaches[1].WidthsUnknown || got.Approaches[1].Problem == "" {
		t.Errorf("a row with a problem: %+v", got.Approaches[1])
	}
	w := want.Approaches[0]
	w.ClearWidth, w.HasClearWidth, w.FullClearWidth, w.HasFullClearWidth, w.Tightest, w.WidthsUnknown = 0, false, 0, false, [2]orb.Point{}, true
	if !reflect.DeepEqual(*a, w) {
		t.Errorf("given up: %+v, want the rest as it was: %+v", *a, w)
	}
}
