//go:build !cgo

package main

import "errors"

// openWindow says that this build has no window, and what it has.
func openWindow(_, _ string) error {
	return errors.New("window: this program was built without its window (CGO_ENABLED=0); enfilade study PLAN prints the " +
		"study of a plan, and with --picture FILE.png draws it; enfilade --help tells more")
}
