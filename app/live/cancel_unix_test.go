//go:build unix

package live_test

import (
	"context"
	"errors"
	"syscall"
	"testing"
	"time"

	"enfilade/app/live"
	"enfilade/solver/plan"
	"enfilade/solver/plantest"
	"enfilade/solver/study"
)

// watched is a solver that tells how each stage ended.
type watched struct {
	*study.Solver
	ended chan error
}

func (w watched) tell(err error) error {
	w.ended <- err
	return err
}

func (w watched) Mesh(ctx context.Context, p *plan.Plan) error { return w.tell(w.Solver.Mesh(ctx, p)) }
func (w watched) Approaches(ctx context.Context, p *plan.Plan) ([]study.Approach, error) {
	rows, err := w.Solver.Approaches(ctx, p)
	return rows, w.tell(err)
}
func (w watched) ClearWidths(ctx context.Context, p *plan.Plan, rows []study.Approach) error {
	return w.tell(w.Solver.ClearWidths(ctx, p, rows))
}

// processor returns the processor time that the test has taken so far, all threads together.
func processor(t *testing.T) time.Duration {
	var u syscall.Rusage
	if err := syscall.Getrusage(syscall.RUSAGE_SELF, &u); err != nil {
		t.Fatal(err)
	}
	return time.Duration(u.Utime.Nano() + u.Stime.Nano())
}

// intoStage waits until the runner has told of progress within a stage, or has left it.
func intoStage(r *live.Runner, s live.Stage) {
	first := -1.0
	for now := r.Progress(); now.Stage <= s; now = r.Progress() {
		if now.Stage == s && now.Rev > 0 {
			if first < 0 {
				first = now.Done
			}
			if now.Done > first {
				return
			}
		}
		time.Sleep(100 * time.Microsecond)
	}
}

// TestCancelTakesLittle stops the study of 20,000 walls in the middle of its long stages. It must be done with within 50 ms;
// processor time is measured, the least of a few tries, so that a machine with other work does not fail it.
func TestCancelTakesLittle(t *testing.T) {
	if testing.Short() {
		t.Skip("20,000 walls")
	}
	p := plantest.Office(1, 20_000)
	ended := make(chan error, 100)
	for _, s := range []live.Stage{live.StageMesh, live.StageApproaches, live.StageWidths} {
		least := time.Hour
		for try := 0; try < 6 && least > 50*time.Millisecond; try++ {
			r := live.New(func() live.Solver { return watched{study.NewSolver(), ended} }, func(live.Update) {})
			r.Submit(live.Ask{Rev: 1, Plan: p})
			intoStage(r, s)
			for len(ended) > 0 {
				<-ended
			}
			before := processor(t)
			r.Cancel()
			select {
			case err := <-ended:
				if took := processor(t) - before; errors.Is(err, context.Canceled) {
					least = min(least, took)
				}
			case <-time.After(20 * time.Second):
				t.Fatalf("%v: not cancelled within 20 s", s)
			}
			r.Close()
		}
		t.Logf("%v: cancelled in %v of processor time", s, least)
		if least > 50*time.Millisecond {
			t.Errorf("%v: cancelling took %v, at most 50 ms may pass", s, least)
		}
	}
}
