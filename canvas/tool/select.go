package tool

import (
	"math"
	"slices"

	"enfilade/canvas/pick"
	"enfilade/solver/exact"
	"enfilade/solver/plan"
)

// Select selects, drags, turns, nudges and deletes.
type Select struct {
	hover   pick.Hit
	hovered bool
	grip    *grip // while the button is down
	snap    *pick.Snap
	fault   string
}

// grip is what a pressed button holds.
type grip struct {
	hit      pick.Hit // without one, a box is drawn
	on       bool
	x, y     float64 // where it was pressed, device pixels
	from     exact.Pt
	to       exact.Pt
	moved    bool // the pointer went farther than a click does
	edit     plan.Edit
	toggle   bool    // pressed with Shift
	selected bool    // the hit was selected before
	heading  float64 // the heading an observer is turned to
}

// dragStart is how far the pointer goes before a press becomes a drag, in px at 100 %.
const dragStart = 3

// Down takes hold of what is under the pointer.
func (t *Select) Down(h Host, e Pointer) {
	hit, ok := pick.At(h.Plan(), h.Camera(), e.X, e.Y, h.Selection())
	t.grip = &grip{hit: hit, on: ok, x: e.X, y: e.Y, from: h.Camera().Grid(e.X, e.Y), toggle: e.Shift}
	if !ok {
		if !e.Shift {
			h.Select()
		}
		return
	}
	t.grip.selected = slices.Contains(h.Selection(), hit.Ref)
	switch {
	case e.Shift && !t.grip.selected:
		h.Select(append(slices.Clone(h.Selection()), hit.Ref)...)
	case !e.Shift && !t.grip.selected:
		h.Select(hit.Ref)
	}
}

// Move drags what is held, or shows what could be.
func (t *Select) Move(h Host, e Pointer) {
	g := t.grip
	if g == nil {
		t.hover, t.hovered = pick.At(h.Plan(), h.Camera(), e.X, e.Y, h.Selection())
		return
	}
	if !g.moved && math.Hypot(e.X-g.x, e.Y-g.y) < dragStart*h.Camera().K {
		return
	}
	g.moved = true
	g.to = h.Camera().Grid(e.X, e.Y)
	if !g.on {
		return
	}
	g.edit, t.snap = dragEdit(h, g, e)
	t.fault = ""
	if g.edit == nil {
		h.Cancel()
		return
	}
	if err := h.Preview(g.edit); err != nil {
		t.fault = reason(err)
	}
}

// Up does the drag as one step, or finishes a click.
func (t *Select) Up(h Host, e Pointer) {
	g := t.grip
	if g == nil {
		return
	}
	t.grip, t.snap, t.fault = nil, nil, ""
	switch {
	case g.moved && !g.on:
		in := pick.InBox(h.Plan(), g.from, g.to)
		if g.toggle {
			in = append(slices.Clone(h.Selection()), in...)
		}
		h.Select(in...)
	case g.moved && g.edit != nil:
		_ = h.Do(g.edit) // a drag that cannot be done goes back to where it was; its reason was shown
	case g.moved:
		h.Cancel()
	case g.on && g.toggle && g.selected:
		h.Select(slices.DeleteFunc(slices.Clone(h.Selection()), func(r plan.Ref) bool { return r == g.hit.Ref })...)
	case g.on && !g.toggle:
		h.Select(g.hit.Ref)
	}
	t.hover, t.hovered = pick.At(h.Plan(), h.Camera(), e.X, e.Y, h.Selection())
}

// Key nudges, deletes, and lets go of a drag or the selection.
func (t *Select) Key(h Host, k Key) bool {
	switch k.Name {
	case KeyEscape:
		if t.grip != nil && t.grip.moved {
			t.Stop(h)
			return true
		}
		if len(h.Selection()) > 0 {
			h.Select()
			return true
		}
		return false
	case KeyDelete, KeyBackspace:
		if len(h.Selection()) == 0 || t.grip != nil {
			return false
		}
		return h.Do(plan.Delete{Items: slices.Clone(h.Selection())}) == nil
	case KeyLeft, KeyRight, KeyUp, KeyDown:
		if len(h.Selection()) == 0 || t.grip != nil {
			return false
		}
		return h.Do(plan.MoveItems{Items: movable(h.Plan(), h.Selection()), By: nudge(k)}) == nil
	}
	return false
}

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

// Stop lets go without doing anything.
func (t *Select) Stop(h Host) {
	if t.grip != nil && t.grip.moved {
		h.Cancel()
	}
	*t = Select{}
}

// Leave forgets what was under the pointer.
func (t *Select) Leave(Host) { t.hovered = false }

// Sketch shows the hovered item, the box, the handles of the selection, and what is dragged.
func (t *Select) Sketch(h Host) Sketch {
	s := Sketch{Fault: t.fault, Snap: t.snap}
	if t.hovered && t.grip == nil {
		s.Hover, s.Grip = t.hover.Ref, GripHand
	}
	g := t.grip
	if g == nil || !g.moved {
		s.Handles = handles(h.Plan(), h.Selection())
		return s
	}
	if !g.on {
		s.Box = &[2]exact.Pt{g.from, g.to}
		return s
	}
	s.Grip = GripHand
	s.Dragged = draggedBy(h, g)
	s.Label, s.LabelAt = dragLabel(h, g), g.to
	return s
}

// Hint says what the next click does.
func (t *Select) Hint(h Host) string {
	switch {
	case t.grip != nil && t.grip.moved && t.grip.on:
		return "release to put it down, Esc to leave it where it was"
	case t.grip != nil && t.grip.moved:
		return "release to select what lies in the box"
	case t.hovered && t.hover.Part == pick.Heading:
		return "drag to turn, with Shift in steps of 15°"
	case t.hovered && t.hover.Part == pick.Corner:
		return "drag to move this corner"
	case t.hovered:
		return "click to select, drag to move"
	case len(h.Selection()) > 0:
		return "arrows nudge, Delete takes away"
	}
	return "click an item, or drag a box around some"
}

// handles returns the corners of the selected items, at most as many as can be told apart.
func handles(p *plan.Plan, sel []plan.Ref) []exact.Pt {
	const most = 64
	var out []exact.Pt
	for _, r := range sel {
		c, ok := pick.Points(p, r)
		mark := r.Kind == plan.KindObserver || r.Kind == plan.KindTarget || r.Kind == plan.KindStart
		if !ok || mark || len(out)+c.Len() > most {
			continue
		}
		for _, q := range c.All() {
			out = append(out, q)
		}
	}
	return out
}
