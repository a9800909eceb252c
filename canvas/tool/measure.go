package tool

import (
	"math"

	"enfilade/canvas/pick"
	"enfilade/solver/exact"
)

// Measure shows distances, angles and areas and changes nothing: a line through the clicked places with its length, the angle
// at the last corner, and, once it is closed by a click on its first place, the area in it.
type Measure struct {
	pts    []exact.Pt
	to     exact.Pt
	done   bool // the line is held, closed or not
	closed bool
	press  press
	snap   *pick.Snap
}

// Down sets a place; the first one again closes the line, and a double click ends it.
func (t *Measure) Down(h Host, e Pointer) {
	t.aim(h, e)
	if t.done {
		*t = Measure{snap: t.snap, to: t.to}
	}
	switch n := len(t.pts); {
	case e.Clicks > 1 && n > 1:
		t.done = true
		return
	case n > 2 && t.to == t.pts[0]:
		t.done, t.closed = true, true
		return
	case n == 0 || t.to != t.pts[n-1]:
		t.pts = append(t.pts, t.to)
	}
	if len(t.pts) == 1 {
		t.press = pressAt(e)
	}
}

// Move carries the next place along.
func (t *Measure) Move(h Host, e Pointer) {
	t.press.move(h, e)
	t.aim(h, e)
}

func (t *Measure) aim(h Host, e Pointer) {
	to := pick.SnapTo{Free: e.Ctrl, More: t.pts}
	if n := len(t.pts); n > 0 && !t.done {
		to.From = &t.pts[n-1]
	}
	if t.done {
		to.More = nil
	}
	snap := h.Snapper().At(h.Plan(), h.Camera(), e.X, e.Y, to)
	t.snap, t.to = &snap, snap.At
	if n := len(t.pts); n > 0 && !t.done && e.Shift {
		t.to = eighth(t.pts[n-1], t.to)
	}
}

// Up sets the second place, and holds the line, when the pointer was dragged there from the first.
func (t *Measure) Up(h Host, e Pointer) {
	if t.press.down && t.press.move(h, e) && len(t.pts) == 1 && t.to != t.pts[0] {
		t.pts, t.done = append(t.pts, t.to), true
	}
	t.press = press{}
}

// Key holds the line, takes back its last place, or clears it.
func (t *Measure) Key(_ Host, k Key) bool {
	n := len(t.pts)
	if n == 0 {
		return false
	}
	switch k.Name {
	case KeyEnter:
		t.done = n > 1
		return t.done
	case KeyBackspace, KeyUndo:
		if t.done {
			t.done, t.closed = false, false
		} else {
			t.pts = t.pts[:n-1]
		}
	case KeyEscape:
		*t = Measure{}
	default:
		return false
	}
	return true
}

// Stop clears the measure.
func (t *Measure) Stop(Host) { *t = Measure{} }

// Leave hides the snap mark.
func (t *Measure) Leave(Host) { t.snap = nil }

// Sketch shows the measured line with what it measures.
func (t *Measure) Sketch(h Host) Sketch {
	s := Sketch{Grip: GripCross, Snap: t.snap}
	pts := t.pts
	if n := len(pts); n > 0 && !t.done && t.to != pts[n-1] {
		pts = append(pts[:n:n], t.to)
	}
	if len(pts) < 2 {
		s.Handles = pts
		return s
	}
	s.Handles, s.LabelAt = t.pts, pts[len(pts)-1]
	s.Band = pts
	closing := len(pts) > 3 && pts[len(pts)-1] == pts[0]
	if t.closed {
		s.Band = append(pts[:len(pts):len(pts)], pts[0])
	}
	if closing {
		pts = pts[:len(pts)-1]
	}
	s.Label = t.label(h, pts, t.closed || closing)
	return s
}

// label is what is measured: of one leg its length and direction; of more the length of all, the last leg and the angle at
// the last corner; of a closed line its area and length around.
func (t *Measure) label(h Host, pts []exact.Pt, closed bool) string {
	n, sum := len(pts), 0.0
	for i := 1; i < n; i++ {
		sum += exact.Dist(pts[i-1], pts[i])
	}
	if closed {
		return h.FormatArea(area(pts)) + " · " + h.FormatLength(sum+exact.Dist(pts[n-1], pts[0])) + " around"
	}
	last := h.FormatLength(exact.Dist(pts[n-2], pts[n-1]))
	if n == 2 {
		return last + " · " + degrees(bearing(pts[0], pts[1])) + "°"
	}
	angle := math.Abs(math.Remainder(bearing(pts[n-2], pts[n-1])-bearing(pts[n-2], pts[n-3]), 360))
	return last + " · " + h.FormatLength(sum) + " in all · corner " + degrees(angle) + "°"
}

// area returns the area of a ring in square grid units.
func area(pts []exact.Pt) float64 {
	sum := 0.0
	for i := 2; i < len(pts); i++ {
		sum += float64(exact.Area2(pts[0], pts[i-1], pts[i]))
	}
	return math.Abs(sum) / 2
}

// Hint says what the next click does.
func (t *Measure) Hint(Host) string {
	switch n := len(t.pts); {
	case n == 0 || t.done:
		return "click where to measure from, or drag from place to place"
	case n == 1:
		return "click where to measure to"
	case n == 2:
		return "click on for the length of all and the angle between; Enter holds, Esc clears"
	}
	return "click on, or the first place for the area; Enter holds, Esc clears"
}
