package raster

import (
	"math"
	"unicode/utf8"

	"github.com/golang/freetype/raster"
	"golang.org/x/image/font/sfnt"
	"golang.org/x/image/math/fixed"

	"enfilade/assets"
	"enfilade/canvas/paint"
)

// glyphs keeps the masks of letters: one for each letter, size, weight, quarter of a pixel and width of halo. It is not for
// concurrent use.
type glyphs struct {
	masks map[glyphKey]*mask
	buf   sfnt.Buffer
	fill  *filler
	line  []paint.Pt
	lines [][2]int
}

type glyphKey struct {
	weight  assets.Weight
	quarter uint8 // of a pixel that the origin lies after a whole one
	up      bool
	size    fixed.Int26_6
	halo    fixed.Int26_6
	index   sfnt.GlyphIndex
}

// mask is the coverage of one letter; (x, y) is its corner as seen from the letter's origin.
type mask struct {
	x, y, w, h int
	cover      []uint8
}

// tooMany masks are dropped all at once: a long session of zooming by UI scale meets no more.
const tooMany = 8192

func newGlyphs() *glyphs {
	return &glyphs{masks: map[glyphKey]*mask{}, fill: newFiller(1, 1, 1)}
}

// paintText draws a line of text: first the halo of all its letters, then the letters.
func (g *glyphs) paintText(p *painter, l *paint.List, op *paint.Op) {
	t := &l.Texts[op.Style]
	if t.Halo > 0 {
		p.colour(t.HaloColour)
		g.paintLine(p, l, t, fixed.Int26_6(t.Halo*64))
	}
	p.colour(op.Colour)
	g.paintLine(p, l, t, 0)
}

func (g *glyphs) paintLine(p *painter, l *paint.List, t *paint.TextStyle, halo fixed.Int26_6) {
	pen := assets.Pen{Face: assets.FaceOf(t.Weight), Size: float64(t.Size), Spacing: float64(t.Spacing)}
	key := glyphKey{weight: t.Weight, up: t.Up, size: fixed.Int26_6(t.Size*64 + 0.5), halo: halo}
	for text := l.Chars[t.Chars[0]:t.Chars[1]]; len(text) > 0; {
		r, n := utf8.DecodeRune(text)
		text = text[n:]
		index, along, _ := pen.Next(r)
		// The base line lies on whole pixels, the letters along it on quarters.
		x, y := float64(t.At.X)+along, math.Round(float64(t.At.Y))
		if t.Up {
			x, y = math.Round(float64(t.At.X)), float64(t.At.Y)-along
		}
		run := x
		if t.Up {
			run = y
		}
		q := int(math.Floor(run*4 + 0.5))
		key.index, key.quarter = index, uint8(q&3)
		whole := q >> 2
		if t.Up {
			p.mask(g.get(key), int(x), whole)
		} else {
			p.mask(g.get(key), whole, int(y))
		}
	}
}

// get returns a letter's mask and makes it at first.
func (g *glyphs) get(key glyphKey) *mask {
	m := g.masks[key]
	if m == nil {
		if len(g.masks) >= tooMany {
			clear(g.masks)
		}
		m = g.make(key)
		g.masks[key] = m
	}
	return m
}

func (g *glyphs) make(key glyphKey) *mask {
	g.outline(key)
	if len(g.line) == 0 {
		return &mask{}
	}
	x0, y0, x1, y1 := g.line[0].X, g.line[0].Y, g.line[0].X, g.line[0].Y
	for _, q := range g.line {
		x0, y0, x1, y1 = min(x0, q.X), min(y0, q.Y), max(x1, q.X), max(y1, q.Y)
	}
	reach := float32(key.halo)/128 + 1
	m := &mask{x: int(math.Floor(float64(x0 - reach))), y: int(math.Floor(float64(y0 - reach)))}
	m.w, m.h = int(math.Ceil(float64(x1+reach)))-m.x, int(math.Ceil(float64(y1+reach)))-m.y
	m.cover = make([]uint8, m.w*m.h)
	r := raster.NewRasterizer(m.w, m.h)
	put := coverPainter{m}
	g.fill.use(r, m.x, m.y)
	r.Dx, r.Dy = 0, 0
	for _, c := range g.lines {
		pts := g.line[c[0]:c[1]]
		r.Start(g.fill.fixed(pts[0].X, pts[0].Y))
		for _, q := range pts[1:] {
			r.Add1(g.fill.fixed(q.X, q.Y))
		}
		r.Add1(g.fill.fixed(pts[0].X, pts[0].Y))
	}
	r.Rasterize(put)
	if key.halo > 0 {
		// The stroke is a second pass: its pieces and the letter's rings wind in different senses.
		r.Clear()
		style := paint.StrokeStyle{Width: float32(key.halo) / 64, Join: paint.RoundJoin, Cap: paint.RoundCap}
		for _, c := range g.lines {
			g.fill.strokeRun(g.line[c[0]:c[1]], true, style)
		}
		r.Rasterize(put)
	}
	return m
}

