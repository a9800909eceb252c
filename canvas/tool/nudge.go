package tool

import (
	"math"

	"enfilade/solver/exact"
	"enfilade/solver/plan"
)

// nudge is the step of an arrow key: 0.1 m, with Shift 1 m, with Ctrl 1 cm.
func nudge(k Key) exact.Vec {
	step := int32(1000)
	switch {
	case k.Shift:
		step = 10000
	case k.Ctrl:
		step = 100
	}
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
	return each(p, sel, "move opening", func(o plan.Opening) plan.Edit {
		w, ok := p.Wall(o.Wall)
		if !ok || o.Segment < 0 || o.Segment+1 >= w.Line.Len() {
			return nil
		}
		a, b := w.Line.At(o.Segment), w.Line.At(o.Segment+1)
		step := max(abs(by.X), abs(by.Y))
		if b.Sub(a).Dot(by) < 0 {
			step = -step
		}
		at := max(0, min(o.At+step, int32(math.Floor(exact.Dist(a, b)))-o.Width))
		if at == o.At || b.Sub(a).Dot(by) == 0 {
			return nil
		}
		o.At = at
		return plan.SetOpening{Opening: o}
	})
}

// each returns the edits of all selected openings that are not locked as one, nil when there are none.
func each(p *plan.Plan, sel []plan.Ref, label string, edit func(plan.Opening) plan.Edit) plan.Edit {
	var all []plan.Edit
	for _, r := range sel {
		o, ok := p.Opening(r.ID)
		if r.Kind != plan.KindOpening || !ok || o.Locked {
			continue
		}
		if e := edit(o); e != nil {
			all = append(all, e)
		}
	}
	return stepsOf(label, all)
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
	if e := each(p, sel, label, func(o plan.Opening) plan.Edit {
		old := o
		text, _ := hang(&o, r)
		if o == old {
			return nil
		}
		label = text
		return plan.SetOpening{Opening: o}
	}); e != nil {
		return Named(label, e)
	}
	if r != 'j' && r != 'J' {
		return nil
	}
	var all []plan.Edit
	text := "move body of wall"
	for _, q := range sel {
		if e := TurnRound(p, q); e != nil {
			all = append(all, e)
			text = e.Label()
		}
		if w, ok := p.Wall(q.ID); ok && q.Kind == plan.KindWall && !w.Locked {
			w.Justify = (w.Justify + 1) % 3
			all = append(all, plan.SetWall{Wall: w})
		}
	}
	return stepsOf(text, all)
}
