package paint

import "enfilade/solver/plan"

// outlines draws a line about what is under the pointer and about what is selected, a few px outside of it.
func (p *pen) outlines() {
	p.zoneOutlines()
	if h := p.s.Hover; h.ID != "" && !p.s.selected(h) {
		m := p.begin()
		p.outlineOf(h, HoverOffset)
		p.op(m, p.stroked(at(p.theme.Ink, 0.55), StrokeStyle{Width: 1.5}))
	}
	p.selection()
}

// Selections of many items are drawn some outlines at a time, for the rasteriser walks all that a row has to add to it; and where
// more are in sight than can be told apart, one frame goes about them all.
const (
	outlinesAtOnce = 16
	mostOutlines   = 600
)

// selection draws the outlines of what is selected. What is dragged in such numbers is told by its moving.
func (p *pen) selection() {
	if len(p.s.Dragged) > mostOutlines {
		return
	}
	refs := p.s.Selected
	if len(refs) > mostOutlines {
		refs = p.chosen().inSight(p)
	}
	style := p.stroked(p.theme.Ink, StrokeStyle{Width: 2})
	ops, points := len(p.Ops), len(p.Points)
	first := p.begin()
	m := first
	for _, ref := range refs {
		p.outlineOf(ref, SelectedOffset)
		switch n := p.begin(); {
		case n-first > mostOutlines:
			p.Ops, p.Subs, p.Points = p.Ops[:ops], p.Subs[:first], p.Points[:points]
			p.frameAbout(p.chosen().all)
			return
		case n-m >= outlinesAtOnce:
			p.op(m, style)
			m = n
		}
	}
	p.op(m, style)
}

// frameAbout draws a frame about a box in grid units.
func (p *pen) frameAbout(in box) {
	if in.x0 > in.x1 {
		return
	}
	a, b := p.grid(vec{in.x0, in.y1}), p.grid(vec{in.x1, in.y0}) // upper left, lower right
	off := SelectedOffset * p.k
	m := p.begin()
	p.addRing(p.frame, []place{{a.x - off, a.y - off}, {b.x + off, a.y - off}, {b.x + off, b.y + off}, {a.x - off, b.y + off}})
	p.op(m, p.stroked(p.theme.Ink, StrokeStyle{Width: 2}))
}

// outlineOf adds the outline of a part, so many px outside of it.
func (p *pen) outlineOf(ref plan.Ref, off float64) {
	switch ref.Kind {
	case plan.KindWall, plan.KindBlock:
		p.outlineBodies(ref, off)
	case plan.KindOpening:
		p.outlineDoor(ref, off)
	case plan.KindObserver:
		if o, ok := p.s.Plan.Observer(ref.ID); ok && !o.Hidden && ref.ID != p.s.Observer && p.shows(p.point(o.At)) {
			p.disc(p.point(o.At), (ObserverRadius+off)*p.k)
		}
	case plan.KindTarget:
		if t, ok := p.s.Plan.Target(ref.ID); ok && !t.Hidden && p.shows(p.targetPlace(t)) {
			p.disc(p.targetPlace(t), (TargetRadius+0.9+off)*p.k)
		}
	case plan.KindStart:
		if s, ok := p.s.Plan.Start(ref.ID); ok && !s.Hidden && p.shows(p.mat(s)) {
			p.roundRect(p.turtleAt(p.mat(s), p.startHeading(s)), MatWidth+2*off+1.3, MatLength+2*off+1.3, 2+off)
		}
	case plan.KindFloor:
		p.addRing(p.frame, p.floorRing(p.s.Plan))
	case plan.KindUnderlay:
		p.underlayOutline()
	}
}

// zoneOutlines draws the border of zones that are hovered or selected, dashed: nothing is built there.
func (p *pen) zoneOutlines() {
	const on, off = 3, 3
	if h := p.s.Hover; h.Kind == plan.KindZone && !p.s.selected(h) {
		m := p.begin()
		p.outlineZone(h)
		p.op(m, p.stroked(at(p.theme.Ink, 0.35), StrokeStyle{Width: 1, On: on, Off: off}))
	}
	m := p.begin()
	for _, ref := range p.s.Selected {
		if ref.Kind == plan.KindZone {
			p.outlineZone(ref)
		}
	}
	p.op(m, p.stroked(p.theme.Ink, StrokeStyle{Width: 1.5, On: on, Off: off}))
}

