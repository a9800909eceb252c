package raster

import (
	"image"

	"enfilade/canvas/paint"
)

// Picture draws a whole scene: its base and its overlay, at the size of its camera.
func Picture(s *paint.Scene) *image.RGBA {
	base := paint.Base(s)
	scene := *s
	scene.Drawing = base.Drawing
	var overlay paint.List
	paint.Overlay(&scene, &overlay)
	var f Frame
	return f.Draw(NewBase(base, s.Camera.W, s.Camera.H), &overlay)
}
