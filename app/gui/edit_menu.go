package gui

import (
	"fmt"
	"slices"
	"time"

	"fyne.io/fyne/v2"

	"enfilade/app/session"
	"enfilade/canvas/tool"
	"enfilade/solver/plan"
)

// editing is what the window keeps of copying and of the edits with a panel.
type editing struct {
	clip       clip
	said       said
	panel      *editPanel      // nil when none is open
	panelLayer *fyne.Container // over the picture
	problems   *problems
	manyKey    manyKey
	many       card // of manyKey
}

// editMenu is the Edit menu: what is done to the selection.
func (w *window) editMenu() []command {
	undo, canUndo := w.session.UndoLabel()
	redo, canRedo := w.session.RedoLabel()
	some, walls := len(w.session.Selection()), w.selectedWalls()
	list := []command{
		{label: named("Undo", undo), key: "Ctrl+Z", shortcut: &fyne.ShortcutUndo{}, do: w.undo, dead: !canUndo && !w.session.Previewing()},
		{label: named("Redo", redo), key: "Ctrl+Shift+Z", shortcut: ctrl(fyne.KeyZ, fyne.KeyModifierShift), do: w.redo, dead: !canRedo},
		{label: "Cut", key: "Ctrl+X", shortcut: &fyne.ShortcutCut{}, do: w.cut, dead: some == 0, rule: true},
		{label: "Copy", key: "Ctrl+C", shortcut: &fyne.ShortcutCopy{}, do: w.copy, dead: some == 0},
		{label: "Paste", key: "Ctrl+V", shortcut: &fyne.ShortcutPaste{}, do: w.paste},
		{label: "Duplicate", key: "Ctrl+D", shortcut: ctrl(fyne.KeyD, 0), do: w.duplicate, dead: some == 0},
		{label: "Duplicate in rows…", key: "Ctrl+Shift+D", shortcut: ctrl(fyne.KeyD, fyne.KeyModifierShift), do: w.askRows, dead: some == 0},
		{label: "Delete", key: "Del", do: w.deleteSelection, dead: some == 0},
		{label: "Select all", key: "Ctrl+A", shortcut: &fyne.ShortcutSelectAll{}, do: w.selectAll, rule: true},
		{label: "Select all of this kind", key: "Ctrl+Shift+A", shortcut: ctrl(fyne.KeyA, fyne.KeyModifierShift), do: w.selectKind, dead: some == 0},
		{label: "Select the next item", key: "N", do: func() { w.nextItem(1) }},
		{label: "Select the one before", key: "Shift+N", do: func() { w.nextItem(-1) }},
		{label: "Rotate…", key: "Ctrl+R", shortcut: ctrl(fyne.KeyR, 0), do: w.askRotate, dead: some == 0, rule: true},
		{label: "Mirror…", key: "Ctrl+M", shortcut: ctrl(fyne.KeyM, 0), do: w.askMirror, dead: some == 0},
	}
	list = append(list, w.wallMenu(walls)...)
	hidden, locked := marked(w.session.Plan())
	return append(list,
		command{label: "Lock", key: "Ctrl+L", shortcut: ctrl(fyne.KeyL, 0), do: func() { w.mark(w.session.Selection(), "lock") }, dead: some == 0, rule: true},
		command{label: "Unlock everything", key: "Ctrl+Shift+L", shortcut: ctrl(fyne.KeyL, fyne.KeyModifierShift), do: func() { w.mark(locked, "unlock") }, dead: len(locked) == 0},
		command{label: "Hide", key: "Ctrl+H", shortcut: ctrl(fyne.KeyH, 0), do: func() { w.mark(w.session.Selection(), "hide") }, dead: some == 0},
		command{label: "Show everything", key: "Ctrl+Shift+H", shortcut: ctrl(fyne.KeyH, fyne.KeyModifierShift), do: func() { w.mark(hidden, "show") }, dead: len(hidden) == 0})
}

