package live_test

import (
	"context"
	"errors"
	"fmt"
	"math"
	"slices"
	"strings"
	"sync"
	"testing"
	"testing/synctest"
	"time"

	"enfilade/app/live"
	"enfilade/solver/exact"
	"enfilade/solver/plan"
	"enfilade/solver/study"
)

// fake is a solver whose stages take a given time of a fake clock and say what they did.
type fake struct {
	take  [live.NumStages]time.Duration
	panic [live.NumStages]bool
	fail  [live.NumStages]error
	calls []live.Stage
}

func (f *fake) do(ctx context.Context, s live.Stage) error {
	f.calls = append(f.calls, s)
	if f.panic[s] {
		panic("broken " + s.String())
	}
	if f.fail[s] != nil {
		return f.fail[s]
	}
	select {
	case <-ctx.Done():
		return ctx.Err()
	case <-time.After(f.take[s]):
		return nil
	}
}

func (f *fake) Mesh(ctx context.Context, _ *plan.Plan) error { return f.do(ctx, live.StageMesh) }
func (f *fake) Problems(p *plan.Plan) []plan.Problem {
	return []plan.Problem{{Text: p.Sheet().Title}}
}

func (f *fake) Sights(ctx context.Context, p *plan.Plan) ([]study.Sight, error) {
	return []study.Sight{{Name: p.Sheet().Title}}, f.do(ctx, live.StageSights)
}
func (f *fake) Approaches(ctx context.Context, p *plan.Plan) ([]study.Approach, error) {
	return []study.Approach{{Start: p.Sheet().Title}}, f.do(ctx, live.StageApproaches)
}
func (f *fake) ClearWidths(ctx context.Context, _ *plan.Plan, rows []study.Approach) error {
	for i := range rows {
		rows[i].ClearWidth = 900
	}
	return f.do(ctx, live.StageWidths)
}
func (f *fake) Routes(ctx context.Context, p *plan.Plan) ([]study.Route, error) {
	return []study.Route{{ID: p.Sheet().Title}}, f.do(ctx, live.StageRoutes)
}
func (f *fake) Findings(ctx context.Context, p *plan.Plan, rows []study.Approach, routes []study.Route) ([]plan.Finding, error) {
	return []plan.Finding{{Offer: fmt.Sprint(p.Sheet().Title, len(rows), len(routes))}}, f.do(ctx, live.StageFindings)
}
func (f *fake) Field(ctx context.Context, _ *plan.Plan, start string) (*study.Field, error) {
	if err := f.do(ctx, live.StageDistances); err != nil {
		return nil, err
	}
	return study.NewSolver().Field(ctx, house, start)
}
func (f *fake) Reaches(ctx context.Context, p *plan.Plan) ([]study.Reach, error) {
	return []study.Reach{{Zone: p.Sheet().Title}}, f.do(ctx, live.StageReach)
}

// house is a floor of 10 m by 8 m with a start in its corner.
var house = plan.From(plan.Parts{Floor: plan.ChainOf(exact.Pt{}, exact.Pt{X: 100000}, exact.Pt{X: 100000, Y: 80000}, exact.Pt{Y: 80000}),
	Walker: plan.DefaultWalker(), Starts: []plan.Start{{ID: "S1", At: exact.Pt{X: 10000, Y: 10000}}}})

// everything asks for all stages.
func everything(rev uint64, p *plan.Plan) live.Ask {
	return live.Ask{Rev: rev, Plan: p, Field: live.FieldAsk{Start: "S1", Step: 1000}, Reach: true}
}
func (f *fake) SeenFrom(ctx context.Context, p *plan.Plan) ([]study.Sight, error) {
	return []study.Sight{{Name: p.Sheet().Title}}, f.do(ctx, live.StageSeenFrom)
}

// rig is a runner with its solver and what it delivered.
type rig struct {
	*live.Runner
	fake *fake
	mu   sync.Mutex
	all  []live.Update
}

// got returns what was delivered so far.
func (r *rig) got() []live.Update {
	r.mu.Lock()
	defer r.mu.Unlock()
	return slices.Clone(r.all)
}

func (r *rig) deliver(u live.Update) {
	r.mu.Lock()
	defer r.mu.Unlock()
	r.all = append(r.all, u)
}

func newRig(f *fake) *rig {
	r := &rig{fake: f}
	r.Runner = live.New(func() live.Solver { return f }, r.deliver)
	return r
}

