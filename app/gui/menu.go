package gui

import (
	"path/filepath"

	"fyne.io/fyne/v2"
	"fyne.io/fyne/v2/driver/desktop"

	"enfilade/assets"
)

// command is one line of a menu.
type command struct {
	label    string
	icon     string
	key      string        // what to press, in words
	shortcut fyne.Shortcut // nil for keys without Ctrl, which the picture takes
	do       func()        // nil for a heading
	dead     bool          // cannot be done now
	checked  bool
	rule     bool // a hairline above it
	inner    bool // belongs to the heading above it
}

// menu is one title of the menu bar; its commands are made when it is opened, as things then stand.
type menu struct {
	title    string
	commands func() []command
}

// ctrl returns a shortcut with Ctrl, or Cmd where that is usual.
func ctrl(name fyne.KeyName, more fyne.KeyModifier) fyne.Shortcut {
	return &desktop.CustomShortcut{KeyName: name, Modifier: fyne.KeyModifierShortcutDefault | more}
}

// menus are the titles of the menu bar.
func (w *window) menus() []menu {
	return []menu{
		{"File", w.fileMenu}, {"Edit", w.editMenu},
		{"Draw", func() []command { return w.toolMenu("Draw") }}, {"Place", func() []command { return w.toolMenu("Place") }},
		{"Snap", w.snapMenu}, {"Study", w.studyMenu}, {"View", w.viewMenu}, {"Help", w.helpMenu},
	}
}

func (w *window) fileMenu() []command {
	list := []command{
		{label: "New", key: "Ctrl+N", shortcut: ctrl(fyne.KeyN, 0), do: func() { w.unlessUnsaved(w.newPlan) }},
		{label: "New window", key: "Ctrl+Shift+N", shortcut: ctrl(fyne.KeyN, fyne.KeyModifierShift), do: func() { w.desk.open() }},
		{label: "Open…", key: "Ctrl+O", shortcut: ctrl(fyne.KeyO, 0), do: func() { w.unlessUnsaved(w.askOpen) }, rule: true},
		{label: "Open in a new window…", key: "Ctrl+Shift+O", shortcut: ctrl(fyne.KeyO, fyne.KeyModifierShift), do: w.askOpenIn},
	}
	recent := w.recent()
	if len(recent) > 0 {
		list = append(list, command{label: "Open recent", rule: true})
	}
	for _, path := range recent {
		list = append(list, command{label: filepath.Base(path), key: shortFolder(path), inner: true,
			do: func() { w.unlessUnsaved(func() { w.open(path) }) }})
	}
	return append(list,
		command{label: "Save", key: "Ctrl+S", shortcut: ctrl(fyne.KeyS, 0), do: func() { w.save(nil) }, rule: true},
		command{label: "Save as…", key: "Ctrl+Shift+S", shortcut: ctrl(fyne.KeyS, fyne.KeyModifierShift), do: func() { w.askSave(nil) }},
		command{label: "Underlay…", key: "Ctrl+U", shortcut: ctrl(fyne.KeyU, 0), do: w.underlayOrAsk, rule: true},
		command{label: "Export picture…", key: "Ctrl+E", shortcut: ctrl(fyne.KeyE, 0), do: w.askPicture},
		command{label: "Close the window", key: "Ctrl+W", shortcut: ctrl(fyne.KeyW, 0), do: func() { w.unlessUnsaved(w.shut) }, rule: true},
		command{label: "Quit", key: "Ctrl+Q", shortcut: ctrl(fyne.KeyQ, 0), do: w.desk.quit})
}

func named(what, label string) string {
	if label == "" {
		return what
	}
	return what + " " + label
}

// toolMenu lists the tools of a group with the letters that choose them.
func (w *window) toolMenu(group string) (list []command) {
	for i, k := range tools {
		if k.group == group {
			key := k.letter
			for j := shapeOf(i); j < i; j++ {
				key += " " + k.letter
			}
			list = append(list, command{label: k.name, icon: k.icon, key: key, do: func() { w.choose(i) }})
		}
	}
	return list
}

