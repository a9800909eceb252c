package verbs_test

import (
	"flag"
	"path/filepath"
	"testing"

	"enfilade/assets"
	"enfilade/canvas/paint"
	"enfilade/canvas/raster"
	"enfilade/canvas/raster/golden"
	"enfilade/canvas/view"
)

var update = flag.Bool("update", false, "write the kept pictures anew")

// TestSamplePictures compares the picture of each sample plan with the one that is kept: light and dark, the first also at twice
// the scale.
func TestSamplePictures(t *testing.T) {
	const width, height = 900, 600
	for _, s := range assets.Samples() {
		p, r := sample(t, s.Name)
		scene := paint.Scene{Plan: p, Result: r}
		scene.Observer, scene.Start, scene.Target = paint.Choose(p)
		for _, c := range []struct {
			name  string
			theme *paint.Theme
			k     float64
		}{{"light", paint.Light(), 1}, {"dark", paint.Dark(), 1}, {"2x", paint.Light(), 2}} {
			if c.k > 1 && s.Name != assets.Samples()[0].Name {
				continue // one is enough
			}
			scene.Theme, scene.Camera = c.theme, view.Fit(paint.Bounds(p), width, height, c.k)
			golden.Picture(t, filepath.Join("testdata", "pictures", s.Name+"-"+c.name+".png"), raster.Picture(&scene), *update)
		}
	}
}
