package plan

import (
	"cmp"
	"fmt"
	"slices"

	"enfilade/solver/exact"
)

// Finding is a problem, with what would mend it.
type Finding struct {
	Problem
	Fix   Edit   // nil where no change is sure to be what is meant
	Offer string // what the fix does, for a button: "Close the gap"
}

// GapLimit is the widest gap between a wall's end and another thing that is told: 20 mm. Wider ones are meant.
const GapLimit int32 = 20 * exact.PerMM

// Inspect returns what looks wrong with a drawing by itself, without solving it: walls that nearly meet something, walls that
// lie on one another, and items outside the floor. They come in a fixed order.
//
// Cost: near-linear. Straight pieces are sorted into square cells about as wide as the pieces are long, and only pieces that
// share a cell are compared. stop, which may be nil, is asked now and then; when it says so, what was found so far is returned.
func Inspect(p *Plan, stop func() bool) []Finding {
	c := newCells(p)
	c.stop = stop
	out := append(c.gaps(), c.doubles()...)
	out = append(out, outsiders(p)...)
	slices.SortStableFunc(out, func(a, b Finding) int {
		return cmp.Or(cmp.Compare(a.Kind, b.Kind), a.At.Compare(b.At))
	})
	return out
}

// outsiders are the walls, blocks, zones and routes of which no point lies on the floor.
func outsiders(p *Plan) (out []Finding) {
	floor := p.obstacles.floor.pts
	if len(floor) < 3 {
		return nil
	}
	tell := func(kind Kind, id string, c Chain) {
		if len(c.pts) == 0 || slices.ContainsFunc(c.pts, func(q exact.Pt) bool { return onFloor(floor, q) }) {
			return
		}
		out = append(out, Finding{Problem: Problem{Kind: ProblemOutside, Items: []Ref{{kind, id}}, At: c.pts[0],
			Text: "lies outside the floor; move it inside, or draw the floor around it"}})
	}
	for _, w := range p.obstacles.walls.refs() {
		tell(KindWall, w.ID, w.Line)
	}
	for _, b := range p.obstacles.blocks.refs() {
		tell(KindBlock, b.ID, b.Ring)
	}
	for _, z := range p.marks.zones.refs() {
		tell(KindZone, z.ID, z.Ring)
	}
	for _, r := range p.marks.routes.refs() {
		tell(KindRoute, r.ID, r.Via)
	}
	return out
}

// onFloor reports whether q lies in the ring or on it, by the crossings of a ray to the right.
func onFloor(ring []exact.Pt, q exact.Pt) bool {
	in := false
	for i, a := range ring {
		b := ring[(i+1)%len(ring)]
		if exact.OnSegment(a, b, q) {
			return true
		}
		if (a.Y > q.Y) != (b.Y > q.Y) && (exact.Orient(a, b, q) > 0) == (b.Y > a.Y) {
			in = !in
		}
	}
	return in
}

// doubles are the walls that lie on others for more than a point, each pair told once.
func (c *cells) doubles() (out []Finding) {
	told := map[[2]int32]bool{}
	c.pairs(func(i, j int32) {
		s, t := &c.pieces[i], &c.pieces[j]
		if s.wall < 0 || t.wall < 0 || s.wall == t.wall || !overlap(s.a, s.b, t.a, t.b) {
			return
		}
		k := [2]int32{min(s.wall, t.wall), max(s.wall, t.wall)}
		if told[k] {
			return
		}
		told[k] = true
		out = append(out, c.double(k[0], k[1], between(s, t)))
	})
	return out
}

// overlap reports whether two segments share more than a point.
func overlap(a, b, c, d exact.Pt) bool {
	if a == b || c == d || exact.Area2(a, b, c) != 0 || exact.Area2(a, b, d) != 0 {
		return false
	}
	lo := func(p, q exact.Pt) exact.Pt {
		if q.Less(p) {
			return q
		}
		return p
	}
	hi := func(p, q exact.Pt) exact.Pt {
		if q.Less(p) {
			return p
		}
		return q
	}
	from, to := lo(a, b), hi(a, b)
	if l := lo(c, d); from.Less(l) {
		from = l
	}
	if h := hi(c, d); h.Less(to) {
		to = h
	}
	return from.Less(to)
}

// between returns the middle of an end of one piece that lies on the other and the piece's own middle: a place on both.
func between(s, t *piece) exact.Pt {
	for _, q := range [4]exact.Pt{t.a, t.b, s.a, s.b} {
		if exact.OnSegment(s.a, s.b, q) && exact.OnSegment(t.a, t.b, q) {
			return q
		}
	}
	return s.a
}

// double tells of two walls; the later one may be deleted when it is nothing but the other again.
func (c *cells) double(first, second int32, at exact.Pt) Finding {
	v, w := c.plan.obstacles.walls.at(int(first)), c.plan.obstacles.walls.at(int(second))
	f := Finding{Problem: Problem{Kind: ProblemDouble, Items: []Ref{{KindWall, w.ID}, {KindWall, v.ID}}, At: at,
		Text: fmt.Sprintf("lies on wall %s for a part of its length; cut it back, or delete one of them", v.ID)}}
	if !v.Line.Equal(w.Line) && !v.Line.Equal(w.backwards().Line) {
		return f
	}
	f.Text = fmt.Sprintf("lies on wall %s, all along it; delete one of them", v.ID)
	gone := w
	if c.doored[w.ID] {
		gone = v
		f.Items[0], f.Items[1] = f.Items[1], f.Items[0]
		f.Text = fmt.Sprintf("lies on wall %s, all along it; delete one of them", w.ID)
	}
	if same := v.Kind == w.Kind && v.Thickness == w.Thickness && v.Height == w.Height; same && !c.doored[gone.ID] {
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
