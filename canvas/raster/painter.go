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
	mode       mode
	r, g, b, a uint32 // colour and strength, 0 to 255

	under []uint8 // ink that hides the spans; nil for none
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
	p.r, p.g, p.b, p.a = uint32(c.R), uint32(c.G), uint32(c.B), uint32(c.A)
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
		st := p.store[row+x0 : row+x1]
		for i := range st {
			st[i] = uint8(cover)
		}
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

// plainSpan blends one colour at one strength.
func (p *painter) plainSpan(y, x0, x1 int, cover uint32) {
	a := scale(cover, p.a)
	pix := p.pix[(y*p.w+x0)*4 : (y*p.w+x1)*4]
	if a == 255 {
		r, g, b := uint8(p.r), uint8(p.g), uint8(p.b)
		for i := 0; i+3 < len(pix); i += 4 {
			pix[i], pix[i+1], pix[i+2] = r, g, b
		}
		return
	}
	for i := 0; i+3 < len(pix); i += 4 {
		blend(pix[i:i+4:i+4], p.r, p.g, p.b, a)
	}
}

// blend mixes a colour into one opaque pixel at a strength from 0 to 255.
func blend(q []uint8, r, g, b, a uint32) {
	n := 255 - a
	q[0] = uint8((uint32(q[0])*n + r*a + 127) * 257 >> 16)
	q[1] = uint8((uint32(q[1])*n + g*a + 127) * 257 >> 16)
	q[2] = uint8((uint32(q[2])*n + b*a + 127) * 257 >> 16)
}

// maskedSpan blends one colour, less where ink lies over it or the clip lets less through.
func (p *painter) maskedSpan(y, x0, x1 int, cover uint32) {
	a := scale(cover, p.a)
	row := y * p.w
	pix := p.pix[(row+x0)*4 : (row+x1)*4]
	for x := x0; x < x1; x++ {
		s := a
		if p.under != nil {
			s = scale(s, 255-uint32(p.under[row+x]))
		}
		if p.clip != nil {
			s = scale(s, uint32(p.clip[row+x]))
		}
		if s != 0 {
			i := (x - x0) * 4
			blend(pix[i:i+4:i+4], p.r, p.g, p.b, s)
		}
	}
}
