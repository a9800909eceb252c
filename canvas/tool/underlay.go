package tool

import (
	"math"

	"enfilade/solver/exact"
	"enfilade/solver/plan"
)

// UnderlayJob is what an [Underlay] tool does.
type UnderlayJob uint8

// The jobs with the underlay.
const (
	MoveUnderlay       UnderlayJob = iota // drag it
	ScaleUnderlay                         // two clicks, and the distance between them typed
	StraightenUnderlay                    // two clicks on what is level or upright
)

// Underlay moves the picture to trace over, sets its scale and turns it straight. Nothing snaps: its places are those of
// the picture.
type Underlay struct {
	Job  UnderlayJob
	Done func() // told when the scale is set or the picture is straight; may be nil

	from   *exact.Pt // the first place
	to     exact.Pt
	held   bool // the second place is set, and its distance is being typed
	drag   bool
	edit   plan.Edit
	typing typing
	fault  string
}

var theUnderlay = plan.Ref{Kind: plan.KindUnderlay}

// under returns the underlay when there is one that may be changed.
func (t *Underlay) under(h Host) (plan.Underlay, bool) {
	u := h.Plan().Sheet().Underlay
	if u == nil || u.Locked {
		return plan.Underlay{}, false
	}
	return *u, true
}

// covers reports whether a place lies on the picture.
func covers(host Host, u plan.Underlay, p exact.Pt) bool {
	w, h := host.UnderlaySize()
	sin, cos := math.Sincos(u.Turn * math.Pi / 180)
	x, y := float64(p.X)-float64(u.At.X), float64(p.Y)-float64(u.At.Y)
	x, y = x*cos+y*sin, y*cos-x*sin
	pixel := u.MMPerPixel * exact.PerMM
	return x >= 0 && y >= 0 && x <= float64(w)*pixel && y <= float64(h)*pixel
}

// Down takes hold of the picture, or sets a place.
func (t *Underlay) Down(h Host, e Pointer) {
	u, ok := t.under(h)
	at := h.Camera().Grid(e.X, e.Y)
	switch {
	case !ok || t.held:
	case t.Job == MoveUnderlay:
		if covers(h, u, at) {
			t.from, t.to, t.drag = &at, at, true
		}
	case t.from == nil:
		t.from, t.to = &at, at
	default:
		t.to = at
		t.second(h)
	}
}

// Move carries the picture, or the second place, along.
func (t *Underlay) Move(h Host, e Pointer) {
	if t.from == nil || t.held {
		return
	}
	t.to = h.Camera().Grid(e.X, e.Y)
	if !t.drag {
		return
	}
	t.edit, t.fault = nil, ""
	if t.to == *t.from {
		h.Cancel()
		return
	}
	t.edit = plan.MoveItems{Items: []plan.Ref{theUnderlay}, By: t.to.Sub(*t.from)}
	if err := h.Preview(t.edit); err != nil {
		t.fault = reason(err)
	}
}

// Up puts the picture down; a line that was dragged out is as good as two clicks.
func (t *Underlay) Up(h Host, e Pointer) {
	switch {
	case t.drag:
		edit := t.edit
		t.from, t.drag, t.edit, t.fault = nil, false, nil, ""
		if edit != nil {
			_ = h.Do(edit) // one that cannot be done goes back; its reason was shown
		}
	case t.from != nil && !t.held && exact.Dist(*t.from, h.Camera().Grid(e.X, e.Y)) > unitsOf(h, 2*dragStart):
		t.Move(h, e)
		t.second(h)
	}
}

// second takes the second place.
func (t *Underlay) second(h Host) {
	if t.to == *t.from {
		return
	}
	if t.Job == ScaleUnderlay {
		t.held = true
		t.typing = typing{one: true, on: true}
		return
	}
	t.straighten(h)
}

// straighten turns the picture about the first place so that the line becomes level or upright, whichever is nearer.
func (t *Underlay) straighten(h Host) {
	u, ok := t.under(h)
	if !ok {
		return
	}
	deg := bearing(*t.from, t.to)
	by := math.Round(deg/90)*90 - deg
	sin, cos := math.Sincos(by * math.Pi / 180)
	x, y := float64(u.At.X)-float64(t.from.X), float64(u.At.Y)-float64(t.from.Y)
	at, ok := offsetBy(*t.from, x*cos-y*sin, x*sin+y*cos)
	u.At, u.Turn = at, math.Remainder(u.Turn+by, 360)
	t.finish(h, ok, Named("straighten underlay", plan.SetUnderlay{Underlay: u}))
}

