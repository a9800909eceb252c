package gui

import (
	"image"
	"testing"

	"fyne.io/fyne/v2"

	"enfilade/solver/plan"
)

// TestThemeReachesEverything: after a change of colours the window looks, pixel by pixel, as when the toolkit is given the theme
// anew and goes through every part itself: with one item and many selected, a menu and a page open, and problems listed.
func TestThemeReachesEverything(t *testing.T) {
	long(t)
	r := newGallery(t)
	r.win.Resize(fyne.NewSize(1440, 900))
	r.settle()
	for _, state := range []struct {
		name string
		show func()
	}{
		{"observer", func() { r.selectItems(plan.KindObserver, "O1") }},
		{"many and the menu", func() { r.selectAll(); r.bar.drop.open(1) }},
		{"problems", func() {
			r.bar.drop.close()
			r.session.Select()
			w, _ := r.session.Plan().Wall("W5")
			w.ID = "W99"
			if err := r.session.Do(plan.AddWall{Wall: w}); err != nil {
				t.Fatal(err)
			}
			r.until("the problem is listed", func() bool { return len(r.problems.found) > 0 })
		}},
		{"keys", r.showKeys},
	} {
		name := state.name
		state.show()
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

// differing counts the pixels in which two pictures of one size differ and returns the first.
func differing(a, b image.Image) (n int, first image.Point) {
	p, q := a.(*image.NRGBA), b.(*image.NRGBA)
	for i := 0; i < len(p.Pix); i += 4 {
		if [4]byte(p.Pix[i:]) != [4]byte(q.Pix[i:]) {
			if n++; n == 1 {
				first = image.Pt(i%p.Stride/4, i/p.Stride)
			}
		}
	}
	return n, first
}
