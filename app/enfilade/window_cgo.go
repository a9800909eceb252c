//go:build cgo

package main

import (
	"os"

	"fyne.io/fyne/v2/app"

	"enfilade/app/gui"
)

// openWindow opens the window on the plan of that path, or on an empty plan when the path is empty, and returns when it is
// closed.
func openWindow(path, theme string) error {
	return gui.Run(app.NewWithID, gui.Options{Path: path, Theme: themeFor(theme, os.Getenv("ENFILADE_THEME")), Room: displayRoom})
}

// themeFor returns the theme to open in: the one asked for, else the environment's, else none.
func themeFor(asked, env string) string {
	if asked == "" && (env == "light" || env == "dark" || env == "system") {
		return env
	}
	return asked
}
