package gui

import (
	"bytes"
	"image"
	"path/filepath"
	"testing"
	"time"

	"fyne.io/fyne/v2"
	"fyne.io/fyne/v2/driver/desktop"
	"fyne.io/fyne/v2/test"

	"enfilade/app/live"
	"enfilade/assets"
	"enfilade/fileio/planfile"
	"enfilade/solver/exact"
	"enfilade/solver/plan"
	"enfilade/solver/study"
)

// rig is a window under the toolkit's test driver. What workers hand to the window's goroutine waits in a queue that the
// test empties.
type rig struct {
	*window
	t     testing.TB
	queue chan func()
}

func newRig(t testing.TB, solver func() live.Solver) *rig {
	t.Helper()
	r := &rig{t: t, queue: make(chan func(), 1000)}
	d := newDesk(parts{app: test.NewTempApp(t), solver: solver, do: func(f func()) { r.queue <- f }, now: time.Now, inline: true},
		&look{choice: themeLight})
	r.window = d.open()
	r.frame()
	t.Cleanup(d.close)
	return r
}

// long leaves a long test out under the race detector: nothing in it runs beside the window that shorter ones do not run too.
func long(t *testing.T) {
	if raceEnabled {
		t.Skip("long, and made of what other tests do under the race detector")
	}
}

// newGallery is a window with the first sample in it, solved.
func newGallery(t *testing.T) *rig {
	t.Helper()
	r := newRig(t, realSolver)
	r.openSample("gallery")
	r.settle()
	return r
}

func realSolver() live.Solver { return study.NewSolver() }

// frame draws the picture once, as the window would: its size is known from then on.
func (r *rig) frame() {
	s := r.view.Size()
	r.picture.draw(int(s.Width), int(s.Height))
}

// settle runs what workers queue until the study of the plan that is shown is done.
func (r *rig) settle() {
	r.t.Helper()
	r.until("the study is done", func() bool { return r.results.done() })
	r.until("the base is made", func() bool {
		r.frame()
		return r.picture.base != nil && r.picture.base.key == keyOf(r.picture.scene())
	})
}

func (r *rig) until(what string, ok func() bool) {
	r.t.Helper()
	limit := time.After(20 * time.Second)
	for !ok() {
		select {
		case f := <-r.queue:
			f()
		case <-time.After(time.Millisecond):
		case <-limit:
			r.t.Fatalf("%s: not within 20 s", what)
		}
	}
}

// m returns the grid point at x, y metres.
func m(x, y float64) exact.Pt { return exact.Pt{X: int32(x * 10000), Y: int32(y * 10000)} }

// at returns the toolkit's place of a point of the plan, in metres.
func (r *rig) at(x, y float64) fyne.Position {
	px, py := r.view.cam.Pixel(exact.Pt{X: int32(x * 10000), Y: int32(y * 10000)})
	return fyne.NewPos(float32(px)/r.view.pix, float32(py)/r.view.pix)
}

func mouse(p fyne.Position, b desktop.MouseButton) *desktop.MouseEvent {
	return &desktop.MouseEvent{Button: b, PointEvent: fyne.PointEvent{Position: p, AbsolutePosition: p}}
}

// move, press, dragTo and release send what the display driver sends.
func (r *rig) move(x, y float64) { r.view.MouseMoved(mouse(r.at(x, y), 0)) }
func (r *rig) press(x, y float64) {
	r.move(x, y)
	r.view.MouseDown(mouse(r.at(x, y), desktop.MouseButtonPrimary))
}
func (r *rig) dragTo(x, y float64) {
	r.view.Dragged(&fyne.DragEvent{PointEvent: fyne.PointEvent{Position: r.at(x, y)}})
}
func (r *rig) release(x, y float64) {
	r.view.MouseUp(mouse(r.at(x, y), desktop.MouseButtonPrimary))
	r.view.DragEnd()
}

func (r *rig) click(x, y float64) {
	r.press(x, y)
	r.view.MouseUp(mouse(r.at(x, y), desktop.MouseButtonPrimary))
}

func (r *rig) drag(x, y, tox, toy float64) {
	r.press(x, y)
	for i := 1; i <= 4; i++ {
		k := float64(i) / 4
		r.dragTo(x+(tox-x)*k, y+(toy-y)*k)
	}
	r.release(tox, toy)
}

func (r *rig) keys(names ...fyne.KeyName) {
	for _, n := range names {
		r.view.TypedKey(&fyne.KeyEvent{Name: n})
	}
}

func (r *rig) runes(text string) {
	for _, c := range text {
		r.view.TypedRune(c)
	}
}

// observer returns an observer of the plan that is shown.
func (r *rig) observer(id string) plan.Observer {
	r.t.Helper()
	o, ok := r.session.Plan().Observer(id)
	if !ok {
		r.t.Fatalf("no observer %s", id)
	}
	return o
}

// pixel returns the colour of a pixel of the picture under a point of the plan.
func (r *rig) pixel(x, y float64) colour {
	r.t.Helper()
	r.settle()
	img := r.picture.draw(r.view.cam.W, r.view.cam.H).(*image.RGBA)
	px, py := r.view.cam.Pixel(exact.Pt{X: int32(x * 10000), Y: int32(y * 10000)})
	c := img.RGBAAt(int(px), int(py))
	return colour(c)
}

// text returns the plan as its file would hold it.
func text(t testing.TB, p *plan.Plan) string {
	t.Helper()
	var b bytes.Buffer
	if err := planfile.Write(&b, p); err != nil {
		t.Fatal(err)
	}
	return b.String()
}

// galleryFile writes the first sample to a file.
func galleryFile(t *testing.T) string {
	t.Helper()
	path := filepath.Join(t.TempDir(), "gallery.enfilade")
	writeFile(t, path, assets.SamplePlan("gallery"))
	return path
}
