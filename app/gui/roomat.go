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
		if z.Name == "" || !exact.InRing(z.Ring.Points(), q) {
			continue
		}
		size := ringArea(z.Ring)
		if name == "" || size < least || size == least && (z.Room || !room) {
			name, room, least = z.Name, z.Room, size
		}
	}
	return name
}
