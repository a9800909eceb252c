package gui

import (
	"fmt"
	"image"
	"testing"
	"time"

	"fyne.io/fyne/v2"
	"fyne.io/fyne/v2/container"
	"fyne.io/fyne/v2/driver/software"
	"fyne.io/fyne/v2/test"

	"enfilade/app/session"
	"enfilade/solver/plan"
)

// keyed is the gallery with a route, two walls that nearly meet, and a selection.
func keyed(t *testing.T, sel plan.Ref) *rig {
	r := routed(t)
	for _, line := range []plan.Chain{plan.ChainOf(m(16, 13), m(18, 13)), plan.ChainOf(m(18.01, 12), m(18.01, 14))} {
		if err := r.doEdit(plan.AddWall{Wall: plan.Wall{Line: line, Height: plan.Ceiling}}); err != nil {
			t.Fatal(err)
		}
	}
	r.session.Select(sel)
	r.acted()
	r.settle()
	r.until("the gap is listed", func() bool { return len(r.problems.found) > 0 })
	return r
}

// stops are what Tab goes to, from the picture on until it comes round.
func (r *rig) stops() (all []fyne.Focusable) {
	c := r.win.Canvas()
	for c.Focus(r.view); len(all) < 200; {
		c.FocusNext()
		f := c.Focused()
		all = append(all, f)
		if f == fyne.Focusable(r.view) {
			break
		}
	}
	return all
}

// TestTabLeadsWhereItCanBeSeen: what has the focus lies in sight, whatever is selected and however low the window is, and Tab
// comes round by the picture, the column, the menus and the tools.
func TestTabLeadsWhereItCanBeSeen(t *testing.T) {
	long(t)
	for _, sel := range []plan.Ref{{Kind: plan.KindObserver, ID: "O1"}, {Kind: plan.KindRoute, ID: "R1"}, {Kind: plan.KindTarget, ID: "T1"}, {}} {
		r := keyed(t, sel)
		if sel == (plan.Ref{}) {
			r.session.Select()
			r.acted()
		}
		r.win.Resize(fyne.NewSize(1200, 640))
		if r.stops(); r.win.Canvas().Focused() != fyne.Focusable(r.view) {
			t.Fatal("Tab does not come round to the picture")
		}
		d, c := r.app.Driver(), r.win.Canvas()
		top := d.AbsolutePositionForObject(r.form.scroll).Y
		bottom := top + r.form.scroll.Size().Height
		inForm := 0
		for c.FocusNext(); c.Focused() != fyne.Focusable(r.view); c.FocusNext() {
			o := c.Focused().(fyne.CanvasObject)
			switch o.(type) {
			case *entry, *picker, *swatches, *iconButton, *pushButton:
			default:
				continue
			}
			if b, ok := o.(*pushButton); ok && b.text.text == "Fix" {
				continue
			}
			inForm++
			y := d.AbsolutePositionForObject(o).Y
			if y < top-0.5 || y+o.Size().Height > bottom+0.5 {
				t.Errorf("%v selected: a %T with the focus lies from %v to %v, the form is seen from %v to %v", sel, o, y, y+o.Size().Height, top, bottom)
			}
		}
		if inForm < 5 {
			t.Errorf("%v selected: Tab goes to %d parts of the form", sel, inForm)
		}
	}
}

// TestWhatCanBeClickedCanBeReachedByKeys: everything in the window that takes a click takes the focus, but for the lines of lists,
// which their lists stand for.
func TestWhatCanBeClickedCanBeReachedByKeys(t *testing.T) {
	r := keyed(t, plan.Ref{Kind: plan.KindObserver, ID: "O1"})
	found := 0
	var walk func(o fyne.CanvasObject)
	walk = func(o fyne.CanvasObject) {
		if !o.Visible() {
			return
		}
		if _, list := o.(interface{ Select(id int) }); list {
			found++
			return
		}
		_, taps := o.(fyne.Tappable)
		if _, focus := o.(fyne.Focusable); taps && !focus {
			t.Errorf("a %T takes clicks and not the focus", o)
		} else if focus {
			found++
		}
		switch x := o.(type) {
		case *fyne.Container:
			for _, c := range x.Objects {
				walk(c)
			}
		case *container.Scroll:
			walk(x.Content)
		case fyne.Widget:
			for _, c := range test.WidgetRenderer(x).Objects() {
				walk(c)
			}
		}
	}
	walk(r.win.Content())
	if found < 25 {
		t.Errorf("%d parts were looked at", found)
	}
}

