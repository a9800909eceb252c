package gui

import (
	"image/color"

	"fyne.io/fyne/v2"
	"fyne.io/fyne/v2/canvas"
	"fyne.io/fyne/v2/container"
	"fyne.io/fyne/v2/driver/desktop"
	"fyne.io/fyne/v2/widget"

	"enfilade/app/live"
	"enfilade/assets"
	"enfilade/canvas/paint"
	"enfilade/solver/plan"
	"enfilade/solver/study"
)

// table lists the approaches to every target under the start they are from. The row under the pointer is shown in the plan
// while it is there; a click chooses it.
type table struct {
	w       *window
	box     *fyne.Container
	columns *fyne.Container // their heads
	count   *inkText
	empty   *fyne.Container
	list    *widget.List
	rows    []row
	lines   []int // what the list shows: indices of rows, and for the heading above a row -1 less its index
	seen    tableKey
	fresh   freshRows
}

// tableKey is all that the table depends on.
type tableKey struct {
	marks         *plan.Marks
	unit          string
	result        *study.Result
	start, target string
	stale         bool
}

// row is one line of the table.
type row struct {
	pair
	from, to    string
	first, full string
	mark        string // icon
	stale       bool
	chosen      bool
	fresh       bool   // it has changed just now
	tip         string // what is said when the pointer rests on it
}

func newTable(w *window) *table {
	t := &table{w: w, count: caption("").right()}
	t.list = widget.NewList(func() int { return len(t.lines) }, func() fyne.CanvasObject { return newTableRow(t) },
		func(i widget.ListItemID, o fyne.CanvasObject) {
			if n := t.lines[i]; n < 0 {
				o.(*tableRow).putHead(t.rows[-1-n])
			} else {
				o.(*tableRow).put(t.rows[n])
			}
		})
	t.list.HideSeparators = true
	t.list.OnSelected = t.chosenByKey
	t.empty = pile(body("No approaches yet."), caption("Put down a start (B) and a target (T): the walk to"),
		caption("first sight is worked out as you draw."))
	head := around(nil, nil, heading("Approaches"), nil, t.count)
	t.columns = container.New(rowLayout{t}, newText("", assets.Regular, 11, roleInk3), newText("target", assets.Regular, 11, roleInk3),
		newText("first sight", assets.Regular, 11, roleInk3).right(), newText("full walk", assets.Regular, 11, roleInk3).right())
	top := pile(inset(18, 14, 18, 4, head), t.columns)
	t.box = around(pile(hairline(), top), nil, nil, nil,
		container.NewStack(container.NewThemeOverride(inset(0, 2, 0, 6, t.list), tightLook{w}), inset(18, 8, 18, 0, t.empty)))
	return t
}

// update brings the rows up to date.
func (t *table) update() {
	p, r := t.w.session.Plan(), &t.w.results
	key := tableKey{p.Marks(), p.Sheet().Unit, r.result, r.start, r.target, r.stale(live.StageApproaches)}
	if key == t.seen {
		return
	}
	other := key.start != t.seen.start || key.target != t.seen.target
	t.seen = key
	t.columns.Refresh()
	rows := tableRows(p, r)
	t.fresh.compare(t.w, rows)
	t.show(rows)
	if other {
		t.bringUp()
	}
}

// bringUp scrolls the chosen walk into sight, for it may have been chosen in the picture.
func (t *table) bringUp() {
	for i, n := range t.lines {
		if n >= 0 && t.rows[n].chosen {
			t.list.ScrollTo(i)
		}
	}
}

// show puts rows in the list.
func (t *table) show(rows []row) {
	t.fresh.mark(rows, t.w.now())
	t.empty.Hidden = len(rows) > 0
	switch n := len(rows); n {
	case 0:
		t.count.set("")
	default:
		t.count.set(counted(n, "walk"))
	}
	if same(rows, t.rows) {
		return
	}
	t.rows, t.lines = rows, t.lines[:0]
	for i := range rows {
		if i == 0 || rows[i].start != rows[i-1].start {
			t.lines = append(t.lines, -1-i)
		}
		t.lines = append(t.lines, i)
	}
	t.empty.Refresh()
	t.list.Refresh()
}

