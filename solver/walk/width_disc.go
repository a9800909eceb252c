package walk

import (
	"math/big"

	"enfilade/solver/exact"
)

// disc is the closed disc whose diameter runs from at to at + dir·num/den, num and den positive. For the foot of a
// perpendicular on an edge, dir is the edge's normal, num below 2^61 and den its squared length.
type disc struct {
	at       exact.Pt
	dir      exact.Vec
	num, den int64
}

// holds reports whether p lies in the disc: the diameter is seen from there at a right or an obtuse angle (Thales). The
// products stay below 2^123.
func (d *disc) holds(p exact.Pt) bool {
	v := p.Sub(d.at)
	return exact.Mul(v.Len2(), d.den).Sub(exact.Mul(d.num, v.Dot(d.dir))).Sign() <= 0
}

// meets reports whether the edge from p to q meets the disc, neither end of which the disc holds.
//
// The power of p + s(q-p) is a s² + b s + c, scaled by den; the disc is met when it has a root between 0 and 1. Its
// coefficients stay below 2^125, the discriminant below 2^251: a filter decides nearly always, large integers the rest.
func (d *disc) meets(p, q exact.Pt) bool {
	f, u := q.Sub(p), p.Sub(d.at)
	a := exact.Mul(f.Len2(), d.den)
	half := exact.Mul(u.Dot(f), d.den) // b = 2 half - skew
	skew := exact.Mul(f.Dot(d.dir), d.num)
	b := half.Add(half).Sub(skew)
	if b.Sign() >= 0 || b.Add(a).Add(a).Sign() <= 0 {
		return false // the power is least at an end
	}
	c := exact.Mul(u.Len2(), d.den).Sub(exact.Mul(d.num, u.Dot(d.dir)))
	// Filter: each coefficient is off by at most 2u of itself, the products by 6u, their difference by u of the larger.
	bb, ac := b.Float()*b.Float(), 4*a.Float()*c.Float()
	if slack := 0x1p-49 * (bb + ac); bb-ac > slack {
		return true
	} else if ac-bb > slack {
		return false
	}
	x, y := large(b), large(a)
	x.Mul(x, x)
	y.Mul(y, large(c)).Lsh(y, 2)
	return x.Cmp(y) >= 0
}

// large turns a into an integer of any size.
func large(a exact.Int128) *big.Int {
	v := big.NewInt(a.Hi)
	return v.Lsh(v, 64).Add(v, new(big.Int).SetUint64(a.Lo))
}
