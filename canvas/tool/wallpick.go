package tool

import (
	"slices"

	"enfilade/canvas/pick"
	"enfilade/solver/plan"
)

// wallUnder returns the wall under the pointer, also by one of its openings or corners.
func wallUnder(h Host, e Pointer) (plan.Wall, bool) {
	hit, ok := pick.At(h.Plan(), h.Camera(), e.X, e.Y, nil)
	if !ok {
		return plan.Wall{}, false
	}
	id := hit.Ref.ID
	switch hit.Ref.Kind {
	case plan.KindWall:
	case plan.KindOpening:
		o, _ := h.Plan().Opening(id)
		id = o.Wall
	default:
		return plan.Wall{}, false
	}
	return h.Plan().Wall(id)
}

// chosenWalls returns the selected walls that may be changed.
func chosenWalls(h Host) (walls []plan.Wall) {
	for _, r := range h.Selection() {
		if w, ok := h.Plan().Wall(r.ID); ok && r.Kind == plan.KindWall && !w.Locked {
			walls = append(walls, w)
		}
	}
	return walls
}

// wallRefs names walls.
func wallRefs(walls []plan.Wall) (refs []plan.Ref) {
	for _, w := range walls {
		refs = append(refs, plan.Ref{Kind: plan.KindWall, ID: w.ID})
	}
	return slices.Clip(refs)
}
