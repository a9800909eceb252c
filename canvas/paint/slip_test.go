package paint_test

import (
	"testing"

	"enfilade/canvas/view"
)

// TestSlipStaysUntilThePlanFillsThePicture: the scale bar of a plan that has just been begun stands at the picture's side wherever
// the plan lies, and under the edge of a plan that fills the picture.
func TestSlipStaysUntilThePlanFillsThePicture(t *testing.T) {
	bar := func(factor float64) float32 {
		s := sceneOf(t, named(t, twoRooms), 1000, 700, 1)
		s.Camera = s.Camera.ZoomAt(500, 350, factor)
		l := overlayOf(s)
		for _, x := range labels(l) {
			if string(l.Chars[x.Chars[0]:x.Chars[1]]) == "0" {
				return x.At.X
			}
		}
		t.Fatal("no scale bar")
		return 0
	}
	if a, b := bar(0.2), bar(0.4); a != b || a > view.Ruler+30 {
		t.Errorf("the bar stands at %g and %g under a plan that is a part of the picture", a, b)
	}
	if x := bar(1); x <= view.Ruler+30 {
		t.Errorf("the bar stands at %g, not under the edge of a plan that fills the picture", x)
	}
}
