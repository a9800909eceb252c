package plan

import (
	"math"

	"enfilade/solver/exact"
)

// CircleRing returns a counter-clockwise ring of n corners on a circle, the first to the right of the centre, each rounded to
// the grid. n is a multiple of four, so that the ring carries over exactly under quarter turns about its centre.
func CircleRing(at exact.Pt, radius int32, n int) Chain {
	if n <= 0 || n%4 != 0 {
		panic("plan: the corners of a circle's ring come in fours")
	}
	pts := make([]exact.Pt, n)
	for i := range n / 4 {
		sin, cos := math.Sincos(2 * math.Pi * float64(i) / float64(n))
		v := exact.Vec{X: int32(math.Round(float64(radius) * cos)), Y: int32(math.Round(float64(radius) * sin))}
		for quarter := range 4 {
			pts[i+quarter*n/4] = at.Add(v)
			v = v.Left()
		}
	}
	return Chain{pts}
}

// RoundRing returns a ring of as few corners as keep it within 1 mm of a circle. Between two corners the ring lies inside the
// circle by radius times 1 - cos(half the angle between them); the corners themselves are off by the rounding to the grid.
func RoundRing(at exact.Pt, radius int32) Chain {
	const least, within = 12, 1*exact.PerMM - 0.75
	n := least
	for float64(radius)*(1-math.Cos(math.Pi/float64(n))) > within {
		n += 4
	}
	return CircleRing(at, radius, n)
}
