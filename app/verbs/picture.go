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

// drawPicture writes the plan with its results, as the window would show it on opening, to a PNG file. A picture to trace
// over that cannot be had is told, and left out.
func (pr *Program) drawPicture(v *studyVerb, p *plan.Plan, r *study.Result) error {
	path := v.Picture
	observer, start, target := paint.Choose(p)
	colours := paint.Light()
	if v.Theme == "dark" {
		colours = paint.Dark()
	}
	scene := &paint.Scene{Plan: p, Result: r, Theme: colours, Observer: observer, Start: start, Target: target,
		Camera: view.Fit(paint.Bounds(p), pictureWidth, pictureHeight, 1)}
	if u := p.Sheet().Underlay; u != nil && !u.Hidden {
		var err error
		if scene.Photo, err = readPhoto(store.Resolve(v.Plan, u.Image)); err != nil {
			fmt.Fprintf(pr.Err, "enfilade: %s: underlay: %v; the picture is drawn without it\n", v.Plan, err)
		}
	}
	picture := raster.Picture(scene)
	err := store.Save(path, func(w io.Writer) error { return png.Encode(w, picture) })
	if err != nil {
		return fmt.Errorf("%s: --picture: %s", path, strings.TrimPrefix(err.Error(), path+": "))
	}
	return nil
}

// readPhoto reads a picture to trace over.
func readPhoto(path string) (*paint.Photo, error) {
	if !store.Ends(path) {
		return nil, fmt.Errorf("%s: is a device, not a file; name a PNG or a JPEG", path)
	}
	f, err := open(path)
	if err != nil {
		return nil, err
	}
	defer f.Close() // reading only: nothing can be lost
	data, err := io.ReadAll(f)
	if err != nil {
		return nil, err
	}
	photo, err := raster.ReadPhoto(data)
	if err != nil {
		return nil, fmt.Errorf("%s: %w", path, err)
	}
	return photo, nil
}
