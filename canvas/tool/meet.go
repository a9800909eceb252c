package tool

import (
	"math"

	"enfilade/canvas/pick"
	"enfilade/solver/exact"
	"enfilade/solver/plan"
)

// Meet cuts the selected walls back to the wall that is clicked, or lengthens them to it. The end that takes the smaller change
// is meant; with Shift, the other one.
type Meet struct {
	Lengthen bool

	hover plan.Ref
	edit  plan.Edit
	moved []plan.Wall
	at    exact.Pt
	fault string
	done  bool
}

// Done reports whether the walls have met, so that the tool is put away.
func (t *Meet) Done() bool { return t.done }

// Down does what is shown.
func (t *Meet) Down(h Host, e Pointer) {
	t.Move(h, e)
	if t.edit == nil || t.fault != "" {
		return
	}
	if err := h.Do(t.edit); err != nil {
		t.fault = reason(err)
		return
	}
	t.done = true
}

// Move shows what a click on the wall under the pointer would do.
func (t *Meet) Move(h Host, e Pointer) {
	t.edit, t.fault, t.hover, t.moved = nil, "", plan.Ref{}, nil
	t.at = h.Camera().Grid(e.X, e.Y)
	to, ok := wallUnder(h, e)
	walls := chosenWalls(h)
	if len(walls) == 0 {
		t.fault = "select a wall first"
	}
	if !ok || len(walls) == 0 || len(walls) == 1 && walls[0].ID == to.ID {
		h.Cancel()
		return
	}
	t.hover = plan.Ref{Kind: plan.KindWall, ID: to.ID}
	steps := plan.Steps{Text: "cut back walls"}
	if t.Lengthen {
		steps.Text = "lengthen walls"
	}
	for _, w := range walls {
		if w.ID == to.ID {
			continue
		}
		edit := t.meet(w, to, e.Shift)
		if _, err := edit.Apply(h.Plan()); err != nil {
			t.fault = reason(err)
			continue
		}
		steps.Edits, t.moved = append(steps.Edits, edit), append(t.moved, w)
	}
	switch len(steps.Edits) {
	case 0:
		h.Cancel()
		return
	case 1:
		t.edit = steps.Edits[0]
	default:
		t.edit = steps
	}
	if t.fault = ""; h.Preview(t.edit) != nil {
		t.fault = "the walls cannot all meet it; take one after the other"
	}
}

// meet returns the edit for one wall.
func (t *Meet) meet(w, to plan.Wall, other bool) plan.Edit {
	change := plan.Overhang
	if t.Lengthen {
		change = plan.Reach
	}
	first, last := change(w.Line, to.Line, true), change(w.Line, to.Line, false)
	start := first < last
	if other && !math.IsInf(max(first, last), 1) {
		start = !start
	}
	if t.Lengthen {
		return plan.Lengthen{Wall: w.ID, To: to.ID, Start: start}
	}
	return plan.CutBack{Wall: w.ID, To: to.ID, Start: start}
}

// Up does nothing.
func (t *Meet) Up(Host, Pointer) {}

// Key takes no key.
func (t *Meet) Key(Host, Key) bool { return false }

// Stop ends the preview.
func (t *Meet) Stop(h Host) {
	h.Cancel()
	*t = Meet{Lengthen: t.Lengthen}
}

// Leave ends the preview.
func (t *Meet) Leave(h Host) { t.Stop(h) }

// Sketch shows the wall under the pointer, and the walls that follow.
func (t *Meet) Sketch(Host) Sketch {
	s := Sketch{Grip: GripCross, Hover: t.hover, Fault: t.fault, LabelAt: t.at, Dragged: wallRefs(t.moved)}
	if t.fault != "" {
		s.Snap = &pick.Snap{At: t.at}
	}
	return s
}

// Hint says what the next click does.
func (t *Meet) Hint(h Host) string {
	what := "cut back to"
	if t.Lengthen {
		what = "lengthen to"
	}
	if t.edit != nil && t.fault == "" {
		return "click to " + what + " this wall, with Shift at the other end"
	}
	return "click the wall to " + what
}
