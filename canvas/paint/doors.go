package paint

import (
	"math"

	"enfilade/solver/exact"
	"enfilade/solver/plan"
)

// vec is a place or vector of the plan in grid units.
type vec struct{ x, y float64 }

func vecOf(p exact.Pt) vec        { return vec{float64(p.X), float64(p.Y)} }
func (a vec) plus(b vec) vec      { return vec{a.x + b.x, a.y + b.y} }
func (a vec) times(s float64) vec { return vec{a.x * s, a.y * s} }
func (a vec) left() vec           { return vec{-a.y, a.x} }
func (a vec) towards(b vec) (u vec, d float64) {
	dx, dy := b.x-a.x, b.y-a.y
	d = math.Hypot(dx, dy)
	if d == 0 {
		return vec{1, 0}, 0
	}
	return vec{dx / d, dy / d}, d
}

// door is an opening as it is drawn: its four jamb corners and its leaf.
type door struct {
	item        plan.Ref
	hidden      bool
	leaf        plan.Leaf
	shut        bool
	left, right [2]vec // the wall's two faces across the opening, from its near to its far jamb
	hinge       vec    // where the leaf turns, on the face of its side
	latch       vec    // the other jamb on that face
	tip         vec    // end of the leaf when it stands open at a right angle
}

// doorsOf returns the openings of a plan that fit their walls.
func doorsOf(p *plan.Plan) []door {
	if p.NumOpenings() == 0 {
		return nil
	}
	walls := make(map[string]plan.Wall, p.NumWalls())
	for _, w := range p.Walls() {
		walls[w.ID] = w
	}
	doors := make([]door, 0, p.NumOpenings())
	for _, o := range p.Openings() {
		w, ok := walls[o.Wall]
		if !ok {
			continue
		}
		if _, fault := w.Fit(o); fault == "" {
			doors = append(doors, doorOf(w, o))
		}
	}
	return doors
}

func doorOf(w plan.Wall, o plan.Opening) door {
	a, b := vecOf(w.Line.At(o.Segment)), vecOf(w.Line.At(o.Segment+1))
	u, _ := a.towards(b)
	near := a.plus(u.times(float64(o.At)))
	far := near.plus(u.times(float64(o.Width)))
	right2, left2 := w.Sides2()
	l, r := u.left().times(float64(left2)/2), u.left().times(-float64(right2)/2)
	d := door{
		item: plan.Ref{Kind: plan.KindOpening, ID: o.ID}, hidden: o.Hidden || w.Hidden, leaf: o.Leaf, shut: o.Shut,
		left: [2]vec{near.plus(l), far.plus(l)}, right: [2]vec{near.plus(r), far.plus(r)},
	}
	face, out := d.left, u.left()
	if o.SideRight {
		face, out = d.right, out.times(-1)
	}
	d.hinge, d.latch = face[0], face[1]
	if o.HingeEnd {
		d.hinge, d.latch = face[1], face[0]
	}
	d.tip = d.hinge.plus(out.times(float64(o.Width)))
	return d
}
