package sight_test

import (
	"context"
	"math"
	"math/big"
	"testing"

	"pgregory.net/rapid"

	"enfilade/solver/arrange"
	"enfilade/solver/exact"
	"enfilade/solver/plantest"
	"enfilade/solver/sight"
)

// TestSeesPartAgainstTwin holds whether any part of a face is seen from an eye, with and without a view, against the slow exact
// answer, from faces, ends, corners and crossings.
func TestSeesPartAgainstTwin(t *testing.T) {
	count := map[bool]int{}
	for name, plans := range plantest.Small() {
		t.Run(name, rapid.MakeCheck(func(t *rapid.T) {
			p := plans.Draw(t, "plan")
			t.Log(plantest.Text(p))
			g, m := graphAndMesh(t, p)
			twin, f := plantest.NewTwin(g), sight.New(m)
			at := places(p, g)
			height := heights.Draw(t, "height")
			c := faceOf(t, g, at)
			if c.A == c.B || !f.Free(c, height) {
				return
			}
			for _, eye := range append(probes(t, g, at), rapid.SampledFrom(at).Draw(t, "eye")) {
				clip, view := sight.Clip{}, (*plantest.View)(nil)
				if rapid.Bool().Draw(t, "view") {
					clip = sight.View(rapid.Float64Range(0, 360).Draw(t, "heading"), rapid.Float64Range(1, 300).Draw(t, "angle"))
					view = &plantest.View{Right: clip.Right, Mid: clip.Mid, Left: clip.Left}
				}
				got := f.SeesPart(eye, c, height, clip)
				if want := len(twin.FaceSeenWithin(eye, c.A, c.B, height, view)) > 0; got != want {
					t.Errorf("face %v from %v at %v within %+v: %v, want %v", c, eye, height, clip, got, want)
				}
				count[got]++
			}
		}))
	}
	if count[true] < 100 || count[false] < 100 {
		t.Errorf("%v: the test has lost its aim", count)
	}
}

// TestSeesPartInRange looks at a wall 4 m away through ranges that reach just one end of the face, all of it, or none.
func TestSeesPartInRange(t *testing.T) {
	f := sight.New(build(t, "floor 0,0 10,0 10,10 0,10"))
	eye := exact.Pt{X: 20000, Y: 40000}
	c := sight.Face{A: exact.Pt{X: 30000}, B: exact.Pt{X: 80000}}
	for _, k := range []struct {
		radius int32
		want   bool
	}{{41200, false}, {41250, true}, {70000, true}, {39000, false}} { // its near end is sqrt 17 m = 4.1231 m away
		if got := f.SeesPart(eye, c, 16000, sight.Clip{Range: sight.RangePolygon(eye, k.radius)}); got != k.want {
			t.Errorf("range %d: %v, want %v", k.radius, got, k.want)
		}
	}
}

// TestGlimpse holds that the point of the face that is said to be in view from a place that sees part of it is in view: from
// places strictly inside a piece the exact answer must show it.
func TestGlimpse(t *testing.T) {
	held := 0
	for name, plans := range plantest.Small() {
		if name == "giants" {
			continue // a point of the face is measured there to less than the gaps it is seen through
		}
		t.Run(name, rapid.MakeCheck(func(t *rapid.T) {
			p := plans.Draw(t, "plan")
			t.Log(plantest.Text(p))
			g, m := graphAndMesh(t, p)
			twin, f := plantest.NewTwin(g), sight.New(m)
			at := places(p, g)
			height := heights.Draw(t, "height")
			c := faceOf(t, g, at)
			if c.A == c.B || !f.Free(c, height) {
				return
			}
			pieces, _ := f.Partly(context.Background(), nil, c, height)
			for _, q := range probes(t, g, at) {
				for i := range pieces {
					if _, inside := hold(m, pieces[i:i+1], q); !inside {
						continue
					}
					if int(pieces[i].Origin) != i {
						t.Fatalf("piece %d says it is %d", i, pieces[i].Origin)
					}
					u, v := f.Glimpse(c, &pieces[i], float64(q.X), float64(q.Y))
					share := ((u-float64(c.A.X))*float64(c.B.X-c.A.X) + (v-float64(c.A.Y))*float64(c.B.Y-c.A.Y)) / float64(exact.Dist2(c.A, c.B))
					best := math.Inf(1)
					for _, s := range twin.FaceSeen(q, c.A, c.B, height) {
						lo, _ := s.Lo.Float64()
						hi, _ := s.Hi.Float64()
						best = min(best, max(lo-share, share-hi))
					}
					if best > 1e-9 {
						t.Errorf("face %v from %v at %v: share %v is out of view by %v", c, q, height, share, best)
					}
					held++
				}
			}
		}))
	}
	if held < 100 {
		t.Errorf("only %d glimpses: the test has lost its aim", held)
	}
}

