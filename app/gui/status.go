package gui

import (
	"fmt"
	"strings"
	"time"

	"fyne.io/fyne/v2"
	"fyne.io/fyne/v2/canvas"
	"fyne.io/fyne/v2/container"
	"fyne.io/fyne/v2/widget"

	"enfilade/assets"
	"enfilade/solver/exact"
	"enfilade/solver/plan"
)

// status is the line along the bottom of the window.
type status struct {
	box                        *fyne.Container
	place, snap, counts, solve *inkText
	hint                       *inkText
	progress                   *progress
}

func newStatus() *status {
	s := &status{
		place: newText("", assets.Medium, 12, roleInk), snap: caption(""), counts: caption(""), solve: caption(""),
		hint: caption("").shrinking().right(), progress: newProgress(),
	}
	s.solve.shrinking()
	s.counts.shrinking()
	row := container.New(statusRow{}, s.place, tick(), s.snap, tick(), s.counts, tick(), s.solve, s.progress, s.hint)
	s.box = around(hairline(), nil, nil, nil, inset(14, 4, 18, 5, row))
	return s
}

// tell shows a hint; where there is no room for it, its first part alone.
func (s *status) tell(hint string) {
	first, _, _ := strings.Cut(hint, " · ")
	first, _, _ = strings.Cut(first, "; ")
	s.hint.brief = first
	s.hint.set(hint)
}

// tick is the short rule between two parts of the line.
func tick() fyne.CanvasObject { return inset(4, 3, 10, 3, hairline()) }

// statusRow sets the parts of the line beside each other, each in a place of its own, so that none is moved by another's figures;
// the hint has what is left. In a narrow window the others give way to it.
type statusRow struct{}

// narrowStatus is the width of a line in which the hint's room is short.
const narrowStatus = 1240

// MinSize is for the toolkit.
func (statusRow) MinSize(o []fyne.CanvasObject) fyne.Size {
	return fyne.NewSize(400, o[len(o)-1].MinSize().Height)
}

// Layout is for the toolkit.
func (statusRow) Layout(o []fyne.CanvasObject, s fyne.Size) {
	widths := [...]float32{146, 15, 128, 15, 212, 15, 240, 0}
	switch {
	case s.Width < narrowStatus/1.4:
		widths = [...]float32{140, 15, 122, 15, 0, 0, 0, 0}
	case s.Width < narrowStatus:
		widths = [...]float32{140, 15, 122, 15, 176, 15, 104, 0}
	}
	if o[7].Visible() {
		widths[7] = o[7].MinSize().Width + 8
	}
	x := float32(0)
	for i, w := range widths {
		o[i].Move(fyne.NewPos(x, 0))
		o[i].Resize(fyne.NewSize(w, s.Height))
		x += w + 4
	}
	o[8].Move(fyne.NewPos(x, 0))
	o[8].Resize(fyne.NewSize(max(0, s.Width-x), s.Height))
}

// fixed gives content a width of its own.
func fixed(width float32, content fyne.CanvasObject) *fyne.Container {
	return container.New(fixedWidth(width), content)
}

type fixedWidth float32

func (w fixedWidth) MinSize(o []fyne.CanvasObject) fyne.Size {
	return fyne.NewSize(float32(w), o[0].MinSize().Height)
}

func (w fixedWidth) Layout(o []fyne.CanvasObject, s fyne.Size) { o[0].Resize(s) }

// at shows the pointer's place.
func (s *status) at(p exact.Pt, unit string, over bool) {
	if !over {
		s.place.set("")
		return
	}
	if unit == "ft" {
		s.place.set(fmt.Sprintf("x %s  y %s", formatFeet(p.X), formatFeet(p.Y)))
		return
	}
	size, decimals := unitSizes[unitOf(unit)], map[string]int{"m": 2, "cm": 1, "mm": 0}[unitOf(unit)]
	s.place.set(fmt.Sprintf("x %.*f  y %.*f %s", decimals, float64(p.X)/size, decimals, float64(p.Y)/size, unitOf(unit)))
}

func unitOf(unit string) string {
	if unit == "" {
		return "m"
	}
	return unit
}

// count shows how much there is in the plan, and how much of it looks wrong.
func (s *status) count(p *plan.Plan, wrong *problems) {
	text := counted(p.NumWalls(), "wall")
	if b := p.NumBlocks(); b > 0 {
		text += ", " + counted(b, "block")
	}
	if n := len(wrong.found); n > 0 {
		text += ", " + problemCount(n)
	}
	s.counts.set(text)
}

func counted(n int, what string) string {
	if n == 1 {
		return "1 " + what
	}
	return fmt.Sprintf("%d %ss", n, what)
}

// solved shows how long the study took.
func (s *status) solved(took time.Duration) {
	s.solve.brief = "solved in " + brief(took)
	s.solve.set(s.solve.brief + ", in the plane of the eye")
}

// brief writes a duration as people say it.
func brief(d time.Duration) string {
	switch ms := float64(d) / float64(time.Millisecond); {
	case ms < 10:
		return fmt.Sprintf("%.1f ms", ms)
	case ms < 1000:
		return fmt.Sprintf("%.0f ms", ms)
	default:
		return fmt.Sprintf("%.1f s", ms/1000)
	}
}

// progress is a bar 4 px high whose fill stands for the stages of a study that are done.
type progress struct {
	widget.BaseWidget
	done float32
}

func newProgress() *progress {
	p := &progress{}
	p.ExtendBaseWidget(p)
	p.Hide()
	return p
}

func (p *progress) set(done float32) {
	if p.done != done {
		p.done = done
		p.Refresh()
	}
}

// CreateRenderer is for the toolkit.
func (p *progress) CreateRenderer() fyne.WidgetRenderer {
	r := &progressRenderer{p, canvas.NewRectangle(nil), canvas.NewRectangle(nil)}
	r.groove.CornerRadius, r.fill.CornerRadius = 2, 2
	r.Refresh()
	return r
}

type progressRenderer struct {
	p            *progress
	groove, fill *canvas.Rectangle
}

func (r *progressRenderer) Layout(s fyne.Size) {
	y := (s.Height - 4) / 2
	r.groove.Move(fyne.NewPos(0, y))
	r.groove.Resize(fyne.NewSize(s.Width, 4))
	r.fill.Move(fyne.NewPos(0, y))
	r.fill.Resize(fyne.NewSize(s.Width*r.p.done, 4))
}
func (r *progressRenderer) MinSize() fyne.Size { return fyne.NewSize(120, 4) }
func (r *progressRenderer) Refresh() {
	p := themed()
	r.groove.FillColor, r.fill.FillColor = p.Rule, p.Ink
	r.Layout(r.p.Size())
	canvas.Refresh(r.groove)
	canvas.Refresh(r.fill)
}
func (r *progressRenderer) Objects() []fyne.CanvasObject {
	return []fyne.CanvasObject{r.groove, r.fill}
}
func (r *progressRenderer) Destroy() {}
