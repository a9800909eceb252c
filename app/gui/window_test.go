package gui

import (
	"context"
	"errors"
	"math"
	"os"
	"strings"
	"testing"

	"fyne.io/fyne/v2"
	"fyne.io/fyne/v2/driver/desktop"

	"enfilade/app/live"
	"enfilade/canvas/paint"
	"enfilade/solver/exact"
	"enfilade/solver/plan"
	"enfilade/solver/study"
)

func writeFile(t testing.TB, path string, data []byte) {
	t.Helper()
	if err := os.WriteFile(path, data, 0o666); err != nil {
		t.Fatal(err)
	}
}

func TestGalleryIsShown(t *testing.T) {
	r := newGallery(t)
	if len(r.table.rows) != 14 || r.table.rows[0].first != "9.9 m" || r.table.rows[0].full != "21.4 m" {
		t.Errorf("table of %d rows, the first %+v", len(r.table.rows), r.table.rows[:min(1, len(r.table.rows))])
	}
	if s, ok := r.results.sightOf("O1"); !ok || math.Abs(s.Area-104.8) > 0.1 {
		t.Errorf("observer O1 sees %.2f m², want 104.8", s.Area)
	}
	if !strings.Contains(r.foot.line.text, "first sight after 9.9 m") {
		t.Errorf("walk line %q", r.foot.line.text)
	}
	if !strings.Contains(r.status.solve.text, "in the plane of the eye") {
		t.Errorf("status %q", r.status.solve.text)
	}
	washed, floor := r.pixel(11.3, 7.3), r.pixel(2.3, 14.3)
	if washed == floor || floor != paint.Light().Floor {
		t.Errorf("seen floor %v, unseen floor %v, want them to differ and the second to be %v", washed, floor, paint.Light().Floor)
	}
	if r.first.box.Visible() {
		t.Error("the first steps are shown over a plan that is not empty")
	}
	if r.session.Dirty() || r.win.Title() != "Upper gallery – Enfilade" {
		t.Errorf("title %q", r.win.Title())
	}
}

func TestDragObserverMovesItsRegion(t *testing.T) {
	r := newGallery(t)
	before := r.pixel(18.3, 9.7)
	r.press(11.35, 8.75)
	r.dragTo(13, 9)
	r.dragTo(19, 10)
	if o := r.observer("O1"); o.At != (exact.Pt{X: 190000, Y: 100000}) {
		t.Fatalf("previewed at %v, want 19, 10", o.At)
	}
	r.settle()
	if after := r.pixel(18.3, 9.7); after == before {
		t.Error("the region did not follow the drag")
	}
	r.release(19, 10)
	if label, _ := r.session.UndoLabel(); label != "move observer" {
		t.Errorf("the drag is the step %q", label)
	}
	if !r.session.Dirty() || !strings.HasPrefix(r.win.Title(), "• ") {
		t.Errorf("unsaved work is not marked: %q", r.win.Title())
	}
	r.shortcut(&fyne.ShortcutUndo{})
	if o := r.observer("O1"); o.At != (exact.Pt{X: 113500, Y: 87500}) || r.session.Dirty() {
		t.Errorf("after undo at %v", o.At)
	}
	r.shortcut(ctrl(fyne.KeyZ, fyne.KeyModifierShift))
	if o := r.observer("O1"); o.At != (exact.Pt{X: 190000, Y: 100000}) {
		t.Errorf("after redo at %v", o.At)
	}
}

func TestReleaseOutsideEndsTheDrag(t *testing.T) {
	r := newGallery(t)
	r.press(11.35, 8.75)
	r.dragTo(12, 9)
	r.view.DragEnd() // the pointer was let go outside: no MouseUp comes
	if r.view.pressed != 0 || r.session.Previewing() {
		t.Error("the drag goes on after it was let go outside")
	}
	if o := r.observer("O1"); o.At != (exact.Pt{X: 120000, Y: 90000}) {
		t.Errorf("left at %v", o.At)
	}
}

