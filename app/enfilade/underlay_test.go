//go:build cgo && linux

package main

import (
	"image"
	"image/color"
	"image/png"
	"math"
	"os"
	"path/filepath"
	"strconv"
	"testing"
	"time"

	"enfilade/solver/exact"
	"enfilade/solver/plan"
)

// TestTracesAnUnderlay lays a scan under an empty plan in the real window by its menu, sets its scale by two clicks and a typed
// distance, draws a wall along a line of the scan, and saves: the wall is as long as the scan says.
func TestTracesAnUnderlay(t *testing.T) {
	s := newScreen(t)
	dir := t.TempDir()
	scan := filepath.Join(dir, "scan.png")
	writeScan(t, scan)
	path := filepath.Join(dir, "traced.enfilade")
	if err := os.WriteFile(path, []byte(`{"enfilade": 1}`), 0o666); err != nil {
		t.Fatal(err)
	}
	before := s.start(path)
	s.key("ctrl+u")
	s.until("a picture is asked for", func(img image.Image) bool { r, _, _, _ := img.At(700, 20).RGBA(); return r>>8 < 220 })
	s.key("ctrl+a")
	s.run("xdotool", "type", "--delay", "20", scan)
	s.key("Return")

	// The bar's ends are found on the screen, as a person would.
	var bar image.Rectangle
	s.until("the scan lies under the plan", func(img image.Image) bool { bar = barOn(img); return bar.Dx() > 200 })
	s.frameOf(before)
	left, right, y := bar.Min.X, bar.Max.X, (bar.Min.Y+bar.Max.Y)/2
	s.clickAt(setScaleX, setScaleY)
	s.clickAt(left, y)
	s.clickAt(right, y)
	s.run("xdotool", "type", "--delay", "20", "8,00")
	s.key("Return")
	s.key("0") // the whole of it
	steady := 0
	s.until("it is fitted anew and rests", func(img image.Image) bool {
		b := barOn(img)
		if steady++; b != bar || b.Dx() < 200 {
			steady = 0
		}
		bar = b
		return steady >= 5
	})
	s.key("w")
	s.clickAt(bar.Min.X, (bar.Min.Y+bar.Max.Y)/2)
	s.clickAt(bar.Max.X, (bar.Min.Y+bar.Max.Y)/2)
	s.key("Return")
	s.key("Escape")
	s.key("ctrl+s")
	saved := s.saved(path, func(p *plan.Plan) bool { return p.NumWalls() == 1 })
	u := saved.Sheet().Underlay
	if u == nil || u.Image != "scan.png" || math.Abs(u.MMPerPixel-10) > 0.1 {
		t.Fatalf("the underlay was saved as %+v, want 800 pixels to be 8 m", u)
	}
	for _, w := range saved.Walls() {
		if length := exact.Dist(w.Line.At(0), w.Line.At(1)) / 10000; math.Abs(length-8) > 0.15 {
			t.Errorf("the traced wall is %.2f m long, want 8 m", length)
		}
	}
}

// Where the form's button for the scale lies on the screen.
const setScaleX, setScaleY = 1175, 232

// writeScan draws a sheet of 1000 by 600 pixels with a blue bar from 100 to 900.
func writeScan(t *testing.T, path string) {
	t.Helper()
	img := image.NewNRGBA(image.Rect(0, 0, 1000, 600))
	for y := range 600 {
		for x := range 1000 {
			c := color.NRGBA{255, 255, 255, 255}
			if x >= 100 && x < 900 && y >= 290 && y < 310 {
				c = color.NRGBA{0, 0, 255, 255}
			}
			img.SetNRGBA(x, y, c)
		}
	}
	f, err := os.Create(path)
	if err != nil {
		t.Fatal(err)
	}
	defer f.Close()
	if err := png.Encode(f, img); err != nil {
		t.Fatal(err)
	}
}

// barOn returns the box around what is bluish on the picture.
func barOn(img image.Image) image.Rectangle {
	var box image.Rectangle
	for y := pictureY + 30; y < 800; y++ {
		for x := pictureX + 30; x < 1100; x++ {
			if r, _, b, _ := img.At(x, y).RGBA(); int(b>>8)-int(r>>8) > 60 {
				box = box.Union(image.Rect(x, y, x+1, y+1))
			}
		}
	}
	return box
}

// clickAt clicks on a pixel of the screen.
func (s *screen) clickAt(x, y int) {
	s.run("xdotool", "mousemove", strconv.Itoa(x), strconv.Itoa(y))
	time.Sleep(pause)
	s.run("xdotool", "click", "1")
	time.Sleep(pause)
}
