// Command enfilade is a desktop editor for floor plans on which seeing and being seen matter, and the same studies on the
// command line. `enfilade --help` tells what can be said; package app/verbs does it.
//
// Built with CGO_ENABLED=0 it has every verb but no window, and needs neither a C compiler nor a display.
package main