func TestDrawWallAcrossTheView(t *testing.T) {
	r := newGallery(t)
	before, _ := r.results.sightOf("O1")
	walls := r.session.Plan().NumWalls()
	r.runes("w")
	if tools[r.toolAt].name != "Wall" || !r.rail[r.toolAt].chosen {
		t.Fatal("W did not choose the wall tool")
	}
	r.click(10, 12.5)
	r.move(14, 12.5)
	r.settle()
	if now, _ := r.results.sightOf("O1"); now.Area >= before.Area {
		t.Errorf("the half-drawn wall does not cut the region: %.2f m² before, %.2f now", before.Area, now.Area)
	}
	r.click(14, 12.5)
	r.keys(fyne.KeyReturn)
	if r.session.Plan().NumWalls() != walls+1 {
		t.Fatalf("%d walls, want one more than %d", r.session.Plan().NumWalls(), walls)
	}
	if sel := r.session.Selection(); len(sel) != 1 || sel[0].Kind != plan.KindWall || r.form.title.text != "Wall "+sel[0].ID {
		t.Errorf("selected %v, form of a %q", sel, r.form.title.text)
	}
	r.keys(fyne.KeyEscape)
	if r.toolAt != 0 {
		t.Error("Escape does not lead back to the select tool")
	}
	r.keys(fyne.KeyDelete)
	if r.session.Plan().NumWalls() != walls {
		t.Error("Delete left the wall")
	}
}

func TestFirstStepsVanish(t *testing.T) {
	r := newRig(t, realSolver)
	r.settle()
	if !r.first.box.Visible() || r.status.counts.text != "0 walls" || r.status.solve.text != "nothing to solve" {
		t.Errorf("empty plan: page shown %v, %q, %q", r.first.box.Visible(), r.status.counts.text, r.status.solve.text)
	}
	r.runes("w")
	r.click(5, 5)
	r.move(8, 5)
	if r.first.box.Visible() {
		t.Error("the first steps stay over the first wall")
	}
	r.keys(fyne.KeyEscape)
	if !r.first.box.Visible() {
		t.Error("the first steps do not come back to an empty plan")
	}
}

func TestZoomKeepsThePlaceUnderThePointer(t *testing.T) {
	r := newGallery(t)
	at := r.at(4.9, 0.4)
	before := r.view.cam
	for range 5 {
		r.view.Scrolled(&fyne.ScrollEvent{PointEvent: fyne.PointEvent{Position: at}, Scrolled: fyne.NewDelta(0, 25)})
	}
	if r.view.cam.Scale <= before.Scale*2 {
		t.Errorf("five notches magnified by %.2f", r.view.cam.Scale/before.Scale)
	}
	now := r.at(4.9, 0.4)
	if math.Abs(float64(now.X-at.X)) > 0.1 || math.Abs(float64(now.Y-at.Y)) > 0.1 {
		t.Errorf("the point under the pointer went from %v to %v", at, now)
	}
	r.view.Scrolled(&fyne.ScrollEvent{PointEvent: fyne.PointEvent{Position: at}, Scrolled: fyne.NewDelta(0, 1e6)})
	if f := r.view.cam.Scale / before.Scale; f > 5 {
		t.Errorf("one wild notch magnified to %.2f", f)
	}
	r.runes("0")
	if r.view.cam != before {
		t.Error("0 does not fit the plan")
	}
}

