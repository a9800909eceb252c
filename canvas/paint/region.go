package paint

import (
	"image/color"
	"math"

	"enfilade/solver/plan"
	"enfilade/solver/study"
)

// sightOf returns what an observer sees, if that was solved.
func (s *Scene) sightOf(observer string) *study.Sight {
	if s.Result == nil || observer == "" {
		return nil
	}
	for i := range s.Result.Sight {
		r := &s.Result.Sight[i]
		if r.Item.ID == observer {
			return r
		}
	}
	return nil
}

// regionPath adds the region's outline as a path.
func (p *pen) regionPath(r *study.Sight) {
	ring := p.work.ring[:0]
	for _, q := range r.Boundary {
		ring = append(ring, p.mm(q))
	}
	p.work.ring = ring
	p.addRing(p.frame, ring)
}

// wash is the colour that spreads from the chosen observer's eye over all it sees. It is strongest at the eye and gathers
// along the border.
func (p *pen) wash(r *study.Sight, colour int) {
	eye, radius := p.mm(r.At), 0.0
	for _, q := range r.Boundary {
		c := p.mm(q)
		radius = max(radius, math.Hypot(c.x-eye.x, c.y-eye.y))
	}
	strength := 1.0
	if p.s.Stale {
		strength = 0.5
	}
	t, k := p.theme, float32(p.k)
	m := p.begin()
	p.regionPath(r)
	w := WashStyle{
		Eye: Pt{float32(eye.x), float32(eye.y)}, Radius: float32(radius),
		Near: float32(t.WashNear * strength), Mid: float32(t.WashMid * strength), Far: float32(t.WashFar * strength),
		Rims: [2]float32{9 * k, 4 * k}, RimStrength: float32(0.1 * strength),
	}
	if p.s.Stale {
		w.RimStrength = 0
	}
	p.Washes = append(p.Washes, w)
	p.op(m, Op{Kind: Wash, Colour: t.WashOf(colour), Style: int32(len(p.Washes) - 1), Ink: LowInk})
}

// regionEdges draws the border: solid where sight meets something, half of it under the ink; dashed where it only stops.
func (p *pen) regionEdges(r *study.Sight, c color.NRGBA) {
	if len(r.Kinds) != len(r.Boundary) || len(r.Boundary) < 3 {
		return
	}
	m := p.begin()
	p.borderRuns(r, true, 0)
	op := p.stroked(c, StrokeStyle{Width: regionSolid, Join: RoundJoin})
	op.Ink = HardInk
	p.op(m, op)
	m = p.begin()
	const on, off = 6, 4
	p.borderRuns(r, false, (on+off)*p.k)
	op = p.stroked(c, StrokeStyle{Width: regionDash, On: on, Off: off})
	op.Ink = HardInk
	p.op(m, op)
}

// borderRuns adds the runs of the border that lie on something, or those that do not, each as one line so that its dashes
// go on round its corners.
func (p *pen) borderRuns(r *study.Sight, on bool, period float64) {
	n := len(r.Boundary)
	is := func(i int) bool { return (r.Kinds[(i+n)%n] == study.EdgeWall) == on }
	first := 0
	for first < n && !(is(first) && !is(first-1)) {
		first++
	}
	if first == n { // all of it or nothing
		if !is(0) {
			return
		}
		first = 0
	}
	for i := 0; i < n; {
		if !is(first + i) {
			i++
			continue
		}
		line := append(p.work.ring[:0], p.mm(r.Boundary[(first+i)%n]))
		for ; i < n && is(first+i); i++ {
			line = append(line, p.mm(r.Boundary[(first+i+1)%n]))
		}
		p.work.ring = line
		p.addLine(p.frame, line, period)
	}
}

// regions draws the chosen observer's wash; the edges follow later, over low walls.
func (p *pen) regions() {
	for i, o := range p.s.Plan.Observers() {
		if o.ID != p.s.Observer || o.Hidden {
			continue
		}
		if r := p.s.sightOf(o.ID); r != nil && r.Problem == "" {
			p.wash(r, colourOf(o, i))
		}
	}
}

// edges draws the borders of the chosen observer's region, and of all others when they are asked for.
func (p *pen) edges() {
	if p.s.Stale {
		return
	}
	for i, o := range p.s.Plan.Observers() {
		if o.Hidden || o.ID != p.s.Observer && !p.s.AllRegions {
			continue
		}
		if r := p.s.sightOf(o.ID); r != nil && r.Problem == "" {
			p.regionEdges(r, p.theme.ObserverColour(colourOf(o, i)))
		}
	}
}

// colourOf returns the colour index of an observer: its own, or its place in the list.
func colourOf(o plan.Observer, i int) int {
	if o.Colour >= 0 {
		return o.Colour
	}
	return i
}
