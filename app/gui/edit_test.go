package gui

import (
	"slices"
	"strings"
	"testing"

	"fyne.io/fyne/v2"

	"enfilade/solver/exact"
	"enfilade/solver/plan"
)

// newCross is a window with two walls that cross, one that stands apart, a door, a column and an observer.
func newCross(t *testing.T) *rig {
	t.Helper()
	r := newRig(t, realSolver)
	wall := func(id string, kind plan.WallKind, pts ...exact.Pt) plan.Wall {
		return plan.Wall{ID: id, Kind: kind, Line: plan.ChainOf(pts...), Height: plan.Ceiling, Thickness: 2000}
	}
	r.session.Open(plan.From(plan.Parts{
		Floor: plan.ChainOf(m(-6, -6), m(14, -6), m(14, 8), m(-6, 8)),
		Walls: []plan.Wall{wall("W1", plan.Solid, m(0, 0), m(5, 0)), wall("W2", plan.Solid, m(4, -2), m(4, 2)), wall("W3", plan.Solid, m(8, -2), m(8, 2)),
			wall("W4", plan.Glazing, m(0, 5), m(3, 5))},
		Openings:  []plan.Opening{{ID: "D1", Wall: "W1", At: 10_000, Width: 9000, Leaf: plan.SolidLeaf}},
		Observers: []plan.Observer{{ID: "O1", At: m(2, 3), Eye: 16_000, View: 90, Colour: -1}},
		Walker:    plan.DefaultWalker(), Sheet: plan.Sheet{Unit: "m"},
	}), "")
	r.view.fitNow()
	r.frame()
	return r
}

func (r *rig) selectItems(kind plan.Kind, ids ...string) {
	var refs []plan.Ref
	for _, id := range ids {
		refs = append(refs, plan.Ref{Kind: kind, ID: id})
	}
	r.session.Select(refs...)
	r.acted()
}

// menu does a command of the Edit menu, as a click on it would.
func (r *rig) edit(label string) {
	r.t.Helper()
	for _, c := range r.editMenu() {
		if c.label == label {
			if c.dead {
				r.t.Fatalf("%q is greyed out", label)
			}
			c.do()
			return
		}
	}
	r.t.Fatalf("the Edit menu has no %q", label)
}

func (r *rig) wantWall(id string, pts ...exact.Pt) {
	r.t.Helper()
	w, ok := r.session.Plan().Wall(id)
	if !ok || !w.Line.Equal(plan.ChainOf(pts...)) {
		r.t.Fatalf("wall %s: %v %v, want %v", id, ok, w.Line, pts)
	}
}

func (r *rig) wantHint(part string) {
	r.t.Helper()
	if !strings.Contains(r.status.hint.text, part) {
		r.t.Errorf("the status line says %q, want %q", r.status.hint.text, part)
	}
}

func (r *rig) wantUndo(label string) {
	r.t.Helper()
	if got, _ := r.session.UndoLabel(); got != label {
		r.t.Errorf("undo is called %q, want %q", got, label)
	}
}

func TestCopyAndPaste(t *testing.T) {
	r := newCross(t)
	before := text(t, r.session.Plan())
	r.selectItems(plan.KindWall, "W1")
	r.shortcut(&fyne.ShortcutCopy{})
	r.shortcut(&fyne.ShortcutPaste{})
	r.wantWall("W5", m(0.5, -0.5), m(5.5, -0.5))
	r.shortcut(&fyne.ShortcutPaste{})
	r.wantWall("W6", m(1, -1), m(6, -1)) // each time a step farther
	r.wantUndo("paste")
	if o, ok := r.session.Plan().Opening("D3"); !ok || o.Wall != "W6" || !r.session.Selected(plan.Ref{Kind: plan.KindWall, ID: "W6"}) {
		t.Errorf("the door is not in the copy, or the copy is not selected: %+v, %v", o, r.session.Selection())
	}
	r.undo()
	r.undo()
	if text(t, r.session.Plan()) != before {
		t.Error("undo does not give the plan back")
	}
	r.selectItems(plan.KindWall, "W1")
	r.shortcut(&fyne.ShortcutCut{})
	r.wantUndo("cut wall")
	if r.session.Plan().NumWalls() != 3 || r.session.Plan().NumOpenings() != 0 {
		t.Error("the wall is still there")
	}
	r.shortcut(&fyne.ShortcutPaste{})
	r.wantWall("W5", m(0, 0), m(5, 0)) // what was cut comes back in its place
}

