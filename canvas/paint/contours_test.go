package paint_test

import (
	"context"
	"regexp"
	"testing"

	"enfilade/canvas/paint"
	"enfilade/canvas/view"
	"enfilade/solver/plantest"
	"enfilade/solver/study"
)

// hall is an empty floor of 60 m by 40 m with lines of walking distance every metre from its corner.
func hall(t *testing.T, w, h int) *paint.Scene {
	t.Helper()
	p := plantest.Parse(t, "floor 0,0 60,0 60,40 0,40; start 0,0")
	f, err := study.NewSolver().Field(context.Background(), p, "S1")
	if err != nil {
		t.Fatal(err)
	}
	s := &paint.Scene{Plan: p, Theme: paint.Light(), Camera: view.Fit(paint.Bounds(p), w, h, 1), ContourStep: 1000}
	if s.Contours, err = f.Contours(context.Background(), 1000); err != nil {
		t.Fatal(err)
	}
	return s
}

// strokes counts the pieces of the red strokes in the base.
func strokes(l *paint.List) (n int) {
	for i := range l.Ops {
		if op := &l.Ops[i]; op.Kind == paint.Stroke && op.Colour.R == paint.Light().Red.R && op.Colour.A < 255 {
			n += len(l.Path(op))
		}
	}
	return n
}

var metresLabel = regexp.MustCompile(`"\d+ m"`)

// TestContoursKeepApart: where the picture is small only some of the lines are drawn, and labels are few; without lines there
// is nothing.
func TestContoursKeepApart(t *testing.T) {
	large, small := hall(t, 1200, 800), hall(t, 200, 140)
	most, few := strokes(paint.Base(large)), strokes(paint.Base(small))
	if most < len(large.Contours) || few >= most/3 || few == 0 {
		t.Errorf("%d of %d pieces in a large picture, %d in a small one", most, len(large.Contours), few)
	}
	n := len(metresLabel.FindAllString(overlayOf(large).String(), -1))
	if n < 11 || n > 60 {
		t.Errorf("%d labels in a large picture", n)
	}
	large.Contours = nil
	const bar = 1 // the scale bar's own
	if strokes(paint.Base(large)) != 0 || len(metresLabel.FindAllString(overlayOf(large).String(), -1)) != bar {
		t.Error("lines that are not there are drawn")
	}
}

func TestContoursAllocate(t *testing.T) {
	s := hall(t, 1200, 800)
	s.Drawing = paint.Base(s).Drawing
	var l paint.List
	paint.Overlay(s, &l)
	if n := testing.AllocsPerRun(20, func() { paint.Overlay(s, &l) }); n != 0 {
		t.Errorf("%v allocations a frame", n)
	}
}
