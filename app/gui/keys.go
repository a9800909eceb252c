package gui

import (
	"slices"
	"strings"
	"unicode"

	"fyne.io/fyne/v2"

	"enfilade/app/session"
	"enfilade/canvas/tool"
	"enfilade/solver/plan"
)

// toolKeys are the keys that tools know.
var toolKeys = map[fyne.KeyName]tool.KeyName{
	fyne.KeyEscape: tool.KeyEscape, fyne.KeyReturn: tool.KeyEnter, fyne.KeyEnter: tool.KeyEnter,
	fyne.KeyDelete: tool.KeyDelete, fyne.KeyBackspace: tool.KeyBackspace, fyne.KeyTab: tool.KeyTab,
	fyne.KeyLeft: tool.KeyLeft, fyne.KeyRight: tool.KeyRight, fyne.KeyUp: tool.KeyUp, fyne.KeyDown: tool.KeyDown,
}

// typedKey is a key without a character, typed into the picture or nowhere.
func (w *window) typedKey(name fyne.KeyName) {
	if w.modal != nil {
		w.modal.key(name)
		return
	}
	resting := !w.session.Previewing() && len(w.sketch.Band) == 0
	if name == fyne.KeyEscape && resting && w.stopStudy() {
		return
	}
	if (name == fyne.KeyDelete || name == fyne.KeyBackspace) && w.toolAt == 0 && resting && !w.overWaypoint() {
		w.deleteSelection()
		return
	}
	mods := w.modifiers()
	k, known := toolKeys[name]
	key := tool.Key{Name: k, Shift: mods&fyne.KeyModifierShift != 0, Ctrl: mods&fyne.KeyModifierControl != 0}
	if known && w.tool.Key(w.host, key) {
		w.acted()
		return
	}
	if w.view.arrow(name, key) {
		return
	}
	switch name {
	case fyne.KeyEscape:
		if w.leaveUnderlay() {
			return
		}
		if w.toolAt != 0 {
			w.choose(0)
		}
	case fyne.KeyF10:
		w.bar.drop.open(0)
	case fyne.KeyHome:
		w.view.fit()
	case fyne.KeyPageUp:
		w.zoom(1.25)
	case fyne.KeyPageDown:
		w.zoom(0.8)
	}
}

// typedRune is a character typed into the picture or nowhere: for the tool in hand, else the letter of a tool.
func (w *window) typedRune(r rune) {
	if w.modal != nil {
		return
	}
	if w.tool.Key(w.host, tool.Key{Name: tool.KeyRune, Rune: r}) {
		w.acted()
		return
	}
	letter := string(unicode.ToUpper(r))
	for i, k := range tools {
		if k.letter == letter {
			w.choose(w.asked(i))
			return
		}
	}
	switch r {
	case '+', '=':
		w.zoom(1.25)
	case '-':
		w.zoom(0.8)
	case '0':
		w.view.fit()
	case 'n', 'N':
		by := 1
		if w.modifiers()&fyne.KeyModifierShift != 0 {
			by = -1
		}
		w.nextItem(by)
	case '9':
		w.fitSelection()
	}
}

// zoom magnifies about the pointer, or about the picture's middle when the pointer is elsewhere.
func (w *window) zoom(factor float64) {
	p := w.view.last
	if !w.view.inside {
		s := w.view.Size()
		p = fyne.NewPos(s.Width/2, s.Height/2)
	}
	w.view.zoom(p, factor)
}

// undo takes back the last step, or the last typing of the field that has the focus.
func (w *window) undo() {
	if f, ok := w.win.Canvas().Focused().(undoable); ok {
		f.Undo()
		return
	}
	if w.tool.Key(w.host, tool.Key{Name: tool.KeyUndo}) {
		w.acted()
		return
	}
	w.tool.Stop(w.host)
	w.session.Undo()
	w.acted()
}

// redo does the last undone step again.
func (w *window) redo() {
	if f, ok := w.win.Canvas().Focused().(undoable); ok {
		f.Redo()
		return
	}
	w.tool.Stop(w.host)
	w.session.Redo()
	w.acted()
}

// The kinds of which one is chosen.
const (
	kindObserver = plan.KindObserver
	kindStart    = plan.KindStart
	kindTarget   = plan.KindTarget
)

// next selects the next item of a kind after the chosen one, round and round.
func (w *window) next(kind plan.Kind) {
	current := map[plan.Kind]string{kindObserver: w.results.observer, kindStart: w.results.start, kindTarget: w.results.target}[kind]
	var ids []string
	for r := range session.All(w.session.Plan()) {
		if r.Kind == kind {
			ids = append(ids, r.ID)
		}
	}
	if len(ids) == 0 {
		return
	}
	i := (slices.Index(ids, current) + 1) % len(ids)
	w.session.Select(plan.Ref{Kind: kind, ID: ids[i]})
	w.acted()
}

// setTheme changes the look and remembers it.
func (w *window) setTheme(choice string) {
	w.app.Preferences().SetString(prefTheme, choice)
	w.desk.setLook(look{choice: choice, silent: w.look.silent})
}

// showAbout says what the program is and what it is not.
func (w *window) showAbout() {
	w.ask("Enfilade", lines(
		"An editor for floor plans on which seeing and being seen matter.",
		"",
		"A planar study: walkers are upright bodies of one width, and everything is seen in the plane of the eye.",
		"It is no safety certification, and no substitute for fire, escape or security assessment.",
		"",
		"Fonts: Lato, SIL Open Font License 1.1."), 560, choice{"Close", nil})
}

// sentence makes an error a sentence for people: a capital first, unless it begins with the name of a file, and a full
// stop last.
func sentence(s string) string {
	r := []rune(strings.TrimSuffix(s, "."))
	if len(r) == 0 {
		return ""
	}
	if first, _, _ := strings.Cut(string(r), " "); !strings.ContainsAny(first, "./:") {
		r[0] = unicode.ToUpper(r[0])
	}
	return string(r) + "."
}
