package arrange_test

import (
	"context"
	"testing"

	"enfilade/solver/arrange"
	"enfilade/solver/exact"
)

// TestRoundK41 is worked out by hand after Hobby 1999: on a unit grid the crossing (2, 2/3) goes to (2, 1).
func TestRoundK41(t *testing.T) {
	g := arrange.Round(&arrange.Outline{
		Bodies: make([]arrange.Body, 1),
		Segments: []arrange.Segment{
			{A: exact.Pt{X: 0, Y: 0}, B: exact.Pt{X: 6, Y: 2}, Body: arrange.NoBody},
			{A: exact.Pt{X: 0, Y: 1}, B: exact.Pt{X: 6, Y: 0}, Body: arrange.NoBody, Item: 1},
		},
	})
	want := map[[2]exact.Pt]int32{
		{{X: 0, Y: 0}, {X: 2, Y: 1}}: 0, {{X: 2, Y: 1}, {X: 6, Y: 2}}: 0,
		{{X: 0, Y: 1}, {X: 2, Y: 1}}: 1, {{X: 2, Y: 1}, {X: 6, Y: 0}}: 1,
	}
	if len(g.Edges) != len(want) {
		t.Fatalf("%d edges, want %d: %v %v", len(g.Edges), len(want), g.Pts, g.Edges)
	}
	for _, e := range g.Edges {
		item, ok := want[[2]exact.Pt{g.Pts[e.A], g.Pts[e.B]}]
		if !ok || item != e.Item {
			t.Errorf("edge %v to %v of item %d is not wanted", g.Pts[e.A], g.Pts[e.B], e.Item)
		}
	}
}

// square appends the outline of an axis-parallel square as body number b.
func square(o *arrange.Outline, b int32, x0, y0, x1, y1 int32, s arrange.Stops) {
	ring := []exact.Pt{{X: x0, Y: y0}, {X: x1, Y: y0}, {X: x1, Y: y1}, {X: x0, Y: y1}}
	for i, p := range ring {
		o.Segments = append(o.Segments, arrange.Segment{A: p, B: ring[(i+1)%4], Stops: s, Item: b, Body: b})
	}
	o.Bodies = append(o.Bodies, arrange.Body{Stops: s, Item: b})
}

func TestBuildFindsSolids(t *testing.T) {
	var o arrange.Outline
	full := arrange.Stops{Walk: true, Top: 1 << 30}
	square(&o, 0, 0, 0, 100, 100, full)
	square(&o, 1, 20, 20, 60, 60, arrange.Stops{Walk: true, Top: 900})
	square(&o, 2, 40, 40, 80, 80, full)
	square(&o, 3, 50, 50, 90, 55, arrange.Stops{Walk: true})
	m, err := arrange.Build(context.Background(), arrange.Round(&o))
	if err != nil {
		t.Fatal(err)
	}
	for _, c := range []struct {
		p    exact.Pt
		top  int32
		walk bool
	}{
		{exact.Pt{X: 10, Y: 10}, 0, false}, {exact.Pt{X: 30, Y: 30}, 900, true}, {exact.Pt{X: 50, Y: 58}, 1 << 30, true},
		{exact.Pt{X: 85, Y: 52}, 0, true}, {exact.Pt{X: -50, Y: 3}, 1<<31 - 1, true}, {exact.Pt{X: 95, Y: 95}, 0, false},
	} {
		place, ok := m.Locate(c.p)
		if !ok {
			t.Fatalf("%v not found", c.p)
		}
		if got := m.Solid[place.Tri]; got != c.top {
			t.Errorf("%v is solid up to %d, want %d", c.p, got, c.top)
		}
		if got := m.Tris[place.Tri].Flags&8 != 0; got != c.walk {
			t.Errorf("%v stops walking: %v, want %v", c.p, got, c.walk)
		}
	}
}
