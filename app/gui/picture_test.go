package gui

import (
	"image"
	"image/color"
	"testing"
	"time"

	"enfilade/canvas/paint"
	"enfilade/canvas/raster"
	"enfilade/canvas/view"
	"enfilade/solver/plan"
	"enfilade/solver/plantest"
)

// TestWarpShiftsAndStretches: the old base goes where the camera goes, and paper comes in from the sides.
func TestWarpShiftsAndStretches(t *testing.T) {
	const w, h = 40, 30
	old := &raster.Base{W: w, H: h, Image: image.NewRGBA(image.Rect(0, 0, w, h)), Ink: make([]uint8, w*h), Low: make([]uint8, w*h)}
	for y := range h {
		for x := range w {
			old.Image.SetRGBA(x, y, color.RGBA{R: uint8(x), G: uint8(y), B: 7, A: 255})
			old.Ink[y*w+x], old.Low[y*w+x] = uint8(x), uint8(y)
		}
	}
	paper := color.NRGBA{R: 200, G: 100, B: 50, A: 255}
	from := view.Camera{CX: 100, CY: 100, Scale: 0.5, W: w, H: h, K: 1}
	check := func(name string, to view.Camera, want func(x, y int) (int, int, bool)) {
		var wp warper
		got := wp.show(old, from, to, paper)
		if got.W != to.W || got.H != to.H || got.Image.Rect != image.Rect(0, 0, to.W, to.H) {
			t.Fatalf("%s: the picture is %d by %d", name, got.W, got.H)
		}
		for y := range to.H {
			for x := range to.W {
				c := got.Image.RGBAAt(x, y)
				sx, sy, in := want(x, y)
				i := y*to.W + x
				if in && (int(c.R) != sx || int(c.G) != sy || int(got.Ink[i]) != sx || int(got.Low[i]) != sy) {
					t.Fatalf("%s: pixel %d, %d is %v, want that of %d, %d", name, x, y, c, sx, sy)
				}
				if !in && (c != color.RGBA(paper) || got.Ink[i] != 0 || got.Low[i] != 0) {
					t.Fatalf("%s: pixel %d, %d is %v, want paper", name, x, y, c)
				}
			}
		}
	}
	check("pan", from.Pan(5, -3), func(x, y int) (int, int, bool) { return x - 5, y + 3, x >= 5 && y+3 < h })
	check("zoom", from.ZoomAt(0, 0, 2), func(x, y int) (int, int, bool) { return x / 2, y / 2, true })
	check("out", from.ZoomAt(0, 0, 0.5), func(x, y int) (int, int, bool) { return 2*x + 1, 2*y + 1, 2*x+1 < w && 2*y+1 < h })
	check("another size", from.Resize(w+20, h-10, 1), func(x, y int) (int, int, bool) { return x - 10, y + 5, x >= 10 && x < w+10 })
}

// TestSlowBaseIsShownShifted: while the worker makes the base of a panned picture, the old one is shown where it belongs.
func TestSlowBaseIsShownShifted(t *testing.T) {
	r := newGallery(t)
	r.picture.base.took = time.Hour // as if it were a plan of many thousand walls
	r.view.look(r.view.cam.Pan(100, 60))
	img := r.picture.draw(r.view.cam.W, r.view.cam.H).(*image.RGBA)
	if r.picture.base.key.camera == r.view.cam {
		t.Fatal("the base was made in the middle of the frame")
	}
	x, y := r.view.cam.Pixel(m(2.3, 14.3))
	if got := img.RGBAAt(int(x), int(y)); colour(got) != paint.Light().Floor {
		t.Errorf("floor is shown as %v while the base is made", got)
	}
	if got := img.RGBAAt(60, r.view.cam.H-80); colour(got) == paint.Light().Poche {
		t.Errorf("%v came in from the side", got)
	}
	r.settle()
	if r.picture.base.key.camera != r.view.cam {
		t.Error("the worker's base was not taken")
	}
	r.openSample("training")
	img = r.picture.draw(r.view.cam.W, r.view.cam.H).(*image.RGBA)
	for _, at := range []image.Point{{r.view.cam.W / 2, r.view.cam.H / 2}, {r.view.cam.W / 3, r.view.cam.H / 3}} {
		if got := img.RGBAAt(at.X, at.Y); colour(got) != paint.Light().Ground {
			t.Errorf("until the first base of another plan is made, %v is shown at %v instead of paper", got, at)
		}
	}
	r.settle()
	if r.picture.base.key != keyOf(r.picture.scene()) {
		t.Error("the first base of another plan was not taken")
	}
}

// TestLargePlanIsDrawnBeside: the base of a large plan that is opened, and of one whose window changes its size or theme, is made
// by the worker; until it is there paper is shown, or the base at hand.
func TestLargePlanIsDrawnBeside(t *testing.T) {
	r := newRig(t, realSolver)
	large := plantest.Office(1, fewItems+200)
	r.show(func() { r.session.Open(large, "") })
	r.frame()
	v := r.view
	img := r.picture.draw(v.cam.W, v.cam.H).(*image.RGBA)
	if b := r.picture.base; b != nil && b.key.obstacles == large.Obstacles() || colour(img.RGBAAt(v.cam.W/2, v.cam.H/2)) != paint.Light().Ground {
		t.Error("a large plan that was opened was drawn in the middle of a frame")
	}
	r.settle()
	if r.picture.base.key.obstacles != large.Obstacles() {
		t.Error("the plan's base was not taken")
	}
	w, h := v.cam.W-100, v.cam.H-60
	img = r.picture.draw(w, h).(*image.RGBA)
	if r.picture.base.key.camera.W == w || img.Rect != image.Rect(0, 0, w, h) || colour(img.RGBAAt(w/2, h/2)) == paint.Light().Ground {
		t.Errorf("after a change of size the old base does not stand in: %v", img.Rect)
	}
}

// TestBaseIsMadeAgain: a step that was slow to draw, a quick one after it, and back: the picture is that of the plan again, even
// though the base it needs is the one that the worker was asked for last.
func TestBaseIsMadeAgain(t *testing.T) {
	r := newGallery(t)
	r.click(11.35, 8.75)
	turn := func(took time.Duration) {
		r.picture.base.took = took
		w, _ := r.session.Committed().Wall("W1")
		w.Thickness += 100
		if err := r.session.Do(plan.SetWall{Wall: w}); err != nil {
			t.Fatal(err)
		}
	}
	turn(time.Hour)
	r.settle() // made by the worker
	turn(0)
	r.frame() // made in the frame
	r.picture.base.took = time.Hour
	r.undo()
	r.settle()
}
