// Package plantest gives tests a text notation for plans, seeded plans of any size, small plans full of degeneracies, and
// slow answers that are easy to trust.
//
// The notation is read by [Parse] and written by [Text]. [Office], [Clutter], [Comb] and [Maze] build plans of a given
// number of walls from a seed; [Tangles] and [Specks] draw small plans for property tests in which walls touch, cross,
// overlap and end on each other far more often than chance would have it, and [Count] measures how often.
//
// A [Twin] answers on a rounded graph what the fast solver answers on its mesh: regions, sight between two points, walks
// and approaches. It knows no mesh and no triangle: every ray is tried against every edge, every leg against every edge,
// with exact fractions of math/big. [Rounded] is the same for snap rounding. Coordinates are those of solver/exact: grid
// units of 0.1 mm, x right, y up.
package plantest
