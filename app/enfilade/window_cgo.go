//go:build cgo

package main

import (
	"os"

	"fyne.io/fyne/v2/app"

	"enfilade/app/gui"
)

// openWindow opens the window on the plan of that path, or on an empty plan when the path is empty, and returns when it is
// closed. The environment's ENFILADE_THEME wins over the theme asked for.
func openWindow(path, theme string) error {
	if t := os.Getenv("ENFILADE_THEME"); t == "light" || t == "dark" {
		theme = t
	}
	return gui.Run(app.NewWithID, gui.Options{Path: path, Theme: theme})
}
