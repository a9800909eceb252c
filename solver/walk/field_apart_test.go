package walk

import (
	"context"
	"math"
	"testing"

	"enfilade/solver/exact"
	"enfilade/solver/mesh"
)

// ringed returns a mesh of the ring of points, with floor inside.
func ringed(t *testing.T, pts []exact.Pt) *mesh.Mesh {
	t.Helper()
	var edges [][2]int32
	for i := range pts {
		edges = append(edges, [2]int32{int32(i), int32((i + 1) % len(pts))})
	}
	tr, err := mesh.Triangulate(context.Background(), pts, edges)
	if err != nil {
		t.Fatal(err)
	}
	solid := make([]mesh.Tag, tr.Len())
	for k := range solid {
		for _, v := range tr.Corners(int32(k)) {
			if int(v) >= len(pts) { // at the box
				solid[k].Walk = true
			}
		}
	}
	m, err := tr.Finish(context.Background(), make([]mesh.Tag, len(edges)), solid)
	if err != nil {
		t.Fatal(err)
	}
	return m
}

// TestSpanOfThreeWays measures a zone around a point that is as far by three ways, whose last legs are 5, 13 and 17 long and come
// from all sides: no other point is as far.
func TestSpanOfThreeWays(t *testing.T) {
	const k = 1000
	pt := func(x, y int32) exact.Pt { return exact.Pt{X: x * k, Y: y * k} }
	m := ringed(t, []exact.Pt{pt(-900, -700), pt(900, -700), pt(0, 900)})
	zone := ringed(t, []exact.Pt{pt(-2, -1), pt(2, -1), pt(0, 2)})
	d := &Field{m: m, roots: []root{{pt(-3, -4), 15 * k}, {pt(12, -5), 7 * k}, {pt(-8, 15), 3 * k}}}
	for i := range m.Tris {
		d.first = append(d.first, int32(len(d.parts)))
		if m.Tris[i].Flags&mesh.FlagNoWalk == 0 {
			d.parts = append(d.parts, part{0, exact.Vec{X: 9, Y: 0}, exact.Vec{X: 0, Y: 9}},
				part{1, exact.Vec{X: 0, Y: 9}, exact.Vec{X: -9, Y: 0}}, part{2, exact.Vec{X: 0, Y: -9}, exact.Vec{X: 9, Y: 0}})
		}
	}
	d.first = append(d.first, int32(len(d.parts)))
	s := d.Span(NewZone(m, zone))
	if math.Abs(s.Far-20*k) > 1e-8 || math.Hypot(s.FarAt[0], s.FarAt[1]) > 1e-8 {
		t.Errorf("farthest %v at %v, want 20,000 at the origin", s.Far, s.FarAt)
	}
}
