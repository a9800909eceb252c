//go:build linux

package gui

import (
	"context"
	"runtime"
	"slices"
	"testing"

	"enfilade/app/live"
	"enfilade/solver/plan"
	"enfilade/solver/plantest"
	"enfilade/solver/study"
)

// idle is a solver that knows everything at once and finds nothing, so that what is allocated is the window's.
type idle struct{}

func (idle) Mesh(context.Context, *plan.Plan) error                           { return nil }
func (idle) Problems(*plan.Plan) []plan.Problem                               { return nil }
func (idle) Sights(context.Context, *plan.Plan) ([]study.Sight, error)        { return nil, nil }
func (idle) Approaches(context.Context, *plan.Plan) ([]study.Approach, error) { return nil, nil }
func (idle) SeenFrom(context.Context, *plan.Plan) ([]study.Sight, error)      { return nil, nil }
func (idle) Routes(context.Context, *plan.Plan) ([]study.Route, error)        { return nil, nil }
func (idle) ClearWidths(context.Context, *plan.Plan, []study.Approach) error  { return nil }
func (idle) Field(context.Context, *plan.Plan, string) (*study.Field, error)  { return nil, nil }
func (idle) Reaches(context.Context, *plan.Plan) ([]study.Reach, error)       { return nil, nil }
func (idle) Findings(context.Context, *plan.Plan, []study.Approach, []study.Route) ([]plan.Finding, error) {
	return nil, nil
}

// weights are how many bytes were allocated by each handler of something that is done, drawing left out.
func (h *holdRig) weights(do func(*holdRig)) []uint64 {
	h.weighed = []uint64{}
	do(h)
	w := h.weighed
	h.weighed = nil
	slices.Sort(w)
	return w
}

// weigh does f and notes what was allocated meanwhile.
func (h *holdRig) weigh(f func()) {
	var before, after runtime.MemStats
	runtime.ReadMemStats(&before)
	f()
	runtime.ReadMemStats(&after)
	h.weighed = append(h.weighed, after.TotalAlloc-before.TotalAlloc)
}

// newIdleRig is a hold rig whose solver does nothing.
func newIdleRig(tb testing.TB, p *plan.Plan) *holdRig {
	return newHoldRigOf(tb, p, func() live.Solver { return idle{} })
}

// weighedDrags are what is dragged by 30 moves of the pointer, and how many kB the middle one of its handlers may allocate.
var weighedDrags = []struct {
	name string
	most uint64
	do   func(h *holdRig)
}{
	{"observer", 100, func(h *holdRig) { h.drawn(h.eye, 30); h.event(h.undo) }},
	{"corner", 200, func(h *holdRig) {
		h.event(func() { h.view.look(h.close) })
		h.drawn(h.wall, 30)
		h.event(h.undo)
		h.event(h.view.fit)
	}},
	{"wall", 100, func(h *holdRig) {
		h.event(func() { h.view.look(h.close) })
		h.drawn(h.body, 30)
		h.event(h.undo)
		h.event(h.view.fit)
	}},
}

// BenchmarkHandlerBytes counts what handlers allocate while something is dragged, the middle one and the most: a figure that other
// work on the machine leaves alone, and that the collector's share in a hold goes by. The most tells of bases too, which the worker
// makes beside a handler when a drag begins or ends.
func BenchmarkHandlerBytes(b *testing.B) {
	h := newIdleRig(b, plantest.Office(1, 20000))
	for _, c := range weighedDrags {
		b.Run("plan=office/walls=20000/drag="+c.name, func(b *testing.B) {
			var w []uint64
			for b.Loop() {
				w = h.weights(c.do)
			}
			b.ReportMetric(float64(w[len(w)/2])/1000, "median-kB")
			b.ReportMetric(float64(w[len(w)-1])/1000, "most-kB")
		})
	}
}

// TestHandlerBytes: what a handler of a drag allocates does not grow with the plan.
func TestHandlerBytes(t *testing.T) {
	if testing.Short() || raceEnabled {
		t.Skip("counts bytes")
	}
	h := newIdleRig(t, plantest.Office(1, 20000))
	for _, c := range weighedDrags {
		if w := h.weights(c.do); w[len(w)/2] > 1000*c.most {
			t.Errorf("dragging a %s: the middle handler of %d allocates %d kB, want %d at most", c.name, len(w), w[len(w)/2]/1000, c.most)
		}
	}
}
