package sight_test

import (
	"context"
	"math/big"
	"testing"

	"pgregory.net/rapid"

	"enfilade/solver/arrange"
	"enfilade/solver/exact"
	"enfilade/solver/mesh"
	"enfilade/solver/plantest"
	"enfilade/solver/sight"
)

// faceOf draws a face: an edge of the graph or a part of it, from either side, or two places anywhere.
func faceOf(t *rapid.T, g *arrange.Graph, at []exact.Pt) sight.Face {
	var c sight.Face
	if rapid.IntRange(0, 2).Draw(t, "face on an edge") > 0 {
		e := g.Edges[rapid.IntRange(0, len(g.Edges)-1).Draw(t, "edge")]
		c = sight.Face{A: g.Pts[e.A], B: g.Pts[e.B]}
		if m := (exact.Pt{X: (c.A.X + c.B.X) / 2, Y: (c.A.Y + c.B.Y) / 2}); rapid.Bool().Draw(t, "half of it") && exact.OnSegment(c.A, c.B, m) {
			c.A = m
		}
	} else {
		pick := rapid.IntRange(0, len(at)-1)
		c = sight.Face{A: at[pick.Draw(t, "a")], B: at[pick.Draw(t, "b")]}
	}
	if rapid.Bool().Draw(t, "back") {
		c.A, c.B = c.B, c.A
	}
	return c
}

// probes draws places from which a face may or may not be seen: anywhere, and a few units beside lines through two corners,
// where it begins to be.
func probes(t *rapid.T, g *arrange.Graph, at []exact.Pt) []exact.Pt {
	var list []exact.Pt
	pick := rapid.IntRange(0, len(at)-1)
	off := rapid.Int32Range(-3, 3)
	for range 12 {
		p, q := at[pick.Draw(t, "p")], at[pick.Draw(t, "q")]
		k := rapid.Int32Range(-4, 12).Draw(t, "k")
		s := exact.Pt{X: p.X + (q.X-p.X)/8*k + off.Draw(t, "dx"), Y: p.Y + (q.Y-p.Y)/8*k + off.Draw(t, "dy")}
		if s.Legal() {
			list = append(list, s)
		}
	}
	return list
}

// hold tells how far a place lies in the union of pieces: in one with its border, or strictly inside one.
func hold(m *mesh.Mesh, pieces []sight.Piece, p exact.Pt) (in, inside bool) {
	for _, k := range pieces {
		worst := 1
		t := m.Tris[k.Tri].P
		for i := range t {
			worst = min(worst, exact.Orient(t[i], t[(i+1)%3], p))
		}
		for _, l := range k.Lines[:k.N] {
			worst = min(worst, l.Side(p))
		}
		in, inside = in || worst >= 0, inside || worst > 0
	}
	return in, inside
}

// TestFacesAgainstTwin holds the places that see all of a face, and any part of it, against the slow exact answer from single
// places: a place that sees enough lies in the region, and one strictly inside the region sees enough.
func TestFacesAgainstTwin(t *testing.T) {
	count := map[string]int{}
	for name, plans := range plantest.Small() {
		t.Run(name, rapid.MakeCheck(func(t *rapid.T) {
			p := plans.Draw(t, "plan")
			t.Log(plantest.Text(p))
			g, m := graphAndMesh(t, p)
			twin, fast := plantest.NewTwin(g), sight.New(m)
			at := places(p, g)
			height := heights.Draw(t, "height")
			c := faceOf(t, g, at)
			if c.A == c.B {
				return
			}
			t.Logf("face %v %v, height %v", c.A, c.B, height)
			free := fast.Free(c, height)
			all, _ := fast.Whole(nil, c, height)
			var some []sight.Piece
			if free {
				var err error
				if some, err = fast.Partly(context.Background(), nil, c, height); err != nil {
					t.Fatal(err)
				}
				count["free"]++
			}
			for _, q := range probes(t, g, at) {
				seen := twin.FaceSeen(q, c.A, c.B, height)
				whole := len(seen) == 1 && plantest.Widest(seen).Cmp(big.NewRat(1, 1)) == 0
				in, inside := hold(m, all, q)
				if whole && edgeOn(g, c, q) { // whoever steps aside does not see all any more
					count["edge-on"]++
				} else if whole && !in || inside && !whole {
					t.Errorf("%v sees %v: in the region of all %v, inside it %v", q, seen, in, inside)
				}
				tally(count, "all", in, inside, whole)
				if !free {
					continue
				}
				in, inside = hold(m, some, q)
				if len(seen) > 0 && !in || inside && len(seen) == 0 {
					t.Errorf("%v sees %v: in the region of any %v, inside it %v", q, seen, in, inside)
				}
				tally(count, "any", in, inside, len(seen) > 0)
			}
		}))
	}
	t.Log(count)
	for _, k := range []string{"free", "all inside", "all out", "any inside", "any out", "any seen", "all seen"} {
		if count[k] < 50 {
			t.Errorf("only %d times %s: the test has lost its aim", count[k], k)
		}
	}
}

// edgeOn reports whether an edge between a place and a face lies along a line from the place.
func edgeOn(g *arrange.Graph, c sight.Face, p exact.Pt) bool {
	for _, e := range g.Edges {
		a, b := g.Pts[e.A], g.Pts[e.B]
		if exact.Orient(p, a, b) != 0 {
			continue
		}
		if exact.OnSegment(a, b, p) {
			if towards(c, p, a) || towards(c, p, b) {
				return true
			}
			continue
		}
		if exact.Dist2(p, b) < exact.Dist2(p, a) {
			a = b
		}
		if towards(c, p, a) && exact.Orient(c.A, c.B, a) > 0 {
			return true
		}
	}
	return false
}

// towards reports whether the face is what lies in the direction from p to q.
func towards(c sight.Face, p, q exact.Pt) bool {
	return exact.Orient(p, c.A, q) > 0 && exact.Orient(p, q, c.B) > 0
}

func tally(count map[string]int, what string, in, inside, seen bool) {
	switch {
	case inside:
		count[what+" inside"]++
	case !in:
		count[what+" out"]++
	}
	if seen {
		count[what+" seen"]++
	}
}
