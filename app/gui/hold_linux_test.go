//go:build linux

package gui

import (
	"math"
	"path/filepath"
	"runtime"
	"syscall"
	"testing"
	"time"
	"unsafe"

	"enfilade/app/live"
	"enfilade/canvas/view"
	"enfilade/solver/exact"
	"enfilade/solver/plan"
	"enfilade/solver/plantest"
)

// holdRig is a window whose every stay in the toolkit's goroutine is timed: our handlers of pointer and keys, the taking over
// of answers, the drawing of the picture. The toolkit's own painting is no part of it.
type holdRig struct {
	*rig
	held  holds
	eye   exact.Pt // of the observer that is dragged
	wall  exact.Pt // a wall's corner near it
	body  exact.Pt // the middle of a piece of that wall
	close view.Camera
	path  string // of the plan's file

	weighed []uint64 // bytes that handlers allocated; nil when they are not weighed
}

// holds are the times the goroutine was held: of its thread by the processor, and by the clock, which also counts what other
// work on the machine took from it.
type holds struct{ thread, clock []time.Duration }

// of times all holds of something that is done, on one thread: threadTime is that of the calling one.
func (*holds) of(h *holdRig, do func(*holdRig)) {
	runtime.LockOSThread()
	defer runtime.UnlockOSThread()
	do(h)
}

// longest is the longest hold by the processor's time.
func (h *holds) longest() (most time.Duration) {
	for _, d := range h.thread {
		most = max(most, d)
	}
	return most
}

// newHoldRig opens a plan in a window whose picture is 1600 by 1000.
func newHoldRig(tb testing.TB, p *plan.Plan) *holdRig { return newHoldRigOf(tb, p, realSolver) }

func newHoldRigOf(tb testing.TB, p *plan.Plan, solver func() live.Solver) *holdRig {
	tb.Helper()
	h := &holdRig{rig: newRig(tb, solver), path: filepath.Join(tb.TempDir(), "plan.enfilade")}
	h.errands.inline = false // as in the program: files are read beside the window
	s := h.view.Size()
	h.win.Resize(h.desk.size.AddWidthHeight(feelWidth-s.Width, feelHeight-s.Height))
	writeFile(tb, h.path, []byte(text(tb, p)))
	h.open(h.path)
	h.until("the plan is open", func() bool { return h.session.Path() != "" })
	h.settle()
	h.eye = firstObserver(h.session.Plan()).At
	id, corner, at := cornerNear(h.session.Plan(), h.eye)
	w, _ := h.session.Plan().Wall(id)
	next := w.Line.At((corner + 1) % w.Line.Len())
	h.wall, h.body = at, exact.Pt{X: (at.X + next.X) / 2, Y: (at.Y + next.Y) / 2}
	h.close = h.view.cam
	h.close.CX, h.close.CY = float64(h.wall.X)/exact.PerMM, float64(h.wall.Y)/exact.PerMM
	h.close.Scale = max(h.close.Scale, 0.03)
	return h
}

// hold times one stay in the toolkit's goroutine.
func (h *holdRig) hold(f func()) {
	clock, thread := time.Now(), threadTime()
	f()
	h.held.thread = append(h.held.thread, threadTime()-thread)
	h.held.clock = append(h.held.clock, time.Since(clock))
}

// threadTime is the processor's time that the calling thread has taken.
func threadTime() time.Duration {
	const threadClock = 3 // CLOCK_THREAD_CPUTIME_ID; the sums of Getrusage go by ticks
	var t syscall.Timespec
	if _, _, e := syscall.Syscall(syscall.SYS_CLOCK_GETTIME, threadClock, uintptr(unsafe.Pointer(&t)), 0); e != 0 {
		return 0
	}
	return time.Duration(t.Nano())
}

// paint draws the picture as the toolkit asks for it after every change.
func (h *holdRig) paint() { h.hold(h.frame) }

