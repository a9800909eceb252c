package paint

import (
	"image/color"
	"math"

	"github.com/paulmach/orb"

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

// seenFromOf returns the places that see a target, if that was solved.
func (s *Scene) seenFromOf(target string) *study.Sight {
	if s.Result == nil || target == "" {
		return nil
	}
	for i := range s.Result.SeenFrom {
		r := &s.Result.SeenFrom[i]
		if r.Item.ID == target {
			return r
		}
	}
	return nil
}

// shownRegion returns the region that is washed.
func (s *Scene) shownRegion() *study.Sight {
	if s.SeenFrom != "" {
		return s.seenFromOf(s.SeenFrom)
	}
	return s.sightOf(s.Observer)
}

// ringPath adds one ring of a region's border.
func (p *pen) ringPath(boundary orb.Ring) {
	ring := p.work.ring[:0]
	for _, q := range boundary {
		ring = append(ring, p.mm(q))
	}
	p.work.ring = ring
	p.addRing(p.frame, ring)
}

// regionPath adds the region's outline as a path: all its parts, and its holes, which go round the other way.
func (p *pen) regionPath(r *study.Sight) {
	p.ringPath(r.Boundary)
	for i := range r.More {
		p.ringPath(r.More[i].Ring)
	}
}

// wash is the colour that spreads from an eye over all it sees, or from a target over the places that see it. It is strongest
// there and gathers along the border.
func (p *pen) wash(r *study.Sight, c color.NRGBA, strength float64) {
	eye, radius := p.mm(r.At), p.reach(r.At, r.Boundary)
	for i := range r.More {
		radius = max(radius, p.reach(r.At, r.More[i].Ring))
	}
	rim := strength
	if p.s.Stale {
		strength, rim = strength/2, 0
	}
	t, k := p.theme, float32(p.k)
	m := p.begin()
	p.regionPath(r)
	w := WashStyle{
		Eye: Pt{float32(eye.x), float32(eye.y)}, Radius: float32(radius),
		Near: float32(t.WashNear * strength), Mid: float32(t.WashMid * strength), Far: float32(t.WashFar * strength),
		Rims: [2]float32{9 * k, 4 * k}, RimStrength: float32(0.1 * rim),
	}
	p.Washes = append(p.Washes, w)
	p.op(m, Op{Kind: Wash, Colour: c, Style: int32(len(p.Washes) - 1), Ink: LowInk})
}

// regionEdges draws the border: solid where sight meets something, half of it under the ink; dashed where it only stops.
func (p *pen) regionEdges(r *study.Sight, c color.NRGBA) {
	m := p.begin()
	p.borders(r, true, 0)
	op := p.stroked(c, StrokeStyle{Width: regionSolid, Join: RoundJoin})
	op.Ink = HardInk
	p.op(m, op)
	m = p.begin()
	const on, off = 6, 4
	p.borders(r, false, (on+off)*p.k)
	op = p.stroked(c, StrokeStyle{Width: regionDash, On: on, Off: off})
	op.Ink = HardInk
	p.op(m, op)
}

// borders adds the runs of all rings of a region's border.
func (p *pen) borders(r *study.Sight, on bool, period float64) {
	p.borderRuns(r.Boundary, r.Kinds, on, period)
	for i := range r.More {
		p.borderRuns(r.More[i].Ring, r.More[i].Kinds, on, period)
	}
}

// borderRuns adds the runs of a ring that lie on something, or those that do not, each as one line so that its dashes
// go on round its corners.
func (p *pen) borderRuns(ring orb.Ring, kinds []study.EdgeKind, on bool, period float64) {
	n := len(ring)
	if len(kinds) != n || n < 3 {
		return
	}
	is := func(i int) bool { return (kinds[(i+n)%n] == study.EdgeWall) == on }
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
		line := append(p.work.ring[:0], p.mm(ring[(first+i)%n]))
		for ; i < n && is(first+i); i++ {
			line = append(line, p.mm(ring[(first+i+1)%n]))
		}
		p.work.ring = line
		p.addLine(p.frame, line, period)
	}
}

// seenFromStrength is the strength of a target's wash beside an observer's: walks in the same red cross it.
const seenFromStrength = 0.7

// reach returns how far a ring reaches from a place in mm, in device pixels.
func (p *pen) reach(from orb.Point, ring orb.Ring) float64 {
	eye, far := p.mm(from), 0.0
	for _, q := range ring {
		c := p.mm(q)
		far = max(far, math.Hypot(c.x-eye.x, c.y-eye.y))
	}
	return far
}

// regions draws the wash of the places that see the chosen target, or that of the chosen observer; the edges follow later, over
// low walls.
func (p *pen) regions() {
	if p.s.SeenFrom != "" {
		if r := p.s.seenFromOf(p.s.SeenFrom); r != nil && r.Problem == "" {
			p.wash(r, p.theme.Red, seenFromStrength)
		}
		return
	}
	for i, o := range p.s.Plan.Observers() {
		if o.ID != p.s.Observer || o.Hidden {
			continue
		}
		if r := p.s.sightOf(o.ID); r != nil && r.Problem == "" {
			p.wash(r, p.theme.WashOf(colourOf(o, i)), 1)
		}
	}
}

// edges draws the borders of the region that is washed, and of those of other observers that are asked for.
func (p *pen) edges() {
	if p.s.Stale {
		return
	}
	for i, o := range p.s.Plan.Observers() {
		if o.Hidden || (o.ID != p.s.Observer || p.s.SeenFrom != "") && !p.s.bordered(o.ID) {
			continue
		}
		if r := p.s.sightOf(o.ID); r != nil && r.Problem == "" {
			p.regionEdges(r, p.theme.ObserverColour(colourOf(o, i)))
		}
	}
	if r := p.s.seenFromOf(p.s.SeenFrom); r != nil && r.Problem == "" {
		p.regionEdges(r, p.theme.Red)
	}
}

// colourOf returns the colour index of an observer: its own, or its place in the list.
func colourOf(o plan.Observer, i int) int {
	if o.Colour >= 0 {
		return o.Colour
	}
	return i
}
