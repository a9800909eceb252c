package paint

import (
	"image/color"

	"enfilade/assets"
)

// Kind is what an Op does with its path.
type Kind uint8

// The kinds of Op.
const (
	Fill   Kind = iota // fill the path; Style is unused
	Stroke             // stroke the path; Style indexes List.Strokes
	Hatch              // fill the path with parallel lines; Style indexes List.Hatches
	Wash               // fill the path with a radial wash that gathers along its border; Style indexes List.Washes
	Text               // a line of text; Style indexes List.Texts, there is no path
	Image              // a photo; Style indexes List.Images, there is no path; in a base only
)

// Ink says which ink of the base an Op is: overlay drawn under that ink is hidden by it.
type Ink uint8

// The kinds of ink, each a part of the next one below it.
const (
	NoInk   Ink = iota
	LowInk      // low walls and blocks: they hide the wash
	HardInk     // walls, blocks, lines: they hide the wash and half of each region edge
)

// Op is one step of a display list.
type Op struct {
	Kind    Kind
	EvenOdd bool // filled by the even-odd rule instead of by winding number
	Free    bool // may paint over the rulers
	Ink     Ink  // base: the ink it makes; overlay: the ink it lies under
	Colour  color.NRGBA
	Style   int32
	Subs    [2]int32 // its path is List.Subs[Subs[0]:Subs[1]]
}

// Pt is a place in the picture, in device pixels from its upper left corner, y down.
type Pt struct{ X, Y float32 }

// Sub is one connected piece of a path, List.Points[First:Last]. Curves are flattened already.
type Sub struct {
	First, Last int32
	Closed      bool
	Phase       float32 // how far into the dash pattern it begins
}

// Cap is the end of a stroke.
type Cap uint8

// The ends of a stroke.
const (
	Butt Cap = iota
	RoundCap
	Square
)

// Join is the corner of a stroke.
type Join uint8

// The corners of a stroke.
const (
	Mitre Join = iota // to four times the half width, then bevel
	RoundJoin
)

// StrokeStyle is how a path is stroked, in device pixels.
type StrokeStyle struct {
	Width   float32
	On, Off float32 // dash and gap; no dashes when On is 0
	Cap     Cap
	Join    Join
}

// HatchStyle is a family of parallel lines at 45°, in device pixels. Along a line x + y (rising to the right) or x - y
// (falling) is constant; Offset is that sum or difference for one of the lines.
type HatchStyle struct {
	Gap, Width float32 // between the lines' middles, across them
	Rising     bool
	Offset     float32
}

// WashStyle is a radial wash. Its strength is Near at the eye, Mid at 35 % of Radius and Far from Radius on; then come two
// strokes along the whole border, clipped to the inside.
type WashStyle struct {
	Eye            Pt
	Radius         float32
	Near, Mid, Far float32
	Rims           [2]float32 // widths of the strokes
	RimStrength    float32
}

// WashBend is the share of its radius at which a wash has its middle strength.
const WashBend = 0.35

// TextStyle is a line of text, in device pixels.
type TextStyle struct {
	Chars      [2]int32 // its letters are List.Chars[Chars[0]:Chars[1]], in UTF-8
	At         Pt       // left end of its base line
	Size       float32
	Weight     assets.Weight
	Spacing    float32 // extra space after each letter
	Halo       float32 // width of the stroke in HaloColour under the letters, half of it outside; none when 0
	Up         bool    // reads upwards, a quarter turn counter-clockwise about At
	HaloColour color.NRGBA
}

// List is a display list: steps back to front over flat arrays. A reused list makes no allocation once it has grown.
type List struct {
	W, H int     // size of the picture, device pixels
	K    float64 // device pixels per px at 100 %
	Left int     // width of the rulers at the left and the top; overlay keeps off them unless it is Free

	Ops     []Op
	Subs    []Sub
	Points  []Pt
	Strokes []StrokeStyle
	Hatches []HatchStyle
	Washes  []WashStyle
	Texts   []TextStyle
	Images  []ImageStyle
	Chars   []byte

	// InkColour is the colour of the base's hard ink.
	InkColour color.NRGBA

	// Drawing is what a base was drawn from; hand it on in the scenes of the frames over that base.
	Drawing *Drawing

	memory memory
	work   work
}

// Reset empties the list for a picture of another or the same size. It keeps its room, and where labels stood.
func (l *List) Reset(w, h int, k float64) {
	l.W, l.H, l.K = w, h, k
	l.Ops, l.Subs, l.Points, l.Chars = l.Ops[:0], l.Subs[:0], l.Points[:0], l.Chars[:0]
	l.Strokes, l.Hatches, l.Washes, l.Texts = l.Strokes[:0], l.Hatches[:0], l.Washes[:0], l.Texts[:0]
	l.Images = l.Images[:0]
}

// Path returns the pieces of an Op's path.
func (l *List) Path(op *Op) []Sub { return l.Subs[op.Subs[0]:op.Subs[1]] }

// mark is a place in the list where a path begins.
type mark int32

func (l *List) begin() mark { return mark(len(l.Subs)) }

// move begins a new piece of path at a place.
func (l *List) move(x, y float64) {
	n := int32(len(l.Points))
	l.Points = append(l.Points, Pt{float32(x), float32(y)})
	l.Subs = append(l.Subs, Sub{First: n, Last: n + 1})
}

// line goes on to a place.
func (l *List) line(x, y float64) {
	l.Points = append(l.Points, Pt{float32(x), float32(y)})
	l.Subs[len(l.Subs)-1].Last++
}

// close ends a piece of path where it began.
func (l *List) close() { l.Subs[len(l.Subs)-1].Closed = true }

// op ends the path begun at m with one step. An empty path adds none.
func (l *List) op(m mark, op Op) {
	op.Subs = [2]int32{int32(m), int32(len(l.Subs))}
	if op.Subs[0] < op.Subs[1] {
		l.Ops = append(l.Ops, op)
	}
}

// again adds another step over the path of the last one.
func (l *List) again(op Op) {
	if n := len(l.Ops); n > 0 {
		op.Subs = l.Ops[n-1].Subs
		l.Ops = append(l.Ops, op)
	}
}

func (l *List) fill(m mark, c color.NRGBA) { l.op(m, Op{Kind: Fill, Colour: c}) }

// stroked returns a step that strokes; sizes are px at 100 %.
func (l *List) stroked(c color.NRGBA, s StrokeStyle) Op {
	k := float32(l.K)
	s.Width, s.On, s.Off = s.Width*k, s.On*k, s.Off*k
	l.Strokes = append(l.Strokes, s)
	return Op{Kind: Stroke, Colour: c, Style: int32(len(l.Strokes) - 1)}
}

func (l *List) stroke(m mark, c color.NRGBA, width float64) {
	l.op(m, l.stroked(c, StrokeStyle{Width: float32(width)}))
}
