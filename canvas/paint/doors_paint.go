package paint

import (
	"math"

	"enfilade/solver/plan"
)

// doors draws leaves and the arcs they swing over: an open leaf stands at a right angle to its wall, a shut one lies in the
// middle of it between two thresholds, and its swing is hinted at.
func (p *pen) doors(d *Drawing, keep func(plan.Ref) bool) {
	p.doorLines(d, keep, p.stroked(at(p.theme.Ink, 0.65), StrokeStyle{Width: swingLine}), func(dr *door) {
		if dr.leaf == plan.NoLeaf {
			return
		}
		p.swing(dr)
		if dr.shut {
			p.segment(p.grid(dr.hinge), p.grid(dr.tip))
		}
		p.thresholds(dr)
	})
	p.leaves(d, keep, plan.SolidLeaf, p.stroked(p.theme.Ink, StrokeStyle{Width: leafLine}))
	p.leaves(d, keep, plan.GlazedLeaf, p.stroked(p.theme.Glazing, StrokeStyle{Width: leafLine}))
}

func (p *pen) leaves(d *Drawing, keep func(plan.Ref) bool, leaf plan.Leaf, op Op) {
	p.doorLines(d, keep, op, func(dr *door) {
		switch {
		case dr.leaf != leaf:
		case dr.shut:
			p.segment(p.grid(dr.middle(0)), p.grid(dr.middle(1)))
		default:
			p.segment(p.grid(dr.hinge), p.grid(dr.tip))
		}
	})
}

// doorways fills the way through each opening with the floor's colour: an entrance may cut a wall at the floor's border.
func (p *pen) doorways(d *Drawing, keep func(plan.Ref) bool) {
	m := p.begin()
	for i := range d.doors {
		if dr := &d.doors[i]; !dr.hidden && keep(dr.item) {
			ring := append(p.work.ring[:0], p.grid(dr.left[0]), p.grid(dr.left[1]), p.grid(dr.right[1]), p.grid(dr.right[0]))
			p.work.ring = ring
			if p.sees(ring) {
				p.addRing(p.frame, ring)
			}
		}
	}
	p.fill(m, p.theme.Floor)
}

// thresholds adds the faces of the wall across an opening: both of a shut door, of an open one only that which leads out.
func (p *pen) thresholds(d *door) {
	mid := d.middle(0).plus(d.middle(1)).times(0.5)
	for _, face := range [...][2]vec{d.left, d.right} {
		c := face[0].plus(face[1]).times(0.5)
		u, deep := mid.towards(c)
		out := c.plus(u.times(20)) // 2 mm beyond the face
		if deep > 0 && (d.shut || !p.onFloor(p.grid(out))) {
			p.segment(p.grid(face[0]), p.grid(face[1]))
		}
	}
}

// doorLines adds lines of every door that is drawn, in one step.
func (p *pen) doorLines(d *Drawing, keep func(plan.Ref) bool, op Op, add func(*door)) {
	m := p.begin()
	for i := range d.doors {
		if dr := &d.doors[i]; !dr.hidden && keep(dr.item) {
			add(dr)
		}
	}
	op.Ink = HardInk
	p.op(m, op)
}

// middle returns the middle of a jamb.
func (d *door) middle(jamb int) vec { return d.left[jamb].plus(d.right[jamb]).times(0.5) }

// swing adds the quarter circle from the latch to the tip of the leaf.
func (p *pen) swing(d *door) {
	c, from, to := p.grid(d.hinge), p.grid(d.latch), p.grid(d.tip)
	r := math.Hypot(from.x-c.x, from.y-c.y)
	n := max(arcSteps(r, math.Pi/2), 2)
	line := p.work.ring[:0]
	for i := range n + 1 {
		sin, cos := math.Sincos(math.Pi / 2 * float64(i) / float64(n))
		line = append(line, place{
			c.x + (from.x-c.x)*cos + (to.x-c.x)*sin,
			c.y + (from.y-c.y)*cos + (to.y-c.y)*sin,
		})
	}
	p.work.ring = line
	p.addLine(p.frame, line, 0)
}

// arcSteps returns the straight pieces into which an arc of a radius in pixels is cut: none strays by more than 0.05 px.
func arcSteps(r, angle float64) int {
	const stray = 0.05
	if r < 0.2 {
		return 4
	}
	step := 2 * math.Acos(1-stray/r)
	return min(int(angle/step)+1, 720)
}
