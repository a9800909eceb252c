// Package mesh builds and walks the constrained Delaunay triangulation of grid points and tagged edges.
//
// [Triangulate] inserts the points in a biased randomised order along a Hilbert curve (Amenta, Choi and Rote, "Incremental
// constructions con BRIO", SoCG 2003), restores the Delaunay property by flips (Lawson 1977), and then forces the edges in
// by flipping whatever crosses them (Sloan, "A fast algorithm for generating constrained Delaunay triangulations",
// Computers and Structures 47, 1993). Every decision is an exact sign of solver/exact. The points lie inside a box whose
// corners are added, so the mesh covers a rectangle and no hull is a special case.
//
// The mesh does not know what a wall is: its edges carry up to which height they stop sight and whether they stop
// walking, its triangles how high they are solid. x points right, y up, triangles run counter-clockwise.
package mesh
