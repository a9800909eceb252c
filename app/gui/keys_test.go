package gui

import (
	"strings"
	"testing"

	"fyne.io/fyne/v2"
)

// TestKeysPage: the page names every tool with its letter, and every shape of one; it fits a small window.
func TestKeysPage(t *testing.T) {
	said := ""
	for _, r := range keyGroups()[0].rows {
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
