package gui

import (
	"testing"

	"fyne.io/fyne/v2"
	"fyne.io/fyne/v2/test"

	"enfilade/canvas/paint"
	"enfilade/solver/plan"
)

// menuItem does a command of the View menu.
func (r *rig) menuItem(commands []command, label string) {
	r.t.Helper()
	for _, c := range commands {
		if c.label == label {
			if c.dead {
				r.t.Fatalf("%q cannot be done now", label)
			}
			c.do()
			return
		}
	}
	r.t.Fatalf("the menu has no %q", label)
}

func TestLayersAreSwitchedAndRemembered(t *testing.T) {
	r := newGallery(t)
	washed := r.pixel(11.35, 7.5)
	r.menuItem(r.viewMenu(), "Sight regions")
	if got := r.pixel(11.35, 7.5); got == washed {
		t.Errorf("without sight regions the floor still is %v", got)
	}
	before := r.picture.base.key
	r.menuItem(r.viewMenu(), "Grid")
	r.settle()
	if r.picture.base.key == before {
		t.Error("without the grid the base is the same")
	}
	if other := r.desk.open(); other.shown.without != paint.LayerRegions|paint.LayerGrid {
		t.Errorf("another window leaves out %b", other.shown.without)
	}
	for _, c := range r.viewMenu() {
		if c.label == "Grid" && c.checked || c.label == "Rulers" && !c.checked {
			t.Errorf("%s is ticked %v", c.label, c.checked)
		}
	}
}

func TestRegionsAndWalksArePicked(t *testing.T) {
	r := newGallery(t)
	r.askShown()
	r.typedKey(fyne.KeyEscape)
	if r.modal != nil || r.shown.choice != paint.WalksToTarget || r.shown.regions != nil {
		t.Errorf("Escape changed %+v", r.shown)
	}
	r.askShown()
	rows := r.checkRows()
	if p := r.session.Plan(); len(rows) != p.NumObservers()+p.NumStarts()*p.NumTargets() {
		t.Fatalf("%d boxes", len(rows))
	}
	on := 0
	for _, c := range rows {
		if c.on {
			on++
		}
	}
	if on != r.session.Plan().NumStarts() {
		t.Errorf("%d boxes are ticked, want one for each start", on)
	}
	rows[1].Tapped(nil)
	rows[3].TypedKey(&fyne.KeyEvent{Name: fyne.KeySpace})
	r.modal.choose(0)
	if s := r.picture.scene(); len(s.Regions) != 1 || s.Regions[0] != "O2" || s.WalkChoice != paint.WalksPicked || len(s.Walks) == 0 {
		t.Errorf("picked %v, %v", s.Regions, s.Walks)
	}
}

// checkRows are the boxes of the page that is open.
func (r *rig) checkRows() (rows []*checkRow) {
	var walk func(o fyne.CanvasObject)
	walk = func(o fyne.CanvasObject) {
		switch x := o.(type) {
		case *checkRow:
			rows = append(rows, x)
		case *fyne.Container:
			for _, c := range x.Objects {
				walk(c)
			}
		case fyne.Widget:
			for _, c := range fyneObjects(x) {
				walk(c)
			}
		}
	}
	walk(r.modal.pop.Content)
	return rows
}

func TestFitSelection(t *testing.T) {
	r := newGallery(t)
	whole := r.view.cam
	r.session.Select(plan.Ref{Kind: plan.KindObserver, ID: "O1"})
	r.fitSelection()
	r.until("the view is there", func() bool { return r.view.cam.Scale > 2*whole.Scale })
	x, y := r.view.cam.Pixel(r.observer("O1").At)
	if w, h := float64(r.view.cam.W), float64(r.view.cam.H); x < w/3 || x > 2*w/3 || y < h/3 || y > 2*h/3 {
		t.Errorf("the observer is at %g, %g of %g by %g", x, y, w, h)
	}
	r.session.Select()
	r.runes("9")
	r.until("the whole plan is shown", func() bool { return r.view.cam == whole })
}

// fyneObjects are the parts of a widget.
func fyneObjects(w fyne.Widget) []fyne.CanvasObject { return test.WidgetRenderer(w).Objects() }
