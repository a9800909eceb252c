package gui

import (
	"math"

	"enfilade/solver/exact"
	"enfilade/solver/plan"
)

// rectangle is a ring of four corners with right angles between them, in any turn.
type rectangle struct {
	at     exact.Pt  // the lowest corner, of two the left one
	along  exact.Vec // from at to the next corner counter-clockwise: to the right, or up to the right
	across exact.Vec // from at to the corner before
}

// rectangleOf returns a ring as a rectangle, and reports whether it is one. The corners of one that was turned lie on the grid, so
// that its angles are as right as that allows.
func rectangleOf(ring plan.Chain) (r rectangle, ok bool) {
	if ring.Len() != 4 {
		return r, false
	}
	low := 0
	for i, p := range ring.All() {
		if q := ring.At(low); p.Y < q.Y || p.Y == q.Y && p.X < q.X {
			low = i
		}
	}
	corner := func(i int) exact.Pt { return ring.At((low + i) % 4) }
	a, b := corner(1), corner(3)
	r.at = corner(0)
	if exact.Area2(r.at, a, b) < 0 {
		a, b = b, a
	}
	r.along, r.across = a.Sub(r.at), b.Sub(r.at)
	off := corner(2).Sub(a)
	rounded := max(math.Abs(float64(off.X)-float64(r.across.X)), math.Abs(float64(off.Y)-float64(r.across.Y)))
	along, across := r.sides()
	const grid = 2 // a vector between two rounded corners is off by less than a diagonal of the grid, two by less than twice that
	square := math.Abs(float64(r.along.Dot(r.across))) <= grid*(along+across)
	return r, exact.Area2(r.at, a, b) > 0 && rounded <= grid && square
}

// sides returns the lengths of both sides, in grid units.
func (r rectangle) sides() (along, across float64) {
	return math.Sqrt(float64(r.along.Len2())), math.Sqrt(float64(r.across.Len2()))
}

// sized returns the ring of a rectangle with the same lowest corner and the same turn, but other sides, in grid units above 0. It
// reports false where that leaves the legal range.
func (r rectangle) sized(along, across int32) (plan.Chain, bool) {
	turn := r.along // the longer side knows the turn best
	if r.across.Len2() > turn.Len2() {
		turn = r.across.Left().Neg()
	}
	a, b := lengthened(turn, along), lengthened(turn.Left(), across)
	ring := make([]exact.Pt, 4)
	for i, v := range [4][2]float64{{}, a, {a[0] + b[0], a[1] + b[1]}, b} {
		var ok bool
		if ring[i], ok = onGrid(float64(r.at.X)+v[0], float64(r.at.Y)+v[1]); !ok {
			return plan.Chain{}, false
		}
	}
	return plan.ChainOf(ring...), true
}

// towards returns the point at the given distance, in grid units, from a in the direction of b, which is another point. It reports
// false where that leaves the legal range.
func towards(a, b exact.Pt, distance int32) (exact.Pt, bool) {
	v := lengthened(b.Sub(a), distance)
	return onGrid(float64(a.X)+v[0], float64(a.Y)+v[1])
}

// lengthened returns v, which is not zero, at another length, rounded to the grid.
func lengthened(v exact.Vec, length int32) [2]float64 {
	k := float64(length) / math.Sqrt(float64(v.Len2()))
	return [2]float64{math.Round(k * float64(v.X)), math.Round(k * float64(v.Y))}
}

// onGrid returns the grid point at x, y, and whether it lies in the legal range.
func onGrid(x, y float64) (exact.Pt, bool) {
	if max(math.Abs(x), math.Abs(y)) > float64(plan.MaxCoord) {
		return exact.Pt{}, false
	}
	return exact.Pt{X: int32(x), Y: int32(y)}, true
}
