package arrange

import (
	"math"

	"enfilade/solver/exact"
	"enfilade/solver/plan"
)

// MaxRadius is the widest body that can walk, in grid units: 2 m.
const MaxRadius = plan.MaxBodyRadius

// FineSides and CoarseSides are how many sides the polygon has that stands for a walker's disc: the fine one has corners on the
// axes, the coarse one sides across them, so that what runs along an axis is grown by the radius alone.
const (
	FineSides   = 32
	CoarseSides = 16
)

// largePlan is from how many corners on a plan's walkers have coarse polygons: the outlines grown from then on are most of the
// memory and time of its mesh.
const largePlan = 50_000

// Sides returns the number of sides of the polygon that stands for the disc of p's walker. O(walls and blocks).
func Sides(p *plan.Plan) int {
	corners := 2 * p.NumOpenings()
	for _, w := range p.Walls() {
		corners += w.Line.Len()
	}
	for _, b := range p.Blocks() {
		corners += b.Ring.Len()
	}
	if corners > largePlan {
		return CoarseSides
	}
	return FineSides
}

// spare is what a body's radius is grown by, in grid units, so that rounding a crossing to the grid never undercuts it.
const spare = 2

// Disc returns a polygon with grid corners around the origin that encloses the disc of the given radius and two units more,
// counter-clockwise, the same under quarter turns and mirroring. It has FineSides or CoarseSides sides. Excess is how far its
// farthest corner lies beyond the radius, in grid units.
func Disc(radius int32, sides int) (ring []exact.Vec, excess float64) {
	r := int64(radius) + spare
	for reach := float64(r) / math.Cos(math.Pi/float64(sides)); ; reach++ {
		ring = cornersAt(reach, sides)
		if encloses(ring, r) {
			break
		}
	}
	far := 0.0
	for _, v := range ring {
		far = max(far, math.Sqrt(float64(v.Len2())))
	}
	return ring, far - float64(radius)
}

// cornersAt returns a regular polygon's corners, rounded away from the centre.
func cornersAt(reach float64, sides int) []exact.Vec {
	quarter, first := sides/4, 0.0
	last := quarter // the corner that mirrors the first one
	if sides == CoarseSides {
		first, last = 0.5, quarter-1
	}
	ring := make([]exact.Vec, sides)
	for i := range quarter {
		k := min(i, last-i) // the second half of the quarter mirrors the first
		s, c := math.Sincos(2 * math.Pi * (float64(k) + first) / float64(sides))
		v := exact.Vec{X: int32(math.Ceil(reach * c)), Y: int32(math.Ceil(reach * s))}
		if k != i {
			v.X, v.Y = v.Y, v.X
		}
		for q := range 4 {
			ring[i+q*quarter] = v
			v = v.Left()
		}
	}
	return ring
}

// encloses reports whether every side of the ring lies at least r from the origin, exactly: for r up to MaxRadius and the
// spare, the cross product of two corners stays below 2^31 and its square below 2^62.
func encloses(ring []exact.Vec, r int64) bool {
	for i, a := range ring {
		b := ring[(i+1)%len(ring)]
		side := exact.Vec{X: b.X - a.X, Y: b.Y - a.Y}
		if c := a.Cross(b); c <= 0 || c*c < r*r*side.Len2() {
			return false
		}
	}
	return true
}
