package gui

import (
	"image/color"

	"fmt"
	"math"
	"strings"

	"fyne.io/fyne/v2"
	"fyne.io/fyne/v2/canvas"
	"fyne.io/fyne/v2/container"
	"fyne.io/fyne/v2/driver/desktop"
	"fyne.io/fyne/v2/widget"

	"enfilade/app/live"
	"enfilade/assets"
	"enfilade/canvas/view"
	"enfilade/solver/exact"
	"enfilade/solver/plan"
)

// problems lists what looks wrong with the plan, at the foot of the right column; without any it is not there. A click on one
// goes there, and Fix mends it where one change is sure to be meant.
type problems struct {
	w     *window
	box   *fyne.Container
	count *inkText
	list  *widget.List
	found []plan.Finding
	rev   uint64 // that the list is of
	at    int    // the one gone to last, -1 for none
}

// The list of problems, in px at 100 %: the rows it shows at most before it scrolls.
const (
	problemHeight = 48
	problemsShown = 3
)

func newProblems(w *window) *problems {
	p := &problems{w: w, count: caption("").right(), at: -1}
	p.list = widget.NewList(func() int { return len(p.found) }, func() fyne.CanvasObject { return newProblemRow(p) },
		func(i widget.ListItemID, o fyne.CanvasObject) { o.(*problemRow).put(i, p.found[i]) })
	p.list.HideSeparators = true
	p.list.OnSelected = func(i widget.ListItemID) {
		p.goTo(i)
		p.list.UnselectAll()
	}
	head := inset(18, 10, 18, 4, around(nil, nil, heading("Problems"), nil, p.count))
	p.box = around(pile(hairline(), head), nil, nil, nil, container.NewThemeOverride(container.New(problemsLayout{p}, p.list), tightLook{w}))
	p.box.Hide()
	return p
}

// problemsLayout gives the list the height of its rows, up to a few.
type problemsLayout struct{ p *problems }

// MinSize is for the toolkit.
func (l problemsLayout) MinSize([]fyne.CanvasObject) fyne.Size {
	return fyne.NewSize(200, float32(min(len(l.p.found), problemsShown))*problemHeight+8)
}

// Layout is for the toolkit.
func (l problemsLayout) Layout(o []fyne.CanvasObject, s fyne.Size) {
	o[0].Resize(fyne.NewSize(s.Width, s.Height-8))
}

// update shows the newest findings.
func (p *problems) update() {
	r := &p.w.results
	if r.state == nil {
		return
	}
	u := r.state.Latest[live.StageFindings]
	if u.Plan == nil || u.Rev == p.rev || u.Rev < r.opened {
		if r.opened > p.rev && len(p.found) > 0 {
			p.put(nil)
		}
		return
	}
	p.rev = u.Rev
	p.put(u.Findings)
}

func (p *problems) put(found []plan.Finding) {
	rows := min(len(p.found), problemsShown)
	if sameFindings(p.found, found) {
		p.found = found
		return
	}
	p.found = found
	p.at = min(p.at, len(found)-1)
	p.count.set(problemCount(len(found)))
	p.list.Refresh()
	if n := min(len(found), problemsShown); n != rows {
		p.box.Hidden = n == 0
		p.w.side.Refresh()
	}
}

func problemCount(n int) string {
	if n == 0 {
		return ""
	}
	return counted(n, "problem")
}

func sameFindings(a, b []plan.Finding) bool {
	if len(a) != len(b) {
		return false
	}
	for i := range a {
		if a[i].Text != b[i].Text || a[i].At != b[i].At || a[i].Items[0] != b[i].Items[0] {
			return false
		}
	}
	return true
}

// goTo selects a problem's items and brings its place into the middle of the picture, near enough to see a gap.
func (p *problems) goTo(i int) {
	if i < 0 || i >= len(p.found) {
		return
	}
	p.at = i
	w, f := p.w, p.found[i]
	w.choose(0)
	w.session.Select(f.Items...)
	w.lookAt(f.At, f.Kind == plan.ProblemGap || f.Kind == plan.ProblemDouble)
	w.say(told(problemName(w.session.Plan(), f.Items[0]), f.Text))
	w.acted()
}

// told makes a sentence of an item's name and what is wrong with it.
func told(name, text string) string {
	if strings.HasPrefix(text, "no ") {
		return sentence(name + ": " + text)
	}
	return sentence(name + " " + text)
}

// next goes to the next problem, round and round.
func (p *problems) next() {
	if len(p.found) > 0 {
		p.goTo((p.at + 1) % len(p.found))
	}
}

// lookAt moves the camera so that a place lies in the middle of the picture, unless it is well inside already; close brings
// lengths of some millimetres in sight.
func (w *window) lookAt(at exact.Pt, close bool) {
	const inside, near = 0.2, 0.35 // the rim that is too far out, as a share; px at 100 % per mm
	c := w.view.glide.from(w.view.cam)
	x, y := c.Pixel(at)
	in := func(v float64, n int) bool { return v > inside*float64(n) && v < (1-inside)*float64(n) }
	if in(x, c.W) && in(y, c.H) && (!close || c.Scale >= near*c.K) {
		return
	}
	c.CX, c.CY = float64(at.X)/exact.PerMM, float64(at.Y)/exact.PerMM
	if close {
		c.Scale = min(max(c.Scale, near*c.K), view.MaxZoom*c.K)
	}
	w.view.fitted = false
	w.view.glide.to(w.view.cam, c, w.view.see)
}

