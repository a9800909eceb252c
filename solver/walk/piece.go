package walk

import (
	"enfilade/solver/exact"
	"enfilade/solver/mesh"
	"enfilade/solver/sight"
)

// nearestOf returns the point nearest to root, as an offset from it, of the part of piece p of triangle t between the directions
// r and l from root. It reports false when that part has no inside.
func (c *clipper) nearestOf(t *mesh.Tri, root exact.Pt, r, l exact.Vec, p *sight.Piece) ([2]float64, bool) {
	c.begin(t)
	c.addCone(root, r, l)
	c.line = append(c.line, p.Lines[:p.N]...)
	if !c.cutTriangle() {
		return [2]float64{}, false
	}
	spot := c.closest(root)
	x, y := spot.Offset(root)
	return [2]float64{x, y}, true
}
