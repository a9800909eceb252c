package gui

import (
	"strings"
	"testing"

	"enfilade/solver/plantest"
)

// TestTooLargeAPlanIsToldInTheStatusLine: a plan above the limit of edges is shown, the status line says what the limit is and
// what to do, and one step back everything is as it was.
func TestTooLargeAPlanIsToldInTheStatusLine(t *testing.T) {
	r := newGallery(t)
	before := r.session.Plan()
	if err := r.session.Do(replace{plantest.Grid(3000)}); err != nil {
		t.Fatal(err)
	}
	r.acted()
	r.settle()
	for _, want := range []string{"the limit is 2000000", "leave some of it out"} {
		if !strings.Contains(r.status.solve.text, want) {
			t.Errorf("status %q, want %q in it", r.status.solve.text, want)
		}
	}
	r.session.Undo()
	r.acted()
	r.settle()
	if r.session.Plan() != before || strings.Contains(r.status.solve.text, "limit") {
		t.Errorf("after undo: the same plan %v, status %q", r.session.Plan() == before, r.status.solve.text)
	}
	if _, ok := r.results.sightOf("O1"); !ok {
		t.Error("after undo: no region")
	}
}
