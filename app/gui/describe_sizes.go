package gui

import (
	"errors"
	"math"

	"enfilade/canvas/tool"
	"enfilade/solver/exact"
	"enfilade/solver/plan"
)

// errOffRange is what a form says of a measure that would lead beyond the legal range.
var errOffRange = errors.New("too far from the middle of the plan")

// straightFields are the length and the angle of a wall that is one straight piece. Its first end stays, and walls that meet at
// the other one go on meeting there.
func (w *window) straightFields(x plan.Wall) []field {
	if x.Line.Len() != 2 || x.Line.At(0) == x.Line.At(1) {
		return nil
	}
	a, b := x.Line.At(0), x.Line.At(1)
	long := exact.Dist(a, b)
	move := func(label string, to exact.Pt, ok bool) error {
		if !ok {
			return errOffRange
		}
		end := plan.Corner{Item: plan.Ref{Kind: plan.KindWall, ID: x.ID}, Index: 1}
		return w.doEdit(tool.Named(label, plan.MoveCorner{Corner: end, To: to, Along: true}))
	}
	deg := math.Mod(math.Atan2(float64(b.Y)-float64(a.Y), float64(b.X)-float64(a.X))*180/math.Pi+360, 360)
	return []field{
		w.lengthField("Length", int32(math.Round(long)), func(v int32) error {
			if v <= 0 {
				return errPositive
			}
			to, ok := towards(a, b, v)
			return move("change length", to, ok)
		}),
		angleField("Angle", deg, -360, 360, func(v float64) error {
			sin, cos := math.Sincos(v * math.Pi / 180)
			to, ok := onGrid(float64(a.X)+math.Round(long*cos), float64(a.Y)+math.Round(long*sin))
			return move("turn wall", to, ok)
		}),
	}
}

// sideFields are the sides of a ring that is a rectangle. Its lowest corner stays.
func (w *window) sideFields(ring plan.Chain, take func(plan.Chain) error) []field {
	r, ok := rectangleOf(ring)
	if !ok {
		return nil
	}
	l, d := r.sides()
	along, across := int32(math.Round(l)), int32(math.Round(d))
	side := func(label string, v int32, sized func(v int32) (plan.Chain, bool)) field {
		return w.lengthField(label, v, func(v int32) error {
			if v <= 0 {
				return errPositive
			}
			ring, ok := sized(v)
			if !ok {
				return errOffRange
			}
			return take(ring)
		})
	}
	return []field{
		side("Width", along, func(v int32) (plan.Chain, bool) { return r.sized(v, across) }),
		side("Depth", across, func(v int32) (plan.Chain, bool) { return r.sized(along, v) }),
	}
}
