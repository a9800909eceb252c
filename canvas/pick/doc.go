// Package pick finds what lies under the pointer and where the pointer should snap.
//
// Places are device pixels of a [view.Camera], tolerances are px at 100 %. Everything here serves the hand, so it
// measures in floating point; it decides nothing about sight or walking. What is snapped to is exact all the same: an end
// is the end, a crossing the grid point nearest to the true one. The lists of the plan are searched one item after the
// other, for snapping by their boxes: a move over a plan of 20,000 walls takes less than a millisecond (BenchmarkAt,
// BenchmarkSnap), so there is no index to keep up to date.
package pick
