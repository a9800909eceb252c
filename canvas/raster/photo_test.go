package raster_test

import (
	"bytes"
	"encoding/binary"
	"hash/crc32"
	"image"
	"image/color"
	"image/jpeg"
	"image/png"
	"strings"
	"testing"

	"enfilade/canvas/paint"
	"enfilade/canvas/raster"
	"enfilade/canvas/view"
	"enfilade/solver/exact"
	"enfilade/solver/plan"
)

var (
	red   = color.NRGBA{R: 255, A: 255}
	green = color.NRGBA{G: 255, A: 255}
	blue  = color.NRGBA{B: 255, A: 255}
	white = color.NRGBA{R: 255, G: 255, B: 255, A: 255}
)

// quarters is a picture whose quarters are red and green above, blue and white below.
func quarters(w, h int) *image.NRGBA {
	img := image.NewNRGBA(image.Rect(0, 0, w, h))
	for y := range h {
		for x := range w {
			img.SetNRGBA(x, y, [2][2]color.NRGBA{{red, green}, {blue, white}}[2*y/h][2*x/w])
		}
	}
	return img
}

// laid draws the base of a plan without anything but an underlay. A metre is 10 px, 0, 0 at the picture's centre.
func laid(t *testing.T, u plan.Underlay, photo *paint.Photo, theme *paint.Theme) *image.RGBA {
	t.Helper()
	u.Image = "scan.png"
	p, err := plan.SetUnderlay{Underlay: u}.Apply(plan.New())
	if err != nil {
		t.Fatal(err)
	}
	s := &paint.Scene{Plan: p, Photo: photo, Theme: theme, Camera: view.Camera{Scale: 0.01, W: 400, H: 300, K: 1}}
	return raster.NewBase(paint.Base(s), 400, 300).Image
}

func at(img *image.RGBA, xm, ym float64) color.NRGBA {
	c := img.RGBAAt(200+int(xm*10), 150-int(ym*10))
	return color.NRGBA(c)
}

// TestUnderlayLiesInItsPlace: its lower left corner lies at its point, it is as wide as its scale says, and turns
// counter-clockwise about that point.
func TestUnderlayLiesInItsPlace(t *testing.T) {
	photo := raster.NewPhoto(quarters(1000, 500)) // 20 m by 10 m at 20 mm a pixel, 5 levels down
	u := plan.Underlay{At: exact.Pt{X: 10000, Y: 20000}, MMPerPixel: 20, Opacity: 1}
	ground := paint.Light().Ground
	for _, c := range []struct {
		turn, x, y float64
		want       color.NRGBA
	}{
		{0, 3, 4, blue}, {0, 18, 4, white}, {0, 3, 10, red}, {0, 18, 10, green},
		{0, 1.3, 2.3, blue}, {0, 0.7, 2.3, ground}, {0, 1.3, 1.7, ground}, {0, 19.8, 11.6, green},
		{90, 0.7, 2.3, blue}, {90, 0.7, 12.9, white}, {90, -8.6, 12.9, green}, {90, -8.6, 3, red}, {90, 1.3, 2.3, ground},
	} {
		u.Turn = c.turn
		if got := at(laid(t, u, photo, paint.Light()), c.x, c.y); got != c.want {
			t.Errorf("turned by %g°, at %g, %g m it is %v, want %v", c.turn, c.x, c.y, got, c.want)
		}
	}
}

func TestUnderlayStrength(t *testing.T) {
	photo := raster.NewPhoto(quarters(200, 100))
	u := plan.Underlay{At: exact.Pt{}, MMPerPixel: 50, Opacity: 0.4}
	ground := paint.Light().Ground
	mix := func(a, b uint8) int { return (int(a)*6 + int(b)*4) / 10 }
	got := at(laid(t, u, photo, paint.Light()), 3.3, 3.3) // red
	if want := (color.NRGBA{uint8(mix(ground.R, 255)), uint8(mix(ground.G, 0)), uint8(mix(ground.B, 0)), 255}); near(got.R, want.R) > 2 || near(got.G, want.G) > 2 || near(got.B, want.B) > 2 {
		t.Errorf("at 40 %% red is %v, want %v", got, want)
	}
	u.Hidden = true
	if got := at(laid(t, u, photo, paint.Light()), 3.3, 3.3); got != ground {
		t.Errorf("hidden it is %v", got)
	}
}

func near(a, b uint8) int { return max(int(a)-int(b), int(b)-int(a)) }

