package gui

import (
	"strings"

	"enfilade/canvas/pick"
	"enfilade/canvas/view"
	"enfilade/solver/plan"
)

// prefSnap keeps the kinds of snapping that are switched off, so that a kind that comes with a later version is on.
const prefSnap = "snap.off"

// snapKinds are the kinds of snapping that can be switched, in the order of the menu.
var snapKinds = []struct {
	kind pick.SnapKind
	name string
}{
	{pick.SnapCorner, "Ends and corners"}, {pick.SnapMiddle, "Middles"}, {pick.SnapCrossing, "Crossings"},
	{pick.SnapAlong, "Along walls and edges"}, {pick.SnapSquare, "Square to an edge"},
	{pick.SnapParallel, "Parallel to an edge"}, {pick.SnapInLine, "In line with points"}, {pick.SnapGrid, "Grid"},
}

// snapSet reads from the preferences what is snapped to.
func (w *window) snapSet() pick.Set {
	return pick.AllSnaps &^ pick.Set(w.app.Preferences().Int(prefSnap))
}

// setSnaps takes over what is snapped to and remembers it.
func (w *window) setSnaps(on pick.Set) {
	w.snapper.On = on
	w.app.Preferences().SetInt(prefSnap, int(pick.AllSnaps&^on))
	if w.view.inside {
		w.tool.Move(w.host, w.view.pointer(w.view.last, 0))
	}
	w.acted()
}

// snapMenu switches each kind of snapping.
func (w *window) snapMenu() []command {
	on := w.snapper.On
	list := []command{{label: "Snap to, unless Ctrl is held"}}
	for _, k := range snapKinds {
		list = append(list, command{label: k.name, inner: true, checked: on.Has(k.kind),
			do: func() { w.setSnaps(on.With(k.kind, !on.Has(k.kind))) }})
	}
	return append(list,
		command{label: "Everything", do: func() { w.setSnaps(pick.AllSnaps) }, dead: on == pick.AllSnaps, rule: true},
		command{label: "Nothing", do: func() { w.setSnaps(0) }, dead: on == 0})
}

// snapText says what the pointer snaps to.
func (w *window) snapText(s *pick.Snap, cam view.Camera) string {
	if cam.Scale == 0 {
		return ""
	}
	grid := strings.TrimSpace("Snap: grid " + formatLength(w.host.Snapper().Step(cam), w.unit()) + " " + unitMark(w.unit()))
	if !w.snapper.On.Has(pick.SnapGrid) {
		grid = "Snap: no grid"
	}
	if s == nil {
		return grid
	}
	switch s.Kind {
	case pick.SnapCorner:
		if s.Ref.Kind == plan.KindWall {
			return "Snap: wall corner"
		}
		return "Snap: corner"
	case pick.SnapMiddle:
		if s.Edge[0] == s.Edge[1] {
			return "Snap: centre"
		}
		return "Snap: middle"
	case pick.SnapCrossing:
		return "Snap: crossing"
	case pick.SnapSquare:
		return "Snap: square to edge"
	case pick.SnapParallel:
		return "Snap: parallel"
	case pick.SnapInLine:
		return "Snap: in line"
	case pick.SnapAlong:
		switch s.Ref.Kind {
		case plan.KindOpening:
			return "Snap: threshold"
		case plan.KindWall:
			return "Snap: along wall"
		}
		return "Snap: along edge"
	case pick.SnapNone:
		return "Snap: off"
	}
	return grid
}