func TestPasteFromAnotherWindow(t *testing.T) {
	r := newCross(t)
	far := plan.From(plan.Parts{Walls: []plan.Wall{{ID: "W1", Line: plan.ChainOf(m(1000, 1000), m(1002, 1000)), Height: plan.Ceiling}},
		Walker: plan.DefaultWalker(), Sheet: plan.Sheet{Unit: "ft"}})
	r.app.Clipboard().SetContent(text(t, far))
	r.shortcut(&fyne.ShortcutPaste{})
	w, ok := r.session.Plan().Wall("W5")
	if c := r.view.cam; !ok || !exact.InBox(c.Grid(0, float64(c.H)), c.Grid(float64(c.W), 0), w.Line.At(0)) {
		t.Errorf("what lay out of sight is not brought into the picture: %+v", w)
	}
	for _, text := range []string{"", "hello", `{"enfilade": 9}`} {
		before := r.session.Plan()
		r.app.Clipboard().SetContent(text)
		r.shortcut(&fyne.ShortcutPaste{})
		if r.session.Plan() != before || r.said.text == "" {
			t.Errorf("%q was pasted, or nothing was said: %q", text, r.said.text)
		}
	}
}

func TestDuplicate(t *testing.T) {
	r := newCross(t)
	r.selectItems(plan.KindOpening, "D1")
	r.edit("Duplicate")
	if o, ok := r.session.Plan().Opening("D2"); !ok || o.At != 10_000+9000+2250 {
		t.Errorf("%+v", o)
	}
	r.selectItems(plan.KindObserver, "O1")
	r.edit("Duplicate")
	r.edit("Duplicate") // goes on from the copy
	if o := r.observer("O3"); o.At != m(3, 2) {
		t.Errorf("at %v", o.At)
	}
}

func TestDuplicateInRows(t *testing.T) {
	r := newCross(t)
	r.selectItems(plan.KindObserver, "O1")
	r.edit("Duplicate in rows…")
	if r.panel == nil || !r.session.Previewing() || r.session.Plan().NumObservers() != 3 {
		t.Fatalf("no panel, or no preview of three: %d", r.session.Plan().NumObservers())
	}
	r.panel.rows[0].entry.SetText("4")
	r.panel.rows[1].entry.SetText("0,75")
	r.panel.rows[2].entry.SetText("2")
	if r.session.Plan().NumObservers() != 8 {
		t.Errorf("%d in the preview, want 8", r.session.Plan().NumObservers())
	}
	r.panel.rows[2].entry.SetText("two")
	if r.session.Previewing() || !strings.Contains(r.panel.fault.text, "whole number") {
		t.Errorf("fault %q", r.panel.fault.text)
	}
	r.panel.rows[2].entry.SetText("1")
	r.panel.rows[0].entry.TypedKey(&fyne.KeyEvent{Name: fyne.KeyReturn})
	if r.panel != nil || r.session.Previewing() || r.session.Plan().NumObservers() != 4 || r.observer("O4").At != m(2+3*0.75, 3) {
		t.Errorf("%d observers, the last at %v", r.session.Plan().NumObservers(), r.observer("O4").At)
	}
	r.wantUndo("duplicate observer")
}

func TestRotatePanel(t *testing.T) {
	r := newCross(t)
	before := r.session.Plan()
	r.selectItems(plan.KindWall, "W1", "W2")
	r.shortcut(ctrl(fyne.KeyR, 0))
	r.wantWall("W2", m(4.5, 1.5), m(0.5, 1.5)) // previewed about the middle, 2.5, 0
	r.click(0, 0)
	r.wantWall("W1", m(0, 0), m(0, 5))
	r.wantWall("W2", m(2, 4), m(-2, 4))
	r.panel.rows[0].entry.SetText("-90")
	r.wantWall("W1", m(0, 0), m(0, -5))
	r.panel.rows[0].entry.TypedKey(&fyne.KeyEvent{Name: fyne.KeyEscape})
	if r.panel != nil || r.session.Plan() != before || r.toolAt != 0 {
		t.Error("Escape does not leave everything as it was")
	}
	r.edit("Rotate…")
	r.panel.rows[1].pick.picked(1)
	r.panel.apply()
	if r.session.Plan().NumWalls() != 6 || r.session.Plan().NumOpenings() != 2 || len(r.session.Selection()) != 2 {
		t.Errorf("a copy: %d walls, %d openings", r.session.Plan().NumWalls(), r.session.Plan().NumOpenings())
	}
	r.wantUndo("rotate items")
}

