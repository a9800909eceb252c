package tool

import (
	"enfilade/canvas/pick"
	"enfilade/solver/exact"
	"enfilade/solver/plan"
)

// Door cuts an opening into a wall: a click makes one of the standard width around the pointer, a drag along the wall sets
// both jambs. With Shift it is a plain gap.
type Door struct {
	place pick.WallPlace
	on    bool
	from  *int32 // where the first jamb was pressed
	edit  plan.Edit
	fault string
}

// Down presses the first jamb.
func (t *Door) Down(h Host, e Pointer) {
	t.Move(h, e)
	if t.on {
		along := t.place.Along
		t.from = &along
	}
}

// Move carries the opening along the wall under the pointer.
func (t *Door) Move(h Host, e Pointer) {
	place, ok := pick.WallAt(h.Plan(), h.Camera(), e.X, e.Y, gridStep(h, e))
	if t.from != nil && (!ok || place.Wall != t.place.Wall || place.Segment != t.place.Segment) {
		return // the drag goes on where it last was on its piece of wall
	}
	t.place, t.on, t.fault = place, ok, ""
	if !ok {
		t.drop(h)
		return
	}
	t.edit = t.cut(h, e)
	if err := h.Preview(t.edit); err != nil {
		t.fault = reason(err)
	}
}

// cut returns the edit that makes the opening.
func (t *Door) cut(h Host, e Pointer) plan.Edit {
	width := min(h.Defaults().DoorWidth, t.place.Length)
	at := max(0, min(t.place.Along-width/2, t.place.Length-width))
	if t.from != nil && *t.from != t.place.Along {
		at, width = min(*t.from, t.place.Along), max(*t.from, t.place.Along)-min(*t.from, t.place.Along)
	}
	o := plan.Opening{Wall: t.place.Wall, Segment: t.place.Segment, At: at, Width: width, Leaf: plan.SolidLeaf,
		SideRight: !t.place.Left}
	if e.Shift {
		o.Leaf = plan.NoLeaf
	}
	return plan.AddOpening{Opening: o}
}

// Up makes the opening.
func (t *Door) Up(h Host, _ Pointer) {
	if t.from == nil || t.edit == nil {
		return
	}
	edit := t.edit
	t.from, t.edit = nil, nil
	t.fault = doAdd(h, edit)
}

func (t *Door) drop(h Host) {
	if t.edit != nil {
		h.Cancel()
	}
	t.edit = nil
}

// Key lets go of a pressed jamb.
func (t *Door) Key(h Host, k Key) bool {
	if k.Name != KeyEscape || t.from == nil {
		return false
	}
	t.Stop(h)
	return true
}

// Stop leaves the wall as it was.
func (t *Door) Stop(h Host) {
	t.drop(h)
	*t = Door{}
}

// Leave takes the opening off the picture.
func (t *Door) Leave(h Host) { t.Stop(h) }

// Sketch shows where the opening lies and how wide it is.
func (t *Door) Sketch(h Host) Sketch {
	s := Sketch{Grip: GripCross, Fault: t.fault}
	if !t.on {
		return s
	}
	d := exact.Dist(t.place.A, t.place.B)
	at := along(t.place.A, t.place.B, float64(t.place.Along)/d)
	s.Snap = &pick.Snap{At: at, Kind: pick.SnapAlong, Ref: plan.Ref{Kind: plan.KindWall, ID: t.place.Wall}, Edge: [2]exact.Pt{t.place.A, t.place.B}}
	s.Dragged = []plan.Ref{{Kind: plan.KindWall, ID: t.place.Wall}}
	if ref, ok := added(h, t.edit); ok {
		s.Dragged = append(s.Dragged, ref)
	}
	if t.from != nil && *t.from != t.place.Along {
		s.Label, s.LabelAt = h.FormatLength(abs(float64(*t.from)-float64(t.place.Along))), at
	}
	return s
}

// Hint says what the next click does.
func (t *Door) Hint(Host) string {
	switch {
	case t.from != nil:
		return "release at the other jamb"
	case t.on:
		return "click for a door, drag for its width; Shift makes a plain gap"
	}
	return "point at a wall"
}
