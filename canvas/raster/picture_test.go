package raster_test

import (
	"context"
	"flag"
	"fmt"
	"image"
	"image/color"
	"path/filepath"
	"testing"

	"enfilade/canvas/paint"
	"enfilade/canvas/raster"
	"enfilade/canvas/raster/golden"
	"enfilade/canvas/view"
	"enfilade/solver/plan"
	"enfilade/solver/plantest"
	"enfilade/solver/study"
)

var update = flag.Bool("update", false, "write the golden pictures anew")

func goldenPicture(t *testing.T, name string, got *image.RGBA) {
	t.Helper()
	golden.Picture(t, filepath.Join("testdata", name+".png"), got, *update)
}

// room has every kind of line, body and mark once.
const room = `
	floor 0,0 9,0 9,6 0,6
	wall 0.1,0.1 8.9,0.1 8.9,5.9 0.1,5.9 0.1,0.1 th=0.2
	wall 5,0.1 5,5.9 th=0.2; door W2 at=2 w=1 leaf=solid; door W1 at=1 w=1.2 leaf=solid shut side=right
	wall 7,3.5 8,3.5; glass 5.1,4.5 6.5,4.5; screen 6,1 6,2
	block 2,3.5 3.5,3.5 3.5,4.2 2,4.2 h=0.9; block 7.5,1 8,1 8.2,1.5 7.5,1.5
	zone name=study 0.2,0.2 4.9,0.2 4.9,5.8 0.2,5.8 room
	observer 1.5,2.6 heading=30; observer 8,4.6 view=90 heading=200
	target 8.79,2.5; target 0.21,5; start 4,0.9`

func roomScene(t *testing.T, w, h int, k float64) *paint.Scene {
	parts := plantest.Parse(t, room).Parts()
	parts.Sheet.Title = "A room"
	parts.Targets[0].Name, parts.Targets[1].Name, parts.Starts[0].Name = "Lamp", "Orrery", "Door"
	p := plan.From(parts)
	r, err := study.Solve(context.Background(), p)
	if err != nil {
		t.Fatal(err)
	}
	s := &paint.Scene{Plan: p, Result: r, Theme: paint.Light(), Camera: view.Fit(paint.Bounds(p), int(float64(w)*k), int(float64(h)*k), k)}
	s.Observer, s.Start, s.Target = paint.Choose(p)
	return s
}

func TestPictureGolden(t *testing.T) {
	s := roomScene(t, 460, 340, 1)
	goldenPicture(t, "room_light", raster.Picture(s))
	s.Theme = paint.Dark()
	s.Selected = []plan.Ref{{Kind: plan.KindWall, ID: "W3"}, {Kind: plan.KindBlock, ID: "B2"}}
	s.Hover = plan.Ref{Kind: plan.KindTarget, ID: "T2"}
	goldenPicture(t, "room_dark", raster.Picture(s))
	s = roomScene(t, 230, 170, 2)
	goldenPicture(t, "room_2x", raster.Picture(s))
}

// TestPictureScale: twice the pixels show the same picture: averaged over two by two they differ little from the plain one.
func TestPictureScale(t *testing.T) {
	s := roomScene(t, 460, 340, 1)
	a := raster.Picture(s)
	s.Camera = s.Camera.Resize(920, 680, 2)
	b := raster.Picture(s)
	sum := 0.0
	for y := range 340 {
		for x := range 460 {
			i := a.PixOffset(x, y)
			j := b.PixOffset(2*x, 2*y)
			mean := (int(b.Pix[j]) + int(b.Pix[j+4]) + int(b.Pix[j+b.Stride]) + int(b.Pix[j+b.Stride+4])) / 4
			d := float64(int(a.Pix[i]) - mean)
			sum += d * d
		}
	}
	// Measured 32.1; 57 when the rings of targets stay small, 151 when text does.
	if mean := sum / (340 * 460); mean > 36 {
		t.Errorf("mean squared difference %.1f", mean)
	}
}

func ExamplePicture() {
	p := plan.New()
	s := &paint.Scene{Plan: p, Theme: paint.Light(), Camera: view.Fit(paint.Bounds(p), 400, 300, 1)}
	img := raster.Picture(s)
	fmt.Println(img.Rect, img.RGBAAt(200, 80) == color.RGBA{R: 0xF7, G: 0xF3, B: 0xEA, A: 0xFF})
	// Output: (0,0)-(400,300) true
}
