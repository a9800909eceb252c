package gui

import (
	"bytes"
	"fmt"
	"os"
	"os/signal"
	"path/filepath"
	"syscall"
	"time"

	"fyne.io/fyne/v2"
	"fyne.io/fyne/v2/container"

	"enfilade/assets"
	"enfilade/fileio/planfile"
	"enfilade/fileio/store"
	"enfilade/solver/plan"
)

// shelterFolder is where copies of unsaved work lie: beside the program's settings.
func shelterFolder() (string, error) {
	dir, err := os.UserConfigDir()
	if err != nil {
		return "", err
	}
	return filepath.Join(dir, "enfilade", "unsaved"), nil
}

// keepSafe begins to keep copies of unsaved work. It returns the shelter, nil where there can be none, which is told in the
// window.
func (d *desk) keepSafe(w *window) *store.Shelter {
	folder, err := shelterFolder()
	var s *store.Shelter
	if err == nil {
		s, err = store.OpenShelter(folder)
	}
	if err != nil {
		w.notice.show(sentence("unsaved work is not kept safe, save often: "+failure(err)), "Save…", func() { w.save(nil) })
		return nil
	}
	d.keeper = newKeeper(s, d.parts.now, func(err error) {
		d.parts.do(func() {
			if err != nil && len(d.windows) > 0 {
				w := d.windows[0]
				w.notice.show(sentence("unsaved work is not kept safe, save now: "+failure(err)), "Save…", func() { w.save(nil) })
			}
		})
	})
	return s
}

// patience is how long a hung window may hold up the end of the program once it was told to end.
const patience = 3 * time.Second

// onSignal copies unsaved work at once when the program is told to end, and then lets it end.
func (d *desk) onSignal() {
	c := make(chan os.Signal, 1)
	signals := []os.Signal{syscall.SIGTERM, os.Interrupt}
	if !signal.Ignored(syscall.SIGHUP) {
		signals = append(signals, syscall.SIGHUP)
	}
	signal.Notify(c, signals...)
	go func() {
		<-c
		d.keeper.flush()
		d.parts.do(d.parts.app.Quit)
		time.Sleep(patience)
		os.Exit(1)
	}()
}

// offerLeft offers what programs that were killed left unsaved.
func (d *desk) offerLeft(w *window, s *store.Shelter) {
	if s == nil {
		return
	}
	w.errands.run(func() func() {
		left := s.Left()
		if len(left) == 0 {
			return nil
		}
		return func() { w.askLeft(left) }
	})
}

// askLeft asks what is to become of work that was left unsaved. What is not opened and not discarded is offered again at
// the next start.
func (w *window) askLeft(left []store.Left) {
	if w.modal != nil || w.closing {
		return
	}
	page := pile(body("The program ended before this work was saved. Your files are as they were."))
	var m *modal
	for i, l := range left {
		when := fmt.Sprintf("%s · kept %s", folderWords(l.Path), ago(l.At, w.now()))
		words := pile(newText(leftName(l), assets.Semibold, 12.5, roleInk).shrinking(), caption(when).shrinking())
		var ways fyne.CanvasObject
		if len(left) > 1 {
			ways = inset(12, 2, 0, 0, container.NewHBox(
				newPushButton("Discard", func() { m.leave(); w.discardLeft(left, i) }),
				inset(8, 0, 0, 0, newPushButton("Open", func() { m.leave(); w.openLeft(left[i]); w.askRest(left, i) }))))
		}
		page.Add(inset(0, 14, 0, 0, around(nil, nil, nil, ways, words)))
	}
	choices := []choice{{"Open it", func() { w.openLeft(left[0]) }}, {"Discard it", func() { w.discardLeft(left, 0) }}, {"Not now", nil}}
	if len(left) > 1 {
		choices = []choice{{fmt.Sprintf("Open all %d", len(left)), func() {
			for _, l := range left {
				w.openLeft(l)
			}
		}}, {"Not now", nil}}
	}
	scroll := container.NewThemeOverride(container.NewVScroll(inset(0, 0, 10, 0, page)), tightLook{w})
	m = w.ask("Unsaved work was found", container.New(minHeight(min(page.MinSize().Height+8, 320)), scroll), 560, choices...)
}

// askRest asks about the others once one is dealt with.
func (w *window) askRest(left []store.Left, done int) {
	rest := append(left[:done:done], left[done+1:]...)
	if len(rest) > 0 {
		w.askLeft(rest)
	}
}

// discardLeft takes a copy away for good.
func (w *window) discardLeft(left []store.Left, i int) {
	if err := left[i].Discard(); err != nil {
		w.notice.show(sentence("the copy was not taken away: "+failure(err)), "Show again", func() { w.askLeft(left) })
		return
	}
	w.askRest(left, i)
}

// leftName is what people call the work: the name of its file, else its title.
func leftName(l store.Left) string {
	switch {
	case l.Path != "":
		return filepath.Base(l.Path)
	case l.Title != "":
		return l.Title
	}
	return "A plan without a title"
}

// folderWords says where a file lies.
func folderWords(path string) string {
	if path == "" {
		return "never saved"
	}
	return "in " + filepath.Dir(path)
}

// openLeft opens work that was left unsaved, as unsaved changes of its file. The copy is taken away when the window has made
// one of its own.
func (w *window) openLeft(l store.Left) {
	w.errands.run(func() func() {
		var p *plan.Plan
		data, err := l.Read()
		if err == nil {
			p, err = planfile.Read(bytes.NewReader(data), leftName(l))
		}
		return func() {
			switch {
			case w.closing:
			case err != nil:
				w.notice.show(sentence("this unsaved work cannot be read, it stays at "+l.File()+": "+failure(err)), "New plan", func() { w.unlessUnsaved(w.newPlan) })
			default:
				w.openedLeft(l, p)
			}
		}
	})
}

// openedLeft shows work that was left unsaved.
func (w *window) openedLeft(l store.Left, p *plan.Plan) {
	in := w.desk.blank(w, l.Path)
	in.show(func() {
		in.session.OpenUnsaved(p)
		in.session.Saved(nil, l.Path)
	})
	in.print = l.Print
	in.acted()
	in.errands.run(func() func() {
		w.desk.keeper.flush()
		if err := l.Discard(); err != nil && !os.IsNotExist(err) {
			return func() {
				in.notice.show(sentence("the copy stays and is offered again: "+failure(err)), "Save…", func() { in.save(nil) })
			}
		}
		return nil
	})
}

// ago says how long ago something was, in words.
func ago(then, now time.Time) string {
	switch d := now.Sub(then); {
	case d < time.Minute:
		return "less than a minute ago"
	case d < time.Hour:
		return fmt.Sprintf("%s ago, at %s", counted(int(d/time.Minute), "minute"), then.Format("15:04"))
	case then.Year() == now.Year() && then.YearDay() == now.YearDay():
		return "today at " + then.Format("15:04")
	}
	return "on " + then.Format("2 January 2006") + " at " + then.Format("15:04")
}