func (p *pen) outlineZone(ref plan.Ref) {
	for _, z := range p.s.Plan.Zones() {
		if z.ID != ref.ID {
			continue
		}
		ring := p.work.ring[:0]
		for _, q := range z.Ring.All() {
			ring = append(ring, p.point(q))
		}
		p.work.ring = ring
		p.addRing(p.frame, ring)
	}
}

// outlineBodies goes about the bodies and lines of one item, in its new place when it is dragged.
func (p *pen) outlineBodies(ref plan.Ref, off float64) {
	d := p.drawing
	if p.held != nil {
		if _, ok := p.held.refs[ref]; ok {
			d = p.held
		}
	}
	sp, ok := d.refs[ref]
	if !ok {
		return
	}
	for i := sp.body0; i < sp.body1; i++ {
		if b := &d.bodies[i]; b.item == ref && !b.hidden {
			for _, r := range d.rings[b.rings[0]:b.rings[1]] {
				ring := p.work.ring[:0]
				for _, q := range d.pts[r[0]:r[1]] {
					ring = append(ring, p.point(q))
				}
				p.work.ring = ring
				p.addOffset(ring, off*p.k)
			}
		}
	}
	for i := sp.line0; i < sp.line1; i++ {
		if ln := &d.lines[i]; ln.item == ref && !ln.hidden {
			p.addAround(p.chain(d, ln), (off+1)*p.k)
		}
	}
}

func (p *pen) outlineDoor(ref plan.Ref, off float64) {
	d := p.drawing
	if p.held != nil {
		if _, ok := p.held.refs[ref]; ok {
			d = p.held
		}
	}
	n := d.refs[ref].door
	if n == 0 || d.doors[n-1].hidden {
		return
	}
	dr := &d.doors[n-1]
	ring := append(p.work.ring[:0], p.grid(dr.right[0]), p.grid(dr.right[1]), p.grid(dr.left[1]), p.grid(dr.left[0]))
	p.work.ring = ring
	p.addOffset(ring, off*p.k)
}

// addOffset adds a ring moved outwards by d pixels. The ring has its inside to the left in the plan, so outwards lies to the
// left of its direction on the picture, where y points down. Corners are mitred, sharp ones cut off.
func (p *pen) addOffset(ring []place, d float64) {
	out := p.work.route[:0]
	n := len(ring)
	for i, q := range ring {
		in, l1 := vec(ring[(i+n-1)%n]).towards(vec(q))
		on, l2 := vec(q).towards(vec(ring[(i+1)%n]))
		if l1 == 0 || l2 == 0 {
			continue
		}
		a, b := in.left(), on.left()
		if c := 1 + a.x*b.x + a.y*b.y; c > 0.3 {
			s := d / c
			out = append(out, place{q.x + (a.x+b.x)*s, q.y + (a.y+b.y)*s})
		} else {
			out = append(out, place{q.x + (a.x+in.x)*d, q.y + (a.y+in.y)*d}, place{q.x + (b.x-on.x)*d, q.y + (b.y-on.y)*d})
		}
	}
	p.work.route = out
	p.addRing(p.frame, out)
}

// addAround adds a ring about an open line, d pixels off it on all sides.
func (p *pen) addAround(line []place, d float64) {
	ring := append(p.work.ring[:0:0], line...)
	for i := len(line) - 2; i > 0; i-- {
		ring = append(ring, line[i])
	}
	if len(line) == 2 { // a ring of two points: both ends turn back
		u, _ := vec(line[0]).towards(vec(line[1]))
		n, e := u.left().times(d), u.times(d)
		a, b := line[0], line[1]
		p.addRing(p.frame, []place{
			{a.x - e.x + n.x, a.y - e.y + n.y}, {b.x + e.x + n.x, b.y + e.y + n.y},
			{b.x + e.x - n.x, b.y + e.y - n.y}, {a.x - e.x - n.x, a.y - e.y - n.y},
		})
		return
	}
	p.addOffset(ring, d)
}
