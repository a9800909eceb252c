package gui

import (
	"os"
	"path/filepath"
	"strings"
	"testing"
	"time"

	"fyne.io/fyne/v2"

	"enfilade/fileio/store"
	"enfilade/solver/plan"
)

// keptRig is a window whose unsaved work is kept in memory.
func keptRig(t *testing.T) (*rig, *memory) {
	t.Helper()
	m := &memory{}
	r := newRig(t, realSolver)
	r.desk.keeper = newKeeper(m, time.Now, nil)
	t.Cleanup(r.desk.keeper.close)
	return r, m
}

func TestUnsavedWorkIsKept(t *testing.T) {
	r, m := keptRig(t)
	path := galleryFile(t)
	r.open(path)
	r.desk.keeper.flush()
	if m.writes != 0 {
		t.Error("a plan without changes was copied")
	}
	r.drag(11.35, 8.75, 12, 8)
	r.desk.keeper.flush()
	if got, want := m.held(r.number), text(t, r.session.Plan()); got != want {
		t.Errorf("the copy holds\n%s\nwant\n%s", got, want)
	}
	if n := m.notes[r.number]; n.Path != path || !n.Print.There() {
		t.Errorf("the note says %+v", n)
	}
	r.undo()
	r.desk.keeper.flush()
	if m.held(r.number) != "" {
		t.Error("the copy stays when the change is undone")
	}
	r.redo()
	r.desk.keeper.flush()
	r.save(nil)
	r.until("the copy of a saved plan is gone", func() bool { return m.held(r.number) == "" })
}

func TestClosingForGoodTakesTheCopyAway(t *testing.T) {
	r, m := keptRig(t)
	r.open(galleryFile(t))
	r.drag(11.35, 8.75, 12, 8)
	r.desk.keeper.flush()
	r.unlessUnsaved(r.shut)
	r.modal.choose(1) // discard
	r.until("the copy is gone", func() bool { return m.held(r.number) == "" })
	if len(r.desk.windows) != 0 {
		t.Error("the window is still there")
	}
}

// leftBehind makes copies as a killed program leaves them.
func leftBehind(t *testing.T, notes []store.Note, plans []*plan.Plan) (*store.Shelter, []store.Left) {
	t.Helper()
	folder := t.TempDir()
	dead, err := store.OpenShelter(folder)
	if err != nil {
		t.Fatal(err)
	}
	k := newKeeper(dead, time.Now, nil)
	for i, p := range plans {
		k.note(i, unsaved{plan: p, path: notes[i].Path, print: notes[i].Print})
	}
	k.close()
	dead.Close()
	s, err := store.OpenShelter(folder)
	if err != nil {
		t.Fatal(err)
	}
	t.Cleanup(s.Close)
	left := s.Left()
	if len(left) != len(plans) {
		t.Fatalf("%d copies are left, want %d", len(left), len(plans))
	}
	return s, left
}

func TestLeftWorkIsOfferedAndOpened(t *testing.T) {
	r, m := keptRig(t)
	path := galleryFile(t)
	old, _ := os.ReadFile(path)
	print, _, _ := store.PrintOf(path)
	s, _ := leftBehind(t, []store.Note{{Path: path, Print: print}, {}}, []*plan.Plan{drawn(t, 1), drawn(t, 2)})
	r.desk.offerLeft(r.window, s)
	if r.modal == nil {
		t.Fatal("nothing is offered")
	}
	r.modal.choose(0) // open all
	if len(r.desk.windows) != 2 {
		t.Fatalf("%d windows, want one for each", len(r.desk.windows))
	}
	for _, w := range r.desk.windows {
		want := drawn(t, 2)
		if w.session.Path() != "" {
			want = drawn(t, 1)
			if w.session.Path() != path {
				t.Errorf("it belongs to %q", w.session.Path())
			}
		}
		if !w.session.Dirty() || text(t, w.session.Plan()) != text(t, want) || !strings.HasPrefix(w.win.Title(), "• ") {
			t.Errorf("opened, dirty %v, title %q:\n%s", w.session.Dirty(), w.win.Title(), text(t, w.session.Plan()))
		}
		if m.held(w.number) == "" {
			t.Error("opened and not yet kept again")
		}
	}
	if now, _ := os.ReadFile(path); string(now) != string(old) {
		t.Error("the user's file was written")
	}
	if left := s.Left(); len(left) != 0 {
		t.Errorf("still offered: %v", left)
	}
}

