package gui

import (
	"slices"

	"fyne.io/fyne/v2"
)

// desk is all the windows of the program, and what they share. Each window has a plan, a session and a solver of its own.
type desk struct {
	parts   parts
	look    *look
	setting bool      // the toolkit is being given its theme, and tells that its settings have changed
	size    fyne.Size // of windows, where it was asked for
	windows []*window
	opened  int // windows so far: each has a number of its own
	keeper  *keeper
}

func newDesk(p parts, look *look) *desk {
	p.app.Settings().SetTheme(look)
	return &desk{parts: p, look: look}
}

// open makes another window, with an empty plan in it, and shows it.
func (d *desk) open() *window {
	w := newWindow(d)
	d.resize(w)
	w.win.Show()
	w.view.grab()
	return w
}

// blank returns a window that the plan of a file may be opened in without anything being lost: w itself when its plan is empty
// and has no file, or is that of this file without changes; else a new one.
func (d *desk) blank(w *window, path string) *window {
	none := w.session.Path() == "" && emptyPlan(w.session.Committed())
	same := path != "" && w.session.Path() == path
	if (none || same) && !w.unsaved() {
		return w
	}
	return d.open()
}

// quit closes every window, after asking each with unsaved work what is to become of it. One Cancel leaves them all open.
func (d *desk) quit() { d.quitFrom(0) }

func (d *desk) quitFrom(i int) {
	for ; i < len(d.windows); i++ {
		if w := d.windows[i]; w.unsaved() {
			w.win.RequestFocus()
			w.unlessUnsaved(func() { d.quitFrom(i + 1) })
			return
		}
	}
	for _, w := range slices.Clone(d.windows) {
		w.shut()
	}
}

// setLook changes the colours of every window. The toolkit is not given another theme: it would throw away all measures of texts
// and parse its fonts anew, for which it holds the window for a tenth of a second, where sizes and fonts stay as they are.
func (d *desk) setLook(l look) {
	*d.look = l
	for _, w := range d.windows {
		c := w.win.Canvas()
		for _, o := range append(c.Overlays().List(), c.Content()) {
			o.Refresh()
		}
		w.acted()
	}
}

// rescale has the toolkit look at its scale, which it does when it is given a theme.
func (d *desk) rescale() {
	d.setting = true
	d.parts.app.Settings().SetTheme(d.look)
	d.setting = false
	for _, w := range d.windows {
		w.acted()
	}
}

// cameBack looks whether other programs changed the files that are open, when the program gets the focus again.
func (d *desk) cameBack() {
	for _, w := range d.windows {
		w.lookAtFile()
	}
}

// close ends what windows that are still open left running.
func (d *desk) close() {
	for _, w := range d.windows {
		w.closing = true
		w.close()
	}
}
