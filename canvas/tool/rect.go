package tool

import (
	"math"

	"enfilade/canvas/pick"
	"enfilade/solver/exact"
	"enfilade/solver/plan"
)

// Rect draws a level rectangle: a block, a zone, the floor, or a room of walls. It goes from corner to corner, by two clicks
// or by a drag; its width and height may be typed.
type Rect struct {
	Kind plan.Kind // KindBlock, KindZone, KindFloor, or KindWall for a room

	from   *exact.Pt
	at     exact.Pt
	snap   *pick.Snap
	press  press
	edit   plan.Edit
	typing typing
	fault  string
}

// press is a pressed button: it tells a drag from a click.
type press struct {
	down  bool
	x, y  float64 // device pixels
	moved bool
}

func pressAt(e Pointer) press { return press{down: true, x: e.X, y: e.Y} }

// move notes how far the pointer went, and reports whether it is a drag.
func (p *press) move(h Host, e Pointer) bool {
	if p.down && math.Hypot(e.X-p.x, e.Y-p.y) >= dragStart*h.Camera().K {
		p.moved = true
	}
	return p.moved
}

// Down puts the first corner, or the second.
func (t *Rect) Down(h Host, e Pointer) {
	t.aim(h, e)
	if t.from != nil {
		t.finish(h)
		return
	}
	at := t.at
	t.from, t.press = &at, pressAt(e)
}

// Move draws the rectangle out.
func (t *Rect) Move(h Host, e Pointer) {
	t.press.move(h, e)
	t.aim(h, e)
	t.show(h)
}

func (t *Rect) aim(h Host, e Pointer) {
	to := pick.SnapTo{Free: e.Ctrl}
	if t.from != nil {
		to.More = []exact.Pt{*t.from}
	}
	snap := h.Snapper().At(h.Plan(), h.Camera(), e.X, e.Y, to)
	t.snap, t.at = &snap, snap.At
	if t.from != nil && e.Shift { // a square
		v := t.at.Sub(*t.from)
		d := max(abs(v.X), abs(v.Y))
		t.at = t.from.Add(exact.Vec{X: withSign(d, v.X), Y: withSign(d, v.Y)})
	}
}

// target returns the second corner: what was typed counts before the pointer, on the pointer's side of the first.
func (t *Rect) target(h Host) (exact.Pt, string) {
	if !t.typing.some() {
		return t.at, ""
	}
	v := t.at.Sub(*t.from)
	w, fault := t.typing.length(h, 0, float64(abs(v.X)))
	l, fault2 := t.typing.length(h, 1, float64(abs(v.Y)))
	if fault == "" {
		fault = fault2
	}
	lim := float64(plan.MaxCoord)
	place := func(a int32, d float64, side int32) int32 {
		if side < 0 {
			d = -d
		}
		return int32(min(max(float64(a)+d, -lim), lim))
	}
	return exact.Pt{X: place(t.from.X, w, v.X), Y: place(t.from.Y, l, v.Y)}, fault
}

// show previews the rectangle.
func (t *Rect) show(h Host) {
	t.fault, t.edit = "", nil
	if t.from == nil {
		return
	}
	to, fault := t.target(h)
	if t.edit = t.draw(h, to); t.edit == nil {
		h.Cancel()
	} else if err := h.Preview(t.edit); err != nil {
		t.fault = reason(err)
	}
	if fault != "" {
		t.fault = fault
	}
}

// draw returns the edit that adds the rectangle, nil when it encloses nothing.
func (t *Rect) draw(h Host, to exact.Pt) plan.Edit {
	a := *t.from
	if a.X == to.X || a.Y == to.Y {
		return nil
	}
	lo, hi := exact.Pt{X: min(a.X, to.X), Y: min(a.Y, to.Y)}, exact.Pt{X: max(a.X, to.X), Y: max(a.Y, to.Y)}
	ring := []exact.Pt{lo, {X: hi.X, Y: lo.Y}, hi, {X: lo.X, Y: hi.Y}}
	if t.Kind == plan.KindWall {
		return Named("draw room", plan.AddWall{Wall: newWall(plan.Solid, plan.ChainOf(append(ring, lo)...), h.Defaults())})
	}
	return ringEdit(t.Kind, plan.ChainOf(ring...), h.Defaults())
}

