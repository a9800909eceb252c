package gui

import "time"

// freshTime is how long a row of the table that has changed shows it.
const freshTime = 600 * time.Millisecond

// freshRows knows which rows of the table have changed just now: whose figures differ from those of the last plan that was at
// rest.
type freshRows struct {
	opened  uint64 // the open plan's first revision
	figures map[pair]figures
	until   map[pair]time.Time
}

// figures are what of a row can change.
type figures struct{ first, full, mark string }

// compare takes over the rows of a plan at rest of which all is known, and sees which have changed.
func (f *freshRows) compare(w *window, rows []row) {
	if !w.results.done() || w.session.Previewing() {
		return
	}
	was, same := f.figures, f.opened == w.results.opened
	f.figures, f.opened = make(map[pair]figures, len(rows)), w.results.opened
	if f.until == nil || !same {
		f.until = map[pair]time.Time{}
	}
	until, some := w.now().Add(freshTime), false
	for _, r := range rows {
		now := figures{r.first, r.full, r.mark}
		f.figures[r.pair] = now
		if before, ok := was[r.pair]; same && ok && before != now && !still() {
			f.until[r.pair], some = until, true
		}
	}
	if some {
		time.AfterFunc(freshTime+10*time.Millisecond, func() { w.do(func() { w.table.settle() }) })
	}
}

// mark tells the rows that have changed just now.
func (f *freshRows) mark(rows []row, now time.Time) {
	for i := range rows {
		t, ok := f.until[rows[i].pair]
		rows[i].fresh = ok && now.Before(t)
		if ok && !rows[i].fresh {
			delete(f.until, rows[i].pair)
		}
	}
}

// settle shows the rows again as those that have not changed just now.
func (t *table) settle() {
	if !t.w.closing {
		t.show(tableRows(t.w.session.Plan(), &t.w.results))
	}
}
