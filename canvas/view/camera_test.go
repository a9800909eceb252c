package view_test

import (
	"math"
	"testing"

	"github.com/paulmach/orb"
	"pgregory.net/rapid"

	"enfilade/canvas/view"
	"enfilade/solver/exact"
)

func gallery(k float64) view.Camera {
	return view.Fit(orb.Bound{Max: orb.Point{24000, 16000}}, int(1066*k), int(668*k), k)
}

func TestFitGallery(t *testing.T) {
	for _, k := range []float64{1, 2} {
		c := gallery(k)
		if got := c.PerMetre(); got != 37 {
			t.Errorf("k %g: %g px per metre, want the 37 that the height leaves", k, got)
		}
		x, y := c.PixelMM(orb.Point{0, 16000})
		if y != 44*k {
			t.Errorf("k %g: upper edge at %g px, want 44: ruler and margin", k, y/k)
		}
		x2, y2 := c.PixelMM(orb.Point{24000, 0})
		if y2 != (668-32)*k {
			t.Errorf("k %g: lower edge at %g px, want the margin of 32 below", k, y2/k)
		}
		if x != math.Trunc(x) || math.Abs((x-22*k)-(float64(c.W)-x2)) > 1 {
			t.Errorf("k %g: plan from %g to %g is not centred on whole pixels", k, x, x2)
		}
	}
}

func TestFitOddBounds(t *testing.T) {
	for _, c := range []struct {
		w, h  int
		k     float64
		scale float64
	}{{1065, 812, 1, 37}, {2130, 1624, 2, 37}, {1945, 1352, 1, 65}, {649, 612, 1, 20}} {
		empty := view.Fit(orb.Bound{Min: orb.Point{1, 1}, Max: orb.Point{-1, -1}}, c.w, c.h, c.k)
		if x, y := empty.PixelMM(orb.Point{10000, 8000}); math.Abs(empty.PerMetre()-c.scale) > 1e-9 ||
			math.Abs(x-(float64(c.w)+22*c.k)/2) > 1 || math.Abs(y-(float64(c.h)+12*c.k)/2) > 1 {
			t.Errorf("empty plan in %d by %d px: %v, want %g px per metre about 10, 8", c.w, c.h, empty, c.scale)
		}
	}
	p := orb.Point{5000, 5000}
	point := view.Fit(orb.Bound{Min: p, Max: p}, 1000, 700, 1)
	if x, y := point.PixelMM(p); math.Abs(x-511) > 1 || math.Abs(y-356) > 1 {
		t.Errorf("a lone point lies at %g, %g, not in the middle of the frame", x, y)
	}
	tiny := view.Fit(orb.Bound{Max: orb.Point{24000, 16000}}, 30, 20, 1)
	if !(tiny.Scale >= view.MinZoom) {
		t.Errorf("a picture smaller than its frame has scale %g", tiny.Scale)
	}
	wide := view.Fit(orb.Bound{Min: orb.Point{-5e7, -5e7}, Max: orb.Point{5e7, 5e7}}, 1000, 700, 1)
	if w := wide.Window(0); w.Min[0] > -5e7 || w.Max[1] < 5e7 {
		t.Errorf("the legal range does not fit: %v", w)
	}
}

func camera(t *rapid.T) view.Camera {
	return view.Camera{
		CX: rapid.Float64Range(-1e7, 1e7).Draw(t, "cx"), CY: rapid.Float64Range(-1e7, 1e7).Draw(t, "cy"),
		Scale: math.Exp(rapid.Float64Range(-6, 3).Draw(t, "scale")),
		W:     rapid.IntRange(1, 4000).Draw(t, "w"), H: rapid.IntRange(1, 3000).Draw(t, "h"),
		K: rapid.SampledFrom([]float64{1, 1.5, 2}).Draw(t, "k"),
	}
}

func TestCameraLaws(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		c := camera(t)
		x, y := rapid.Float64Range(0, 4000).Draw(t, "x"), rapid.Float64Range(0, 3000).Draw(t, "y")
		if gx, gy := c.PixelMM(c.MM(x, y)); math.Abs(gx-x) > 1e-5 || math.Abs(gy-y) > 1e-5 {
			t.Fatalf("there and back: %g, %g became %g, %g", x, y, gx, gy)
		}
		g := c.Grid(x, y)
		if px, py := c.Pixel(g); math.Abs(px-x) > c.Scale*0.05+1e-5 || math.Abs(py-y) > c.Scale*0.05+1e-5 {
			t.Fatalf("grid point %v is not the nearest to %g, %g", g, x, y)
		}
		p := c.MM(x, y)
		z := c.ZoomAt(x, y, rapid.Float64Range(0.01, 100).Draw(t, "factor"))
		if zx, zy := z.PixelMM(p); math.Abs(zx-x) > 1e-4 || math.Abs(zy-y) > 1e-4 {
			t.Fatalf("zoom moved the point under the pointer to %g, %g", zx, zy)
		}
		d := c.Pan(30, -20)
		if dx, dy := d.PixelMM(p); math.Abs(dx-x-30) > 1e-4 || math.Abs(dy-y+20) > 1e-4 {
			t.Fatalf("pan by 30, -20 moved the point by %g, %g", dx-x, dy-y)
		}
	})
}

func TestZoomEnds(t *testing.T) {
	c := gallery(2)
	if in := c.ZoomAt(10, 10, 1e12); in.Scale != view.MaxZoom*2 {
		t.Errorf("zoomed in to %g", in.Scale)
	}
	if out := c.ZoomAt(10, 10, 1e-12); out.Scale != view.MinZoom*2 {
		t.Errorf("zoomed out to %g", out.Scale)
	}
	if far := c.ZoomAt(0, 0, 1e-12); far.Grid(1e9, 0) != (exact.Pt{X: exact.Limit - 1, Y: far.Grid(0, 0).Y}) {
		t.Errorf("a place beyond the legal range gave %v", far.Grid(1e9, 0))
	}
}

func TestResize(t *testing.T) {
	c := gallery(1)
	d := c.Resize(2132, 1336, 2)
	if d.PerMetre() != c.PerMetre() || d.CX != c.CX || d.CY != c.CY || d.Window(0) != c.Window(0) {
		t.Errorf("doubling the picture changed what it shows: %v, %v", c, d)
	}
}

func TestRulerSteps(t *testing.T) {
	for _, tc := range []struct {
		perUnit float64
		want    view.Steps
	}{
		{37, view.Steps{Minor: 0.5, Mid: 1, Major: 5, Label: 2}},
		{80, view.Steps{Minor: 0.1, Mid: 0.5, Major: 1, Label: 1}},
		{180, view.Steps{Minor: 0.05, Mid: 0.1, Major: 0.5, Label: 0.5}},
		{10, view.Steps{Minor: 1, Mid: 5, Major: 10, Label: 10}},
		{5, view.Steps{Minor: 2, Mid: 10, Major: 50, Label: 20}},
		{0.001, view.Steps{Minor: 10000, Mid: 50000, Major: 100000, Label: 100000}},
	} {
		if got := view.RulerSteps(tc.perUnit); got != tc.want {
			t.Errorf("%g px a unit: %+v, want %+v", tc.perUnit, got, tc.want)
		}
	}
}

func TestBarSteps(t *testing.T) {
	if got := view.BarSteps(37); got != 5 {
		t.Errorf("bar at 37 px/m is %g m, want 5", got)
	}
	for s := 1e-4; s < 1e4; s *= 1.07 {
		if px := view.BarSteps(s) * s; px < 119.99 || px > 300.01 {
			t.Errorf("at %g px a unit the bar is %g px long", s, px)
		}
	}
}
