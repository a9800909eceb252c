package walk

import (
	"math"

	"enfilade/solver/exact"
	"enfilade/solver/mesh"
)

// inc is the next corner counter-clockwise.
var inc = [3]int{1, 2, 0}

// begin puts the start down and sends cones out of every walkable triangle that holds it, on any side of a wall.
func (f *Finder) begin(start exact.Pt) error {
	f.nodes = append(f.nodes, node{at: start, sector: -1, parent: -1, others: -1})
	free := false
	f.eachCorner(start, func(t int32) {
		if f.m.Tris[t].Flags&mesh.FlagNoWalk == 0 {
			free = true
		}
	})
	if !free {
		return ErrInside
	}
	f.eachCorner(start, func(t int32) {
		if f.m.Tris[t].Flags&mesh.FlagNoWalk != 0 {
			return
		}
		for i := range 3 {
			tri := &f.m.Tris[t]
			r, l := tri.P[i].Sub(start), tri.P[inc[i]].Sub(start)
			if r.Cross(l) > 0 {
				f.leave(0, mesh.EdgeOf(t, i), r, l, 0)
			}
		}
	})
	return nil
}

// leave handles the first triangle of a cone, whose root is a point of that triangle: what of a goal it holds, the ends of
// the edge opposite, and the way on through that edge, e.
func (f *Finder) leave(n int32, e mesh.Edge, r, l exact.Vec, key float64) {
	t := &f.m.Tris[e.Tri()]
	f.meetGoals(n, e.Tri(), r, l, key)
	if f.field != nil {
		f.field.add(e.Tri(), n, r, l)
	}
	root := f.nodes[n].at
	if a := t.P[e.Corner()].Sub(root); r.Cross(a) == 0 {
		f.arrive(n, e, a)
	}
	if b := t.P[e.Next().Corner()].Sub(root); b.Cross(l) == 0 {
		f.arrive(n, e.Next(), b)
	}
	if t.StopsWalk(e.Corner()) {
		return
	}
	c := cone{key, n, mesh.None, r, l}
	if next := t.N[e.Corner()]; f.enters(next.Tri()) && f.goesOn(e.Tri(), e.Corner(), &c) {
		f.expand(c)
	}
}

// expand lets cone c enter its triangle, and those beyond for as long as it comes before all others.
func (f *Finder) expand(c cone) {
	for f.step(&c) {
	}
}

// step lets cone c enter its triangle. It reports true when c, or the part of it that c then is, is to be followed at once.
func (f *Finder) step(c *cone) bool {
	f.Expanded++
	now := c.in.Tri()
	t := &f.m.Tris[now]
	f.meetGoals(c.node, now, c.r, c.l, c.key)
	if f.field != nil {
		f.field.add(now, c.node, c.r, c.l)
	}
	// Seen from the root, the edge of entry runs from its end (right) to its corner (left); the apex lies behind.
	left := c.in.Corner()
	right := inc[left]
	apex := inc[right]
	v := t.P[apex].Sub(f.nodes[c.node].at)
	onRight, onLeft := c.r.Cross(v), v.Cross(c.l)
	if onRight >= 0 && onLeft >= 0 {
		f.arrive(c.node, mesh.EdgeOf(now, apex), v)
	}
	goesRight := onRight > 0 && !t.StopsWalk(right) && f.enters(t.N[right].Tri())
	goesLeft := onLeft > 0 && !t.StopsWalk(apex) && f.enters(t.N[apex].Tri())
	switch {
	case goesRight && goesLeft:
		return f.split(c, t, right, apex, v)
	case goesRight:
		if onLeft > 0 {
			c.l = v
		}
		return f.goesOn(now, right, c)
	case goesLeft:
		if onRight > 0 {
			c.r = v
		}
		return f.goesOn(now, apex, c)
	}
	return false
}

