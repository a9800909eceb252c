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
