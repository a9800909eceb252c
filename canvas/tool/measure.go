package tool

import (
	"fmt"

	"enfilade/canvas/pick"
	"enfilade/solver/exact"
)

// Measure shows the distance and the direction between two places and changes nothing.
type Measure struct {
	from *exact.Pt
	to   exact.Pt
	held bool // the second place is set
	snap *pick.Snap
}

// Down sets the first place, then the second.
func (t *Measure) Down(h Host, e Pointer) {
	t.aim(h, e)
	if t.from != nil && !t.held {
		t.held = true
		return
	}
	at := t.snap.At
	t.from, t.held = &at, false
}

// Move carries the second place along.
func (t *Measure) Move(h Host, e Pointer) { t.aim(h, e) }

func (t *Measure) aim(h Host, e Pointer) {
	to := pick.SnapTo{Free: e.Ctrl}
	if !t.held {
		to.From = t.from
	}
	snap := h.Snapper().At(h.Plan(), h.Camera(), e.X, e.Y, to)
	t.snap = &snap
	if !t.held {
		t.to = snap.At
	}
}

// Up sets the second place when the pointer was dragged away from the first.
func (t *Measure) Up(_ Host, _ Pointer) {
	if t.from != nil && !t.held && t.to != *t.from {
		t.held = true
	}
}

// Key clears the measure.
func (t *Measure) Key(_ Host, k Key) bool {
	if k.Name != KeyEscape || t.from == nil {
		return false
	}
	*t = Measure{}
	return true
}

// Stop clears the measure.
func (t *Measure) Stop(Host) { *t = Measure{} }

// Leave hides the snap mark.
func (t *Measure) Leave(Host) { t.snap = nil }

// Sketch shows the measured line.
func (t *Measure) Sketch(h Host) Sketch {
	s := Sketch{Grip: GripCross, Snap: t.snap}
	if t.from == nil || t.to == *t.from {
		return s
	}
	s.Band, s.LabelAt = []exact.Pt{*t.from, t.to}, t.to
	s.Label = fmt.Sprintf("%s · %s°", h.FormatLength(exact.Dist(*t.from, t.to)), degrees(bearing(*t.from, t.to)))
	return s
}

// Hint says what the next click does.
func (t *Measure) Hint(Host) string {
	if t.from == nil || t.held {
		return "click where to measure from"
	}
	return "click where to measure to"
}
