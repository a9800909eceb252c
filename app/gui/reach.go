package gui

import (
	"fyne.io/fyne/v2"
	"fyne.io/fyne/v2/container"

	"enfilade/app/live"
	"enfilade/assets"
)

// reachRow is how far a zone is from one start: to its nearest and to its farthest floor.
type reachRow struct {
	from, near, far string
	old             bool // of the plan before the last change
}

// reachRows tells how far a zone is from every start, on foot.
func (w *window) reachRows(zone string) (rows []reachRow) {
	r := &w.results
	p := w.session.Plan()
	old := r.state == nil || !r.state.Fresh(live.StageReach, r.rev)
	for _, s := range p.Starts() {
		row := reachRow{from: startName(p, s.ID), near: "…", far: "…", old: true}
		if r.result != nil {
			for _, k := range r.result.Reach {
				switch {
				case k.Start != s.ID || k.Zone != zone:
				case k.Problem != "" || !k.Found:
					row.near, row.far, row.old = "no way", "", old
				default:
					row.near, row.far, row.old = farText(w.unit(), k.Nearest), farText(w.unit(), k.Farthest), old
					if k.Cut {
						row.far = "in part " + row.far
					}
				}
			}
		}
		rows = append(rows, row)
	}
	return rows
}

// reachTable shows those rows in the form.
type reachTable struct {
	box  *fyne.Container
	rows [][3]*inkText
}

// newReachTable makes a table for as many rows, nil for none.
func newReachTable(rows []reachRow) *reachTable {
	if len(rows) == 0 {
		return nil
	}
	head := func(s string) *inkText { return newText(s, assets.Regular, 11, roleInk3) }
	t := &reachTable{box: pile(inset(0, 6, 0, 8, hairline()),
		container.New(reachLayout{}, newText("On foot from", assets.Semibold, 12.5, roleInk), head("nearest").right(), head("farthest").right()))}
	for range rows {
		cells := [3]*inkText{body("").shrinking(), newText("", assets.Bold, 12.5, roleInk).right(), newText("", assets.Regular, 12, roleInk2).right()}
		t.rows = append(t.rows, cells)
		t.box.Add(container.New(reachLayout{}, cells[0], cells[1], cells[2]))
	}
	return t
}

// fits reports whether the table has a line for each row.
func (t *reachTable) fits(rows []reachRow) bool {
	if t == nil {
		return len(rows) == 0
	}
	return len(t.rows) == len(rows)
}

func (t *reachTable) put(rows []reachRow) {
	if t == nil {
		return
	}
	for i, cells := range t.rows {
		row := rows[i]
		cells[1].role, cells[2].role = roleInk, roleInk2
		if row.old {
			cells[1].role, cells[2].role = roleInk3, roleInk3
		}
		for j, s := range [3]string{row.from, row.near, row.far} {
			cells[j].set(s)
			cells[j].Refresh()
		}
	}
}

// reachLayout is a line of the table: start, nearest, farthest.
type reachLayout struct{}

// MinSize is for the toolkit.
func (reachLayout) MinSize([]fyne.CanvasObject) fyne.Size { return fyne.NewSize(240, 24) }

// Layout is for the toolkit.
func (reachLayout) Layout(o []fyne.CanvasObject, s fyne.Size) {
	const near, far = 64, 96
	for i, x := range [3][2]float32{{0, s.Width - near - far}, {s.Width - near - far, near}, {s.Width - far, far}} {
		o[i].Move(fyne.NewPos(x[0], 0))
		o[i].Resize(fyne.NewSize(x[1], s.Height))
	}
}
