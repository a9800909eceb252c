package gui

import (
	"testing"

	"fyne.io/fyne/v2"
)

// inSight reports whether a line of the form lies in the part of it that is shown.
func (r *rig) inSight(label string) bool {
	d := r.app.Driver()
	row := r.line(label)
	value := fyne.CanvasObject(row.entry)
	if row.entry == nil {
		value = row.pick
	}
	top, page := d.AbsolutePositionForObject(value), d.AbsolutePositionForObject(r.form.scroll)
	return top.Y >= page.Y && top.Y+value.Size().Height <= page.Y+r.form.scroll.Size().Height
}

func TestThePlansFactsAreSeenWithoutScrolling(t *testing.T) {
	r := newGallery(t)
	for _, size := range []fyne.Size{fyne.NewSize(1440, 900), fyne.NewSize(1024, 700)} {
		r.win.Resize(size)
		if size.Width < narrow {
			r.toggleSide()
		}
		r.session.Select()
		r.acted()
		for _, label := range []string{"Title", "Place", "Unit", "Eye height", "Radius", "Pace", "Seen is"} {
			if !r.inSight(label) {
				t.Errorf("at %v %s is out of sight", size, label)
			}
		}
		r.runes("w")
		for _, label := range []string{"Thickness", "Height", "Body", "Low walls", "Door width", "Title"} {
			if !r.inSight(label) {
				t.Errorf("at %v with walls to draw %s is out of sight", size, label)
			}
		}
		r.keys(fyne.KeyEscape)
	}
}

func TestTheRightColumnFoldsUntilAskedFor(t *testing.T) {
	r := newGallery(t)
	at := func(width float32, want bool) {
		t.Helper()
		r.win.Resize(fyne.NewSize(width, 700))
		r.frame()
		if r.side.Visible() != want {
			t.Fatalf("at %v px the right column is there: %v", width, r.side.Visible())
		}
		left := width - railWidth - 1
		if want {
			left -= sideWidth
		}
		if r.view.Size().Width != left {
			t.Fatalf("at %v px the picture is %v px wide, want %v", width, r.view.Size().Width, left)
		}
	}
	at(1440, true)
	at(1024, false)
	at(1440, true)
	at(1024, false)
	r.toggleSide()
	at(1024, true)
	at(1440, true)
	r.toggleSide()
	at(1440, false)
	at(1024, false)
}

func TestADraggedRuleOfTheRightColumnStays(t *testing.T) {
	r := newGallery(t)
	r.columnSplit.SetOffset(0.3)
	r.win.Resize(fyne.NewSize(1300, 800))
	if r.columnSplit.Offset != 0.3 {
		t.Errorf("the rule was moved to %v", r.columnSplit.Offset)
	}
}
