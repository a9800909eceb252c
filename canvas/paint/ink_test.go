package paint

import (
	"math"
	"math/rand/v2"
	"testing"

	"github.com/paulmach/orb"

	"enfilade/solver/exact"
	"enfilade/solver/plan"
	"enfilade/solver/plantest"
)

// touchesSlow asks every segment.
func touchesSlow(x *inkIndex, b orb.Bound) bool {
	f := frame{b.Min[0], b.Min[1], b.Max[0], b.Max[1]}
	px, py, wind := (f.x0+f.x1)/2, (f.y0+f.y1)/2, 0
	for i := range x.segs {
		s := &x.segs[i]
		if _, _, ok := f.segment(s.ax, s.ay, s.bx, s.by); ok {
			return true
		}
		if s.area && (s.ay <= py) != (s.by <= py) && s.at(py) < px {
			if s.ay > s.by {
				wind++
			} else {
				wind--
			}
		}
	}
	return wind != 0
}

func TestInkAgainstAllSegments(t *testing.T) {
	for seed := range uint64(6) {
		p := plantest.Clutter(seed, 120)
		if seed%2 == 1 {
			p = plantest.Office(seed, 120)
		}
		d := NewDrawing(p)
		lo, hi, _ := plan.Bounds(p)
		rng := rand.New(rand.NewPCG(seed, 1))
		hits, inside := 0, 0
		for range 4000 {
			x := float64(lo.X) + rng.Float64()*float64(hi.X-lo.X)*1.1 - 20000
			y := float64(lo.Y) + rng.Float64()*float64(hi.Y-lo.Y)*1.1 - 20000
			w, h := rng.Float64()*rng.Float64()*8000, rng.Float64()*2000
			b := orb.Bound{Min: orb.Point{x, y}, Max: orb.Point{x + w, y + h}}
			got, want := d.ink.touches(b), touchesSlow(&d.ink, b)
			if got != want {
				t.Fatalf("seed %d: box %v: touches ink %v, want %v", seed, b, got, want)
			}
			if got {
				hits++
			}
			if d.ink.inside(x+w/2, y+h/2) {
				inside++
			}
		}
		if hits < 100 || hits > 3900 || inside == 0 {
			t.Errorf("seed %d: %d of 4000 boxes touch ink, %d middles inside of bodies: lost its aim", seed, hits, inside)
		}
	}
}

func TestInkNormal(t *testing.T) {
	d := NewDrawing(plantest.Parse(t, "wall 0,0 10,0 th=0.2; wall 20,0 20,10"))
	for _, tc := range []struct {
		at   exact.Pt
		want float64
		ok   bool
	}{
		{exact.Pt{X: 50000, Y: 1100}, 90, true},    // 10 mm off the upper face
		{exact.Pt{X: 50000, Y: -1100}, -90, true},  // and off the lower
		{exact.Pt{X: 50000, Y: 9000}, 0, false},    // free standing
		{exact.Pt{X: 199900, Y: 50000}, 180, true}, // to the left of a thin wall
		{exact.Pt{X: 200100, Y: 50000}, 0, true},
	} {
		got, ok := d.ink.normal(vecOf(tc.at))
		if ok != tc.ok || ok && math.Abs(math.Remainder(got-tc.want, 360)) > 1e-9 {
			t.Errorf("%v: normal %g, %v, want %g, %v", tc.at, got, ok, tc.want, tc.ok)
		}
	}
}

func TestDrawingLooks(t *testing.T) {
	p := plantest.Parse(t, `
		wall 0,0 9,0 th=0.2; glass 0,1 9,1; screen 0,2 9,2; low 0,3 9,3 th=0.1 h=1.1; low 0,4 9,4 th=0.1 h=1.9
		block 0,5 1,5 1,6 h=0.7; block 2,5 3,5 3,6; wall 0,7 9,7; door W1 at=1 w=1 leaf=solid shut`)
	d := NewDrawing(p)
	got := map[string]look{}
	for _, b := range d.bodies {
		got[b.item.ID] = b.look
	}
	for _, l := range d.lines {
		got[l.item.ID] = l.look
	}
	want := map[string]look{"W1": lookWall, "W2": lookGlazing, "W3": lookScreen, "W4": lookLow, "W5": lookWall,
		"B1": lookLow, "B2": lookWall, "W6": lookWall, "D1": lookShut}
	for id, lk := range want {
		if g, ok := got[id]; !ok || g != lk {
			t.Errorf("%s is drawn with look %d (%v), want %d", id, g, ok, lk)
		}
	}
	if sp := d.refs[plan.Ref{Kind: plan.KindWall, ID: "W1"}]; sp.body1-sp.body0 != 2 {
		t.Errorf("the wall with a door has %d bodies, want one on either side", sp.body1-sp.body0)
	}
	if !d.fits(p) || d.fits(plantest.Parse(t, "wall 0,0 9,0")) {
		t.Error("a drawing does not know its plan")
	}
}
