package live

import (
	"sync/atomic"

	"enfilade/solver/exact"
	"enfilade/solver/study"
)

// State is the newest answer of every stage. It never changes; a new one is made for each delivery.
type State struct {
	Latest [NumStages]Update // the last answer of each stage that has one; Plan is nil before the first
	Failed [NumStages]Update // the last answer of each stage when it was an error, else empty
}

// Fresh reports whether the stage's answer belongs to revision rev.
func (s *State) Fresh(stage Stage, rev uint64) bool {
	return s.Latest[stage].Plan != nil && s.Latest[stage].Rev == rev
}

// Done reports whether every stage that an Ask wants has answered or failed for it.
func (s *State) Done(a Ask) bool {
	if f := s.Failed[StageMesh]; f.Plan != nil && f.Rev == a.Rev {
		return true
	}
	for stage := range NumStages {
		if a.wants(stage) && !s.has(stage, a) {
			return false
		}
	}
	return true
}

// has reports whether a stage has answered or failed for an Ask.
func (s *State) has(stage Stage, a Ask) bool {
	for _, u := range []*Update{&s.Latest[stage], &s.Failed[stage]} {
		if u.Plan != nil && u.Rev == a.Rev && (stage != StageDistances || u.Field == a.Field) {
			return true
		}
	}
	return false
}

// Result puts the stages' answers together. They may belong to different revisions.
func (s *State) Result() *study.Result {
	r := &study.Result{
		Sight:      s.Latest[StageSights].Sights,
		Approaches: s.Latest[StageApproaches].Approaches,
		SeenFrom:   s.Latest[StageSeenFrom].Sights,
		Problems:   s.Latest[StageMesh].Problems,
		Routes:     s.Latest[StageRoutes].Routes,
		Reach:      s.Latest[StageReach].Reach,
	}
	if w := s.Latest[StageWidths]; w.Plan != nil && w.Rev == s.Latest[StageApproaches].Rev {
		r.Approaches = w.Approaches
	}
	if p := s.Latest[StageApproaches].Plan; p != nil {
		r.WalkerEye = float64(p.Walker().Eye) / exact.PerMM
	}
	return r
}

// Board takes updates from a runner and shows the newest of them to the window, at most one wake-up being on its way at
// any time.
type Board struct {
	state   atomic.Pointer[State]
	pending atomic.Bool
	wake    func(show func())
	show    func(*State)
}

// NewBoard returns a board that calls show with the newest state through wake, which hands a function to the window's
// goroutine and returns at once.
func NewBoard(wake func(func()), show func(*State)) *Board {
	b := &Board{wake: wake, show: show}
	b.state.Store(&State{})
	return b
}

// State returns the newest state. Any goroutine may call it.
func (b *Board) State() *State { return b.state.Load() }

// Put takes an update; it is the deliver function of a runner and is called from one goroutine only. An update older than
// the one that is shown for its stage is dropped.
func (b *Board) Put(u Update) {
	next := *b.state.Load()
	if l := next.Latest[u.Stage]; l.Plan != nil && l.Rev > u.Rev {
		return
	}
	if u.Err != nil {
		next.Failed[u.Stage] = u
	} else {
		next.Latest[u.Stage], next.Failed[u.Stage] = u, Update{}
	}
	b.state.Store(&next)
	if b.pending.CompareAndSwap(false, true) {
		b.wake(func() {
			b.pending.Store(false) // before reading: an update from here on wakes again
			b.show(b.state.Load())
		})
	}
}