func TestLeftWorkMayWaitOrBeDiscarded(t *testing.T) {
	r, _ := keptRig(t)
	s, left := leftBehind(t, make([]store.Note, 2), []*plan.Plan{drawn(t, 1), drawn(t, 2)})
	r.desk.offerLeft(r.window, s)
	r.typedKey(fyne.KeyEscape)
	if r.modal != nil || len(s.Left()) != 2 {
		t.Error("Escape does not leave the work for the next time")
	}
	r.discardLeft(left, 0)
	if r.modal == nil || len(s.Left()) != 1 {
		t.Error("discarding one does not leave the other")
	}
}

func TestUnreadableLeftWorkStays(t *testing.T) {
	r, _ := keptRig(t)
	s, left := leftBehind(t, make([]store.Note, 1), []*plan.Plan{drawn(t, 1)})
	writeFile(t, left[0].File(), []byte("{\"Path\":\"\"}\nno plan"))
	r.openLeft(left[0])
	if !r.notice.box.Visible() || !strings.Contains(r.notice.text.text, left[0].File()) || len(s.Left()) != 1 {
		t.Errorf("notice %q", r.notice.text.text)
	}
}

func TestAgo(t *testing.T) {
	now := time.Date(2026, 5, 4, 15, 30, 0, 0, time.UTC)
	for d, want := range map[time.Duration]string{
		20 * time.Second: "less than a minute ago", time.Minute: "1 minute ago, at 15:29", 59 * time.Minute: "59 minutes ago, at 14:31",
		5 * time.Hour: "today at 10:30", 24 * time.Hour: "on 3 May 2026 at 15:30",
	} {
		if got := ago(now.Add(-d), now); got != want {
			t.Errorf("%v: %q, want %q", d, got, want)
		}
	}
}

// changedFile opens a plan and lets another program change its file.
func changedFile(t *testing.T) (r *rig, path, theirs string) {
	t.Helper()
	r = newRig(t, realSolver)
	path = galleryFile(t)
	r.open(path)
	r.drag(11.35, 8.75, 12, 8)
	theirs = text(t, drawn(t, 3))
	writeFile(t, path, []byte(theirs))
	return r, path, theirs
}

func TestChangedFileIsNoticedBeforeItIsOverwritten(t *testing.T) {
	r, path, theirs := changedFile(t)
	mine := text(t, r.session.Plan())
	holds := func(want string) {
		t.Helper()
		if now, _ := os.ReadFile(path); string(now) != want {
			t.Errorf("the file holds\n%s\nwant\n%s", now, want)
		}
	}
	went := false
	r.save(func() { went = true })
	if r.modal == nil || went {
		t.Fatal("saved over it without asking")
	}
	holds(theirs)
	r.typedKey(fyne.KeyEscape)
	if r.modal != nil || !r.session.Dirty() || went {
		t.Error("Escape does not leave all as it was")
	}
	r.save(func() { went = true })
	r.modal.choose(1) // replace it
	holds(mine)
	if !went || r.session.Dirty() {
		t.Error("not saved")
	}
	r.drag(12, 8, 11.35, 8.75)
	if r.save(nil); r.modal != nil {
		t.Error("asked again though nobody else wrote it")
	}
}

func TestReloadIsOneStep(t *testing.T) {
	r, path, theirs := changedFile(t)
	mine := text(t, r.session.Plan())
	r.desk.cameBack()
	if !r.notice.box.Visible() || !strings.Contains(r.notice.text.text, filepath.Base(path)) {
		t.Fatalf("not noticed when the window gets the focus; notice %q", r.notice.text.text)
	}
	r.reload(path)
	if text(t, r.session.Plan()) != theirs || r.session.Dirty() || r.notice.box.Visible() {
		t.Errorf("reloaded, dirty %v:\n%s", r.session.Dirty(), text(t, r.session.Plan()))
	}
	r.undo()
	if text(t, r.session.Plan()) != mine || !r.session.Dirty() {
		t.Error("undoing does not bring mine back")
	}
}