func TestPanByMiddleButtonAndBySpace(t *testing.T) {
	r := newGallery(t)
	for name, begin := range map[string]func(p fyne.Position){
		"middle button": func(p fyne.Position) { r.view.MouseDown(mouse(p, desktop.MouseButtonTertiary)) },
		"space": func(p fyne.Position) {
			r.view.KeyDown(&fyne.KeyEvent{Name: fyne.KeySpace})
			r.view.MouseDown(mouse(p, desktop.MouseButtonPrimary))
		},
	} {
		cam := r.view.cam
		begin(fyne.NewPos(500, 300))
		r.view.Dragged(&fyne.DragEvent{PointEvent: fyne.PointEvent{Position: fyne.NewPos(530, 280)}})
		if want := cam.Pan(30*float64(r.view.pix), -20*float64(r.view.pix)); r.view.cam != want {
			t.Errorf("%s: camera %+v, want %+v", name, r.view.cam, want)
		}
		r.view.MouseUp(mouse(fyne.NewPos(530, 280), r.view.pressed))
		r.view.KeyUp(&fyne.KeyEvent{Name: fyne.KeySpace})
		if r.view.panning || r.session.Previewing() {
			t.Errorf("%s: the pan goes on", name)
		}
	}
}

func TestTableShowsAndChoosesPairs(t *testing.T) {
	r := newGallery(t)
	row := newTableRow(r.table)
	row.put(r.table.rows[3])
	row.MouseIn(nil)
	if s := r.picture.scene(); s.Target != "T4" || s.Start != "S1" {
		t.Errorf("under the pointer %s to %s is shown", s.Start, s.Target)
	}
	row.MouseOut()
	if s := r.picture.scene(); s.Target != "T1" {
		t.Errorf("off the table %s is shown", s.Target)
	}
	row.Tapped(nil)
	if s := r.picture.scene(); s.Target != "T4" || !r.table.rows[3].chosen {
		t.Errorf("the click chose %s", s.Target)
	}
	r.click(0.4, 8.1) // the sea chart
	if s := r.picture.scene(); s.Target != "T2" {
		t.Errorf("selecting a target shows %s", s.Target)
	}
	r.selectAll()
	if s := r.picture.scene(); s.Start != "S1" || s.Target != "T2" || s.Observer != "O1" {
		t.Errorf("selecting everything shows %s, and %s to %s", s.Observer, s.Start, s.Target)
	}
	r.win.Resize(fyne.NewSize(1280, 620))
	r.session.Select(plan.Ref{Kind: plan.KindStart, ID: "S2"})
	if r.acted(); r.table.list.GetScrollOffset() == 0 {
		t.Error("the walk chosen in the picture is not brought into sight in the table")
	}
}

func TestThemes(t *testing.T) {
	r := newGallery(t)
	if got := r.pixel(-0.7, -0.7); got != paint.Light().Ground {
		t.Errorf("light ground %v", got)
	}
	r.setTheme(themeDark)
	if got := r.pixel(-0.7, -0.7); got != paint.Dark().Ground {
		t.Errorf("dark ground %v, want %v", got, paint.Dark().Ground)
	}
	if r.app.Preferences().String(prefTheme) != themeDark {
		t.Error("the theme is not remembered")
	}
}

func TestMenus(t *testing.T) {
	r := newGallery(t)
	for _, m := range r.menus() {
		for _, c := range m.commands() {
			if c.label == "" {
				t.Errorf("%s has a command without words", m.title)
			}
		}
	}
	d := r.bar.drop
	d.open(0)
	d.TypedKey(&fyne.KeyEvent{Name: fyne.KeyRight})
	if r.menus()[d.at].title != "Edit" || !d.Visible() {
		t.Error("the right arrow does not go on to the next menu")
	}
	d.TypedKey(&fyne.KeyEvent{Name: fyne.KeyDown})
	if got := d.commands[d.under].label; got != "Paste" {
		t.Errorf("the first command that can be done is %q", got)
	}
	d.TypedKey(&fyne.KeyEvent{Name: fyne.KeyDown})
	d.TypedKey(&fyne.KeyEvent{Name: fyne.KeyReturn})
	if d.Visible() || len(r.session.Selection()) < 30 {
		t.Errorf("Enter selected %d items", len(r.session.Selection()))
	}
	for i, m := range r.menus() {
		if m.title == "Place" {
			d.open(i)
		}
	}
	at, _ := d.box()
	d.MouseUp(mouse(at.AddXY(40, d.lines[1].y+5), desktop.MouseButtonPrimary))
	if tools[r.toolAt].name != "Target" {
		t.Errorf("the menu chose %q", tools[r.toolAt].name)
	}
}

