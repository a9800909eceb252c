package live_test

import (
	"errors"
	"testing"
	"time"

	"enfilade/app/live"
	"enfilade/solver/arrange"
	"enfilade/solver/plantest"
	"enfilade/solver/study"
)

// TestTooLargeAPlanIsTold: the error of a plan above the limit of edges is delivered, what was known of the plan before stays,
// and the next plan is solved.
func TestTooLargeAPlanIsTold(t *testing.T) {
	b := live.NewBoard(func(show func()) { show() }, func(*live.State) {})
	told := make(chan live.Update, 100)
	r := live.New(func() live.Solver { return study.NewSolver() }, func(u live.Update) {
		b.Put(u)
		told <- u
	})
	defer r.Close()
	await := func(rev uint64, failed bool) {
		t.Helper()
		for patience := time.After(time.Minute); ; {
			select {
			case u := <-told:
				if u.Rev == rev && (u.Stage == live.StageMesh) {
					if failed != (u.Err != nil) {
						t.Fatalf("plan %d: error %v", rev, u.Err)
					}
					return
				}
			case <-patience:
				t.Fatalf("plan %d: nothing told", rev)
			}
		}
	}
	r.Submit(live.Ask{Rev: 1, Plan: house})
	await(1, false)
	r.Submit(live.Ask{Rev: 2, Plan: plantest.Grid(3000)})
	await(2, true)
	s := b.State()
	var large *arrange.TooLarge
	if f := s.Failed[live.StageMesh]; f.Rev != 2 || !errors.As(f.Err, &large) || large.Limit != arrange.MaxEdges {
		t.Errorf("failed: %v", f.Err)
	}
	if s.Latest[live.StageMesh].Plan != house {
		t.Error("what was known of the plan before is lost")
	}
	r.Submit(live.Ask{Rev: 3, Plan: house})
	await(3, false)
	if f := b.State().Failed[live.StageMesh]; f.Err != nil {
		t.Errorf("still failed: %v", f.Err)
	}
}
