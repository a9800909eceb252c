package gui

import (
	"image/png"
	"os"
	"path/filepath"
	"strings"
	"testing"

	"fyne.io/fyne/v2"

	"enfilade/solver/exact"
)

func TestSaveAndReopenIsTheSamePlan(t *testing.T) {
	r := newRig(t, realSolver)
	path := galleryFile(t)
	r.open(path)
	r.settle()
	r.drag(11.35, 8.75, 12, 8)
	r.runes("o")
	r.click(3, 14)
	want := text(t, r.session.Plan())
	r.shortcut(ctrl(fyne.KeyS, 0))
	if r.session.Dirty() || r.notice.box.Visible() {
		t.Fatalf("after saving dirty %v, notice %q", r.session.Dirty(), r.notice.text.text)
	}
	if got, want := r.status.hint.text, "Saved as "+filepath.Base(path)+"."; got != want {
		t.Errorf("after saving the status line says %q, want %q", got, want)
	}
	r.newPlan()
	r.open(path)
	if got := text(t, r.session.Plan()); got != want {
		t.Errorf("the plan read back differs:\n%s\nwant\n%s", got, want)
	}
	if _, ok := r.session.UndoLabel(); ok {
		t.Error("another plan's history is left")
	}
	if rec := r.recent(); len(rec) != 1 || rec[0] != path {
		t.Errorf("recent %v", rec)
	}
}

// TestReadingIsTold: while a file is read the status line says so, and afterwards how the study stands, also when it could not be
// read.
func TestReadingIsTold(t *testing.T) {
	r := newGallery(t)
	r.errands.inline = false
	solved := r.status.solve.text
	r.open(filepath.Join(t.TempDir(), "gone.enfilade"))
	if got := r.status.solve.text; got != "reading gone.enfilade" {
		t.Errorf("while a file is read: %q", got)
	}
	r.until("it is told", func() bool { return r.notice.box.Visible() })
	if got := r.status.solve.text; got != solved {
		t.Errorf("after a file that is not there: %q, want %q", got, solved)
	}
}

func TestUnsavedWorkIsAskedAbout(t *testing.T) {
	for _, c := range []struct {
		choice  int
		goesOn  bool
		written bool
	}{{0, true, true}, {1, true, false}, {2, false, false}} {
		r := newRig(t, realSolver)
		path := galleryFile(t)
		r.open(path)
		old, _ := os.ReadFile(path)
		r.drag(11.35, 8.75, 12, 8)
		went := false
		r.unlessUnsaved(func() { went = true })
		if r.modal == nil || went {
			t.Fatal("unsaved work was not asked about")
		}
		r.modal.choose(c.choice)
		now, _ := os.ReadFile(path)
		if went != c.goesOn || (string(now) != string(old)) != c.written || r.modal != nil {
			t.Errorf("choice %d: went on %v, written %v", c.choice, went, string(now) != string(old))
		}
	}
}

func TestNothingUnsavedIsNotAskedAbout(t *testing.T) {
	r := newGallery(t)
	went := false
	r.unlessUnsaved(func() { went = true })
	if !went || r.modal != nil {
		t.Error("a plan without changes was asked about")
	}
}

func TestEscapeCancelsAQuestion(t *testing.T) {
	r := newGallery(t)
	r.drag(11.35, 8.75, 12, 8)
	went := false
	r.unlessUnsaved(func() { went = true })
	r.typedKey(fyne.KeyEscape)
	if went || r.modal != nil {
		t.Error("Escape did not cancel")
	}
}

func TestFaultyFileIsTold(t *testing.T) {
	r := newGallery(t)
	before := r.session.Plan()
	path := filepath.Join(t.TempDir(), "bad.enfilade")
	writeFile(t, path, []byte(`{"enfilade": 1, "observers": [{"id": "O1", "at": [0]}]}`))
	r.open(path)
	if !r.notice.box.Visible() || !strings.Contains(r.notice.text.text, "O1") || !strings.Contains(r.notice.text.text, "at") {
		t.Errorf("notice %q, want the item and the field", r.notice.text.text)
	}
	if r.session.Plan() != before {
		t.Error("the plan that was open is gone")
	}
	r.open(filepath.Join(t.TempDir(), "none.enfilade"))
	if !strings.Contains(r.notice.text.text, "none.enfilade") {
		t.Errorf("notice %q of a file that is not there", r.notice.text.text)
	}
}