func TestKeepMine(t *testing.T) {
	r, path, _ := changedFile(t)
	r.save(nil)
	r.modal.choose(1)
	writeFile(t, path, []byte(text(t, drawn(t, 2))))
	if r.session.Dirty() {
		t.Fatal("the test means a plan without changes")
	}
	r.desk.cameBack()
	r.notice.way.Objects[2].(*pushButton).tapped()
	if !r.session.Dirty() || r.notice.box.Visible() {
		t.Error("what the file does not hold is not marked as unsaved")
	}
	r.desk.cameBack()
	if r.notice.box.Visible() {
		t.Error("told again of the same change")
	}
	if r.save(nil); r.modal != nil || r.session.Dirty() {
		t.Error("asked again after it was settled")
	}
}

func TestUnchangedFileIsNotTold(t *testing.T) {
	r := newRig(t, realSolver)
	path := galleryFile(t)
	r.open(path)
	later := time.Now().Add(time.Hour)
	if err := os.Chtimes(path, later, later); err != nil {
		t.Fatal(err)
	}
	if r.desk.cameBack(); r.notice.box.Visible() {
		t.Error("a file that only looks newer is told")
	}
	if !r.print.Time.Equal(later) {
		t.Error("it will be read again each time")
	}
}

func TestWindowsAreTheirOwn(t *testing.T) {
	r, m := keptRig(t)
	r.open(galleryFile(t))
	r.shortcut(ctrl(fyne.KeyN, fyne.KeyModifierShift))
	if len(r.desk.windows) != 2 {
		t.Fatalf("%d windows", len(r.desk.windows))
	}
	other := r.desk.windows[1]
	if other.session == r.session || other.runner == r.runner || !emptyPlan(other.session.Plan()) {
		t.Error("the new window shares its plan")
	}
	if err := other.session.Do(plan.AddObserver{Observer: plan.Observer{Eye: 16000, View: 360, Colour: -1}}); err != nil {
		t.Fatal(err)
	}
	other.acted()
	r.drag(11.35, 8.75, 12, 8)
	r.desk.keeper.flush()
	if len(m.copies) != 2 || m.held(r.number) == m.held(other.number) || readBack(t, m.held(other.number)).NumObservers() != 1 {
		t.Errorf("%d copies", len(m.copies))
	}
	// Quitting asks each; one Cancel keeps both.
	r.desk.quit()
	if r.modal == nil || other.modal != nil {
		t.Fatal("not asked one after the other")
	}
	r.modal.choose(1)
	if other.modal == nil {
		t.Fatal("the second is not asked")
	}
	other.modal.choose(2)
	if len(r.desk.windows) != 2 || !r.session.Dirty() {
		t.Error("after Cancel a window is gone")
	}
	other.unlessUnsaved(other.shut)
	other.modal.choose(1)
	if len(r.desk.windows) != 1 || r.closing || r.desk.windows[0] != r.window {
		t.Error("closing one window does not keep the other")
	}
	r.settle()
	r.desk.quit()
	r.modal.choose(1)
	if len(r.desk.windows) != 0 {
		t.Error("not quit")
	}
}

func TestDroppedFilesEachGetAWindow(t *testing.T) {
	r := newRig(t, realSolver)
	a, b := galleryFile(t), galleryFile(t)
	r.dropped([]string{a, b})
	if len(r.desk.windows) != 2 || r.session.Path() != a || r.desk.windows[1].session.Path() != b {
		t.Errorf("%d windows", len(r.desk.windows))
	}
}

func TestMissingFileLeavesTheRecentOnes(t *testing.T) {
	r := newRig(t, realSolver)
	path := galleryFile(t)
	r.open(path)
	if err := os.Remove(path); err != nil {
		t.Fatal(err)
	}
	r.open(path)
	if len(r.recent()) != 0 || !strings.Contains(r.notice.text.text, filepath.Base(path)) {
		t.Errorf("recent %v, notice %q", r.recent(), r.notice.text.text)
	}
}
