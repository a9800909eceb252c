package arrange_test

import (
	"cmp"
	"reflect"
	"slices"
	"testing"

	"pgregory.net/rapid"

	"enfilade/solver/arrange"
	"enfilade/solver/exact"
	"enfilade/solver/plan"
	"enfilade/solver/plantest"
)

// sortWinds puts the winds of each edge into the order of their bodies: their order means nothing.
func sortWinds(g *arrange.Graph) {
	for _, e := range g.Edges {
		slices.SortFunc(g.Winds[e.Wind0:e.Wind1], func(a, b arrange.Wind) int { return cmp.Compare(a.Body, b.Body) })
	}
}

// sameRounding holds the fast rounding against the one by definition, edge for edge.
func sameRounding(t *rapid.T, o *arrange.Outline) *arrange.Graph {
	got, want := arrange.Round(o), plantest.Rounded(o)
	sortWinds(got)
	if !slices.Equal(got.Pts, want.Pts) {
		t.Fatalf("points\n%v, want\n%v", got.Pts, want.Pts)
	}
	for i := range max(len(got.Edges), len(want.Edges)) {
		if i >= len(got.Edges) || i >= len(want.Edges) || got.Edges[i] != want.Edges[i] {
			t.Fatalf("edges\n%v, want\n%v", got.Edges, want.Edges)
		}
	}
	if !slices.Equal(got.Winds, want.Winds) || !reflect.DeepEqual(got.Bodies, want.Bodies) || !slices.Equal(got.Items, want.Items) {
		t.Fatalf("winds\n%v, want\n%v", got.Winds, want.Winds)
	}
	if err := plantest.CheckGraph(got); err != nil {
		t.Fatal(err)
	}
	return got
}

func TestRoundAgainstTwin(t *testing.T) {
	for name, plans := range plantest.Small() {
		t.Run(name, rapid.MakeCheck(func(t *rapid.T) {
			p := plans.Draw(t, "plan")
			t.Log(plantest.Text(p))
			o, _ := arrange.Draw(p)
			sameRounding(t, o)
		}))
	}
}

// Bare segments with any ends in a few units, and with ends far apart, so that pixels are passed by many lines at once.
func TestRoundSegmentsAgainstTwin(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		reach := rapid.SampledFrom([]int32{3, 6, 20, exact.Limit - 1}).Draw(t, "reach")
		at := rapid.Int32Range(-reach, reach)
		o := &arrange.Outline{Items: []plan.Ref{{}}}
		for range rapid.IntRange(1, 14).Draw(t, "segments") {
			s := arrange.Segment{A: exact.Pt{X: at.Draw(t, "ax"), Y: at.Draw(t, "ay")}, B: exact.Pt{X: at.Draw(t, "bx"), Y: at.Draw(t, "by")},
				Stops: arrange.Stops{Walk: rapid.Bool().Draw(t, "walk"), Top: rapid.Int32Range(0, 2).Draw(t, "top")}, Body: arrange.NoBody}
			if s.A != s.B {
				o.Segments = append(o.Segments, s)
			}
		}
		sameRounding(t, o)
	})
}

// Two segments that cross at (2, 2/3): worked out by hand after the definition in Hobby, CGTA 13 (1999).
func TestRoundByHand(t *testing.T) {
	line := func(ax, ay, bx, by int32) arrange.Segment {
		return arrange.Segment{A: exact.Pt{X: ax, Y: ay}, B: exact.Pt{X: bx, Y: by}, Body: arrange.NoBody}
	}
	g := arrange.Round(&arrange.Outline{Segments: []arrange.Segment{line(0, 0, 6, 2), line(0, 1, 6, 0)}, Items: []plan.Ref{{}}})
	pts := []exact.Pt{{X: 0, Y: 0}, {X: 0, Y: 1}, {X: 2, Y: 1}, {X: 6, Y: 0}, {X: 6, Y: 2}}
	edges := [][2]int32{{0, 2}, {1, 2}, {2, 3}, {2, 4}}
	if !slices.Equal(g.Pts, pts) {
		t.Fatalf("points %v, want %v", g.Pts, pts)
	}
	for i, e := range g.Edges {
		if len(g.Edges) != len(edges) || edges[i] != [2]int32{e.A, e.B} {
			t.Fatalf("edges %v, want %v", g.Edges, edges)
		}
	}
}
