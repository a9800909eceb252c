package gui

import (
	"math"
	"slices"

	"enfilade/app/session"
	"enfilade/solver/exact"
	"enfilade/solver/plan"
)

// nextItem selects the item that follows the selected one in the plan's lists, or with by -1 the one before it, round and round,
// and brings it into view if it is not: how everything is reached without a pointer. Hidden items are passed over.
func (w *window) nextItem(by int) {
	var all []plan.Ref
	for r := range session.All(w.session.Plan()) {
		if m, ok := w.session.Plan().Meta(r); ok && !m.Hidden {
			all = append(all, r)
		}
	}
	if len(all) == 0 {
		w.say("There is nothing to select yet.")
		return
	}
	at := -1
	if sel := w.session.Selection(); len(sel) > 0 {
		at = slices.Index(all, sel[len(sel)-1])
	}
	if at < 0 && by < 0 {
		at = 0
	}
	if w.toolAt != 0 {
		w.choose(0)
	}
	r := all[(at+by+len(all))%len(all)]
	w.session.Select(r)
	if b, ok := w.selectionBounds(); ok && !w.view.shows(b) {
		c := b.Center()
		w.lookAt(exact.Pt{X: int32(math.Round(c[0] * exact.PerMM)), Y: int32(math.Round(c[1] * exact.PerMM))}, false)
	}
	w.acted()
}
