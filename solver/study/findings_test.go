package study_test

import (
	"context"
	"slices"
	"strings"
	"testing"

	"enfilade/solver/plan"
	"enfilade/solver/plantest"
	"enfilade/solver/study"
)

// TestFindings: each fault is told once, and its fix, where there is one, leaves nothing to tell.
func TestFindings(t *testing.T) {
	tests := []struct {
		name, text, want string
		fix              bool
	}{
		{"start in a block", "floor 0,0 10,0 10,8 0,8; block 2,2 4,2 4,4 2,4; start 2.1,3", "start S1 is inside block B1", true},
		{"start outside", "floor 0,0 10,0 10,8 0,8; start 12,3", "start S1 lies outside the floor", true},
		{"observer in a thick wall", "floor 0,0 10,0 10,8 0,8; wall 5,1 5,7 th=0.4; observer 5.1,3", "observer O1 is inside wall W1", true},
		{"target in a wall", "floor 0,0 10,0 10,8 0,8; wall 5,1 5,7 th=0.4; target 4.9,3", "target T1 is inside wall W1", true},
		{"target shut in", "floor 0,0 10,0 10,8 0,8; wall 4,4 6,4 6,6 4,6 4,4; target 5,5; start 1,1", "target T1 no walk leads in sight of it", false},
		{"nearly met", "floor 0,0 10,0 10,8 0,8; wall 5,1 5,7; wall 1,4 4.985,4", "wall W2 ends 15.0 mm before wall W1", true},
		{"a closed route", "floor 0,0 10,0 10,8 0,8; glass 5,0 5,8; start 1,1; route from=S1 2,2 8,4", "route R1 no walk leads to waypoint 2: glazing W1 closes the way", false},
		{"a route that leads nowhere", "floor 0,0 10,0 10,8 0,8; start 1,1; route from=S1", "route R1 leads nowhere; give it a waypoint or a target", false},
		{"a waypoint in a block", "floor 0,0 10,0 10,8 0,8; block 2,2 4,2 4,4 2,4; start 1,1; route from=S1 3,3 8,4", "route R1 waypoint 1 is inside block B1", false},
		{"walls on one another", "floor 0,0 10,0 10,8 0,8; wall 2,4 8,4; wall 3,4 6,4", "wall W2 ", false},
		{"nothing", "floor 0,0 10,0 10,8 0,8; wall 5,1 5,7; observer 1,1; target 8,4; start 1,1", "", false},
	}
	for _, tt := range tests {
		t.Run(tt.name, func(t *testing.T) {
			p := plantest.Parse(t, tt.text)
			got := findings(t, p)
			if tt.want == "" {
				if len(got) > 0 {
					t.Errorf("%+v", got)
				}
				return
			}
			if len(got) != 1 || !strings.HasPrefix(got[0].Items[0].String()+" "+got[0].Text, tt.want) {
				t.Fatalf("%+v, want %q", got, tt.want)
			}
			if tt.fix != (got[0].Fix != nil) {
				t.Fatalf("fix %v", got[0].Fix)
			}
			if tt.fix {
				q, err := got[0].Fix.Apply(p)
				if err != nil {
					t.Fatal(err)
				}
				if left := findings(t, q); len(left) > 0 {
					t.Errorf("mended, there is left %+v", left)
				}
			}
		})
	}
}

func findings(t *testing.T, p *plan.Plan) []plan.Finding {
	t.Helper()
	s := study.NewSolver()
	r, err := s.Solve(context.Background(), p)
	if err != nil {
		t.Fatal(err)
	}
	f, err := s.Findings(context.Background(), p, r.Approaches, r.Routes)
	if err != nil {
		t.Fatal(err)
	}
	told := slices.Concat(r.Problems, r.Doubts)
	if len(told) != len(f) {
		t.Errorf("a study tells %+v, the findings are %+v", told, f)
	}
	for i := range min(len(told), len(f)) {
		if told[i].Kind != f[i].Kind || told[i].Text != f[i].Text || told[i].At != f[i].At {
			t.Errorf("a study tells %+v, the findings have %+v", told[i], f[i].Problem)
		}
	}
	return f
}

// TestFindingsRoom: a start without room for the walker's body is moved to where there is some.
func TestFindingsRoom(t *testing.T) {
	p := plantest.Parse(t, "floor 0,0 10,0 10,8 0,8; start 0.1,3")
	w := p.Walker()
	w.Radius = 3000
	p, err := plan.SetWalker{Walker: w}.Apply(p)
	if err != nil {
		t.Fatal(err)
	}
	f := findings(t, p)
	if len(f) != 1 || f[0].Kind != plan.ProblemTight || f[0].Fix == nil {
		t.Fatalf("%+v", f)
	}
	q, err := f[0].Fix.Apply(p)
	if err != nil || len(findings(t, q)) > 0 {
		t.Errorf("%v, %+v", err, findings(t, q))
	}
	if s, _ := q.Start("S1"); s.At.X < 3000 || s.At.X > 3300 || s.At.Y < 29_000 || s.At.Y > 31_000 {
		t.Errorf("moved to %v", s.At)
	}
}
