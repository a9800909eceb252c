package live_test

import (
	"errors"
	"testing"

	"enfilade/app/live"
	"enfilade/solver/study"
)

func TestBoardWakesOnceForManyUpdates(t *testing.T) {
	var queue []func()
	var shown []*live.State
	b := live.NewBoard(func(f func()) { queue = append(queue, f) }, func(s *live.State) { shown = append(shown, s) })
	p := titled("a")
	for rev := uint64(1); rev <= 5; rev++ {
		b.Put(live.Update{Rev: rev, Plan: p, Stage: live.StageSights, Sights: make([]study.Sight, rev)})
	}
	b.Put(live.Update{Rev: 3, Plan: p, Stage: live.StageSights}) // older than what is shown
	if len(queue) != 1 {
		t.Fatalf("%d wake-ups on their way, want 1", len(queue))
	}
	queue[0]()
	if len(shown) != 1 || len(shown[0].Result().Sight) != 5 || !shown[0].Fresh(live.StageSights, 5) {
		t.Fatalf("shown %+v, want the state of revision 5", shown)
	}
	b.Put(live.Update{Rev: 6, Plan: p, Stage: live.StageMesh})
	if len(queue) != 2 {
		t.Errorf("%d wake-ups, want a new one after the last was taken", len(queue))
	}
}

func TestBoardKeepsTheLastAnswerBesideAnError(t *testing.T) {
	b := live.NewBoard(func(func()) {}, nil)
	p := titled("a")
	for s := range live.NumStages {
		b.Put(live.Update{Rev: 1, Plan: p, Stage: s, Approaches: make([]study.Approach, 3)})
	}
	if !b.State().Done(live.Ask{Rev: 1}) || b.State().Done(live.Ask{Rev: 2}) {
		t.Error("Done must hold for revision 1 only")
	}
	b.Put(live.Update{Rev: 2, Plan: p, Stage: live.StageApproaches, Err: errors.New("no")})
	s := b.State()
	if len(s.Result().Approaches) != 3 || s.Failed[live.StageApproaches].Err == nil || s.Fresh(live.StageApproaches, 2) {
		t.Error("an error must leave the last answer and be told beside it")
	}
	b.Put(live.Update{Rev: 2, Plan: p, Stage: live.StageMesh, Err: errors.New("no")})
	if !b.State().Done(live.Ask{Rev: 2}) {
		t.Error("a plan without a mesh is done")
	}
	b.Put(live.Update{Rev: 3, Plan: p, Stage: live.StageApproaches})
	if b.State().Failed[live.StageApproaches].Plan != nil {
		t.Error("a good answer must clear the error")
	}
}
