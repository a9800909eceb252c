package plan

import (
	"cmp"
	"fmt"

	"enfilade/solver/exact"
)

// ray is a straight line through the plan, with one of its two directions: two pieces lie on one line if they have the same.
type ray struct {
	dx, dy int32 // without a common factor, dx > 0 or dx = 0 and dy > 0
	off    int64 // the cross product of the direction and any point of the line
}

// rayOf returns the line of a piece. Products stay below 2^60.
func rayOf(q *piece) ray {
	d := q.b.Sub(q.a)
	k := gcd(d.X, d.Y)
	if d.X < 0 || d.X == 0 && d.Y < 0 {
		k = -k
	}
	d = exact.Vec{X: d.X / k, Y: d.Y / k}
	return ray{d.X, d.Y, int64(d.X)*int64(q.a.Y) - int64(d.Y)*int64(q.a.X)}
}

// gcd returns the greatest common divisor of two numbers that are not both zero.
func gcd(a, b int32) int32 {
	for b != 0 {
		a, b = b, a%b
	}
	return max(a, -a)
}

// stretch is a piece of a wall on its line: from its first end in the order of points to its last.
type stretch struct {
	on       ray
	from, to exact.Pt
	piece    int32
}

func (a stretch) compare(b stretch) int {
	return cmp.Or(cmp.Compare(a.on.dx, b.on.dx), cmp.Compare(a.on.dy, b.on.dy), cmp.Compare(a.on.off, b.on.off),
		a.from.Compare(b.from), cmp.Compare(a.piece, b.piece))
}

// few is with how many walls before it on its line each wall is told at most. All pairs may be told of as many walls as one
// draws by mistake; of thousands they would be millions.
const few = 3

// doubles are the walls that lie on others for more than a point, each pair told once: along every line, each piece with those
// before it that reach beyond its beginning, but only the few of them that reach farthest. O(n log n).
func (s *survey) doubles() (out []Finding) {
	var list []stretch
	for i := range s.pieces {
		if s.stopped(i) {
			return nil
		}
		if q := &s.pieces[i]; q.wall >= 0 {
			t := stretch{rayOf(q), q.a, q.b, int32(i)}
			if t.to.Less(t.from) {
				t.from, t.to = t.to, t.from
			}
			list = append(list, t)
		}
	}
	sortAsking(s, list, stretch.compare)
	told := map[[2]int32]bool{}
	var open []stretch // of different walls
	for i, t := range list {
		if s.stopped(i * few) {
			break
		}
		if i > 0 && t.on != list[i-1].on {
			open = open[:0]
		}
		wall := s.pieces[t.piece].wall
		for _, o := range open {
			s.compared++
			other := s.pieces[o.piece].wall
			k := [2]int32{min(wall, other), max(wall, other)}
			if other != wall && t.from.Less(o.to) && !told[k] {
				told[k] = true
				first, second := min(o.piece, t.piece), max(o.piece, t.piece)
				out = append(out, s.double(k[0], k[1], between(&s.pieces[first], &s.pieces[second])))
			}
		}
		open = s.keepOpen(open, t)
	}
	return out
}

// keepOpen puts a stretch among the few that reach farthest, one for each wall.
func (s *survey) keepOpen(open []stretch, t stretch) []stretch {
	least := 0
	for i, o := range open {
		if s.pieces[o.piece].wall == s.pieces[t.piece].wall {
			if o.to.Less(t.to) {
				open[i] = t
			}
			return open
		}
		if o.to.Less(open[least].to) {
			least = i
		}
	}
	switch {
	case len(open) < few:
		return append(open, t)
	case open[least].to.Less(t.to):
		open[least] = t
	}
	return open
}

// between returns an end of one piece that lies on the other: a place on both.
func between(s, t *piece) exact.Pt {
	for _, q := range [4]exact.Pt{t.a, t.b, s.a, s.b} {
		if exact.OnSegment(s.a, s.b, q) && exact.OnSegment(t.a, t.b, q) {
			return q
		}
	}
	return s.a
}

// double tells of two walls; the later one may be deleted when it is nothing but the other again.
func (s *survey) double(first, second int32, at exact.Pt) Finding {
	v, w := s.plan.obstacles.walls.at(int(first)), s.plan.obstacles.walls.at(int(second))
	f := Finding{Problem: Problem{Kind: ProblemDouble, Items: []Ref{{KindWall, w.ID}, {KindWall, v.ID}}, At: at,
		Text: fmt.Sprintf("lies on wall %s for a part of its length; cut it back, or delete one of them", v.ID)}}
	if !v.Line.Equal(w.Line) && !v.Line.Equal(w.backwards().Line) {
		return f
	}
	f.Text = fmt.Sprintf("lies on wall %s, all along it; delete one of them", v.ID)
	gone := w
	if s.doored[w.ID] {
		gone = v
		f.Items[0], f.Items[1] = f.Items[1], f.Items[0]
		f.Text = fmt.Sprintf("lies on wall %s, all along it; delete one of them", w.ID)
	}
	if same := v.Kind == w.Kind && v.Thickness == w.Thickness && v.Height == w.Height; same && !s.doored[gone.ID] {
		f.Fix, f.Offer = named{Delete{[]Ref{{KindWall, gone.ID}}}, "delete doubled wall"}, "Delete it"
	}
	return f
}

// named is an edit under another label.
type named struct {
	Edit
	label string
}

// Label returns the other label.
func (n named) Label() string { return n.label }
