package gui

import (
	"encoding/binary"
	"image"
	"image/color"
	"image/draw"
	"math"

	"enfilade/canvas/raster"
	"enfilade/canvas/view"
)

// warper shows an old base as another camera sees it, until the base for that camera is made: shifted or stretched, its
// nearest pixels taken, and paper where the old base has nothing.
type warper struct {
	base  raster.Base
	xs    []int       // for each column its column in the old base, -1 outside
	blank *image.RGBA // what paper returns
}

// show returns the old base as seen by another camera, which may be of another size. It is good until the next call.
func (w *warper) show(old *raster.Base, from, to view.Camera, paper color.NRGBA) *raster.Base {
	if w.base.Image == nil || w.base.W != to.W || w.base.H != to.H {
		w.base = raster.Base{W: to.W, H: to.H, Image: image.NewRGBA(image.Rect(0, 0, to.W, to.H)), Ink: make([]uint8, to.W*to.H),
			Low: make([]uint8, to.W*to.H)}
		w.xs = make([]int, to.W)
	}
	w.base.InkColour = old.InkColour
	// A pixel's middle is looked up in the plan, then in the old picture.
	lookup := func(v float64, n, oldN int, toC, fromC, sign float64) int {
		mm := toC + sign*(v+0.5-float64(n)/2)/to.Scale
		at := math.Floor(float64(oldN)/2 + sign*(mm-fromC)*from.Scale)
		if at < 0 || at >= float64(oldN) {
			return -1
		}
		return int(at)
	}
	for x := range w.xs {
		w.xs[x] = lookup(float64(x), to.W, old.W, to.CX, from.CX, 1)
	}
	for y := range to.H {
		w.row(old, y, lookup(float64(y), to.H, old.H, to.CY, from.CY, -1), paper)
	}
	return &w.base
}

// paper returns a picture of nothing. It is good until the next call.
func (w *warper) paper(width, height int, c color.NRGBA) *image.RGBA {
	if r := image.Rect(0, 0, width, height); w.blank == nil || w.blank.Rect != r {
		w.blank = image.NewRGBA(r)
	}
	draw.Draw(w.blank, w.blank.Rect, image.NewUniform(c), image.Point{}, draw.Src)
	return w.blank
}

// row fills row y from row sy of the old base, -1 for paper.
func (w *warper) row(old *raster.Base, y, sy int, paper color.NRGBA) {
	n, m := w.base.W, old.W
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
	opix, oink, olow := old.Image.Pix[4*sy*m:4*(sy+1)*m], old.Ink[sy*m:(sy+1)*m], old.Low[sy*m:(sy+1)*m]
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
