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
	under   bool        // no item is under the pointer, but the picture to trace over
	grip    *grip       // while the button is down
	last    *[2]float64 // device pixels of the last click, for taking what lies below on the next
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
	toggle   bool       // pressed with Shift
	selected bool       // the hit was selected before
	again    bool       // pressed where the last click was
	refs     []plan.Ref // what moves when the selection is dragged, found at the first move: while it is dragged the plan stays the same
	moves    plan.Set   // the same
	touch    bool       // the box takes what it touches
	label    string     // the measure beside the pointer, where it is not a distance
}

// dragStart is how far the pointer goes before a press becomes a drag, in px at 100 %.
const dragStart = 3

// Down takes hold of what is under the pointer.
func (t *Select) Down(h Host, e Pointer) {
	hit, ok := pick.At(h.Plan(), h.Camera(), e.X, e.Y, alone(h), h.Walked)
	if !ok && !e.Shift {
		hit, ok = t.underHit(h, e)
	}
	t.grip = &grip{hit: hit, on: ok, x: e.X, y: e.Y, from: h.Camera().Grid(e.X, e.Y), toggle: e.Shift}
	if !ok {
		if !e.Shift {
			h.Select()
		}
		return
	}
	if e.Clicks > 1 && t.addWaypoint(h, hit, e) {
		return
	}
	g := t.grip
	if t.last != nil && e.Clicks == 1 && math.Hypot(e.X-t.last[0], e.Y-t.last[1]) < dragStart*h.Camera().K && !g.handle() {
		if below, ok := selectedUnder(h, e); ok {
			g.hit, g.again = below, true
		}
	}
	g.selected = slices.Contains(h.Selection(), g.hit.Ref)
	switch {
	case e.Shift && !g.selected:
		h.Select(append(slices.Clone(h.Selection()), hit.Ref)...)
	case !e.Shift && !g.selected:
		h.Select(hit.Ref)
	}
}

// alone returns the selection when it is one item: of several, only the outlines are shown, and none has handles.
func alone(h Host) []plan.Ref {
	if sel := h.Selection(); len(sel) == 1 {
		return sel
	}
	return nil
}

// selectedUnder returns the only selected item when it lies under the pointer, on top or not.
func selectedUnder(h Host, e Pointer) (pick.Hit, bool) {
	sel := h.Selection()
	if len(sel) != 1 {
		return pick.Hit{}, false
	}
	under := pick.Under(h.Plan(), h.Camera(), e.X, e.Y, h.Walked)
	if i := slices.IndexFunc(under, func(u pick.Hit) bool { return u.Ref == sel[0] }); i >= 0 {
		return under[i], true
	}
	return pick.Hit{}, false
}

// below returns the item under the pointer that lies below the held one, from the lowest round to the top.
func (g *grip) below(h Host, e Pointer) plan.Ref {
	under := pick.Under(h.Plan(), h.Camera(), e.X, e.Y, h.Walked)
	i := slices.IndexFunc(under, func(u pick.Hit) bool { return u.Ref == g.hit.Ref })
	if len(under) == 0 {
		return g.hit.Ref
	}
	return under[(i+1)%len(under)].Ref
}

// Move drags what is held, or shows what could be.
func (t *Select) Move(h Host, e Pointer) {
	g := t.grip
	if g == nil {
		t.look(h, e)
		return
	}
	if !g.moved && math.Hypot(e.X-g.x, e.Y-g.y) < dragStart*h.Camera().K {
		return
	}
	g.moved, g.touch, g.label = true, e.Ctrl, ""
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
	t.grip, t.snap, t.fault, t.last = nil, nil, "", nil
	if !g.moved {
		t.last = &[2]float64{e.X, e.Y}
	}
	switch {
	case g.moved && !g.on:
		in := pick.InBox(h.Plan(), g.from, g.to, e.Ctrl)
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
	case g.on && !g.toggle && g.again && g.selected:
		h.Select(g.below(h, e))
	case g.on && !g.toggle && g.hit.Ref == theUnderlay:
		h.Select() // below it lies nothing
	case g.on && !g.toggle:
		h.Select(g.hit.Ref)
	case !g.on && !g.toggle && t.overUnderlay(h, e):
		h.Select(theUnderlay)
	}
	t.look(h, e)
}

