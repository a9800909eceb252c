package live_test

import (
	"math"
	"slices"
	"sync"
	"testing"
	"testing/synctest"
	"time"

	"enfilade/app/live"
	"enfilade/solver/exact"
	"enfilade/solver/plan"
	"enfilade/solver/study"
)

// TestRunnerDistances: distances come only when they are asked for, follow the start, are kept while nothing changes, and give
// no answer once the obstacles are others.
func TestRunnerDistances(t *testing.T) {
	synctest.Test(t, func(t *testing.T) {
		f := &fake{}
		r := newRig(f)
		ask := func(a live.Ask) *live.Distances {
			r.Submit(a)
			time.Sleep(ms(1))
			synctest.Wait()
			for _, u := range slices.Backward(r.got()) {
				if u.Stage == live.StageDistances && u.Rev == a.Rev {
					return u.Distances
				}
			}
			return nil
		}
		if d := ask(live.Ask{Rev: 1, Plan: house}); d != nil {
			t.Fatalf("distances that nobody asked for: %+v", d)
		}
		first := ask(live.Ask{Rev: 2, Plan: house, Field: live.FieldAsk{Start: "S1", Step: 1000}})
		if got, ok := first.At(exact.Pt{X: 40000, Y: 50000}); !ok || got != 5000 {
			t.Errorf("5 m away it is %v mm, %v", got, ok)
		}
		if again := ask(live.Ask{Rev: 3, Plan: house, Draft: true, Field: first.FieldAsk}); again != first {
			t.Error("the same question was worked out again")
		}
		n := len(f.calls)
		wider := ask(live.Ask{Rev: 4, Plan: house, Field: live.FieldAsk{Start: "S1", Step: 2000}})
		if len(wider.Lines) == 0 || len(wider.Lines) >= len(first.Lines) || slices.Contains(f.calls[n:], live.StageDistances) {
			t.Errorf("lines every 2 m: %d after %d, solved %v", len(wider.Lines), len(first.Lines), f.calls[n:])
		}
		parts := house.Parts()
		parts.Walls = []plan.Wall{{ID: "W1", Line: plan.ChainOf(exact.Pt{X: 50000}, exact.Pt{X: 50000, Y: 40000}), Height: plan.Ceiling}}
		ask(live.Ask{Rev: 5, Plan: plan.From(parts)})
		if got, ok := wider.At(exact.Pt{X: 40000, Y: 50000}); ok {
			t.Errorf("with another wall the old distances still say %v", got)
		}
		r.Close()
	})
}

// TestDistancesWhileTheMeshChanges asks from another goroutine while walls move, for the race detector; what is answered is
// never the distance on a mesh in the middle of its change.
func TestDistancesWhileTheMeshChanges(t *testing.T) {
	var mu sync.Mutex
	var last *live.Distances
	r := live.New(func() live.Solver { return study.NewSolver() }, func(u live.Update) {
		if u.Distances != nil {
			mu.Lock()
			last = u.Distances
			mu.Unlock()
		}
	})
	defer r.Close()
	at, answers := exact.Pt{X: 90000, Y: 10000}, 0
	for i := range 60 {
		parts := house.Parts()
		high := int32(20000 + 500*i)
		parts.Walls = []plan.Wall{{ID: "W1", Line: plan.ChainOf(exact.Pt{X: 50000}, exact.Pt{X: 50000, Y: high}), Height: plan.Ceiling}}
		r.Submit(live.Ask{Rev: uint64(i + 1), Plan: plan.From(parts), Field: live.FieldAsk{Start: "S1", Step: 1000}})
		for end := time.Now().Add(3 * time.Millisecond); time.Now().Before(end); {
			mu.Lock()
			d := last
			mu.Unlock()
			if d == nil {
				continue
			}
			if got, ok := d.At(at); ok {
				answers++
				if least := 2 * math.Hypot(4000, 1000); got < least || got > 2*math.Hypot(4000, 4000) {
					t.Fatalf("move %d: %v mm, want from %v on", i, got, least)
				}
			}
		}
	}
	if answers < 100 {
		t.Errorf("%d answers, too few to tell", answers)
	}
}
