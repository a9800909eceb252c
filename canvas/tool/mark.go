package tool

import (
	"math"

	"enfilade/canvas/pick"
	"enfilade/solver/exact"
	"enfilade/solver/plan"
)

// Mark puts down an observer, a target or a start: it follows the pointer as a preview, and a click leaves it there. A drag
// from there turns an observer or a start to the pointer, and draws out the face of a target, along the wall it hangs on.
type Mark struct {
	Kind plan.Kind // KindObserver, KindTarget or KindStart

	edit  plan.Edit
	place placed
	press press
	last  Pointer
	turn  bool       // J: a free target's face looks the other way
	side  *pick.Face // J: the face to hang on while it or the one behind it is near
	label string
	snap  *pick.Snap
	fault string
}

// placed is where a mark was pressed down.
type placed struct {
	at     exact.Pt
	facing *float64
	face   *pick.Face // the wall's face it hangs on
}

// Move carries the mark along, or turns or draws it out.
func (t *Mark) Move(h Host, e Pointer) {
	t.label, t.last = "", e
	if t.press.move(h, e) {
		t.drag(h, e)
	} else if !t.press.down {
		t.place, t.snap = t.find(h, e)
		t.edit = t.add(h, nil)
	}
	t.fault = ""
	if err := h.Preview(t.edit); err != nil {
		t.fault = reason(err)
	}
}

// Down presses the mark down.
func (t *Mark) Down(h Host, e Pointer) {
	t.Move(h, e)
	t.press = pressAt(e)
}

// Up leaves the mark there.
func (t *Mark) Up(h Host, e Pointer) {
	if !t.press.down {
		return
	}
	t.Move(h, e)
	edit := t.edit
	t.edit, t.press, t.label, t.side = nil, press{}, "", nil
	t.fault = doAdd(h, edit)
}

// find returns where the mark goes under the pointer.
func (t *Mark) find(h Host, e Pointer) (placed, *pick.Snap) {
	switch t.Kind {
	case plan.KindTarget:
		return t.facePlace(h, e)
	case plan.KindStart:
		return t.startPlace(h, e)
	}
	snap := h.Snapper().At(plan.New(), h.Camera(), e.X, e.Y, pick.SnapTo{Free: e.Ctrl})
	return placed{at: snap.At}, &snap
}

// add returns the edit that adds the mark where it was pressed down, a target with a face when it was drawn out.
func (t *Mark) add(h Host, face *[2]exact.Pt) plan.Edit {
	p := t.place
	switch t.Kind {
	case plan.KindTarget:
		x := plan.Target{At: p.at, Normal: p.facing, Colour: -1}
		if face != nil {
			x.At, x.Normal, x.Face = along(face[0], face[1], 0.5), nil, face
		}
		return plan.AddTarget{Target: x}
	case plan.KindStart:
		return plan.AddStart{Start: plan.Start{At: p.at, Facing: p.facing}}
	}
	o := plan.Observer{At: p.at, Eye: h.Defaults().Eye, View: 360, Colour: -1}
	if p.facing != nil {
		o.Heading = *p.facing
	}
	return plan.AddObserver{Observer: o}
}

// drag turns the mark to the pointer, or draws out a target's face.
func (t *Mark) drag(h Host, e Pointer) {
	if t.Kind == plan.KindTarget {
		face, snap := t.faceTo(h, e)
		t.snap = snap
		if face[0] == face[1] {
			t.edit = t.add(h, nil)
			return
		}
		t.edit = t.add(h, &face)
		t.label = "face of " + h.FormatLength(exact.Dist(face[0], face[1]))
		return
	}
	to := h.Camera().Grid(e.X, e.Y)
	if to != t.place.at {
		deg := turned(bearing(t.place.at, to), e.Shift)
		t.place.facing = &deg
		t.label = degrees(deg) + "°"
	}
	t.snap = nil
	t.edit = t.add(h, nil)
}

// turned rounds a direction to whole degrees, or to steps of 15, from 0 to below 360.
func turned(deg float64, coarse bool) float64 {
	step := 1.0
	if coarse {
		step = 15
	}
	return math.Mod(math.Round(deg/step)*step+360, 360)
}

// faceTo returns the face from where the target was pressed to the pointer: on the wall's face, else free.
func (t *Mark) faceTo(h Host, e Pointer) ([2]exact.Pt, *pick.Snap) {
	if f := t.place.face; f != nil {
		at := f.Place(h.Camera(), e.X, e.Y, gridStep(h, e))
		way := f.Ends[1].Sub(f.Ends[0])
		face := [2]exact.Pt{t.place.at, at}
		if at.Sub(t.place.at).Dot(way) < 0 {
			face = [2]exact.Pt{at, t.place.at}
		}
		return face, &pick.Snap{At: at, Kind: pick.SnapAlong, Ref: f.Ref, Edge: f.Ends}
	}
	snap := h.Snapper().At(h.Plan(), h.Camera(), e.X, e.Y, pick.SnapTo{Free: e.Ctrl, From: &t.place.at})
	if t.turn {
		return [2]exact.Pt{snap.At, t.place.at}, &snap
	}
	return [2]exact.Pt{t.place.at, snap.At}, &snap
}

