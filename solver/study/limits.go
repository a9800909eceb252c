package study

import (
	"math"

	"enfilade/solver/exact"
	"enfilade/solver/plan"
	"enfilade/solver/sight"
)

// limitsOf returns from where a target may be seen at most, and what is wrong with that. Angle and distances are taken at the
// target's point, for a face at its middle: the angle off the normal of the face, or off that of a point which names one.
func (sc *scene) limitsOf(t plan.Target, at exact.Pt) (sight.Limits, string) {
	lim := sight.Limits{At: at}
	if heading, ok := normalOf(t); ok && t.MaxAngle != nil {
		c := sight.View(heading, 2**t.MaxAngle)
		if c.Right == c.Left {
			return lim, "may be seen at no angle at all; give it a largest viewing angle above 0"
		}
		lim.Sides, lim.Right, lim.Mid, lim.Left = true, c.Right, c.Mid, c.Left
	}
	if t.Near != nil && t.Far != nil && *t.Far <= *t.Near {
		return lim, "has its farthest distance no farther than its nearest; swap them, or leave one out"
	}
	if t.Near != nil && *t.Near > 0 {
		if !legalRange(at, *t.Near+exact.PerMM) {
			return lim, "has a nearest distance that leads beyond the legal 50 km; shorten it"
		}
		lim.Near = sight.NearPolygon(at, *t.Near)
	}
	if t.Far != nil && !sc.reachesAll(at, *t.Far) {
		if *t.Far < minRange || !legalRange(at, *t.Far) {
			return lim, "has a farthest distance below 2 mm or beyond the legal 50 km; change it, or leave it out for no limit"
		}
		lim.Far = sight.RangePolygon(at, *t.Far)
	}
	return lim, ""
}

// normalOf returns the direction in degrees that a target looks to.
func normalOf(t plan.Target) (float64, bool) {
	if c, ok := faceOf(t); ok {
		n := c.B.Sub(c.A).Left()
		return math.Atan2(float64(n.Y), float64(n.X)) * 180 / math.Pi, true
	}
	if t.Normal == nil {
		return 0, false
	}
	return *t.Normal, true
}

// clipOf returns how the region of a point target is clipped as it is found: by its angle.
func clipOf(lim *sight.Limits) sight.Clip {
	return sight.Clip{Sides: lim.Sides, Right: lim.Right, Mid: lim.Mid, Left: lim.Left}
}
