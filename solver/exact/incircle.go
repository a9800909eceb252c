package exact

import "math"

// inCircleBound times the permanent of the in-circle determinant bounds the rounding error of its float64 evaluation when
// the coordinate differences are exact, as they are here: (10 + 96 u) u with u = 2^-53.
// Source: Shewchuk, "Adaptive precision floating-point arithmetic and fast robust geometric predicates", DCG 18, 1997,
// section 4.2, bound A of the in-circle test.
const inCircleBound = (10 + 96*0x1p-53) * 0x1p-53

// InCircle returns +1 when d lies inside the circle through the counter-clockwise triangle a, b, c, 0 on it, -1 outside.
// A float64 filter decides nearly always; where it cannot, 128-bit integers do (differences below 2^30, so the lifted
// coordinates and the cross products stay below 2^61 and the determinant below 2^124).
func InCircle(a, b, c, d Pt) int {
	ax, ay := float64(a.X-d.X), float64(a.Y-d.Y)
	bx, by := float64(b.X-d.X), float64(b.Y-d.Y)
	cx, cy := float64(c.X-d.X), float64(c.Y-d.Y)
	bc1, bc2 := bx*cy, by*cx
	ca1, ca2 := cx*ay, cy*ax
	ab1, ab2 := ax*by, ay*bx
	al, bl, cl := ax*ax+ay*ay, bx*bx+by*by, cx*cx+cy*cy
	det := al*(bc1-bc2) + bl*(ca1-ca2) + cl*(ab1-ab2)
	bound := inCircleBound * (al*(math.Abs(bc1)+math.Abs(bc2)) + bl*(math.Abs(ca1)+math.Abs(ca2)) + cl*(math.Abs(ab1)+math.Abs(ab2)))
	switch {
	case det > bound:
		return 1
	case -det > bound:
		return -1
	}
	return inCircleExact(a, b, c, d)
}

func inCircleExact(a, b, c, d Pt) int {
	u, v, w := a.Sub(d), b.Sub(d), c.Sub(d)
	sum := Mul(u.Len2(), v.Cross(w)).Add(Mul(v.Len2(), w.Cross(u))).Add(Mul(w.Len2(), u.Cross(v)))
	return sum.Sign()
}
