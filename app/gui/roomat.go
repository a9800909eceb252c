package gui

import (
	"enfilade/solver/exact"
	"enfilade/solver/plan"
)

// roomAt returns the name of the smallest zone that holds a point, its border included: a zone around everything does not
// hide the room that lies in it. Of zones of one size a room goes before an area, and a later one before an earlier.
func roomAt(p *plan.Plan, q exact.Pt) string {
	name, room, least := "", false, 0.0
	for _, z := range p.Zones() {
		if z.Name == "" || !inRing(z.Ring, q) {
			continue
		}
		size := ringArea(z.Ring)
		if name == "" || size < least || size == least && (z.Room || !room) {
			name, room, least = z.Name, z.Room, size
		}
	}
	return name
}

// inRing reports whether q lies in a ring or on it, by the parity of the edges to its right.
func inRing(ring plan.Chain, q exact.Pt) bool {
	in, n := false, ring.Len()
	for i := range n {
		a, b := ring.At(i), ring.At((i+1)%n)
		side := exact.Orient(a, b, q)
		if side == 0 && q.Sub(a).Dot(q.Sub(b)) <= 0 {
			return true
		}
		if (a.Y > q.Y) != (b.Y > q.Y) && (side > 0) == (b.Y > a.Y) {
			in = !in
		}
	}
	return in
}
