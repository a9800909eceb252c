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
	if !t.StopsWalk(e.Corner()) {
		f.send(n, t.N[e.Corner()], r, l, key)
	}
}

// expand lets cone c enter its triangle.
func (f *Finder) expand(c cone) {
	f.Expanded++
	t := &f.m.Tris[c.in.Tri()]
	f.meetGoals(c.node, c.in.Tri(), c.r, c.l, c.key)
	if f.field != nil {
		f.field.add(c.in.Tri(), c.node, c.r, c.l)
	}
	// Seen from the root, the edge of entry runs from its end (right) to its corner (left); the apex lies behind.
	left := c.in.Corner()
	right := inc[left]
	apex := inc[right]
	first := c.in - mesh.Edge(left)
	v := t.P[apex].Sub(f.nodes[c.node].at)
	onRight, onLeft := c.r.Cross(v), v.Cross(c.l)
	if onRight >= 0 && onLeft >= 0 {
		f.arrive(c.node, first+mesh.Edge(apex), v)
	}
	if onRight > 0 && !t.StopsWalk(right) {
		l := c.l
		if onLeft > 0 {
			l = v
		}
		f.send(c.node, t.N[right], c.r, l, c.key)
	}
	if onLeft > 0 && !t.StopsWalk(apex) {
		r := c.r
		if onRight > 0 {
			r = v
		}
		f.send(c.node, t.N[apex], r, c.l, c.key)
	}
}

// send queues the cone from r to l of node n that is about to enter a triangle through in, unless a corner already reached
// leads to all of the edge at least as shortly, or nothing that counts lies beyond.
func (f *Finder) send(n int32, in mesh.Edge, r, l exact.Vec, key float64) {
	if !f.enters(in.Tri()) {
		return
	}
	t := &f.m.Tris[in.Tri()]
	i := in.Corner()
	root := &f.nodes[n]
	b, a := t.P[i], t.P[inc[i]] // left and right end of the edge as seen from the root
	edge := exact.Line{At: a, Dir: b.Sub(a)}
	dr, dl := reach(root.at, r, edge), reach(root.at, l, edge)
	normal := edge.Dir.Left().Neg() // away from the root
	low := min(dr, dl)
	if r.Cross(normal) >= 0 && normal.Cross(l) >= 0 {
		low = float64(exact.Area2(a, b, root.at)) / math.Sqrt(float64(edge.Dir.Len2()))
	}
	if f.dominated(t.V[inc[i]], a, root, l, edge, dl) || f.dominated(t.V[i], b, root, r, edge, dr) {
		return
	}
	if key = max(key, root.g+low+f.left(a, b)); key <= f.limit {
		f.queue.push(cone{key, n, in, r, l})
	}
}

// reach returns the distance from root to line e along direction d; it only measures.
func reach(root exact.Pt, d exact.Vec, e exact.Line) float64 {
	num, den := exact.Line{At: root, Dir: d}.Meet(e)
	return float64(num) / float64(den) * math.Sqrt(float64(d.Len2()))
}

// tieSlack is how much shorter, relatively, another way must be to stop a cone: four units in the last place and the error
// of the sums, so that equally long walks are all found and reported.
const tieSlack = 1 - 0x1p-46

// dominated reports whether a walk over corner v, one end of the edge, is shorter than the cone's own to all of its stretch
// of the edge. Going from v along the edge, the walk over v grows as fast as any can; so if it is the shorter one at the
// stretch's far end, in direction d at distance dist from the root, it is so everywhere before.
func (f *Finder) dominated(v int32, at exact.Pt, root *node, d exact.Vec, e exact.Line, dist float64) bool {
	g := f.reach[v]
	if g >= root.g+dist {
		return false
	}
	len2 := math.Sqrt(float64(d.Len2()))
	x := float64(root.at.X-at.X) + float64(d.X)*(dist/len2)
	y := float64(root.at.Y-at.Y) + float64(d.Y)*(dist/len2)
	return g+math.Hypot(x, y) < (root.g+dist)*tieSlack
}

// arrive notes that node n reaches the starting corner of half-edge e, at offset v, and makes it a root when a walk may turn
// there.
func (f *Finder) arrive(n int32, e mesh.Edge, v exact.Vec) {
	g := f.nodes[n].g + math.Sqrt(float64(v.Len2()))
	t := &f.m.Tris[e.Tri()]
	i := e.Corner()
	if g+f.left(t.P[i], t.P[i]) > f.limit {
		return
	}
	if id := t.V[i]; f.m.OnePlace(id) && g < f.reach[id] {
		if math.IsInf(f.reach[id], 1) {
			f.wiped = append(f.wiped, id)
		}
		f.reach[id] = g
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
