package gui

import (
	"path/filepath"
	"strings"
	"testing"
)

// retype types a text by its characters into what has the focus.
func (r *rig) retype(text string) {
	for _, c := range text {
		r.win.Canvas().Focused().TypedRune(c)
	}
}

// TestTabAndTypeReplaces: a field of the form that the focus comes to has its whole text chosen.
func TestTabAndTypeReplaces(t *testing.T) {
	r := newGallery(t)
	r.click(11.35, 8.75)
	name, at, eye := r.line("Name").entry, r.line("At").entry, r.line("Eye height").entry
	r.win.Canvas().Focus(name)
	r.retype("Guard")
	r.win.Canvas().FocusNext()
	if r.win.Canvas().Focused() != at {
		t.Fatalf("after the name the focus is on %T", r.win.Canvas().Focused())
	}
	r.win.Canvas().FocusNext()
	if r.win.Canvas().Focused() != eye {
		t.Fatalf("after the place the focus is on %T", r.win.Canvas().Focused())
	}
	r.retype("1.2")
	r.win.Canvas().Focus(r.view)
	if o := r.observer("O1"); o.Name != "Guard" || o.Eye != 12000 {
		t.Errorf("typed over, the observer is %q with its eye at %d", o.Name, o.Eye)
	}
}

// TestSaveAsTypeName: in the question where to save, what is typed replaces the file's name alone.
func TestSaveAsTypeName(t *testing.T) {
	r := newGallery(t)
	r.askSave(nil)
	field := r.win.Canvas().Focused().(*pathEntry)
	folder := filepath.Dir(field.Text)
	if got := field.SelectedText(); got == "" || strings.Contains(got, ".") {
		t.Errorf("chosen is %q, want the name without what ends it", got)
	}
	r.retype("six rooms")
	if want := filepath.Join(folder, "six rooms"+planSuffix); field.Text != want {
		t.Errorf("the path is %q, want %q", field.Text, want)
	}
}
