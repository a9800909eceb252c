package gui

import (
	"errors"
	"math"

	"enfilade/canvas/pick"
	"enfilade/canvas/tool"
	"enfilade/solver/exact"
	"enfilade/solver/plan"
)

// turning returns the selected items that can be turned or mirrored: openings go with their walls.
func (w *window) turning() []plan.Ref {
	var refs []plan.Ref
	for _, r := range w.free() {
		if r.Kind != plan.KindOpening {
			refs = append(refs, r)
		}
	}
	if len(refs) == 0 && len(w.session.Selection()) > 0 && w.said.text == "" {
		w.say("A door is turned with its wall; select the wall.")
	}
	return refs
}

// whatTurns are the choices between the items and copies of theirs.
var whatTurns = []string{"these items", "a copy"}

// adds names what an edit of items adds when it makes copies, else the items.
func adds(w *window, refs []plan.Ref, copies bool) []plan.Ref {
	if !copies {
		return refs
	}
	return plan.Paste{Clip: plan.Extract(w.session.Committed(), refs)}.Added(w.session.Committed())
}

// errClickWall is what the panel says before a wall is clicked.
var errClickWall = errors.New("click the wall to mirror in")

// askRotate opens the panel that turns the selection about its middle, or about a point that is clicked.
func (w *window) askRotate() {
	refs := w.turning()
	lo, hi, ok := boxOf(w.session.Committed(), refs)
	if len(refs) == 0 || !ok {
		return
	}
	about := middleOf(lo, hi)
	p := &editPanel{title: "Rotate", hint: "click the point to turn about, Enter rotates, Esc leaves it",
		rows: []*panelRow{{label: "To the left by", unit: "°", text: "90"}, {label: "Turn", choices: whatTurns}}}
	p.edit = func() (plan.Edit, error) {
		deg, err := parseNumber(p.rows[0].entry.Text)
		return plan.Rotate{Items: refs, About: about, Degrees: deg, Copy: p.rows[1].chosen == 1}, err
	}
	p.added = func(e plan.Edit, _ *plan.Plan) []plan.Ref { return adds(w, refs, e.(plan.Rotate).Copy) }
	p.held = func(e plan.Edit) []plan.Ref { return adds(w, refs, e.(plan.Rotate).Copy) }
	p.click = func(tool.Host, tool.Pointer) {
		if p.snap != nil {
			about = p.snap.At
		}
	}
	p.marks = func() []exact.Pt { return []exact.Pt{about} }
	w.openPanel(p)
}

// askMirror opens the panel that mirrors the selection in an upright or a level line through its middle or a clicked point, or
// in the line of a clicked wall.
func (w *window) askMirror() {
	refs := w.turning()
	lo, hi, ok := boxOf(w.session.Committed(), refs)
	if len(refs) == 0 || !ok {
		return
	}
	at := middleOf(lo, hi)
	var wall *[2]exact.Pt
	way := 0 // upright or level, as chosen last
	p := &editPanel{title: "Mirror", hint: "click a point or a wall to mirror in, Enter mirrors, Esc leaves it",
		rows: []*panelRow{{label: "In", choices: []string{"an upright line", "a level line", "the clicked wall"}}, {label: "Mirror", choices: whatTurns}}}
	line := func() [2]exact.Pt {
		if p.rows[0].chosen < 2 {
			way = p.rows[0].chosen
		}
		switch {
		case p.rows[0].chosen == 2 && wall != nil:
			return *wall
		case p.rows[0].chosen == 1:
			return [2]exact.Pt{at, at.Add(exact.Vec{X: 1})}
		}
		return [2]exact.Pt{at, at.Add(exact.Vec{Y: 1})}
	}
	p.edit = func() (plan.Edit, error) {
		if p.rows[0].chosen == 2 && wall == nil {
			return nil, errClickWall
		}
		return plan.Mirror{Items: refs, Line: line(), Copy: p.rows[1].chosen == 1}, nil
	}
	p.added = func(e plan.Edit, _ *plan.Plan) []plan.Ref { return adds(w, refs, e.(plan.Mirror).Copy) }
	p.held = func(e plan.Edit) []plan.Ref { return adds(w, refs, e.(plan.Mirror).Copy) }
	p.click = func(h tool.Host, e tool.Pointer) {
		if piece, ok := pieceUnder(h, e, refs); ok {
			wall = &piece
			p.rows[0].chosen = 2
		} else if p.snap != nil {
			at = p.snap.At
			p.rows[0].chosen = way
		}
		p.rows[0].pick.put(p.rows[0].chosen)
	}
	p.marks = func() []exact.Pt { return acrossPicture(w, line()) }
	w.openPanel(p)
}