// split lets both parts of cone c leave triangle t: that on the right of direction v through one edge, that on the left through
// another. The one that comes first is c then.
func (f *Finder) split(c *cone, t *mesh.Tri, right, left int, v exact.Vec) bool {
	other := cone{c.key, c.node, t.N[left], v, c.l}
	c.in, c.l = t.N[right], v
	one, two := f.send(t, right, c), f.send(t, left, &other)
	if two && (!one || other.key < c.key) {
		*c, other = other, *c
		one, two = two, one
	}
	if two {
		f.queue.push(other)
	}
	return one && f.first(c)
}

// goesOn lets cone c leave triangle t through edge i, and reports whether it is to be followed at once: when no other comes
// before it, or when it goes over a neck and holds no part of a goal. Walks that are told apart at all are so before a neck.
func (f *Finder) goesOn(t int32, i int, c *cone) bool {
	tri := &f.m.Tris[t]
	c.in = tri.N[i]
	if next := c.in.Tri(); f.narrowed && f.necks.part[t] != f.necks.part[next] && f.heads[next] < 0 {
		return true
	}
	return f.send(tri, i, c) && f.first(c)
}

// first reports whether cone c comes before all others; if not, it is queued.
func (f *Finder) first(c *cone) bool {
	if f.queue.empty() || c.key <= f.queue.heap[0].key {
		return true
	}
	f.queue.push(*c)
	return false
}

// send makes cone c ready to leave triangle t through edge i: it sets its key. It reports false when the cone ends there: when
// corners already reached lead to all of the edge at least as shortly, or no goal can be reached in time.
func (f *Finder) send(t *mesh.Tri, i int, c *cone) bool {
	root := &f.nodes[c.node]
	k := inc[i]
	s := crossing(root.at, t.P[i], t.P[k], c.r, c.l)
	if s.dominated(root.g, f.reach[t.V[i]], f.reach[t.V[k]]) {
		return false
	}
	c.key = max(c.key, root.g+s.least()+f.left(t.P[i], t.P[k]))
	return c.key <= f.limit
}

// span is where a cone crosses an edge, measured along that from its right end.
type span struct {
	long float64 // of the edge
	r, l float64 // the sides of the cone
	foot float64 // where the edge's line is nearest to the root
	off  float64 // how far the root is off that line
}

// crossing returns where the cone from r to l of root crosses the edge from a to b; it only measures.
func crossing(root, a, b exact.Pt, r, l exact.Vec) span {
	e, p := b.Sub(a), root.Sub(a)
	long := math.Sqrt(float64(e.Len2()))
	s := span{long: long, foot: float64(p.Dot(e)) / long, off: float64(e.Cross(p)) / long}
	s.r = s.foot + s.off*(float64(r.Dot(e))/float64(r.Cross(e)))
	s.l = s.foot + s.off*(float64(l.Dot(e))/float64(l.Cross(e)))
	return s
}

// dist returns the distance of the root from place x.
func (s *span) dist(x float64) float64 { return math.Sqrt(s.off*s.off + (x-s.foot)*(x-s.foot)) }

// least returns the distance of the root from the nearest place of the span.
func (s *span) least() float64 {
	x := min(max(s.foot, s.r), s.l)
	if x == s.foot {
		return s.off
	}
	return s.dist(x)
}

// tieSlack is how much shorter, relatively, another way must be to stop a cone: four units in the last place and the error
// of the sums, so that equally long walks are all found and reported.
const tieSlack = 1 - 0x1p-46

// dominated reports whether walks over the ends of the edge, at distances a and b, are shorter than the cone's own, whose root is
// at distance g, to all of its span. Going from an end along the edge, the walk over that end grows as fast as any can; so if it
// is the shorter one at some place, it is so everywhere before. The place to ask is where both ends lead equally shortly.
func (s *span) dominated(g, a, b float64) bool {
	x := min(max((b-a+s.long)/2, s.r), s.l)
	return min(a+x, b+s.long-x) < (g+s.dist(x))*tieSlack
}

