package gui

import (
	"strings"
	"testing"

	"enfilade/assets"
	"enfilade/fileio/planfile"
	"enfilade/solver/exact"
	"enfilade/solver/plan"
)

// newFaulty is a window with a wall that ends 12 mm before another, a start inside a block, and a plan without fault beside
// them.
func newFaulty(t *testing.T) *rig {
	t.Helper()
	r := newRig(t, realSolver)
	r.session.Open(plan.From(plan.Parts{
		Floor: plan.ChainOf(m(-10, -10), m(30, -10), m(30, 20), m(-10, 20)),
		Walls: []plan.Wall{{ID: "W1", Line: plan.ChainOf(m(0, 0), m(4.988, 0)), Height: plan.Ceiling},
			{ID: "W2", Line: plan.ChainOf(m(5, -3), m(5, 3)), Height: plan.Ceiling}},
		Blocks: []plan.Block{{ID: "B1", Ring: plan.ChainOf(m(10, 10), m(12, 10), m(12, 12), m(10, 12)), Height: plan.Ceiling}},
		Starts: []plan.Start{{ID: "S1", Name: "Porch", At: m(11, 11.9)}},
		Walker: plan.DefaultWalker(), Sheet: plan.Sheet{Unit: "m"},
	}), "")
	r.view.fitNow()
	r.frame()
	r.settle()
	return r
}

func TestProblems(t *testing.T) {
	r := newFaulty(t)
	p := r.problems
	if !p.box.Visible() || len(p.found) != 2 || !strings.Contains(r.status.counts.text, "2 problems") || p.count.text != "2 problems" {
		t.Fatalf("%d problems, shown %v, counted %q", len(p.found), p.box.Visible(), r.status.counts.text)
	}
	p.goTo(1)
	if c := r.view.glide.from(r.view.cam); exact.Dist(c.Grid(float64(c.W)/2, float64(c.H)/2), m(4.988, 0)) > 100 || c.Length(120) < 3 {
		t.Errorf("the gap is not brought into sight: %+v", c)
	}
	if !r.session.Selected(plan.Ref{Kind: plan.KindWall, ID: "W1"}) || !r.session.Selected(plan.Ref{Kind: plan.KindWall, ID: "W2"}) {
		t.Errorf("selected %v", r.session.Selection())
	}
	r.wantHint("Wall W1 ends 12.0 mm before wall W2")
	p.mend(1)
	r.wantWall("W1", m(0, 0), m(5, 0))
	r.wantUndo("close gap")
	p.mend(0)
	if _, ok := r.session.UndoLabel(); !ok || r.session.Plan().NumStarts() != 1 {
		t.Error("the plan is gone")
	}
	r.wantUndo("close gap") // a fix of a plan that has changed is not done
	r.settle()
	if len(p.found) != 1 || p.found[0].Items[0].ID != "S1" {
		t.Fatalf("left %+v", p.found)
	}
	p.mend(0)
	r.wantUndo("move start")
	r.settle()
	if s, _ := r.session.Plan().Start("S1"); len(p.found) != 0 || p.box.Visible() || s.At.Y <= m(0, 12).Y {
		t.Errorf("left %+v, the start at %v", p.found, s.At)
	}
	r.undo()
	r.undo()
	r.settle()
	if len(p.found) != 2 || !p.box.Visible() {
		t.Errorf("after undo %+v", p.found)
	}
}

func TestNextProblem(t *testing.T) {
	r := newFaulty(t)
	var at []string
	for range 3 {
		r.problems.next()
		at = append(at, r.session.Selection()[0].ID)
	}
	if strings.Join(at, " ") != "S1 W1 S1" {
		t.Errorf("went to %v", at)
	}
}

// TestProblemsOfAnotherPlan: another plan does not show those of the one before.
func TestProblemsOfAnotherPlan(t *testing.T) {
	r := newFaulty(t)
	r.openSample("gallery")
	r.settle()
	if len(r.problems.found) != 0 {
		t.Errorf("%+v", r.problems.found)
	}
}

// TestSamplesHaveNoProblems: what is handed out with the program is drawn well.
func TestSamplesHaveNoProblems(t *testing.T) {
	for _, s := range assets.Samples() {
		p, err := planfile.Read(strings.NewReader(string(assets.SamplePlan(s.Name))), s.Name)
		if err != nil {
			t.Fatal(err)
		}
		for _, f := range plan.Inspect(p, nil) {
			t.Errorf("%s: %v %s", s.Name, f.Items, f.Text)
		}
	}
}
