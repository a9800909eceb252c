package arrange_test

import (
	"cmp"
	"fmt"
	"slices"
	"testing"

	"pgregory.net/rapid"

	"enfilade/solver/arrange"
	"enfilade/solver/exact"
	"enfilade/solver/plan"
	"enfilade/solver/plantest"
)

// bare is an edge without its item and its bodies' numbers: what must not change when a plan is moved or put in another order.
type bare struct {
	a, b exact.Pt
	arrange.Stops
	winds string
}

// bareEdges returns the edges of g after a motion, in order; the winds are written out by what their bodies stop.
func bareEdges(g *arrange.Graph, m plantest.Motion) []bare {
	var list []bare
	for _, e := range g.Edges {
		x := bare{a: m.Point(g.Pts[e.A]), b: m.Point(g.Pts[e.B]), Stops: e.Stops}
		turn := int32(1)
		if m.Mirror { // what was to the left is to the right
			turn = -1
		}
		if x.b.Less(x.a) {
			x.a, x.b, turn = x.b, x.a, -turn
		}
		sums := map[arrange.Stops]int32{}
		for _, w := range g.Winds[e.Wind0:e.Wind1] {
			key := g.Bodies[w.Body].Stops
			if w.Body == 0 {
				key.Top = -1
			}
			sums[key] += turn * w.Delta
		}
		var keys []arrange.Stops
		for k, n := range sums {
			if n != 0 {
				keys = append(keys, k)
			}
		}
		slices.SortFunc(keys, func(a, b arrange.Stops) int { return cmp.Compare(a.Top, b.Top) })
		for _, k := range keys {
			x.winds += fmt.Sprint(k, sums[k], " ")
		}
		list = append(list, x)
	}
	slices.SortFunc(list, func(a, b bare) int { return cmp.Or(a.a.Compare(b.a), a.b.Compare(b.b)) })
	return list
}

// TestRoundLaws moves plans: shifting always moves the rounded graph along with them; turning and mirroring does when no
// crossing lies on a border between pixels, and that must be most of the time.
func TestRoundLaws(t *testing.T) {
	moved, all := 0, 0
	for name, plans := range map[string]*rapid.Generator[*plan.Plan]{"tangles": plantest.Tangles(), "specks": plantest.Specks()} {
		t.Run(name, rapid.MakeCheck(func(t *rapid.T) {
			p := plans.Draw(t, "plan")
			t.Log(plantest.Text(p))
			o, _ := arrange.Draw(p)
			m := plantest.Motion{Mirror: rapid.Bool().Draw(t, "mirror"), Turns: rapid.IntRange(0, 3).Draw(t, "turns"),
				Shift: exact.Vec{X: rapid.Int32Range(-1e6, 1e6).Draw(t, "dx"), Y: rapid.Int32Range(-1e6, 1e6).Draw(t, "dy")}}
			still := !m.Mirror && m.Turns == 0
			all++
			if !still && plantest.Halves(o) {
				return
			}
			moved++
			q, _ := arrange.Draw(plantest.Moved(p, m))
			got, want := bareEdges(arrange.Round(q), plantest.Motion{}), bareEdges(arrange.Round(o), m)
			if !slices.Equal(got, want) {
				t.Fatalf("moved by %+v: edges\n%v, want\n%v", m, got, want)
			}
		}))
	}
	if moved < all/2 {
		t.Errorf("only %d of %d plans could be moved", moved, all)
	}
}

// TestRoundOrder shuffles walls and blocks and splits walls in two: the first changes nothing but items, the second adds
// points and nothing else.
func TestRoundOrder(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		p := plantest.Tangles().Draw(t, "plan")
		t.Log(plantest.Text(p))
		o, _ := arrange.Draw(p)
		q, _ := arrange.Draw(plantest.Shuffled(p, rapid.Uint64().Draw(t, "seed")))
		got, want := bareEdges(arrange.Round(q), plantest.Motion{}), bareEdges(arrange.Round(o), plantest.Motion{})
		if !slices.Equal(got, want) {
			t.Fatalf("shuffled: edges\n%v, want\n%v", got, want)
		}
	})
}
