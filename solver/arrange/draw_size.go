package arrange

import "enfilade/solver/plan"

// Fits tells of a plan that is too large before anything of it is drawn: when its walls and blocks alone, the fewest segments
// that they can make, are more than the edges that a graph may have. What crossings add is told later.
//
//   - Errors: *TooLarge.
//   - Cost: O(n) for n walls and blocks.
func Fits(p *plan.Plan) error {
	if n := leastSegments(p); n > MaxEdges {
		return &TooLarge{Edges: n, Limit: MaxEdges, Least: true}
	}
	return nil
}

// leastSegments returns a number of segments that drawing p makes at least.
func leastSegments(p *plan.Plan) int {
	// An opening takes at most both sides of one piece of a wall away.
	least := -2 * p.NumOpenings()
	for _, w := range p.Walls() {
		pieces := max(w.Line.Len()-1, 0)
		if right2, left2 := w.Sides2(); right2 != 0 || left2 != 0 {
			pieces *= 2
		}
		least += pieces
	}
	for _, b := range p.Blocks() {
		least += b.Ring.Len()
	}
	return least
}