func ms(n int) time.Duration { return time.Duration(n) * time.Millisecond }

// titled returns a new plan that shares nothing with any other.
func titled(title string) *plan.Plan { return plan.From(plan.Parts{Sheet: plan.Sheet{Title: title}}) }

func revs(got []live.Update, s live.Stage) (r []uint64) {
	for _, u := range got {
		if u.Stage == s {
			r = append(r, u.Rev)
		}
	}
	return r
}

func TestRunnerDeliversEachStageInOrder(t *testing.T) {
	synctest.Test(t, func(t *testing.T) {
		r := newRig(&fake{take: [live.NumStages]time.Duration{ms(3), ms(1), ms(5), ms(7), ms(9), ms(4), ms(8), ms(2), ms(6)}})
		p := titled("a")
		r.Submit(everything(7, p))
		time.Sleep(ms(100))
		synctest.Wait()
		if len(r.got()) != int(live.NumStages) {
			t.Fatalf("%d updates, want %d", len(r.got()), live.NumStages)
		}
		for s, u := range r.got() {
			if u.Stage != live.Stage(s) || u.Rev != 7 || u.Plan != p || u.Err != nil || u.Took != r.fake.take[s] {
				t.Errorf("update %d: %+v", s, u)
			}
		}
		if r.got()[0].Problems[0].Text != "a" || r.got()[1].Sights[0].Name != "a" || r.got()[2].Approaches[0].Start != "a" || r.got()[3].Sights[0].Name != "a" ||
			r.got()[live.StageRoutes].Routes[0].ID != "a" || len(r.got()[live.StageDistances].Distances.Lines) == 0 || r.got()[live.StageReach].Reach[0].Zone != "a" || r.got()[live.StageFindings].Findings[0].Offer != "a1 1" {
			t.Error("an update carries another plan's answer")
		}
		r.Close()
	})
}

func TestRunnerNewestWins(t *testing.T) {
	synctest.Test(t, func(t *testing.T) {
		r := newRig(&fake{take: [live.NumStages]time.Duration{ms(10), 0, ms(10), ms(10)}})
		for rev := uint64(1); rev <= 50; rev++ {
			r.Submit(live.Ask{Rev: rev, Plan: titled("a")})
		}
		time.Sleep(ms(100))
		synctest.Wait()
		if last := r.got()[len(r.got())-1]; last.Rev != 50 || last.Stage != live.StageWidths {
			t.Errorf("last update is %v of revision %d, want the last stage of 50", last.Stage, last.Rev)
		}
		if a := revs(r.got(), live.StageApproaches); !slices.Equal(a, []uint64{50}) {
			t.Errorf("approaches of revisions %v, want 50 alone: plans between were superseded", a)
		}
		r.Close()
	})
}

// TestRunnerShowsRegionsWhileDragging drags for two seconds with a plan each 10 ms while the later stages take 200 ms.
func TestRunnerShowsRegionsWhileDragging(t *testing.T) {
	synctest.Test(t, func(t *testing.T) {
		r := newRig(&fake{take: [live.NumStages]time.Duration{0, ms(4), ms(200), ms(200)}})
		for rev := uint64(1); rev <= 200; rev++ {
			r.Submit(live.Ask{Rev: rev, Plan: titled("a")})
			time.Sleep(ms(10))
		}
		synctest.Wait()
		if n := len(revs(r.got(), live.StageSights)); n < 190 {
			t.Errorf("%d regions shown in a drag of 200 moves", n)
		}
		if n := len(revs(r.got(), live.StageApproaches)); n != 0 {
			t.Errorf("%d approaches of superseded plans", n)
		}
		if !slices.IsSorted(revs(r.got(), live.StageSights)) {
			t.Error("regions out of order")
		}
		time.Sleep(time.Second)
		synctest.Wait()
		if a := revs(r.got(), live.StageApproaches); !slices.Equal(a, []uint64{200}) {
			t.Errorf("after the drag approaches of %v, want 200", a)
		}
		r.Close()
	})
}

// TestRunnerShowsMeshesWhileDragging drags a wall for three seconds while a mesh takes longer than the pause between moves.
func TestRunnerShowsMeshesWhileDragging(t *testing.T) {
	synctest.Test(t, func(t *testing.T) {
		r := newRig(&fake{take: [live.NumStages]time.Duration{ms(100), ms(1), ms(50), ms(50)}})
		for rev := uint64(1); rev <= 150; rev++ {
			r.Submit(live.Ask{Rev: rev, Plan: titled("a")})
			time.Sleep(ms(20))
		}
		synctest.Wait()
		if n := len(revs(r.got(), live.StageSights)); n < 6 || n > 15 {
			t.Errorf("%d regions shown in 3 s of dragging with a mesh of 100 ms, want one each 250 to 500 ms", n)
		}
		r.Close()
	})
}

