package paint_test

import (
	"math"
	"strings"
	"testing"

	"github.com/paulmach/orb"

	"enfilade/canvas/paint"
)

// narrow is a wall with a door of 0.92 m between a start and a target.
const narrow = `floor 0,0 8,0 8,6 0,6; wall 4,0 4,6 th=0.2; door W1 at=2.5 w=0.92; target 7,3; start 1,3`

// TestTightestSpot: the chosen walk has one mark at its tightest spot, two ticks of at most a third of the gap each, and its
// width to the centimetre; an unknown width has neither.
func TestTightestSpot(t *testing.T) {
	s := sceneOf(t, named(t, narrow), 520, 360, 1)
	l := overlayOf(s)
	if text := l.String(); strings.Count(text, `"0.92 m"`) != 1 {
		t.Errorf("the clear width is not told once:\n%s", text)
	}
	a := s.Result.Approaches[0]
	x0, y0 := s.Camera.PixelMM(a.Tightest[0])
	x1, y1 := s.Camera.PixelMM(a.Tightest[1])
	for _, scale := range []float64{1, 0.2} {
		s.Camera = s.Camera.ZoomAt((x0+x1)/2, (y0+y1)/2, scale)
		if n := ticksOver(overlayOf(s), a.FullClearWidth*s.Camera.Scale); n != 1 {
			t.Errorf("at %g of the size: %d marks at the tightest spot, want 1", scale, n)
		}
	}
	s.Result.Approaches[0].HasClearWidth, s.Result.Approaches[0].HasFullClearWidth = false, false
	s.Result.Approaches[0].Tightest = [2]orb.Point{}
	if text := overlayOf(s).String(); strings.Contains(text, "0.92") {
		t.Error("a width that is not known is told")
	}
}

// ticksOver counts the pairs of ticks, each at most 10 px and a third of the gap long, that leave the rest of it free.
func ticksOver(l *paint.List, gap float64) (n int) {
	for i := range l.Ops {
		op := &l.Ops[i]
		if op.Kind != paint.Stroke || l.Strokes[op.Style].Width != 1.8 || len(l.Path(op)) != 2 {
			continue
		}
		a, b := l.Path(op)[0], l.Path(op)[1]
		ends := [4]paint.Pt{l.Points[a.First], l.Points[a.Last-1], l.Points[b.First], l.Points[b.Last-1]}
		whole, free := apart(ends[0], ends[2]), apart(ends[1], ends[3])
		tick := min(10, gap/3)
		if math.Abs(whole-gap) < 0.05 && math.Abs(free-(gap-2*tick)) < 0.05 {
			n++
		}
	}
	return n
}

func apart(a, b paint.Pt) float64 { return math.Hypot(float64(a.X-b.X), float64(a.Y-b.Y)) }
