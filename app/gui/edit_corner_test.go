package gui

import (
	"testing"

	"fyne.io/fyne/v2"

	"enfilade/solver/plan"
)

// TestPanelKeepsOffTheSelection: the panel of an edit opens at the right, and at the left when it would hide there what it turns.
func TestPanelKeepsOffTheSelection(t *testing.T) {
	r := newGallery(t)
	r.win.Resize(fyne.NewSize(1100, 560))
	r.settle()
	b := r.bounds()
	for _, c := range []struct {
		what string
		x, y float64 // share of the way over the plan
		left bool
	}{{"far right and up", 0.95, 0.95, true}, {"far left and up", 0.05, 0.95, false}, {"far right and low", 0.95, -0.6, false}} {
		o := r.observer("O1")
		o.At = m((b.Min[0]+c.x*(b.Max[0]-b.Min[0]))/1000, (b.Min[1]+c.y*(b.Max[1]-b.Min[1]))/1000)
		if err := r.doEdit(set(o)); err != nil {
			t.Fatal(err)
		}
		r.session.Select(plan.Ref{Kind: plan.KindObserver, ID: "O1"})
		r.acted()
		r.edit("Rotate…")
		r.panelLayer.Resize(r.view.Size())
		panel := r.panel.box.Objects[0]
		if got := panel.Position().X < r.view.Size().Width/2; got != c.left {
			t.Errorf("%s: the panel stands at %v, at the left: %v, want %v", c.what, panel.Position(), got, c.left)
		}
		r.choose(0)
	}
}
