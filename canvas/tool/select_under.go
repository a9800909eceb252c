package tool

import (
	"slices"

	"enfilade/canvas/pick"
	"enfilade/solver/plan"
)

// overUnderlay reports whether the pointer is over the picture to trace over where nothing else lies, and the picture may be
// picked: it is shown and not locked.
func (t *Select) overUnderlay(h Host, e Pointer) bool {
	u := h.Plan().Sheet().Underlay
	return u != nil && !u.Locked && !u.Hidden && covers(h, *u, h.Camera().Grid(e.X, e.Y))
}

// underHit is what lies under the pointer where no item does: the picture to trace over once it is the only thing selected, so
// that a drag carries it. Until then a drag draws a box over it, and only a click picks it.
func (t *Select) underHit(h Host, e Pointer) (pick.Hit, bool) {
	if sel := h.Selection(); len(sel) != 1 || sel[0] != theUnderlay || !t.overUnderlay(h, e) {
		return pick.Hit{}, false
	}
	return pick.Hit{Ref: theUnderlay, At: h.Camera().Grid(e.X, e.Y)}, true
}

// carryEdit moves the picture to trace over with the pointer; nothing snaps, for its places are those of the picture.
func carryEdit(h Host, g *grip) plan.Edit {
	by := g.to.Sub(g.from)
	if by.X == 0 && by.Y == 0 || !slices.Contains(h.Selection(), theUnderlay) {
		return nil
	}
	return plan.MoveItems{Items: []plan.Ref{theUnderlay}, By: by}
}
