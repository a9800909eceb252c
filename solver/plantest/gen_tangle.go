package plantest

import (
	"math/big"
	"strconv"

	"pgregory.net/rapid"

	"enfilade/solver/exact"
	"enfilade/solver/plan"
)

// Tangles draws small plans on a lattice of 0.1 m, of up to nine walls and three blocks, in which ends meet, walls cross,
// overlap and end on each other, doors reach wall ends, and marks stand on faces, ends and crossings.
func Tangles() *rapid.Generator[*plan.Plan] {
	return rapid.Custom(func(t *rapid.T) *plan.Plan { return tangle(t, lattice{unit: 100 * exact.PerMM, bodies: true}) })
}

// Specks draws the same plans on the grid itself, a few tenths of a millimetre wide: nearly every crossing is rounded,
// and rounding makes edges meet, merge and vanish.
func Specks() *rapid.Generator[*plan.Plan] {
	return rapid.Custom(func(t *rapid.T) *plan.Plan { return tangle(t, lattice{unit: 1, bodies: true}) })
}

// Lines draws the plans of [Tangles] without thickness, doors and blocks: bare lines that need no outline drawn.
func Lines() *rapid.Generator[*plan.Plan] {
	return rapid.Custom(func(t *rapid.T) *plan.Plan { return tangle(t, lattice{unit: 100 * exact.PerMM}) })
}

// Slivers draws the plans of [Tangles] with points a grid unit or two off the lattice: walls that nearly touch, lines that
// nearly meet, gaps and corners of almost no width.
func Slivers() *rapid.Generator[*plan.Plan] {
	return rapid.Custom(func(t *rapid.T) *plan.Plan {
		return tangle(t, lattice{unit: 100 * exact.PerMM, jitter: 2, bodies: true})
	})
}

// Giants draws the plans of [Slivers] tens of kilometres wide, near the coordinate limit, where products need all the bits
// they can have.
func Giants() *rapid.Generator[*plan.Plan] {
	return rapid.Custom(func(t *rapid.T) *plan.Plan {
		return tangle(t, lattice{unit: exact.Limit / 14, jitter: 2, bodies: true})
	})
}

// Small returns the generators of small degenerate plans by name.
func Small() map[string]*rapid.Generator[*plan.Plan] {
	return map[string]*rapid.Generator[*plan.Plan]{
		"tangles": Tangles(), "specks": Specks(), "lines": Lines(), "slivers": Slivers(), "giants": Giants(),
	}
}

// lattice says what points a plan is drawn from.
type lattice struct {
	unit   int32 // distance of neighbouring points
	jitter int32 // how far off a point may lie, in x and in y
	bodies bool  // thick walls, doors and blocks too
}

// span is the lattice's size: points have coordinates 0 to span, in lattice units.
const span = 8

// tangler draws one plan. Points are in lattice units until they are put into the plan.
type tangler struct {
	*rapid.T
	lattice
	pieces [][2]exact.Pt // every straight piece so far
	plan.Parts
}

func tangle(t *rapid.T, l lattice) *plan.Plan {
	g := &tangler{T: t, lattice: l, Parts: plan.Parts{Walker: plan.DefaultWalker(), Sheet: plan.Sheet{Unit: "m"}}}
	g.floor()
	for range 1 + g.upTo(8, "walls") {
		g.wall()
	}
	if g.bodies {
		for range g.upTo(3, "blocks") {
			g.block()
		}
		for range g.upTo(3, "doors") {
			g.door()
		}
	}
	for i := 1; i <= 2; i++ {
		n := strconv.Itoa(i)
		g.Observers = append(g.Observers, plan.Observer{ID: "O" + n, At: g.mark(), Eye: 1600 * exact.PerMM, View: 360, Colour: -1})
		g.Targets = append(g.Targets, plan.Target{ID: "T" + n, At: g.mark(), Colour: -1})
		g.Starts = append(g.Starts, plan.Start{ID: "S" + n, At: g.mark()})
	}
	return plan.From(g.Parts)
}

