//go:build linux

package gui

import (
	"fyne.io/fyne/v2"
	"fyne.io/fyne/v2/driver/desktop"

	"enfilade/canvas/view"
	"enfilade/solver/plan"
)

// holdCases are what a person does, each beginning and ending with the plan as it was.
var holdCases = []struct {
	name string
	long bool // it waits for studies of a large plan made wholly anew
	do   func(h *holdRig)
}{
	{"hover", false, func(h *holdRig) {
		for _, cam := range []view.Camera{h.view.cam, h.close} {
			h.event(func() { h.view.look(cam) })
			h.rest()
			for i := range 30 {
				at := fyne.NewPos(float32(i*53%feelWidth), float32(i*31%feelHeight))
				h.event(func() { h.view.MouseMoved(mouse(at, 0)) })
			}
		}
		h.event(h.view.fit)
	}},
	{"observer", false, func(h *holdRig) {
		h.drawn(h.eye, 30)
		h.event(h.undo)
		h.rest()
	}},
	{"corner", false, func(h *holdRig) {
		h.event(func() { h.view.look(h.close) })
		h.drawn(h.wall, 30)
		h.event(h.undo)
		h.event(h.view.fit)
		h.rest()
	}},
	{"redo", false, func(h *holdRig) {
		h.drawn(h.eye, 3)
		for range 5 {
			h.event(h.undo)
			h.event(h.redo)
		}
		h.event(h.undo)
		h.rest()
	}},
	{"select", false, func(h *holdRig) {
		x, y := spot(h.wall)
		h.event(func() { h.view.look(h.close) })
		h.event(func() { h.click(x+0.5, y) })
		h.event(func() { h.click(x, y) })
		h.event(func() { h.keys(fyne.KeyEscape) })
		h.event(h.view.fit)
	}},
	{"all", false, func(h *holdRig) {
		h.event(h.selectAll)
		h.event(func() { h.move(5, 5) })
		h.event(func() { h.keys(fyne.KeyEscape) })
	}},
	{"open", false, func(h *holdRig) {
		h.open(h.path)
		before := h.session.Rev()
		h.await("the plan is open", func() bool { return h.session.Rev() != before })
		h.rest()
	}},
	{"all-moved", true, func(h *holdRig) {
		h.event(h.selectAll)
		h.event(func() { h.view.look(h.close) })
		h.drawn(h.body, 10)
		if label, _ := h.session.UndoLabel(); label != "move items" {
			h.t.Fatalf("%q instead of everything was moved", label)
		}
		h.event(h.undo)
		h.event(h.view.fit)
		h.unselect()
	}},
	{"all-nudged", true, func(h *holdRig) {
		h.event(h.selectAll)
		h.event(func() { h.keys(fyne.KeyRight) })
		h.rest()
		h.event(h.undo)
		h.unselect()
	}},
	{"all-turned", true, func(h *holdRig) {
		h.event(h.selectAll)
		h.event(h.askRotate)
		for _, deg := range []string{"5", "10", "180"} {
			h.event(func() { h.panel.rows[0].entry.SetText(deg) })
		}
		h.event(h.panel.apply)
		h.rest()
		h.event(h.undo)
		h.unselect()
	}},
	{"all-deleted", true, func(h *holdRig) {
		h.event(h.selectAll)
		h.event(h.deleteSelection)
		h.rest()
		h.event(h.undo)
		h.event(h.redo)
		h.event(h.undo)
		h.unselect()
	}},
	{"all-set", true, func(h *holdRig) {
		h.event(func() { h.session.Select(h.walls(1 << 30)...); h.acted() })
		h.event(func() { h.typeInto("Thickness", "0.15") })
		h.event(func() { h.formRow("Kind").pick.picked(int(plan.Screen)) })
		h.event(h.undo)
		h.event(h.undo)
		h.unselect()
	}},
	{"all-hidden", true, func(h *holdRig) {
		h.event(h.selectAll)
		h.event(func() { h.mark(h.session.Selection(), "hide") })
		h.rest()
		h.event(h.undo)
		h.unselect()
	}},
	{"box", false, func(h *holdRig) {
		w, ht := h.view.Size().Components()
		at := func(k float32) fyne.Position { return fyne.NewPos(40+k*(w-80), 40+k*(ht-80)) }
		h.event(func() { h.view.MouseDown(mouse(at(0), desktop.MouseButtonPrimary)) })
		for i := range 10 {
			h.event(func() { h.view.Dragged(&fyne.DragEvent{PointEvent: fyne.PointEvent{Position: at(float32(i+1) / 10)}}) })
		}
		h.event(func() { h.view.MouseUp(mouse(at(1), desktop.MouseButtonPrimary)); h.view.DragEnd() })
		if len(h.session.Selection()) == 0 {
			h.t.Fatal("nothing was picked by the box")
		}
		h.unselect()
	}},
	{"pasted", true, func(h *holdRig) {
		h.event(func() { h.session.Select(h.walls(1000)...); h.acted() })
		h.event(h.copy)
		before := h.session.Committed()
		h.event(h.paste)
		h.await("it is pasted", func() bool { return h.session.Committed() != before })
		h.rest()
		h.event(h.undo)
		h.unselect()
	}},
	{"problems", true, func(h *holdRig) { // each of 1,000 walls twice
		h.event(func() { h.try(plan.Paste{Clip: plan.Extract(h.session.Plan(), h.walls(1000))}) })
		h.rest()
		if len(h.problems.found) == 0 {
			h.t.Fatal("no problem is told")
		}
		for range 5 {
			h.event(h.problems.next)
		}
		h.event(h.undo)
		h.unselect()
	}},
	{"view", false, func(h *holdRig) {
		for i := range 20 {
			e := &fyne.ScrollEvent{PointEvent: fyne.PointEvent{Position: fyne.NewPos(500, 400)}, Scrolled: fyne.NewDelta(0, 25)}
			if i >= 10 {
				e.Scrolled = fyne.NewDelta(0, -25)
			}
			h.event(func() { h.view.Scrolled(e) })
		}
		h.event(func() { h.view.MouseDown(mouse(fyne.NewPos(300, 300), desktop.MouseButtonTertiary)) })
		for i := range 20 {
			at := fyne.NewPos(300+float32(10*i), 300+float32(5*i))
			h.event(func() { h.view.Dragged(&fyne.DragEvent{PointEvent: fyne.PointEvent{Position: at}}) })
		}
		h.event(func() { h.view.MouseUp(mouse(fyne.NewPos(500, 400), desktop.MouseButtonTertiary)) })
		h.event(h.view.fit)
		h.rest()
	}},
	{"layers", false, func(h *holdRig) {
		for range 2 {
			for _, l := range layerNames {
				h.event(func() { h.switchLayer(l.layer) })
			}
		}
	}},
	{"theme", true, func(h *holdRig) {
		for _, choice := range []string{themeDark, themeLight} {
			h.event(func() { h.setTheme(choice) })
			h.rest()
		}
	}},
	{"menus", false, func(h *holdRig) {
		h.event(h.selectAll)
		for i := range h.menus() {
			h.event(func() { h.bar.drop.open(i) })
			h.event(func() { h.bar.drop.close() })
		}
		h.unselect()
	}},
	{"saved", true, func(h *holdRig) {
		h.drawn(h.eye, 3)
		keeper := newKeeper(&memory{}, h.now, nil)
		h.desk.keeper = keeper
		h.noted = noted{}
		h.event(h.acted)
		go keeper.flush()
		h.event(func() { h.save(nil) })
		h.await("it is saved", func() bool { return !h.session.Dirty() })
		h.event(h.undo)
		h.event(func() { h.save(nil) })
		h.await("it is saved", func() bool { return !h.session.Dirty() })
		h.desk.keeper = nil
		keeper.close()
		h.rest()
	}},
	{"closed", true, func(h *holdRig) { // another window, in the middle of its first study
		other := h.desk.open()
		other.open(h.path)
		h.await("the plan is open", func() bool { return other.session.Path() != "" })
		h.event(other.shut)
	}},
}

// unselect lets the selection go.
func (h *holdRig) unselect() {
	h.event(func() { h.keys(fyne.KeyEscape) })
	h.rest()
}

// walls returns at most so many walls of the plan.
func (h *holdRig) walls(most int) (refs []plan.Ref) {
	for _, w := range h.session.Plan().Walls() {
		if len(refs) < most {
			refs = append(refs, plan.Ref{Kind: plan.KindWall, ID: w.ID})
		}
	}
	return refs
}
