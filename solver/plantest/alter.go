package plantest

import (
	"math"
	"math/big"
	"math/rand/v2"
	"slices"

	"enfilade/solver/arrange"
	"enfilade/solver/exact"
	"enfilade/solver/plan"
)

// Motion moves a plan without changing its shape: first mirrored in x, then turned by quarter turns, then shifted.
type Motion struct {
	Mirror bool
	Turns  int
	Shift  exact.Vec
}

// Point returns where p comes to lie.
func (m Motion) Point(p exact.Pt) exact.Pt {
	v := exact.Vec(p)
	if m.Mirror {
		v.X = -v.X
	}
	for range m.Turns {
		v = v.Left()
	}
	return exact.Pt(v).Add(m.Shift)
}

func (m Motion) chain(c plan.Chain) plan.Chain {
	pts := c.Points()
	for i, p := range pts {
		pts[i] = m.Point(p)
	}
	return plan.ChainOf(pts...)
}

// angle returns where a direction in degrees comes to point.
func (m Motion) angle(degrees float64) float64 {
	if m.Mirror {
		degrees = 180 - degrees
	}
	return math.Mod(degrees+90*float64(m.Turns)+360, 360)
}

// Moved returns the plan after a motion. A mirror swaps left and right: the sides of thicknesses and doors, and the ends
// of faces, whose front is on their left.
func Moved(p *plan.Plan, m Motion) *plan.Plan {
	parts := p.Parts()
	parts.Floor = m.chain(parts.Floor)
	for i := range parts.Walls {
		w := &parts.Walls[i]
		w.Line = m.chain(w.Line)
		if m.Mirror && w.Justify != plan.Centre {
			w.Justify = plan.Left + plan.Right - w.Justify
		}
	}
	for i := range parts.Openings {
		parts.Openings[i].SideRight = parts.Openings[i].SideRight != m.Mirror
	}
	for i := range parts.Blocks {
		parts.Blocks[i].Ring = m.chain(parts.Blocks[i].Ring)
		parts.Blocks[i].Circle = nil
	}
	for i := range parts.Observers {
		parts.Observers[i].At, parts.Observers[i].Heading = m.Point(parts.Observers[i].At), m.angle(parts.Observers[i].Heading)
	}
	for i := range parts.Targets {
		t := &parts.Targets[i]
		t.At = m.Point(t.At)
		if t.Face != nil {
			t.Face = &[2]exact.Pt{m.Point(t.Face[0]), m.Point(t.Face[1])}
			if m.Mirror {
				t.Face[0], t.Face[1] = t.Face[1], t.Face[0]
			}
		}
	}
	for i := range parts.Starts {
		parts.Starts[i].At = m.Point(parts.Starts[i].At)
	}
	return plan.From(parts)
}

// Shuffled returns the plan with its walls and blocks in another order.
func Shuffled(p *plan.Plan, seed uint64) *plan.Plan {
	parts := p.Parts()
	r := rand.New(rand.NewPCG(seed, 5))
	r.Shuffle(len(parts.Walls), func(i, j int) { parts.Walls[i], parts.Walls[j] = parts.Walls[j], parts.Walls[i] })
	r.Shuffle(len(parts.Blocks), func(i, j int) { parts.Blocks[i], parts.Blocks[j] = parts.Blocks[j], parts.Blocks[i] })
	return plan.From(parts)
}

// SplitWalls returns the plan with every wall of one straight piece and without openings cut in two at the first grid
// point that divides its piece evenly, and how many walls were cut.
func SplitWalls(p *plan.Plan) (*plan.Plan, int) {
	parts := p.Parts()
	open := map[string]bool{}
	for _, d := range parts.Openings {
		open[d.Wall] = true
	}
	cut := 0
	for i := range parts.Walls {
		w := &parts.Walls[i]
		if w.Line.Len() != 2 || open[w.ID] {
			continue
		}
		a, b := w.Line.At(0), w.Line.At(1)
		d := b.Sub(a)
		n := gcd(d.X, d.Y)
		if n < 2 {
			continue
		}
		k := n / 2
		middle := pt(a.X+d.X/n*k, a.Y+d.Y/n*k)
		rest := *w
		rest.ID, rest.Line, w.Line = w.ID+"b", plan.ChainOf(middle, b), plan.ChainOf(a, middle)
		parts.Walls = append(parts.Walls, rest)
		cut++
	}
	return plan.From(parts), cut
}

// Halves reports whether the rounding of an outline is decided by which borders a pixel owns: some crossing lies on a
// border between pixels, or some segment touches a hot pixel's border and not its inside. Such an outline may round
// otherwise when it is turned or mirrored.
func Halves(o *arrange.Outline) bool {
	for i, s := range o.Segments {
		for _, r := range o.Segments[:i] {
			if k, ok := crossShare(s.A, s.B, r.A, r.B); ok {
				x := spotAt(s.A, s.B.Sub(s.A), k)
				if onHalf(x.X, x.W) || onHalf(x.Y, x.W) {
					return true
				}
			}
		}
	}
	for _, h := range hotPixels(o.Segments) {
		for _, s := range o.Segments {
			if lo, hi := passing(s.A, s.B, h); lo.at.Cmp(hi.at) == 0 {
				return true
			}
		}
	}
	return false
}

// onHalf reports whether v/w is a whole number and a half.
func onHalf(v, w *big.Int) bool {
	return new(big.Int).Rem(new(big.Int).Lsh(v, 1), w).Sign() == 0 && new(big.Int).Rem(v, w).Sign() != 0
}

// Bends reports whether splitting walls changed the rounded graph beyond new points on straight edges: a new end is a hot
// pixel, and segments that pass it bend.
func Bends(p, split *plan.Plan) bool {
	o, _ := arrange.Draw(p)
	q, _ := arrange.Draw(split)
	g, h := Rounded(o), Rounded(q)
	for _, e := range h.Edges {
		straight := slices.ContainsFunc(g.Edges, func(f arrange.Edge) bool {
			a, b := g.Pts[f.A], g.Pts[f.B]
			return exact.OnSegment(a, b, h.Pts[e.A]) && exact.OnSegment(a, b, h.Pts[e.B])
		})
		if !straight {
			return true
		}
	}
	return false
}
