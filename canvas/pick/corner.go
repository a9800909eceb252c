package pick

import (
	"iter"

	"enfilade/canvas/view"
	"enfilade/solver/exact"
	"enfilade/solver/plan"
)

// shape is a wall's line or a ring, for whoever looks at corners.
type shape struct {
	ref    plan.Ref
	pts    plan.Chain
	ring   bool
	locked bool
	centre *exact.Pt // of a round block, which has no corners
}

// cornered yields everything with corners that can be dragged: what is drawn, and the waypoints of routes.
func cornered(p *plan.Plan) iter.Seq[shape] {
	return func(yield func(shape) bool) {
		for s := range shapes(p) {
			if !yield(s) {
				return
			}
		}
		for _, r := range p.Routes() {
			if !r.Hidden && !yield(shape{ref: plan.Ref{Kind: plan.KindRoute, ID: r.ID}, pts: r.Via, ring: false, locked: r.Locked}) {
				return
			}
		}
	}
}

// shapes yields everything drawn that has corners and can be seen. A block drawn as a circle has none.
func shapes(p *plan.Plan) iter.Seq[shape] {
	return func(yield func(shape) bool) {
		if p.Floor().Len() > 0 && !yield(shape{ref: plan.Ref{Kind: plan.KindFloor}, pts: p.Floor(), ring: true, locked: false}) {
			return
		}
		for _, z := range p.Zones() {
			if !z.Hidden && !yield(shape{ref: plan.Ref{Kind: plan.KindZone, ID: z.ID}, pts: z.Ring, ring: true, locked: z.Locked}) {
				return
			}
		}
		for _, b := range p.Blocks() {
			if !b.Hidden && b.Circle == nil && !yield(shape{ref: plan.Ref{Kind: plan.KindBlock, ID: b.ID}, pts: b.Ring, ring: true, locked: b.Locked}) {
				return
			}
		}
		for _, w := range p.Walls() {
			if !w.Hidden && !yield(shape{ref: plan.Ref{Kind: plan.KindWall, ID: w.ID}, pts: w.Line, ring: false, locked: w.Locked}) {
				return
			}
		}
	}
}

// CornersAt returns every corner that lies exactly at a point and may be moved: those that go along when one of them is
// dragged.
func CornersAt(p *plan.Plan, at exact.Pt) []plan.Corner {
	var out []plan.Corner
	for s := range cornered(p) {
		if s.locked {
			continue
		}
		for i, q := range s.pts.All() {
			if q == at {
				out = append(out, plan.Corner{Item: s.ref, Index: i})
			}
		}
	}
	return out
}

// corner finds the corner under the pointer. A corner's reach shrinks with the shorter of its two edges, so that small
// things can still be taken by their body.
func corner(p *plan.Plan, cam view.Camera, s spot, skip map[plan.Ref]bool) (Hit, bool) {
	n := nearest{skip: skip}
	reach := units(cam, cornerReach)
	for sh := range cornered(p) {
		if s.apart(sh.pts, reach) {
			continue
		}
		for i, q := range sh.pts.All() {
			if d := s.dist(spotOf(q)); d <= reach {
				if sh.ref.Kind == plan.KindRoute { // a waypoint has no body to be taken by
					n.offer(d, reach, Hit{sh.ref, Corner, i, q})
					continue
				}
				r := min(reach, 0.3*shortEdge(sh, i))
				if r >= units(cam, cornerReach/2.0) {
					n.offer(d, r, Hit{sh.ref, Corner, i, q})
				}
			}
		}
	}
	return n.hit, n.ok
}

// shortEdge returns the length of the shorter edge at corner i, in units.
func shortEdge(sh shape, i int) float64 {
	n, q := sh.pts.Len(), sh.pts.At(i)
	best := -1.0
	for _, j := range []int{i - 1, i + 1} {
		if sh.ring {
			j = (j + n) % n
		}
		if j < 0 || j >= n {
			continue
		}
		if d := exact.Dist(q, sh.pts.At(j)); best < 0 || d < best {
			best = d
		}
	}
	return best
}

// Points returns the points that make an item: its line or ring, or its place. Openings and what is not in the plan have
// none.
func Points(p *plan.Plan, r plan.Ref) (plan.Chain, bool) {
	switch r.Kind {
	case plan.KindObserver:
		if o, ok := p.Observer(r.ID); ok {
			return plan.ChainOf(o.At), true
		}
	case plan.KindTarget:
		if t, ok := p.Target(r.ID); ok {
			return plan.ChainOf(TargetAt(t)), true
		}
	case plan.KindStart:
		if t, ok := p.Start(r.ID); ok {
			return plan.ChainOf(t.At), true
		}
	case plan.KindBlock:
		if b, ok := p.Block(r.ID); ok {
			return b.Ring, b.Ring.Len() > 0
		}
	case plan.KindWall:
		w, ok := p.Wall(r.ID)
		return w.Line, ok && !w.Hidden && w.Line.Len() > 0
	case plan.KindZone:
		z, ok := p.Zone(r.ID)
		return z.Ring, ok && !z.Hidden && z.Ring.Len() > 0
	case plan.KindOpening:
		return plan.Chain{}, false
	}
	for s := range cornered(p) {
		if s.ref == r {
			return s.pts, s.pts.Len() > 0
		}
	}
	return plan.Chain{}, false
}
