//go:build cgo

package main

import "testing"

// TestThemeFor: what is asked for on the command line beats the environment, which beats what was chosen last.
func TestThemeFor(t *testing.T) {
	for _, c := range [][3]string{{"", "", ""}, {"", "dark", "dark"}, {"light", "dark", "light"}, {"system", "dark", "system"}, {"dark", "", "dark"},
		{"", "pink", ""}} {
		if got := themeFor(c[0], c[1]); got != c[2] {
			t.Errorf("asked %q with %q in the environment: %q, want %q", c[0], c[1], got, c[2])
		}
	}
}