func TestRunnerKeepsApproachesWhenAnObserverMoves(t *testing.T) {
	synctest.Test(t, func(t *testing.T) {
		f := &fake{}
		r := newRig(f)
		one := plan.From(plan.Parts{Sheet: plan.Sheet{Title: "one"}})
		r.Submit(live.Ask{Rev: 1, Plan: one})
		time.Sleep(ms(1))
		r.Submit(live.Ask{Rev: 2, Plan: one}) // the same parts
		time.Sleep(ms(1))
		synctest.Wait()
		want := []live.Stage{0, 1, 2, 3, live.StageRoutes, live.StageFindings, live.StageWidths, 0, 1, live.StageFindings}
		if !slices.Equal(f.calls, want) {
			t.Errorf("stages solved %v, want %v", f.calls, want)
		}
		if a := revs(r.got(), live.StageApproaches); !slices.Equal(a, []uint64{1, 2}) {
			t.Errorf("approaches delivered for %v, want 1 and 2", a)
		}
		r.Submit(live.Ask{Rev: 3, Plan: titled("two")})
		time.Sleep(ms(1))
		synctest.Wait()
		if last := r.got()[len(r.got())-5]; last.Approaches[0].Start != "two" {
			t.Errorf("approaches of another plan were kept: %+v", last)
		}
		r.Close()
	})
}

func TestRunnerSurvivesPanics(t *testing.T) {
	for s := range live.NumStages {
		t.Run(s.String(), func(t *testing.T) {
			synctest.Test(t, func(t *testing.T) {
				f := &fake{}
				f.panic[s] = true
				r := newRig(f)
				r.Submit(everything(1, titled("a")))
				time.Sleep(ms(1))
				synctest.Wait()
				var crash *live.Crash
				if u := r.got()[s]; u.Stage != s || !errors.As(u.Err, &crash) || !strings.Contains(u.Err.Error(), s.String()) {
					t.Fatalf("update %+v, want a crash that names %q", u, s)
				}
				if want := 1; s == live.StageMesh && len(r.got()) != want {
					t.Errorf("%d updates after a plan without a mesh, want %d", len(r.got()), want)
				}
				if s != live.StageMesh && len(r.got()) != int(live.NumStages) {
					t.Errorf("%d updates, want the other stages to be solved", len(r.got()))
				}
				f.panic[s] = false
				r.all = nil
				r.Submit(everything(2, titled("b")))
				time.Sleep(ms(1))
				synctest.Wait()
				if len(r.got()) != int(live.NumStages) || r.got()[s].Err != nil {
					t.Errorf("after a crash the next plan gave %+v", r.got())
				}
				r.Close()
			})
		})
	}
}

func TestRunnerDeliversErrors(t *testing.T) {
	synctest.Test(t, func(t *testing.T) {
		f := &fake{}
		f.fail[live.StageApproaches] = errors.New("too long a wall")
		r := newRig(f)
		r.Submit(live.Ask{Rev: 1, Plan: titled("a")})
		time.Sleep(ms(1))
		synctest.Wait()
		if len(r.got()) != 7 || r.got()[2].Err == nil || r.got()[3].Err != nil ||
			r.got()[4].Err != nil || r.got()[5].Err != nil || r.got()[6].Err == nil || slices.Contains(f.calls, live.StageWidths) {
			t.Errorf("updates %+v, want an error of the approaches and of what goes on from them", r.got())
		}
		r.Close()
	})
}

// TestRunnerCloseJoins closes at every moment of a job; synctest fails the test if a goroutine is left.
func TestRunnerCloseJoins(t *testing.T) {
	for after := range 12 {
		synctest.Test(t, func(t *testing.T) {
			r := newRig(&fake{take: [live.NumStages]time.Duration{ms(2), ms(2), ms(2), ms(2)}})
			r.Submit(live.Ask{Rev: 1, Plan: titled("a")})
			r.Submit(live.Ask{Rev: 2, Plan: titled("b")})
			time.Sleep(ms(after))
			r.Close()
			n := len(r.got())
			r.Close()
			time.Sleep(time.Second)
			synctest.Wait()
			if len(r.got()) != n {
				t.Errorf("%d updates delivered after Close", len(r.got())-n)
			}
		})
	}
}

