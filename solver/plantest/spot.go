package plantest

import (
	"math/big"

	"enfilade/solver/exact"
)

// Spot is a point of the plane with exact fractions as coordinates. Spots are never changed after they are made.
type Spot struct{ X, Y *big.Rat }

func spotOf(p exact.Pt) Spot {
	return Spot{big.NewRat(int64(p.X), 1), big.NewRat(int64(p.Y), 1)}
}

// SpotOf returns the grid point p as a spot.
func SpotOf(p exact.Pt) Spot { return spotOf(p) }

// Float returns the spot's coordinates rounded to float64, in grid units.
func (s Spot) Float() (x, y float64) {
	x, _ = s.X.Float64()
	y, _ = s.Y.Float64()
	return x, y
}

// Equal reports whether both spots are the same point.
func (s Spot) Equal(o Spot) bool { return s.X.Cmp(o.X) == 0 && s.Y.Cmp(o.Y) == 0 }

// toward returns the spot at share k of the way from s to o.
func (s Spot) toward(o Spot, k *big.Rat) Spot {
	mix := func(a, b *big.Rat) *big.Rat {
		d := new(big.Rat).Sub(b, a)
		return d.Add(a, d.Mul(d, k))
	}
	return Spot{mix(s.X, o.X), mix(s.Y, o.Y)}
}

// nearest returns the grid point whose pixel holds the spot: a pixel reaches half a unit to every side and owns its left
// and its lower border.
func (s Spot) nearest() exact.Pt { return pt(round(s.X), round(s.Y)) }

var half = big.NewRat(1, 2)

// round returns floor(v + 1/2).
func round(v *big.Rat) int32 {
	r := new(big.Rat).Add(v, half)
	// Div rounds towards minus infinity for a positive divisor.
	return int32(new(big.Int).Div(r.Num(), r.Denom()).Int64())
}

// area2 returns twice the signed area of the triangle a, b, c.
func area2(a, b, c Spot) *big.Rat {
	l := new(big.Rat).Mul(new(big.Rat).Sub(b.X, a.X), new(big.Rat).Sub(c.Y, a.Y))
	r := new(big.Rat).Mul(new(big.Rat).Sub(b.Y, a.Y), new(big.Rat).Sub(c.X, a.X))
	return l.Sub(l, r)
}