func TestMirrorPanel(t *testing.T) {
	r := newCross(t)
	r.selectItems(plan.KindWall, "W1")
	r.shortcut(ctrl(fyne.KeyM, 0))
	r.wantWall("W1", m(5, 0), m(0, 0))
	r.click(8, 1)
	r.wantWall("W1", m(16, 0), m(11, 0)) // in wall W3
	if o, _ := r.session.Plan().Opening("D1"); !o.SideRight {
		t.Error("the door swings to the old side")
	}
	r.click(-4, 3)
	r.wantWall("W1", m(-8, 0), m(-13, 0)) // in an upright line through the point
	r.keys(fyne.KeyReturn)
	r.wantUndo("mirror wall")
	r.wantWall("W1", m(-8, 0), m(-13, 0))
}

func TestCutBackAndLengthen(t *testing.T) {
	r := newCross(t)
	r.selectItems(plan.KindWall, "W1")
	r.edit("Cut back to…")
	r.wantHint("click the wall to cut back to")
	r.move(4, 1.5)
	r.wantWall("W1", m(0, 0), m(4, 0))
	r.click(4, 1.5)
	r.wantUndo("cut back wall")
	if r.toolAt != 0 || r.session.Previewing() {
		t.Error("the select tool does not come back")
	}
	r.edit("Lengthen to…")
	r.click(8, 1.5)
	r.wantWall("W1", m(0, 0), m(8, 0))
	r.edit("Lengthen to…")
	r.keys(fyne.KeyEscape)
	if r.toolAt != 0 {
		t.Error("Escape does not lead back to the select tool")
	}
}

func TestSplitAndJoin(t *testing.T) {
	r := newCross(t)
	before := text(t, r.session.Plan())
	r.edit("Split wall…")
	r.click(4.5, 0.02)
	r.wantWall("W5", m(4.5, 0), m(5, 0))
	r.selectItems(plan.KindWall, "W1", "W5")
	r.shortcut(ctrl(fyne.KeyJ, 0))
	if text(t, r.session.Plan()) != before {
		t.Error("split and joined, the plan is another one")
	}
	r.selectItems(plan.KindWall, "W1", "W3")
	r.edit("Join walls")
	r.wantHint("does not meet an end")
}

func TestLockAndHide(t *testing.T) {
	r := newCross(t)
	r.selectItems(plan.KindWall, "W1", "W2")
	r.shortcut(ctrl(fyne.KeyL, 0))
	r.wantUndo("lock items")
	r.selectItems(plan.KindWall, "W1", "W3")
	r.keys(fyne.KeyDelete)
	if _, ok := r.session.Plan().Wall("W1"); !ok || r.session.Plan().NumWalls() != 3 {
		t.Error("what is locked was deleted, or nothing was")
	}
	r.wantHint("1 item is locked")
	r.edit("Unlock everything")
	if _, locked := marked(r.session.Plan()); len(locked) != 0 {
		t.Errorf("still locked: %v", locked)
	}
	r.selectItems(plan.KindWall, "W2")
	r.edit("Hide")
	if len(r.session.Selection()) != 0 {
		t.Error("what is hidden is still selected")
	}
	r.shortcut(&fyne.ShortcutSelectAll{})
	if slices.Contains(r.session.Selection(), plan.Ref{Kind: plan.KindWall, ID: "W2"}) {
		t.Error("Select all takes what is hidden")
	}
	r.edit("Show everything")
	if hidden, _ := marked(r.session.Plan()); len(hidden) != 0 || len(r.session.Selection()) != 1 {
		t.Errorf("hidden %v, selected %v", hidden, r.session.Selection())
	}
}

func TestSelectKind(t *testing.T) {
	r := newCross(t)
	r.selectItems(plan.KindWall, "W1")
	r.shortcut(ctrl(fyne.KeyA, fyne.KeyModifierShift))
	if len(r.session.Selection()) != 3 || r.session.Selected(plan.Ref{Kind: plan.KindWall, ID: "W4"}) {
		t.Errorf("selected %v, want the solid walls", r.session.Selection())
	}
}