// look finds what lies under the pointer.
func (t *Select) look(h Host, e Pointer) {
	t.hover, t.hovered = pick.At(h.Plan(), h.Camera(), e.X, e.Y, alone(h), h.Walked)
	t.under = !t.hovered && t.overUnderlay(h, e)
	if !t.hovered {
		t.hover, t.hovered = t.underHit(h, e)
	}
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
		if edit := t.withoutWaypoint(h); edit != nil {
			t.hovered = false
			return h.Do(edit) == nil
		}
		return h.Do(plan.Delete{Items: slices.Clone(h.Selection())}) == nil
	case KeyLeft, KeyRight, KeyUp, KeyDown:
		if len(h.Selection()) == 0 || t.grip != nil {
			return false
		}
		e := nudgeEdit(h.Plan(), h.Selection(), nudge(h, k))
		if e == nil {
			return true // all of it is locked
		}
		t.fault = ""
		if err := h.Do(e); err != nil {
			t.fault = reason(err)
		}
		return true
	case KeyRune:
		if t.grip != nil {
			return false
		}
		e := turnedOver(h.Plan(), h.Selection(), k.Rune)
		return e != nil && h.Do(e) == nil
	}
	return false
}

// Stop lets go without doing anything.
func (t *Select) Stop(h Host) {
	if t.grip != nil && t.grip.moved {
		h.Cancel()
	}
	*t = Select{}
}

// Leave forgets what was under the pointer.
func (t *Select) Leave(Host) { t.hovered, t.under = false, false }

// Sketch shows the hovered item, the box, the handles of the selection, and what is dragged.
func (t *Select) Sketch(h Host) Sketch {
	s := Sketch{Fault: t.fault, Snap: t.snap}
	if t.hovered && t.grip == nil {
		s.Hover = t.hover.Ref
		if !locked(h.Plan(), t.hover.Ref) {
			s.Grip = GripHand
		}
	}
	g := t.grip
	if g == nil || !g.moved {
		s.Handles, s.Knobs = handles(h.Plan(), alone(h)), knobs(h)
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
	g := t.grip
	switch {
	case g != nil && g.moved && g.on:
		return "release to put it down, Esc to leave it where it was; Ctrl: without snapping"
	case g != nil && g.moved && g.touch:
		return "release to select all that the box touches"
	case g != nil && g.moved:
		return "release to select what lies inside the box, with Ctrl also what it touches"
	case t.hovered:
		return t.hoverHint(h)
	case t.under:
		return "click to pick the underlay, or drag a box around items"
	case len(h.Selection()) > 0:
		return selectionHint(h)
	}
	return "click an item, or drag a box around some; Shift adds"
}

// hoverHint says what a drag or a click on what is under the pointer does.
func (t *Select) hoverHint(h Host) string {
	if locked(h.Plan(), t.hover.Ref) {
		return "click to select; it is locked and stays where it is"
	}
	switch t.hover.Part {
	case pick.Heading:
		return "drag to turn, with Shift in steps of 15°"
	case pick.View:
		return "drag to open or close the view angle, with Shift in steps of 15°; to behind for all round"
	case pick.Range:
		return "drag to change how far it sees"
	case pick.FaceEnd:
		return "drag this end of the face"
	case pick.LegMiddle:
		return "drag for a new waypoint on this leg"
	case pick.Corner:
		return cornerHint(h, t.hover.Ref)
	}
	if t.hover.Ref == theUnderlay {
		return "drag to move the underlay, " + nudgeWords(h) + "; click again to let go of it"
	}
	if t.last != nil && slices.Contains(h.Selection(), t.hover.Ref) {
		return "drag to move; click again for what lies below; Shift adds and takes away"
	}
	if t.hover.Ref.Kind == plan.KindRoute {
		return "click to select, double-click for a new waypoint; drag to move all waypoints"
	}
	if t.hover.Ref.Kind == plan.KindOpening {
		return "click to select, drag along its wall or into another"
	}
	return "click to select, drag to move; Shift adds and takes away"
}

// selectionHint says which keys change the selection.
func selectionHint(h Host) string {
	sel, arrows := h.Selection(), nudgeWords(h)
	kind := sel[0].Kind
	for _, r := range sel {
		if r.Kind != kind {
			kind = plan.KindPlan
		}
	}
	switch kind {
	case plan.KindOpening:
		return arrows + " along the wall, Delete takes away · leaf (K), open or shut (U), hinges (H), side (J)"
	case plan.KindWall:
		return arrows + ", Delete takes away · J: body centred, left, right"
	case plan.KindTarget:
		return arrows + ", Delete takes away · J: to the other face, or turned round"
	}
	return arrows + " (Shift more, Ctrl less), Delete takes away"
}

// handles returns the corners of the selected items, at most as many as can be told apart.
func handles(p *plan.Plan, sel []plan.Ref) []exact.Pt {
	const most = 64
	var out []exact.Pt
	for _, r := range sel[:min(len(sel), most)] {
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