func TestFailedSaveIsToldAndKeepsTheWork(t *testing.T) {
	r := newGallery(t)
	r.drag(11.35, 8.75, 12, 8)
	went := false
	r.write(filepath.Join(t.TempDir(), "no", "such", "folder", "x.enfilade"), func() { went = true })
	if went || !r.session.Dirty() || !r.notice.box.Visible() || r.session.Path() != "" {
		t.Errorf("went on %v, dirty %v, notice %q, path %q", went, r.session.Dirty(), r.notice.text.text, r.session.Path())
	}
}

func TestSaveAsksForAFileOnce(t *testing.T) {
	r := newGallery(t)
	r.drag(11.35, 8.75, 12, 8)
	r.save(nil)
	if r.modal == nil {
		t.Fatal("a plan without a file must be asked for one")
	}
	r.modal.choose(1)
	path := filepath.Join(t.TempDir(), "mine.enfilade")
	r.write(path, nil)
	r.drag(12, 8, 13, 8)
	r.save(nil)
	if r.modal != nil || r.session.Dirty() {
		t.Error("a plan that has a file is saved without asking")
	}
	if r.win.Title() != "mine.enfilade – Enfilade" {
		t.Errorf("title %q", r.win.Title())
	}
}

func TestExportedPictureIsTheWindows(t *testing.T) {
	r := newGallery(t)
	path := filepath.Join(t.TempDir(), "out.png")
	r.writePicture(path)
	f, err := os.Open(path)
	if err != nil {
		t.Fatal(err)
	}
	defer f.Close()
	img, err := png.Decode(f)
	if err != nil || img.Bounds().Dx() != r.view.cam.W || img.Bounds().Dy() != r.view.cam.H {
		t.Fatalf("picture of %v, %v", img.Bounds(), err)
	}
	px, py := r.view.cam.Pixel(exact.Pt{X: 110000, Y: 70000})
	want := r.pixel(11, 7)
	if cr, cg, cb, _ := img.At(int(px), int(py)).RGBA(); uint8(cr>>8) != want.R || uint8(cg>>8) != want.G || uint8(cb>>8) != want.B {
		t.Errorf("pixel %d %d %d, want %v", cr>>8, cg>>8, cb>>8, want)
	}
}

func TestChooser(t *testing.T) {
	dir := t.TempDir()
	for _, name := range []string{"b.enfilade", "a.ENFILADE", "note.txt", ".hidden.enfilade"} {
		writeFile(t, filepath.Join(dir, name), nil)
	}
	if err := os.Mkdir(filepath.Join(dir, "sub"), 0o777); err != nil {
		t.Fatal(err)
	}
	newRig(t, realSolver)
	var done string
	c := newChooser(dir, "", planSuffix, func(p string) { done = p })
	if got := strings.Join(c.names, " "); got != "../ sub/ a.ENFILADE b.enfilade" {
		t.Errorf("listed %q", got)
	}
	c.choose("b.enfilade", false)
	if c.path.Text != filepath.Join(dir, "b.enfilade") || done != "" {
		t.Errorf("one click gave %q, %q", c.path.Text, done)
	}
	c.choose("sub/", false)
	if c.folder != filepath.Join(dir, "sub") || c.path.Text != filepath.Join(dir, "sub", "b.enfilade") {
		t.Errorf("in folder %q with %q", c.folder, c.path.Text)
	}
	c.choose("../", false)
	c.choose("b.enfilade", true)
	if done != filepath.Join(dir, "b.enfilade") {
		t.Errorf("two clicks gave %q", done)
	}
}

func TestFileName(t *testing.T) {
	for title, want := range map[string]string{"Upper gallery": "upper-gallery", "": "plan", " a/b:c ": "abc", "Größe": "größe"} {
		if got := fileName(title); got != want {
			t.Errorf("fileName(%q) = %q, want %q", title, got, want)
		}
	}
}

// TestTheStripHidesNothing: what lies below moves down at once when it comes, and up again when it goes.
func TestTheStripHidesNothing(t *testing.T) {
	r := newGallery(t)
	top := func() float32 { return r.app.Driver().AbsolutePositionForObject(r.rail[0]).Y }
	before := top()
	r.notice.show("Something is wrong.", "Mend it", func() {})
	if h := r.notice.box.Size().Height; h < 20 || top() != before+h {
		t.Errorf("the strip is %g high and the rail lies %g lower", h, top()-before)
	}
	r.notice.hide()
	if top() != before {
		t.Errorf("after it the rail lies %g lower", top()-before)
	}
}
