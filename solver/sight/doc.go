// Package sight finds the region seen from a point and answers "does a see b".
//
// The method is triangular expansion (Bungiu, Hemmer, Hershberger, Huang and Kröller, "Efficient computation of visibility
// polygons", EuroCG 2014): from the triangles around the eye, cones bounded by two directions pass from triangle to
// triangle through every edge that does not stop sight at the eye's height. Whether a corner splits a cone is the sign of
// a cross product of grid vectors. Cones of zero width die, so the region is closed and regularised: touching a corner
// does not block, and a sliver of sight without width does not count. A wall seen edge-on hides nothing.
//
// Directions are grid vectors from the eye. Points of the border that lie off the grid are kept as a direction and a
// fraction of it, exact, and become floating point only to be measured or drawn. x points right, y up, rings run
// counter-clockwise. The package does not know heights of targets: everything lies in the plane of the eye.
package sight
