// Package live recomputes the study of the newest plan in the background and hands the parts back as they are ready.
//
// A [Runner] is one goroutine with a one-place slot: submitting a plan replaces the one that waits and cancels the work on
// the one before. The stages run cheapest first and each delivers on its own, named by the revision of the plan it
// belongs to. A [Board] keeps the newest part of each stage and wakes the window at most once for any number of
// deliveries; workers never wait for the window.
package live
