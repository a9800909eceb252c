package raster

import (
	"image/color"
	"math"
	"testing"

	"pgregory.net/rapid"

	"enfilade/canvas/paint"
)

// inkOf draws one step in black on white and returns how many pixels' worth of ink it took.
func inkOf(l *paint.List, w, h int) float64 {
	b := &Base{W: w, H: h}
	b.Draw(&paint.List{K: 1}, w, h)
	for i := range b.Image.Pix {
		b.Image.Pix[i] = 255
	}
	l.K = 1
	var f Frame
	img := f.Draw(b, l)
	sum := 0.0
	for i := 0; i < len(img.Pix); i += 4 {
		sum += 255 - float64(img.Pix[i])
	}
	return sum / 255
}

// path returns a list with one step over one piece of path.
func path(op paint.Op, closed bool, phase float32, pts ...paint.Pt) *paint.List {
	op.Colour = color.NRGBA{A: 255}
	op.Subs = [2]int32{0, 1}
	return &paint.List{Ops: []paint.Op{op}, Points: pts, Subs: []paint.Sub{{Last: int32(len(pts)), Closed: closed, Phase: phase}}}
}

func stroked(s paint.StrokeStyle, closed bool, pts ...paint.Pt) *paint.List {
	l := path(paint.Op{Kind: paint.Stroke}, closed, 0, pts...)
	l.Strokes = []paint.StrokeStyle{s}
	return l
}

// TestStrokeInk: strokes take the area they should, by hand: length times width, caps and corners added.
func TestStrokeInk(t *testing.T) {
	a, b, c := paint.Pt{X: 20, Y: 20}, paint.Pt{X: 120, Y: 20}, paint.Pt{X: 120, Y: 80}
	for _, tc := range []struct {
		name string
		l    *paint.List
		want float64
	}{
		{"straight", stroked(paint.StrokeStyle{Width: 3}, false, a, b), 300},
		{"square ends", stroked(paint.StrokeStyle{Width: 4, Cap: paint.Square}, false, a, b), 416},
		{"round ends", stroked(paint.StrokeStyle{Width: 8, Cap: paint.RoundCap}, false, a, b), 800 + math.Pi*16},
		{"mitre", stroked(paint.StrokeStyle{Width: 4}, false, a, b, c), 4 * 160},
		{"round corner", stroked(paint.StrokeStyle{Width: 4, Join: paint.RoundJoin}, false, a, b, c), 4*160 - 4 + math.Pi},
		{"closed", stroked(paint.StrokeStyle{Width: 4}, true, a, b, c, paint.Pt{X: 20, Y: 80}), 4 * 320},
		{"dashes", stroked(paint.StrokeStyle{Width: 2, On: 6, Off: 4}, false, a, b), 2 * 60},
		{"dashes round a corner", stroked(paint.StrokeStyle{Width: 2, On: 6, Off: 4}, false, a, b, c), 2 * 96},
		{"tiny steps", stroked(paint.StrokeStyle{Width: 2}, false, a, paint.Pt{X: 20, Y: 20}, b), 200},
		{"a point with round ends", stroked(paint.StrokeStyle{Width: 8, Cap: paint.RoundCap}, false, a), math.Pi * 16},
	} {
		if got := inkOf(tc.l, 140, 100); math.Abs(got-tc.want) > 0.012*tc.want+0.6 {
			t.Errorf("%s: %.1f pixels of ink, want %.1f", tc.name, got, tc.want)
		}
	}
}

// TestDashPhase: a line that begins so far into its pattern has the dashes that the whole line has there.
func TestDashPhase(t *testing.T) {
	s := paint.StrokeStyle{Width: 2, On: 6, Off: 4}
	draw := func(x0 float32) []uint8 {
		l := path(paint.Op{Kind: paint.Stroke}, false, x0-10, paint.Pt{X: x0, Y: 5}, paint.Pt{X: 100, Y: 5})
		l.Strokes, l.K = []paint.StrokeStyle{s}, 1
		b := NewBase(&paint.List{K: 1}, 110, 10)
		var f Frame
		return f.Draw(b, l).Pix
	}
	whole, part := draw(10), draw(33)
	for i := 34 * 4; i < 110*4; i++ {
		if row := 5 * 110 * 4; whole[row+i] != part[row+i] {
			t.Fatalf("pixel %d differs", i/4)
		}
	}
}

