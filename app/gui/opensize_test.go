package gui

import (
	"testing"

	"fyne.io/fyne/v2"
)

func TestOpenSize(t *testing.T) {
	size := fyne.NewSize
	for name, c := range map[string]struct {
		left, room fyne.Size
		scale      float32
		want       fyne.Size
	}{
		"nothing is known":                {size(0, 0), size(0, 0), 1, size(1440, 900)},
		"a display of just that size":     {size(0, 0), size(1440, 900), 1, size(1440, 900)},
		"a larger display":                {size(0, 0), size(2560, 1440), 1, size(1440, 900)},
		"a smaller one":                   {size(0, 0), size(1280, 720), 1, size(1280, 684)},
		"one that is only lower":          {size(0, 0), size(1920, 880), 1, size(1440, 844)},
		"drawn twice as large":            {size(0, 0), size(2560, 1440), 2, size(1280, 684)},
		"as it was left":                  {size(1100, 700), size(2560, 1440), 1, size(1100, 700)},
		"as it was left, on a larger one": {size(2400, 1300), size(1440, 900), 1, size(1440, 864)},
	} {
		if got := openSize(c.left, c.room, c.scale); got != c.want {
			t.Errorf("%s: %v, want %v", name, got, c.want)
		}
	}
}

func TestTheNextWindowIsAsLargeAsTheLast(t *testing.T) {
	r := newRig(t, realSolver)
	if got := r.win.Canvas().Size(); got != usualSize {
		t.Fatalf("the first window opens at %v", got)
	}
	r.win.Resize(fyne.NewSize(1200, 760))
	r.keepSize()
	if got := r.desk.open().win.Canvas().Size(); got != fyne.NewSize(1200, 760) {
		t.Errorf("the next one opens at %v", got)
	}
	r.desk.parts.room = func() (float32, float32) { return 1024, 700 }
	if got := r.desk.open().win.Canvas().Size(); got != fyne.NewSize(1024, 664) {
		t.Errorf("on a small display it opens at %v", got)
	}
}
