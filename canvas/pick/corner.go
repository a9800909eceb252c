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
}

// shapes yields everything with corners that can be seen. A block drawn as a circle has none.
func shapes(p *plan.Plan) iter.Seq[shape] {
	return func(yield func(shape) bool) {
		if p.Floor().Len() > 0 && !yield(shape{plan.Ref{Kind: plan.KindFloor}, p.Floor(), true, false}) {
			return
		}
		for _, z := range p.Zones() {
			if !z.Hidden && !yield(shape{plan.Ref{Kind: plan.KindZone, ID: z.ID}, z.Ring, true, z.Locked}) {
				return
			}
		}
		for _, b := range p.Blocks() {
			if !b.Hidden && b.Circle == nil && !yield(shape{plan.Ref{Kind: plan.KindBlock, ID: b.ID}, b.Ring, true, b.Locked}) {
				return
			}
		}
		for _, w := range p.Walls() {
			if !w.Hidden && !yield(shape{plan.Ref{Kind: plan.KindWall, ID: w.ID}, w.Line, false, w.Locked}) {
				return
			}
		}
	}
}

// CornersAt returns every corner that lies exactly at a point and may be moved: those that go along when one of them is
// dragged.
func CornersAt(p *plan.Plan, at exact.Pt) []plan.Corner {
	var out []plan.Corner
	for s := range shapes(p) {
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
func corner(p *plan.Plan, cam view.Camera, s spot) (Hit, bool) {
	var n nearest
	reach := units(cam, cornerReach)
	for sh := range shapes(p) {
		if s.apart(sh.pts, reach) {
			continue
		}
		for i, q := range sh.pts.All() {
			if d := s.dist(spotOf(q)); d <= reach {
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

// InBox returns the items that lie with all their points in the box spanned by a and b, in the order of the plan's lists.
// Openings go with their walls and are left out; so are hidden and locked items and the floor.
func InBox(p *plan.Plan, a, b exact.Pt) []plan.Ref {
	var out []plan.Ref
	all := func(c plan.Chain) bool {
		for _, q := range c.All() {
			if !exact.InBox(a, b, q) {
				return false
			}
		}
		return c.Len() > 0
	}
	add := func(in bool, m plan.Meta, kind plan.Kind, id string) {
		if in && !m.Hidden && !m.Locked {
			out = append(out, plan.Ref{Kind: kind, ID: id})
		}
	}
	for _, w := range p.Walls() {
		add(all(w.Line), w.Meta, plan.KindWall, w.ID)
	}
	for _, k := range p.Blocks() {
		add(all(k.Ring), k.Meta, plan.KindBlock, k.ID)
	}
	for _, z := range p.Zones() {
		add(all(z.Ring), z.Meta, plan.KindZone, z.ID)
	}
	for _, o := range p.Observers() {
		add(exact.InBox(a, b, o.At), o.Meta, plan.KindObserver, o.ID)
	}
	for _, t := range p.Targets() {
		add(exact.InBox(a, b, t.At), t.Meta, plan.KindTarget, t.ID)
	}
	for _, t := range p.Starts() {
		add(exact.InBox(a, b, t.At), t.Meta, plan.KindStart, t.ID)
	}
	return out
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
			return plan.ChainOf(t.At), true
		}
	case plan.KindStart:
		if t, ok := p.Start(r.ID); ok {
			return plan.ChainOf(t.At), true
		}
	case plan.KindBlock:
		if b, ok := p.Block(r.ID); ok {
			return b.Ring, b.Ring.Len() > 0
		}
	}
	for s := range shapes(p) {
		if s.ref == r {
			return s.pts, s.pts.Len() > 0
		}
	}
	return plan.Chain{}, false
}
