package tool

import (
	"math"

	"enfilade/canvas/pick"
	"enfilade/solver/exact"
	"enfilade/solver/plan"
)

// Door cuts an opening into a wall: a click makes one of the last width around the pointer, a drag along the wall sets both
// jambs, and the width and the distance from the nearer corner may be typed. It opens to the pointer's side. With Shift it is
// a plain gap.
type Door struct {
	place  pick.WallPlace
	on     bool
	middle bool   // it snapped to the middle of its piece of wall
	from   *int32 // where the first jamb was pressed
	other  bool   // opens to the side where the pointer is not
	last   Pointer
	edit   plan.Edit
	typing typing
	fault  string
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
	t.last = e
	place, ok := pick.WallAt(h.Plan(), h.Camera(), e.X, e.Y, gridStep(h, e))
	if t.from != nil && (!ok || place.Wall != t.place.Wall || place.Segment != t.place.Segment) {
		return // the drag goes on where it last was on its piece of wall
	}
	t.place, t.on = place, ok
	if !ok {
		t.drop(h)
		return
	}
	t.middle = false
	if half := place.Length / 2; !e.Ctrl && t.from == nil && h.Snapper().On.Has(pick.SnapMiddle) &&
		abs(float64(place.Along-half)) <= unitsOf(h, 6) {
		t.place.Along, t.middle = half, true
	}
	t.show(h)
}

// show previews the opening.
func (t *Door) show(h Host) {
	t.fault = ""
	if !t.on {
		return
	}
	o, fault := t.opening(h)
	t.edit = plan.AddOpening{Opening: o}
	if err := h.Preview(t.edit); err != nil {
		t.fault = reason(err)
	}
	if fault != "" {
		t.fault = fault
	}
}

// opening returns the opening as it stands: what was typed counts before the pointer.
func (t *Door) opening(h Host) (plan.Opening, string) {
	d, p := h.Defaults(), t.place
	width := min(d.DoorWidth, p.Length)
	at := max(0, min(p.Along-width/2, p.Length-width))
	if t.from != nil && *t.from != p.Along {
		at, width = min(*t.from, p.Along), max(*t.from, p.Along)-min(*t.from, p.Along)
	}
	w, fault := t.typing.length(h, 0, float64(width))
	if int32(w) != width {
		width = int32(w)
		at = max(0, min(p.Along-width/2, p.Length-width))
	}
	atEnd := t.fromEnd()
	off := float64(at)
	if atEnd {
		off = float64(p.Length - at - width)
	}
	off, fault2 := t.typing.length(h, 1, off)
	if fault == "" {
		fault = fault2
	}
	at = int32(math.Round(off))
	if atEnd {
		at = p.Length - at - width
	}
	o := plan.Opening{Wall: p.Wall, Segment: p.Segment, At: at, Width: width, Leaf: d.Leaf, SideRight: p.Left == t.other}
	if t.last.Shift {
		o.Leaf = plan.NoLeaf
	}
	if o.Leaf != plan.NoLeaf {
		o.Shut, o.HingeEnd = d.Shut, d.HingeEnd
	}
	return o, fault
}

// fromEnd reports whether the end of the piece is the corner nearer to the pointer.
func (t *Door) fromEnd() bool { return t.place.Along > t.place.Length/2 }

// Up makes the opening.
func (t *Door) Up(h Host, _ Pointer) {
	if t.from == nil || t.edit == nil {
		return
	}
	t.put(h)
}

func (t *Door) put(h Host) {
	o, fault := t.opening(h)
	dragged := t.from != nil && *t.from != t.place.Along
	typed := t.typing.text[0] != ""
	t.from, t.edit = nil, nil
	if fault != "" {
		t.fault = fault
		return
	}
	if typed && !dragged { // a typed width holds for the next ones
		d := h.Defaults()
		d.DoorWidth = o.Width
		h.SetDefaults(d)
	}
	t.typing.clear()
	t.fault = doAdd(h, plan.AddOpening{Opening: o})
	t.on = t.fault != "" // a made one is left alone until the pointer moves on
}

func (t *Door) drop(h Host) {
	if t.edit != nil {
		h.Cancel()
	}
	t.edit = nil
}

