package paint

import (
	"enfilade/solver/exact"
	"enfilade/solver/plan"
)

// heldBy returns the obstacles that a drag may reshape, of the plan as it was and as it is: the dragged walls, openings and
// blocks, the walls that share an end with a dragged wall, since their mitres move with it, and the openings of them all.
// It is nil when no obstacle is dragged.
func heldBy(s *Scene, plans ...*plan.Plan) map[plan.Ref]bool {
	var held map[plan.Ref]bool
	for _, ref := range s.Dragged {
		if ref.Kind == plan.KindWall || ref.Kind == plan.KindOpening || ref.Kind == plan.KindBlock {
			if held == nil {
				held = map[plan.Ref]bool{}
			}
			held[ref] = true
		}
	}
	if held == nil {
		return nil
	}
	for _, p := range plans {
		holdNeighbours(held, p)
	}
	return held
}

func holdNeighbours(held map[plan.Ref]bool, p *plan.Plan) {
	for _, o := range p.Openings() { // a moving opening reshapes its wall
		if held[plan.Ref{Kind: plan.KindOpening, ID: o.ID}] {
			held[plan.Ref{Kind: plan.KindWall, ID: o.Wall}] = true
		}
	}
	ends := map[exact.Pt]bool{}
	for _, w := range p.Walls() {
		if n := w.Line.Len(); n > 0 && held[plan.Ref{Kind: plan.KindWall, ID: w.ID}] {
			ends[w.Line.At(0)], ends[w.Line.At(n-1)] = true, true
		}
	}
	for _, w := range p.Walls() {
		if n := w.Line.Len(); n > 0 && (ends[w.Line.At(0)] || ends[w.Line.At(n-1)]) {
			held[plan.Ref{Kind: plan.KindWall, ID: w.ID}] = true
		}
	}
	for _, o := range p.Openings() {
		if held[plan.Ref{Kind: plan.KindWall, ID: o.Wall}] {
			held[plan.Ref{Kind: plan.KindOpening, ID: o.ID}] = true
		}
	}
}

// heldPlan returns a plan of the held obstacles alone, with the walls that join them for the sake of their mitres.
func heldPlan(held map[plan.Ref]bool, p *plan.Plan) *plan.Plan {
	ends := map[exact.Pt]bool{}
	for _, w := range p.Walls() {
		if n := w.Line.Len(); n > 0 && held[plan.Ref{Kind: plan.KindWall, ID: w.ID}] {
			ends[w.Line.At(0)], ends[w.Line.At(n-1)] = true, true
		}
	}
	parts := plan.Parts{Walker: p.Walker()}
	kept := map[string]bool{}
	for _, w := range p.Walls() {
		n := w.Line.Len()
		if n > 0 && (held[plan.Ref{Kind: plan.KindWall, ID: w.ID}] || ends[w.Line.At(0)] || ends[w.Line.At(n-1)]) {
			parts.Walls = append(parts.Walls, w)
			kept[w.ID] = true
		}
	}
	for _, o := range p.Openings() {
		if kept[o.Wall] {
			parts.Openings = append(parts.Openings, o)
		}
	}
	for _, b := range p.Blocks() {
		if held[plan.Ref{Kind: plan.KindBlock, ID: b.ID}] {
			parts.Blocks = append(parts.Blocks, b)
		}
	}
	return plan.From(parts)
}