// mend does a problem's fix as one step of the history.
func (p *problems) mend(i int) {
	w := p.w
	if i < 0 || i >= len(p.found) || p.found[i].Fix == nil {
		return
	}
	if p.rev != w.results.rev {
		w.say("The plan has changed since; its problems are being looked for anew.")
		return
	}
	f := p.found[i]
	w.choose(0)
	if w.try(f.Fix) {
		label, _ := w.session.UndoLabel()
		w.session.Select(f.Items...)
		w.say(fmt.Sprintf("Done: %s. Ctrl+Z takes it back.", label))
		w.acted()
	}
}

// problemName is what a problem calls its item: its name where people gave it one.
func problemName(p *plan.Plan, r plan.Ref) string {
	if name := itemName(p, r); name != "" {
		return name
	}
	return r.String()
}

// slight reports whether a problem may well be meant: results stay as they are.
func slight(k plan.ProblemKind) bool {
	return k == plan.ProblemGap || k == plan.ProblemDouble || k == plan.ProblemMoved
}

// problemRow shows one problem: its item, what is wrong, and Fix.
type problemRow struct {
	widget.BaseWidget
	p          *problems
	i          int
	hovered    bool
	tip        string
	mark       *icon
	name, text *inkText
	fix        *pushButton
}

func newProblemRow(p *problems) *problemRow {
	r := &problemRow{p: p, mark: newIcon("fail", 16, roleRed), name: newText("", assets.Semibold, 12.5, roleInk).shrinking(),
		text: newText("", assets.Regular, 12, roleInk2).shrinking()}
	r.fix = newPushButton("Fix", func() { r.p.mend(r.i) })
	r.ExtendBaseWidget(r)
	return r
}

func (r *problemRow) put(i int, f plan.Finding) {
	r.i = i
	if slight(f.Kind) {
		r.mark.set("unknown", roleInk2)
	} else {
		r.mark.set("fail", roleRed)
	}
	name := []rune(problemName(r.p.w.session.Plan(), f.Items[0]))
	r.name.set(sentenceStart(string(name)))
	r.text.set(f.Text)
	r.tip = f.Text
	if f.Offer != "" {
		r.tip = f.Text + "  ·  Fix: " + f.Offer
	}
	r.fix.Hidden = f.Fix == nil
	r.Refresh()
}

// sentenceStart makes a sentence's first letter a capital.
func sentenceStart(s string) string {
	if t := sentence(s); t != "" {
		return t[:len(t)-1]
	}
	return s
}

// Tapped goes there.
func (r *problemRow) Tapped(*fyne.PointEvent) { r.p.goTo(r.i) }

// MouseIn tints the row, and after a while says the whole of it.
func (r *problemRow) MouseIn(*desktop.MouseEvent) {
	r.hovered = true
	w := r.p.w
	w.tips.after(nameDelay, r.tip, func() fyne.Position {
		size := textSize(r.tip, assets.Regular, 12) // to the left of the column, away from the buttons
		return w.app.Driver().AbsolutePositionForObject(r).AddXY(-size.Width-24, 12)
	})
	r.Refresh()
}

// MouseMoved does nothing.
func (r *problemRow) MouseMoved(*desktop.MouseEvent) {}

// MouseOut takes the tint away.
func (r *problemRow) MouseOut() {
	r.hovered = false
	r.p.w.tips.hide()
	r.Refresh()
}

// CreateRenderer is for the toolkit.
func (r *problemRow) CreateRenderer() fyne.WidgetRenderer {
	x := &problemRowRenderer{r: r, ground: canvas.NewRectangle(nil)}
	x.Refresh()
	return x
}

type problemRowRenderer struct {
	r      *problemRow
	ground *canvas.Rectangle
}

func (x *problemRowRenderer) Layout(s fyne.Size) {
	const side, indent = 18, 43
	r := x.r
	x.ground.Resize(s)
	place := func(o fyne.CanvasObject, px, py, w, h float32) {
		o.Move(fyne.NewPos(px, py))
		o.Resize(fyne.NewSize(w, h))
	}
	end := s.Width - side
	if r.fix.Visible() {
		size := r.fix.MinSize()
		place(r.fix, end-size.Width, float32(math.Round(float64(s.Height-26)/2)), size.Width, 26)
		end -= size.Width + 8
	}
	place(r.mark, side, 6, 16, 16)
	place(r.name, indent, 4, end-indent, 20)
	place(r.text, indent, 24, end-indent, 18)
}
func (x *problemRowRenderer) MinSize() fyne.Size { return fyne.NewSize(200, problemHeight) }
func (x *problemRowRenderer) Refresh() {
	p := themed()
	x.ground.FillColor = color.Transparent
	if x.r.hovered {
		x.ground.FillColor = faded(p.Ink, 7)
	}
	x.Layout(x.r.Size())
	canvas.Refresh(x.ground)
	x.r.mark.Refresh()
	x.r.name.Refresh()
	x.r.text.Refresh()
	x.r.fix.Refresh()
}
func (x *problemRowRenderer) Objects() []fyne.CanvasObject {
	return []fyne.CanvasObject{x.ground, x.r.mark, x.r.name, x.r.text, x.r.fix}
}
func (x *problemRowRenderer) Destroy() {}
