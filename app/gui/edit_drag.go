package gui

import (
	"slices"

	"enfilade/solver/plan"
)

// outlined returns the items that are outlined in the picture: the selected ones, and while a corner is dragged also those that
// the corner drags along, so that what follows is seen before the button is let go.
func (w *window) outlined() []plan.Ref {
	const few = 64 // a drag of many items is one of the selection itself
	refs := w.session.Selection()
	if w.toolAt != 0 || !w.session.Previewing() || len(w.sketch.Dragged) > few {
		return refs
	}
	for _, r := range w.sketch.Dragged {
		if !slices.Contains(refs, r) {
			refs = append(slices.Clip(refs), r)
		}
	}
	return refs
}