// TestTheFocusIsVisible in both themes: each kind of part looks otherwise with the focus than without.
func TestTheFocusIsVisible(t *testing.T) {
	long(t)
	for _, theme := range []string{themeLight, themeDark} {
		r := keyed(t, plan.Ref{Kind: plan.KindObserver, ID: "O1"})
		r.setTheme(theme)
		kinds := map[string]bool{}
		for _, f := range r.stops() {
			kind := fmt.Sprintf("%T", f)
			if kinds[kind] || f == fyne.Focusable(r.view) { // the picture's ring comes with the key's release
				continue
			}
			kinds[kind] = true
			if n := r.ringOf(f); n < 60 {
				t.Errorf("%s: a %s with the focus differs in %d pixels", theme, kind, n)
			}
		}
		if len(kinds) < 7 {
			t.Errorf("%s: only %v have the focus in turn", theme, kinds)
		}
	}
}

// ringOf is in how many pixels a part of the window looks otherwise with the focus. It is asked again when it does not: with
// thirty processes at work on two processors the first field was once drawn before it had heard of the focus.
func (r *rig) ringOf(f fyne.Focusable) (n int) {
	for try := 0; try < 10 && n == 0; try++ {
		f.FocusLost()
		alone := portrait(f.(fyne.CanvasObject))
		without := alone.Capture()
		f.FocusGained()
		n = changed(without, alone.Capture())
		f.FocusLost()
		time.Sleep(time.Duration(try) * 10 * time.Millisecond)
	}
	return n
}

// portrait is a canvas with a part of the window alone on it, with a rim for its focus ring.
func portrait(o fyne.CanvasObject) fyne.Canvas {
	size := o.Size()
	c := software.NewCanvas()
	c.SetContent(o)
	c.Resize(size.AddWidthHeight(16, 16))
	return c
}

// changed counts the pixels in which two pictures of one size differ.
func changed(a, b image.Image) (n int) {
	p, q := a.(*image.NRGBA).Pix, b.(*image.NRGBA).Pix
	for i := 0; i < len(p); i += 4 {
		if [4]byte(p[i:i+4]) != [4]byte(q[i:i+4]) {
			n++
		}
	}
	return n
}

// TestNextItem: every item that is not hidden is selected in turn, and lies in view.
func TestNextItem(t *testing.T) {
	r := newGallery(t)
	r.session.Select()
	yes := true
	if err := r.doEdit(plan.Mark{Items: []plan.Ref{{Kind: plan.KindBlock, ID: "B1"}}, Hidden: &yes}); err != nil {
		t.Fatal(err)
	}
	fit := r.view.cam
	for range 60 {
		r.runes("n")
	}
	if r.view.cam != fit {
		t.Error("the picture moves for what is in view already")
	}
	r.session.Select()
	r.view.zoom(r.at(2, 2), 8)
	n := 0
	for x := range session.All(r.session.Plan()) {
		if x == (plan.Ref{Kind: plan.KindBlock, ID: "B1"}) {
			continue
		}
		r.runes("n")
		if n++; len(r.session.Selection()) != 1 || r.session.Selection()[0] != x {
			t.Fatalf("the %dth is %v, want %v", n, r.session.Selection(), x)
		}
		b, _ := r.selectionBounds()
		px, py := r.view.glide.from(r.view.cam).PixelMM(b.Center())
		if px < 0 || py < 0 || px > float64(r.view.cam.W) || py > float64(r.view.cam.H) {
			t.Errorf("%v lies at %v, %v", x, px, py)
		}
	}
	last := r.session.Selection()[0]
	if r.runes("n"); r.session.Selection()[0] == last {
		t.Error("it does not go round")
	}
	if r.nextItem(-1); r.session.Selection()[0] != last {
		t.Errorf("before the first comes %v, want %v", r.session.Selection(), last)
	}
}
