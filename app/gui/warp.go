package gui

import (
	"encoding/binary"
	"image"
	"image/color"
	"math"

	"enfilade/canvas/raster"
	"enfilade/canvas/view"
)

// warper shows an old base as another camera sees it, until the base for that camera is made: shifted or stretched, its
// nearest pixels taken, and paper where the old base has nothing.
type warper struct {
	base raster.Base
	xs   []int // for each column its column in the old base, -1 outside
}

// show returns the old base as seen by another camera of the same size. It is good until the next call.
func (w *warper) show(old *raster.Base, from, to view.Camera, paper color.NRGBA) *raster.Base {
	if w.base.Image == nil || w.base.W != old.W || w.base.H != old.H {
		w.base = raster.Base{W: old.W, H: old.H, Image: image.NewRGBA(old.Image.Rect), Ink: make([]uint8, len(old.Ink)),
			Low: make([]uint8, len(old.Low))}
		w.xs = make([]int, old.W)
	}
	w.base.InkColour = old.InkColour
	// A pixel's middle is looked up in the plan, then in the old picture.
	lookup := func(v float64, n int, toC, fromC, sign float64) int {
		mm := toC + sign*(v+0.5-float64(n)/2)/to.Scale
		at := math.Floor(float64(n)/2 + sign*(mm-fromC)*from.Scale)
		if at < 0 || at >= float64(n) {
			return -1
		}
		return int(at)
	}
	for x := range w.xs {
		w.xs[x] = lookup(float64(x), old.W, to.CX, from.CX, 1)
	}
	for y := range old.H {
		w.row(old, y, lookup(float64(y), old.H, to.CY, from.CY, -1), paper)
	}
	return &w.base
}

// row fills row y from row sy of the old base, -1 for paper.
func (w *warper) row(old *raster.Base, y, sy int, paper color.NRGBA) {
	n := old.W
	blank := uint32(paper.R) | uint32(paper.G)<<8 | uint32(paper.B)<<16 | 255<<24
	pix, ink, low := w.base.Image.Pix[4*y*n:4*(y+1)*n], w.base.Ink[y*n:(y+1)*n], w.base.Low[y*n:(y+1)*n]
	if sy < 0 {
		for x := range n {
			binary.LittleEndian.PutUint32(pix[4*x:], blank)
		}
		clear(ink)
		clear(low)
		return
	}
	opix, oink, olow := old.Image.Pix[4*sy*n:4*(sy+1)*n], old.Ink[sy*n:(sy+1)*n], old.Low[sy*n:(sy+1)*n]
	for x, sx := range w.xs {
		if sx < 0 {
			binary.LittleEndian.PutUint32(pix[4*x:], blank)
			ink[x], low[x] = 0, 0
			continue
		}
		binary.LittleEndian.PutUint32(pix[4*x:], binary.LittleEndian.Uint32(opix[4*sx:]))
		ink[x], low[x] = oink[sx], olow[sx]
	}
}
