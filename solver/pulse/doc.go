// Package pulse lets long work tell how far it is and be cancelled, through the context it is given.
//
// Work calls [Tell] every few thousand steps; whoever waits puts a listener into the context with [With]. A part of the work
// is given a context from [Part], so that its own 0 to 1 falls into its place of the whole.
package pulse