// wallMenu is what is done to walls.
func (w *window) wallMenu(walls []string) []command {
	n := len(walls)
	return []command{
		{label: "Parallel wall…", do: func() { w.takeUp(&tool.Beside{}) }, dead: w.session.Plan().NumWalls() == 0, rule: true},
		{label: "Cut back to…", do: func() { w.takeUp(&tool.Meet{}) }, dead: n == 0},
		{label: "Lengthen to…", do: func() { w.takeUp(&tool.Meet{Lengthen: true}) }, dead: n == 0},
		{label: "Split wall…", do: func() { w.takeUp(&tool.Split{}) }, dead: w.session.Plan().NumWalls() == 0},
		{label: "Join walls", key: "Ctrl+J", shortcut: ctrl(fyne.KeyJ, 0), do: func() { w.try(plan.JoinWalls{Walls: walls}) }, dead: n < 2},
		{label: "Close wall to a ring", do: func() { w.try(plan.CloseWall{Wall: walls[0]}) }, dead: n != 1 || !w.closable(walls[0])},
	}
}

// closable reports whether a wall has corners enough for a ring, and is none yet.
func (w *window) closable(id string) bool {
	x, ok := w.session.Plan().Wall(id)
	return ok && x.Line.Len() > 2 && x.Line.At(0) != x.Line.At(x.Line.Len()-1)
}

// selectedWalls are the ids of the selected walls that are not locked.
func (w *window) selectedWalls() (ids []string) {
	p := w.session.Committed()
	for _, r := range w.session.Selection() {
		if m, ok := p.Meta(r); ok && !m.Locked && r.Kind == plan.KindWall {
			ids = append(ids, r.ID)
		}
	}
	return ids
}

// takeUp takes a tool in hand that has no button on the rail. When it is done, the select tool comes back.
func (w *window) takeUp(t tool.Tool) {
	if f, ok := w.tool.(tool.Finisher); ok {
		f.Finish(w.host)
	}
	w.tool.Stop(w.host)
	w.tool, w.toolAt = t, -1
	for _, b := range w.rail {
		b.choose(false)
	}
	if w.view.inside {
		t.Move(w.host, w.view.pointer(w.view.last, 0))
	}
	w.view.grab()
	w.acted()
}

// try does an edit of the menu and says in the status line why it could not be done.
func (w *window) try(e plan.Edit) bool {
	w.tool.Stop(w.host)
	err := w.session.Do(e)
	if err != nil {
		w.say(sentence(err.Error()))
	}
	w.acted()
	return err == nil
}

// tryAdd is try for an edit that adds items, which are then selected.
func (w *window) tryAdd(e plan.Maker) bool {
	added := e.Added(w.session.Committed())
	if !w.try(e) {
		return false
	}
	w.session.Select(added...)
	w.acted()
	return true
}

// said is a sentence that stands in the status line for a while instead of the hint.
type said struct {
	text  string
	until time.Time
}

// saying is how long a sentence stands in the status line.
const saying = 5 * time.Second

// say puts a sentence into the status line for a while.
func (w *window) say(text string) {
	w.said = said{text, w.now().Add(saying)}
	time.AfterFunc(saying+saying/100, func() {
		w.do(func() {
			if !w.closing {
				w.status.tell(w.onFoot(w.hint()))
			}
		})
	})
	w.status.tell(w.onFoot(w.hint()))
}

// justSaid is the sentence that still stands in the status line.
func (w *window) justSaid() string {
	if w.said.text != "" && w.now().Before(w.said.until) {
		return w.said.text
	}
	return ""
}

// free returns the selected items that are not locked; when some are, it says so.
func (w *window) free() []plan.Ref {
	p := w.session.Committed()
	sel := w.session.Selection()
	refs := slices.DeleteFunc(slices.Clone(sel), func(r plan.Ref) bool {
		m, ok := p.Meta(r)
		return ok && m.Locked
	})
	switch n := len(sel) - len(refs); {
	case n == 1 && len(sel) == 1:
		w.say("It is locked; unlock it in the form or with Ctrl+Shift+L.")
	case n > 0:
		w.say(fmt.Sprintf("%s locked and stay as they are; Ctrl+Shift+L unlocks everything.", areItems(n)))
	}
	return refs
}

