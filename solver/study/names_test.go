package study_test

import (
	"context"
	"testing"

	"enfilade/solver/plantest"
	"enfilade/solver/study"
)

// TestNames: what closes the way is named as what it is.
func TestNames(t *testing.T) {
	const room = "floor 0,0 10,0 10,6 0,6; start 1,3; target 9,3; "
	for _, c := range []struct{ text, want string }{
		{"wall 5,0 5,6", "wall W1 closes the way"},
		{"glass 5,0 5,6", "glazing W1 closes the way"},
		{"low 5,0 5,6 h=1.1", "low wall W1 closes the way"},
		{"wall 5,0 5,6 th=0.2; door W1 at=2 w=1 leaf=solid shut", "wall W1 closes the way"},
		{"wall 5,0 5,6 th=0.2; door W1 at=2 w=1 leaf=glazed shut", "wall W1 closes the way"},
	} {
		p := plantest.Parse(t, room+c.text)
		r, err := study.Solve(context.Background(), p)
		if err != nil {
			t.Fatal(err)
		}
		if a := r.Approaches[0]; a.Reason != c.want {
			t.Errorf("%s: %q, want %q", c.text, a.Reason, c.want)
		}
	}
}

// TestNamesOfWhatIsStoodIn: a start in a low wall, and in a door that is shut.
func TestNamesOfWhatIsStoodIn(t *testing.T) {
	for _, c := range []struct{ text, want string }{
		{"low 5,0 5,6 h=1.1 th=0.4; start 5,3", "is inside low wall W1; move it out, or lower what it stands in"},
		{"wall 5,0 5,6 th=0.4; door W1 at=2 w=1 leaf=glazed shut; start 5,2.5", "is inside glazed door D1; move it out, or lower what it stands in"},
		{"wall 5,0 5,6 th=0.4; door W1 at=2 w=1 leaf=solid shut; start 5,2.5", "is inside door D1; move it out, or lower what it stands in"},
	} {
		s := study.NewSolver()
		p := plantest.Parse(t, "floor 0,0 10,0 10,6 0,6; "+c.text)
		if err := s.Mesh(context.Background(), p); err != nil {
			t.Fatal(err)
		}
		if all := s.Problems(p); len(all) == 0 || all[len(all)-1].Text != c.want {
			t.Errorf("%s: %v, want %q", c.text, all, c.want)
		}
	}
}