// TestRunnerLeavesWidthsToRest: a draft goes without clear widths and is done without them; what is at rest has them, in
// rows of their own.
func TestRunnerLeavesWidthsToRest(t *testing.T) {
	synctest.Test(t, func(t *testing.T) {
		f := &fake{}
		b := live.NewBoard(func(show func()) { show() }, func(*live.State) {})
		r := &rig{fake: f}
		r.Runner = live.New(func() live.Solver { return f }, func(u live.Update) { r.deliver(u); b.Put(u) })
		p := titled("a")
		r.Submit(live.Ask{Rev: 1, Plan: p, Draft: true})
		time.Sleep(ms(1))
		synctest.Wait()
		if slices.Contains(f.calls, live.StageWidths) || !b.State().Done(live.Ask{Rev: 1, Plan: p, Draft: true}) || b.State().Failed[live.StageWidths].Err != nil {
			t.Errorf("a draft solved %v, done %v, failed %v", f.calls, b.State().Done(live.Ask{Rev: 1, Plan: p, Draft: true}), b.State().Failed[live.StageWidths].Err)
		}
		r.Submit(live.Ask{Rev: 2, Plan: p})
		time.Sleep(ms(1))
		synctest.Wait()
		s := b.State()
		if !s.Done(live.Ask{Rev: 2, Plan: p}) || s.Result().Approaches[0].ClearWidth != 900 {
			t.Errorf("at rest: done %v, %+v, want the clear width", s.Done(live.Ask{Rev: 2, Plan: p}), s.Result().Approaches)
		}
		if s.Latest[live.StageApproaches].Approaches[0].ClearWidth != 0 {
			t.Error("the rows that were shown before have changed")
		}
		r.Submit(live.Ask{Rev: 3, Plan: p, Draft: true}) // nothing that walks depend on has changed
		time.Sleep(ms(1))
		synctest.Wait()
		if b.State().Result().Approaches[0].ClearWidth != 900 {
			t.Error("the clear width is lost while something else is dragged")
		}
		b.Put(live.Update{Rev: 4, Plan: p, Stage: live.StageApproaches, Approaches: make([]study.Approach, 1)})
		if b.State().Result().Approaches[0].ClearWidth != 0 {
			t.Error("new walks are shown with the clear width of old ones")
		}
		r.Close()
	})
}

// TestRunnerTellsProgress: what is told rises through the stages, and a runner that is told to stop gives no more answers
// until the next plan, not even of a mesh that a drag would have finished.
func TestRunnerTellsProgress(t *testing.T) {
	synctest.Test(t, func(t *testing.T) {
		f := &fake{take: [live.NumStages]time.Duration{ms(400), ms(10), ms(100), ms(10), 0, 0, 0, ms(50)}}
		r := newRig(f)
		r.Submit(live.Ask{Rev: 1, Plan: titled("a")})
		last := live.Progress{}
		for range 55 {
			time.Sleep(ms(10))
			synctest.Wait()
			now := r.Progress()
			if now.Rev != 1 || now.Stage < last.Stage || now.Done < last.Done {
				t.Fatalf("after %+v comes %+v", last, now)
			}
			last = now
		}
		if want := (live.Progress{Rev: 1, Stage: live.StageWidths, Done: 0.84 / 1.04}); math.Abs(last.Done-want.Done) > 1e-9 || last.Stage != want.Stage {
			t.Errorf("in the last stage %+v is told, want %+v", last, want)
		}
		for rev := uint64(2); rev < 50; rev++ { // a drag that leaves no time for a mesh
			r.Submit(live.Ask{Rev: rev, Plan: titled("a")})
			time.Sleep(ms(10))
		}
		n := len(r.got())
		r.Cancel()
		r.Cancel()
		time.Sleep(time.Second)
		synctest.Wait()
		if len(r.got()) != n {
			t.Errorf("%d answers after Cancel", len(r.got())-n)
		}
		r.Submit(live.Ask{Rev: 60, Plan: titled("a")})
		time.Sleep(time.Second)
		synctest.Wait()
		if a := revs(r.got(), live.StageWidths); len(a) == 0 || a[len(a)-1] != 60 {
			t.Errorf("after Cancel the next plan has widths of %v", a)
		}
		r.Close()
	})
}
