package study_test

import (
	"context"
	"math"
	"reflect"
	"slices"
	"strings"
	"testing"

	"enfilade/solver/plan"
	"enfilade/solver/plantest"
	"enfilade/solver/study"
)

func solve(t *testing.T, text string) *study.Result {
	t.Helper()
	r, err := study.Solve(context.Background(), plantest.Parse(t, text))
	if err != nil {
		t.Fatal(err)
	}
	return r
}

func TestSolve(t *testing.T) {
	r := solve(t, "floor 0,0 6,0 6,2 2,2 2,6 0,6; observer 5,1; target 1,5; target 4,1; start 5,1; start 6,0.5")
	o := r.Sight[0]
	if math.Abs(o.Area-38./3) > 1e-7 || math.Abs(o.Perimeter-16.774852) > 1e-6 || math.Abs(o.Occluding-2.108185) > 1e-6 {
		t.Errorf("region: %+v", o)
	}
	if !slices.Equal(o.TargetsSeen, []string{"T2"}) {
		t.Errorf("targets seen: %v", o.TargetsSeen)
	}
	if len(r.SeenFrom) != 2 || len(r.Approaches) != 4 || len(r.Problems) != 0 {
		t.Fatalf("%d seen from, %d approaches, problems %v", len(r.SeenFrom), len(r.Approaches), r.Problems)
	}
	a := r.Approaches[0]
	if a.Status != study.StatusApproach || math.Abs(a.Length-2529.8221281347) > 1e-6 || len(a.Points) != 2 ||
		math.Abs(a.SightLine-math.Hypot(1600, 4800)) > 1e-6 || math.Abs(a.Seconds-2.5298221281347/1.2) > 1e-9 {
		t.Errorf("approach: %+v", a)
	}
	if a := r.Approaches[1]; a.Status != study.StatusSeen || a.Length != 0 || len(a.Points) != 1 || a.FullWalk != 1000 {
		t.Errorf("seen from the start: %+v", a)
	}
}

// TestSolveFaults holds that a fault belongs to its item and the rest is solved.
func TestSolveFaults(t *testing.T) {
	r := solve(t, `floor 0,0 10,0 10,10 0,10; block 4,4 6,4 6,6 4,6; block 7,7 8,7 8,8 7,8 h=0.9; wall 0,3 10,3; glass 0,9 10,9
		observer 5,5; observer 11,5; observer 1,1; observer 4.0005,5; target 5,5; target 7.5,7.5; target 1,2; target 1,9.5; start 1,1; start 7.5,7.5; start 12,1`)
	for i, want := range []string{"inside block B1", "outside the floor", "", ""} {
		if s := r.Sight[i]; (s.Problem == "") != (want == "") || !strings.Contains(s.Problem, want) {
			t.Errorf("observer %d: problem %q, want %q", i, s.Problem, want)
		}
	}
	if got := r.Sight[3].At; got[0] != 4000 || got[1] != 5000 {
		t.Errorf("an observer half a millimetre inside a face stands at %v", got)
	}
	row := func(start, target int) study.Approach { return r.Approaches[start*4+target] }
	if a := row(0, 0); !strings.Contains(a.Problem, "target T1") || !strings.Contains(a.Problem, "block B1") {
		t.Errorf("target in a block: %+v", a)
	}
	if a := row(0, 1); a.Status != study.StatusNone || !strings.Contains(a.Reason, "block B2") && !strings.Contains(a.Reason, "W1") {
		t.Errorf("target in a low case behind a wall: %+v", a)
	}
	if a := row(0, 2); a.Status != study.StatusSeen {
		t.Errorf("target in view: %+v", a)
	}
	if a := row(0, 3); a.Status != study.StatusNone || a.Reason != "wall W1 closes the way" || a.HasFullWalk {
		t.Errorf("target behind a wall and glass: %+v", a)
	}
	if a := row(1, 0); a.Problem == "" {
		t.Errorf("start in a low case: %+v", a)
	}
	if a := row(2, 2); !strings.Contains(a.Problem, "start S3 lies outside the floor") {
		t.Errorf("start off the floor: %+v", a)
	}
	kinds := map[plan.ProblemKind]int{}
	for _, p := range r.Problems {
		kinds[p.Kind]++
	}
	if want := map[plan.ProblemKind]int{plan.ProblemInside: 3, plan.ProblemOutside: 2, plan.ProblemMoved: 1}; !reflect.DeepEqual(kinds, want) {
		t.Errorf("problems %v, want %v: %v", kinds, want, r.Problems)
	}
}

