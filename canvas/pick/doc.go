// Package pick finds what lies under the pointer and where the pointer should snap.
//
// Places are device pixels of a [view.Camera], tolerances are px at 100 %. Everything here serves the hand, so it
// measures in floating point; it decides nothing about sight or walking. The lists of the plan are searched one item
// after the other: a plan of 100,000 walls takes less than a frame (BenchmarkAt), so there is no index to keep up to date.
package pick
