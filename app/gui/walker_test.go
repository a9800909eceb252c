package gui

import (
	"strings"
	"testing"
)

// TestWalkerRadius: the form changes the walker's radius, says by how much its walks may keep farther off, and the walks
// become longer.
func TestWalkerRadius(t *testing.T) {
	r := newGallery(t)
	r.session.Select()
	r.acted()
	r.settle()
	point := r.foot.line.text
	if x := r.line("Radius"); x.entry.Text != "0.00" || x.under == nil || !strings.Contains(x.under.text, "a point") {
		t.Errorf("no radius is shown as %q, %+v", x.entry.Text, x.under)
	}
	if x := r.enter("Radius", "2.01"); x.wrong.text == "" || r.session.Plan().Walker().Radius != 0 {
		t.Error("a radius of more than 2 m was taken")
	}
	r.enter("Radius", "0.3")
	if k := r.session.Plan().Walker(); k.Radius != 3000 {
		t.Fatalf("radius %d, want 3000", k.Radius)
	}
	if x := r.line("Radius"); x.under.text != "walks keep at most 1.8 mm more" {
		t.Errorf("0.30 m: %q", x.under.text)
	}
	r.settle()
	if r.foot.line.text == point || !strings.Contains(r.foot.line.text, "clear width 1.27 m") {
		t.Errorf("walks for 0.30 m: %q, for a point: %q; the clear width is of the drawing", r.foot.line.text, point)
	}
	s, _ := r.session.Plan().Start("S1")
	s.At.X -= 10000 // farther from the outer edge of the doorway
	if err := r.session.Do(set(s)); err != nil {
		t.Fatal(err)
	}
	r.enter("Radius", "0.7") // too wide for the rotunda's openings of 1.27 m
	r.settle()
	if !strings.Contains(r.foot.line.text, "no full walk") && !strings.Contains(r.foot.line.text, "never in sight") {
		t.Errorf("walks for 0.70 m: %q", r.foot.line.text)
	}
}
