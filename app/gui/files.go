package gui

import (
	"bytes"
	"errors"
	"fmt"
	"image/png"
	"io"
	"io/fs"
	"os"
	"path/filepath"
	"slices"
	"strings"

	"fyne.io/fyne/v2"

	"enfilade/assets"
	"enfilade/canvas/raster"
	"enfilade/fileio/planfile"
	"enfilade/fileio/store"
	"enfilade/solver/plan"
)

// Names of what is remembered between sessions.
const (
	prefTheme  = "theme"
	prefStill  = "reduce motion"
	prefScale  = "scale"
	prefRecent = "recent"
	maxRecent  = 8
)

// unsaved reports whether the window holds work that no file holds.
func (w *window) unsaved() bool {
	return w.session.Dirty() && (w.session.Path() != "" || !emptyPlan(w.session.Committed()))
}

// unlessUnsaved does go at once, or asks first what is to become of unsaved work.
func (w *window) unlessUnsaved(goOn func()) {
	if w.modal != nil {
		return
	}
	w.tool.Stop(w.host)
	if !w.unsaved() {
		goOn()
		return
	}
	w.ask("Save the changes first?", lines(fmt.Sprintf("%s has changes that no file holds yet.", w.name())), 440,
		choice{"Save", func() { w.save(goOn) }},
		choice{"Discard", goOn},
		choice{"Cancel", nil})
}

// shut closes the window for good; other windows stay.
func (w *window) shut() {
	w.keepSize()
	w.closing = true
	w.desk.keeper.forget(w.number)
	w.desk.windows = slices.DeleteFunc(w.desk.windows, func(x *window) bool { return x == w })
	w.close()
	w.win.Close()
}

// newPlan opens an empty plan.
func (w *window) newPlan() { w.show(func() { w.session.Open(plan.New(), "") }) }

// show puts another plan in the window: load opens it in the session.
func (w *window) show(load func()) {
	w.notice.hide()
	w.tool.Stop(w.host)
	w.print = store.Print{}
	w.results.reset(w.session.Rev() + 1)
	load()
	w.choose(0)
	w.view.fitNow()
	w.report()
}

// open reads a plan file beside the window and shows it; a fault leaves the plan that is open.
func (w *window) open(path string) {
	path = absolute(path)
	before := w.session.Committed()
	w.status.solve.set("reading " + filepath.Base(path))
	w.errands.run(func() func() {
		p, print, err := readPlan(path)
		return func() {
			if !w.closing {
				w.report()
			}
			switch {
			case w.closing:
			case err != nil:
				w.openFailed(path, err)
			case w.session.Committed() != before: // it was drawn on while the file was read
				w.unlessUnsaved(func() { w.opened(p, path, print) })
			default:
				w.opened(p, path, print)
			}
		}
	})
}

// opened shows a plan that was read from a file.
func (w *window) opened(p *plan.Plan, path string, print store.Print) {
	w.show(func() { w.session.Open(p, path) })
	w.print = print
	w.remember(path)
}

func (w *window) openFailed(path string, err error) {
	if errors.Is(err, fs.ErrNotExist) {
		w.setRecent(slices.DeleteFunc(w.recent(), func(p string) bool { return p == path }))
	}
	w.notice.show(sentence(failure(err)), "Open another…", func() { w.unlessUnsaved(w.askOpen) })
}

// openIn opens a plan file in a window of its own, unless nothing is lost by opening it here.
func (w *window) openIn(path string) { w.desk.blank(w, path).open(path) }

// dropped takes files that were dropped on the window: a picture is laid under the plan; of plans the first is opened in
// this window.
func (w *window) dropped(paths []string) {
	if len(paths) == 0 {
		return
	}
	if isPhoto(paths[0]) {
		w.layUnder(paths[0])
		return
	}
	w.unlessUnsaved(func() {
		w.open(paths[0])
		for _, path := range paths[1:] {
			w.desk.open().open(path)
		}
	})
}

// absolute returns a path that stays right when the working folder changes.
func absolute(path string) string {
	if abs, err := filepath.Abs(path); err == nil {
		return abs
	}
	return path
}

// errGone is the error of a file that is not there.
func errGone(path string) error { return &fs.PathError{Op: "open", Path: path, Err: fs.ErrNotExist} }

// openSample shows a sample plan. It has no file: it is saved as whatever one likes.
func (w *window) openSample(name string) {
	p, err := planfile.Read(bytes.NewReader(assets.SamplePlan(name)), name)
	if err != nil {
		w.notice.show(sentence(failure(err)), "New plan", w.newPlan)
		return
	}
	w.show(func() { w.session.Open(p, "") })
}

// save writes the plan to its file, asking for one when it has none, and then goes on.
func (w *window) save(goOn func()) {
	if path := w.session.Path(); path != "" {
		w.write(path, goOn)
		return
	}
	w.askSave(goOn)
}

// write saves the committed plan at path, beside the window, and then goes on. It asks first when another program changed the
// plan's file.
func (w *window) write(path string, goOn func()) {
	path = absolute(path)
	p, known := w.session.Committed(), w.print
	own := path == w.session.Path() && known.There()
	w.errands.run(func() func() {
		if own {
			if changed, now, err := known.Changed(path, true); err == nil && changed {
				return func() { w.askChanged(path, now, goOn) }
			}
		}
		var text bytes.Buffer
		err := planfile.Write(&text, sited(p, func(image string) string { return store.Relate(path, image) }))
		if err == nil {
			err = store.Save(path, func(out io.Writer) error { _, err := out.Write(text.Bytes()); return err })
		}
		print := store.Written(path, text.Bytes())
		return func() { w.wrote(p, path, print, err, goOn) }
	})
}

