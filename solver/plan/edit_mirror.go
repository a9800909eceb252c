package plan

import (
	"math"

	"enfilade/solver/exact"
)

// Mirror reflects items in the line through two points. Level, upright and diagonal lines are exact; in any other each point
// is rounded to the grid once. Doors swing to the other side, fronts and headings are reflected, and bodies beside their line
// change sides.
type Mirror struct {
	Items []Ref
	Line  [2]exact.Pt
	Copy  bool // leave the items where they are and reflect copies of theirs
}

// Label names the item when there is but one.
func (e Mirror) Label() string { return labelled("mirror", e.Items) }

// Apply reflects all items or none: a line without direction is an error, an item that is not in the plan or would leave the
// legal range, and an opening without its wall.
func (e Mirror) Apply(p *Plan) (*Plan, error) {
	if e.Line[0] == e.Line[1] {
		return nil, fault(KindPlan, "", "needs a line through two points that differ to mirror in")
	}
	if !InRange(e.Line[0]) || !InRange(e.Line[1]) {
		return nil, fault(KindPlan, "", outOfRange)
	}
	return e.motion().apply(p, e.Items, e.Copy)
}

func (e Mirror) motion() motion {
	at, d := e.Line[0], e.Line[1].Sub(e.Line[0])
	twice := math.Atan2(float64(d.Y), float64(d.X)) * 360 / math.Pi
	level, diagonal, len2 := sq(d.X)-sq(d.Y), 2*int64(d.X)*int64(d.Y), d.Len2()
	return motion{
		what: "mirrored", flips: true, whole: level == 0 || diagonal == 0,
		angle: func(deg float64) float64 { return fullTurn(twice - deg) },
		point: func(p exact.Pt) (exact.Pt, bool) {
			// v is at most 2^30, level and diagonal below 2^61: the sums stay below 2^93.
			v := p.Sub(at)
			x := nearest(exact.Mul(level, int64(v.X)).Add(exact.Mul(diagonal, int64(v.Y))), len2)
			y := nearest(exact.Mul(diagonal, int64(v.X)).Sub(exact.Mul(level, int64(v.Y))), len2)
			return gridPt(int64(at.X)+x, int64(at.Y)+y)
		},
	}
}

func sq(v int32) int64 { return int64(v) * int64(v) }

// nearest returns num/den rounded to the nearest integer, up on a tie; den is positive and below 2^62.
func nearest(num exact.Int128, den int64) int64 {
	return num.Add(num).Add(exact.Mul(den, 1)).FloorDiv(2 * den)
}