func TestNextChoosesRoundAndRound(t *testing.T) {
	r := newGallery(t)
	var seen []string
	for range 4 {
		r.next(kindObserver)
		seen = append(seen, r.results.observer)
	}
	if got := strings.Join(seen, " "); got != "O2 O3 O1 O2" {
		t.Errorf("observers in turn: %s", got)
	}
}

// broken is a solver that cannot find approaches.
type broken struct{ *study.Solver }

func (broken) Approaches(context.Context, *plan.Plan) ([]study.Approach, error) {
	return nil, errors.New("the walks were lost")
}

func TestFailedStageIsToldAndTheRestStays(t *testing.T) {
	r := newRig(t, func() live.Solver { return broken{study.NewSolver()} })
	r.openSample("gallery")
	r.settle()
	if r.status.solve.text != "the walks were lost" {
		t.Errorf("status %q", r.status.solve.text)
	}
	if _, ok := r.results.sightOf("O1"); !ok {
		t.Error("regions are lost with the walks")
	}
	if r.table.rows[0].mark != "unknown" {
		t.Errorf("the table shows %+v of a failed stage", r.table.rows[0])
	}
}

// slow is a solver whose approaches wait to be let go.
type slow struct {
	*study.Solver
	hold chan struct{}
}

func (s slow) Approaches(ctx context.Context, p *plan.Plan) ([]study.Approach, error) {
	select {
	case <-s.hold:
	case <-ctx.Done():
		return nil, ctx.Err()
	}
	return s.Solver.Approaches(ctx, p)
}

func TestSlowStudyShowsProgress(t *testing.T) {
	hold := make(chan struct{})
	r := newRig(t, func() live.Solver { return slow{study.NewSolver(), hold} })
	r.openSample("gallery")
	r.until("a blink has passed", func() bool { return r.results.slow && r.results.result != nil })
	r.report()
	if !r.status.progress.Visible() || !strings.Contains(r.status.solve.text, "approaches") {
		t.Errorf("progress shown %v, status %q", r.status.progress.Visible(), r.status.solve.text)
	}
	if d := r.status.progress.done; d < 0.5 || d > 0.8 {
		t.Errorf("with the mesh ready and approaches not, the bar is at %g", d)
	}
	if r.picture.scene().Stale {
		t.Error("the region is known and must not be dimmed for the walks' sake")
	}
	r.keys(fyne.KeyEscape)
	if r.status.progress.Visible() || !strings.Contains(r.status.solve.text, "stopped") {
		t.Errorf("after Esc progress %v, status %q", r.status.progress.Visible(), r.status.solve.text)
	}
	close(hold)
	r.click(11.35, 8.75) // the observer of the rotunda
	r.drag(11.35, 8.75, 11.5, 8.75)
	r.settle()
	if r.status.progress.Visible() || r.table.rows[0].first != "9.9 m" {
		t.Errorf("after the study progress %v, %+v", r.status.progress.Visible(), r.table.rows[0])
	}
}

func TestStatusFollowsThePointer(t *testing.T) {
	r := newGallery(t)
	r.move(13.62, 10.34)
	if got := r.status.place.text; got != "x 13.62  y 10.34 m" {
		t.Errorf("place %q", got)
	}
	if got := r.status.counts.text; !strings.Contains(got, "walls") {
		t.Errorf("counts %q", got)
	}
	r.view.MouseOut()
	if got := r.status.place.text; got != "" {
		t.Errorf("place %q with the pointer elsewhere", got)
	}
}
