package arrange

import (
	"math"

	"enfilade/solver/exact"
	"enfilade/solver/plan"
)

// MaxRadius is the widest body that can walk, in grid units: 2 m.
const MaxRadius = plan.MaxBodyRadius

// discSides is the number of sides of the polygon that stands for a walker's disc.
const discSides = 32

// spare is what a body's radius is grown by, in grid units, so that rounding a crossing to the grid never undercuts it.
const spare = 2

// Disc returns a polygon with grid corners around the origin that encloses the disc of the given radius and two units more,
// counter-clockwise, the same under quarter turns and mirroring. Excess is how far its farthest corner lies beyond the
// radius, in grid units.
func Disc(radius int32) (ring []exact.Vec, excess float64) {
	r := int64(radius) + spare
	for reach := float64(r) / math.Cos(math.Pi/discSides); ; reach++ {
		ring = cornersAt(reach)
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
func cornersAt(reach float64) []exact.Vec {
	const quarter = discSides / 4
	ring := make([]exact.Vec, discSides)
	for i := range quarter {
		k := min(i, quarter-i) // the second half of the quarter mirrors the first
		s, c := math.Sincos(2 * math.Pi * float64(k) / discSides)
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
