package exact

import "math/bits"

// InCircle returns +1 when d lies inside the circle through the counter-clockwise triangle a, b, c, 0 on it, -1 outside.
//
// Seen from c and from d, the edge ab spans two angles, and they make more than half a turn together when d is inside. With
// cross and dot products in place of sines and cosines, the sine of their sum is, but for its sign, the in-circle determinant
// itself: an identity that holds for any four points. It takes two wide products where the determinant has three. The
// products stay below 2^122, as cross and dot products stay below 2^61.
func InCircle(a, b, c, d Pt) int {
	ca, cb, da, db := a.Sub(c), b.Sub(c), a.Sub(d), b.Sub(d)
	return Mul(ca.Cross(cb), da.Dot(db)).Add(Mul(db.Cross(da), ca.Dot(cb))).Neg().Sign()
}

// Inside reports whether d lies inside (+1), on (0) or outside (-1) the circle through a, b and c, where the edge from a to b
// has c strictly to its left and d strictly to its right: InCircle, some steps shorter.
func Inside(a, b, c, d Pt) int {
	ca, cb, da, db := a.Sub(c), b.Sub(c), a.Sub(d), b.Sub(d)
	hi1, lo1 := mulPositive(ca.Cross(cb), da.Dot(db))
	hi2, lo2 := mulPositive(db.Cross(da), ca.Dot(cb))
	lo, carry := bits.Add64(lo1, lo2, 0)
	hi := int64(hi1 + hi2 + carry)
	switch {
	case hi < 0:
		return 1
	case uint64(hi)|lo != 0:
		return -1
	}
	return 0
}

// mulPositive returns the two halves of p times v, in two's complement, for p > 0.
func mulPositive(p, v int64) (hi, lo uint64) {
	hi, lo = bits.Mul64(uint64(p), uint64(v))
	return hi - uint64(p&(v>>63)), lo // a negative v, taken for v + 2^64, makes 2^64 p too much
}
