package exact

import "math"

// Limit bounds every coordinate: |x|, |y| < Limit. Differences are then below 2^30, cross and dot products below 2^61.
const Limit = 1 << 29

// PerMM is the number of grid units in a millimetre.
const PerMM = 10

// Pt is a point on the grid, in units of 0.1 mm.
type Pt struct{ X, Y int32 }

// Sub returns the vector from b to a. Its components stay below 2^30 in absolute value for legal points.
func (a Pt) Sub(b Pt) Vec { return Vec{a.X - b.X, a.Y - b.Y} }

// Add returns the point reached from a by v. The caller keeps the result legal.
func (a Pt) Add(v Vec) Pt { return Pt{a.X + v.X, a.Y + v.Y} }

// Legal reports whether a lies within the coordinate limit.
func (a Pt) Legal() bool {
	return a.X > -Limit && a.X < Limit && a.Y > -Limit && a.Y < Limit
}

// Less orders points by x, then by y.
func (a Pt) Less(b Pt) bool { return a.X < b.X || a.X == b.X && a.Y < b.Y }

// Compare orders points by x, then by y: negative, zero or positive.
func (a Pt) Compare(b Pt) int {
	switch {
	case a.Less(b):
		return -1
	case b.Less(a):
		return 1
	}
	return 0
}

// Vec is a difference of two grid points.
type Vec struct{ X, Y int32 }

// Cross returns the z component of v × w: positive when w lies to the left of v.
func (v Vec) Cross(w Vec) int64 { return int64(v.X)*int64(w.Y) - int64(v.Y)*int64(w.X) }

// Dot returns the scalar product of v and w.
func (v Vec) Dot(w Vec) int64 { return int64(v.X)*int64(w.X) + int64(v.Y)*int64(w.Y) }

// Len2 returns the squared length of v.
func (v Vec) Len2() int64 { return v.Dot(v) }

// Minus returns v - w. For offsets of legal points from one point it is the offset between two legal points.
func (v Vec) Minus(w Vec) Vec { return Vec{v.X - w.X, v.Y - w.Y} }

// Neg returns the opposite vector.
func (v Vec) Neg() Vec { return Vec{-v.X, -v.Y} }

// Left returns v turned by a quarter turn to the left.
func (v Vec) Left() Vec { return Vec{-v.Y, v.X} }

// Area2 returns twice the signed area of the triangle a, b, c: positive when c lies to the left of the line from a to b.
func Area2(a, b, c Pt) int64 {
	return int64(b.X-a.X)*int64(c.Y-a.Y) - int64(b.Y-a.Y)*int64(c.X-a.X)
}

// Orient returns the side of c with respect to the line from a to b: +1 left, 0 on it, -1 right.
// Orient(c, b, a) == -Orient(a, b, c).
func Orient(a, b, c Pt) int { return Sign(Area2(a, b, c)) }

// Sign returns -1, 0 or +1.
func Sign(v int64) int {
	switch {
	case v > 0:
		return 1
	case v < 0:
		return -1
	}
	return 0
}

// Dist2 returns the squared distance of a and b, exactly.
func Dist2(a, b Pt) int64 { return a.Sub(b).Len2() }

// Dist returns the distance of a and b in grid units; it only measures.
func Dist(a, b Pt) float64 {
	dx, dy := float64(a.X)-float64(b.X), float64(a.Y)-float64(b.Y)
	return math.Sqrt(dx*dx + dy*dy)
}

// OnSegment reports whether p lies on the closed segment ab.
func OnSegment(a, b, p Pt) bool {
	return Area2(a, b, p) == 0 && InBox(a, b, p)
}

// InBox reports whether p lies in the closed axis-parallel box spanned by a and b.
func InBox(a, b, p Pt) bool {
	return min(a.X, b.X) <= p.X && p.X <= max(a.X, b.X) && min(a.Y, b.Y) <= p.Y && p.Y <= max(a.Y, b.Y)
}
