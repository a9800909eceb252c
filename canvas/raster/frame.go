package raster

import (
	"image"
	"image/color"

	"enfilade/canvas/paint"
)

// Frame draws overlays over bases. It keeps one image and what drawing needs; it is not for concurrent use.
type Frame struct {
	img    *image.RGBA
	fill   *filler
	k      float64
	glyphs *glyphs
	paint  painter
	canvas canvas
	inked  pairs   // the colour of the base's ink
	clip   []uint8 // coverage of the region that is being washed
	rim    []paint.Pt
}

// Draw copies the base and blends the overlay into it. The image is tight, begins at (0, 0), is opaque, and belongs to the
// frame: it is good until the next call. The overlay has the size of the base; where it is larger it is cut.
func (f *Frame) Draw(b *Base, overlay *paint.List) *image.RGBA {
	f.resize(b.W, b.H, overlay.K)
	copy(f.img.Pix, b.Image.Pix)
	p := &f.paint
	f.inked = pairsOf(b.InkColour)
	for i := range overlay.Ops {
		op := &overlay.Ops[i]
		f.canvas.clipX, f.canvas.clipY = overlay.Left, overlay.Left
		if op.Free {
			f.canvas.clipX, f.canvas.clipY = 0, 0
		}
		p.under, p.inkColour = nil, nil
		switch op.Ink {
		case paint.LowInk:
			p.under = b.Low
		case paint.HardInk:
			p.under, p.inkColour = b.Ink, &f.inked
		}
		f.step(overlay, op)
	}
	return f.img
}

func (f *Frame) resize(w, h int, k float64) {
	if f.img != nil && f.img.Rect.Dx() == w && f.img.Rect.Dy() == h && f.k == k {
		return
	}
	if f.glyphs == nil {
		f.glyphs = newGlyphs()
	}
	f.img = image.NewRGBA(image.Rect(0, 0, w, h))
	f.fill, f.k = newFiller(w, h, k), k
	f.clip = make([]uint8, w*h)
	f.canvas = canvas{pix: f.img.Pix, w: w, h: h}
	f.paint = painter{canvas: &f.canvas}
}

// step draws one step of the overlay.
func (f *Frame) step(l *paint.List, op *paint.Op) {
	p := &f.paint
	p.mode, p.clip, p.store = solid, nil, nil
	p.colour(op.Colour)
	switch op.Kind {
	case paint.Fill:
		if p.under == nil && fillRects(p, l, op) {
			return
		}
		f.fill.open(l, op, 0)
		f.fill.r.UseNonZeroWinding = !op.EvenOdd
		f.fill.fill(l, op)
		f.fill.r.Rasterize(p)
	case paint.Stroke:
		s := l.Strokes[op.Style]
		f.fill.open(l, op, s.Width*2+1)
		f.fill.stroke(l, op, s)
		f.fill.r.Rasterize(p)
	case paint.Hatch:
		p.hatch.set(l.Hatches[op.Style])
		p.mode = hatched
		f.fill.open(l, op, 0)
		f.fill.fill(l, op)
		f.fill.r.Rasterize(p)
	case paint.Wash:
		f.washRegion(l, op)
	case paint.Text:
		p.under = nil
		f.glyphs.paintText(p, l, op)
	}
}

// washRegion blends the wash and puts the region's coverage down; the strokes along its border are cut to that.
func (f *Frame) washRegion(l *paint.List, op *paint.Op) {
	p := &f.paint
	w := l.Washes[op.Style]
	clear(f.clip)
	p.wash.set(w)
	p.mode, p.store = washed, f.clip
	f.fill.open(l, op, 0)
	f.fill.fill(l, op)
	f.fill.r.Rasterize(p)
	p.mode, p.store, p.clip = solid, nil, f.clip
	for _, width := range w.Rims {
		if w.RimStrength <= 0 || width <= 0 {
			continue
		}
		p.colour(color.NRGBA{R: op.Colour.R, G: op.Colour.G, B: op.Colour.B, A: uint8(w.RimStrength*255 + 0.5)})
		f.fill.open(l, op, width)
		for _, sub := range l.Path(op) {
			f.rim = spaced(f.rim[:0], l.Points[sub.First:sub.Last])
			f.fill.strokeRun(f.rim, true, paint.StrokeStyle{Width: width})
		}
		f.fill.r.Rasterize(p)
	}
}

// spaced appends those points of a closed path that lie half a pixel from the one before: a rim is too faint and wide to show
// less, and each corner costs.
func spaced(dst, path []paint.Pt) []paint.Pt {
	for _, q := range path {
		if n := len(dst); n > 0 {
			if dx, dy := q.X-dst[n-1].X, q.Y-dst[n-1].Y; dx*dx+dy*dy < 0.25 {
				continue
			}
		}
		dst = append(dst, q)
	}
	return dst
}

// fillRects fills a path of rectangles on whole pixels directly. It reports false when the path is something else, or when
// its rectangles could overlap and show it.
func fillRects(p *painter, l *paint.List, op *paint.Op) bool {
	subs := l.Path(op)
	if op.Colour.A != 255 && len(subs) > 1 {
		return false
	}
	for _, s := range subs {
		if _, ok := rectOf(l.Points[s.First:s.Last]); !ok {
			return false
		}
	}
	for _, s := range subs {
		r, _ := rectOf(l.Points[s.First:s.Last])
		x0, x1 := max(r.Min.X, p.clipX), min(r.Max.X, p.w)
		for y := max(r.Min.Y, p.clipY); y < min(r.Max.Y, p.h) && x0 < x1; y++ {
			p.span(y, x0, x1, 255)
		}
	}
	return true
}

// rectOf returns the rectangle that four points span in order, if it lies on whole pixels.
func rectOf(pts []paint.Pt) (image.Rectangle, bool) {
	if len(pts) != 4 {
		return image.Rectangle{}, false
	}
	a, c := pts[0], pts[2]
	if pts[1] != (paint.Pt{X: c.X, Y: a.Y}) || pts[3] != (paint.Pt{X: a.X, Y: c.Y}) {
		return image.Rectangle{}, false
	}
	r := image.Rect(int(a.X), int(a.Y), int(c.X), int(c.Y))
	whole := float32(int(a.X)) == a.X && float32(int(a.Y)) == a.Y && float32(int(c.X)) == c.X && float32(int(c.Y)) == c.Y
	return r, whole
}
