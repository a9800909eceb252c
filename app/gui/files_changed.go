package gui

import (
	"bytes"
	"path/filepath"

	"enfilade/fileio/planfile"
	"enfilade/fileio/store"
	"enfilade/solver/plan"
)

// lookAtFile looks beside the window whether another program changed the plan's file, and tells.
func (w *window) lookAtFile() {
	path, known := w.session.Path(), w.print
	if path == "" || !known.There() || w.closing {
		return
	}
	w.errands.run(func() func() {
		changed, now, err := known.Changed(path, false)
		if err != nil { // it will be told when the file is wanted
			return nil
		}
		return func() {
			switch {
			case w.session.Path() != path || w.print != known: // it was saved or replaced meanwhile
			case changed:
				w.tellChanged(path, now)
			default:
				w.print = now
			}
		}
	})
}

// tellChanged says in the strip that another program changed the plan's file, and offers what can be done about it.
func (w *window) tellChanged(path string, now store.Print) {
	w.notice.offer(sentence(filepath.Base(path)+" was changed by another program"),
		choice{"Reload it", func() { w.reload(path) }},
		choice{"Save mine as…", func() { w.keepMine(path, now); w.askSave(nil) }},
		choice{"Keep mine", func() { w.keepMine(path, now) }})
}

// keepMine goes on with the plan as it is in the window, which its file now does not hold.
func (w *window) keepMine(path string, now store.Print) {
	if w.session.Path() == path {
		w.print = now
		w.session.Saved(nil, path)
		w.acted()
	}
}

// askChanged asks before a plan is saved over what another program wrote.
func (w *window) askChanged(path string, now store.Print, goOn func()) {
	name := filepath.Base(path)
	w.ask(name+" was changed by another program", lines("It is not what was opened or saved here last.", "Saving would put this plan in its place."), 520,
		choice{"Save as…", func() { w.askSave(goOn) }},
		choice{"Replace it", func() { w.print = now; w.write(path, goOn) }},
		choice{"Reload it", func() { w.reload(path) }},
		choice{"Cancel", nil})
}

// reload shows what the plan's file holds now, as one step: undoing it brings back what was in the window.
func (w *window) reload(path string) {
	w.errands.run(func() func() {
		p, print, err := readPlan(path)
		return func() {
			if w.closing || w.session.Path() != path {
				return
			}
			if err != nil {
				w.notice.show(sentence(failure(err)), "Save mine as…", func() { w.askSave(nil) })
				return
			}
			w.tool.Stop(w.host)
			_ = w.session.Do(replace{p}) // it cannot fail
			w.session.Saved(w.session.Committed(), path)
			w.print = print
			w.notice.hide()
			w.acted()
		}
	})
}

// replace is the edit that puts another plan in the place of the whole.
type replace struct{ with *plan.Plan }

// Label is for the history.
func (replace) Label() string { return "reload" }

// Apply is for the history.
func (r replace) Apply(*plan.Plan) (*plan.Plan, error) { return r.with, nil }

// readPlan reads a plan file, and its print.
func readPlan(path string) (*plan.Plan, store.Print, error) {
	print, data, err := store.PrintOf(path)
	if err == nil && !print.There() {
		err = errGone(path)
	}
	if err != nil {
		return nil, print, err
	}
	p, err := planfile.Read(bytes.NewReader(data), filepath.Base(path))
	if err != nil {
		return nil, print, err
	}
	return sited(p, func(named string) string { return store.Resolve(path, named) }), print, nil
}
