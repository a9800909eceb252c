package pick

import (
	"enfilade/solver/exact"
	"enfilade/solver/plan"
)

// InBox returns the items that lie with all their points in the box spanned by a and b, in the order of the plan's lists;
// with touched also those of which only a part lies in it. Openings go with their walls and are left out; so are hidden and
// locked items and the floor.
func InBox(p *plan.Plan, a, b exact.Pt, touched bool) []plan.Ref {
	var out []plan.Ref
	x := boxOf(a, b)
	in := func(c plan.Chain, ring bool) bool {
		if touched {
			return x.touches(c, ring)
		}
		return x.holds(c)
	}
	add := func(in bool, m plan.Meta, kind plan.Kind, id string) {
		if in && !m.Hidden && !m.Locked {
			out = append(out, plan.Ref{Kind: kind, ID: id})
		}
	}
	for _, w := range p.Walls() {
		add(in(w.Line, false), w.Meta, plan.KindWall, w.ID)
	}
	for _, k := range p.Blocks() {
		add(in(k.Ring, true), k.Meta, plan.KindBlock, k.ID)
	}
	for _, z := range p.Zones() {
		add(in(z.Ring, true), z.Meta, plan.KindZone, z.ID)
	}
	for _, o := range p.Observers() {
		add(exact.InBox(a, b, o.At), o.Meta, plan.KindObserver, o.ID)
	}
	for _, t := range p.Targets() {
		c := plan.ChainOf(t.At)
		if t.Face != nil {
			c = plan.ChainOf(t.Face[0], t.Face[1])
		}
		add(in(c, false), t.Meta, plan.KindTarget, t.ID)
	}
	for _, t := range p.Starts() {
		add(exact.InBox(a, b, t.At), t.Meta, plan.KindStart, t.ID)
	}
	for _, r := range p.Routes() {
		add(in(r.Via, false), r.Meta, plan.KindRoute, r.ID)
	}
	return out
}

// box is a level rectangle.
type box struct{ lo, hi exact.Pt }

func boxOf(a, b exact.Pt) box {
	return box{exact.Pt{X: min(a.X, b.X), Y: min(a.Y, b.Y)}, exact.Pt{X: max(a.X, b.X), Y: max(a.Y, b.Y)}}
}

// holds reports whether all points of a chain lie in the box.
func (x box) holds(c plan.Chain) bool {
	for _, q := range c.All() {
		if !exact.InBox(x.lo, x.hi, q) {
			return false
		}
	}
	return c.Len() > 0
}

// touches reports whether any piece of a chain, or the inside of a ring, has a point in the box.
func (x box) touches(c plan.Chain, ring bool) bool {
	if c.Len() == 1 {
		return exact.InBox(x.lo, x.hi, c.At(0))
	}
	hit := false
	edges(c, ring, func(_ int, a, b exact.Pt) bool {
		hit = x.meets(a, b)
		return !hit
	})
	return hit || ring && spotOf(x.lo).inside(c)
}

// meets reports whether a piece has a point in the box, exactly: its own box overlaps this one, and not all corners of this
// one lie on one side of it.
func (x box) meets(a, b exact.Pt) bool {
	if max(a.X, b.X) < x.lo.X || min(a.X, b.X) > x.hi.X || max(a.Y, b.Y) < x.lo.Y || min(a.Y, b.Y) > x.hi.Y {
		return false
	}
	left, right := false, false
	for _, q := range [...]exact.Pt{x.lo, x.hi, {X: x.lo.X, Y: x.hi.Y}, {X: x.hi.X, Y: x.lo.Y}} {
		o := exact.Orient(a, b, q)
		left, right = left || o >= 0, right || o <= 0
	}
	return left && right
}
