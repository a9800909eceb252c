package gui

import (
	"strings"
	"testing"

	"fyne.io/fyne/v2"

	"enfilade/solver/plan"
)

// TestKeysPage: the page names every tool with its letter, and every shape of one; it fits a small window.
func TestKeysPage(t *testing.T) {
	said := ""
	for _, r := range keyGroups("m")[0].rows {
		said += r[0] + " " + r[1] + "\n"
	}
	for i, k := range tools {
		if k.letter == "" {
			continue
		}
		want := k.letter + " " + strings.ToLower(k.name)
		if shapeOf(i) != i {
			want = "again: " + strings.ToLower(k.name)
		}
		if !strings.Contains(said, want) {
			t.Errorf("the page of keys does not say %q", want)
		}
	}
	r := newRig(t, realSolver)
	for _, size := range []fyne.Size{{Width: 1440, Height: 900}, {Width: 640, Height: 420}} {
		r.win.Resize(size)
		r.showKeys()
		if got := r.modal.pop.Content.Size(); got.Width > size.Width || got.Height > size.Height {
			t.Errorf("in a window of %v the page takes %v", size, got)
		}
		r.keys(fyne.KeyEscape)
		if r.modal != nil {
			t.Fatal("Escape does not close the page")
		}
	}
}

// TestArrowsNudgeByInchesInFeet: what the page of keys and the status line say is what an arrow does.
func TestArrowsNudgeByInchesInFeet(t *testing.T) {
	r := newGallery(t)
	sheet := r.session.Plan().Sheet()
	sheet.Unit = "ft"
	if err := r.doEdit(plan.SetSheet{Sheet: sheet}); err != nil {
		t.Fatal(err)
	}
	r.click(11.35, 8.75)
	was := r.observer("O1").At
	r.keys(fyne.KeyRight)
	if by := r.observer("O1").At.X - was.X; by != 254 {
		t.Errorf("an arrow moved the observer by %d, want an inch, 254", by)
	}
	if got := nudgeRow("ft"); !strings.HasPrefix(got, "nudge by 1 in, with Shift 1 ft") {
		t.Errorf("the page of keys says %q", got)
	}
}
