package tool

import (
	"enfilade/canvas/pick"
	"enfilade/solver/exact"
	"enfilade/solver/plan"
)

// Route draws a walk with waypoints: a click on a start begins it, clicks put the waypoints, a click on a target ends it.
type Route struct {
	from  string // the start; empty until it is clicked
	via   []exact.Pt
	at    exact.Pt
	over  pick.Hit // the start or the target under the pointer
	on    bool
	snap  *pick.Snap
	fault string
}

// Down takes a start, then waypoints, then a target.
func (t *Route) Down(h Host, e Pointer) {
	t.aim(h, e)
	switch {
	case t.from == "" && !t.on:
		t.fault = "a route begins at a start; B puts one down"
		return
	case t.from == "":
		t.from = t.over.Ref.ID
	case t.on:
		t.done(h, t.over.Ref.ID)
		return
	case e.Clicks > 1:
		t.Finish(h)
		return
	case len(t.via) == 0 || t.via[len(t.via)-1] != t.at:
		t.via = append(t.via, t.at)
	}
	t.show(h)
}

// Move carries the next leg along.
func (t *Route) Move(h Host, e Pointer) {
	t.aim(h, e)
	t.show(h)
}

// aim finds the mark under the pointer, a start first and later a target, else where a waypoint would go.
func (t *Route) aim(h Host, e Pointer) {
	kind := plan.KindStart
	if t.from != "" {
		kind = plan.KindTarget
	}
	t.fault = ""
	if t.over, t.on = pick.MarkAt(h.Plan(), h.Camera(), e.X, e.Y, kind); t.on {
		t.at, t.snap = t.over.At, &pick.Snap{At: t.over.At, Kind: pick.SnapCorner, Ref: t.over.Ref}
		return
	}
	to := pick.SnapTo{Free: e.Ctrl}
	if pts := t.points(h); len(pts) > 0 {
		to.From = &pts[len(pts)-1]
	}
	snap := h.Snapper().At(plan.New(), h.Camera(), e.X, e.Y, to)
	t.at, t.snap = snap.At, &snap
}

// points returns the points the route has so far.
func (t *Route) points(h Host) []exact.Pt {
	if t.from == "" {
		return nil
	}
	return pick.RoutePoints(h.Plan(), plan.Route{From: t.from, Via: plan.ChainOf(t.via...)})
}

// show previews the route up to the pointer.
func (t *Route) show(h Host) {
	if t.from == "" {
		return
	}
	r := plan.Route{From: t.from, Via: plan.ChainOf(t.via...)}
	if t.on {
		r.To = t.over.Ref.ID
	}
	if err := h.Preview(plan.AddRoute{Route: r}); err != nil {
		t.fault = reason(err)
	}
}

func (t *Route) done(h Host, to string) {
	r := plan.Route{From: t.from, Via: plan.ChainOf(t.via...), To: to}
	t.clear()
	t.fault = doAdd(h, plan.AddRoute{Route: r})
}

// Finish ends the route at its last waypoint, without a target.
func (t *Route) Finish(h Host) {
	if t.from == "" {
		return
	}
	if len(t.via) == 0 {
		t.Stop(h)
		return
	}
	t.done(h, "")
}

func (t *Route) clear() { t.from, t.via, t.fault = "", nil, "" }

// Up does nothing: points are put when the button goes down.
func (t *Route) Up(Host, Pointer) {}

// Key ends the route, or takes back its last waypoint.
func (t *Route) Key(h Host, k Key) bool {
	if t.from == "" {
		return false
	}
	switch k.Name {
	case KeyEnter, KeyEscape:
		t.Finish(h)
	case KeyBackspace, KeyDelete, KeyUndo:
		if len(t.via) == 0 {
			t.Stop(h)
			return true
		}
		t.via = t.via[:len(t.via)-1]
		t.show(h)
	default:
		return false
	}
	return true
}

// Stop leaves the route undone.
func (t *Route) Stop(h Host) {
	if t.from != "" {
		h.Cancel()
	}
	t.clear()
}

// Leave hides the snap mark; the route stays.
func (t *Route) Leave(Host) { t.snap = nil }

// Sketch shows the next leg with the length of the route so far.
func (t *Route) Sketch(h Host) Sketch {
	s := Sketch{Grip: GripCross, Fault: t.fault, Snap: t.snap}
	if s.LabelAt = t.at; t.from == "" {
		return s
	}
	pts := t.points(h)
	s.Band = append(pts[max(0, len(pts)-1):len(pts):len(pts)], t.at)
	s.Handles = t.via
	s.Dragged = []plan.Ref{plan.AddRoute{}.Added(h.Plan())}
	sum := 0.0
	for i, q := range append(pts, t.at)[1:] {
		sum += exact.Dist(pts[i], q)
	}
	s.Label = h.FormatLength(sum)
	return s
}

// Hint says what the next click does.
func (t *Route) Hint(h Host) string {
	switch {
	case h.Plan().NumStarts() == 0:
		return "a route begins at a start; put one down first (B)"
	case t.from == "" && t.on:
		return "click to begin the route at this start"
	case t.from == "":
		return "click the start where the route begins"
	case t.on:
		return "click to end the route at this target"
	}
	then := ""
	if h.Plan().NumTargets() > 0 {
		then = ", then the target"
	}
	if len(t.via) == 0 {
		return "click waypoints" + then + "; Esc leaves the route"
	}
	return "click waypoints" + then + "; Enter or Esc ends the route here, Backspace takes a point back"
}
