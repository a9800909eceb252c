package tool

import (
	"enfilade/canvas/pick"
	"enfilade/solver/exact"
	"enfilade/solver/plan"
)

// Round puts down round blocks: columns. One of the last radius hangs on the pointer, and a click leaves it there; a drag
// from the centre, or a typed number, gives it another radius.
type Round struct {
	at     exact.Pt
	radius float64 // while it is dragged out, else 0
	snap   *pick.Snap
	press  press
	edit   plan.Edit
	typing typing
	fault  string
}

// Down puts the centre.
func (t *Round) Down(h Host, e Pointer) {
	t.aim(h, e)
	t.press = pressAt(e)
	t.show(h)
}

// Move carries the column along, or draws it out.
func (t *Round) Move(h Host, e Pointer) {
	if t.press.move(h, e) {
		snap := h.Snapper().At(h.Plan(), h.Camera(), e.X, e.Y, pick.SnapTo{Free: e.Ctrl, From: &t.at})
		t.snap, t.radius = &snap, exact.Dist(t.at, snap.At)
	} else if !t.press.down {
		t.aim(h, e)
	}
	t.show(h)
}

func (t *Round) aim(h Host, e Pointer) {
	snap := h.Snapper().At(h.Plan(), h.Camera(), e.X, e.Y, pick.SnapTo{Free: e.Ctrl})
	t.snap, t.at, t.radius = &snap, snap.At, 0
}

// size returns the radius: what was typed, what was dragged out, or the last one.
func (t *Round) size(h Host) (float64, string) {
	live := t.radius
	if live == 0 {
		live = float64(h.Defaults().ColumnRadius)
	}
	v, fault := t.typing.length(h, 0, live)
	if fault == "" && (v < 1 || v > float64(plan.MaxRound)) {
		return live, "a radius up to " + h.FormatLength(float64(plan.MaxRound)) + ", please"
	}
	return v, fault
}

func (t *Round) show(h Host) {
	t.typing.one = true
	t.fault = ""
	r, fault := t.size(h)
	t.edit = column(t.at, int32(r), h.Defaults().Height)
	if err := h.Preview(t.edit); err != nil {
		t.fault = reason(err)
	}
	if fault != "" {
		t.fault = fault
	}
}

// column returns the edit that adds a round block.
func column(at exact.Pt, radius, height int32) plan.Edit {
	return Named("draw column", plan.AddBlock{Block: plan.Block{Ring: plan.RoundRing(at, radius), Height: height,
		Circle: &plan.Circle{At: at, Radius: radius}}})
}

// Up leaves the column there; the next one gets its radius.
func (t *Round) Up(h Host, e Pointer) {
	if !t.press.down {
		return
	}
	t.Move(h, e)
	t.put(h)
}

func (t *Round) put(h Host) {
	r, fault := t.size(h)
	t.press, t.radius, t.edit = press{}, 0, nil
	if fault != "" {
		t.fault = fault
		return
	}
	d := h.Defaults()
	d.ColumnRadius = int32(r)
	h.SetDefaults(d)
	t.typing.clear()
	t.fault = doAdd(h, column(t.at, d.ColumnRadius, d.Height))
}

// Key takes a typed radius, and lets go of a pressed centre.
func (t *Round) Key(h Host, k Key) bool {
	if t.snap == nil {
		return false
	}
	if t.typing.key(k) {
		t.show(h)
		return true
	}
	switch {
	case k.Name == KeyEnter && t.typing.some():
		t.put(h)
	case k.Name == KeyEscape && t.press.down:
		t.Stop(h)
	default:
		return false
	}
	return true
}

// Stop takes the column off the pointer.
func (t *Round) Stop(h Host) {
	if t.edit != nil {
		h.Cancel()
	}
	*t = Round{}
}

// Leave takes the column off the picture.
func (t *Round) Leave(h Host) { t.Stop(h) }

// Sketch shows the column's radius.
func (t *Round) Sketch(h Host) Sketch {
	s := Sketch{Grip: GripCross, Fault: t.fault, Snap: t.snap}
	ref, ok := added(h, t.edit)
	if !ok {
		return s
	}
	s.Dragged, s.Types = []plan.Ref{ref}, true
	r, _ := t.size(h)
	live := h.FormatLength(r)
	s.Fields = t.typing.fields([2]string{"radius"}, [2]string{live})
	if s.LabelAt = t.at; t.press.moved {
		s.Label = "radius " + live
		s.LabelAt = t.snap.At
		s.Band = []exact.Pt{t.at, t.snap.At}
	}
	return s
}

// Hint says what the next click does.
func (t *Round) Hint(h Host) string {
	switch {
	case t.typing.on:
		return "click or Enter puts the column down, Esc gives its radius back"
	case t.press.moved:
		return "release when the column is wide enough"
	}
	return "click for a column, drag from its centre or type a number for another radius"
}
