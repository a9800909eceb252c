package gui

import (
	"strings"
	"testing"

	"enfilade/app/live"
	"enfilade/solver/study"
)

// TestClearWidthIsTold: the chosen walk's clear width stands in the bottom strip, that of each walk in its row's tip; during
// a drag of what stops walking there is none.
func TestClearWidthIsTold(t *testing.T) {
	r := newGallery(t)
	if !strings.HasSuffix(r.foot.line.text, "clear width 1.27 m") {
		t.Errorf("the strip says %q, want the clear width last", r.foot.line.text)
	}
	if tip := r.table.rows[2].tip; tip != "clear width 1.30 m, to first sight 1.81 m" {
		t.Errorf("the row of the Figurehead says %q", tip)
	}
	r.drag(8, 11, 8, 10.6) // the wall north of the chart room
	r.press(8, 10.6)
	r.dragTo(8, 11)
	r.settle()
	if !r.session.Previewing() || strings.Contains(r.foot.line.text, "clear width") {
		t.Errorf("in the middle of a drag the strip says %q", r.foot.line.text)
	}
	if r.results.state.Fresh(live.StageWidths, r.results.rev) {
		t.Error("the clear widths were worked out in the middle of a drag")
	}
	r.release(8, 11)
	r.settle()
	if !strings.HasSuffix(r.foot.line.text, "clear width 1.27 m") {
		t.Errorf("after the drag the strip says %q", r.foot.line.text)
	}
}

func TestWidthWords(t *testing.T) {
	for _, c := range []struct {
		a    study.Approach
		want string
	}{
		{study.Approach{}, ""},
		{study.Approach{ClearWidth: 920, HasClearWidth: true}, "clear width to first sight 0.92 m"},
		{study.Approach{FullClearWidth: 920, HasFullClearWidth: true}, "clear width 0.92 m"},
		{study.Approach{ClearWidth: 920, HasClearWidth: true, FullClearWidth: 920, HasFullClearWidth: true}, "clear width 0.92 m"},
		{study.Approach{ClearWidth: 920, HasClearWidth: true, Problem: "start S1 stands in wall W1"}, ""},
	} {
		if got := widthWords(c.a, "m"); got != c.want {
			t.Errorf("%+v: %q, want %q", c.a, got, c.want)
		}
	}
}
