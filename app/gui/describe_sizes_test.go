package gui

import (
	"testing"

	"enfilade/solver/exact"
	"enfilade/solver/plan"
)

// TestStraightWallForm: length and angle of a straight wall move its other end, walls that meet there come along, and a length in which
// its door finds no room is refused.
func TestStraightWallForm(t *testing.T) {
	r := newCross(t)
	if err := r.session.Do(plan.AddWall{Wall: plan.Wall{ID: "W9", Line: plan.ChainOf(m(8, 2), m(10, 2)), Height: plan.Ceiling}}); err != nil {
		t.Fatal(err)
	}
	r.selectItems(plan.KindWall, "W1")
	if l, a := r.line("Length").entry.Text, r.line("Angle").entry.Text; l != "5.00" || a != "0" {
		t.Fatalf("length %q, angle %q", l, a)
	}
	r.enter("Length", "6,5")
	r.wantWall("W1", m(0, 0), m(6.5, 0))
	r.wantUndo("change length")
	if x := r.enter("Length", "0.5"); x.wrong.text == "" || !x.wrong.Visible() {
		t.Error("a wall is made shorter than its door")
	}
	r.wantWall("W1", m(0, 0), m(6.5, 0))
	r.enter("Angle", "90")
	r.wantWall("W1", m(0, 0), m(0, 6.5))
	r.wantUndo("turn wall")
	if x := r.enter("Length", "0"); x.wrong.text == "" {
		t.Error("a wall without length is taken")
	}
	r.selectItems(plan.KindWall, "W3")
	r.enter("Length", "5")
	r.wantWall("W3", m(8, -2), m(8, 3))
	r.wantWall("W9", m(8, 3), m(10, 2))
}

// TestRectangleForm: width and depth of a block that is a rectangle keep its lowest corner; others show none.
func TestRectangleForm(t *testing.T) {
	r := newCross(t)
	for _, b := range []plan.Block{
		{ID: "B1", Ring: plan.ChainOf(m(10, 5), m(11, 5), m(11, 5.5), m(10, 5.5)), Height: plan.Ceiling},
		{ID: "B2", Ring: plan.ChainOf(m(10, 0), m(11, 0), m(11, 1)), Height: plan.Ceiling},
	} {
		if err := r.session.Do(plan.AddBlock{Block: b}); err != nil {
			t.Fatal(err)
		}
	}
	ring := func(pts ...exact.Pt) {
		t.Helper()
		if b, _ := r.session.Plan().Block("B1"); !b.Ring.Equal(plan.ChainOf(pts...)) {
			t.Errorf("the block is %v, want %v", b.Ring, pts)
		}
	}
	r.selectItems(plan.KindBlock, "B1")
	if w, d := r.line("Width").entry.Text, r.line("Depth").entry.Text; w != "1.00" || d != "0.50" {
		t.Fatalf("width %q, depth %q", w, d)
	}
	r.enter("Width", "2")
	ring(m(10, 5), m(12, 5), m(12, 5.5), m(10, 5.5))
	r.wantUndo("change size of block")
	r.enter("Depth", "0.8")
	ring(m(10, 5), m(12, 5), m(12, 5.8), m(10, 5.8))
	for _, text := range []string{"0", "90000"} {
		if x := r.enter("Width", text); x.wrong.text == "" {
			t.Errorf("a width of %s m is taken", text)
		}
	}
	r.selectItems(plan.KindBlock, "B2")
	for _, x := range r.form.rows {
		if x.field.label == "Width" || x.field.label == "Depth" {
			t.Errorf("a triangle has a %s", x.field.label)
		}
	}
}
