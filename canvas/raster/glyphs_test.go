package raster

import (
	"image/color"
	"testing"

	"enfilade/assets"
	"enfilade/canvas/paint"
)

func textList(s string, style paint.TextStyle) *paint.List {
	l := &paint.List{K: 1, Chars: []byte(s)}
	style.Chars = [2]int32{0, int32(len(s))}
	l.Texts = []paint.TextStyle{style}
	l.Ops = []paint.Op{{Kind: paint.Text, Colour: color.NRGBA{A: 255}}}
	return l
}

// inkBox returns the box of what is not white.
func inkBox(pix []uint8, w, h int) (x0, y0, x1, y1 int) {
	x0, y0 = w, h
	for i := 0; i < len(pix); i += 4 {
		if pix[i] < 200 {
			x, y := i/4%w, i/4/w
			x0, y0, x1, y1 = min(x0, x), min(y0, y), max(x1, x+1), max(y1, y+1)
		}
	}
	return
}

func white(w, h int) *Base {
	b := NewBase(&paint.List{K: 1}, w, h)
	for i := range b.Image.Pix {
		b.Image.Pix[i] = 255
	}
	return b
}

// TestText: capitals stand on the base line, are as high as the font says and as wide as was measured.
func TestText(t *testing.T) {
	var f Frame
	style := paint.TextStyle{At: paint.Pt{X: 20, Y: 60}, Size: 40, Weight: assets.Bold}
	img := f.Draw(white(300, 100), textList("HELM", style))
	x0, y0, x1, y1 := inkBox(img.Pix, 300, 100)
	width := assets.FaceOf(assets.Bold).Width([]byte("HELM"), 40, 0)
	if y1 != 60 || y0 < 60-30 || y0 > 60-28 {
		t.Errorf("capitals stand from %d to %d, want from 31 or so to the base line at 60", y0, y1)
	}
	if x0 < 21 || x0 > 26 || float64(x1) > 20+width || float64(x1) < 20+width-7 {
		t.Errorf("text lies from %d to %d, want within 20 and %.1f", x0, x1, 20+width)
	}
	style.Up, style.At = true, paint.Pt{X: 60, Y: 280}
	up := f.Draw(white(100, 300), textList("HELM", style))
	ux0, uy0, ux1, uy1 := inkBox(up.Pix, 100, 300)
	if ux1-ux0 != y1-y0 || uy1-uy0 != x1-x0 || ux1 != 60 {
		t.Errorf("upwards the text takes %d by %d and ends at %d, want %d by %d at 60", ux1-ux0, uy1-uy0, ux1, y1-y0, x1-x0)
	}
}

// TestHalo: a halo surrounds every letter by half its width and covers what is below.
func TestHalo(t *testing.T) {
	var f Frame
	b := white(120, 80)
	for i := range b.Image.Pix {
		if i%4 != 3 {
			b.Image.Pix[i] = 100
		}
	}
	style := paint.TextStyle{At: paint.Pt{X: 40, Y: 60}, Size: 40, Weight: assets.Bold, Halo: 8, HaloColour: color.NRGBA{R: 255, G: 255, B: 255, A: 255}}
	img := f.Draw(b, textList("I", style))
	row := img.Pix[45*120*4 : 46*120*4]
	var black, bright, first, last int
	for x := range 120 {
		switch v := row[x*4]; {
		case v < 50:
			black++
			if first == 0 {
				first = x
			}
			last = x
		case v > 240:
			bright++
		}
	}
	if black < 4 || bright < 6 || bright > 8 {
		t.Errorf("across an I of %d px the halo has %d px, want 4 on either side", black, bright)
	}
	if l, r := row[(first-3)*4], row[(last+3)*4]; l < 240 || r < 240 {
		t.Errorf("3 px beside the letter there is %d and %d, want halo", l, r)
	}
}

// TestQuarters: a letter's place within the pixel is kept to a quarter.
func TestQuarters(t *testing.T) {
	var f Frame
	seen := map[string]bool{}
	for _, dx := range []float32{0, 0.05, 0.25, 0.5, 0.75, 0.95} {
		l := textList("A", paint.TextStyle{At: paint.Pt{X: 5 + dx, Y: 20}, Size: 16, Weight: assets.Regular})
		f.Draw(white(30, 30), l)
		seen[string(f.img.Pix)] = true
	}
	if len(seen) != 5 { // 0.05 rounds to 0, 0.95 to the next whole pixel
		t.Errorf("six places give %d pictures, want 5", len(seen))
	}
}