func areItems(n int) string {
	if n == 1 {
		return "1 item is"
	}
	return fmt.Sprintf("%d items are", n)
}

// deleteSelection takes the selected items away, but for what is locked.
func (w *window) deleteSelection() {
	if refs := w.free(); len(refs) > 0 {
		w.try(plan.Delete{Items: refs})
	}
	w.acted()
}

// selectAll selects everything that can be seen, or the text of the field that has the focus.
func (w *window) selectAll() {
	if f, ok := w.win.Canvas().Focused().(undoable); ok {
		f.TypedShortcut(&fyne.ShortcutSelectAll{})
		return
	}
	w.choose(0)
	w.session.Select(slices.Collect(session.Shown(w.session.Plan()))...)
	w.acted()
}

// selectKind selects everything of the kinds that are selected; of walls, those made of the same.
func (w *window) selectKind() {
	p := w.session.Plan()
	kinds, walls := map[plan.Kind]bool{}, map[plan.WallKind]bool{}
	for _, r := range w.session.Selection() {
		kinds[r.Kind] = true
		if x, ok := p.Wall(r.ID); ok && r.Kind == plan.KindWall {
			walls[x.Kind] = true
		}
	}
	made := map[string]plan.WallKind{}
	for _, x := range p.Walls() {
		made[x.ID] = x.Kind
	}
	var refs []plan.Ref
	for r := range session.Shown(p) {
		if kinds[r.Kind] && (r.Kind != plan.KindWall || walls[made[r.ID]]) {
			refs = append(refs, r)
		}
	}
	w.choose(0)
	w.session.Select(refs...)
	w.say(fmt.Sprintf("%s selected.", counted(len(refs), "item")))
	w.acted()
}

// mark locks, unlocks, hides or shows items. What is hidden is not selected any more: it cannot be seen.
func (w *window) mark(refs []plan.Ref, what string) {
	refs = slices.DeleteFunc(slices.Clone(refs), func(r plan.Ref) bool { return r.Kind == plan.KindFloor })
	if len(refs) == 0 {
		w.say("The floor can be neither locked nor hidden.")
		return
	}
	e, yes, no := plan.Mark{Items: refs}, true, false
	switch what {
	case "lock":
		e.Locked = &yes
	case "unlock":
		e.Locked = &no
	case "hide":
		e.Hidden = &yes
	case "show":
		e.Hidden = &no
	}
	if !w.try(e) {
		return
	}
	switch what {
	case "hide":
		w.session.Select()
		w.say("Hidden from the picture, not from the study; Ctrl+Shift+H shows everything.")
	case "show":
		w.session.Select(refs...)
	}
	w.acted()
}

// marked returns what is hidden and what is locked.
func marked(p *plan.Plan) (hidden, locked []plan.Ref) {
	note := func(kind plan.Kind, id string, m plan.Meta) {
		if m.Hidden {
			hidden = append(hidden, plan.Ref{Kind: kind, ID: id})
		}
		if m.Locked {
			locked = append(locked, plan.Ref{Kind: kind, ID: id})
		}
	}
	for _, x := range p.Walls() {
		note(plan.KindWall, x.ID, x.Meta)
	}
	for _, x := range p.Openings() {
		note(plan.KindOpening, x.ID, x.Meta)
	}
	for _, x := range p.Blocks() {
		note(plan.KindBlock, x.ID, x.Meta)
	}
	for _, x := range p.Zones() {
		note(plan.KindZone, x.ID, x.Meta)
	}
	for _, x := range p.Observers() {
		note(plan.KindObserver, x.ID, x.Meta)
	}
	for _, x := range p.Targets() {
		note(plan.KindTarget, x.ID, x.Meta)
	}
	for _, x := range p.Starts() {
		note(plan.KindStart, x.ID, x.Meta)
	}
	for _, x := range p.Routes() {
		note(plan.KindRoute, x.ID, x.Meta)
	}
	return hidden, locked
}