// facePlace returns where a target or a start goes: on the free side of a near face, else on the grid.
func (t *Mark) facePlace(h Host, e Pointer) (placed, *pick.Snap) {
	if f, ok := pick.FaceAt(h.Plan(), h.Camera(), e.X, e.Y, gridStep(h, e)); ok && !e.Ctrl {
		f = t.asked(h, e, f)
		return placed{f.At, &f.Normal, &f}, &pick.Snap{At: f.At, Kind: pick.SnapAlong, Ref: f.Ref, Edge: f.Ends}
	}
	t.side = nil
	snap := h.Snapper().At(plan.New(), h.Camera(), e.X, e.Y, pick.SnapTo{Free: e.Ctrl})
	return placed{at: snap.At}, &snap
}

// asked returns the face that J asked for when it is near or the one behind it, else near.
func (t *Mark) asked(h Host, e Pointer, near pick.Face) pick.Face {
	if t.side == nil || near.Same(*t.side) {
		return near
	}
	if other, ok := near.Other(h.Camera(), e.X, e.Y, gridStep(h, e)); ok && other.Same(*t.side) {
		return other
	}
	t.side = nil
	return near
}

// flip hangs the mark on the other face of its wall, or turns the front of a free target's face round.
func (t *Mark) flip(h Host) bool {
	f := t.place.face
	switch {
	case t.press.down && (f != nil || t.Kind != plan.KindTarget), t.Kind == plan.KindObserver, f == nil && t.Kind != plan.KindTarget:
		return false
	case f == nil:
		t.turn = !t.turn
	default:
		other, ok := f.Other(h.Camera(), t.last.X, t.last.Y, gridStep(h, t.last))
		if !ok {
			return false
		}
		t.side = &other
	}
	if t.edit != nil {
		t.Move(h, t.last)
	}
	return true
}

// startPlace returns where a start goes: on the threshold of a near opening, else on a near face, else on the grid.
func (t *Mark) startPlace(h Host, e Pointer) (placed, *pick.Snap) {
	if d, ok := pick.DoorAt(h.Plan(), h.Camera(), e.X, e.Y); ok && !e.Ctrl {
		return placed{at: d.At, facing: &d.Facing}, &pick.Snap{At: d.At, Kind: pick.SnapAlong, Ref: d.Ref, Edge: alongNormal(d.At, d.Facing)}
	}
	return t.facePlace(h, e)
}

// alongNormal returns a short piece of the line through p that has the given normal, for the snap mark's direction.
func alongNormal(p exact.Pt, normal float64) [2]exact.Pt {
	v := polar(normal-90, 1000)
	return [2]exact.Pt{p.Add(v.Neg()), p.Add(v)}
}

// Key takes the other face of the wall or turns a free target's face round, and lets go of a pressed mark.
func (t *Mark) Key(h Host, k Key) bool {
	switch {
	case k.Name == KeyRune && (k.Rune == 'j' || k.Rune == 'J') && t.flip(h):
		return true
	case k.Name == KeyEscape && t.press.down:
		t.Stop(h)
		return true
	}
	return false
}

// Stop takes the mark off the pointer.
func (t *Mark) Stop(h Host) {
	if t.edit != nil {
		h.Cancel()
	}
	*t = Mark{Kind: t.Kind, turn: t.turn}
}

// Leave takes the mark off the picture.
func (t *Mark) Leave(h Host) { t.Stop(h) }

// Sketch shows the snap mark, and names the observer whose region is to be shown.
func (t *Mark) Sketch(h Host) Sketch {
	s := Sketch{Grip: GripCross, Fault: t.fault, Snap: t.snap, Label: t.label, LabelAt: t.place.at}
	if ref, ok := added(h, t.edit); ok {
		s.Show, s.Dragged = ref, []plan.Ref{ref}
	}
	return s
}

// Hint says what the next click does.
func (t *Mark) Hint(Host) string {
	switch {
	case t.press.moved && t.Kind == plan.KindTarget && t.place.face == nil:
		return "release at the face's other end; J turns its front round"
	case t.press.moved && t.Kind == plan.KindTarget:
		return "release at the face's other end"
	case t.press.moved:
		return "release when it looks the right way, Shift for steps of 15°"
	case t.edit != nil && t.place.face != nil:
		return t.hangs()
	case t.Kind == plan.KindTarget:
		return "click to put a target here, drag for a face; near a wall it hangs on it"
	case t.Kind == plan.KindStart:
		return "click where a walk begins, drag for its direction; a door's threshold takes it"
	}
	return "click to put an observer here, drag to turn it"
}
