// Package arrange turns a plan into a mesh: it outlines the bodies, splits crossings, rounds them to the grid and tags
// every edge with what it stops and up to which height.
//
// It is the one translator between the drawing and bare geometry, and the only place that knows what glazing, a screen or
// a low wall stops. The rounding is snap rounding (Hobby, "Practical segment intersection with finite precision output",
// CGTA 13, 1999; Guibas and Marimont, "Rounding arrangements dynamically", IJCGA 8, 1998): every crossing and every
// vertex that another edge passes within half a unit of becomes a shared vertex, so edges meet only at ends.
package arrange