// coverPainter keeps the larger coverage of each pixel.
type coverPainter struct{ m *mask }

func (c coverPainter) Paint(spans []raster.Span, _ bool) {
	for _, s := range spans {
		row := c.m.cover[s.Y*c.m.w : (s.Y+1)*c.m.w]
		for x := s.X0; x < s.X1; x++ {
			row[x] = max(row[x], uint8(s.Alpha>>8))
		}
	}
}

// outline flattens a letter's outline into g.line, its rings into g.lines, about its origin.
func (g *glyphs) outline(key glyphKey) {
	g.line, g.lines = g.line[:0], g.lines[:0]
	segs, err := assets.FaceOf(key.weight).Font.LoadGlyph(&g.buf, key.index, key.size, nil)
	if err != nil {
		return // a letter the font cannot give is left out; it has measured it all the same
	}
	for _, s := range segs {
		switch s.Op {
		case sfnt.SegmentOpMoveTo:
			g.lines = append(g.lines, [2]int{len(g.line), len(g.line) + 1})
			g.line = append(g.line, g.place(key, s.Args[0]))
		case sfnt.SegmentOpLineTo:
			g.lineTo(g.place(key, s.Args[0]))
		case sfnt.SegmentOpQuadTo:
			g.quadTo(g.place(key, s.Args[0]), g.place(key, s.Args[1]))
		case sfnt.SegmentOpCubeTo: // TrueType outlines have none
			g.lineTo(g.place(key, s.Args[2]))
		}
	}
}

func (g *glyphs) lineTo(q paint.Pt) {
	g.line = append(g.line, q)
	g.lines[len(g.lines)-1][1]++
}

func (g *glyphs) quadTo(b, c paint.Pt) {
	a := g.line[len(g.line)-1]
	n := 2 + int(math.Hypot(float64(a.X-2*b.X+c.X), float64(a.Y-2*b.Y+c.Y)))
	for i := 1; i <= n; i++ {
		t := float32(i) / float32(n)
		u := 1 - t
		g.lineTo(paint.Pt{X: u*u*a.X + 2*u*t*b.X + t*t*c.X, Y: u*u*a.Y + 2*u*t*b.Y + t*t*c.Y})
	}
}

// place turns and moves a point of the outline; both the font's tool and the picture have y down.
func (g *glyphs) place(key glyphKey, q fixed.Point26_6) paint.Pt {
	x, y := float32(q.X)/64, float32(q.Y)/64
	if key.up {
		return paint.Pt{X: y, Y: -x + float32(key.quarter)/4}
	}
	return paint.Pt{X: x + float32(key.quarter)/4, Y: y}
}

// mask blends a letter with its origin at a whole pixel.
func (p *painter) mask(m *mask, x, y int) {
	x, y = x+m.x, y+m.y
	x0, x1 := max(x, p.clipX), min(x+m.w, p.w)
	y0, y1 := max(y, p.clipY), min(y+m.h, p.h)
	if x0 >= x1 {
		return
	}
	for yy := y0; yy < y1; yy++ {
		cover := m.cover[(yy-y)*m.w+x0-x : (yy-y)*m.w+x1-x]
		pix := p.pix[(yy*p.w+x0)*4 : (yy*p.w+x1)*4]
		for i, c := range cover {
			if c != 0 {
				p.pairs.one(pix[i*4:i*4+4], full(scale(uint32(c), p.a)))
			}
		}
	}
}
