package sight_test

import (
	"testing"

	"pgregory.net/rapid"

	"enfilade/solver/exact"
	"enfilade/solver/plantest"
	"enfilade/solver/sight"
)

// TestNearPolygon holds that the polygon lies outside its circle, nowhere more than 1 mm, and that it is the same after a
// quarter turn.
func TestNearPolygon(t *testing.T) {
	eye := exact.Pt{X: 12345, Y: -6789}
	for _, r := range []int32{1, 2, 3, 7, 15, 16, 100, 999, 12345, 400000, 5_000_000, 100_000_000} {
		ring := sight.NearPolygon(eye, r)
		for i, p := range ring {
			q := ring[(i+1)%len(ring)]
			if exact.Orient(eye, p, q) <= 0 {
				t.Fatalf("radius %d: corner %d does not turn left", r, i)
			}
			if reach := exact.Dist(eye, p); reach > float64(r)+10 {
				t.Errorf("radius %d: corner %d lies %v beyond", r, i, reach-float64(r))
			}
			// The foot on the edge is its nearest point: area² >= r² · length², exactly.
			s, n := exact.Area2(eye, p, q), exact.Dist2(p, q)
			if exact.Mul(s, s).Sub(exact.Mul(int64(r)*int64(r), n)).Sign() < 0 {
				t.Errorf("radius %d: edge %d cuts the circle", r, i)
			}
			if v, w := p.Sub(eye).Left(), ring[(i+len(ring)/4)%len(ring)].Sub(eye); v != w {
				t.Fatalf("radius %d: corner %d turns to %v, not %v", r, i, v, w)
			}
		}
	}
}

// TestLimited holds the pieces within limits against the limits themselves, at single places: strictly inside a piece means
// strictly within all limits, and strictly within all of them means inside a piece.
func TestLimited(t *testing.T) {
	in, out := 0, 0
	for name, plans := range plantest.Small() {
		if name == "giants" || name == "specks" { // limits of no more than a few units, or beyond the legal range
			continue
		}
		t.Run(name, rapid.MakeCheck(func(t *rapid.T) {
			p := plans.Draw(t, "plan")
			t.Log(plantest.Text(p))
			g, m := graphAndMesh(t, p)
			f := sight.New(m)
			at := places(p, g)
			pick := rapid.IntRange(0, len(at)-1)
			eye, about := at[pick.Draw(t, "eye")], at[pick.Draw(t, "about")]
			cones, err := f.Cones(eye, 16000, sight.Clip{})
			if err != nil {
				return
			}
			lim := sight.Limits{At: about}
			if rapid.Bool().Draw(t, "sides") {
				v := sight.View(rapid.Float64Range(0, 360).Draw(t, "heading"), rapid.Float64Range(1, 180).Draw(t, "view"))
				lim.Sides, lim.Right, lim.Mid, lim.Left = true, v.Right, v.Mid, v.Left
			}
			if rapid.Bool().Draw(t, "far") {
				lim.Far = sight.RangePolygon(about, rapid.Int32Range(16, 9000).Draw(t, "far radius"))
			}
			if rapid.Bool().Draw(t, "near") {
				lim.Near = sight.NearPolygon(about, rapid.Int32Range(1, 6000).Draw(t, "near radius"))
			}
			whole := piecesOf(eye, cones)
			part := f.Limited(nil, whole, &lim)
			for _, q := range probes(t, g, at) {
				a, aInside := hold(m, whole, q)
				b, bInside := hold(m, part, q)
				k, kInside := within(&lim, q)
				if b && !(a && k) || bInside && !(aInside && kInside) || aInside && kInside && !b {
					t.Errorf("%v within %+v: pieces %v %v, limits %v %v, part %v %v", q, lim, a, aInside, k, kInside, b, bInside)
				}
				if bInside {
					in++
				} else if aInside {
					out++
				}
			}
		}))
	}
	if in < 50 || out < 50 {
		t.Errorf("%d places in, %d out: the test has lost its aim", in, out)
	}
}

// within tells whether a place keeps to the limits, and whether it does so strictly.
func within(m *sight.Limits, p exact.Pt) (in, inside bool) {
	worst := 1
	if m.Sides {
		d := p.Sub(m.At)
		half := func(r, l exact.Vec) int { return min(exact.Sign(r.Cross(d)), exact.Sign(d.Cross(l))) }
		s := max(half(m.Right, m.Mid), half(m.Mid, m.Left))
		if s == 0 && m.Mid.Cross(d) == 0 && m.Mid.Dot(d) > 0 {
			s = 1
		}
		worst = min(worst, s)
	}
	for i, q := range m.Far {
		worst = min(worst, exact.Orient(q, m.Far[(i+1)%len(m.Far)], p))
	}
	if m.Near != nil {
		near := -1 // outside every edge's half-plane of the place's own sector
		for i, q := range m.Near {
			r := m.Near[(i+1)%len(m.Near)]
			if exact.Orient(m.At, q, p) >= 0 && exact.Orient(m.At, r, p) <= 0 {
				near = max(near, exact.Orient(r, q, p))
			}
		}
		worst = min(worst, near)
	}
	return worst >= 0, worst > 0
}
