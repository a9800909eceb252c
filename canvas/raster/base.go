package raster

import (
	"image"
	"image/color"
	"image/draw"

	"github.com/fogleman/gg"
	"golang.org/x/image/vector"

	"enfilade/canvas/paint"
)

// Base is the picture under the study: an opaque image, and for each pixel how much ink lies on it.
type Base struct {
	W, H  int
	Image *image.RGBA
	Ink   []uint8 // walls, blocks and lines, 0 to 255
	Low   []uint8 // these and low walls and blocks

	InkColour color.NRGBA // of hard ink
}

// NewBase draws a list made by paint.Base on a picture of w by h device pixels. It may run on any goroutine.
func NewBase(l *paint.List, w, h int) *Base {
	b := &Base{}
	b.Draw(l, w, h)
	return b
}

// Draw draws the list anew into the base's own buffers when they have the right size: for a worker that keeps a spare.
func (b *Base) Draw(l *paint.List, w, h int) {
	if b.Image == nil || b.W != w || b.H != h {
		*b = Base{W: w, H: h, Image: image.NewRGBA(image.Rect(0, 0, w, h)), Ink: make([]uint8, w*h), Low: make([]uint8, w*h)}
	} else {
		clear(b.Ink)
		clear(b.Low)
	}
	b.InkColour = l.InkColour
	for i := 3; i < len(b.Image.Pix); i += 4 {
		b.Image.Pix[i] = 255
	}
	d := &baseDrawer{Base: b, l: l, fill: newFiller(w, h, l.K), glyphs: newGlyphs(), canvas: canvas{pix: b.Image.Pix, w: w, h: h}}
	d.paint = painter{canvas: &d.canvas}
	for i := range l.Ops {
		d.step(&l.Ops[i])
	}
	d.mergeLines()
}

// baseDrawer is a base in the making.
type baseDrawer struct {
	*Base
	l      *paint.List
	fill   *filler
	glyphs *glyphs
	canvas canvas
	paint  painter

	sheet *gg.Context // draws lines on the image
	lines *gg.Context // draws the same lines as ink: red for hard ink, green for ink of either kind
	big   *vector.Rasterizer
	cover *image.Alpha
}

// bigPath is how many points a path has before its fill goes through the one-pass rasteriser, which costs the whole
// picture once but no more for more points.
const bigPath = 600

func (d *baseDrawer) step(op *paint.Op) {
	p := &d.paint
	p.mode, p.ink, p.low = solid, nil, nil
	p.colour(op.Colour)
	if op.Ink == paint.HardInk {
		p.ink = d.Ink
	}
	if op.Ink != paint.NoInk {
		p.low = d.Low
	}
	switch op.Kind {
	case paint.Fill:
		d.fillPath(op)
	case paint.Hatch:
		p.ink, p.low = nil, nil // the fill under it has put its ink down
		p.hatch.set(d.l.Hatches[op.Style])
		p.mode = hatched
		d.fill.open(d.l, op, 0)
		d.fill.fill(d.l, op)
		d.fill.r.Rasterize(p)
	case paint.Stroke:
		d.strokePath(op)
	case paint.Text:
		d.glyphs.paintText(p, d.l, op)
	case paint.Image:
		d.photo(op)
	}
}

func (d *baseDrawer) fillPath(op *paint.Op) {
	if fillRects(&d.paint, d.l, op) {
		return
	}
	points := 0
	for _, s := range d.l.Path(op) {
		points += int(s.Last - s.First)
	}
	if points > bigPath && !op.EvenOdd {
		d.fillBig(op)
		return
	}
	d.fill.open(d.l, op, 0)
	d.fill.r.UseNonZeroWinding = !op.EvenOdd
	d.fill.fill(d.l, op)
	d.fill.r.Rasterize(&d.paint)
}

// fillBig fills a path of many points in one pass over the picture. Pieces wind in one sense, so their coverage adds up.
func (d *baseDrawer) fillBig(op *paint.Op) {
	if d.big == nil {
		d.big, d.cover = vector.NewRasterizer(d.W, d.H), image.NewAlpha(image.Rect(0, 0, d.W, d.H))
	}
	d.big.Reset(d.W, d.H)
	for _, s := range d.l.Path(op) {
		pts := d.l.Points[s.First:s.Last]
		d.big.MoveTo(pts[0].X, pts[0].Y)
		for _, q := range pts[1:] {
			d.big.LineTo(q.X, q.Y)
		}
		d.big.ClosePath()
	}
	d.big.DrawOp = draw.Src
	d.big.Draw(d.cover, d.cover.Rect, image.Opaque, image.Point{})
	for y := range d.H {
		row := d.cover.Pix[y*d.cover.Stride : y*d.cover.Stride+d.W]
		for x := 0; x < len(row); {
			a := row[x]
			end := x + 1
			for end < len(row) && row[end] == a {
				end++
			}
			if a != 0 {
				d.paint.span(y, x, end, uint32(a))
			}
			x = end
		}
	}
}

// strokeCut is how many points are stroked at once: the cost of one stroke grows with the square of its length.
const strokeCut = 200

// strokePath strokes by gg, on the image and, for ink, on the sheet that becomes part of the masks.
func (d *baseDrawer) strokePath(op *paint.Op) {
	if d.sheet == nil {
		d.sheet = gg.NewContextForRGBA(d.Image)
	}
	c := op.Colour
	d.sheet.SetRGBA255(int(c.R), int(c.G), int(c.B), int(c.A))
	d.strokeOn(d.sheet, op)
	if op.Ink == paint.NoInk {
		return
	}
	if d.lines == nil {
		d.lines = gg.NewContext(d.W, d.H)
	}
	red := 0
	if op.Ink == paint.HardInk {
		red = 255
	}
	d.lines.SetRGBA255(red, 255, 0, int(c.A))
	d.strokeOn(d.lines, op)
}

func (d *baseDrawer) strokeOn(dc *gg.Context, op *paint.Op) {
	s := d.l.Strokes[op.Style]
	dc.SetLineWidth(float64(s.Width))
	dc.SetLineCap([...]gg.LineCap{gg.LineCapButt, gg.LineCapRound, gg.LineCapSquare}[s.Cap])
	dc.SetLineJoin(gg.LineJoinRound)
	dc.SetDash()
	if s.On > 0 {
		dc.SetDash(float64(s.On), float64(s.Off))
	}
	points := 0
	for _, sub := range d.l.Path(op) {
		if s.On > 0 {
			dc.SetDashOffset(float64(sub.Phase))
		}
		pts := d.l.Points[sub.First:sub.Last]
		dc.MoveTo(float64(pts[0].X), float64(pts[0].Y))
		for _, q := range pts[1:] {
			dc.LineTo(float64(q.X), float64(q.Y))
		}
		if sub.Closed {
			dc.ClosePath()
		}
		// Dashed pieces go one by one, as each has its own beginning.
		if points += len(pts); points > strokeCut || s.On > 0 {
			dc.Stroke()
			points = 0
		}
	}
	dc.Stroke()
}

// mergeLines adds the ink of lines to the masks.
func (d *baseDrawer) mergeLines() {
	if d.lines == nil {
		return
	}
	pix := d.lines.Image().(*image.RGBA).Pix
	for i := range d.Ink {
		if hard, low := pix[4*i], pix[4*i+1]; hard|low != 0 {
			d.Ink[i] = max(d.Ink[i], hard)
			d.Low[i] = max(d.Low[i], low)
		}
	}
}