// arrive notes that node n reaches the starting corner of half-edge e, at offset v, and makes it a root when a walk may turn
// there.
func (f *Finder) arrive(n int32, e mesh.Edge, v exact.Vec) {
	g := f.nodes[n].g + math.Sqrt(float64(v.Len2()))
	if g > f.limit {
		return
	}
	t := &f.m.Tris[e.Tri()]
	i := e.Corner()
	if id := t.V[i]; f.m.OnePlace(id) {
		if g*tieSlack > f.reach[id] { // no shortest walk comes here by this way
			return
		}
		if g < f.reach[id] {
			if math.IsInf(f.reach[id], 1) {
				f.wiped = append(f.wiped, id)
			}
			f.reach[id] = g
		}
	}
	s := f.m.SectorAt(e)
	if s < 0 {
		return
	}
	left, ok := turns(f.m.Sector(s), v, t.V[inc[i]], t.V[inc[inc[i]]])
	if !ok {
		return
	}
	f.relax(node{at: t.P[i], sector: s, parent: n, g: g, toward: v, left: left, others: -1})
}

// turns reports whether a walk that arrives in direction d may turn in sector s, and to which side. The walk comes in
// through a triangle whose corners there, counter-clockwise after the point itself, are next and prev.
//
// A right turn goes around something on the right: turning counter-clockwise from the triangle, the sector's border comes
// before the direction d straight on; and turning clockwise, the other border comes only after d. A border that points
// straight back comes first on the side on which it bounds the triangle.
func turns(s *mesh.Sector, d exact.Vec, next, prev int32) (left, ok bool) {
	lo, hi := d.Cross(s.Lo), d.Cross(s.Hi)
	loBack, hiBack := lo == 0 && d.Dot(s.Lo) < 0, hi == 0 && d.Dot(s.Hi) < 0
	hiFirst := hi < 0 || hiBack && s.HiV == prev // the border on the right comes before d
	loFirst := lo > 0 || loBack && s.LoV == next // the border on the left comes before d
	if hiFirst && !loFirst && (lo < 0 || loBack) {
		return false, true
	}
	if loFirst && !hiFirst && (hi > 0 || hiBack) {
		return true, true
	}
	return false, false
}

// turn sends node n's cones into the floor that its corner hid: from the way straight on around the corner to the wall.
func (f *Finder) turn(n int32, key float64) {
	root := f.nodes[n]
	s := f.m.Sector(root.sector)
	r, l := s.Lo, root.toward
	if root.left {
		r, l = root.toward, s.Hi
	}
	for e := s.First; ; {
		t := &f.m.Tris[e.Tri()]
		i := e.Corner()
		a, b := t.P[inc[i]].Sub(root.at), t.P[inc[inc[i]]].Sub(root.at)
		if p, q, ok := within(a, b, r, l); ok {
			if f.enters(e.Tri()) {
				f.leave(n, e.Next(), p, q, key)
			} else if e != s.First && r.Cross(a) == 0 { // the neck to what is not entered is straight ahead
				f.arrive(n, e.Next(), a)
			} else if b.Cross(l) == 0 && !t.StopsWalk(e.Prev().Corner()) {
				f.arrive(n, e.Prev(), b)
			}
		}
		if t.StopsWalk(e.Prev().Corner()) {
			return
		}
		e = f.m.Twin(e.Prev())
	}
}

// within narrows the cone from a to b, less than half a turn, to the wedge from r to l, at most half a turn.
func within(a, b, r, l exact.Vec) (exact.Vec, exact.Vec, bool) {
	c, d := r.Cross(a), r.Cross(b)
	switch {
	case c <= 0 && d <= 0:
		return a, b, false
	case c < 0:
		a = r
	case d < 0:
		b = r.Neg()
	}
	c, d = a.Cross(l), b.Cross(l)
	switch {
	case c <= 0 && d <= 0:
		return a, b, false
	case c < 0:
		a = l.Neg()
	case d < 0:
		b = l
	}
	return a, b, a.Cross(b) > 0
}