func (w *window) studyMenu() []command {
	p := w.session.Plan()
	return []command{
		{label: "Next observer", do: func() { w.next(kindObserver) }, dead: p.NumObservers() == 0},
		{label: "Next start", do: func() { w.next(kindStart) }, dead: p.NumStarts() == 0},
		{label: "Next target", do: func() { w.next(kindTarget) }, dead: p.NumTargets() == 0},
		{label: "Next problem", do: w.problems.next, dead: len(w.problems.found) == 0, rule: true},
		{label: "Measure", icon: "measure", key: "M", do: func() { w.choose(1) }, rule: true},
	}
}

func (w *window) viewMenu() []command {
	list := []command{
		{label: "Fit the plan", icon: "fit", key: "0", do: w.view.fit},
		{label: "Fit the selection", key: "9", do: w.fitSelection, dead: len(w.session.Selection()) == 0},
		{label: "Zoom in", icon: "zoom-in", key: "+", do: func() { w.zoom(1.25) }},
		{label: "Zoom out", icon: "zoom-out", key: "−", do: func() { w.zoom(0.8) }},
		{label: "All regions", do: func() { w.results.all = !w.results.all; w.acted() }, checked: w.results.all, rule: true},
		{label: "Walking distance", do: w.toggleWalking, checked: w.walking.shown, dead: w.session.Plan().NumStarts() == 0},
	}
	list = append(list, w.walkingMenu()...)
	list = append(list, w.layerMenu()...)
	list = append(list, []command{
		{label: "Right column", rule: true, do: w.toggleSide, checked: w.side.Visible()},
		{label: "Theme", rule: true},
	}...)
	for _, t := range []struct{ name, choice string }{{"Light", themeLight}, {"Dark", themeDark}, {"As the system", themeSystem}} {
		list = append(list, command{label: t.name, inner: true, do: func() { w.setTheme(t.choice) }, checked: w.look.choice == t.choice})
	}
	list = append(list, w.scaleMenu()...)
	list = append(list, command{label: "Reduce motion", do: w.toggleStill, checked: w.app.Preferences().Bool(prefStill), rule: true})
	return list
}

func (w *window) helpMenu() []command {
	list := []command{{label: "Sample plans"}}
	for _, s := range assets.Samples() {
		list = append(list, command{label: s.Title, inner: true, do: func() { w.unlessUnsaved(func() { w.openSample(s.Name) }) }})
	}
	return append(list,
		command{label: "Keys", do: w.showKeys, rule: true},
		command{label: "About Enfilade", do: w.showAbout})
}

// shortcuts makes the keys with Ctrl do what the menus say.
func (w *window) shortcuts() {
	c := w.win.Canvas()
	add := func(s fyne.Shortcut) { c.AddShortcut(s, func(s fyne.Shortcut) { w.shortcut(s) }) }
	for _, m := range w.menus() {
		for _, k := range m.commands() {
			if k.shortcut != nil {
				add(k.shortcut)
			}
		}
	}
	add(&fyne.ShortcutRedo{})
}

// shortcut does the command of a shortcut and reports whether there is one. While a question is open there is none.
func (w *window) shortcut(s fyne.Shortcut) bool {
	if w.modal != nil {
		return false
	}
	if s.ShortcutName() == (&fyne.ShortcutRedo{}).ShortcutName() {
		w.redo()
		return true
	}
	for _, m := range w.menus() {
		for _, k := range m.commands() {
			if k.shortcut != nil && k.shortcut.ShortcutName() == s.ShortcutName() {
				if !k.dead {
					k.do()
				}
				return true
			}
		}
	}
	return false
}

// shortFolder is the name of a file's folder, for telling two files of one name apart.
func shortFolder(path string) string {
	r := []rune(filepath.Base(filepath.Dir(path)))
	if len(r) > 12 {
		r = append(r[:11], '…')
	}
	return string(r)
}
