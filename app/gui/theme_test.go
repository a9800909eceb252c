package gui

import (
	"image"
	"testing"

	"fyne.io/fyne/v2"

	"enfilade/solver/plan"
)

// TestThemeReachesEverything: after a change of colours the window looks, pixel by pixel, as when the toolkit is given the theme
// anew and goes through every part itself: with nothing selected, each kind of item, the problems unfolded, a menu and a page open.
func TestThemeReachesEverything(t *testing.T) {
	r := newGallery(t)
	r.win.Resize(fyne.NewSize(1440, 900))
	r.settle()
	states := map[string]func(){
		"nothing":  func() { r.session.Select(); r.acted() },
		"wall":     func() { r.selectItems(plan.KindWall, "W1") },
		"opening":  func() { r.selectItems(plan.KindOpening, "D1") },
		"block":    func() { r.selectItems(plan.KindBlock, "B27") },
		"observer": func() { r.selectItems(plan.KindObserver, "O1") },
		"target":   func() { r.selectItems(plan.KindTarget, "T1") },
		"start":    func() { r.selectItems(plan.KindStart, "S1") },
		"many":     r.selectAll,
		"menu":     func() { r.bar.drop.open(1) },
		"problems": func() {
			r.bar.drop.close()
			w, _ := r.session.Plan().Wall("W5")
			w.ID = "W99"
			if err := r.session.Do(plan.AddWall{Wall: w}); err != nil {
				t.Fatal(err)
			}
			r.until("the problem is listed", func() bool { return len(r.problems.found) > 0 })
		},
		"keys": r.showKeys,
	}
	for _, name := range []string{"nothing", "wall", "opening", "block", "observer", "target", "start", "many", "menu", "problems", "keys"} {
		states[name]()
		r.settle()
		before := r.win.Canvas().Capture()
		r.setTheme(themeDark)
		r.settle()
		quick := r.win.Canvas().Capture()
		r.desk.rescale()
		r.settle()
		if n, at := differing(quick, r.win.Canvas().Capture()); n > 0 {
			t.Errorf("%s: %d pixels are of other colours, the first at %v", name, n, at)
		}
		if n, _ := differing(quick, before); n < 1_000_000 {
			t.Errorf("%s: only %d pixels change", name, n)
		}
		r.setTheme(themeLight)
	}
}

// differing counts the pixels in which two pictures differ and returns the first.
func differing(a, b image.Image) (n int, first image.Point) {
	for y := range a.Bounds().Dy() {
		for x := range a.Bounds().Dx() {
			if a.At(x, y) != b.At(x, y) {
				if n++; n == 1 {
					first = image.Pt(x, y)
				}
			}
		}
	}
	return n, first
}
