package tool_test

import (
	"slices"
	"testing"

	"enfilade/canvas/tool"
	"enfilade/solver/exact"
	"enfilade/solver/plan"
)

func ref(k plan.Kind, id string) plan.Ref { return plan.Ref{Kind: k, ID: id} }

func corner() plan.Parts {
	return plan.Parts{
		Walls: []plan.Wall{
			{ID: "W1", Line: plan.ChainOf(m(-5, 0), m(0, 0)), Thickness: 2000, Height: plan.Ceiling},
			{ID: "W2", Line: plan.ChainOf(m(0, 0), m(0, 5)), Thickness: 2000, Height: plan.Ceiling},
		},
		Openings:  []plan.Opening{{ID: "D1", Wall: "W1", At: 20000, Width: 9000}},
		Blocks:    []plan.Block{{ID: "B1", Ring: plan.ChainOf(m(2, 2), m(4, 2), m(4, 4), m(2, 4))}},
		Observers: []plan.Observer{{ID: "O1", At: m(3, -3), View: 360, Eye: 16000}},
		Targets:   []plan.Target{{ID: "T1", At: m(-4, 3)}},
		Starts:    []plan.Start{{ID: "S1", At: m(-4, -3)}},
	}
}

func TestSelectClicks(t *testing.T) {
	h := newHost(t, corner())
	s := &tool.Select{}
	h.click(s, 3, -3)
	if len(h.selected) != 1 || h.selected[0] != ref(plan.KindObserver, "O1") {
		t.Errorf("selected %v", h.selected)
	}
	e := h.at(3, 3)
	e.Shift = true
	s.Down(h, e)
	s.Up(h, e)
	if len(h.selected) != 2 || h.selected[1] != ref(plan.KindBlock, "B1") {
		t.Errorf("with Shift selected %v", h.selected)
	}
	s.Down(h, e)
	s.Up(h, e)
	if len(h.selected) != 1 {
		t.Errorf("with Shift again selected %v", h.selected)
	}
	h.click(s, -2, -4)
	if len(h.selected) != 0 {
		t.Errorf("on empty ground selected %v", h.selected)
	}
	h.steps()
}

func TestSelectDragsAnObserver(t *testing.T) {
	h := newHost(t, corner())
	s := &tool.Select{}
	h.press(s, 3.05, -3.02) // a little beside its middle: it must not jump
	h.dragTo(s, 3.06, -3.02)
	if h.shown != h.plan {
		t.Error("a press that hardly moves is no drag")
	}
	h.dragTo(s, 4.05, -4.02)
	if o, _ := h.shown.Observer("O1"); o.At != m(4, -4) {
		t.Errorf("previewed at %v, want 4, -4", o.At)
	}
	if k := s.Sketch(h); len(k.Dragged) != 1 || k.Label != "1.41 m" {
		t.Errorf("sketch %+v", k)
	}
	s.Up(h, h.at(4.05, -4.02))
	if o, _ := h.plan.Observer("O1"); o.At != m(4, -4) {
		t.Errorf("left at %v, want 4, -4", o.At)
	}
	h.steps("move observer")
}

func TestSelectEscapeLetsGo(t *testing.T) {
	h := newHost(t, corner())
	s := &tool.Select{}
	h.press(s, 3, -3)
	h.dragTo(s, 4, -4)
	h.key(s, tool.KeyEscape)
	h.dragTo(s, 5, -5)
	s.Up(h, h.at(5, -5))
	h.steps()
	if o, _ := h.plan.Observer("O1"); o.At != m(3, -3) {
		t.Errorf("the observer went to %v", o.At)
	}
}

func TestSelectDragBackIsNoStep(t *testing.T) {
	h := newHost(t, corner())
	s := &tool.Select{}
	h.press(s, 3, -3)
	h.dragTo(s, 4, -4)
	h.dragTo(s, 3, -3)
	s.Up(h, h.at(3, -3))
	h.steps()
}

func TestSelectDragsCornersTogether(t *testing.T) {
	h := newHost(t, corner())
	s := &tool.Select{}
	h.drag(s, 0, 0, 1, -1)
	h.points("W1", h.wall("W1"), m(-5, 0), m(1, -1))
	h.points("W2", h.wall("W2"), m(1, -1), m(0, 5))
	h.steps("move corner")
}

func TestSelectCornerSnapsToAnother(t *testing.T) {
	h := newHost(t, corner())
	s := &tool.Select{}
	h.drag(s, 0, 5, 1.9, 4.1) // near the block's corner at 2, 4
	h.points("W2", h.wall("W2"), m(0, 0), m(2, 4))
}

