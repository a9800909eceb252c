//go:build cgo

package main

import "github.com/go-gl/glfw/v3.4/glfw"

// displayRoom returns how much room the display has for windows, in its px, and nothing where it does not say. It must be called
// on the main goroutine once a window was made: the toolkit has set its library of displays up by then.
func displayRoom() (width, height float32) {
	m := glfw.GetPrimaryMonitor()
	if m == nil {
		return 0, 0
	}
	_, _, w, h := m.GetWorkarea()
	return float32(w), float32(h)
}
