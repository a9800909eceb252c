package raster

import (
	"image/color"

	"github.com/golang/freetype/raster"
)

// canvas is what spans are painted on: a tight RGBA image, opaque everywhere.
type canvas struct {
	pix   []uint8
	w, h  int
	clipX int // nothing is painted left of it
	clipY int // or above it
}

// painter blends spans of the rasteriser into a canvas. It is a raster.Painter.
type painter struct {
	*canvas
	mode  mode
	pairs        // the colour
	a     uint32 // strength, 0 to 255

	under     []uint8 // ink that hides the spans; nil for none
	inkColour *pairs  // of the ink that hides the spans, where it has one

	clip  []uint8 // coverage that the spans are cut to; nil for none
	store []uint8 // where coverage is put down, for a later clip; nil for none
	ink   []uint8 // base: where ink is put down; nil for none
	low   []uint8 // base: the mask that ink of every kind goes to

	hatch hatch
	wash  wash
}

type mode uint8

const (
	solid mode = iota
	hatched
	washed
)

func (p *painter) colour(c color.NRGBA) {
	p.pairs, p.a = pairsOf(c), uint32(c.A)
}

// Paint blends the spans. They come offset by the margin that keeps the rasteriser's coordinates positive.
func (p *painter) Paint(spans []raster.Span, _ bool) {
	for i := range spans {
		s := &spans[i]
		if s.Alpha == 0 {
			continue
		}
		y, x0, x1 := s.Y, max(s.X0, p.clipX), min(s.X1, p.w)
		if y < p.clipY || y >= p.h || x0 >= x1 {
			continue
		}
		cover := s.Alpha >> 8 // 16 bits to 8, full stays full
		p.span(y, x0, x1, cover)
	}
}

// span blends one run of pixels with the same coverage from 1 to 255.
func (p *painter) span(y, x0, x1 int, cover uint32) {
	row := y * p.w
	if p.store != nil {
		putCover(p.store[row+x0:row+x1], uint8(cover))
	}
	switch {
	case p.mode == washed:
		p.washSpan(y, x0, x1, cover)
	case p.mode == hatched:
		p.hatchSpan(y, x0, x1, cover)
	case p.under == nil && p.clip == nil:
		p.plainSpan(y, x0, x1, cover)
	default:
		p.maskedSpan(y, x0, x1, cover)
	}
	if p.ink != nil {
		putInk(p.ink[row+x0:row+x1], scale(cover, p.a))
	}
	if p.low != nil {
		putInk(p.low[row+x0:row+x1], scale(cover, p.a))
	}
}

func putInk(m []uint8, a uint32) {
	for i, v := range m {
		m[i] = uint8(uint32(v) + scale(255-uint32(v), a))
	}
}

// scale returns a*b/255, rounded.
func scale(a, b uint32) uint32 {
	t := a*b + 128
	return (t + t>>8) >> 8
}
