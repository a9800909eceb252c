// Package session owns the open plan: its history, its selection, what is being previewed, and the file it belongs to.
//
// Plans are immutable and share the parts an edit does not touch, so the history keeps whole plans instead of inverse
// edits: undo gives back the very same plan. A [Session] has no lock and belongs to one goroutine, the window's. Every
// change of what is shown raises the revision and is told to one function, from which the background solver starts.
package session