// TestUnderlayOnSlate: in the dark theme a drawing on white paper becomes chalk on slate, and a dark picture stays.
func TestUnderlayOnSlate(t *testing.T) {
	u := plan.Underlay{At: exact.Pt{}, MMPerPixel: 50, Opacity: 1}
	sheet := image.NewNRGBA(image.Rect(0, 0, 200, 100))
	for i := range sheet.Pix {
		sheet.Pix[i] = 255
	}
	for i := range 100 {
		for x := range 40 {
			sheet.SetNRGBA(x, i, color.NRGBA{R: 40, A: 255})
		}
	}
	img := laid(t, u, raster.NewPhoto(sheet), paint.Dark())
	if paper, line := at(img, 8.3, 2.7), at(img, 1.3, 2.7); paper.R != 0 || line.R != 255 || line.G != 215 {
		t.Errorf("paper is %v and a dark red line %v, want black and light red", paper, line)
	}
	for i := range sheet.Pix {
		if i%4 != 3 {
			sheet.Pix[i] = 30
		}
	}
	if got := at(laid(t, u, raster.NewPhoto(sheet), paint.Dark()), 3.3, 2.7); got.R != 30 {
		t.Errorf("a dark picture is %v, want it as it is", got)
	}
}

// TestUnderlaySmaller: seen small, a fine pattern becomes its mean and no moiré.
func TestUnderlaySmaller(t *testing.T) {
	img := image.NewGray(image.Rect(0, 0, 1000, 1000))
	for i := range img.Pix {
		img.Pix[i] = uint8(255 * ((i%1000 + i/1000) % 2))
	}
	b := laid(t, plan.Underlay{At: exact.Pt{}, MMPerPixel: 12.7, Opacity: 1}, raster.NewPhoto(img), paint.Light())
	for x := 1.0; x < 12; x += 0.3 {
		if got := at(b, x, 5.1); near(got.R, 128) > 2 {
			t.Fatalf("at %g m it is %v, want the mean", x, got)
		}
	}
}

func TestReadPhoto(t *testing.T) {
	var p, j bytes.Buffer
	if err := png.Encode(&p, quarters(30, 20)); err != nil {
		t.Fatal(err)
	}
	if err := jpeg.Encode(&j, quarters(30, 20), nil); err != nil {
		t.Fatal(err)
	}
	for _, data := range [][]byte{p.Bytes(), j.Bytes()} {
		if photo, err := raster.ReadPhoto(data); err != nil || photo.W != 30 || photo.H != 20 {
			t.Errorf("%v, %v", photo, err)
		}
	}
	huge := bytes.Clone(p.Bytes())
	binary.BigEndian.PutUint32(huge[16:], 20000) // the width in its header
	binary.BigEndian.PutUint32(huge[20:], 10000)
	binary.BigEndian.PutUint32(huge[29:], crc32.ChecksumIEEE(huge[12:29]))
	for name, c := range map[string]struct {
		data []byte
		want string
	}{
		"text": {[]byte("no picture"), "neither a PNG nor a JPEG"}, "cut off": {p.Bytes()[:len(p.Bytes())-30], "damaged png"},
		"huge": {huge, "20000 × 10000 pixels; make it smaller, up to 64 million"},
	} {
		if _, err := raster.ReadPhoto(c.data); err == nil || !strings.Contains(err.Error(), c.want) {
			t.Errorf("%s: %v, want %q", name, err, c.want)
		}
	}
}

// BenchmarkBaseOverPhoto is the base of an empty plan over a scan, at three zooms.
func BenchmarkBaseOverPhoto(b *testing.B) {
	photo := raster.NewPhoto(quarters(4000, 3000))
	for _, c := range []struct {
		name  string
		scale float64
	}{{"whole", 0.016}, {"half", 0.05}, {"near", 0.5}} {
		b.Run("photo=4000x3000/zoom="+c.name, func(b *testing.B) {
			p, err := plan.SetUnderlay{Underlay: plan.Underlay{Image: "a.png", At: exact.Pt{X: -300000, Y: -220000}, MMPerPixel: 15, Opacity: 0.4, Turn: 1}}.Apply(plan.New())
			if err != nil {
				b.Fatal(err)
			}
			s := &paint.Scene{Plan: p, Photo: photo, Theme: paint.Light(), Camera: view.Camera{Scale: c.scale, W: 1440, H: 900, K: 1}}
			for b.Loop() {
				raster.NewBase(paint.Base(s), 1440, 900)
			}
		})
	}
}
