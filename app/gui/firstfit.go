package gui

import (
	"github.com/paulmach/orb"

	"enfilade/canvas/view"
	"enfilade/solver/plan"
)

// fitFirst brings the first thing that is drawn in an empty plan into view when it lies beyond it: its measures were typed. What
// is drawn by hand lies in view already, and the picture does not move under the hand.
func (w *window) fitFirst(p *plan.Plan) {
	if w.session.Previewing() || w.begun() {
		return
	}
	was := w.bare
	w.bare = emptyPlan(p)
	if was && !w.bare && !w.view.shows(w.bounds()) {
		w.view.fit()
	}
}

// shows reports whether bounds, in mm, lie inside the rulers and the picture's edges.
func (v *planView) shows(b orb.Bound) bool {
	if b.Max[0] < b.Min[0] {
		return true
	}
	c := v.glide.from(v.cam)
	x, y := c.PixelMM(b.Min)
	x2, y2 := c.PixelMM(b.Max)
	edge := view.Ruler * c.K
	return x >= edge && y2 >= edge && x2 <= float64(c.W) && y <= float64(c.H)
}