// Key takes a typed width and distance, changes the leaf, and lets go of a pressed jamb.
func (t *Door) Key(h Host, k Key) bool {
	if k.Name == KeyRune && t.leafKey(h, k.Rune) {
		t.show(h)
		return true
	}
	if !t.on {
		return false
	}
	if t.typing.key(k) {
		t.show(h)
		return true
	}
	switch {
	case k.Name == KeyEnter && t.edit != nil && t.typing.some():
		t.put(h)
	case k.Name == KeyEscape && t.from != nil:
		t.Stop(h)
	default:
		return false
	}
	return true
}

// leafKey changes how new doors hang.
func (t *Door) leafKey(h Host, r rune) bool {
	d := h.Defaults()
	o := plan.Opening{Leaf: d.Leaf, Shut: d.Shut, HingeEnd: d.HingeEnd, SideRight: t.other}
	if _, ok := hang(&o, r); !ok {
		return false
	}
	t.other = o.SideRight
	d.Leaf, d.Shut, d.HingeEnd = o.Leaf, o.Shut, o.HingeEnd
	h.SetDefaults(d)
	return true
}

// hang changes how a door hangs, by the keys for it, and says what was done: J the side it opens to, H the jamb its hinges are
// on, K its leaf, U whether it is shut. A plain gap has but its leaf to change.
func hang(o *plan.Opening, r rune) (label string, ok bool) {
	leaf := o.Leaf != plan.NoLeaf
	switch r {
	case 'j', 'J':
		if leaf {
			o.SideRight = !o.SideRight
		}
		return "hang door", true
	case 'h', 'H':
		if leaf {
			o.HingeEnd = !o.HingeEnd
		}
		return "hang door", true
	case 'k', 'K':
		o.Leaf = (o.Leaf + 1) % 3
		o.Shut = o.Shut && o.Leaf != plan.NoLeaf
		return "change leaf", true
	case 'u', 'U':
		if leaf {
			o.Shut = !o.Shut
		}
		if o.Shut {
			return "shut door", true
		}
		return "open door", true
	}
	return "", false
}

// Stop leaves the wall as it was.
func (t *Door) Stop(h Host) {
	t.drop(h)
	*t = Door{other: t.other}
}

// Leave takes the opening off the picture.
func (t *Door) Leave(h Host) { t.Stop(h) }

// Sketch shows where the opening lies: how far from the corners, and how wide it is.
func (t *Door) Sketch(h Host) Sketch {
	s := Sketch{Grip: GripCross, Fault: t.fault}
	if !t.on {
		return s
	}
	p := t.place
	at := along(p.A, p.B, float64(p.Along)/exact.Dist(p.A, p.B))
	wall := plan.Ref{Kind: plan.KindWall, ID: p.Wall}
	s.Snap = &pick.Snap{At: at, Kind: pick.SnapAlong, Ref: wall, Edge: [2]exact.Pt{p.A, p.B}}
	if t.middle {
		s.Snap.Kind = pick.SnapMiddle
	}
	s.Dragged = []plan.Ref{wall}
	if ref, ok := added(h, t.edit); ok {
		s.Dragged = append(s.Dragged, ref)
	}
	o, _ := t.opening(h)
	before, width, after := h.FormatLength(float64(o.At)), h.FormatLength(float64(o.Width)), h.FormatLength(float64(p.Length-o.At-o.Width))
	s.Label, s.LabelAt = before+"  |  "+width+"  |  "+after, at
	near := before
	if t.fromEnd() {
		near = after
	}
	s.Types = t.edit != nil
	if s.Fields = t.typing.fields([2]string{"width", "from corner"}, [2]string{width, near}); s.Fields != nil {
		s.Snap = nil
	}
	return s
}

// Hint says what the next click does.
func (t *Door) Hint(h Host) string {
	switch {
	case t.typing.on:
		return "Tab goes between width and distance from the corner, Enter or a click makes it, Esc gives it back"
	case t.from != nil:
		return "release at the other jamb"
	case t.on:
		return "click, drag, or type a width · " + leafHint(h.Defaults()) + " · Shift: plain gap"
	}
	if h.Plan().NumWalls() == 0 {
		return "a door sits in a wall; draw one first (W)"
	}
	return "point at a wall to cut a door or a gap into · " + leafHint(h.Defaults())
}

// leafHint says how new doors hang, and the keys that change it.
func leafHint(d Defaults) string {
	if d.Leaf == plan.NoLeaf {
		return "plain gap (K)"
	}
	state := "open"
	if d.Shut {
		state = "shut"
	}
	return [...]string{plan.SolidLeaf: "solid leaf", plan.GlazedLeaf: "glazed leaf"}[d.Leaf] + " (K), " + state + " (U), hinges (H), side (J)"
}
