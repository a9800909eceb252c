package raster_test

import (
	"context"
	"image/color"
	"os"
	"sync"
	"testing"

	"enfilade/canvas/paint"
	"enfilade/canvas/raster"
	"enfilade/canvas/view"
	"enfilade/solver/plan"
	"enfilade/solver/plantest"
	"enfilade/solver/study"
)

// gallery returns the sample gallery with names and normals, solved.
func gallery(t testing.TB) (*plan.Plan, *study.Result) {
	t.Helper()
	text, err := os.ReadFile("testdata/gallery.txt")
	if err != nil {
		t.Fatal(err)
	}
	parts := plantest.Parse(t, string(text)).Parts()
	parts.Sheet.Title, parts.Sheet.Place = "Upper gallery", "Ossel Quay Maritime Museum"
	normals := []float64{90, 0, 180, 180, 90, 0, 270}
	for i, name := range []string{"Astrolabe", "Sea chart", "Figurehead", "Great lens", "Diving helmet", "Brig model", "Tide clock"} {
		parts.Targets[i].Name, parts.Targets[i].Normal = name, &normals[i]
	}
	facing := []float64{180, 90}
	for i, name := range []string{"East door", "South stair"} {
		parts.Starts[i].Name, parts.Starts[i].Facing = name, &facing[i]
	}
	p := plan.From(parts)
	r, err := study.Solve(context.Background(), p)
	if err != nil {
		t.Fatal(err)
	}
	return p, r
}

func galleryScene(t testing.TB, w, h int, k float64) *paint.Scene {
	p, r := gallery(t)
	s := &paint.Scene{Plan: p, Result: r, Theme: paint.Light(), Camera: view.Fit(paint.Bounds(p), int(float64(w)*k), int(float64(h)*k), k)}
	s.Observer, s.Start, s.Target = paint.Choose(p)
	return s
}

// TestFrameAgain: a frame gives the same picture every time, whatever it drew in between, and without allocation.
func TestFrameAgain(t *testing.T) {
	s := galleryScene(t, 800, 520, 1)
	list := paint.Base(s)
	base := raster.NewBase(list, s.Camera.W, s.Camera.H)
	s.Drawing = list.Drawing
	var l, other paint.List
	var f raster.Frame
	paint.Overlay(s, &l)
	first := append([]uint8(nil), f.Draw(base, &l).Pix...)
	if string(raster.Picture(s).Pix) != string(first) {
		t.Error("the picture in one go differs from base and frame")
	}
	moved := *s
	moved.Observer, moved.Target, moved.AllRegions = "O3", "T4", true
	paint.Overlay(&moved, &other)
	if string(f.Draw(base, &other).Pix) == string(first) {
		t.Error("another observer gives the same picture")
	}
	img := f.Draw(base, &l)
	if string(img.Pix) != string(first) {
		t.Error("the same lists give another picture later")
	}
	if img.Rect.Min.X != 0 || img.Rect.Min.Y != 0 || img.Stride != 4*img.Rect.Dx() || len(img.Pix) != 4*s.Camera.W*s.Camera.H {
		t.Errorf("the image is not tight at the origin: %v, stride %d", img.Rect, img.Stride)
	}
	for i := 3; i < len(img.Pix); i += 4 {
		if img.Pix[i] != 255 {
			t.Fatalf("pixel %d is not opaque", i/4)
		}
	}
	if n := testing.AllocsPerRun(20, func() { paint.Overlay(s, &l); f.Draw(base, &l) }); n != 0 {
		t.Errorf("a frame allocates %g times", n)
	}
}

// TestInkStays: neither the wash nor the border of a region changes a pixel that is all wall.
func TestInkStays(t *testing.T) {
	s := galleryScene(t, 800, 520, 2)
	list := paint.Base(s)
	base := raster.NewBase(list, s.Camera.W, s.Camera.H)
	s.Drawing = list.Drawing
	var l paint.List
	paint.Overlay(s, &l)
	kept := l.Ops[:0]
	under := 0
	for _, op := range l.Ops {
		if op.Ink != paint.NoInk {
			kept = append(kept, op)
			under++
		}
	}
	l.Ops = kept
	if under < 3 {
		t.Fatalf("only %d steps lie under ink, want wash and two kinds of border", under)
	}
	var f raster.Frame
	img := f.Draw(base, &l)
	changed, walls := 0, 0
	for i, m := range base.Ink {
		same := img.Pix[4*i] == base.Image.Pix[4*i] && img.Pix[4*i+1] == base.Image.Pix[4*i+1] && img.Pix[4*i+2] == base.Image.Pix[4*i+2]
		if m == 255 {
			if walls++; !same {
				t.Fatalf("wall pixel %d, %d was painted over", i%base.W, i/base.W)
			}
		} else if !same {
			changed++
		}
	}
	if walls < 50000 || changed < 100000 {
		t.Errorf("%d wall pixels, %d painted: the test shows nothing", walls, changed)
	}
}

