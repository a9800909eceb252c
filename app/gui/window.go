package gui

import (
	"path/filepath"
	"strings"
	"time"

	"fyne.io/fyne/v2"
	"fyne.io/fyne/v2/container"
	"fyne.io/fyne/v2/driver/desktop"

	"enfilade/app/live"
	"enfilade/app/session"
	"enfilade/canvas/paint"
	"enfilade/canvas/pick"
	"enfilade/canvas/tool"
	"enfilade/fileio/store"
	"enfilade/solver/plan"
)

// window is a window of the program with everything in it.
type window struct {
	desk   *desk
	number int // of the window, for as long as the program runs
	app    fyne.App
	win    fyne.Window
	look   *look
	do     func(func()) // runs a function on the toolkit's goroutine, and returns at once
	now    func() time.Time

	errands errands
	print   store.Print // of the plan's file when it was last read or written
	noted   noted       // what the keeper was told last
	under   underlay
	shown   shown

	session *session.Session
	runner  *live.Runner
	board   *live.Board
	results results

	view     *planView
	picture  *picture
	host     *host
	tool     tool.Tool
	toolAt   int
	sketch   tool.Sketch
	measures tool.Defaults
	snapper  pick.Snapper
	walking  walking
	editing

	rail   []*toolButton
	tips   *tips
	notice *notice
	status *status
	foot   *foot
	form   *form
	table  *table
	first  *firstSteps
	side   *fyne.Container
	middle *fyne.Container // rail, picture and right column
	frame  frame

	columnSplit *container.Split // of the right column: form and table
	modal       *modal
	bar         *menuBar
	closing     bool
	bare        bool // nothing was drawn yet when the tool last rested
}

// parts is what a window is made with; tests hand in their own.
type parts struct {
	app    fyne.App
	solver func() live.Solver
	do     func(func())
	now    func() time.Time
	room   func() (width, height float32) // on the display for a window, in its px; nil where nobody knows
	inline bool                           // files are read and written at once on the window's goroutine
}

// newWindow makes another window of the desk, with an empty plan in it.
func newWindow(d *desk) *window {
	p := d.parts
	w := &window{desk: d, number: d.opened, app: p.app, look: d.look, do: p.do, now: p.now, measures: tool.StandardDefaults(),
		errands: errands{do: p.do, guard: d.guarded, inline: p.inline}}
	d.opened++
	d.windows = append(d.windows, w)
	w.win = w.app.NewWindow("Enfilade")
	w.win.SetPadded(false)
	w.win.SetCloseIntercept(func() { w.unlessUnsaved(w.shut) })
	w.win.SetOnDropped(func(_ fyne.Position, uris []fyne.URI) {
		paths := make([]string, len(uris))
		for i, u := range uris {
			paths[i] = u.Path()
		}
		w.dropped(paths)
	})
	w.session = session.New(plan.New(), "", nil)
	w.host = &host{w}
	w.snapper.On = w.snapSet()
	w.picture = newPicture(w)
	w.shown.without = paint.Layers(p.app.Preferences().Int(prefHidden))
	w.under.errands = errands{do: p.do, guard: d.guarded, inline: p.inline}
	w.tool = tools[0].make()
	w.board = live.NewBoard(w.do, w.answered)
	w.runner = live.New(p.solver, w.board.Put)
	w.build()
	w.session.Listen(w.changed)
	return w
}

// build puts the window together. Bars and rail have a ground each, and there is none under the whole: where there
// is no GPU the processor would paint every pixel twice.
func (w *window) build() {
	w.tips, w.notice, w.status = newTips(w.do), newNotice(), newStatus()
	w.view, w.foot, w.form, w.table, w.first = newPlanView(w), newFoot(), newForm(w), newTable(w), newFirstSteps()
	rail, buttons := newRail(w.tips, func(i int) { w.choose(w.asked(i)) })
	w.rail = buttons
	for _, b := range buttons {
		if b != nil {
			b.typed = w.typedRune
		}
	}
	w.side = w.sideColumn()
	w.panelLayer = container.NewStack()
	w.panelLayer.Hide()
	picture := container.NewStack(w.view, w.first.box, w.panelLayer)
	foot := around(hairline(), nil, nil, nil, w.foot.box)
	w.middle = container.New(&w.frame, rail, hairline(), picture, foot, w.side)
	w.bar = newMenuBar(w.menus())
	w.bar.drop.take = func() { w.win.Canvas().Focus(w.bar.drop) }
	w.bar.drop.back = w.view.grab
	page := around(pile(on(roleChrome, w.bar), hairline(), w.notice.box), on(roleChrome, w.status.box), nil, nil, w.middle)
	w.notice.page = page
	w.win.SetContent(container.NewStack(page, w.bar.drop, w.tips.layer))
	w.shortcuts()
	c := w.win.Canvas()
	c.SetOnTypedKey(func(e *fyne.KeyEvent) { w.typedKey(e.Name) })
	c.SetOnTypedRune(w.typedRune)
	if d, ok := c.(desktop.Canvas); ok {
		d.SetOnKeyDown(w.view.KeyDown)
		d.SetOnKeyUp(w.view.KeyUp)
	}
	w.rail[0].choose(true)
}