func TestSelectTurnsAnObserver(t *testing.T) {
	h := newHost(t, corner())
	s := &tool.Select{}
	h.click(s, 3, -3)
	h.press(s, 3+34.0/40, -3)
	h.dragTo(s, 3, -2)
	if k := s.Sketch(h); k.Label != "90°" {
		t.Errorf("label %q, want 90°", k.Label)
	}
	e := h.at(2, -2.1)
	e.Shift = true
	s.Move(h, e)
	s.Up(h, e)
	if o, _ := h.plan.Observer("O1"); o.Heading != 135 {
		t.Errorf("heading %g, want 135 in steps of 15", o.Heading)
	}
	h.steps("turn observer")
}

func TestSelectSlidesADoor(t *testing.T) {
	h := newHost(t, corner())
	s := &tool.Select{}
	h.drag(s, -2.6, 0, -1.6, 0.8)
	if o, _ := firstOpening(h.plan); o.At != 30000 {
		t.Errorf("the door went to %d, want 30000", o.At)
	}
	h.drag(s, -1.6, 0, 3, 0)
	if o, _ := firstOpening(h.plan); o.At != 41000 {
		t.Errorf("the door went to %d, want the wall's end 41000", o.At)
	}
}

func firstOpening(p *plan.Plan) (plan.Opening, bool) {
	for _, o := range p.Openings() {
		return o, true
	}
	return plan.Opening{}, false
}

func TestSelectTargetSticksToAFace(t *testing.T) {
	h := newHost(t, corner())
	s := &tool.Select{}
	h.drag(s, -4, 3, -4.02, 0.3)
	if q, _ := h.plan.Target("T1"); q.At != m(-4, 0.1) || q.Normal == nil || *q.Normal != 90 {
		t.Errorf("target %+v, want on the face at -4, 0.1 facing 90", q)
	}
}

func TestSelectStartTakesTheThreshold(t *testing.T) {
	h := newHost(t, corner())
	s := &tool.Select{}
	h.drag(s, -4, -3, -2.4, -0.2)
	if q, _ := h.plan.Start("S1"); q.At != m(-2.55, -0.1) || q.Facing == nil || *q.Facing != -90 {
		t.Errorf("start %+v, want on the threshold at -2.55, -0.1 facing -90", q)
	}
}

func TestSelectBox(t *testing.T) {
	h := newHost(t, corner())
	s := &tool.Select{}
	h.press(s, 1, -5)
	h.dragTo(s, 5, 5)
	if k := s.Sketch(h); k.Box == nil || k.Box[0] != m(1, -5) || k.Box[1] != m(5, 5) {
		t.Errorf("box %v", k.Box)
	}
	s.Up(h, h.at(5, 5))
	if len(h.selected) != 2 {
		t.Errorf("selected %v, want the block and the observer", h.selected)
	}
	h.drag(s, 3, 3, 4, 3) // both go along
	if o, _ := h.plan.Observer("O1"); o.At != m(4, -3) {
		t.Errorf("the observer stayed at %v", o.At)
	}
	h.steps("move items")
}

func TestSelectKeys(t *testing.T) {
	h := newHost(t, corner())
	s := &tool.Select{}
	if s.Key(h, tool.Key{Name: tool.KeyDelete}) || s.Key(h, tool.Key{Name: tool.KeyLeft}) || s.Key(h, tool.Key{Name: tool.KeyEscape}) {
		t.Error("with nothing selected a key was used")
	}
	h.click(s, 3, 3)
	h.key(s, tool.KeyLeft, tool.KeyUp)
	s.Key(h, tool.Key{Name: tool.KeyRight, Shift: true})
	for _, b := range h.plan.Blocks() {
		if b.Ring.At(0) != m(2.9, 2.1) {
			t.Errorf("nudged to %v, want 2.9, 2.1", b.Ring.At(0))
		}
	}
	h.key(s, tool.KeyDelete)
	if h.plan.NumBlocks() != 0 {
		t.Error("Delete left the block")
	}
	h.steps("move block", "move block", "move block", "delete block")
}

func TestSelectDeletesAWallWithItsDoors(t *testing.T) {
	h := newHost(t, corner())
	s := &tool.Select{}
	h.click(s, -4, 0)
	h.key(s, tool.KeyDelete)
	if h.plan.NumWalls() != 1 || h.plan.NumOpenings() != 0 {
		t.Errorf("%d walls and %d openings left", h.plan.NumWalls(), h.plan.NumOpenings())
	}
}

func TestSelectLeavesLockedItems(t *testing.T) {
	parts := corner()
	parts.Observers[0].Locked = true
	h := newHost(t, parts)
	s := &tool.Select{}
	h.drag(s, 3, -3, 4, -4)
	h.steps()
	if len(h.selected) != 1 {
		t.Error("a locked item can be selected")
	}
}

