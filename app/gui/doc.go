// Package gui shows a plan in a window: the picture one draws on, the tools, the forms and the tables beside it.
//
// [Run] opens the window and returns when it is closed. All state of the open plan is in app/session, all solving in
// app/live; this package turns the toolkit's events into those of canvas/tool and draws what comes back. Everything here
// runs on the toolkit's goroutine but two workers: the solver's runner and the painter of the picture's base. Both hand
// their results over through an atomic pointer and one queued call, and never wait for the window.
//
// The toolkit's application is handed in, so nothing here knows its display driver, and the tests run without a display.
package gui
