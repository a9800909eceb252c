package raster

import (
	"math"

	"github.com/golang/freetype/raster"
	"golang.org/x/image/math/fixed"

	"enfilade/canvas/paint"
)

// filler feeds paths to the rasteriser. Its coordinates must not be negative, so they are moved by a margin and the spans
// moved back. Small shapes go through a small rasteriser, because each one is swept over its whole height.
type filler struct {
	large, small *raster.Rasterizer
	r            *raster.Rasterizer // the one in use
	margin       int
	dx, dy       float32 // moves the path in use
	run          []paint.Pt
}

// smallSize is the side of the small rasteriser in pixels; most glyphs at 2x fit.
const smallSize = 128

// marginPx is how far a path may reach beyond the picture, in px at 100 %: what the display list keeps, and its strokes.
const marginPx = 96

func newFiller(w, h int, k float64) *filler {
	m := int(math.Ceil(marginPx * k))
	f := &filler{large: raster.NewRasterizer(w+2*m, h+2*m), small: raster.NewRasterizer(smallSize, smallSize), margin: m}
	f.large.Dx, f.large.Dy = -m, -m
	f.large.UseNonZeroWinding, f.small.UseNonZeroWinding = true, true
	return f
}

// open chooses the rasteriser for a path that reaches beyond its points by so many pixels, and clears it.
func (f *filler) open(l *paint.List, op *paint.Op, reach float32) {
	x0, y0, x1, y1 := float32(math.Inf(1)), float32(math.Inf(1)), float32(math.Inf(-1)), float32(math.Inf(-1))
	for _, s := range l.Path(op) {
		for _, q := range l.Points[s.First:s.Last] {
			x0, y0, x1, y1 = min(x0, q.X), min(y0, q.Y), max(x1, q.X), max(y1, q.Y)
		}
	}
	left, top := math.Floor(float64(x0-reach))-1, math.Floor(float64(y0-reach))-1
	if float64(x1+reach)-left < smallSize-2 && float64(y1+reach)-top < smallSize-2 {
		f.use(f.small, int(left), int(top))
		return
	}
	f.use(f.large, -f.margin, -f.margin)
}

// use takes a rasteriser whose own origin lies at a pixel of the picture.
func (f *filler) use(r *raster.Rasterizer, left, top int) {
	f.r, f.dx, f.dy = r, float32(-left), float32(-top)
	r.Dx, r.Dy = left, top
	r.UseNonZeroWinding = true
	r.Clear()
}

func (f *filler) fixed(x, y float32) fixed.Point26_6 {
	return fixed.Point26_6{X: fixed.Int26_6((x+f.dx)*64 + 0.5), Y: fixed.Int26_6((y+f.dy)*64 + 0.5)}
}

// fill adds an op's path, every piece closed.
func (f *filler) fill(l *paint.List, op *paint.Op) {
	for _, s := range l.Path(op) {
		pts := l.Points[s.First:s.Last]
		for i, q := range pts {
			f.side(pts[(i+len(pts)-1)%len(pts)], q)
		}
	}
}

// side adds one side of a closed path. The rasteriser walks each row's cells from the left to add one, so a long side to the
// right that is almost level goes in pieces, the rightmost first; sides may come in any order.
func (f *filler) side(a, b paint.Pt) {
	const piece = 48
	dx, dy := b.X-a.X, b.Y-a.Y
	if dx > 2*piece && (dy < 0 && dx > -8*dy || dy > 0 && dx > 8*dy) {
		for x := float32(int(dx/piece)) * piece; x >= 0; x -= piece {
			q := paint.Pt{X: a.X + x, Y: a.Y + dy*x/dx}
			f.r.Start(f.fixed(q.X, q.Y))
			f.r.Add1(f.fixed(b.X, b.Y))
			b = q
		}
		return
	}
	f.r.Start(f.fixed(a.X, a.Y))
	f.r.Add1(f.fixed(b.X, b.Y))
}

// polygon adds a convex polygon, always in the same sense, so that the pieces of a stroke add up and never cancel.
func (f *filler) polygon(pts ...paint.Pt) {
	area := float32(0)
	for i, b := range pts {
		a := pts[(i+len(pts)-1)%len(pts)]
		area += (a.X-pts[0].X)*(b.Y-pts[0].Y) - (b.X-pts[0].X)*(a.Y-pts[0].Y)
	}
	for i, b := range pts {
		a := pts[(i+len(pts)-1)%len(pts)]
		if area < 0 {
			a, b = b, a
		}
		f.side(a, b)
	}
}
