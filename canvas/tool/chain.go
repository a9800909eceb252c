package tool

import (
	"fmt"
	"math"

	"enfilade/canvas/pick"
	"enfilade/solver/exact"
	"enfilade/solver/plan"
)

// Chain draws a run of straight pieces corner by corner: walls of every kind, or the outline of the floor, a block or a
// zone. A length and an angle may be typed for each piece.
type Chain struct {
	Kind plan.WallKind
	Ring plan.Kind // KindFloor, KindBlock or KindZone when the run becomes an outline, always closed; else a wall is drawn

	pts    []exact.Pt
	at     exact.Pt // where the next corner would go
	snap   pick.Snap
	here   bool // the pointer is over the picture
	typing typing
	fault  string
}

// Down puts a corner; a double click ends the run, a click on the first corner closes it.
func (t *Chain) Down(h Host, e Pointer) {
	t.aim(h, e)
	if e.Clicks > 1 {
		t.Finish(h)
		return
	}
	t.put(h, t.at)
}

// put adds a corner to the run, or closes it.
func (t *Chain) put(h Host, at exact.Pt) {
	t.typing.clear()
	n := len(t.pts)
	switch {
	case n > 0 && at == t.pts[n-1]:
		return
	case n > 2 && at == t.pts[0]:
		t.pts = append(t.pts, at)
		t.Finish(h)
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
func (t *Chain) target(h Host) (at exact.Pt, fault string) {
	n := len(t.pts)
	if n == 0 || !t.typing.some() {
		return t.at, ""
	}
	a := t.pts[n-1]
	l, fault := t.typing.length(h, 0, exact.Dist(a, t.at))
	deg, fault2 := t.typing.angle(1, bearing(a, t.at))
	if fault == "" {
		fault = fault2
	}
	sin, cos := math.Sincos(deg * math.Pi / 180)
	x, y := float64(a.X)+math.Round(l*cos), float64(a.Y)+math.Round(l*sin)
	lim := float64(plan.MaxCoord)
	return exact.Pt{X: int32(min(max(x, -lim), lim)), Y: int32(min(max(y, -lim), lim))}, fault
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
	to, fault := t.target(h)
	if to != pts[len(pts)-1] {
		pts = append(pts[:len(pts):len(pts)], to)
	}
	e := t.edit(h, pts)
	if e == nil {
		h.Cancel()
	} else if err := h.Preview(e); err != nil {
		t.fault = reason(err)
	}
	if fault != "" {
		t.fault = fault
	}
}

// edit returns the edit that a run through pts means, nil when it is too short for anything.
func (t *Chain) edit(h Host, pts []exact.Pt) plan.Edit {
	if t.ring() {
		if n := len(pts); n > 1 && pts[n-1] == pts[0] {
			pts = pts[:n-1]
		}
		if len(pts) < 3 {
			return nil
		}
		return ringEdit(t.Ring, plan.ChainOf(pts...), h.Defaults())
	}
	if len(pts) < 2 {
		return nil
	}
	return plan.AddWall{Wall: newWall(t.Kind, plan.ChainOf(pts...), h.Defaults())}
}

func (t *Chain) ring() bool { return t.Ring != plan.KindPlan && t.Ring != plan.KindWall }

// ringEdit returns the edit that adds an outline.
func ringEdit(kind plan.Kind, ring plan.Chain, d Defaults) plan.Edit {
	switch kind {
	case plan.KindFloor:
		return plan.SetFloor{Ring: ring}
	case plan.KindZone:
		return plan.AddZone{Zone: plan.Zone{Ring: ring, Room: true}}
	}
	return plan.AddBlock{Block: plan.Block{Ring: ring, Height: d.Height}}
}

// newWall returns a wall of a kind with the measures of new walls.
func newWall(kind plan.WallKind, line plan.Chain, d Defaults) plan.Wall {
	w := plan.Wall{Kind: kind, Line: line, Height: plan.Ceiling}
	switch kind {
	case plan.Solid:
		w.Thickness, w.Height, w.Justify = d.Thickness, d.Height, d.Justify
	case plan.Low:
		w.Thickness, w.Height, w.Justify = d.LowThickness, d.LowHeight, d.Justify
	}
	if d.Thin {
		w.Thickness = 0
	}
	return w
}

// Up does nothing: corners are put when the button goes down.
func (t *Chain) Up(Host, Pointer) {}

// Finish does the run as one step.
func (t *Chain) Finish(h Host) {
	if len(t.pts) == 0 {
		return
	}
	e := t.edit(h, t.pts)
	t.clear()
	if e == nil {
		h.Cancel()
		return
	}
	t.fault = doAdd(h, e)
}

func (t *Chain) clear() {
	t.pts, t.fault = nil, ""
	t.typing.clear()
}

// Key ends the run, takes back its last corner, takes a typed length and angle, and changes the body of the wall.
func (t *Chain) Key(h Host, k Key) bool {
	if k.Name == KeyRune && t.bodyKey(h, k.Rune) {
		return true
	}
	if len(t.pts) == 0 {
		return false
	}
	if t.typing.key(k) {
		t.show(h)
		return true
	}
	switch k.Name {
	case KeyEscape:
		t.Finish(h)
	case KeyEnter:
		if to, fault := t.target(h); t.typing.on {
			if fault == "" {
				t.put(h, to)
			}
			return true
		}
		t.Finish(h)
	case KeyBackspace, KeyDelete, KeyUndo:
		t.back(h)
	default:
		return false
	}
	return true
}

// bodyKey changes where the body of new walls lies, and whether they have one.
func (t *Chain) bodyKey(h Host, r rune) bool {
	if t.ring() || t.Kind != plan.Solid && t.Kind != plan.Low || !changeBody(h, r) {
		return false
	}
	t.show(h)
	return true
}

// changeBody does the keys of every tool that draws walls: J puts the body on the line's other side, H makes it thin or
// thick.
func changeBody(h Host, r rune) bool {
	d := h.Defaults()
	switch r {
	case 'j', 'J':
		d.Justify, d.Thin = (d.Justify+1)%3, false
	case 'h', 'H':
		d.Thin = !d.Thin
	default:
		return false
	}
	h.SetDefaults(d)
	return true
}

// back takes back the last corner.
func (t *Chain) back(h Host) {
	t.pts = t.pts[:len(t.pts)-1]
	if len(t.pts) == 0 {
		t.clear()
		h.Cancel()
		return
	}
	t.show(h)
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
	to, _ := t.target(h)
	s.Band, s.Handles, s.LabelAt = []exact.Pt{t.pts[n-1], to}, t.pts, to
	s.Dragged, s.Types = t.drawn(h), true
	l, deg := h.FormatLength(exact.Dist(t.pts[n-1], to)), degrees(bearing(t.pts[n-1], to))+"°"
	s.Label = l + " · " + deg
	s.Fields = t.typing.fields([2]string{"length", "angle"}, [2]string{l, deg})
	if t.typing.on {
		s.Snap = nil // the fields say where the corner goes
	}
	return s
}

// drawn names what is being drawn: the new item, or the floor.
func (t *Chain) drawn(h Host) []plan.Ref {
	switch t.Ring {
	case plan.KindFloor:
		return []plan.Ref{{Kind: plan.KindFloor}}
	case plan.KindBlock:
		return []plan.Ref{plan.AddBlock{}.Added(h.Plan())}
	case plan.KindZone:
		return []plan.Ref{plan.AddZone{}.Added(h.Plan())}
	}
	return []plan.Ref{plan.AddWall{}.Added(h.Plan())}
}

// Hint says what the next click does.
func (t *Chain) Hint(h Host) string {
	what := t.what()
	body := ""
	if !t.ring() && (t.Kind == plan.Solid || t.Kind == plan.Low) {
		body = bodyHint(h.Defaults(), "left of the line", "right of the line")
	}
	switch n := len(t.pts); {
	case t.typing.on:
		return "Tab goes between length and angle, Enter puts the corner, Esc gives it back to the pointer"
	case n == 0:
		return "click where the " + what + " begins" + body
	case n > 2 && t.at == t.pts[0]:
		return "click to close the " + what
	case n > 2 && t.ring():
		return "click the next corner, or the first one to close; Enter or Esc closes the " + what
	case n == 1 || t.ring():
		return "click the next corner, or type its length; Backspace takes the last one back" + body
	case n == 2:
		return "click the next corner, or type its length; Enter or Esc ends the " + what + body
	}
	return "click the next corner, or the first one to close; Enter or Esc ends the " + what + body
}

func (t *Chain) what() string {
	switch t.Ring {
	case plan.KindFloor:
		return "floor"
	case plan.KindBlock:
		return "block"
	case plan.KindZone:
		return "zone"
	}
	return [...]string{plan.Solid: "wall", plan.Glazing: "glazing", plan.Screen: "screen", plan.Low: "low wall"}[t.Kind]
}

// bodyHint says where the body of new walls lies, and the keys that change it.
func bodyHint(d Defaults, left, right string) string {
	if d.Thin {
		return " · thin (H)"
	}
	return fmt.Sprintf(" · body %s (J), thick (H)", [...]string{plan.Centre: "centred", plan.Left: left, plan.Right: right}[d.Justify])
}
