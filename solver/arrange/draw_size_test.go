package arrange_test

import (
	"errors"
	"fmt"
	"testing"

	"enfilade/solver/arrange"
	"enfilade/solver/exact"
	"enfilade/solver/plan"
	"enfilade/solver/plantest"
)

// TestFits: a plan that would be told as too large for its segments is told before it is drawn, and no other: the count is at
// most that of the segments drawn.
func TestFits(t *testing.T) {
	line := func(n int) plan.Chain {
		pts := make([]exact.Pt, n)
		for i := range pts {
			pts[i] = pt(int32(i)*100, int32(i%2)*5000)
		}
		return plan.ChainOf(pts...)
	}
	for _, tt := range []struct {
		points int
		thick  int32
		fits   bool
	}{{arrange.MaxEdges + 1, 0, true}, {arrange.MaxEdges + 2, 0, false}, {arrange.MaxEdges / 2, 50, true}, {arrange.MaxEdges/2 + 2, 50, false}} {
		err := arrange.Fits(plan.From(plan.Parts{Walls: []plan.Wall{{ID: "W", Line: line(tt.points), Height: 9, Thickness: tt.thick}}}))
		var large *arrange.TooLarge
		if tt.fits != (err == nil) || err != nil && (!errors.As(err, &large) || large.Limit != arrange.MaxEdges) {
			t.Errorf("%d points, thickness %d: %v", tt.points, tt.thick, err)
		}
	}
	for seed := range 300 {
		p := plantest.Tangles().Example(seed)
		if seed%3 == 0 {
			p = plantest.Office(uint64(seed), 40)
		}
		o, problems := arrange.Draw(p)
		if n := arrange.LeastSegments(p); n > len(o.Segments) && len(problems) == 0 {
			t.Fatalf("seed %d: at least %d segments, drawn are %d\n%s", seed, n, len(o.Segments), fmt.Sprint(plantest.Text(p)))
		}
	}
}
