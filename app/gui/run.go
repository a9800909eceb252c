package gui

import (
	"errors"
	"os"
	"runtime"
	"time"

	"fyne.io/fyne/v2"

	"enfilade/app/live"
	"enfilade/assets"
	"enfilade/solver/study"
)

// appID names the program to the desktop and to its store of preferences.
const appID = "enfilade.plans"

// Options say how the window opens.
type Options struct {
	Path   string  // the plan to open; empty for an empty plan
	Theme  string  // "light", "dark" or "system"; empty for what was chosen last
	Width  float32 // of the window, in px at 100 %; 0 for as it was left, and no larger than the display
	Height float32
	Room   func() (width, height float32) // on the display for a window, in its px, once one is made; nil where nobody knows
}

// ErrNoDisplay says that there is no display to open a window on.
var ErrNoDisplay = errors.New("window: there is no display (neither DISPLAY nor WAYLAND_DISPLAY is set); " +
	"enfilade study PLAN prints the study of a plan, and with --picture FILE.png draws it; enfilade --help tells more")

// Run opens the window of the application that newApp makes for an id, and returns when it is closed. It must be called on
// the main goroutine.
//
//   - Errors: ErrNoDisplay where no window can open. A plan that cannot be read is told in the window.
func Run(newApp func(id string) fyne.App, o Options) error {
	if !hasDisplay() {
		return ErrNoDisplay
	}
	a := newApp(appID)
	a.SetIcon(fyne.NewStaticResource("enfilade.png", assets.AppIcon()))
	choice := o.Theme
	if choice == "" {
		choice = a.Preferences().StringWithFallback(prefTheme, themeSystem)
	}
	startScale(a.Preferences())
	d := newDesk(parts{
		app:    a,
		solver: func() live.Solver { return study.NewSolver() },
		do:     fyne.Do,
		now:    time.Now,
		room:   o.Room,
	}, &look{choice: choice, silent: systemIsSilent()})
	d.hearSystem()
	if o.Width > 0 && o.Height > 0 {
		d.size = fyne.NewSize(o.Width, o.Height)
	}
	w := d.open()
	if o.Path != "" {
		w.open(o.Path)
	}
	shelter := d.keepSafe(w)
	defer d.keeper.flush() // also when the window's goroutine panics
	d.offerLeft(w, shelter)
	d.onSignal()
	a.Lifecycle().SetOnEnteredForeground(d.cameBack)
	a.Run()
	d.close()
	d.keeper.close()
	if shelter != nil {
		shelter.Close()
	}
	return nil
}

// hasDisplay reports whether a window can open: elsewhere than on Unix there is always a display.
func hasDisplay() bool {
	switch runtime.GOOS {
	case "windows", "darwin":
		return true
	}
	return os.Getenv("DISPLAY") != "" || os.Getenv("WAYLAND_DISPLAY") != ""
}
