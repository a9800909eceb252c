package raster

import (
	"math"

	"enfilade/canvas/paint"
)

// wash is a radial wash: a strength for every pixel by its squared distance from the eye.
type wash struct {
	x, y   float64
	scale  float64 // table entries a squared pixel
	table  [washSteps + 1]uint16
	cached paint.WashStyle
	a      uint32
}

const washSteps = 2048

// set prepares the table; it is kept while the strengths and the radius stay.
func (w *wash) set(s paint.WashStyle) {
	w.x, w.y = float64(s.Eye.X), float64(s.Eye.Y)
	radius := math.Max(float64(s.Radius), 1)
	w.scale = washSteps / (radius * radius)
	if c := w.cached; c.Near == s.Near && c.Mid == s.Mid && c.Far == s.Far {
		return // the table goes by the share of the radius alone
	}
	w.cached = s
	for i := range w.table {
		share := math.Sqrt(float64(i) / washSteps)
		near, mid, far := float64(s.Near), float64(s.Mid), float64(s.Far)
		v := mid + (far-mid)*(share-paint.WashBend)/(1-paint.WashBend)
		if share < paint.WashBend {
			v = near + (mid-near)*share/paint.WashBend
		}
		w.table[i] = uint16(v*255*128 + 0.5) // seven bits more than a strength of 255 needs, for the dither
	}
}

// washSpan blends the wash at full coverage fast, at the border with its coverage.
//
// The strength has seven bits more than the blend can take; a fixed pattern of four by four pixels spreads the rest, so
// that the wash has no rings.
func (p *painter) washSpan(y, x0, x1 int, cover uint32) {
	w := &p.wash
	row := y * p.w
	pix := p.pix[(row+x0)*4 : (row+x1)*4]
	under := p.under
	if under != nil {
		under = under[row+x0 : row+x1]
	}
	dy := float64(y) + 0.5 - w.y
	dx := float64(x0) + 0.5 - w.x
	// The squared distance along a row by second differences, in table entries with 20 bits below.
	const one = 1 << 20
	d2 := int64((dx*dx + dy*dy) * w.scale * one)
	inc := int64((2*dx + 1) * w.scale * one)
	inc2 := int64(2 * w.scale * one)
	dither := &ditherRows[y&3]
	for i := 0; i < len(pix)/4; i++ {
		e := min(max(d2>>20, 0), washSteps)
		d2 += inc
		inc += inc2
		a := (uint32(w.table[e]) + dither[(x0+i)&3]) >> 7
		if cover != 255 {
			a = scale(a, cover)
		}
		if under != nil {
			if u := under[i]; u != 0 {
				a = scale(a, 255-uint32(u))
			}
		}
		blend(pix[i*4:i*4+4:i*4+4], p.r, p.g, p.b, a)
	}
}

// ditherRows is the ordered dither of Bayer (1973), four by four, spread over the seven bits below a strength.
var ditherRows = [4][4]uint32{
	{4, 68, 20, 84},
	{100, 36, 116, 52},
	{28, 92, 12, 76},
	{124, 60, 108, 44},
}
