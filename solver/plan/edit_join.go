package plan

import (
	"slices"

	"enfilade/solver/exact"
)

// JoinWalls makes one wall of several that meet end to end; it keeps the first one's id and direction. Where two pieces go on
// in a straight line, to half a unit, they become one piece. The openings stay where they are.
type JoinWalls struct{ Walls []string }

// Label says what the edit does.
func (e JoinWalls) Label() string { return "join walls" }

// Apply fails when the walls do not all meet end to end, or differ in kind, thickness, height or side.
func (e JoinWalls) Apply(p *Plan) (*Plan, error) {
	if len(e.Walls) < 2 {
		return nil, fault(KindPlan, "", "needs two walls or more to join")
	}
	var walls []Wall
	for _, id := range e.Walls {
		w, ok := p.Wall(id)
		switch {
		case !ok:
			return nil, missing(KindWall, id)
		case slices.ContainsFunc(walls, func(v Wall) bool { return v.ID == id }):
			return nil, fault(KindWall, id, "is named twice")
		case w.Line.Closed():
			return nil, fault(KindWall, id, "is closed, so it has no end to join")
		}
		walls = append(walls, w)
	}
	j := joiner{wall: walls[0], openings: p.obstacles.openings}
	for rest := walls[1:]; len(rest) > 0; {
		i := slices.IndexFunc(rest, func(w Wall) bool { return j.meets(w) })
		if i < 0 {
			return nil, fault(KindWall, rest[0].ID, "does not meet an end of the others; lengthen it to them first")
		}
		if text := unlike(&j.wall, &rest[i], j.about(rest[i])); text != "" {
			return nil, fault(KindWall, rest[i].ID, text)
		}
		j.join(rest[i])
		rest = slices.Delete(slices.Clone(rest), i, i+1)
	}
	gone := map[string]bool{}
	for _, w := range walls[1:] {
		gone[w.ID] = true
	}
	left, _ := p.obstacles.walls.without(func(_ int, w *Wall) bool { return gone[w.ID] })
	left = left.put(at(&left, j.wall.ID), j.wall)
	openings, err := fitted(j.openings, &j.wall)
	if err != nil {
		return nil, err
	}
	d := draftOf(p)
	d.obstacles().walls, d.obstacles().openings = left, openings
	return d.plan(), nil
}

// joiner is a join under way: the wall as far as it goes, and all openings of the plan.
type joiner struct {
	wall     Wall
	openings list[Opening]
}

func ends(w *Wall) (first, last exact.Pt) { return w.Line.At(0), w.Line.At(w.Line.Len() - 1) }

func (j *joiner) meets(w Wall) bool {
	a, b := ends(&j.wall)
	c, d := ends(&w)
	return a != b && (b == c || b == d || a == d || a == c)
}

// about reports whether a wall runs the other way: whether it meets end on end, or beginning on beginning.
func (j *joiner) about(w Wall) bool {
	a, b := ends(&j.wall)
	c, d := ends(&w)
	return b != c && a != d
}

// unlike says in what two walls differ that are to become one.
func unlike(v, w *Wall, about bool) string {
	side := w.Justify
	if about {
		side = side.flipped()
	}
	line := w.Kind == Glazing || w.Kind == Screen
	switch {
	case v.Kind != w.Kind:
		return "is of another kind than wall " + v.ID + "; make them the same first"
	case v.Thickness != w.Thickness && !line:
		return "is not as thick as wall " + v.ID + "; make them the same first"
	case v.Height != w.Height:
		return "is not as high as wall " + v.ID + "; make them the same first"
	case v.Justify != side && v.Thickness > 0 && !line:
		return "has its body on another side of its line than wall " + v.ID + "; make them the same first"
	}
	return ""
}

// join adds a wall at the end that it meets.
func (j *joiner) join(w Wall) {
	about := j.about(w)
	if about {
		j.openings = j.openings.changed(func(o *Opening) bool { return o.Wall == w.ID }, func(o *Opening) { o.turnAbout(&w) })
		w = w.backwards()
	}
	front, back := j.wall.Line, w.Line
	atEnd := front.At(front.Len()-1) == back.At(0)
	if !atEnd {
		front, back = back, front
	}
	joint := front.Len() - 1
	pts := append(front.Points(), back.pts[1:]...)
	ours := func(o *Opening) bool { return o.Wall == w.ID || o.Wall == j.wall.ID }
	j.openings = j.openings.changed(ours, func(o *Opening) {
		if (o.Wall == w.ID) == atEnd {
			o.Segment += joint
		}
		o.Wall = j.wall.ID
	})
	j.wall.Line = Chain{pts}
	j.straighten(joint)
}

// straighten drops the corner at the joint when the line goes on straight there.
func (j *joiner) straighten(joint int) {
	a, q, b := j.wall.Line.At(joint-1), j.wall.Line.At(joint), j.wall.Line.At(joint+1)
	if !OnPiece(a, b, q) || a == b {
		return
	}
	j.wall.Line = Chain{slices.Delete(j.wall.Line.Points(), joint, joint+1)}
	beyond := func(o *Opening) bool { return o.Wall == j.wall.ID && o.Segment >= joint }
	j.openings = j.openings.changed(beyond, func(o *Opening) {
		o.Segment--
		if o.Segment == joint-1 {
			o.shifted(&j.wall, exact.Dist(a, q))
		}
	})
}
