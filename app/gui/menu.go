package gui

import (
	"path/filepath"

	"fyne.io/fyne/v2"
	"fyne.io/fyne/v2/driver/desktop"

	"enfilade/assets"
)

// menu is the menu bar, with the items whose words or marks change.
type menu struct {
	w          *window
	main       *fyne.MainMenu
	edit       *fyne.Menu
	view       *fyne.Menu
	undo, redo *fyne.MenuItem
	remove     *fyne.MenuItem
	recent     *fyne.MenuItem
	all, side  *fyne.MenuItem
	themes     []*fyne.MenuItem
}

// key returns a menu shortcut with Ctrl, or Cmd where that is usual.
func key(name fyne.KeyName, more fyne.KeyModifier) fyne.Shortcut {
	return &desktop.CustomShortcut{KeyName: name, Modifier: fyne.KeyModifierShortcutDefault | more}
}

func item(label string, s fyne.Shortcut, do func()) *fyne.MenuItem {
	i := fyne.NewMenuItem(label, do)
	i.Shortcut = s
	return i
}

func newMenu(w *window) *menu {
	m := &menu{w: w}
	file := m.fileMenu()
	m.edit = m.editMenu()
	m.view = m.viewMenu()
	m.main = fyne.NewMainMenu(file, m.edit, m.toolMenu("Draw"), m.toolMenu("Place"), m.studyMenu(), m.view, m.helpMenu())
	return m
}

func (m *menu) fileMenu() *fyne.Menu {
	w := m.w
	m.recent = fyne.NewMenuItem("Open recent", nil)
	m.recent.ChildMenu = fyne.NewMenu("", m.recentItems()...)
	quit := item("Quit", key(fyne.KeyQ, 0), func() { w.unlessUnsaved(w.quit) })
	quit.IsQuit = true
	return fyne.NewMenu("File",
		item("New", key(fyne.KeyN, 0), func() { w.unlessUnsaved(w.newPlan) }),
		item("Open…", key(fyne.KeyO, 0), func() { w.unlessUnsaved(w.askOpen) }),
		m.recent,
		fyne.NewMenuItemSeparator(),
		item("Save", key(fyne.KeyS, 0), func() { w.save(nil) }),
		item("Save as…", key(fyne.KeyS, fyne.KeyModifierShift), func() { w.askSave(nil) }),
		item("Export picture…", key(fyne.KeyE, 0), w.askPicture),
		fyne.NewMenuItemSeparator(),
		quit)
}

func (m *menu) recentItems() []*fyne.MenuItem {
	w := m.w
	var items []*fyne.MenuItem
	for _, path := range w.recent() {
		items = append(items, fyne.NewMenuItem(filepath.Base(path), func() { w.unlessUnsaved(func() { w.open(path) }) }))
	}
	if len(items) == 0 {
		none := fyne.NewMenuItem("no plan yet", nil)
		none.Disabled = true
		items = append(items, none)
	}
	return items
}

func (m *menu) editMenu() *fyne.Menu {
	w := m.w
	m.undo = item("Undo", &fyne.ShortcutUndo{}, w.undo)
	m.redo = item("Redo", key(fyne.KeyZ, fyne.KeyModifierShift), w.redo)
	m.remove = fyne.NewMenuItem("Delete", func() { w.typedKey(fyne.KeyDelete) })
	return fyne.NewMenu("Edit", m.undo, m.redo, fyne.NewMenuItemSeparator(), m.remove,
		item("Select all", &fyne.ShortcutSelectAll{}, w.selectAll))
}

// toolMenu lists the tools of a group with the letters that choose them.
func (m *menu) toolMenu(group string) *fyne.Menu {
	menu := fyne.NewMenu(group)
	for i, k := range tools {
		if k.group != group {
			continue
		}
		mi := fyne.NewMenuItemWithIcon(k.name+"   "+k.letter, menuIcon(k.icon), func() { m.w.choose(i) })
		menu.Items = append(menu.Items, mi)
	}
	return menu
}

// menuIcon is one of our icons that takes the menu's text colour.
func menuIcon(name string) fyne.Resource {
	return themedIcon{fyne.NewStaticResource(name+".svg", assets.Icon(name))}
}

func (m *menu) studyMenu() *fyne.Menu {
	w := m.w
	return fyne.NewMenu("Study",
		fyne.NewMenuItem("Next observer", func() { w.next(kindObserver) }),
		fyne.NewMenuItem("Next start", func() { w.next(kindStart) }),
		fyne.NewMenuItem("Next target", func() { w.next(kindTarget) }))
}

func (m *menu) viewMenu() *fyne.Menu {
	w := m.w
	m.all = fyne.NewMenuItem("All regions", func() { w.results.all = !w.results.all; w.acted() })
	m.side = fyne.NewMenuItem("Right column", w.toggleSide)
	theme := fyne.NewMenuItem("Theme", nil)
	for _, t := range []struct{ name, choice string }{{"Light", themeLight}, {"Dark", themeDark}, {"As the system", themeSystem}} {
		m.themes = append(m.themes, fyne.NewMenuItem(t.name, func() { w.setTheme(t.choice) }))
	}
	theme.ChildMenu = fyne.NewMenu("", m.themes...)
	return fyne.NewMenu("View",
		item("Fit", key(fyne.Key0, 0), w.view.fit),
		item("Zoom in", key(fyne.KeyEqual, 0), func() { w.zoom(1.25) }),
		item("Zoom out", key(fyne.KeyMinus, 0), func() { w.zoom(0.8) }),
		fyne.NewMenuItemSeparator(),
		m.all, m.side, theme)
}

func (m *menu) helpMenu() *fyne.Menu {
	w := m.w
	samples := fyne.NewMenuItem("Sample plans", nil)
	samples.ChildMenu = fyne.NewMenu("")
	for _, s := range assets.Samples() {
		samples.ChildMenu.Items = append(samples.ChildMenu.Items,
			fyne.NewMenuItem(s.Title, func() { w.unlessUnsaved(func() { w.openSample(s.Name) }) }))
	}
	return fyne.NewMenu("Help", samples,
		fyne.NewMenuItem("Keys", w.showKeys),
		fyne.NewMenuItem("About Enfilade", w.showAbout))
}

// update brings the changing items up to date; the bar is rebuilt only when their words or marks change.
func (m *menu) update() {
	changed := false
	set := func(i *fyne.MenuItem, label string, disabled, checked bool) {
		if i.Label != label || i.Disabled != disabled || i.Checked != checked {
			i.Label, i.Disabled, i.Checked = label, disabled, checked
			changed = true
		}
	}
	undo, canUndo := m.w.session.UndoLabel()
	redo, canRedo := m.w.session.RedoLabel()
	set(m.undo, named("Undo", undo), !canUndo, false)
	set(m.redo, named("Redo", redo), !canRedo, false)
	set(m.remove, "Delete", len(m.w.session.Selection()) == 0, false)
	set(m.all, "All regions", false, m.w.results.all)
	set(m.side, "Right column", false, m.w.side.Visible())
	for i, c := range []string{themeLight, themeDark, themeSystem} {
		set(m.themes[i], m.themes[i].Label, false, m.w.look.choice == c)
	}
	if changed {
		m.main.Refresh()
	}
}

func named(what, label string) string {
	if label == "" {
		return what
	}
	return what + " " + label
}

// setRecent rebuilds the list of recent plans.
func (m *menu) setRecent() {
	m.recent.ChildMenu.Items = m.recentItems()
	m.main.Refresh()
}
