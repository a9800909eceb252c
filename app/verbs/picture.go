package verbs

import (
	"fmt"
	"image/png"
	"io"
	"path/filepath"
	"strings"

	"enfilade/canvas/paint"
	"enfilade/canvas/raster"
	"enfilade/canvas/view"
	"enfilade/fileio/store"
	"enfilade/solver/plan"
	"enfilade/solver/study"
)

// The size of a picture in pixels: that of the plan in a window of 1440 by 900.
const (
	pictureWidth  = 1440
	pictureHeight = 900
)

// picturePath refuses a path that is not a PNG's, before anything is solved.
func picturePath(path string) error {
	if path == "" || strings.EqualFold(filepath.Ext(path), ".png") {
		return nil
	}
	return fmt.Errorf("%s: --picture: the picture is a PNG; let the name end in .png", path)
}

// drawPicture writes the plan with its results, as the window would show it on opening, to a PNG file.
func drawPicture(path, theme string, p *plan.Plan, r *study.Result) error {
	observer, start, target := paint.Choose(p)
	colours := paint.Light()
	if theme == "dark" {
		colours = paint.Dark()
	}
	scene := &paint.Scene{Plan: p, Result: r, Theme: colours, Observer: observer, Start: start, Target: target,
		Camera: view.Fit(paint.Bounds(p), pictureWidth, pictureHeight, 1)}
	picture := raster.Picture(scene)
	err := store.Save(path, func(w io.Writer) error { return png.Encode(w, picture) })
	if err != nil {
		return fmt.Errorf("%s: --picture: %s", path, strings.TrimPrefix(err.Error(), path+": "))
	}
	return nil
}
