package tool

import (
	"math"

	"enfilade/canvas/pick"
	"enfilade/solver/exact"
	"enfilade/solver/plan"
)

// hangs says on which face a click would put the mark, and how to come to the one behind it.
func (t *Mark) hangs() string {
	f := t.place.face
	what := "put the start at"
	if t.Kind == plan.KindTarget {
		what = "hang the target on"
	}
	side := faceName(f.Normal)
	switch {
	case f.Ref.Kind == plan.KindBlock:
		return "click to " + what + " the block's " + side + " face; J: the one behind"
	case f.Ref.Kind == plan.KindFloor:
		return "click to " + what + " the floor's edge, looking " + lookWords(f.Normal)
	case f.Middle && t.side == nil:
		return "the wall's middle: click to " + what + " its " + side + " face, J: its " + faceName(f.Normal+180)
	}
	return "click to " + what + " the wall's " + side + " face; J: its " + faceName(f.Normal+180)
}

// octant returns which of the eight directions one in degrees is nearest to, counter-clockwise from the right.
func octant(degrees float64) int { return (int(math.Round(degrees/45))%8 + 8) % 8 }

// faceName names a face by the direction it looks to, in degrees, as the picture shows it.
func faceName(degrees float64) string {
	return [8]string{"right", "upper right", "upper", "upper left", "left", "lower left", "lower", "lower right"}[octant(degrees)]
}

// lookWords says in words where a direction in degrees leads, as the picture shows it.
func lookWords(degrees float64) string {
	return [8]string{"right", "up and right", "up", "up and left", "left", "down and left", "down", "down and right"}[octant(degrees)]
}

// TurnRound returns the edit that hangs a target or a start on the other face of its wall, and where there is no such wall turns
// a target round on the spot; nil for what looks nowhere.
func TurnRound(p *plan.Plan, r plan.Ref) plan.Edit {
	switch r.Kind {
	case plan.KindTarget:
		if t, ok := p.Target(r.ID); ok && !t.Locked {
			return turnTarget(p, t)
		}
	case plan.KindStart:
		s, ok := p.Start(r.ID)
		if !ok || s.Locked || s.Facing == nil {
			return nil
		}
		if other, ok := across(p, s.At, *s.Facing); ok {
			s.At, s.Facing = other(s.At).At, ptr(other(s.At).Normal)
			return Named("move start to other face", plan.SetStart{Start: s})
		}
	}
	return nil
}

func turnTarget(p *plan.Plan, t plan.Target) plan.Edit {
	deg := 0.0
	switch {
	case t.Face != nil:
		deg = bearing(t.Face[0], t.Face[1]) + 90
	case t.Normal != nil:
		deg = *t.Normal
	default:
		return nil
	}
	other, hangs := across(p, pick.TargetAt(t), deg)
	switch {
	case t.Face != nil && hangs:
		face := [2]exact.Pt{other(t.Face[1]).At, other(t.Face[0]).At}
		t.Face, t.At = &face, along(face[0], face[1], 0.5)
	case t.Face != nil:
		t.Face = &[2]exact.Pt{t.Face[1], t.Face[0]}
	case hangs:
		f := other(t.At)
		t.At, t.Normal = f.At, &f.Normal
	default:
		t.Normal = ptr(math.Remainder(deg+180, 360))
	}
	if hangs {
		return Named("move target to other face", plan.SetTarget{Target: t})
	}
	return Named("turn target round", plan.SetTarget{Target: t})
}

// across returns what finds the places over against those on the face of a wall on which a thing at a place hangs.
func across(p *plan.Plan, at exact.Pt, normal float64) (func(exact.Pt) pick.Face, bool) {
	f, ok := pick.Hanging(p, at, normal)
	return func(q exact.Pt) pick.Face {
		other, _ := f.Across(q)
		return other
	}, ok
}

func ptr(v float64) *float64 { return &v }