func same(a, b []row) bool {
	if len(a) != len(b) {
		return false
	}
	for i := range a {
		if a[i] != b[i] {
			return false
		}
	}
	return true
}

// tableRows makes the lines of the table, starts outermost, in the plan's order.
func tableRows(p *plan.Plan, r *results) []row {
	stale := r.stale(live.StageApproaches)
	found := map[pair]study.Approach{}
	if r.result != nil {
		for _, a := range r.result.Approaches {
			found[pair{a.Start, a.Target}] = a
		}
	}
	rows := make([]row, 0, p.NumStarts()*p.NumTargets())
	for _, s := range p.Starts() {
		for _, g := range p.Targets() {
			pr := pair{s.ID, g.ID}
			w := row{pair: pr, from: startName(p, s.ID), to: targetName(p, g.ID), mark: "unknown", stale: stale,
				chosen: pr == pair{r.start, r.target}}
			if a, ok := found[pr]; ok {
				w.fill(a, p.Sheet().Unit)
			}
			rows = append(rows, w)
		}
	}
	return rows
}

// fill puts an approach's figures into its row, in the plan's unit.
func (w *row) fill(a study.Approach, unit string) {
	w.full, w.tip = "–", tipWords(a, unit)
	if a.HasFullWalk {
		w.full = farText(unit, a.FullWalk)
	}
	switch {
	case a.Problem != "":
		w.mark, w.first, w.full = "fail", "–", "–"
	case a.Status == study.StatusSeen:
		w.mark, w.first = "seen", "at once"
	case a.Status == study.StatusApproach:
		w.mark, w.first = "first-sight", farText(unit, a.Length)
	default:
		w.mark, w.first = "unseen", "never"
	}
	if w.stale {
		w.mark = "unknown"
	}
}

// tableRow shows one line of the table.
type tableRow struct {
	widget.BaseWidget
	t           *table
	row         row
	head        bool // it is the heading of the row's start
	drawn       *paint.Theme
	hovered     bool
	mark        *icon
	from, walk  *inkText
	first, full *inkText
}

func newTableRow(t *table) *tableRow {
	r := &tableRow{t: t, mark: newIcon("unknown", 16, roleInk3), walk: body("").shrinking(),
		from:  newText("", assets.Semibold, 12.5, roleInk).shrinking(),
		first: newText("", assets.Bold, 12.5, roleInk).right(), full: newText("", assets.Regular, 12, roleInk2).right()}
	r.ExtendBaseWidget(r)
	return r
}

func (r *tableRow) put(w row) {
	if r.row == w && !r.head && r.drawn == themed() {
		return
	}
	r.row, r.head = w, false
	role := roleInk
	switch {
	case w.stale, w.mark == "unknown":
		role = roleInk3
	case w.mark == "fail", w.mark == "first-sight":
		role = roleRed
	}
	r.mark.set(w.mark, role)
	r.walk.set(w.to)
	r.first.role, r.full.role = roleInk, roleInk2
	if w.stale {
		r.first.role, r.full.role = roleInk3, roleInk3
	}
	r.first.set(w.first)
	r.full.set(w.full)
	r.Refresh()
}

// putHead makes the line the heading of the start that a row is from.
func (r *tableRow) putHead(w row) {
	if r.head && r.row.pair == w.pair && r.row.from == w.from && r.drawn == themed() {
		return
	}
	r.row, r.head = w, true
	r.row.chosen, r.row.fresh = false, false
	r.from.set("from " + w.from)
	r.Refresh()
}

// Tapped chooses the row's start and target, or of a heading the start.
func (r *tableRow) Tapped(*fyne.PointEvent) { r.t.choose(r.row, r.head) }

// chosenByKey chooses a line when Space is pressed on it.
func (t *table) chosenByKey(i widget.ListItemID) {
	t.list.UnselectAll() // the row has a sign of its own
	if n := t.lines[i]; n < 0 {
		t.choose(t.rows[-1-n], true)
	} else {
		t.choose(t.rows[n], false)
	}
}

