package paint

import (
	"math"

	"enfilade/solver/exact"
	"enfilade/solver/plan"
)

// manyChosen is a selection of so many items that no frame can look at them all: where each lies.
type manyChosen struct {
	first   *plan.Ref // of the selection's slice, which is never changed while it is as long
	n       int
	drawing *Drawing
	refs    []plan.Ref
	boxes   []box // around each, in grid units; an empty one for what is hidden, one without end for what is no obstacle
	all     box   // around all obstacles
	seen    []plan.Ref
}

var (
	emptyBox   = box{math.Inf(1), math.Inf(1), math.Inf(-1), math.Inf(-1)}
	endlessBox = box{math.Inf(-1), math.Inf(-1), math.Inf(1), math.Inf(1)}
)

// around returns the box around two boxes.
func (a box) around(b box) box {
	return box{min(a.x0, b.x0), min(a.y0, b.y0), max(a.x1, b.x1), max(a.y1, b.y1)}
}

// chosen returns where the selection lies in the drawing of the frame.
func (p *pen) chosen() *manyChosen {
	c, d := &p.memory.chosen, p.drawing
	if c.first == &p.s.Selected[0] && c.n == len(p.s.Selected) && c.drawing == d {
		return c
	}
	*c = manyChosen{first: &p.s.Selected[0], n: len(p.s.Selected), drawing: d, all: emptyBox,
		refs: p.s.Selected, boxes: make([]box, len(p.s.Selected)), seen: c.seen}
	for i, ref := range c.refs {
		switch ref.Kind {
		case plan.KindWall, plan.KindOpening, plan.KindBlock:
			c.boxes[i] = d.boxOf(ref)
			c.all = c.all.around(c.boxes[i])
		default:
			c.boxes[i] = endlessBox
		}
	}
	return c
}

// inSight returns the chosen items that may reach into the picture. It is good until the next call.
func (c *manyChosen) inSight(p *pen) []plan.Ref {
	w := p.cam.Window(rim * p.k)
	in := box{w.Min[0] * exact.PerMM, w.Min[1] * exact.PerMM, w.Max[0] * exact.PerMM, w.Max[1] * exact.PerMM}
	c.seen = c.seen[:0]
	for i, b := range c.boxes {
		sees := b.x0 <= in.x1 && b.x1 >= in.x0 && b.y0 <= in.y1 && b.y1 >= in.y0
		if !sees && p.held != nil { // dragged, it may be elsewhere by now
			_, sees = p.held.refs[c.refs[i]]
		}
		if sees {
			c.seen = append(c.seen, c.refs[i])
		}
	}
	return c.seen
}

// boxOf returns the box around what is drawn of an obstacle, empty when it is hidden.
func (d *Drawing) boxOf(ref plan.Ref) box {
	in := emptyBox
	add := func(pts [2]int32) {
		for _, q := range d.pts[pts[0]:pts[1]] {
			x, y := float64(q.X), float64(q.Y)
			in = in.around(box{x, y, x, y})
		}
	}
	sp := d.refs[ref]
	for i := sp.body0; i < sp.body1; i++ {
		if b := &d.bodies[i]; b.item == ref && !b.hidden {
			for _, r := range d.rings[b.rings[0]:b.rings[1]] {
				add(r)
			}
		}
	}
	for i := sp.line0; i < sp.line1; i++ {
		if ln := &d.lines[i]; ln.item == ref && !ln.hidden {
			add(ln.pts)
		}
	}
	if n := sp.door; n > 0 && !d.doors[n-1].hidden {
		for _, v := range [...]vec{d.doors[n-1].right[0], d.doors[n-1].right[1], d.doors[n-1].left[0], d.doors[n-1].left[1]} {
			in = in.around(box{v.x, v.y, v.x, v.y})
		}
	}
	return in
}