// Up does the rectangle when it was dragged out; after a click it waits for the second one.
func (t *Rect) Up(h Host, e Pointer) {
	if t.from == nil || !t.press.down {
		return
	}
	dragged := t.press.move(h, e)
	t.press = press{}
	if dragged && !t.typing.on {
		t.aim(h, e)
		t.finish(h)
	}
}

// finish does the rectangle as one step.
func (t *Rect) finish(h Host) {
	to, fault := t.target(h)
	if fault != "" {
		t.fault = fault
		return
	}
	edit := t.draw(h, to)
	t.clear()
	if edit == nil {
		h.Cancel()
		return
	}
	t.fault = doAdd(h, edit)
}

func (t *Rect) clear() {
	t.from, t.edit, t.press, t.fault = nil, nil, press{}, ""
	t.typing.clear()
}

// Key takes a typed width and height, changes the body of a room's walls, and lets go of the first corner.
func (t *Rect) Key(h Host, k Key) bool {
	if k.Name == KeyRune && t.Kind == plan.KindWall && changeBody(h, k.Rune) {
		t.show(h)
		return true
	}
	if t.from == nil {
		return false
	}
	if t.typing.key(k) {
		t.show(h)
		return true
	}
	switch k.Name {
	case KeyEscape, KeyBackspace, KeyUndo:
		h.Cancel()
		t.clear()
	case KeyEnter:
		t.finish(h)
	default:
		return false
	}
	return true
}

// Stop leaves the rectangle undone.
func (t *Rect) Stop(h Host) {
	if t.edit != nil {
		h.Cancel()
	}
	t.clear()
	t.snap = nil
}

// Leave hides the snap mark.
func (t *Rect) Leave(Host) { t.snap = nil }

// Sketch shows the rectangle's measures.
func (t *Rect) Sketch(h Host) Sketch {
	s := Sketch{Grip: GripCross, Fault: t.fault, Snap: t.snap}
	if t.from == nil {
		return s
	}
	if ref, ok := added(h, t.edit); ok {
		s.Dragged = []plan.Ref{ref}
	} else if t.Kind == plan.KindFloor {
		s.Dragged = []plan.Ref{{Kind: plan.KindFloor}}
	}
	to, _ := t.target(h)
	v := to.Sub(*t.from)
	w, l := h.FormatLength(float64(abs(v.X))), h.FormatLength(float64(abs(v.Y)))
	s.Label, s.LabelAt = w+" × "+l, to
	if t.Kind != plan.KindBlock {
		s.Label += " · " + h.FormatArea(math.Abs(float64(v.X)*float64(v.Y)))
	}
	s.Handles, s.Types = []exact.Pt{*t.from}, true
	if s.Fields = t.typing.fields([2]string{"width", "height"}, [2]string{w, l}); s.Fields != nil {
		s.Snap = nil
	}
	return s
}

// Hint says what the next click does.
func (t *Rect) Hint(h Host) string {
	body := ""
	if t.Kind == plan.KindWall {
		body = bodyHint(h.Defaults(), "inside", "outside")
	}
	what := map[plan.Kind]string{plan.KindBlock: "block", plan.KindZone: "zone", plan.KindFloor: "floor", plan.KindWall: "room"}[t.Kind]
	switch {
	case t.typing.on:
		return "Tab goes between width and height, Enter draws the " + what + ", Esc gives it back to the pointer"
	case t.from == nil:
		return "click or drag from one corner of the " + what + body
	case t.press.moved:
		return "release at the opposite corner; Shift makes a square" + body
	}
	return "click the opposite corner, or type its width, Tab, its height; Shift makes a square" + body
}