// scale makes the distance between the two places what was typed; the first one stays where it is.
func (t *Underlay) scale(h Host) {
	u, ok := t.under(h)
	if !ok {
		return
	}
	is := exact.Dist(*t.from, t.to)
	want, fault := t.typing.length(h, 0, is)
	if fault == "" && want <= 0 {
		fault = "a distance above 0, please"
	}
	if fault != "" {
		t.fault = fault
		return
	}
	k := want / is
	at, ok := offsetBy(*t.from, k*(float64(u.At.X)-float64(t.from.X)), k*(float64(u.At.Y)-float64(t.from.Y)))
	u.At, u.MMPerPixel = at, u.MMPerPixel*k
	t.finish(h, ok, Named("set underlay's scale", plan.SetUnderlay{Underlay: u}))
}

// offsetBy returns the grid point that lies by x, y grid units off p; ok is false beyond the legal range.
func offsetBy(p exact.Pt, x, y float64) (q exact.Pt, ok bool) {
	x, y = math.Round(float64(p.X)+x), math.Round(float64(p.Y)+y)
	if math.Abs(x) > float64(plan.MaxCoord) || math.Abs(y) > float64(plan.MaxCoord) {
		return p, false
	}
	return exact.Pt{X: int32(x), Y: int32(y)}, true
}

// finish does the edit; one that cannot be done is told, and the two places stay.
func (t *Underlay) finish(h Host, inRange bool, e plan.Edit) {
	if !inRange {
		t.fault = "that takes the picture beyond the plan's 50 km"
		return
	}
	if err := h.Do(e); err != nil {
		t.fault = reason(err)
		return
	}
	t.Stop(h)
	if t.Done != nil {
		t.Done()
	}
}

// Key takes a typed distance, and steps back.
func (t *Underlay) Key(h Host, k Key) bool {
	switch {
	case k.Name == KeyEscape && t.drag:
		t.Stop(h)
		return true
	case k.Name == KeyEscape && t.held:
		t.held, t.fault = false, ""
		t.typing.clear()
		return true
	case k.Name == KeyEscape && t.from != nil:
		t.Stop(h)
		return true
	case k.Name == KeyEnter && t.held:
		t.scale(h)
		return true
	case t.held:
		t.fault = ""
		return t.typing.key(k)
	}
	return t.nudge(h, k)
}

// nudge moves the picture by an arrow key, and takes it away by Delete.
func (t *Underlay) nudge(h Host, k Key) bool {
	switch k.Name {
	case KeyDelete, KeyBackspace:
		if _, ok := t.under(h); ok && t.from == nil {
			return h.Do(plan.Delete{Items: []plan.Ref{theUnderlay}}) == nil
		}
	case KeyLeft, KeyRight, KeyUp, KeyDown:
		if _, ok := t.under(h); ok && t.from == nil {
			return h.Do(plan.MoveItems{Items: []plan.Ref{theUnderlay}, By: nudge(h, k)}) == nil
		}
	}
	return false
}

// Stop leaves what is half done.
func (t *Underlay) Stop(h Host) {
	if t.drag {
		h.Cancel()
	}
	*t = Underlay{Job: t.Job, Done: t.Done}
}

// Leave does nothing: the line waits where it was.
func (t *Underlay) Leave(Host) {}

// Sketch shows the line between the two places.
func (t *Underlay) Sketch(h Host) Sketch {
	s := Sketch{Grip: GripCross, Fault: t.fault}
	_, free := t.under(h)
	switch {
	case !free:
		s.Grip = GripArrow
	case t.Job == MoveUnderlay:
		s.Grip = GripHand
		if t.drag {
			s.Dragged = []plan.Ref{theUnderlay}
			s.Label, s.LabelAt = h.FormatLength(exact.Dist(*t.from, t.to)), t.to
		}
	case t.from != nil && t.to != *t.from:
		s.Band, s.LabelAt = []exact.Pt{*t.from, t.to}, t.to
		length := h.FormatLength(exact.Dist(*t.from, t.to))
		s.Label = length
		if t.Job == StraightenUnderlay {
			s.Label = turnWords(*t.from, t.to)
		}
		if t.held {
			s.Types = true
			s.Fields = t.typing.fields([2]string{"distance"}, [2]string{length})
		}
	}
	return s
}

// turnWords says what a line will become.
func turnWords(a, b exact.Pt) string {
	deg := bearing(a, b)
	if n := int(math.Round(deg / 90)); n%2 == 0 {
		return degrees(deg) + "° → level"
	}
	return degrees(deg) + "° → upright"
}

// Hint says what the next click does.
func (t *Underlay) Hint(h Host) string {
	u := h.Plan().Sheet().Underlay
	switch {
	case u == nil:
		return "there is no underlay; File > Underlay… lays a picture under the plan"
	case u.Locked:
		return "the underlay is locked; its form unlocks it"
	case t.Job == MoveUnderlay:
		return "drag the picture; " + nudgeWords(h) + "; Esc when it lies right"
	case t.held:
		return "type the true distance and press Enter"
	case t.from == nil && t.Job == ScaleUnderlay:
		return "click one end of a distance that you know"
	case t.from == nil:
		return "click one end of a line that is level or upright"
	}
	return "click its other end"
}