// wrote takes note of what became of a plan that was to be saved.
func (w *window) wrote(p *plan.Plan, path string, print store.Print, err error, goOn func()) {
	if err != nil {
		w.notice.show(sentence("the plan was not saved: "+failure(err)), "Save elsewhere…", func() { w.askSave(goOn) })
		return
	}
	w.session.Saved(p, path)
	w.print = print
	w.notice.hide()
	w.remember(path)
	w.acted()
	w.say("Saved as " + filepath.Base(path) + ".")
	w.offerCopy()
	if goOn != nil {
		goOn()
	}
}

// askOpen asks for a plan file and opens it.
func (w *window) askOpen() {
	w.askFile("Open a plan", "Open", "", planSuffix, w.open)
}

// askOpenIn asks for a plan file and opens it in another window.
func (w *window) askOpenIn() {
	w.askFile("Open a plan in a new window", "Open", "", planSuffix, w.openIn)
}

// askSave asks where to save the plan, saves it there, and goes on.
func (w *window) askSave(goOn func()) {
	name := w.session.Path()
	if name == "" {
		name = fileName(w.session.Plan().Sheet().Title) + planSuffix
	}
	w.askFile("Save the plan as", "Save", filepath.Base(name), planSuffix, func(path string) {
		w.unlessThere(withSuffix(path, planSuffix), func(path string) { w.write(path, goOn) })
	})
}

// askPicture asks where to write the picture as the window shows it.
func (w *window) askPicture() {
	name := strings.TrimSuffix(filepath.Base(w.session.Path()), planSuffix)
	if w.session.Path() == "" {
		name = fileName(w.session.Plan().Sheet().Title)
	}
	w.askFile("Export the picture as", "Export", name+".png", ".png", func(path string) {
		w.unlessThere(withSuffix(path, ".png"), w.writePicture)
	})
}

func (w *window) writePicture(path string) {
	scene := w.picture.scene()
	w.errands.run(func() func() {
		img := raster.Picture(scene)
		err := store.Save(path, func(out io.Writer) error { return png.Encode(out, img) })
		if err == nil {
			return nil
		}
		return func() {
			w.notice.show(sentence("the picture was not written: "+failure(err)), "Write elsewhere…", w.askPicture)
		}
	})
}

// unlessThere does go, after asking when there is another file at path already.
func (w *window) unlessThere(path string, goOn func(string)) {
	if _, err := os.Stat(path); err != nil || path == w.session.Path() {
		goOn(path)
		return
	}
	w.ask("Replace the file?", lines(fmt.Sprintf("There is a file %s already.", filepath.Base(path))), 440,
		choice{"Replace", func() { goOn(path) }}, choice{"Cancel", nil})
}

// askFile asks for a file, beginning in the folder of the open plan.
func (w *window) askFile(title, verb, name, suffix string, done func(string)) {
	folder := filepath.Dir(w.session.Path())
	if w.session.Path() == "" {
		folder = w.home()
	}
	var m *modal
	c := newChooser(folder, name, suffix, func(path string) { m.choose(0) })
	c.path.escape = func() { m.choose(1) }
	m = w.ask(title, c.content, 620, choice{verb, func() {
		if path := c.path.Text; isFolder(path) {
			w.askFile(title, verb, name, suffix, done)
		} else {
			done(path)
		}
	}}, choice{"Cancel", nil})
	w.win.Canvas().Focus(c.path)
	c.path.TypedKey(&fyne.KeyEvent{Name: fyne.KeyEnd})
	if name != "" {
		c.path.chooseName(suffix)
	}
}

// home is where files are looked for when no plan is open: the folder of the last one, else the working folder.
func (w *window) home() string {
	if r := w.recent(); len(r) > 0 && isFolder(filepath.Dir(r[0])) {
		return filepath.Dir(r[0])
	}
	dir, err := os.Getwd()
	if err != nil {
		return string(filepath.Separator)
	}
	return dir
}

// recent returns the plans opened or saved last, newest first.
func (w *window) recent() []string { return w.app.Preferences().StringList(prefRecent) }

// remember puts a plan at the head of the recent ones.
func (w *window) remember(path string) {
	list := append([]string{path}, slices.DeleteFunc(slices.Clone(w.recent()), func(p string) bool { return p == path })...)
	w.setRecent(list)
}

func (w *window) setRecent(list []string) {
	w.app.Preferences().SetStringList(prefRecent, list[:min(len(list), maxRecent)])
}

// fileName makes a title a name for a file.
func fileName(title string) string {
	s := strings.Map(func(r rune) rune {
		switch {
		case r == ' ':
			return '-'
		case strings.ContainsRune(`/\:*?"<>|`, r) || r < ' ':
			return -1
		}
		return r
	}, strings.ToLower(strings.TrimSpace(title)))
	if s == "" {
		return "plan"
	}
	return s
}

func withSuffix(path, suffix string) string {
	if filepath.Ext(path) == "" {
		return path + suffix
	}
	return path
}

// failure is an error as people read it: without where in the program it was found.
func failure(err error) string {
	var fault *planfile.Fault
	var path *fs.PathError
	switch {
	case errors.As(err, &fault):
		return fault.Error()
	case errors.As(err, &path):
		return fmt.Sprintf("%s: %v", filepath.Base(path.Path), path.Err)
	}
	return err.Error()
}
