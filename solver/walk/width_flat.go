package walk

import "enfilade/solver/mesh"

// findFlat marks the flat corners: those at which a straight line that stops walking was cut in two, seen from a side on which
// nothing branches off.
//
// A gap needs a corner at one end that sticks out. Between two straight lines that face each other the floor is equally wide
// all along, and parts for no body in the middle of it: where the two end, one sticks out, or the way narrows further. So
// how lines are cut into edges does not matter, and a wall that was drawn in a thousand pieces has no more gaps than one that
// was drawn at once.
//
// Cost: O(n).
func (b *gapFinder) findFlat() {
	b.flat = make([]uint8, len(b.m.Tris))
	for t := range b.m.Tris {
		tri := &b.m.Tris[t]
		for i := range 3 {
			if tri.Flags&mesh.FlagNoWalk == 0 && tri.StopsWalk(i) {
				b.markIfFlat(mesh.EdgeOf(int32(t), i))
			}
		}
	}
}

// markIfFlat marks the corners at the start of edge e, which stops walking, to the left of it and on up to the next such edge,
// if that leads straight on.
func (b *gapFinder) markIfFlat(e mesh.Edge) {
	last := e
	for !b.stops(last.Prev()) {
		last = b.m.Twin(last.Prev())
	}
	p, q := b.m.Ends(e)
	o, _ := b.m.Ends(last.Prev())
	if x, y := q.Sub(p), p.Sub(o); x.Cross(y) != 0 || x.Dot(y) < 0 {
		return
	}
	for h := e; ; h = b.m.Twin(h.Prev()) {
		b.flat[h.Tri()] |= 1 << h.Corner()
		if h == last {
			return
		}
	}
}

// isFlat reports whether the start of edge e is flat within the edge's triangle.
func (b *gapFinder) isFlat(e mesh.Edge) bool { return b.flat[e.Tri()]>>e.Corner()&1 != 0 }

// stops reports whether edge e stops walking.
func (b *gapFinder) stops(e mesh.Edge) bool { return b.m.Tris[e.Tri()].StopsWalk(e.Corner()) }