// TestFillAgainstArea: a filled polygon takes the area the shoelace formula gives, wherever it lies in the picture.
func TestFillAgainstArea(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		c := paint.Pt{X: float32(rapid.Float64Range(60, 340).Draw(t, "x")), Y: float32(rapid.Float64Range(60, 240).Draw(t, "y"))}
		n := rapid.IntRange(3, 9).Draw(t, "n")
		pts := make([]paint.Pt, n)
		area := 0.0
		for i := range pts {
			r := rapid.Float64Range(5, 59).Draw(t, "r")
			sin, cos := math.Sincos(2 * math.Pi * float64(i) / float64(n))
			pts[i] = paint.Pt{X: c.X + float32(r*cos), Y: c.Y + float32(r*sin)}
		}
		for i, b := range pts {
			a := pts[(i+n-1)%n]
			area += float64(a.X-c.X)*float64(b.Y-c.Y) - float64(b.X-c.X)*float64(a.Y-c.Y)
		}
		area = math.Abs(area) / 2
		if got := inkOf(path(paint.Op{Kind: paint.Fill}, true, 0, pts...), 400, 300); math.Abs(got-area) > 0.01*area+1.5 {
			t.Fatalf("%v: %.1f pixels of ink, want %.1f", pts, got, area)
		}
	})
}

// TestHatchAgainstGeometry: hatching takes its share of the area, and its lines lie where the offset says.
func TestHatchAgainstGeometry(t *testing.T) {
	square := []paint.Pt{{X: 10, Y: 10}, {X: 110, Y: 10}, {X: 110, Y: 110}, {X: 10, Y: 110}}
	for _, rising := range []bool{false, true} {
		l := path(paint.Op{Kind: paint.Hatch}, true, 0, square...)
		l.Hatches = []paint.HatchStyle{{Gap: 8, Width: 2, Rising: rising, Offset: 3}}
		if got, want := inkOf(l, 120, 120), 10000*2.0/8; math.Abs(got-want) > 0.02*want {
			t.Errorf("rising %v: %.0f pixels of ink, want a quarter: %.0f", rising, got, want)
		}
		b := NewBase(&paint.List{K: 1}, 120, 120)
		for i := range b.Image.Pix {
			b.Image.Pix[i] = 255
		}
		var f Frame
		img := f.Draw(b, l)
		period := 8 * math.Sqrt2
		for x := 12; x < 108; x++ {
			y := 60
			sum := float64(x) + 0.5 - (float64(y) + 0.5)
			if rising {
				sum = float64(x) + 0.5 + float64(y) + 0.5
			}
			off := math.Abs(math.Remainder(sum-3, period)) / math.Sqrt2 // across the lines
			dark := img.Pix[(y*120+x)*4] < 128
			if math.Abs(off-1) > 0.3 && dark != (off < 1) {
				t.Fatalf("rising %v: pixel %d is %g px off a line's middle, dark %v", rising, x, off, dark)
			}
		}
	}
}

// TestWashStrength: the wash has its strengths at the eye, at its bend and at its end, and nothing outside.
func TestWashStrength(t *testing.T) {
	l := path(paint.Op{Kind: paint.Wash}, true, 0, paint.Pt{X: 20, Y: 20}, paint.Pt{X: 420, Y: 20}, paint.Pt{X: 420, Y: 120}, paint.Pt{X: 20, Y: 120})
	l.Washes = []paint.WashStyle{{Eye: paint.Pt{X: 20, Y: 70}, Radius: 400, Near: 0.24, Mid: 0.17, Far: 0.10}}
	b := NewBase(&paint.List{K: 1}, 440, 140)
	for i := range b.Image.Pix {
		b.Image.Pix[i] = 255
	}
	l.K = 1
	var f Frame
	img := f.Draw(b, l)
	at := func(x, y int) float64 { return (255 - float64(img.Pix[(y*440+x)*4])) / 255 }
	for _, tc := range []struct {
		x    int
		want float64
	}{{21, 0.24}, {160, 0.17}, {90, 0.205}, {415, 0.10}, {290, 0.135}, {430, 0}, {10, 0}} {
		if got := at(tc.x, 70); math.Abs(got-tc.want) > 0.008 {
			t.Errorf("%d px from the eye the wash has %.3f, want %.3f", tc.x-20, got, tc.want)
		}
	}
	l.Washes[0].Rims, l.Washes[0].RimStrength = [2]float32{18, 8}, 0.1
	img = f.Draw(b, l)
	inner, mid, edge, out := at(200, 70), at(200, 26), at(200, 22), at(200, 18)
	if !(edge > mid+0.05 && mid > inner+0.05 && out == 0) {
		t.Errorf("along the border the wash has %.3f, %.3f, %.3f inwards and %.3f outside: it does not gather", edge, mid, inner, out)
	}
}
