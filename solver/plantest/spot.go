package plantest

import (
	"math"
	"math/big"

	"enfilade/solver/exact"
)

// Spot is a point of the plane in exact fractions: (X/W, Y/W) with W > 0. Spots are never changed after they are made.
type Spot struct {
	X, Y, W *big.Int
	grid    bool // the spot is the grid point at
	at      exact.Pt
}

// SpotOf returns the grid point p as a spot.
func SpotOf(p exact.Pt) Spot {
	return Spot{big.NewInt(int64(p.X)), big.NewInt(int64(p.Y)), big.NewInt(1), true, p}
}

// spotAt returns the spot from + k d, the fraction brought to its lowest terms.
func spotAt(from exact.Pt, d exact.Vec, k *big.Rat) Spot {
	w := k.Denom()
	along := func(c, d int32) *big.Int {
		v := new(big.Int).Mul(big.NewInt(int64(c)), w)
		return v.Add(v, new(big.Int).Mul(big.NewInt(int64(d)), k.Num()))
	}
	return lowest(along(from.X, d.X), along(from.Y, d.Y), new(big.Int).Set(w))
}

// toward returns the spot at share k of the way from s to o.
func (s Spot) toward(o Spot, k *big.Rat) Spot {
	// s + k (o - s) over the common denominator s.W o.W k.W.
	w := new(big.Int).Mul(s.W, o.W)
	mix := func(a, b *big.Int) *big.Int {
		from := new(big.Int).Mul(a, o.W)
		step := new(big.Int).Sub(new(big.Int).Mul(b, s.W), from)
		return from.Add(from.Mul(from, k.Denom()), step.Mul(step, k.Num()))
	}
	return lowest(mix(s.X, o.X), mix(s.Y, o.Y), w.Mul(w, k.Denom()))
}

// lowest returns the spot (x/w, y/w), w > 0, with the common factor taken out.
func lowest(x, y, w *big.Int) Spot {
	g := new(big.Int).GCD(nil, nil, new(big.Int).Abs(x), new(big.Int).Abs(y))
	g.GCD(nil, nil, g, w)
	x.Quo(x, g)
	y.Quo(y, g)
	w.Quo(w, g)
	if w.IsInt64() && w.Int64() == 1 {
		return SpotOf(pt(int32(x.Int64()), int32(y.Int64())))
	}
	return Spot{X: x, Y: y, W: w}
}

// Float returns the spot's coordinates rounded to float64, in grid units.
func (s Spot) Float() (x, y float64) {
	x, _ = new(big.Rat).SetFrac(s.X, s.W).Float64()
	y, _ = new(big.Rat).SetFrac(s.Y, s.W).Float64()
	return x, y
}

// Equal reports whether both spots are the same point.
func (s Spot) Equal(o Spot) bool {
	if s.grid && o.grid {
		return s.at == o.at
	}
	return s.W.Cmp(o.W) == 0 && s.X.Cmp(o.X) == 0 && s.Y.Cmp(o.Y) == 0
}

// arrow returns the direction from s to o, lengthened to whole numbers.
func (s Spot) arrow(o Spot) arrow {
	part := func(a, b *big.Int) *big.Int {
		v := new(big.Int).Mul(b, s.W)
		return v.Sub(v, new(big.Int).Mul(a, o.W))
	}
	return arrow{part(s.X, o.X), part(s.Y, o.Y)}
}

// dist returns the distance of two spots in grid units: the root of the exact square.
func dist(s, o Spot) float64 {
	if s.grid && o.grid {
		return exact.Dist(s.at, o.at)
	}
	d, w := s.arrow(o), new(big.Int).Mul(s.W, o.W)
	square, _ := new(big.Rat).SetFrac(d.dot(d), w.Mul(w, w)).Float64()
	return math.Sqrt(square)
}

// nearest returns the grid point whose pixel holds the spot: a pixel reaches half a unit to every side and owns its left
// and its lower border.
func (s Spot) nearest() exact.Pt { return pt(round(s.X, s.W), round(s.Y, s.W)) }

// round returns floor(v/w + 1/2) for w > 0; Div rounds towards minus infinity for a positive divisor.
func round(v, w *big.Int) int32 {
	twice := new(big.Int).Lsh(v, 1)
	twice.Add(twice, w)
	return int32(twice.Div(twice, new(big.Int).Lsh(w, 1)).Int64())
}

// side returns the side of c with respect to the line from a to b: +1 left, 0 on it, -1 right.
func side(a, b, c Spot) int {
	if a.grid && b.grid && c.grid {
		return exact.Orient(a.at, b.at, c.at)
	}
	return a.arrow(b).cross(a.arrow(c)).Sign()
}

// inBox reports whether p lies in the closed box spanned by a and b.
func inBox(a, b, p Spot) bool {
	between := func(a, aw, b, bw, p, pw *big.Int) bool {
		sign := func(u, uw *big.Int) int { // of p - u
			return new(big.Int).Mul(p, uw).Cmp(new(big.Int).Mul(u, pw))
		}
		return sign(a, aw)*sign(b, bw) <= 0
	}
	if a.grid && b.grid && p.grid {
		return exact.InBox(a.at, b.at, p.at)
	}
	return between(a.X, a.W, b.X, b.W, p.X, p.W) && between(a.Y, a.W, b.Y, b.W, p.Y, p.W)
}

// onSegment reports whether p lies on the closed segment ab.
func onSegment(a, b, p Spot) bool { return inBox(a, b, p) && side(a, b, p) == 0 }

// arrow is a direction: a vector of whole numbers of any size, not zero.
type arrow struct{ X, Y *big.Int }

func arrowOf(v exact.Vec) arrow { return arrow{big.NewInt(int64(v.X)), big.NewInt(int64(v.Y))} }

func (a arrow) cross(b arrow) *big.Int {
	v := new(big.Int).Mul(a.X, b.Y)
	return v.Sub(v, new(big.Int).Mul(a.Y, b.X))
}

func (a arrow) dot(b arrow) *big.Int {
	v := new(big.Int).Mul(a.X, b.X)
	return v.Add(v, new(big.Int).Mul(a.Y, b.Y))
}

func (a arrow) back() arrow { return arrow{new(big.Int).Neg(a.X), new(big.Int).Neg(a.Y)} }

// turn sorts directions by the angle from a counter-clockwise: 0 along a, 1 to its left, 2 against it, 3 to its right.
func (a arrow) turn(b arrow) int {
	switch a.cross(b).Sign() {
	case 1:
		return 1
	case -1:
		return 3
	}
	if a.dot(b).Sign() > 0 {
		return 0
	}
	return 2
}

// before reports whether, turning counter-clockwise from a, b comes before c; b along a comes first of all.
func (a arrow) before(b, c arrow) bool {
	tb, tc := a.turn(b), a.turn(c)
	if tb != tc {
		return tb < tc
	}
	return tb%2 == 1 && b.cross(c).Sign() > 0
}

// same reports whether both point the same way.
func (a arrow) same(b arrow) bool { return a.turn(b) == 0 }