// TestShareAgainstTwin holds the places that see a share of a face in one stretch against the slow exact answer: none that sees
// less counts, and none that sees wider by the stated error is left out.
func TestShareAgainstTwin(t *testing.T) {
	count := map[string]int{}
	for name, plans := range plantest.Small() {
		if name == "specks" { // faces of a few grid units
			continue
		}
		t.Run(name, rapid.MakeCheck(func(t *rapid.T) {
			p := plans.Draw(t, "plan")
			t.Log(plantest.Text(p))
			g, m := graphAndMesh(t, p)
			twin, f := plantest.NewTwin(g), sight.New(m)
			at := places(p, g)
			height := heights.Draw(t, "height")
			c := faceOf(t, g, at)
			if c.A == c.B || !f.Free(c, height) {
				return
			}
			share := rapid.Float64Range(0.01, 0.99).Draw(t, "share")
			pieces, _, err := f.Share(context.Background(), nil, c, share, height)
			if err != nil {
				return
			}
			slanting := c.A.X != c.B.X && c.A.Y != c.B.Y
			if slanting && rough(g, c) {
				return
			}
			least := new(big.Rat).SetFloat64(share)
			sure := new(big.Rat).SetFloat64(share + sight.ShareError(c, share))
			for _, q := range probes(t, g, at) {
				widest := plantest.Widest(twin.FaceSeen(q, c.A, c.B, height))
				in, inside := hold(m, pieces, q)
				if slanting && grazes(c, q) {
					continue
				}
				w, _ := widest.Float64()
				if inside && widest.Cmp(least) < 0 {
					t.Errorf("face %v from %v at %v: sees %v and counts for %v", c, q, height, w, share)
				}
				if !in && widest.Cmp(sure) >= 0 && !edgeOn(g, c, q) {
					t.Errorf("face %v from %v at %v: sees %v and does not count for %v", c, q, height, w, share)
				}
				tally(count, "share", in, inside, w > 0)
			}
		}))
	}
	if count["share inside"] < 50 || count["share out"] < 50 || count["share seen"] < 50 {
		t.Errorf("%v: the test has lost its aim", count)
	}
}

// rough reports whether an edge comes within three grid units before a face.
func rough(g *arrange.Graph, c sight.Face) bool {
	length := exact.Dist(c.A, c.B)
	place := func(p exact.Pt) (along, off float64) {
		return float64(c.B.Sub(c.A).Dot(p.Sub(c.A))) / length, float64(exact.Area2(c.A, c.B, p)) / length
	}
	for _, e := range g.Edges {
		x0, y0 := place(g.Pts[e.A])
		x1, y1 := place(g.Pts[e.B])
		if x0 > x1 {
			x0, y0, x1, y1 = x1, y1, x0, y0
		}
		at := func(x float64) float64 { return y0 + (y1-y0)*min(max((x-x0)/max(x1-x0, 1e-9), 0), 1) }
		lo, hi := max(x0, -3), min(x1, length+3)
		if lo <= hi && min(at(lo), at(hi)) <= 3 && max(at(lo), at(hi)) > 0 {
			return true
		}
	}
	return false
}

// grazes reports whether a place lies within about three degrees of the line of a face, as seen from either end.
func grazes(c sight.Face, p exact.Pt) bool {
	height := float64(exact.Area2(c.A, c.B, p)) / exact.Dist(c.A, c.B)
	return height < 0.05*max(exact.Dist(c.A, p), exact.Dist(c.B, p))
}
