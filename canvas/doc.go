// Package canvas is the home of the drawing on the screen: the view, the display list, its pixels, picking and tools; its
// code lives one level down.
package canvas
