package raster

import (
	"math"

	"enfilade/canvas/paint"
)

// wash is a radial wash: a strength for every pixel by its squared distance from the eye.
type wash struct {
	x, y   float64
	scale  float64               // table entries a squared pixel
	table  [washSteps + 1]uint16 // strengths from 0 to 256
	cached paint.WashStyle
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
		w.table[i] = uint16(v*256 + 0.5)
	}
}

// washSpan blends the wash. Where there is no ink and the coverage is full, eight pixels have the strength of their middle:
// strengths change by one in 256 over tens of pixels, and one step of strength is at most one step of a channel.
func (p *painter) washSpan(y, x0, x1 int, cover uint32) {
	w := &p.wash
	from, to := y*p.w+x0, y*p.w+x1
	pix := p.pix[from*4 : to*4]
	var under []uint8
	if p.under != nil {
		under = p.under[from:to]
	}
	dy := float64(y) + 0.5 - w.y
	x := float64(x0) + 0.5 - w.x
	for i := 0; i < to-from; {
		many := min(8, to-from-i)
		mid := x + float64(i) + float64(many-1)/2
		a := uint64(w.table[min(int((mid*mid+dy*dy)*w.scale), washSteps)])
		if many == 8 && cover == 255 {
			u := word(under, i, 0)
			if u == 0 {
				p.pairs.at(a).eight(pix[i*4:], 256-a)
			}
			if u == 0 || u == ^uint64(0) {
				i += 8
				continue
			}
		}
		for end := i + many; i < end; i++ {
			s := scale(min(uint32(a), 255), cover)
			if under != nil {
				s = scale(s, 255-uint32(under[i]))
			}
			p.pairs.one(pix[i*4:i*4+4], uint64(s))
		}
	}
}
