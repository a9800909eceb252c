package gui

import (
	"fyne.io/fyne/v2"
	"fyne.io/fyne/v2/driver/desktop"
)

// entry is a field for one value: Enter and leaving it take the text over, Escape puts the old text back, and both give
// the focus back, so that undo means the plan's again. A text that is
// not taken stays, and its fault is told.
type entry struct {
	textEntry
	heeded
	shown  string                   // the text last put in by the program
	accept func(text string) error  // takes the text over
	fault  func(err error)          // shows why it was not, or nil that all is well; may be nil
	leave  func()                   // gives the focus back; may be nil
	beyond func(fyne.Shortcut) bool // takes the shortcuts that are not a text field's; may be nil
	faulty bool
	inside bool // it has the focus
}

func newEntry(accept func(string) error) *entry {
	e := &entry{accept: accept}
	e.oneLine()
	e.ExtendBaseWidget(e)
	return e
}

// put shows the program's text, unless someone is typing.
func (e *entry) put(text string) {
	if e.shown == text && !e.faulty || e.inside && e.Text != e.shown {
		return
	}
	e.shown = text
	e.SetText(text)
	e.say(nil)
}

// take takes the text over when it was changed.
func (e *entry) take() {
	if e.Text == e.shown && !e.faulty {
		return
	}
	text := e.Text
	if err := e.accept(text); err != nil {
		e.say(err)
		return
	}
	e.shown = text
	e.say(nil)
}

func (e *entry) say(err error) {
	e.faulty = err != nil
	if e.fault != nil {
		e.fault(err)
	}
}

// FocusGained chooses the whole text, so that what is typed after Tab replaces it; a click puts the cursor where it falls
// afterwards, which ends that choice.
func (e *entry) FocusGained() {
	e.inside = true
	e.textEntry.FocusGained()
	e.Entry.TypedShortcut(&fyne.ShortcutSelectAll{})
	e.heed()
}

// FocusLost takes the text over.
func (e *entry) FocusLost() {
	e.inside = false
	e.textEntry.FocusLost()
	e.take()
}

// TypedKey is for the toolkit.
func (e *entry) TypedKey(k *fyne.KeyEvent) {
	switch k.Name {
	case fyne.KeyReturn, fyne.KeyEnter:
		if e.take(); !e.faulty && e.leave != nil {
			e.leave()
		}
	case fyne.KeyEscape:
		e.SetText(e.shown)
		e.say(nil)
		if e.leave != nil {
			e.leave()
		}
	default:
		e.Entry.TypedKey(k)
	}
}

// TypedShortcut keeps what is a text field's own and hands on the rest.
func (e *entry) TypedShortcut(s fyne.Shortcut) {
	if _, ok := s.(*desktop.CustomShortcut); ok && e.beyond != nil {
		e.take()
		e.beyond(s)
		return
	}
	if _, ok := s.(*fyne.ShortcutUndo); ok {
		e.Undo()
		return
	}
	e.Entry.TypedShortcut(s)
}

// Undo takes back the last typing. Typing over a chosen text is two steps to the toolkit, the second of which leaves
// nothing; to people it is one.
func (e *entry) Undo() {
	e.Entry.Undo()
	if e.Text == "" && e.shown != "" {
		e.Entry.Undo()
	}
}

// undoable is a field that has its own undo, which Ctrl+Z means while it has the focus.
type undoable interface {
	Undo()
	Redo()
	TypedShortcut(fyne.Shortcut)
}

var _ undoable = (*entry)(nil)
