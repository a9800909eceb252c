package sight_test

import (
	"math"
	"slices"
	"testing"

	"pgregory.net/rapid"

	"enfilade/solver/arrange"
	"enfilade/solver/exact"
	"enfilade/solver/plan"
	"enfilade/solver/plantest"
	"enfilade/solver/sight"
)

// figures are what a region measures; nil when the eye sees nothing.
func figures(t *rapid.T, p *plan.Plan, eye exact.Pt, height int32) []float64 {
	_, m := graphAndMesh(t, p)
	r, err := sight.New(m).Region(eye, height)
	if err != nil {
		return nil
	}
	l := r.Lengths()
	return []float64{r.Area(), l[sight.Wall], l[sight.Occluding]}
}

// TestRegionLaws: a region measures the same, to the last bit, when the plan is shifted, when its walls come in another
// order and when walls are split in two; and to a few bits when it is turned or mirrored, unless a crossing lies on a
// border between pixels.
func TestRegionLaws(t *testing.T) {
	for name, plans := range plantest.Small() {
		t.Run(name, rapid.MakeCheck(func(t *rapid.T) {
			p := plans.Draw(t, "plan")
			if p.Floor().Len() == 0 { // the box would follow the marks, which the laws leave where they are
				t.Skip("no floor")
			}
			t.Log(plantest.Text(p))
			g, _ := graphAndMesh(t, p)
			at := places(p, g)
			eye := at[rapid.IntRange(0, len(at)-1).Draw(t, "eye")]
			height := heights.Draw(t, "height")
			want := figures(t, p, eye, height)
			same := func(what string, got []float64) {
				if !slices.Equal(got, want) {
					t.Errorf("eye %v, height %v, %s: %v, want %v", eye, height, what, got, want)
				}
			}
			shift := plantest.Motion{Shift: exact.Vec{X: rapid.Int32Range(-1e6, 1e6).Draw(t, "dx"), Y: rapid.Int32Range(-1e6, 1e6).Draw(t, "dy")}}
			same("shifted", figures(t, plantest.Moved(p, shift), shift.Point(eye), height))
			same("shuffled", figures(t, plantest.Shuffled(p, rapid.Uint64().Draw(t, "seed")), eye, height))
			if split, n := plantest.SplitWalls(p); n > 0 && !plantest.Bends(p, split) {
				same("split", figures(t, split, eye, height))
			}
			m := plantest.Motion{Mirror: rapid.Bool().Draw(t, "mirror"), Turns: rapid.IntRange(0, 3).Draw(t, "turns")}
			if o, _ := arrange.Draw(p); plantest.Halves(o) {
				return
			}
			got := figures(t, plantest.Moved(p, m), m.Point(eye), height)
			ok := len(got) == len(want)
			for i := range got {
				ok = ok && (near(got[i], want[i]) || i == 0 && math.Abs(got[0]-want[0]) < 1e-6*(want[1]+want[2]))
			}
			if !ok {
				t.Errorf("eye %v, height %v, %+v: %v, want %v", eye, height, m, got, want)
			}
		}))
	}
}
