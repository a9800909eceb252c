package walk

import (
	"math"

	"enfilade/solver/exact"
)

// Tris returns the triangles of the floor that hold the nearest and the farthest place.
func (s Span) Tris() (near, far int32) { return s.nearTri, s.farTri }

// AtWithin returns the distance of a point of triangle t for someone who is in that triangle.
func (d *Field) AtWithin(t int32, p exact.Pt) float64 {
	least := math.Inf(1)
	for _, k := range d.of(t) {
		from := &d.roots[k.root]
		if v := p.Sub(from.at); k.r.Cross(v) >= 0 && v.Cross(k.l) >= 0 {
			least = min(least, from.g+exact.Dist(p, from.at))
		}
	}
	return least
}
