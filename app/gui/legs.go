package gui

import (
	"fyne.io/fyne/v2"
	"fyne.io/fyne/v2/container"

	"enfilade/app/live"
	"enfilade/assets"
	"enfilade/canvas/tool"
	"enfilade/solver/exact"
	"enfilade/solver/plan"
	"enfilade/solver/study"
)

// legRow is one leg of a route: where it leads, how far that is, and what can be done with the waypoint there.
type legRow struct {
	to, far, time  string
	old            bool   // of the plan before the last change
	sooner, remove func() // calls at the waypoint before the one before it, takes it out; nil where that cannot be
}

// legRows tells of every leg of a route how far it is on foot.
func (w *window) legRows(p *plan.Plan, x plan.Route) (rows []legRow) {
	walk, known := w.results.route(x.ID)
	old := w.results.state == nil || !w.results.state.Fresh(live.StageRoutes, w.results.rev)
	add := func(to string, sooner, remove func()) {
		row := legRow{to: to, far: "…", old: old, sooner: sooner, remove: remove}
		switch i := len(rows); {
		case !known:
		case i < len(walk.Legs):
			row.far, row.time = w.onFootTexts(walk.Legs[i].Length, walk.Legs[i].Seconds)
		case walk.Closed == i+1:
			row.far = "closed"
		default:
			row.far = "–"
		}
		rows = append(rows, row)
	}
	edit := func(e plan.Edit) func() {
		return func() {
			_ = w.doEdit(e)
			w.win.Canvas().Focus(w.view) // the button may be gone with its line
		}
	}
	for i := range x.Via.Len() {
		var sooner, remove func()
		if !x.Locked {
			remove = edit(tool.WithoutWaypoint(x, i))
			if i > 0 {
				sooner = edit(tool.WaypointSooner(x, i))
			}
		}
		add("waypoint "+number(float64(i+1), 0), sooner, remove)
	}
	if t, ok := p.Target(x.To); ok {
		add(named(t.ID, t.Name), nil, nil)
	}
	return rows
}

// overWaypoint reports whether Delete takes out the waypoint under the pointer, and not what is selected.
func (w *window) overWaypoint() bool {
	t, ok := w.tool.(*tool.Select)
	return ok && t.OverWaypoint(w.host)
}

// onFootTexts writes a length in mm and a time.
func (w *window) onFootTexts(mm, seconds float64) (far, time string) {
	return w.host.FormatLength(mm * exact.PerMM), number(seconds, 1) + " s"
}

// walkFacts are a route's length and time on foot.
func (w *window) walkFacts(walk study.Route, known bool) []fact {
	far, time := "…", "…"
	switch {
	case known && (walk.Problem != "" || walk.Closed > 0):
		far, time = "no way", "–"
	case known:
		far, time = w.onFootTexts(walk.Length, walk.Seconds)
	}
	return []fact{{far, "on foot"}, {time, "at the walker's pace"}}
}

// routeFault is what is wrong with a route: why it cannot be walked, or what closes it.
func routeFault(walk study.Route) string {
	if walk.Closed > 0 && walk.Problem == "" {
		return "to " + walk.ClosedTo + ": " + walk.Reason
	}
	return walk.Problem
}

// legTable shows those rows in the form.
type legTable struct {
	box  *fyne.Container
	rows []*legLine
}

// legLine is a row on the window.
type legLine struct {
	to, far, time  *inkText
	sooner, remove *iconButton // hidden where there is nothing to do
	row            legRow
}

// newLegTable makes a table for as many rows, nil for none. reveal brings one of its buttons into sight.
func newLegTable(rows []legRow, t *tips, reveal func(fyne.CanvasObject)) *legTable {
	if len(rows) == 0 {
		return nil
	}
	table := &legTable{box: pile(newText("Leg by leg, on foot", assets.Semibold, 12.5, roleInk))}
	for i := range rows {
		l := &legLine{to: body("").shrinking(), far: newText("", assets.Bold, 12.5, roleInk).right(), time: newText("", assets.Regular, 12, roleInk2).right()}
		l.sooner = newIconButton("chevron-up", "before waypoint "+number(float64(i), 0), t, func() { l.row.sooner() })
		l.remove = newIconButton("close", "delete waypoint "+number(float64(i+1), 0), t, func() { l.row.remove() })
		for _, b := range []*iconButton{l.sooner, l.remove} {
			b.gained = func() { reveal(b) }
		}
		table.rows = append(table.rows, l)
		table.box.Add(container.New(legLayout{}, l.to, l.far, l.time, l.sooner, l.remove))
	}
	table.box.Add(inset(0, 6, 0, 8, hairline()))
	return table
}

// fits reports whether the table has a line for each row.
func (t *legTable) fits(rows []legRow) bool {
	if t == nil {
		return len(rows) == 0
	}
	return len(t.rows) == len(rows)
}

func (t *legTable) put(rows []legRow) {
	if t == nil {
		return
	}
	for i, l := range t.rows {
		l.row = rows[i]
		l.far.role, l.time.role = roleInk, roleInk2
		if l.row.old {
			l.far.role, l.time.role = roleInk3, roleInk3
		}
		l.to.set(l.row.to)
		l.far.set(l.row.far)
		l.time.set(l.row.time)
		l.far.Refresh()
		l.time.Refresh()
		show(l.sooner, l.row.sooner != nil)
		show(l.remove, l.row.remove != nil)
	}
}

// show hides or shows a button.
func show(b *iconButton, on bool) {
	if on {
		b.Show()
		return
	}
	b.Hide()
}

// legLayout is a line of the table: where the leg leads, how far, how long, and the buttons.
type legLayout struct{}

// MinSize is for the toolkit.
func (legLayout) MinSize([]fyne.CanvasObject) fyne.Size { return fyne.NewSize(240, 26) }

// Layout is for the toolkit.
func (legLayout) Layout(o []fyne.CanvasObject, s fyne.Size) {
	const far, time, gap = 84, 56, 6
	buttons := float32(2 * iconSide)
	x := s.Width - buttons - gap - time - far
	for i, width := range [3]float32{x, far, time} {
		o[i].Resize(fyne.NewSize(width, s.Height))
		o[i].Move(fyne.NewPos([3]float32{0, x, x + far}[i], 0))
	}
	for i, b := range o[3:] {
		b.Resize(fyne.NewSize(iconSide, iconSide))
		b.Move(fyne.NewPos(s.Width-buttons+float32(i)*iconSide, (s.Height-iconSide)/2))
	}
}
