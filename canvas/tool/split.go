package tool

import (
	"enfilade/canvas/pick"
	"enfilade/solver/exact"
	"enfilade/solver/plan"
)

// Split parts the wall under the pointer in two.
type Split struct {
	edit  plan.Edit
	snap  *pick.Snap
	hover plan.Ref
	from  exact.Pt // where the piece begins
	fault string
	done  bool
}

// Done reports whether a wall has been parted, so that the tool is put away.
func (t *Split) Done() bool { return t.done }

// Down parts the wall.
func (t *Split) Down(h Host, e Pointer) {
	t.Move(h, e)
	if t.edit == nil || t.fault != "" {
		return
	}
	if t.fault = doAdd(h, t.edit); t.fault == "" {
		t.done = true
	}
}

// Move finds the place on the wall under the pointer: corners and whole steps of the grid along a piece are preferred.
func (t *Split) Move(h Host, e Pointer) {
	t.edit, t.snap, t.fault, t.hover = nil, nil, "", plan.Ref{}
	w, ok := wallUnder(h, e)
	if !ok || w.Line.Len() < 2 {
		return
	}
	snap := h.Snapper().At(h.Plan(), h.Camera(), e.X, e.Y, pick.SnapTo{Free: e.Ctrl})
	segment, at := plan.NearestOn(w.Line, snap.At)
	a, b := w.Line.At(segment), w.Line.At(segment+1)
	snap.At, t.from = at, a
	if at != a && at != b {
		snap.Kind, snap.Edge, snap.Guides = pick.SnapAlong, [2]exact.Pt{a, b}, [2]pick.Guide{}
	}
	t.snap, t.hover = &snap, plan.Ref{Kind: plan.KindWall, ID: w.ID}
	t.edit = plan.SplitWall{Wall: w.ID, Segment: segment, At: at}
	if w.Locked {
		t.fault = "is locked; unlock it first"
		return
	}
	if _, err := t.edit.Apply(h.Plan()); err != nil {
		t.fault = reason(err)
	}
}

// Up does nothing.
func (t *Split) Up(Host, Pointer) {}

// Key takes no key.
func (t *Split) Key(Host, Key) bool { return false }

// Stop forgets the place.
func (t *Split) Stop(Host) { *t = Split{} }

// Leave forgets the place.
func (t *Split) Leave(Host) { *t = Split{} }

// Sketch shows the place and how far along the piece it lies.
func (t *Split) Sketch(h Host) Sketch {
	s := Sketch{Grip: GripCross, Hover: t.hover, Snap: t.snap, Fault: t.fault}
	if t.snap != nil {
		s.Band, s.LabelAt = []exact.Pt{t.from, t.snap.At}, t.snap.At
		s.Label = h.FormatLength(exact.Dist(t.from, t.snap.At))
	}
	return s
}

// Hint says what the next click does.
func (t *Split) Hint(Host) string {
	if t.edit != nil && t.fault == "" {
		return "click to split the wall here"
	}
	return "click a wall where it is to be split"
}