func (g *tangler) upTo(n int, label string) int { return rapid.IntRange(0, n).Draw(g.T, label) }

// one draws true once in n times.
func (g *tangler) one(n int, label string) bool { return g.upTo(n-1, label) == n-1 }

// scale returns the place of lattice point p on the grid, some of the time off by the jitter.
func (g *tangler) scale(p exact.Pt) exact.Pt {
	q := pt(p.X*g.unit, p.Y*g.unit)
	if g.jitter > 0 && g.one(3, "off the lattice") {
		off := rapid.Int32Range(-g.jitter, g.jitter)
		q = pt(q.X+off.Draw(g.T, "dx"), q.Y+off.Draw(g.T, "dy"))
	}
	return q
}

func (g *tangler) chain(pts ...exact.Pt) plan.Chain {
	scaled := make([]exact.Pt, len(pts))
	for i, p := range pts {
		scaled[i] = g.scale(p)
	}
	return plan.ChainOf(scaled...)
}

// floor draws a square floor with room around the lattice, one that fits it exactly, an L, or none.
func (g *tangler) floor() {
	var ring []exact.Pt
	switch g.upTo(5, "floor") {
	case 0:
		ring = []exact.Pt{pt(0, 0), pt(span, 0), pt(span, span), pt(0, span)}
	case 1:
		ring = []exact.Pt{pt(0, 0), pt(span, 0), pt(span, 4), pt(4, 4), pt(4, span), pt(0, span)}
	case 2: // the bounding box
		return
	default: // its sides are out of reach of all else
		g.Floor = g.chain(pt(-2, -3), pt(span+3, -3), pt(span+3, span+2), pt(-2, span+2))
		return
	}
	g.Floor = g.chain(ring...)
	for i, p := range ring {
		g.pieces = append(g.pieces, [2]exact.Pt{p, ring[(i+1)%len(ring)]})
	}
}

// point draws a lattice point, every other time one that lies on the line of an earlier piece: its ends, between, beyond.
func (g *tangler) point() exact.Pt {
	if len(g.pieces) > 0 && g.one(2, "aimed") {
		p := g.pieces[g.upTo(len(g.pieces)-1, "piece")]
		d := p[1].Sub(p[0])
		n := gcd(d.X, d.Y)
		k := rapid.Int32Range(-1, n+1).Draw(g.T, "step")
		q := pt(p[0].X+d.X/n*k, p[0].Y+d.Y/n*k)
		if exact.InBox(pt(0, 0), pt(span, span), q) {
			return q
		}
	}
	return pt(rapid.Int32Range(0, span).Draw(g.T, "x"), rapid.Int32Range(0, span).Draw(g.T, "y"))
}

// pointOff draws a point that is not p.
func (g *tangler) pointOff(p exact.Pt) exact.Pt {
	q := g.point()
	if q == p {
		q = pt((p.X+1)%(span+1), p.Y)
	}
	return q
}

func (g *tangler) wall() {
	line := []exact.Pt{g.point()}
	for range 1 + g.upTo(2, "bends")%2 {
		line = append(line, g.pointOff(line[len(line)-1]))
	}
	w := plan.Wall{ID: "W" + strconv.Itoa(len(g.Walls)+1), Height: plan.Ceiling}
	switch g.upTo(7, "kind") {
	case 1:
		w.Kind = plan.Glazing
	case 2:
		w.Kind = plan.Screen
	case 3:
		w.Kind, w.Height = plan.Low, g.height()
	}
	if g.bodies && w.Kind != plan.Glazing && w.Kind != plan.Screen && g.one(3, "thick") {
		w.Thickness = 2 * g.unit
		if len(line) == 3 && exact.Orient(line[0], line[1], line[2]) == 0 {
			line = line[:2] // a thick wall does not fold back into itself
		}
	}
	for i := 1; i < len(line); i++ {
		g.pieces = append(g.pieces, [2]exact.Pt{line[i-1], line[i]})
	}
	w.Line = g.chain(line...)
	g.Walls = append(g.Walls, w)
}