// changed is told every change of the plan that is shown.
func (w *window) changed(rev uint64, p *plan.Plan) {
	w.submit(w.asking(rev, p))
	w.acted()
}

// acted brings the window up to date after anything that may have changed what it shows.
func (w *window) acted() {
	if d, ok := w.tool.(interface{ Done() bool }); ok && d.Done() {
		w.choose(0)
		return
	}
	p := w.session.Plan()
	w.followUnderlay(p)
	hovered := w.sketch.Hover
	w.sketch = w.tool.Sketch(w.host)
	if w.sketch.Hover != hovered {
		w.nameHovered()
	}
	w.results.follow(w.session, w.sketch)
	w.fitFirst(p)
	w.askMore()
	w.first.showIf(emptyPlan(p) && len(w.sketch.Band) == 0 && w.sketch.Handles == nil && !w.session.Previewing())
	w.view.over.show(w.sketch, w.view.cam, w.view.pix)
	w.view.Refresh()
	w.status.at(w.view.cam.Grid(w.view.place()), p.Sheet().Unit, w.view.inside)
	w.status.snap.set(w.snapText(w.sketch.Snap, w.view.cam))
	w.status.tell(w.onFoot(w.hint()))
	w.status.count(p, w.problems)
	w.form.update(p, w.session.Selection())
	w.table.update()
	w.foot.update(w)
	w.title()
	w.keep()
}

// hint is what the next click does; of a thing with several shapes also how to come to the next.
func (w *window) hint() string {
	if s := w.justSaid(); s != "" {
		return s
	}
	s := w.tool.Hint(w.host)
	if nextShape(w.toolAt) != w.toolAt && !w.begun() {
		s += " · " + tools[w.toolAt].letter + " again: " + strings.ToLower(tools[nextShape(w.toolAt)].name)
	}
	return s
}

// begun reports whether the tool in hand is in the midst of something.
func (w *window) begun() bool {
	return len(w.sketch.Band) > 0 || len(w.sketch.Handles) > 0 || w.sketch.Fields != nil
}

// nameHovered shows the name of the item under the pointer after a while.
func (w *window) nameHovered() {
	name := itemName(w.session.Plan(), w.sketch.Hover)
	if name == "" {
		w.tips.hide()
		return
	}
	w.tips.after(nameDelay, name, func() fyne.Position {
		return w.app.Driver().AbsolutePositionForObject(w.view).Add(w.view.last).AddXY(14, 18)
	})
}

// itemName is what people call an item, empty for what they gave no name.
func itemName(p *plan.Plan, r plan.Ref) string {
	switch r.Kind {
	case plan.KindObserver:
		o, _ := p.Observer(r.ID)
		return o.Name
	case plan.KindTarget:
		t, _ := p.Target(r.ID)
		return t.Name
	case plan.KindStart:
		s, _ := p.Start(r.ID)
		return s.Name
	case plan.KindZone:
		z, _ := p.Zone(r.ID)
		return z.Name
	}
	return ""
}

// name is what people call the plan: its file, else its title.
func (w *window) name() string {
	if path := w.session.Path(); path != "" {
		return filepath.Base(path)
	}
	if title := w.session.Plan().Sheet().Title; title != "" {
		return title
	}
	return "New plan"
}

// title names the plan and says whether it has unsaved changes.
func (w *window) title() {
	name := w.name()
	if w.session.Dirty() {
		name = "• " + name
	}
	if t := name + " – Enfilade"; t != w.win.Title() {
		w.win.SetTitle(t)
	}
}

// choose takes a tool in hand. What the one before was in the midst of is finished as far as it has come.
func (w *window) choose(i int) {
	if f, ok := w.tool.(tool.Finisher); ok {
		f.Finish(w.host)
	}
	w.tool.Stop(w.host)
	w.tool, w.toolAt = tools[i].make(), i
	for _, b := range w.rail {
		b.choose(b == w.rail[i])
	}
	w.rail[i].put(tools[i].icon, tools[i].tip)
	if w.view.inside {
		w.tool.Move(w.host, w.view.pointer(w.view.last, 0))
	}
	w.view.grab()
	w.acted()
}

// modifiers returns the modifier keys that are down; the toolkit's test driver knows none.
func (w *window) modifiers() fyne.KeyModifier {
	if d, ok := w.app.Driver().(desktop.Driver); ok {
		return d.CurrentKeyModifiers()
	}
	return 0
}

// close ends the workers. The window is not used after it.
func (w *window) close() {
	w.runner.Close()
	w.picture.close()
}
