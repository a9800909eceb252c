package walk_test

import (
	"context"
	"fmt"
	"math"
	"slices"
	"testing"

	"enfilade/solver/exact"
	"enfilade/solver/plantest"
	"enfilade/solver/sight"
	"enfilade/solver/walk"
)

// crowd is a plan with many starts and many targets, each of which is a goal of every start's flood.
type crowd struct {
	walker *walk.Finder
	starts []exact.Pt
	goals  []walk.Goal
}

// newCrowd puts 10 starts and 50 targets down all over a plan.
func newCrowd(tb testing.TB, g *plantest.Ground) *crowd {
	tb.Helper()
	c := &crowd{walker: walk.New(g.Mesh)}
	places := g.Places(4, 60)
	eyes := sight.New(g.Mesh)
	c.starts = places[:10]
	for _, p := range places[10:] {
		cones, err := eyes.Cones(p, plantest.Eye, sight.Clip{})
		if err != nil {
			tb.Fatal(err)
		}
		c.goals = append(c.goals, walk.Goal{Eye: p, Cones: slices.Clone(cones)})
	}
	return c
}

// all floods from every start to all targets at once and returns the cones that took, and the walks.
func (c *crowd) all(tb testing.TB) (cones int, paths [][]walk.Path) {
	tb.Helper()
	for _, s := range c.starts {
		p, err := c.walker.Flood(context.Background(), s, c.goals)
		if err != nil {
			tb.Fatal(err)
		}
		cones += c.walker.Expanded
		paths = append(paths, p)
	}
	return cones, paths
}

// whole returns the most cones that a flood over all of the floor takes from one of the starts.
func (c *crowd) whole(tb testing.TB) int {
	tb.Helper()
	most := 0
	for _, s := range c.starts {
		if _, err := c.walker.Field(context.Background(), s); err != nil {
			tb.Fatal(err)
		}
		most = max(most, c.walker.Expanded)
	}
	return most
}

// TestFloodsAreShared holds that 10 starts x 50 targets cost no more than 10 floods over all of the floor, counted in cones that
// enter a triangle, and give the walks that single floods give.
func TestFloodsAreShared(t *testing.T) {
	for _, kind := range plantest.Kinds {
		g, err := plantest.NewGround(kind.Make(1, 1000))
		if err != nil {
			t.Fatal(err)
		}
		c := newCrowd(t, g)
		cones, paths := c.all(t)
		singles, one := 0, c.whole(t)
		for i, s := range c.starts {
			for k, goal := range c.goals {
				p, err := c.walker.Flood(context.Background(), s, []walk.Goal{goal})
				if err != nil {
					t.Fatal(err)
				}
				singles += c.walker.Expanded
				if want := paths[i][k]; p[0].Found != want.Found || math.Abs(p[0].Length-want.Length) > 1e-9*want.Length {
					t.Errorf("%s: from %v to %v: %v m alone, %v m with the others", kind.Name, s, goal.Eye, p[0].Length, want.Length)
				}
			}
		}
		t.Logf("%s: %d cones for all, %.1f times a flood over all of the floor; %d for each by itself", kind.Name, cones, float64(cones)/float64(one), singles)
		if cones > 10*one {
			t.Errorf("%s: all take %d cones, a flood over all of the floor %d", kind.Name, cones, one)
		}
		if cones >= singles {
			t.Errorf("%s: all take %d cones, each by itself %d", kind.Name, cones, singles)
		}
	}
}

// BenchmarkAllApproaches measures 10 starts x 50 targets, and reports how many floods over all of the floor that is worth.
func BenchmarkAllApproaches(b *testing.B) {
	for _, kind := range plantest.Kinds {
		for _, walls := range []int{1000, 10_000, 100_000} {
			b.Run(fmt.Sprintf("plan=%s/walls=%d", kind.Name, walls), func(b *testing.B) {
				g, err := plantest.NewGround(kind.Make(1, walls))
				if err != nil {
					b.Fatal(err)
				}
				c := newCrowd(b, g)
				cones, _ := c.all(b)
				one := c.whole(b)
				b.ReportAllocs()
				for b.Loop() {
					c.all(b)
				}
				b.ReportMetric(float64(cones)/float64(one), "floods")
			})
		}
	}
}
