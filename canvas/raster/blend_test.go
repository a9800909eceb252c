package raster

import (
	"image/color"
	"math"
	"math/rand/v2"
	"testing"
)

// exactOver is the blend in real numbers.
func exactOver(dst, src uint8, strength float64) float64 {
	return float64(dst)*(1-strength) + float64(src)*strength
}

func randomPainter(rng *rand.Rand, w int) (*painter, color.NRGBA) {
	p := &painter{canvas: &canvas{pix: make([]uint8, 4*w), w: w, h: 1}}
	for i := range p.pix {
		p.pix[i] = uint8(rng.Uint32())
		if i%4 == 3 {
			p.pix[i] = 255
		}
	}
	c := color.NRGBA{R: uint8(rng.Uint32()), G: uint8(rng.Uint32()), B: uint8(rng.Uint32()), A: uint8(rng.Uint32())}
	p.colour(c)
	return p, c
}

func randomMask(rng *rand.Rand, w int) []uint8 {
	m := make([]uint8, w)
	for i := range m {
		// Long runs of nothing and of everything, as masks have.
		switch v := rng.IntN(40); {
		case i > 0 && v > 2:
			m[i] = m[i-1]
		default:
			m[i] = []uint8{0, 255, uint8(rng.Uint32())}[rng.IntN(3)]
		}
	}
	return m
}

// TestSpans: every way of blending a span agrees with real numbers to within two in 255, and is exact at both ends.
func TestSpans(t *testing.T) {
	rng := rand.New(rand.NewPCG(1, 2))
	for range 400 {
		w := 1 + rng.IntN(90)
		p, c := randomPainter(rng, w)
		before := append([]uint8(nil), p.pix...)
		cover := []uint32{255, 255, uint32(rng.IntN(256))}[rng.IntN(3)]
		kind := rng.IntN(4)
		if kind&1 != 0 {
			p.under = randomMask(rng, w)
		}
		if kind&2 != 0 {
			p.clip = randomMask(rng, w)
		}
		x0 := rng.IntN(w)
		p.span(0, x0, w, cover)
		for x := range w {
			strength := float64(cover) / 255 * float64(c.A) / 255
			if p.under != nil {
				strength *= 1 - float64(p.under[x])/255
			}
			if p.clip != nil {
				strength *= float64(p.clip[x]) / 255
			}
			if x < x0 {
				strength = 0
			}
			for ch, src := range [...]uint8{c.R, c.G, c.B} {
				got, want := float64(p.pix[4*x+ch]), exactOver(before[4*x+ch], src, strength)
				if math.Abs(got-want) > 2 || (strength == 0 || strength == 1) && got != want {
					t.Fatalf("masks %d, pixel %d of %d, strength %g: %g, want %g", kind, x, w, strength, got, want)
				}
			}
			if p.pix[4*x+3] != 255 {
				t.Fatalf("pixel %d is no longer opaque", x)
			}
		}
	}
}

// TestUnderInk: colour that is laid under ink gives what drawing it first and the ink over it would have given.
func TestUnderInk(t *testing.T) {
	rng := rand.New(rand.NewPCG(3, 4))
	for range 400 {
		w := 1 + rng.IntN(40)
		p, c := randomPainter(rng, w)
		ink := color.NRGBA{R: uint8(rng.Uint32()), G: uint8(rng.Uint32()), B: uint8(rng.Uint32()), A: 255}
		below := append([]uint8(nil), p.pix...)
		mask := randomMask(rng, w)
		inked := pairsOf(ink)
		for x, m := range mask {
			inked.one(p.pix[4*x:4*x+4], full(uint32(m)))
		}
		p.under, p.inkColour = mask, &inked
		p.span(0, 0, w, 255)
		for x, m := range mask {
			for ch, src := range [...]uint8{c.R, c.G, c.B} {
				first := exactOver(below[4*x+ch], src, float64(c.A)/255)
				want := first*(1-float64(m)/255) + float64([...]uint8{ink.R, ink.G, ink.B}[ch])*float64(m)/255
				if got := float64(p.pix[4*x+ch]); math.Abs(got-want) > 3 {
					t.Fatalf("ink %d of 255 over strength %d: %g, want %g", m, c.A, got, want)
				}
			}
		}
	}
}

func TestPutCover(t *testing.T) {
	for n := range 40 {
		m := make([]uint8, n+2)
		putCover(m[1:n+1], 7)
		for i, v := range m {
			if want := i > 0 && i <= n; (v == 7) != want {
				t.Fatalf("%d bytes: %v", n, m)
			}
		}
	}
}
