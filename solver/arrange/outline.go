package arrange

import (
	"enfilade/solver/exact"
	"enfilade/solver/plan"
)

// Stops says what an edge or a body stops.
type Stops struct {
	Walk bool  // it stops walking
	Top  int32 // it stops sight from the floor up to this height, in grid units; 0 for not at all, plan.Ceiling for all of it
}

// NoBody marks a segment that is a line, not part of a body's outline.
const NoBody int32 = -1

// Segment is one straight piece of what the plan draws.
type Segment struct {
	A, B  exact.Pt
	Stops       // what the line itself stops
	Item  int32 // index into Outline.Items
	Body  int32 // index into Outline.Bodies of the body whose outline it is, its inside to the left; or NoBody
}

// Body is a closed region that stops something. Its outline may run around a place more than once: a place is inside
// when its winding number is not zero.
type Body struct {
	Stops
	Item int32 // index into Outline.Items
}

// Outline is a plan as bare geometry: segments and bodies, before any crossing is found.
//
// Bodies[0] is the floor, and the other way round from the rest: a place whose winding number about it is zero is solid to
// the ceiling. Its ring is among the segments, counter-clockwise; it is the plan's floor or, when the plan gives none, the
// bounding box of everything drawn and marked, grown by 2 m.
type Outline struct {
	Items    []plan.Ref
	Segments []Segment
	Bodies   []Body
}

// Wind says that a body's outline runs along an edge: crossing the edge from its right to its left adds Delta to the
// winding number about the body.
type Wind struct {
	Body  int32
	Delta int32
}

// Edge is one edge of a rounded graph, from point A to point B, A before B in the order of exact.Pt.
type Edge struct {
	A, B         int32 // indices into Graph.Pts
	Stops              // of the lines that run along it, merged: whatever any of them stops
	Item         int32 // index into Graph.Items of the first item that runs along it
	Wind0, Wind1 int32 // its winds are Graph.Winds[Wind0:Wind1]
}

// Graph is a planar straight-line graph on the grid: edges meet only at ends, no two edges share both ends, no edge has
// length zero. It is the truth about the plan: every side and every crossing is decided on it.
type Graph struct {
	Pts    []exact.Pt // distinct, in the order of exact.Pt
	Edges  []Edge     // in the order of A, then B
	Winds  []Wind
	Items  []plan.Ref
	Bodies []Body // Bodies[0] is the floor, as in Outline
}