// height draws a height below, at or above the walker's eye.
func (g *tangler) height() int32 {
	return [...]int32{1000, 1600, 1800}[g.upTo(2, "height")] * exact.PerMM
}

func (g *tangler) block() {
	a := g.point()
	b := g.pointOff(a)
	var ring []exact.Pt
	if c := g.point(); g.one(3, "triangle") && exact.Orient(a, b, c) != 0 {
		ring = []exact.Pt{a, b, c}
	} else {
		if a.X == b.X {
			b.X += 1 - 2*(b.X/span)
		}
		if a.Y == b.Y {
			b.Y += 1 - 2*(b.Y/span)
		}
		ring = []exact.Pt{a, pt(b.X, a.Y), b, pt(a.X, b.Y)}
	}
	for i := range ring {
		g.pieces = append(g.pieces, [2]exact.Pt{ring[i], ring[(i+1)%len(ring)]})
	}
	height := plan.Ceiling
	if g.one(3, "low") {
		height = g.height()
	}
	g.Blocks = append(g.Blocks, plan.Block{ID: "B" + strconv.Itoa(len(g.Blocks)+1), Ring: g.chain(ring...), Height: height})
}

// door draws an opening in a piece of a solid wall that has none yet, as often as not at one of the piece's ends.
func (g *tangler) door() {
	if len(g.Walls) == 0 {
		return
	}
	w := g.Walls[g.upTo(len(g.Walls)-1, "wall")]
	segment := g.upTo(w.Line.Len()-2, "segment")
	for _, d := range g.Openings {
		if d.Wall == w.ID && d.Segment == segment {
			return
		}
	}
	long := int32(exact.Dist(w.Line.At(segment), w.Line.At(segment+1)))
	if long < g.unit || w.Kind == plan.Glazing || w.Kind == plan.Screen {
		return
	}
	width := g.unit * rapid.Int32Range(1, long/g.unit).Draw(g.T, "width")
	at := [...]int32{0, (long - width) / 2, long - width}[g.upTo(2, "place")]
	d := plan.Opening{ID: "D" + strconv.Itoa(len(g.Openings)+1), Wall: w.ID, Segment: segment, At: at, Width: width}
	d.Leaf = plan.Leaf(g.upTo(2, "leaf"))
	d.Shut = g.one(2, "shut")
	g.Openings = append(g.Openings, d)
}

// mark draws a place for a mark: a point as for a wall, or the grid point at which two pieces cross.
func (g *tangler) mark() exact.Pt {
	if len(g.pieces) > 1 && g.one(3, "at a crossing") {
		last := len(g.pieces) - 1
		for range 3 {
			p := g.pieces[g.upTo(last, "first")]
			q := g.pieces[last-g.upTo(last, "second")]
			if x, ok := crossing(g.scale(p[0]), g.scale(p[1]), g.scale(q[0]), g.scale(q[1])); ok {
				return x
			}
		}
	}
	return g.scale(g.point())
}

// crossing returns the grid point nearest to the crossing of ab and cd, if each crosses the other between its ends.
func crossing(a, b, c, d exact.Pt) (exact.Pt, bool) {
	k, ok := crossShare(a, b, c, d)
	if !ok {
		return exact.Pt{}, false
	}
	return spotAt(a, b.Sub(a), k).nearest(), true
}

// crossShare returns where cd crosses ab, as a share of the way from a to b, if each crosses the other between its ends.
func crossShare(a, b, c, d exact.Pt) (*big.Rat, bool) {
	if exact.Orient(a, b, c)*exact.Orient(a, b, d) >= 0 || exact.Orient(c, d, a)*exact.Orient(c, d, b) >= 0 {
		return nil, false
	}
	return big.NewRat(exact.Area2(c, d, a), exact.Area2(c, d, a)-exact.Area2(c, d, b)), true
}

func gcd(a, b int32) int32 {
	for b != 0 {
		a, b = b, a%b
	}
	return max(a, -a)
}
