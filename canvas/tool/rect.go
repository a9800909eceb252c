package tool

import (
	"fmt"

	"enfilade/canvas/pick"
	"enfilade/solver/exact"
	"enfilade/solver/plan"
)

// Rect draws a rectangle from corner to corner: a block, or a zone. For a block a click alone puts a round column.
type Rect struct {
	Kind plan.Kind // KindBlock or KindZone

	from  *exact.Pt
	at    exact.Pt
	snap  *pick.Snap
	edit  plan.Edit
	fault string
}

// Down puts the first corner.
func (t *Rect) Down(h Host, e Pointer) {
	t.aim(h, e)
	at := t.at
	t.from = &at
}

// Move draws the rectangle out.
func (t *Rect) Move(h Host, e Pointer) {
	t.aim(h, e)
	if t.from == nil {
		return
	}
	t.fault = ""
	t.edit = t.draw(h)
	if t.edit == nil {
		h.Cancel()
		return
	}
	if err := h.Preview(t.edit); err != nil {
		t.fault = reason(err)
	}
}

func (t *Rect) aim(h Host, e Pointer) {
	snap := h.Snapper().At(h.Plan(), h.Camera(), e.X, e.Y, pick.SnapTo{Free: e.Ctrl})
	t.snap, t.at = &snap, snap.At
	if t.from != nil && e.Shift { // a square
		v := t.at.Sub(*t.from)
		d := max(abs(v.X), abs(v.Y))
		t.at = t.from.Add(exact.Vec{X: withSign(d, v.X), Y: withSign(d, v.Y)})
	}
}

// draw returns the edit that adds the rectangle, nil when it encloses nothing.
func (t *Rect) draw(h Host) plan.Edit {
	a, b := *t.from, t.at
	if a.X == b.X || a.Y == b.Y {
		return nil
	}
	lo, hi := exact.Pt{X: min(a.X, b.X), Y: min(a.Y, b.Y)}, exact.Pt{X: max(a.X, b.X), Y: max(a.Y, b.Y)}
	ring := plan.ChainOf(lo, exact.Pt{X: hi.X, Y: lo.Y}, hi, exact.Pt{X: lo.X, Y: hi.Y})
	if t.Kind == plan.KindZone {
		return plan.AddZone{Zone: plan.Zone{Ring: ring, Room: true}}
	}
	return plan.AddBlock{Block: plan.Block{Ring: ring, Height: h.Defaults().Height}}
}

// Up does the rectangle; where the pointer did not move, a column.
func (t *Rect) Up(h Host, e Pointer) {
	if t.from == nil {
		return
	}
	t.aim(h, e)
	edit := t.draw(h)
	if edit == nil && t.Kind == plan.KindBlock && *t.from == t.at {
		edit = column(t.at, h.Defaults())
	}
	t.from, t.edit = nil, nil
	if edit == nil {
		h.Cancel()
		return
	}
	t.fault = doAdd(h, edit)
}

// Key lets go of the first corner.
func (t *Rect) Key(h Host, k Key) bool {
	if k.Name != KeyEscape || t.from == nil {
		return false
	}
	t.Stop(h)
	return true
}

// Stop leaves the rectangle undone.
func (t *Rect) Stop(h Host) {
	if t.edit != nil {
		h.Cancel()
	}
	*t = Rect{Kind: t.Kind}
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
	}
	v := t.at.Sub(*t.from)
	s.Label = fmt.Sprintf("%s × %s", h.FormatLength(float64(abs(v.X))), h.FormatLength(float64(abs(v.Y))))
	s.LabelAt = t.at
	return s
}

// Hint says what the next click does.
func (t *Rect) Hint(Host) string {
	switch {
	case t.from != nil:
		return "release at the opposite corner; Shift makes a square"
	case t.Kind == plan.KindZone:
		return "drag from corner to corner of the zone"
	}
	return "click for a round column, drag for a block"
}

// columnCorners is how many corners stand for a column's circle.
const columnCorners = 24

// column returns the edit that adds a round column.
func column(at exact.Pt, d Defaults) plan.Edit {
	return plan.AddBlock{Block: plan.Block{Ring: plan.CircleRing(at, d.ColumnRadius, columnCorners), Height: d.Height,
		Circle: &plan.Circle{At: at, Radius: d.ColumnRadius}}}
}
