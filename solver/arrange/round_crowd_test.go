package arrange_test

import (
	"context"
	"errors"
	"fmt"
	"slices"
	"testing"

	"enfilade/solver/arrange"
	"enfilade/solver/exact"
	"enfilade/solver/plan"
	"enfilade/solver/plantest"
)

// TestRoundOfBunches: where two wheels of spokes share cells, every crossing of the one's spokes with the other's is found: as
// many as when all pairs are tried.
func TestRoundOfBunches(t *testing.T) {
	var segs []arrange.Segment
	for i := range int32(150) {
		for _, s := range [][2]exact.Pt{{{}, {X: 20000, Y: 97 * i}}, {{X: 20011, Y: 50}, {X: 13 - i%3, Y: 101 * i}}, {{X: 7 * i, Y: -300}, {X: 9000 + i*31, Y: 9000}}} {
			segs = append(segs, arrange.Segment{A: s[0], B: s[1]})
		}
	}
	got, want := arrange.CrowdedCrossings(segs), arrange.PairCrossings(segs)
	if !slices.Equal(got, want) {
		t.Errorf("%d crossings, want %d", len(got), len(want))
	}
	if len(want) < 10_000 {
		t.Errorf("only %d crossings: the spokes lost their aim", len(want))
	}
}

// TestRoundOfPile: segments that lie in one place, some of them the other way round, are compared with others once, and all
// crossings are found. 20,000 walls in one place are rounded; pair by pair they would take minutes.
func TestRoundOfPile(t *testing.T) {
	var segs []arrange.Segment
	for i := range int32(200) {
		a, b := exact.Pt{X: i % 5, Y: 0}, exact.Pt{X: 3000 - i%3, Y: 2000 + i%4}
		if i%7 < 3 {
			a, b = exact.Pt{X: 1000, Y: i % 11 * -5}, exact.Pt{X: 900 + i%2, Y: 1500}
		}
		if i%2 == 0 {
			a, b = b, a
		}
		segs = append(segs, arrange.Segment{A: a, B: b})
	}
	got, want := slices.Compact(arrange.CrowdedCrossings(segs)), slices.Compact(arrange.PairCrossings(segs))
	if !slices.Equal(got, want) || len(want) < 100 {
		t.Errorf("%d crossings, want %d", len(got), len(want))
	}
	var p plan.Parts
	for i := range 20_000 {
		p.Walls = append(p.Walls, plan.Wall{ID: fmt.Sprint("W", i), Line: chain("0,0 50000,0"), Height: plan.Ceiling, Thickness: 2000})
	}
	o, _ := arrange.Draw(plan.From(p))
	if g := arrange.Round(o); len(g.Edges) != 4+4 || len(g.Winds) != 4+4*20_000 {
		t.Errorf("%d edges, %d windings", len(g.Edges), len(g.Winds))
	}
}

// TestRoundOfFan: 20,000 walls that start at one point are rounded; pair by pair they would take minutes on a slow machine.
func TestRoundOfFan(t *testing.T) {
	o, _ := arrange.Draw(plantest.Fan(20_000))
	if g := arrange.Round(o); len(g.Edges) < 20_000 {
		t.Errorf("%d edges", len(g.Edges))
	}
}

// TestTooLargeIsToldEarly: walls that cross far too often are told from before their crossings fill the memory.
func TestTooLargeIsToldEarly(t *testing.T) {
	o, _ := arrange.Draw(plantest.Grid(7000)) // 12 million crossings
	_, err := arrange.NewSite(context.Background(), o)
	var large *arrange.TooLarge
	if !errors.As(err, &large) || large.Limit != arrange.MaxEdges || !large.Least || large.Edges > 3*arrange.MaxEdges {
		t.Fatalf("error %v", err)
	}
	t.Log(err)
}
