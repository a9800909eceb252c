package gui

import (
	"testing"

	"fyne.io/fyne/v2"

	"enfilade/solver/plan"
)

// TestHandlesFollowTheSize: when the picture gets another size, or is drawn larger, the handles of what is selected go along.
func TestHandlesFollowTheSize(t *testing.T) {
	r := newGallery(t)
	r.session.Select(plan.Ref{Kind: plan.KindWall, ID: "W1"})
	r.acted()
	if len(r.sketch.Handles) == 0 {
		t.Fatal("the selected wall has no handles")
	}
	check := func(what string) {
		t.Helper()
		r.settle()
		r.until("nothing is queued", func() bool { return len(r.queue) == 0 })
		at, h := r.view.cam, r.sketch.Handles[0]
		x, y := at.Pixel(h)
		want := fyne.NewPos(float32(x)/r.view.pix, float32(y)/r.view.pix)
		corner := r.view.over.rects[0]
		got := corner.Position().AddXY(corner.Size().Width/2, corner.Size().Height/2)
		if d := got.Subtract(want); d.X*d.X+d.Y*d.Y > 0.01 {
			t.Errorf("%s: the first handle stands at %v, its corner at %v", what, got, want)
		}
	}
	check("at first")
	r.win.Resize(fyne.NewSize(1500, 820))
	r.frame()
	check("in a larger window")
	s := r.view.Size()
	r.picture.draw(int(1.5*s.Width), int(1.5*s.Height))
	check("at 150 %")
}
