package assets

import (
	"sync"
	"unicode/utf8"

	"golang.org/x/image/font"
	"golang.org/x/image/font/sfnt"
	"golang.org/x/image/math/fixed"
)

// Face measures text in one weight. Lengths are in em: times the text size they are px.
//
// What it has looked up once it keeps, so measuring the same letters again allocates nothing.
type Face struct {
	Font *sfnt.Font

	mu     sync.RWMutex
	buf    sfnt.Buffer
	unit   float64 // font units per em
	glyphs map[rune]glyph
	kerns  map[[2]sfnt.GlyphIndex]float64
}

type glyph struct {
	index   sfnt.GlyphIndex
	advance float64
}

func newFace(f *sfnt.Font) *Face {
	return &Face{Font: f, unit: float64(f.UnitsPerEm()), glyphs: map[rune]glyph{}, kerns: map[[2]sfnt.GlyphIndex]float64{}}
}

// Glyph returns the index and the advance of the letter r, of the font's sign for "missing" where it has none.
func (f *Face) Glyph(r rune) (index sfnt.GlyphIndex, advance float64) {
	f.mu.RLock()
	g, ok := f.glyphs[r]
	f.mu.RUnlock()
	if ok {
		return g.index, g.advance
	}
	f.mu.Lock()
	defer f.mu.Unlock()
	// Both calls fail only on a damaged file; then the letter is left out.
	g.index, _ = f.Font.GlyphIndex(&f.buf, r)
	if adv, err := f.Font.GlyphAdvance(&f.buf, g.index, f.ppem(), font.HintingNone); err == nil {
		g.advance = float64(adv) / 64 / f.unit
	}
	f.glyphs[r] = g
	return g.index, g.advance
}

// Kern returns by how much the glyph b moves away from the glyph a before it; mostly it is negative or 0.
func (f *Face) Kern(a, b sfnt.GlyphIndex) float64 {
	pair := [2]sfnt.GlyphIndex{a, b}
	f.mu.RLock()
	k, ok := f.kerns[pair]
	f.mu.RUnlock()
	if ok {
		return k
	}
	f.mu.Lock()
	defer f.mu.Unlock()
	// An error says that the font has no kerning for the pair.
	if v, err := f.Font.Kern(&f.buf, a, b, f.ppem(), font.HintingNone); err == nil {
		k = float64(v) / 64 / f.unit
	}
	f.kerns[pair] = k
	return k
}

// ppem asks the font for its own units.
func (f *Face) ppem() fixed.Int26_6 { return fixed.I(int(f.unit)) }

// Width returns the width of a line of text of the given size, with so much extra space after every letter but the
// last, in the unit of size.
func (f *Face) Width(text []byte, size, spacing float64) float64 {
	w, pen := 0.0, Pen{Face: f, Size: size, Spacing: spacing}
	for len(text) > 0 {
		r, n := utf8.DecodeRune(text)
		text = text[n:]
		_, x, adv := pen.Next(r)
		w = x + adv
	}
	return w
}

// Pen walks along a line of text and says where each glyph stands.
type Pen struct {
	Face          *Face
	Size, Spacing float64

	x     float64
	last  sfnt.GlyphIndex
	begun bool
}

// Next returns the glyph of the next letter, its origin's distance from the line's beginning, and its advance without
// spacing.
func (p *Pen) Next(r rune) (index sfnt.GlyphIndex, x, advance float64) {
	index, advance = p.Face.Glyph(r)
	if p.begun {
		p.x += p.Face.Kern(p.last, index) * p.Size
	}
	p.last, p.begun = index, true
	x, advance = p.x, advance*p.Size
	p.x += advance + p.Spacing
	return index, x, advance
}
