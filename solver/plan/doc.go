// Package plan is the drawing as an immutable value: walls, openings, glazing, screens, low walls, blocks, zones,
// observers, targets, starts and routes, with the edits that make a new drawing from an old one and the problems found
// in it.
//
// Lengths are grid units of 0.1 mm (see solver/exact), angles are degrees counter-clockwise from +x, y points up. A
// [Plan] never changes after it is made, so any goroutine may read it; an edit shares every part it does not touch, and
// whether the obstacles changed is a pointer comparison. The plan keeps what was drawn: it is never rounded to the mesh.
package plan
