package pick

import (
	"enfilade/solver/exact"
	"enfilade/solver/plan"
)

// kept is what a plan has to snap to, with the boxes around it in a list of their own, so that most of a large plan is passed
// over without being looked at. It is made anew when the plan is another one, which takes about as long as one look at all of
// it; while something is dragged or drawn the plan stays the same.
type kept struct {
	obstacles *plan.Obstacles
	marks     *plan.Marks
	boxes     []box
	shapes    []shape
}

// of takes over a plan.
func (k *kept) of(p *plan.Plan) {
	if k.obstacles == p.Obstacles() && k.marks == p.Marks() {
		return
	}
	k.obstacles, k.marks = p.Obstacles(), p.Marks()
	k.boxes, k.shapes = k.boxes[:0], k.shapes[:0]
	for sh := range shapes(p) {
		if sh.pts.Len() > 0 {
			k.boxes, k.shapes = append(k.boxes, boxAround(sh.pts)), append(k.shapes, sh)
		}
	}
	for _, b := range p.Blocks() {
		if b.Circle != nil && !b.Hidden {
			at := b.Circle.At
			k.boxes = append(k.boxes, box{at, at})
			k.shapes = append(k.shapes, shape{ref: plan.Ref{Kind: plan.KindBlock, ID: b.ID}, centre: &at})
		}
	}
}

// boxAround returns the box around the points of a chain that has some.
func boxAround(c plan.Chain) box {
	b := box{c.At(0), c.At(0)}
	for i := 1; i < c.Len(); i++ {
		q := c.At(i)
		b.lo, b.hi = exact.Pt{X: min(b.lo.X, q.X), Y: min(b.lo.Y, q.Y)}, exact.Pt{X: max(b.hi.X, q.X), Y: max(b.hi.Y, q.Y)}
	}
	return b
}