// TestSolverKeepsTheMesh holds that answers do not depend on what was asked before.
func TestSolverKeepsTheMesh(t *testing.T) {
	s := study.NewSolver()
	for _, text := range []string{
		"wall 0,0 5,0 th=0.2; observer 1,1; target 4,-1; start 2,2",
		"wall 0,0 5,0 th=0.2; observer 9,9; target 4,-1; start 2,2",
		"wall 0,0 5,1 th=0.2; observer 9,9; target 4,-1; start 2,2",
	} {
		p := plantest.Parse(t, text)
		got, err := s.Solve(context.Background(), p)
		if err != nil {
			t.Fatal(err)
		}
		want, err := study.Solve(context.Background(), p)
		if err != nil {
			t.Fatal(err)
		}
		if !reflect.DeepEqual(got, want) {
			t.Errorf("%s: a used solver says %+v, a new one %+v", text, got, want)
		}
	}
}

// TestSolveWithABody walks with a body. The pillar's figures stand in TestGrowK16; here a door, a target on a wall and a
// start too near to one.
func TestSolveWithABody(t *testing.T) {
	const room = "floor 0,0 10,0 10,10 0,10; wall 5,0 5,4; wall 5,4.8 5,10; target 8,10; start 2,5; start 0.1,5; "
	r := solve(t, room+"walker radius=0.35")
	if r.WalkerRadius != 350 || r.RadiusExcess <= 0 || r.RadiusExcess > 3 {
		t.Errorf("radius %v, excess %v", r.WalkerRadius, r.RadiusExcess)
	}
	a := r.Approaches[0]
	if end := a.FullPoints[len(a.FullPoints)-1]; !a.HasFullWalk || math.Abs(end[0]-8000) > 1e-6 || end[1] > 9650 || end[1] < 9646 {
		t.Errorf("the full walk ends at %v, want right before the target, a radius off the wall", end)
	}
	// Around the two ends of the door's jambs, which lie 0.8 m apart: never nearer than the radius to (5, 4.8).
	for i, p := range a.FullPoints[1:] {
		if d := segmentDistance(a.FullPoints[i], p, 5000, 4800); d < 350 {
			t.Errorf("the full walk passes the jamb at %v mm", d)
		}
	}
	if b := r.Approaches[1]; !strings.Contains(b.Problem, "start S2 has no room for a body of radius 350 mm; standing room begins 25") {
		t.Errorf("a start 0.1 m off the wall: %+v", b)
	}
	for radius, want := range map[string]bool{"0.3": true, "0.39": true, "0.4": false, "0.6": false} {
		a := solve(t, room+"walker radius="+radius).Approaches[0]
		if a.HasFullWalk != want {
			t.Errorf("a body of radius %s passes a door of 0.8 m: %v, want %v", radius, a.HasFullWalk, want)
		}
		if !want && !strings.Contains(a.Reason, "too narrow") {
			t.Errorf("radius %s: reason %q", radius, a.Reason)
		}
	}
}

func segmentDistance(a, b [2]float64, x, y float64) float64 {
	dx, dy := b[0]-a[0], b[1]-a[1]
	s := min(max(((x-a[0])*dx+(y-a[1])*dy)/(dx*dx+dy*dy), 0), 1)
	return math.Hypot(a[0]+s*dx-x, a[1]+s*dy-y)
}

// TestGrowK16 holds the walk around a pillar with a body against the closed form for round corners,
// 2 sqrt(10-r²) + 2r(atan(1/3) + asin(r/sqrt 10)) + 2, worked out by hand from the shortest walk among grown obstacles
// (Lozano-Perez and Wesley, CACM 22, 1979). The polygon that stands for the disc may make it longer by its excess only.
func TestGrowK16(t *testing.T) {
	r := solve(t, "floor -20,-20 30,-20 30,30 -20,30; block 4,4 6,4 6,6 4,6; start 5,1; target 5,9; walker radius=0.5")
	round := func(r float64) float64 {
		return 2*math.Sqrt(10-r*r) + 2*r*(math.Atan(1./3)+math.Asin(r/math.Sqrt(10))) + 2
	}
	got := r.Approaches[0].FullWalk / 1000
	if lo, hi := round(.5), round(.5+r.RadiusExcess/1000); got < lo || got > hi || math.Abs(lo-8.725529) > 1e-6 {
		t.Errorf("full walk %v m, not between %v and %v", got, lo, hi)
	}
	if !r.Approaches[0].Ties {
		t.Error("the walk around the other side is as long and not reported")
	}
}

// TestGrowK39 walks between two pillars whose nearest corners lie sqrt 2 apart: a body passes up to half of that, less the
// stated excess of its polygon.
func TestGrowK39(t *testing.T) {
	const plan = "floor 0,0 9,0 9,9 0,9; block 0,0 4,0 4,4 0,4; block 5,5 9,5 9,9 5,9; start 2,7; target 7,2; walker radius="
	for radius, want := range map[string]bool{"0.5": true, "0.7": true, "0.7072": false, "0.8": false} {
		if got := solve(t, plan+radius).Approaches[0].HasFullWalk; got != want {
			t.Errorf("a body of radius %s passes: %v, want %v", radius, got, want)
		}
	}
}
