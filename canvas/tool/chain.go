package tool

import (
	"fmt"
	"math"
	"strings"

	"enfilade/canvas/pick"
	"enfilade/solver/exact"
	"enfilade/solver/plan"
)

// Chain draws a run of straight pieces corner by corner: walls of every kind, and the floor.
type Chain struct {
	Kind  plan.WallKind
	Floor bool // the run becomes the floor, always closed

	pts     []exact.Pt
	at      exact.Pt // where the next corner would go
	snap    pick.Snap
	here    bool   // the pointer is over the picture
	length  string // typed length and angle
	angle   string
	inAngle bool
	fault   string
}

// Down puts a corner; a double click ends the run, a click on the first corner closes it.
func (t *Chain) Down(h Host, e Pointer) {
	t.aim(h, e)
	if e.Clicks > 1 {
		t.finish(h)
		return
	}
	t.put(h, t.at)
}

// put adds a corner to the run, or closes it.
func (t *Chain) put(h Host, at exact.Pt) {
	t.length, t.angle, t.inAngle = "", "", false
	n := len(t.pts)
	switch {
	case n > 0 && at == t.pts[n-1]:
		return
	case n > 2 && at == t.pts[0]:
		t.pts = append(t.pts, at)
		t.finish(h)
		return
	}
	t.pts = append(t.pts, at)
	t.show(h)
}

// Move carries the rubber band along.
func (t *Chain) Move(h Host, e Pointer) {
	t.aim(h, e)
	t.show(h)
}

// aim finds where the next corner would go.
func (t *Chain) aim(h Host, e Pointer) {
	to := pick.SnapTo{Free: e.Ctrl, More: t.pts}
	if n := len(t.pts); n > 0 {
		to.From = &t.pts[n-1]
	}
	t.snap, t.here = h.Snapper().At(h.Plan(), h.Camera(), e.X, e.Y, to), true
	t.at = t.snap.At
	if n := len(t.pts); n > 0 && e.Shift {
		t.at = eighth(t.pts[n-1], t.at)
		t.snap = pick.Snap{At: t.at, Kind: pick.SnapGrid}
	}
}

// eighth returns the point nearest to b on the eight directions from a.
func eighth(a, b exact.Pt) exact.Pt {
	dx, dy := float64(b.X)-float64(a.X), float64(b.Y)-float64(a.Y)
	switch ax, ay := math.Abs(dx), math.Abs(dy); {
	case ay < ax*math.Tan(math.Pi/8):
		return exact.Pt{X: b.X, Y: a.Y}
	case ax < ay*math.Tan(math.Pi/8):
		return exact.Pt{X: a.X, Y: b.Y}
	default:
		d := math.Round((ax + ay) / 2)
		return exact.Pt{X: a.X + int32(math.Copysign(d, dx)), Y: a.Y + int32(math.Copysign(d, dy))}
	}
}

// target returns where the next corner goes: what was typed counts before the pointer.
func (t *Chain) target(h Host) exact.Pt {
	n := len(t.pts)
	if n == 0 || t.length == "" && t.angle == "" {
		return t.at
	}
	a := t.pts[n-1]
	l, deg := exact.Dist(a, t.at), bearing(a, t.at)
	if v, err := h.ParseLength(t.length); t.length != "" && err == nil {
		l = float64(v)
	}
	if v, err := parseAngle(t.angle); t.angle != "" && err == nil {
		deg = v
	}
	sin, cos := math.Sincos(deg * math.Pi / 180)
	x, y := float64(a.X)+math.Round(l*cos), float64(a.Y)+math.Round(l*sin)
	lim := float64(plan.MaxCoord)
	return exact.Pt{X: int32(min(max(x, -lim), lim)), Y: int32(min(max(y, -lim), lim))}
}

func bearing(a, b exact.Pt) float64 {
	return math.Atan2(float64(b.Y)-float64(a.Y), float64(b.X)-float64(a.X)) * 180 / math.Pi
}

// show previews the run with the rubber band as its last piece.
func (t *Chain) show(h Host) {
	t.fault = ""
	if len(t.pts) == 0 {
		return
	}
	pts := t.pts
	if to := t.target(h); to != pts[len(pts)-1] {
		pts = append(pts[:len(pts):len(pts)], to)
	}
	e := t.edit(h, pts)
	if e == nil {
		h.Cancel()
		return
	}
	if err := h.Preview(e); err != nil {
		t.fault = reason(err)
	}
}

// edit returns the edit that a run through pts means, nil when it is too short for anything.
func (t *Chain) edit(h Host, pts []exact.Pt) plan.Edit {
	if t.Floor {
		if n := len(pts); n > 1 && pts[n-1] == pts[0] {
			pts = pts[:n-1]
		}
		if len(pts) < 3 {
			return nil
		}
		return plan.SetFloor{Ring: plan.ChainOf(pts...)}
	}
	if len(pts) < 2 {
		return nil
	}
	d := h.Defaults()
	w := plan.Wall{Kind: t.Kind, Line: plan.ChainOf(pts...), Height: plan.Ceiling}
	switch t.Kind {
	case plan.Solid:
		w.Thickness, w.Height = d.Thickness, d.Height
	case plan.Low:
		w.Thickness, w.Height = d.LowThickness, d.LowHeight
	}
	return plan.AddWall{Wall: w}
}