// choose makes a row's start and target the chosen ones, or of a heading the start.
func (t *table) choose(row row, head bool) {
	w := t.w
	w.results.start = row.start
	if !head {
		w.results.target = row.target
	}
	var keep []plan.Ref
	for _, ref := range w.session.Selection() {
		if ref.Kind != plan.KindStart && ref.Kind != plan.KindTarget {
			keep = append(keep, ref)
		}
	}
	w.session.Select(keep...)
	w.acted()
}

// MouseIn shows the row's approach in the plan.
func (r *tableRow) MouseIn(*desktop.MouseEvent) {
	if r.head {
		return
	}
	r.hovered = true
	p := r.row.pair
	r.t.w.results.hover = &p
	r.t.w.acted()
	r.showTip()
	r.Refresh()
}

// MouseMoved does nothing.
func (r *tableRow) MouseMoved(*desktop.MouseEvent) {}

// MouseOut shows the chosen approach again.
func (r *tableRow) MouseOut() {
	r.hovered = false
	r.t.w.results.hover = nil
	r.t.w.acted()
	r.t.w.tips.hide()
	r.Refresh()
}

// CreateRenderer is for the toolkit.
func (r *tableRow) CreateRenderer() fyne.WidgetRenderer {
	cells := container.New(rowLayout{r.t}, r.mark, r.walk, r.first, r.full)
	x := &tableRowRenderer{r: r, ground: canvas.NewRectangle(nil), bar: canvas.NewRectangle(nil), cells: cells,
		from: inset(18, 6, 18, 0, r.from)}
	x.Refresh()
	return x
}

type tableRowRenderer struct {
	r           *tableRow
	ground, bar *canvas.Rectangle
	cells, from *fyne.Container
}

func (x *tableRowRenderer) Layout(s fyne.Size) {
	x.ground.Resize(s)
	x.bar.Resize(fyne.NewSize(3, s.Height))
	x.cells.Resize(s)
	x.from.Resize(s)
}
func (x *tableRowRenderer) MinSize() fyne.Size { return fyne.NewSize(200, 28) }
func (x *tableRowRenderer) Refresh() {
	p := themed()
	x.r.drawn = p
	x.ground.FillColor, x.bar.FillColor = color.Transparent, color.Transparent
	switch {
	case x.r.row.chosen:
		x.ground.FillColor, x.bar.FillColor = p.Field, p.Ink
	case x.r.row.fresh:
		x.ground.FillColor = p.Field
	case x.r.hovered:
		x.ground.FillColor = faded(p.Ink, 7)
	}
	x.cells.Hidden, x.from.Hidden = x.r.head, !x.r.head
	x.cells.Refresh()
	x.from.Refresh()
	canvas.Refresh(x.ground)
	canvas.Refresh(x.bar)
}
func (x *tableRowRenderer) Objects() []fyne.CanvasObject {
	return []fyne.CanvasObject{x.ground, x.bar, x.cells, x.from}
}
func (x *tableRowRenderer) Destroy() {}

// rowLayout is the table's columns: mark, walk, first sight, full walk; the figures' are wider in a unit that takes more digits.
type rowLayout struct{ t *table }

// MinSize is for the toolkit.
func (rowLayout) MinSize([]fyne.CanvasObject) fyne.Size { return fyne.NewSize(200, 18) }

// Layout is for the toolkit.
func (l rowLayout) Layout(o []fyne.CanvasObject, s fyne.Size) {
	const side = 18
	firstWide, fullWide := float32(54), float32(50)
	if u := l.t.seen.unit; u == "mm" || u == "cm" {
		firstWide, fullWide = 74, 66
	}
	place := func(o fyne.CanvasObject, x, w float32) {
		o.Move(fyne.NewPos(x, 0))
		o.Resize(fyne.NewSize(w, s.Height))
	}
	end := s.Width - side
	place(o[0], side, 16)
	place(o[1], side+25, end-fullWide-firstWide-side-25)
	place(o[2], end-fullWide-firstWide, firstWide)
	place(o[3], end-fullWide, fullWide)
}
