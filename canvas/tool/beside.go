package tool

import (
	"math"

	"enfilade/canvas/pick"
	"enfilade/solver/exact"
	"enfilade/solver/plan"
)

// Beside draws a wall parallel to the selected one, or to the one that is clicked first, at the pointer's distance or at one
// that is typed.
type Beside struct {
	wall   string
	edit   plan.ParallelWall
	on     bool // there is an edit
	at     exact.Pt
	typing typing
	hover  plan.Ref
	fault  string
}

// Down chooses the wall, then draws the parallel one.
func (t *Beside) Down(h Host, e Pointer) {
	t.Move(h, e)
	if t.wall == "" {
		if w, ok := wallUnder(h, e); ok {
			t.wall = w.ID
			h.Select(plan.Ref{Kind: plan.KindWall, ID: w.ID})
		}
		return
	}
	t.put(h)
}

// put draws the wall; the next one is parallel to it.
func (t *Beside) put(h Host) {
	if !t.on || t.fault != "" {
		return
	}
	next := t.edit.Added(h.Plan()).ID
	if t.fault = doAdd(h, t.edit); t.fault == "" {
		*t = Beside{wall: next, typing: typing{one: true}}
	}
}

// Move carries the parallel wall along.
func (t *Beside) Move(h Host, e Pointer) {
	t.hover, t.fault = plan.Ref{}, ""
	if _, ok := h.Plan().Wall(t.wall); !ok {
		t.wall = ""
		if walls := chosenWalls(h); len(walls) == 1 && len(h.Selection()) == 1 {
			t.wall = walls[0].ID
		}
	}
	w, ok := h.Plan().Wall(t.wall)
	if !ok {
		t.on = false
		if under, ok := wallUnder(h, e); ok {
			t.hover = plan.Ref{Kind: plan.KindWall, ID: under.ID}
		}
		return
	}
	t.at = h.Camera().Grid(e.X, e.Y)
	off := asideOf(w.Line, t.at)
	if step := gridStep(h, e); step > 0 {
		off = math.Round(off/float64(step)) * float64(step)
	}
	t.edit = plan.ParallelWall{Wall: w.ID, Distance: int32(math.Abs(off)), Right: off < 0}
	t.show(h)
}

// show previews the wall, at the typed distance when there is one.
func (t *Beside) show(h Host) {
	t.fault = ""
	v, fault := t.typing.length(h, 0, float64(t.edit.Distance))
	if fault != "" {
		t.fault = fault
		return
	}
	t.edit.Distance = int32(v)
	if t.on = t.edit.Distance > 0; !t.on {
		h.Cancel()
		return
	}
	if err := h.Preview(t.edit); err != nil {
		h.Cancel()
		t.fault = reason(err)
	}
}

// asideOf returns how far q lies to the left of the straight piece of a line that is nearest to it; negative to the right.
func asideOf(line plan.Chain, q exact.Pt) float64 {
	best, off := math.Inf(1), 0.0
	for i := range line.Len() - 1 {
		a, b := line.At(i), line.At(i+1)
		if a == b {
			continue
		}
		v, w := b.Sub(a), q.Sub(a)
		long := exact.Dist(a, b)
		along := float64(v.Dot(w)) / long
		aside := float64(v.Cross(w)) / long
		beyond := max(-along, along-long, 0)
		if d := math.Hypot(beyond, aside); d < best || d == best && math.Abs(aside) > math.Abs(off) {
			best, off = d, aside
		}
	}
	return off
}

// Up does nothing.
func (t *Beside) Up(Host, Pointer) {}

// Key types the distance.
func (t *Beside) Key(h Host, k Key) bool {
	if t.typing.one = true; t.wall == "" {
		return false
	}
	if t.typing.key(k) {
		t.show(h)
		return true
	}
	if k.Name != KeyEnter {
		return false
	}
	t.put(h)
	return true
}

// Stop ends the preview.
func (t *Beside) Stop(h Host) {
	h.Cancel()
	*t = Beside{}
}

// Leave ends the preview, but for one whose distance is typed.
func (t *Beside) Leave(h Host) {
	if !t.typing.some() {
		h.Cancel()
		t.on = false
	}
	t.hover = plan.Ref{}
}

// Sketch shows the distance.
func (t *Beside) Sketch(h Host) Sketch {
	s := Sketch{Grip: GripCross, Hover: t.hover, Fault: t.fault, LabelAt: t.at}
	if t.fault != "" {
		s.Snap = &pick.Snap{At: t.at}
	}
	if t.on {
		s.Dragged = []plan.Ref{t.edit.Added(h.Plan())}
		s.Label, s.Types = h.FormatLength(float64(t.edit.Distance)), true
		s.Fields = t.typing.fields([2]string{"distance"}, [2]string{s.Label})
	}
	return s
}

// Hint says what the next click does.
func (t *Beside) Hint(Host) string {
	if t.wall == "" {
		return "click the wall to draw a parallel to"
	}
	return "click beside it, or type the distance between the lines and press Enter"
}
