package study_test

import (
	"context"
	"math"
	"math/big"
	"testing"

	"pgregory.net/rapid"

	"enfilade/solver/arrange"
	"enfilade/solver/exact"
	"enfilade/solver/plan"
	"enfilade/solver/plantest"
	"enfilade/solver/sight"
	"enfilade/solver/study"
)

// TestFaceApproachesAgainstTwin holds approaches to faces on plans full of degeneracies against the slow exact twin: no place that
// sees enough is nearer than the walk, by the twin's walk to it; where no walk leads to one, none of them can be walked to.
func TestFaceApproachesAgainstTwin(t *testing.T) {
	count := map[string]int{}
	for name, plans := range plantest.Small() {
		if name == "giants" || name == "specks" { // one step of a grid unit is all there is, or nothing
			continue
		}
		t.Run(name, rapid.MakeCheck(func(t *rapid.T) {
			parts := plans.Draw(t, "plan").Parts()
			o, _ := arrange.Draw(plan.From(parts))
			g := arrange.Round(o)
			pick := rapid.IntRange(0, len(g.Pts)-1)
			c := sight.Face{A: g.Pts[pick.Draw(t, "a")], B: g.Pts[pick.Draw(t, "b")]}
			m, err := arrange.Build(context.Background(), g)
			if err != nil {
				t.Fatal(err)
			}
			if c.A == c.B || !sight.New(m).Free(c, parts.Walker.Eye) {
				return
			}
			parts.Targets[0].Face = &[2]exact.Pt{c.A, c.B}
			if parts.Walker.Seen = plan.SeenAny; rapid.Bool().Draw(t, "all") {
				parts.Walker.Seen = plan.SeenAll
			}
			p := plan.From(parts)
			t.Log(plantest.Text(p), "face", c, "seen", parts.Walker.Seen)
			r, err := study.Solve(context.Background(), p)
			if err != nil {
				t.Fatal(err)
			}
			twin := plantest.NewTwin(g)
			sees := func(q exact.Pt) bool {
				seen := twin.FaceSeen(q, c.A, c.B, parts.Walker.Eye)
				return len(seen) > 0 && (parts.Walker.Seen == plan.SeenAny || plantest.Widest(seen).Cmp(big.NewRat(1, 1)) == 0)
			}
			// A place on the line along a thin wall sees past it and none beside it does, so those beside it must see enough too.
			enough := func(q exact.Pt) bool {
				for _, e := range g.Edges {
					if exact.OnSegment(g.Pts[e.A], g.Pts[e.B], q) {
						return false
					}
				}
				return twin.Stands(q) && sees(q) && sees(q.Add(exact.Vec{X: 2, Y: 1})) && sees(q.Add(exact.Vec{X: -1, Y: 2}))
			}
			a := r.Approaches[0]
			if a.Problem != "" {
				return
			}
			start := parts.Starts[0].At
			for range 6 {
				s, q := g.Pts[pick.Draw(t, "s")], g.Pts[pick.Draw(t, "q")]
				k := rapid.Int32Range(1, 7).Draw(t, "k")
				at := exact.Pt{X: s.X + (q.X-s.X)/8*k + 1, Y: s.Y + (q.Y-s.Y)/8*k + 1}
				if !enough(at) {
					continue
				}
				count["places"]++
				w := twin.Walk(start, at)
				if math.IsInf(w.Length, 1) {
					continue
				}
				if a.Status == study.StatusNone || a.Length > w.Length/exact.PerMM*(1+1e-12)+1e-7 {
					t.Errorf("status %v, %v mm, yet %v sees enough %v mm away", a.Status, a.Length, at, w.Length/exact.PerMM)
				}
			}
			if a.Status != study.StatusApproach {
				return
			}
			// So too about the last leg: seeing begins at its end, not before.
			n := len(a.Points)
			from, end := a.Points[n-2], a.Points[n-1]
			for _, share := range []float64{0.25, 0.5, 0.75} {
				back := gridPoint([2]float64{from[0] + (end[0]-from[0])*share, from[1] + (end[1]-from[1])*share})
				if twin.Stands(back) && twin.Walk(start, back).Length/exact.PerMM < a.Length*(1-1e-12)-1e-7 {
					count["steps back"]++
					if enough(back) {
						t.Errorf("%v, on the way to %v, sees enough before the end", back, end)
					}
				}
			}
		}))
	}
	if count["places"] < 30 || count["steps back"] < 10 {
		t.Errorf("%v: the test has lost its aim", count)
	}
}
