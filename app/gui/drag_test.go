package gui

import (
	"bytes"
	"context"
	"math"
	"syscall"
	"testing"
	"time"

	"enfilade/assets"
	"enfilade/canvas/paint"
	"enfilade/canvas/raster"
	"enfilade/canvas/view"
	"enfilade/fileio/planfile"
	"enfilade/solver/exact"
	"enfilade/solver/plan"
	"enfilade/solver/study"
)

// dragRig is the frame of a drag without the toolkit: a solver with a ready mesh, a base, and a list that is used again.
type dragRig struct {
	solver  *study.Solver
	plan    *plan.Plan
	scene   paint.Scene
	base    *raster.Base
	overlay paint.List
	frame   raster.Frame
}

func newDragRig(tb testing.TB, sample string, w, h int) *dragRig {
	tb.Helper()
	p, err := planfile.Read(bytes.NewReader(assets.SamplePlan(sample)), sample)
	if err != nil {
		tb.Fatal(err)
	}
	r := &dragRig{solver: study.NewSolver(), plan: p}
	result, err := r.solver.Solve(context.Background(), p)
	if err != nil {
		tb.Fatal(err)
	}
	r.scene = paint.Scene{Plan: p, Result: result, Camera: view.Fit(paint.Bounds(p), w, h, 1), Theme: paint.Light(), Old: p,
		Dragged: []plan.Ref{{Kind: plan.KindObserver, ID: "O1"}}}
	r.scene.Selected = r.scene.Dragged
	r.scene.Observer, r.scene.Start, r.scene.Target = paint.Choose(p)
	list := paint.Base(&r.scene)
	r.scene.Drawing = list.Drawing
	r.base = raster.NewBase(list, w, h)
	return r
}

// step draws frame i of a drag in a small circle: the edit, the regions of all observers, and the picture.
func (r *dragRig) step(tb testing.TB, i int) {
	sin, cos := math.Sincos(float64(i) / 10)
	by := exact.Vec{X: int32(10000 * cos), Y: int32(10000 * sin)}
	p, err := plan.MoveItems{Items: r.scene.Dragged, By: by}.Apply(r.plan)
	if err != nil {
		tb.Fatal(err)
	}
	if err := r.solver.Mesh(context.Background(), p); err != nil {
		tb.Fatal(err)
	}
	sights, err := r.solver.Sights(context.Background(), p)
	if err != nil {
		tb.Fatal(err)
	}
	result := *r.scene.Result
	result.Sight = sights
	r.scene.Plan, r.scene.Result = p, &result
	paint.Overlay(&r.scene, &r.overlay)
	r.frame.Draw(r.base, &r.overlay)
}

// BenchmarkDrag measures one frame of dragging an observer: solve and blend, without the toolkit's own painting. It is to
// stay under 12 ms on the gallery at 1600 x 1000. The processor's time is given beside the clock's, which tells of other
// work on the machine too.
func BenchmarkDrag(b *testing.B) {
	for _, s := range assets.Samples() {
		b.Run("plan="+s.Name+"/size=1600x1000", func(b *testing.B) {
			r := newDragRig(b, s.Name, 1600, 1000)
			b.ReportAllocs()
			i, began := 0, cpuTime()
			for b.Loop() {
				r.step(b, i)
				i++
			}
			b.ReportMetric(float64((cpuTime()-began).Microseconds())/1000/float64(i), "cpu-ms/op")
		})
	}
}

// cpuTime is the processor's time this process has taken.
func cpuTime() time.Duration {
	var u syscall.Rusage
	if syscall.Getrusage(syscall.RUSAGE_SELF, &u) != nil {
		return 0
	}
	return time.Duration(u.Utime.Nano() + u.Stime.Nano())
}

// TestDragFrame holds a frame against its limit, in the processor's time: the clock's would tell of other work on the
// machine. Of some batches the best counts, for what disturbs the caches costs the processor's time too.
func TestDragFrame(t *testing.T) {
	if testing.Short() {
		t.Skip("measures time")
	}
	const batches, frames = 12, 5
	r := newDragRig(t, "gallery", 1600, 1000)
	r.step(t, 0)
	best := time.Hour
	for k := range batches {
		began := cpuTime()
		for i := range frames {
			r.step(t, k*frames+i)
		}
		best = min(best, (cpuTime()-began)/frames)
	}
	if best > 12*time.Millisecond && !raceEnabled {
		t.Errorf("a frame of a drag takes %v of the processor's time, want under 12 ms", best)
	}
	i := 0
	if n := testing.AllocsPerRun(50, func() { r.step(t, i); i++ }); n > 200 {
		t.Errorf("a frame allocates %g times", n)
	}
}