// TestBaseAgain: a base drawn into the buffers of another picture is the same as a new one.
func TestBaseAgain(t *testing.T) {
	s := galleryScene(t, 500, 400, 1)
	want := raster.NewBase(paint.Base(s), s.Camera.W, s.Camera.H)
	other := *s
	other.Theme, other.Camera = paint.Dark(), s.Camera.Pan(40, 30)
	got := raster.NewBase(paint.Base(&other), s.Camera.W, s.Camera.H)
	if string(got.Image.Pix) == string(want.Image.Pix) {
		t.Fatal("another theme gives the same base")
	}
	got.Draw(paint.Base(s), s.Camera.W, s.Camera.H)
	if string(got.Image.Pix) != string(want.Image.Pix) || string(got.Ink) != string(want.Ink) || string(got.Low) != string(want.Low) {
		t.Error("buffers used again leave something of the picture before")
	}
}

// BenchmarkFrame is what one frame of a drag costs after solving: listing the overlay and blending it over the base.
func BenchmarkFrame(b *testing.B) {
	for _, size := range []struct {
		name string
		k    float64
	}{{"plan=gallery/size=1600x1000/k=1", 1}, {"plan=gallery/size=1600x1000/k=2", 2}} {
		s := galleryScene(b, 1600, 1000, size.k)
		list := paint.Base(s)
		base := raster.NewBase(list, s.Camera.W, s.Camera.H)
		s.Drawing = list.Drawing
		var l paint.List
		var f raster.Frame
		paint.Overlay(s, &l)
		f.Draw(base, &l)
		b.Run(size.name, func(b *testing.B) {
			b.ReportAllocs()
			for b.Loop() {
				paint.Overlay(s, &l)
				f.Draw(base, &l)
			}
		})
	}
}

// BenchmarkBase is what a new base costs its worker.
func BenchmarkBase(b *testing.B) {
	for _, bench := range []struct {
		name  string
		walls int
	}{{"plan=gallery", 0}, {"plan=office/walls=2000", 2000}, {"plan=office/walls=20000", 20000}} {
		var s *paint.Scene
		if bench.walls == 0 {
			s = galleryScene(b, 1600, 1000, 1)
		} else {
			p := plantest.Office(1, bench.walls)
			s = &paint.Scene{Plan: p, Theme: paint.Light(), Camera: view.Fit(paint.Bounds(p), 1600, 1000, 1)}
		}
		var base raster.Base
		b.Run(bench.name+"/size=1600x1000/k=1", func(b *testing.B) {
			b.ReportAllocs()
			for b.Loop() {
				base.Draw(paint.Base(s), 1600, 1000)
			}
		})
	}
}

// BenchmarkLevel is the worst the rasteriser meets: long lines that are almost level. It keeps a list of cells for each row
// of pixels and walks it from the left for every cell it adds.
func BenchmarkLevel(b *testing.B) {
	const w, h = 1600, 1000
	ring := []paint.Pt{{X: 30, Y: 100}, {X: 1580, Y: 101.3}, {X: 1585, Y: 900.2}, {X: 25, Y: 903.8}}
	base := raster.NewBase(&paint.List{K: 1}, w, h)
	for _, bench := range []struct {
		name string
		op   paint.Op
	}{
		{"solid", paint.Op{Kind: paint.Stroke, Style: 0}},
		{"dashed", paint.Op{Kind: paint.Stroke, Style: 1}},
		{"wash", paint.Op{Kind: paint.Wash}},
	} {
		bench.op.Subs, bench.op.Colour = [2]int32{0, 1}, color.NRGBA{A: 255}
		l := &paint.List{K: 1, Points: ring, Subs: []paint.Sub{{Last: 4, Closed: true}}, Ops: []paint.Op{bench.op},
			Strokes: []paint.StrokeStyle{{Width: 3.2}, {Width: 1.15, On: 6, Off: 4}},
			Washes:  []paint.WashStyle{{Radius: 1000, Near: 0.2, Mid: 0.2, Far: 0.1, Rims: [2]float32{9, 4}, RimStrength: 0.1}}}
		var f raster.Frame
		b.Run(bench.name, func(b *testing.B) {
			for b.Loop() {
				f.Draw(base, l)
			}
		})
	}
}

// TestWorker: bases are made on other goroutines while frames are drawn over an older one; run under -race.
func TestWorker(t *testing.T) {
	s := galleryScene(t, 400, 300, 1)
	list := paint.Base(s)
	base := raster.NewBase(list, s.Camera.W, s.Camera.H)
	s.Drawing = list.Drawing
	var group sync.WaitGroup
	for range 2 {
		scene := *s
		group.Go(func() {
			for i := range 3 {
				scene.Camera = scene.Camera.Pan(float64(i), 1)
				raster.NewBase(paint.Base(&scene), scene.Camera.W, scene.Camera.H)
			}
		})
	}
	var l paint.List
	var f raster.Frame
	for range 5 {
		paint.Overlay(s, &l)
		f.Draw(base, &l)
	}
	group.Wait()
}
