package gui

import (
	"testing"

	"fyne.io/fyne/v2"
)

// TestKeyboardReachesEverything: Tab goes through the menu bar, every tool, the picture, the form and the table, and comes
// round; Space takes a tool, arrows go through the menus, Escape leads back.
func TestKeyboardReachesEverything(t *testing.T) {
	r := newGallery(t)
	c := r.win.Canvas()
	seen := map[fyne.Focusable]bool{}
	c.Focus(r.view)
	for range 200 {
		c.FocusNext()
		f := c.Focused()
		if f == nil || seen[f] {
			break
		}
		seen[f] = true
	}
	want := map[string]fyne.Focusable{"menu bar": r.bar, "picture": r.view, "table": r.table.list, "a field of the form": r.form.rows[0].entry}
	for i, b := range r.rail {
		if b != nil {
			want[tools[i].name] = b
		}
	}
	for name, f := range want {
		if !seen[f] {
			t.Errorf("Tab does not reach the %s", name)
		}
	}
	var glass *toolButton
	at := 0
	for i, k := range tools {
		if k.name == "Glazing" {
			glass, at = r.rail[i], i
		}
	}
	c.Focus(glass)
	if !glass.focused {
		t.Error("no focus ring")
	}
	glass.TypedKey(&fyne.KeyEvent{Name: fyne.KeySpace})
	if r.toolAt != at || c.Focused() != fyne.Focusable(r.view) {
		t.Errorf("Space took tool %d, and the focus is on %T", r.toolAt, c.Focused())
	}
	c.Focus(r.bar)
	r.bar.TypedKey(&fyne.KeyEvent{Name: fyne.KeyRight})
	r.bar.TypedKey(&fyne.KeyEvent{Name: fyne.KeyDown})
	if !r.bar.drop.Visible() || r.bar.drop.at != 1 {
		t.Error("the second menu is not open")
	}
	r.bar.drop.TypedKey(&fyne.KeyEvent{Name: fyne.KeyEscape})
	if r.bar.drop.Visible() || c.Focused() != fyne.Focusable(r.view) {
		t.Errorf("Escape leaves the focus on %T", c.Focused())
	}
	r.bar.drop.open(2)
	if c.FocusNext(); r.bar.drop.Visible() {
		t.Error("Tab leaves the menu open")
	}
	r.table.list.OnSelected(1)
	if r.results.start == "" || r.results.target != r.table.rows[r.table.lines[1]].target {
		t.Error("Space in the table does not choose its walk")
	}
}

// TestEscapePutsEveryDialogAway, wherever the focus is in it, and nothing has changed.
func TestEscapePutsEveryDialogAway(t *testing.T) {
	long(t)
	for name, open := range map[string]func(*rig){
		"open": func(r *rig) { r.askOpen() }, "save": func(r *rig) { r.askSave(nil) }, "picture": func(r *rig) { r.askPicture() },
		"underlay": func(r *rig) { r.askUnderlay() }, "keys": func(r *rig) { r.showKeys() }, "about": func(r *rig) { r.showAbout() },
		"shown": func(r *rig) { r.askShown() }, "unsaved": func(r *rig) { r.unlessUnsaved(func() { r.t.Error("went on") }) },
		"changed": func(r *rig) { r.askChanged("a.enfilade", r.print, nil) },
	} {
		r := newGallery(t)
		r.drag(11.35, 8.75, 12, 8)
		before, shown := r.session.Plan(), r.shown.choice
		c := r.win.Canvas()
		for stops := 0; ; stops++ {
			open(r)
			if r.modal == nil {
				t.Fatalf("%s did not open", name)
			}
			c.Unfocus()
			for range stops {
				c.FocusNext()
			}
			if f := c.Focused(); f != nil {
				f.TypedKey(&fyne.KeyEvent{Name: fyne.KeyEscape})
			} else {
				c.OnTypedKey()(&fyne.KeyEvent{Name: fyne.KeyEscape})
			}
			if r.modal != nil {
				t.Fatalf("%s: Escape does nothing on %T", name, c.Focused())
			}
			if stops == 6 {
				break
			}
		}
		if r.session.Plan() != before || r.shown.choice != shown || !r.session.Dirty() {
			t.Errorf("%s: Escape changed something", name)
		}
	}
}
