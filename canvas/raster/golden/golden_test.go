package golden

import (
	"image"
	"image/color"
	"image/draw"
	"math/rand/v2"
	"strings"
	"testing"
)

// paper is a picture with a line across it.
func paper() *image.RGBA {
	img := image.NewRGBA(image.Rect(0, 0, 600, 400))
	draw.Draw(img, img.Rect, image.NewUniform(color.RGBA{240, 240, 230, 255}), image.Point{}, draw.Src)
	draw.Draw(img, image.Rect(100, 200, 500, 204), image.Black, image.Point{}, draw.Src)
	return img
}

// TestCompare: what people see is told, and what one machine computes otherwise than another is not.
func TestCompare(t *testing.T) {
	rng := rand.New(rand.NewPCG(1, 2))
	for _, c := range []struct {
		name string
		do   func(img *image.RGBA)
		seen bool
	}{
		{"nothing", func(*image.RGBA) {}, false},
		{"every pixel a little", func(img *image.RGBA) {
			for i := range img.Pix {
				img.Pix[i] ^= uint8(rng.IntN(8))
			}
		}, false},
		{"some pixels far apart", func(img *image.RGBA) {
			for range 100 {
				img.SetRGBA(rng.IntN(600), rng.IntN(400), color.RGBA{0, 0, 0, 255})
			}
		}, false},
		{"a dot", func(img *image.RGBA) {
			draw.Draw(img, image.Rect(49, 49, 54, 54), image.Black, image.Point{}, draw.Src)
		}, true},
		{"a line by a pixel", func(img *image.RGBA) {
			draw.Draw(img, image.Rect(100, 204, 500, 205), image.Black, image.Point{}, draw.Src)
		}, true},
		{"a tone of the paper", func(img *image.RGBA) {
			draw.Draw(img, image.Rect(0, 0, 600, 190), image.NewUniform(color.RGBA{225, 240, 230, 255}), image.Point{}, draw.Src)
		}, true},
	} {
		got := paper()
		c.do(got)
		what, marked := Compare(got, paper())
		if (what != "") != c.seen {
			t.Errorf("%s: told %q", c.name, what)
		}
		if c.name == "a dot" && (!strings.Contains(what, "about 53, 53") || marked.RGBAAt(50, 50) != (color.RGBA{220, 0, 0, 255})) {
			t.Errorf("%s: told %q, marked %v", c.name, what, marked.RGBAAt(50, 50))
		}
	}
	if what, _ := Compare(image.NewRGBA(image.Rect(0, 0, 3, 3)), paper()); what == "" {
		t.Error("another size is not told")
	}
}