// pieceUnder returns the straight piece of wall under the pointer, of a wall that is not itself mirrored.
func pieceUnder(h tool.Host, e tool.Pointer, but []plan.Ref) ([2]exact.Pt, bool) {
	hit, ok := pick.At(h.Plan(), h.Camera(), e.X, e.Y, nil)
	x, found := h.Plan().Wall(hit.Ref.ID)
	if !ok || !found || hit.Ref.Kind != plan.KindWall || x.Line.Len() < 2 {
		return [2]exact.Pt{}, false
	}
	for _, r := range but {
		if r == hit.Ref {
			return [2]exact.Pt{}, false
		}
	}
	i, _ := plan.NearestOn(x.Line, h.Camera().Grid(e.X, e.Y))
	a, b := x.Line.At(i), x.Line.At(i+1)
	return [2]exact.Pt{a, b}, a != b
}

// acrossPicture returns two points of a line that lie at either side of the picture.
func acrossPicture(w *window, line [2]exact.Pt) []exact.Pt {
	c := w.view.cam
	a, b := c.Grid(0, 0), c.Grid(float64(c.W), float64(c.H))
	long := exact.Dist(a, b)
	d := exact.Dist(line[0], line[1])
	ux, uy := float64(line[1].X-line[0].X)/d, float64(line[1].Y-line[0].Y)/d
	m := middleOf(a, b)
	along := float64(m.X-line[0].X)*ux + float64(m.Y-line[0].Y)*uy
	end := func(k float64) exact.Pt {
		return exact.Pt{X: line[0].X + int32(math.Round((along+k*long)*ux)), Y: line[0].Y + int32(math.Round((along+k*long)*uy))}
	}
	return []exact.Pt{end(-1), end(1)}
}

// askRows opens the panel that duplicates the selection in rows and columns.
func (w *window) askRows() {
	refs := copyable(w.session.Selection())
	lo, hi, ok := boxOf(w.session.Committed(), refs)
	if len(refs) == 0 || !ok {
		w.say("A door is duplicated with Ctrl+D; there is only one floor.")
		return
	}
	step := max(1, w.host.Snapper().Step(w.view.cam))
	text := func(v int32) string { return formatLength(roundUp(v+beside, step), w.unit()) }
	unit := unitMark(w.unit())
	p := &editPanel{title: "Duplicate", hint: "Enter duplicates, Esc leaves it",
		rows: []*panelRow{{label: "Columns", text: "3"}, {label: "Spacing right", unit: unit, text: text(hi.X - lo.X)},
			{label: "Rows", text: "1"}, {label: "Spacing up", unit: unit, text: text(hi.Y - lo.Y)}}}
	p.edit = func() (plan.Edit, error) {
		e := plan.Duplicate{Items: refs}
		var err [4]error
		e.Columns, err[0] = p.count(0, 10_000)
		e.Step.X, err[1] = p.length(1)
		e.Rows, err[2] = p.count(2, 10_000)
		e.Step.Y, err[3] = p.length(3)
		for _, x := range err {
			if x != nil {
				return nil, x
			}
		}
		return e, nil
	}
	p.added = func(e plan.Edit, q *plan.Plan) []plan.Ref {
		return append(append([]plan.Ref{}, refs...), e.(plan.Duplicate).Added(q)...)
	}
	p.held = func(e plan.Edit) []plan.Ref { return e.(plan.Duplicate).Added(w.session.Committed()) }
	w.openPanel(p)
}
