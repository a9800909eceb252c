package raster

import (
	"math"

	"enfilade/canvas/paint"
)

// hatch is a family of parallel lines at 45°, worked out for each pixel by itself: how much of the pixel a line covers
// follows from the distance of the pixel's middle to the line's. That is exact along the line and needs no geometry.
type hatch struct {
	sign  int // of y in the running number x + sign*y of a pixel's diagonal
	start float64
	table [hatchSteps]uint8 // coverage by phase within the gap
	step  float64           // table entries a pixel to the right
}

const hatchSteps = 1024

func (h *hatch) set(s paint.HatchStyle) {
	gap, half := float64(s.Gap), float64(s.Width)/2
	for i := range h.table {
		d := (float64(i) + 0.5) / hatchSteps * gap
		d = math.Min(d, gap-d)
		h.table[i] = uint8(255*min(max(half+0.5-d, 0), 1)*min(1, 2*half) + 0.5)
	}
	// One pixel to the right is 1/√2 across the lines.
	h.step = hatchSteps / (gap * math.Sqrt2)
	h.sign = -1
	if s.Rising {
		h.sign = 1
	}
	// The pixel's middle is half a pixel right and down: x + y grows by one, x - y by nothing.
	middle := 0.0
	if s.Rising {
		middle = 1
	}
	h.start = middle - float64(s.Offset)
}

func (p *painter) hatchSpan(y, x0, x1 int, cover uint32) {
	a := scale(cover, p.a)
	h := &p.hatch
	// Fixed point with 16 bits below: the phase of the first pixel, then a constant step.
	phase := (float64(x0+h.sign*y) + h.start) * h.step
	phase -= math.Floor(phase/hatchSteps) * hatchSteps
	at, step := uint32(phase*65536), uint32(h.step*65536)
	pix := p.pix[(y*p.w+x0)*4 : (y*p.w+x1)*4]
	for ; len(pix) >= 4; pix = pix[4:] {
		if c := uint32(h.table[at>>16%hatchSteps]); c != 0 {
			p.pairs.one(pix, full(scale(a, c)))
		}
		at += step
	}
}
