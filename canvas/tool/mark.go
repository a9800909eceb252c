package tool

import (
	"enfilade/canvas/pick"
	"enfilade/solver/exact"
	"enfilade/solver/plan"
)

// Mark puts down an observer, a target or a start: it follows the pointer as a preview, and a click leaves it there.
type Mark struct {
	Kind plan.Kind // KindObserver, KindTarget or KindStart

	edit  plan.Edit
	snap  *pick.Snap
	fault string
}

// Move carries the mark along.
func (t *Mark) Move(h Host, e Pointer) {
	t.edit, t.snap = t.place(h, e)
	t.fault = ""
	if err := h.Preview(t.edit); err != nil {
		t.fault = reason(err)
	}
}

// Down puts the mark down.
func (t *Mark) Down(h Host, e Pointer) {
	t.Move(h, e)
	edit := t.edit
	t.edit = nil
	t.fault = doAdd(h, edit)
}

// place returns the edit that adds the mark where the pointer is.
func (t *Mark) place(h Host, e Pointer) (plan.Edit, *pick.Snap) {
	switch t.Kind {
	case plan.KindTarget:
		at, normal, snap := targetPlace(h, e)
		return plan.AddTarget{Target: plan.Target{At: at, Normal: normal, Colour: -1}}, snap
	case plan.KindStart:
		at, facing, snap := startPlace(h, e)
		return plan.AddStart{Start: plan.Start{At: at, Facing: facing}}, snap
	}
	snap := h.Snapper().At(plan.New(), h.Camera(), e.X, e.Y, pick.SnapTo{Free: e.Ctrl})
	return plan.AddObserver{Observer: plan.Observer{At: snap.At, Eye: h.Defaults().Eye, View: 360, Colour: -1}}, &snap
}

// targetPlace returns where a target goes: on the free side of a near face, else on the grid.
func targetPlace(h Host, e Pointer) (exact.Pt, *float64, *pick.Snap) {
	if f, ok := pick.FaceAt(h.Plan(), h.Camera(), e.X, e.Y); ok && !e.Ctrl {
		return f.At, &f.Normal, &pick.Snap{At: f.At, Kind: pick.SnapAlong, Ref: f.Ref, Edge: alongNormal(f.At, f.Normal)}
	}
	snap := h.Snapper().At(plan.New(), h.Camera(), e.X, e.Y, pick.SnapTo{Free: e.Ctrl})
	return snap.At, nil, &snap
}

// startPlace returns where a start goes: on the threshold of a near opening, else on a near face, else on the grid.
func startPlace(h Host, e Pointer) (exact.Pt, *float64, *pick.Snap) {
	if d, ok := pick.DoorAt(h.Plan(), h.Camera(), e.X, e.Y); ok && !e.Ctrl {
		return d.At, &d.Facing, &pick.Snap{At: d.At, Kind: pick.SnapAlong, Ref: d.Ref, Edge: alongNormal(d.At, d.Facing)}
	}
	return targetPlace(h, e)
}

// alongNormal returns a short piece of the line through p that has the given normal, for the snap mark's direction.
func alongNormal(p exact.Pt, normal float64) [2]exact.Pt {
	v := polar(normal-90, 1000)
	return [2]exact.Pt{p.Add(v.Neg()), p.Add(v)}
}

// Up does nothing: the mark is put down when the button goes down.
func (t *Mark) Up(Host, Pointer) {}

// Key uses no key.
func (t *Mark) Key(Host, Key) bool { return false }

// Stop takes the mark off the pointer.
func (t *Mark) Stop(h Host) {
	if t.edit != nil {
		h.Cancel()
	}
	t.edit, t.snap, t.fault = nil, nil, ""
}

// Leave takes the mark off the picture.
func (t *Mark) Leave(h Host) { t.Stop(h) }

// Sketch shows the snap mark, and names the observer whose region is to be shown.
func (t *Mark) Sketch(h Host) Sketch {
	s := Sketch{Grip: GripCross, Fault: t.fault, Snap: t.snap}
	if ref, ok := added(h, t.edit); ok {
		s.Show, s.Dragged = ref, []plan.Ref{ref}
	}
	return s
}

// Hint says what the next click does.
func (t *Mark) Hint(Host) string {
	switch t.Kind {
	case plan.KindTarget:
		return "click to put a target here; near a wall it hangs on it"
	case plan.KindStart:
		return "click where a walk begins; a door's threshold takes it"
	}
	return "click to put an observer here"
}
