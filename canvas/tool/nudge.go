package tool

import (
	"math"

	"enfilade/solver/exact"
	"enfilade/solver/plan"
)

// Nudges are the steps of an arrow key, in grid units: alone, with Shift, with Ctrl.
type Nudges struct{ Step, Far, Fine int32 }

// The steps where people measure in metres, 0.1 m, 1 m and 1 cm, and where in feet, 1 in, 1 ft and half an inch.
var (
	MetreNudges = Nudges{1000, 10000, 100}
	FeetNudges  = Nudges{254, 3048, 127}
)

// nudgesOf returns the steps for the plan's display unit.
func nudgesOf(h Host) Nudges {
	if h.Snapper().Feet {
		return FeetNudges
	}
	return MetreNudges
}

// nudgeWords says what the arrow keys do: "arrows nudge by 0.1 m".
func nudgeWords(h Host) string {
	if h.Snapper().Feet {
		return "arrows nudge by 1 in"
	}
	return "arrows nudge by 0.1 m"
}

// NudgeStep is how far an arrow key goes, in grid units.
func NudgeStep(h Host, k Key) int32 {
	n := nudgesOf(h)
	switch {
	case k.Shift:
		return n.Far
	case k.Ctrl:
		return n.Fine
	}
	return n.Step
}

// nudge is the step of an arrow key.
func nudge(h Host, k Key) exact.Vec {
	step := NudgeStep(h, k)
	switch k.Name {
	case KeyLeft:
		return exact.Vec{X: -step}
	case KeyRight:
		return exact.Vec{X: step}
	case KeyUp:
		return exact.Vec{Y: step}
	}
	return exact.Vec{Y: -step}
}

// nudgeEdit returns the edit that moves the selection a step; openings alone go along their walls. It is nil when nothing may
// move.
func nudgeEdit(p *plan.Plan, sel []plan.Ref, by exact.Vec) plan.Edit {
	if refs := movable(p, sel); len(refs) > 0 {
		return plan.MoveItems{Items: refs, By: by}
	}
	return each(p, sel, "move opening", func(o *plan.Opening) bool {
		w, ok := p.Wall(o.Wall)
		if !ok || o.Segment < 0 || o.Segment+1 >= w.Line.Len() {
			return false
		}
		a, b := w.Line.At(o.Segment), w.Line.At(o.Segment+1)
		step := max(abs(by.X), abs(by.Y))
		if b.Sub(a).Dot(by) < 0 {
			step = -step
		}
		at := max(0, min(o.At+step, int32(math.Floor(exact.Dist(a, b)))-o.Width))
		if at == o.At || b.Sub(a).Dot(by) == 0 {
			return false
		}
		o.At = at
		return true
	})
}

// each returns the edit that changes all selected openings that are not locked at once, nil when change changes none.
func each(p *plan.Plan, sel []plan.Ref, label string, change func(*plan.Opening) bool) plan.Edit {
	var all []plan.Opening
	for _, r := range sel {
		if r.Kind != plan.KindOpening {
			continue
		}
		if o, ok := p.Opening(r.ID); ok && !o.Locked && change(&o) {
			all = append(all, o)
		}
	}
	switch len(all) {
	case 0:
		return nil
	case 1:
		return plan.Steps{Text: label, Edits: []plan.Edit{plan.SetOpening{Opening: all[0]}}}
	}
	return plan.SetItems{Text: label, Openings: all}
}

func stepsOf(label string, all []plan.Edit) plan.Edit {
	if len(all) == 0 {
		return nil
	}
	return plan.Steps{Text: label, Edits: all}
}

// turnedOver returns the edit of a key that changes how the selected openings hang, or on which side of its line the body of
// the selected walls lies, or which way the selected targets look; nil when the key is none, or the selection holds no such item.
func turnedOver(p *plan.Plan, sel []plan.Ref, r rune) plan.Edit {
	label, ok := hang(&plan.Opening{Leaf: plan.SolidLeaf}, r)
	if !ok {
		return nil
	}
	if e := each(p, sel, label, func(o *plan.Opening) bool {
		old := *o
		text, _ := hang(o, r)
		if *o == old {
			return false
		}
		label = text
		return true
	}); e != nil {
		return Named(label, e)
	}
	if r != 'j' && r != 'J' {
		return nil
	}
	var all []plan.Edit
	var walls []plan.Wall
	text := "move body of wall"
	for _, q := range sel {
		if e := TurnRound(p, q); e != nil {
			all = append(all, e)
			text = e.Label()
		}
		if w, ok := p.Wall(q.ID); ok && q.Kind == plan.KindWall && !w.Locked {
			w.Justify = (w.Justify + 1) % 3
			walls = append(walls, w)
		}
	}
	if len(walls) > 0 {
		all = append(all, plan.SetItems{Walls: walls})
	}
	return stepsOf(text, all)
}
