package arrange_test

import (
	"context"
	"math"
	"math/rand/v2"
	"testing"

	"enfilade/solver/arrange"
	"enfilade/solver/exact"
	"enfilade/solver/mesh"
	"enfilade/solver/plan"
	"enfilade/solver/plantest"
)

// growSlowly does what Grow does, without going round anything: every edge of an obstacle makes a body of its own, the hull of
// the disc at its two ends.
func growSlowly(o *arrange.Outline, m *mesh.Mesh, radius int32, sides int) *arrange.Outline {
	disc, _ := arrange.Disc(radius, sides)
	out := *o
	out.Items = append(append([]plan.Ref(nil), o.Items...), plan.Ref{Kind: plan.KindWalker})
	item := int32(len(out.Items) - 1)
	for t := range m.Tris {
		tri := &m.Tris[t]
		for i := range 3 {
			if tri.Flags&mesh.FlagNoWalk != 0 || !tri.StopsWalk(i) {
				continue
			}
			stops := arrange.Stops{Walk: true}
			body := int32(len(out.Bodies))
			out.Bodies = append(out.Bodies, arrange.Body{Stops: stops, Item: item})
			ring := hull(disc, tri.P[i], tri.P[mesh.Inc(i)])
			for k, p := range ring {
				out.Segments = append(out.Segments, arrange.Segment{A: p, B: ring[(k+1)%len(ring)], Stops: stops, Item: item, Body: body})
			}
		}
	}
	return &out
}

// hull returns the hull of the disc at a and at b: each of its corners moves to b when that leads outwards, and to both where
// it leads along a tangent.
func hull(disc []exact.Vec, a, b exact.Pt) (ring []exact.Pt) {
	d, n := b.Sub(a), len(disc)
	for i, v := range disc {
		in, out := v.Minus(disc[(i+n-1)%n]), disc[(i+1)%n].Minus(v)
		ahead, behind := in.Cross(d) < 0, out.Cross(d) < 0 // d lies to the right of the side: that side stays at b
		switch {
		case ahead && behind:
			ring = append(ring, b.Add(v))
		case ahead:
			ring = append(ring, b.Add(v), a.Add(v))
		case behind:
			ring = append(ring, a.Add(v), b.Add(v))
		default:
			ring = append(ring, a.Add(v))
		}
	}
	return ring
}

// TestGrowAgainstHulls: the floor that Grow leaves open is the one that the hulls of all edges leave open, but for what
// rounding other crossings moves: by a unit or so along the borders.
func TestGrowAgainstHulls(t *testing.T) {
	plans := map[string]*plan.Plan{}
	for seed := range plantest.Seeds(2) {
		plans["office"] = plantest.Office(seed, 60)
		plans["clutter"] = plantest.Clutter(seed, 40)
		plans["maze"] = plantest.Maze(seed, 60)
		for i := range 12 {
			plans["tangle"] = plantest.Tangles().Example(int(seed)*12 + i)
			plans["speck"] = plantest.Specks().Example(int(seed)*12 + i)
			for name, p := range plans {
				testAgainstHulls(t, name, p, seed)
			}
			plans = map[string]*plan.Plan{}
		}
	}
}

func testAgainstHulls(t *testing.T, name string, p *plan.Plan, seed uint64) {
	t.Helper()
	o, _ := arrange.Draw(p)
	plain := built(t, o)
	random := rand.New(rand.NewPCG(seed, 5))
	for _, sides := range allSides {
		for _, radius := range []int32{1, 40, 700, 2500} {
			quick, slow := built(t, arrange.Grow(o, plain, radius, sides)), built(t, growSlowly(o, plain, radius, sides))
			lo, hi := plain.Box()
			for range 1500 {
				p := exact.Pt{X: lo.X + random.Int32N(hi.X-lo.X), Y: lo.Y + random.Int32N(hi.Y-lo.Y)}
				if closed(quick, p) != closed(slow, p) && !rimmed(slow, p) {
					t.Fatalf("%s, seed %d, radius %d, %d sides: %v is shut: %v, by the hulls: %v", name, seed, radius, sides, p, closed(quick, p), closed(slow, p))
				}
			}
			a, b := openArea(quick), openArea(slow)
			if most := 1.5 * rim(slow) / 1e8; a-b > most || b-a > most {
				t.Errorf("%s, seed %d, radius %d, %d sides: %v m² are open, by the hulls %v", name, seed, radius, sides, a, b)
			}
		}
	}
}

func built(t testing.TB, o *arrange.Outline) *mesh.Mesh {
	t.Helper()
	m, err := arrange.Build(context.Background(), arrange.Round(o))
	if err != nil {
		t.Fatal(err)
	}
	return m
}

// rimmed reports whether p lies within two units of a border of the open floor.
func rimmed(m *mesh.Mesh, p exact.Pt) bool {
	for t := range m.Tris {
		for i := range 3 {
			if tri := &m.Tris[t]; tri.Flags&mesh.FlagNoWalk == 0 && tri.StopsWalk(i) && toSegment(p, tri.P[i], tri.P[mesh.Inc(i)]) < 2 {
				return true
			}
		}
	}
	return false
}

// rim returns how long the borders of the open floor are, in grid units.
func rim(m *mesh.Mesh) float64 {
	sum := 0.0
	for t := range m.Tris {
		for i := range 3 {
			if tri := &m.Tris[t]; tri.Flags&mesh.FlagNoWalk == 0 && tri.StopsWalk(i) {
				sum += math.Sqrt(float64(tri.P[mesh.Inc(i)].Sub(tri.P[i]).Len2()))
			}
		}
	}
	return sum
}
