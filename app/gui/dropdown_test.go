package gui

import (
	"testing"

	"fyne.io/fyne/v2"
	"fyne.io/fyne/v2/driver/desktop"
)

// open opens the menu with a title by the mouse.
func (r *rig) openMenu(title string) *dropDown {
	r.t.Helper()
	for i, m := range r.menus() {
		if m.title == title {
			from, _ := r.bar.span(i)
			r.bar.MouseDown(mouse(fyne.NewPos(from+4, 10), desktop.MouseButtonPrimary))
			return r.bar.drop
		}
	}
	r.t.Fatalf("there is no menu %s", title)
	return nil
}

// TestLongMenuInALowWindow: every command of the longest menu can be reached by keys and by the wheel, and what is out of sight is
// not hit.
func TestLongMenuInALowWindow(t *testing.T) {
	r := newGallery(t)
	for _, height := range []float32{900, 700, 420} {
		r.win.Resize(fyne.NewSize(1024, height))
		d := r.openMenu("View")
		last := len(d.lines) - 1
		at, _ := d.box()
		place := func(i int) fyne.Position { return at.AddXY(40, d.lines[i].y-d.scroll+5) }
		if height < 500 && d.lineAt(place(last)) == last {
			t.Errorf("%g high: what is below the window is hit", height)
		}
		d.step(-1)
		d.step(-1)
		if d.step(-1); d.under == last || !d.shows(d.under) {
			t.Errorf("%g high: keys come to line %d, in sight %v", height, d.under, d.shows(d.under))
		}
		d.Scrolled(&fyne.ScrollEvent{Scrolled: fyne.NewDelta(0, -2000)})
		if d.lineAt(place(last)) != last || place(last).Y+d.lines[last].height > height {
			t.Errorf("%g high: the wheel does not bring up the last command", height)
		}
		d.Scrolled(&fyne.ScrollEvent{Scrolled: fyne.NewDelta(0, 2000)})
		if d.lineAt(place(0)) != 0 {
			t.Errorf("%g high: the wheel does not bring the first command back", height)
		}
		d.close()
	}
}

// TestMenuGivesWay: an open menu has the keys, and closes where a question opens.
func TestMenuGivesWay(t *testing.T) {
	r := newGallery(t)
	d := r.openMenu("Help")
	if r.win.Canvas().Focused() != fyne.Focusable(d) {
		t.Errorf("the keys go to %T", r.win.Canvas().Focused())
	}
	if r.showKeys(); d.Visible() {
		t.Error("the menu stays open over a page")
	}
}
