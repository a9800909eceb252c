package gui

import (
	"math"
	"testing"

	"pgregory.net/rapid"

	"enfilade/canvas/view"
)

// TestBetweenLaws: the way begins and ends where it should, and the point under the pointer stays there on it.
func TestBetweenLaws(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		a := view.Camera{CX: rapid.Float64Range(-1e5, 1e5).Draw(t, "cx"), CY: rapid.Float64Range(-1e5, 1e5).Draw(t, "cy"),
			Scale: math.Exp(rapid.Float64Range(-5, 1).Draw(t, "scale")), W: 1000, H: 800, K: 1}
		x, y := rapid.Float64Range(0, 1000).Draw(t, "x"), rapid.Float64Range(0, 800).Draw(t, "y")
		b := a.ZoomAt(x, y, rapid.SampledFrom([]float64{0.5, 1.2, 1, 3}).Draw(t, "factor"))
		if between(a, b, 0) != a {
			t.Fatal("the way does not begin at its beginning")
		}
		p := a.MM(x, y)
		c := between(a, b, rapid.Float64Range(0, 1).Draw(t, "p"))
		if cx, cy := c.PixelMM(p); math.Abs(cx-x) > 1e-3 || math.Abs(cy-y) > 1e-3 {
			t.Fatalf("the point under the pointer goes from %g, %g to %g, %g", x, y, cx, cy)
		}
		if c.Scale < min(a.Scale, b.Scale)*(1-1e-12) || c.Scale > max(a.Scale, b.Scale)*(1+1e-12) {
			t.Fatalf("the scale %g lies not between %g and %g", c.Scale, a.Scale, b.Scale)
		}
	})
}