// Up does nothing: corners are put when the button goes down.
func (t *Chain) Up(Host, Pointer) {}

// finish does the run as one step.
func (t *Chain) finish(h Host) {
	e := t.edit(h, t.pts)
	t.clear()
	if e == nil {
		h.Cancel()
		return
	}
	t.fault = doAdd(h, e)
}

func (t *Chain) clear() {
	t.pts, t.length, t.angle, t.inAngle, t.fault = nil, "", "", false, ""
}

// Key ends the run, takes back its last corner, and takes a typed length and angle.
func (t *Chain) Key(h Host, k Key) bool {
	if len(t.pts) == 0 {
		return false
	}
	typing := t.length != "" || t.angle != ""
	switch k.Name {
	case KeyEscape:
		if typing {
			t.length, t.angle, t.inAngle = "", "", false
			t.show(h)
			return true
		}
		t.finish(h)
	case KeyEnter:
		if typing {
			t.put(h, t.target(h))
			return true
		}
		t.finish(h)
	case KeyBackspace, KeyDelete:
		t.back(h)
	case KeyTab:
		t.inAngle = !t.inAngle
	case KeyRune:
		return t.typed(h, k.Rune)
	default:
		return false
	}
	return true
}

// back takes back the last typed character, or the last corner.
func (t *Chain) back(h Host) {
	field := &t.length
	if t.inAngle {
		field = &t.angle
	}
	if r := []rune(*field); len(r) > 0 {
		*field = string(r[:len(r)-1])
		t.show(h)
		return
	}
	t.pts = t.pts[:len(t.pts)-1]
	if len(t.pts) == 0 {
		t.clear()
		h.Cancel()
		return
	}
	t.show(h)
}

// typed takes a character of a length or an angle.
func (t *Chain) typed(h Host, r rune) bool {
	begun := t.length != "" || t.angle != ""
	if !strings.ContainsRune("0123456789.,-'\"/ ", r) && !(begun && strings.ContainsRune("mcftin°", r)) || r == ' ' && !begun {
		return false
	}
	if t.inAngle {
		t.angle += string(r)
	} else {
		t.length += string(r)
	}
	t.show(h)
	return true
}

// Stop leaves the run undone.
func (t *Chain) Stop(h Host) {
	if len(t.pts) > 0 {
		h.Cancel()
	}
	t.clear()
	t.here = false
}

// Leave hides the snap mark; the run stays.
func (t *Chain) Leave(Host) { t.here = false }

// Sketch shows the rubber band with its length and angle.
func (t *Chain) Sketch(h Host) Sketch {
	s := Sketch{Grip: GripCross, Fault: t.fault}
	if t.here {
		snap := t.snap
		s.Snap = &snap
	}
	n := len(t.pts)
	if n == 0 {
		return s
	}
	to := t.target(h)
	s.Band, s.Handles, s.LabelAt = []exact.Pt{t.pts[n-1], to}, t.pts, to
	s.Dragged = t.drawn(h)
	s.Label = fmt.Sprintf("%s · %s°", h.FormatLength(exact.Dist(t.pts[n-1], to)), degrees(bearing(t.pts[n-1], to)))
	if t.length != "" || t.angle != "" || t.inAngle {
		s.Typed = true
		s.Label = t.typedLabel()
	}
	return s
}

// drawn names what is being drawn: the new wall, or the floor.
func (t *Chain) drawn(h Host) []plan.Ref {
	if t.Floor {
		return []plan.Ref{{Kind: plan.KindFloor}}
	}
	return []plan.Ref{plan.AddWall{}.Added(h.Plan())}
}

// typedLabel shows both fields, the one that is being typed with a bar behind it.
func (t *Chain) typedLabel() string {
	l, a := orDash(t.length), orDash(t.angle)
	if t.inAngle {
		return fmt.Sprintf("%s · ∠ %s|", l, strings.TrimSuffix(a, "–"))
	}
	return fmt.Sprintf("%s| · ∠ %s", strings.TrimSuffix(l, "–"), a)
}

func orDash(s string) string {
	if s == "" {
		return "–"
	}
	return s
}

// Hint says what the next click does.
func (t *Chain) Hint(Host) string {
	what := [...]string{plan.Solid: "wall", plan.Glazing: "glazing", plan.Screen: "screen", plan.Low: "low wall"}[t.Kind]
	if t.Floor {
		what = "floor"
	}
	switch n := len(t.pts); {
	case n == 0:
		return "click where the " + what + " begins"
	case n < 3:
		return "click the next corner, or type its length; Enter or Esc ends the " + what
	}
	return "click the next corner, or the first one to close the " + what + "; Enter ends it"
}
