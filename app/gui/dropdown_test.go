package gui

import (
	"strconv"
	"strings"
	"testing"

	"fyne.io/fyne/v2"
	"fyne.io/fyne/v2/driver/desktop"

	"enfilade/solver/exact"
	"enfilade/solver/plan"
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

// TestClosableWalls: only a wall with corners enough and open ends can be closed to a ring.
func TestClosableWalls(t *testing.T) {
	r := newRig(t, realSolver)
	for name, c := range map[string]struct {
		line string
		want bool
	}{
		"one piece": {"0 0 3 0", false}, "two pieces": {"0 0 3 0 3 2", true}, "a ring": {"0 0 3 0 3 2 0 0", false},
	} {
		var pts []exact.Pt
		for f := strings.Fields(c.line); len(f) > 0; f = f[2:] {
			x, _ := strconv.ParseFloat(f[0], 64)
			y, _ := strconv.ParseFloat(f[1], 64)
			pts = append(pts, m(x, y))
		}
		w := plan.Wall{ID: "W1", Line: plan.ChainOf(pts...)}
		r.session.Open(plan.From(plan.Parts{Walls: []plan.Wall{w}}), "")
		if got := r.closable("W1"); got != c.want {
			t.Errorf("%s: closable is %v", name, got)
		}
	}
}
