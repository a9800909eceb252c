package walk

import (
	"enfilade/solver/exact"
	"enfilade/solver/mesh"
	"enfilade/solver/sight"
)

// nearestOf returns the point nearest to root, as an offset from it, of the part of piece p of triangle t between the directions
// r and l from root. It reports false when that part has no inside.
func (c *clipper) nearestOf(t *mesh.Tri, root exact.Pt, r, l exact.Vec, p *sight.Piece) ([2]float64, bool) {
	c.Start(t)
	if !c.CutCone(root, r, l) {
		return [2]float64{}, false
	}
	for _, line := range p.Lines[:p.N] {
		if !c.Cut(line) {
			return [2]float64{}, false
		}
	}
	spot := c.closest(root)
	x, y := spot.Offset(root)
	return [2]float64{x, y}, true
}