// event does what the toolkit does about one event: the handler, what workers queued meanwhile, and the picture.
func (h *holdRig) event(f func()) {
	if h.weighed != nil {
		h.weigh(f)
	} else {
		h.hold(f)
	}
	h.paint()
	for end := time.Now().Add(4 * time.Millisecond); time.Now().Before(end); {
		select {
		case f := <-h.queue:
			h.hold(f)
			h.paint()
		case <-time.After(time.Millisecond):
		}
	}
}

// rest lets the study come to its end.
func (h *holdRig) rest() { h.await("the study is done", h.results.done) }

// await does what workers queue until something is so.
func (h *holdRig) await(what string, ok func() bool) {
	h.t.Helper()
	for end := time.Now().Add(5 * time.Minute); !ok(); {
		select {
		case f := <-h.queue:
			h.hold(f)
			h.paint()
		case <-time.After(time.Millisecond):
		}
		if time.Now().After(end) {
			h.t.Fatalf("%s: not within five minutes", what)
		}
	}
}

// spot returns a grid point's place in metres, as the rig's moves take it.
func spot(p exact.Pt) (x, y float64) { return float64(p.X) / 10000, float64(p.Y) / 10000 }

// drawn drags from a point in a circle round it, 30 px wide.
func (h *holdRig) drawn(from exact.Pt, moves int) {
	x, y := spot(from)
	r := 0.03 / h.view.cam.Scale
	h.event(func() { h.move(x, y) })
	h.event(func() { h.press(x, y) })
	for i := range moves {
		sin, cos := math.Sincos(float64(i) / 10)
		h.event(func() { h.dragTo(x+r*cos, y+r*sin) })
	}
	h.event(func() { h.release(x+r, y) })
	h.rest()
	if !h.session.Dirty() {
		h.t.Fatal("nothing was dragged")
	}
}

// BenchmarkHold measures how long the toolkit's goroutine is held by what we do in it, while someone works: the median, the
// 95th and 99th percentile and the longest in the processor's time of its thread, and the longest by the clock.
func BenchmarkHold(b *testing.B) {
	for _, on := range feelPlans {
		b.Run("plan="+on.name, func(b *testing.B) {
			h := newHoldRig(b, on.make(b))
			for _, c := range holdCases {
				b.Run("do="+c.name, func(b *testing.B) {
					for h.held = (holds{}); b.Loop(); {
						h.held.of(h, c.do)
					}
					b.ReportMetric(ms(h.held.thread, 0.5), "median-ms")
					b.ReportMetric(ms(h.held.thread, 0.95), "p95-ms")
					b.ReportMetric(ms(h.held.thread, 0.99), "p99-ms")
					b.ReportMetric(ms(h.held.thread, 1), "longest-ms")
					b.ReportMetric(ms(h.held.clock, 1), "clock-ms")
					b.ReportMetric(float64(len(h.held.thread)), "holds")
				})
			}
		})
	}
}

// TestHold: no handler holds the toolkit's goroutine for longer than three times the 16 ms it should, at 20,000 walls. Of
// some rounds the best counts, for what disturbs the caches and the collector's share cost the processor's time too.
func TestHold(t *testing.T) {
	if testing.Short() || raceEnabled {
		t.Skip("measures time")
	}
	const limit = 48 * time.Millisecond
	h := newHoldRig(t, plantest.Office(1, 20000))
	was := text(t, h.session.Plan())
	for _, c := range holdCases {
		if c.long {
			continue
		}
		best := time.Hour
		for range 3 {
			h.held = holds{}
			h.held.of(h, c.do)
			best = min(best, h.held.longest())
			if best < limit {
				break
			}
		}
		if best > limit {
			t.Errorf("%s: the window's goroutine is held for %v of the processor's time, want under %v", c.name, best, limit)
		}
	}
	if text(t, h.session.Plan()) != was {
		t.Error("the plan is not as it was")
	}
}
