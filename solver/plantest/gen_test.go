package plantest_test

import (
	"fmt"
	"testing"
	"time"

	"enfilade/solver/exact"
	"enfilade/solver/plan"
	"enfilade/solver/plantest"
)

var generators = []struct {
	name string
	make func(seed uint64, walls int) *plan.Plan
}{
	{"office", plantest.Office}, {"clutter", plantest.Clutter}, {"comb", plantest.Comb}, {"maze", plantest.Maze},
}

func TestSeededPlans(t *testing.T) {
	for _, g := range generators {
		for _, walls := range []int{20, 21, 37, 100, 999, 5000} {
			p := g.make(7, walls)
			things := p.NumWalls()
			if g.name == "clutter" {
				things += p.NumBlocks()
			}
			if things != walls {
				t.Errorf("%s of %d walls has %d", g.name, walls, things)
			}
			if plantest.Text(p) != plantest.Text(g.make(7, walls)) {
				t.Errorf("%s of %d walls: the same seed drew another plan", g.name, walls)
			}
			if plantest.Text(p) == plantest.Text(g.make(8, walls)) {
				t.Errorf("%s of %d walls: another seed drew the same plan", g.name, walls)
			}
			if err := legal(p); err != nil {
				t.Errorf("%s of %d walls: %v", g.name, walls, err)
			}
		}
	}
}

// The largest plans that are measured must be plans: beyond the legal range items are left out.
func TestSeededPlansStayInRange(t *testing.T) {
	for _, g := range generators {
		for i, p := range g.make(1, 100_000).Floor().All() {
			if !plan.InRange(p) {
				t.Errorf("%s of 100,000 walls: corner %d of the floor, %v, is out of range", g.name, i, p)
			}
		}
	}
}

// legal reports the first thing of a seeded plan that is off the floor or out of the coordinate limit.
func legal(p *plan.Plan) error {
	lo, hi := p.Floor().At(0), p.Floor().At(2)
	for _, w := range p.Walls() {
		for i, a := range w.Line.All() {
			if !a.Legal() || !exact.InBox(lo, hi, a) {
				return fmt.Errorf("wall %s leaves the floor at %v", w.ID, a)
			}
			if i > 0 && w.Line.At(i-1) == a {
				return fmt.Errorf("wall %s has a piece of no length", w.ID)
			}
		}
	}
	for _, o := range p.Openings() {
		w, ok := p.Wall(o.Wall)
		if !ok || float64(o.At+o.Width) > exact.Dist(w.Line.At(o.Segment), w.Line.At(o.Segment+1)) {
			return fmt.Errorf("opening %s does not fit", o.ID)
		}
	}
	for _, o := range p.Observers() {
		if !exact.InBox(lo, hi, o.At) {
			return fmt.Errorf("observer %s is off the floor", o.ID)
		}
	}
	return nil
}

// A plan of 100,000 walls takes a third of a second at most on a quiet machine, ten times that with the race detector on a busy
// one; anything quadratic would take minutes.
func TestSeededPlansAreLinear(t *testing.T) {
	if testing.Short() {
		t.Skip("large plans")
	}
	for _, g := range generators {
		begun := time.Now()
		p := g.make(1, 100_000)
		if took := time.Since(begun); took > 20*time.Second {
			t.Errorf("%s of 100,000 walls took %v", g.name, took)
		} else {
			t.Logf("%s of 100,000 walls: %v", g.name, took)
		}
		if at := p.Floor().At(2); !at.Legal() {
			t.Errorf("%s of 100,000 walls reaches %v, beyond the coordinate limit", g.name, at)
		}
	}
}
