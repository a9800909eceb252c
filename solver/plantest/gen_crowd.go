package plantest

import (
	"math"

	"enfilade/solver/exact"
	"enfilade/solver/plan"
)

// Crowds are plans of any size that crowd many things into one place, by name: what grows with the square of something shows
// there.
var Crowds = []struct {
	Name string
	Make func(n int) *plan.Plan
}{{"row", Row}, {"slanting row", SlantingRow}, {"fan", Fan}, {"ring", Ring}, {"grid", Grid}}

// square puts a floor around what has been drawn, and marks along its edge.
func (m *maker) square(half int32) *plan.Plan {
	m.Floor = plan.ChainOf(pt(-half, -half), pt(half, -half), pt(half, half), pt(-half, half))
	m.putMarks(func() exact.Pt { return pt(m.Int32N(2*half)-half, half-m.between(0.1, 1)) })
	return plan.From(m.Parts)
}

// Row returns n walls along one line, each overlapping some of the next.
func Row(n int) *plan.Plan {
	m := newMaker(1, 20)
	half := int32(n) * metre / 20
	for i := range int32(n) {
		x := i*metre/10 - half
		m.wall(plan.Solid, 0, plan.Ceiling, pt(x, 0), pt(x+m.between(0.15, 0.4), 0))
	}
	return m.square(half + 5*metre)
}

// SlantingRow returns a row of n walls whose corners come to lie within a grid unit of one slanting line, not on it.
func SlantingRow(n int) *plan.Plan {
	m := newMaker(1, 24)
	half := int32(n) * metre / 20
	for i := range int32(n) {
		x := i*metre/10 - half
		far := x + m.between(0.15, 0.4)
		m.wall(plan.Solid, 0, plan.Ceiling, pt(x, x/7), pt(far, far/7))
	}
	return m.square(half + 5*metre)
}

// Fan returns n walls of 20 to 400 m that start at one point.
func Fan(n int) *plan.Plan {
	m := newMaker(1, 21)
	for i := range n {
		m.wall(plan.Solid, 0, plan.Ceiling, pt(0, 0), around(float64(i)/float64(n), float64(m.between(20, 400))))
	}
	return m.square(405 * metre)
}

// Ring returns one block with n sides, all but round.
func Ring(n int) *plan.Plan {
	m := newMaker(1, 22)
	reach := float64(n) * metre / 50
	ring := make([]exact.Pt, n)
	for i := range ring {
		ring[i] = around(float64(i)/float64(n), reach)
	}
	m.block(plan.Ceiling, ring...)
	return m.square(int32(reach) + 5*metre)
}

// Grid returns about n walls, half of them along and half across, each of which crosses all those of the other half.
func Grid(n int) *plan.Plan {
	m := newMaker(1, 23)
	half := int32(n) * metre / 4
	for i := range int32(n / 2) {
		at := i*metre - half
		m.wall(plan.Solid, 0, plan.Ceiling, pt(at, -half-metre), pt(at, half+metre))
		m.wall(plan.Solid, 0, plan.Ceiling, pt(-half-metre, at), pt(half+metre, at))
	}
	return m.square(half + 5*metre)
}

// around returns the place at a share of a full turn and a distance from the origin.
func around(share, far float64) exact.Pt {
	sin, cos := math.Sincos(2 * math.Pi * share)
	return pt(int32(math.Round(far*cos)), int32(math.Round(far*sin)))
}
