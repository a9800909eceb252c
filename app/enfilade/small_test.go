//go:build cgo && linux

package main

import (
	"os"
	"path/filepath"
	"strings"
	"testing"
	"time"

	"enfilade/assets"
)

// TestSmallDisplay opens the window on a display that is too small for its usual size.
func TestSmallDisplay(t *testing.T) {
	s := newScreenOf(t, "1280x720")
	path := filepath.Join(t.TempDir(), "gallery.enfilade")
	if err := os.WriteFile(path, assets.SamplePlan("gallery"), 0o666); err != nil {
		t.Fatal(err)
	}
	s.start(path)
	window := s.window()
	for range 20 { // the toolkit may correct its guess in the first frames
		if s.geometry(window) == "1280x684" {
			break
		}
		time.Sleep(pause)
	}
	if got := s.geometry(window); got != "1280x684" {
		t.Errorf("the window is %s px on a display of 1280x720, want all of its width and its height less a title", got)
	}
}

// window returns the number of the program's window.
func (s *screen) window() string {
	s.t.Helper()
	lines := strings.Fields(string(s.run("xdotool", "search", "--onlyvisible", "--name", "Enfilade")))
	if len(lines) == 0 {
		s.t.Fatal("no window is open")
	}
	return lines[len(lines)-1]
}

// geometry returns how wide and high a window is, in px.
func (s *screen) geometry(window string) string {
	s.t.Helper()
	values := map[string]string{}
	for _, line := range strings.Fields(string(s.run("xdotool", "getwindowgeometry", "--shell", window))) {
		if k, v, ok := strings.Cut(line, "="); ok {
			values[k] = v
		}
	}
	return values["WIDTH"] + "x" + values["HEIGHT"]
}