// TestSelectStop: a lost grip in the middle of a drag leaves the plan as it was.
func TestSelectStop(t *testing.T) {
	h := newHost(t, corner())
	s := &tool.Select{}
	h.press(s, 3, -3)
	h.dragTo(s, 4, -4)
	s.Stop(h)
	h.steps()
	h.move(s, 3, -3)
	if k := s.Sketch(h); k.Hover != ref(plan.KindObserver, "O1") {
		t.Errorf("hover %v after the grip was lost", k.Hover)
	}
}

func TestSelectHandles(t *testing.T) {
	h := newHost(t, corner())
	s := &tool.Select{}
	h.click(s, -4, 0)
	h.points("handles", s.Sketch(h).Handles, exact.Pt{X: -50000}, exact.Pt{})
}

// TestSelectTakesWhatLiesBelow: clicks on one spot go from item to item under the pointer, and the one taken is the one dragged.
func TestSelectTakesWhatLiesBelow(t *testing.T) {
	parts := corner()
	parts.Observers[0].At = m(3, 3) // on the block
	h := newHost(t, parts)
	s := &tool.Select{}
	var got []plan.Kind
	for range 4 {
		h.click(s, 3, 3)
		got = append(got, h.selected[0].Kind)
	}
	if want := []plan.Kind{plan.KindObserver, plan.KindBlock, plan.KindObserver, plan.KindBlock}; !slices.Equal(got, want) {
		t.Errorf("four clicks took %v, want %v", got, want)
	}
	h.drag(s, 3, 3, 4, 3)
	if o, _ := h.plan.Observer("O1"); o.At != m(3, 3) {
		t.Error("the drag took the observer, not the block below it")
	}
	h.steps("move block")
	h.click(s, -4, 3)
	e := h.at(-4, 3)
	e.Clicks = 2
	s.Down(h, e)
	s.Up(h, e)
	if h.selected[0] != ref(plan.KindTarget, "T1") {
		t.Error("a double click is no click again")
	}
}

func TestSelectBoxTouches(t *testing.T) {
	h := newHost(t, corner())
	s := &tool.Select{}
	box := func(ctrl bool) []plan.Ref {
		h.press(s, 1, 1)
		e := h.at(3, 3)
		e.Ctrl, e.Pressed = ctrl, true
		s.Move(h, e)
		s.Up(h, e)
		return h.selected
	}
	if got := box(false); len(got) != 0 {
		t.Errorf("inside the box lies %v", got)
	}
	if got := box(true); len(got) != 1 || got[0] != ref(plan.KindBlock, "B1") {
		t.Errorf("the box touches %v, want the block", got)
	}
}

// TestSelectHangsDoors: with doors selected the keys change how they hang; with walls J moves their body.
func TestSelectHangsDoors(t *testing.T) {
	h := newHost(t, corner())
	s := &tool.Select{}
	h.typed(s, "h")
	h.click(s, -2.5, 0)
	h.typed(s, "khju")
	if o, _ := firstOpening(h.plan); o.Leaf != plan.SolidLeaf || !o.HingeEnd || !o.SideRight || !o.Shut {
		t.Errorf("door %+v", o)
	}
	h.typed(s, "u")
	h.steps("change leaf", "hang door", "hang door", "shut door", "open door")
	h.click(s, -4, 0)
	h.typed(s, "j")
	if w, _ := h.plan.Wall("W1"); w.Justify != plan.Left {
		t.Errorf("wall %+v", w)
	}
}

func TestSelectNudgesADoorAlongItsWall(t *testing.T) {
	h := newHost(t, corner())
	s := &tool.Select{}
	h.click(s, -2.5, 0)
	h.key(s, tool.KeyRight, tool.KeyUp, tool.KeyRight)
	if o, _ := firstOpening(h.plan); o.At != 22000 {
		t.Errorf("the door went to %d, want 22000", o.At)
	}
	h.steps("move opening", "move opening")
}

func TestSelectDragsADoorIntoAnotherWall(t *testing.T) {
	h := newHost(t, corner())
	s := &tool.Select{}
	h.press(s, -2.5, 0)
	h.dragTo(s, -1, 0.5)
	h.dragTo(s, 0, 2.45)
	if k := s.Sketch(h); k.Label != "1.95 m  |  0.90 m  |  2.15 m" && k.Label != "2.05 m  |  0.90 m  |  2.05 m" {
		t.Errorf("label %q", k.Label)
	}
	s.Up(h, h.at(0, 2.45))
	if o, _ := firstOpening(h.plan); o.Wall != "W2" || o.Width != 9000 {
		t.Errorf("door %+v, want it in W2", o)
	}
	h.steps("move opening")
}
