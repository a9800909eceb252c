//go:build !race

package gui

// raceEnabled says that the race detector slows everything down.
const raceEnabled = false
