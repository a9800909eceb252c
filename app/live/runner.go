package live

import (
	"context"
	"errors"
	"fmt"
	"runtime/debug"
	"slices"
	"sync"
	"sync/atomic"
	"time"

	"enfilade/solver/plan"
	"enfilade/solver/pulse"
	"enfilade/solver/study"
)

// Stage is one part of the study, in the order the stages run.
type Stage uint8

// The stages.
const (
	StageMesh Stage = iota
	StageSights
	StageApproaches
	StageSeenFrom
	StageRoutes
	StageDistances // only when it is asked for
	StageFindings
	StageWidths
	StageReach // only when it is asked for
	NumStages
)

// String names the stage as the window says it: what is being worked out.
func (s Stage) String() string {
	return [...]string{"the mesh of the plan", "what observers see", "approaches", "where targets are seen from",
		"routes", "walking distances", "problems of the plan", "clear widths", "how far zones are"}[s]
}

// rests reports whether the stage waits until the plan is at rest: a draft, which a drag shows on its way, goes without.
func (s Stage) rests() bool { return s >= StageFindings }

// wants reports whether a stage is to answer.
func (a *Ask) wants(s Stage) bool {
	switch {
	case a.Draft && s.rests():
		return false
	case s == StageDistances:
		return a.Field.Start != ""
	case s == StageReach:
		return a.Reach
	}
	return true
}

// Solver does the work of the stages. It is used by one goroutine; [study.Solver] is one.
type Solver interface {
	Mesh(ctx context.Context, p *plan.Plan) error
	Problems(p *plan.Plan) []plan.Problem // after Mesh
	Sights(ctx context.Context, p *plan.Plan) ([]study.Sight, error)
	Approaches(ctx context.Context, p *plan.Plan) ([]study.Approach, error)
	SeenFrom(ctx context.Context, p *plan.Plan) ([]study.Sight, error)
	Routes(ctx context.Context, p *plan.Plan) ([]study.Route, error)
	Findings(ctx context.Context, p *plan.Plan, rows []study.Approach, routes []study.Route) ([]plan.Finding, error)
	ClearWidths(ctx context.Context, p *plan.Plan, rows []study.Approach) error // rows as Approaches gave them
	Field(ctx context.Context, p *plan.Plan, start string) (*study.Field, error)
	Reaches(ctx context.Context, p *plan.Plan) ([]study.Reach, error)
}

// Ask is what is asked of a runner: the study of a plan.
type Ask struct {
	Rev   uint64
	Plan  *plan.Plan
	Draft bool // it is in the middle of a drag, so the stages that wait for rest are left out
	Field FieldAsk
	Reach bool // how far zones are from starts
}

// Update is what one stage found out about one plan.
type Update struct {
	Rev        uint64
	Plan       *plan.Plan
	Draft      bool // as in the Ask
	Stage      Stage
	Sights     []study.Sight    // of StageSights and StageSeenFrom
	Approaches []study.Approach // of StageApproaches, and of StageWidths: the same with their clear widths
	Routes     []study.Route    // of StageRoutes
	Problems   []plan.Problem   // of StageMesh: what is wrong with the drawing
	Findings   []plan.Finding   // of StageFindings: all that looks wrong, with what would mend it
	Distances  *Distances       // of StageDistances
	Reach      []study.Reach    // of StageReach
	Field      FieldAsk         // as in the Ask
	Err        error            // why the stage has no answer; the later stages of this plan are then left out only after StageMesh
	Took       time.Duration
}

// patience is how long a drag may go without a fresh mesh: when every mesh of that long was cancelled half way, the next
// one is built to its end. A quarter of a second is the longest a drag may look frozen.
const patience = 250 * time.Millisecond

type job struct {
	Ask
	ctx  context.Context
	base context.Context  // of ctx; ends only when the runner is told to stop, not when a newer plan comes
	rows []study.Approach // what StageApproaches found
	fail error            // or why it found nothing

	routes []study.Route // what StageRoutes found
}

// share is the part of a whole study's time that each stage takes, as a study that is solved at once tells it.
// What is not asked for takes none.
var share = [NumStages]float64{StageMesh: 0.5, StageSights: 0.05, StageApproaches: 0.2, StageSeenFrom: 0.05, StageRoutes: 0.02, StageDistances: 0.2,
	StageFindings: 0.02, StageWidths: 0.2, StageReach: 0.2}

// Progress is how far the study of a plan is.
type Progress struct {
	Rev   uint64
	Stage Stage   // what is being worked out
	Done  float64 // of the whole study, 0 to 1
}

// Runner recomputes the newest plan on a goroutine of its own.
type Runner struct {
	fresh   func() Solver
	solver  Solver
	deliver func(Update)
	slot    chan job
	done    chan struct{}
	cancel  context.CancelFunc // lets go of the present job for a newer one
	base    context.Context    // of all jobs until Cancel or Close
	stop    context.CancelFunc // ends base
	closed  sync.Once
	kept    kept
	told    atomic.Pointer[Progress]
	lent    *Distances // the last ones, whose field works on the solver's mesh
	starved time.Time  // when a mesh was first cancelled since the last one that was finished; zero when none was
}

// New starts a runner whose solver fresh makes, now and again after a crash. deliver is called on the runner's goroutine and must not wait for the goroutine that calls Submit
// and Close.
func New(fresh func() Solver, deliver func(Update)) *Runner {
	r := &Runner{fresh: fresh, solver: fresh(), deliver: deliver, slot: make(chan job, 1), done: make(chan struct{}),
		cancel: func() {}}
	r.base, r.stop = context.WithCancel(context.Background())
	go r.loop()
	return r
}

// Submit asks for the study of a plan and lets go of everything submitted before. It never waits. It is called from one
// goroutine only, and not after Close.
func (r *Runner) Submit(a Ask) {
	r.cancel()
	var ctx context.Context
	ctx, r.cancel = context.WithCancel(r.base)
	select {
	case <-r.slot: // a waiting job nobody will look at
	default:
	}
	r.slot <- job{Ask: a, ctx: ctx, base: r.base}
}

// Cancel lets go of everything submitted before; stages that were not done give no answer. Whoever calls Submit calls it.
func (r *Runner) Cancel() {
	r.stop()
	select {
	case <-r.slot:
	default:
	}
	r.base, r.stop = context.WithCancel(context.Background())
}

// Progress returns how far the work of the moment is, or that of the last stage that was begun. Any goroutine may call it.
func (r *Runner) Progress() Progress {
	if p := r.told.Load(); p != nil {
		return *p
	}
	return Progress{}
}

// listen returns the context for a stage's work, whose progress it notes.
func (r *Runner) listen(ctx context.Context, j *job, s Stage) context.Context {
	from, all := 0.0, 0.0
	for t := range NumStages {
		if t == s {
			from = all
		}
		if j.wants(t) {
			all += share[t]
		}
	}
	hear := func(done float64) { r.told.Store(&Progress{j.Rev, s, (from + done*share[s]) / all}) }
	hear(0)
	return pulse.With(ctx, hear)
}

// Close cancels the work, waits for the goroutine to end, and returns. Nothing is delivered after it.
func (r *Runner) Close() {
	r.closed.Do(func() {
		r.stop()
		close(r.slot)
	})
	<-r.done
}

func (r *Runner) loop() {
	defer close(r.done)
	for j := range r.slot {
		r.run(&j)
	}
}

// run does the stages of one job until one is cancelled or there is no mesh.
func (r *Runner) run(j *job) {
	for s := StageMesh; s < NumStages; s++ {
		ctx := j.ctx
		// The regions of the observers on a ready mesh take less than a frame, and a drag must show them: they are
		// finished for a plan that is already superseded, and delivered.
		if s == StageSights || s == StageMesh && !r.starved.IsZero() && time.Since(r.starved) > patience {
			ctx = j.base
		}
		if ctx.Err() != nil {
			return
		}
		u := r.stage(ctx, j, s)
		if errors.Is(u.Err, context.Canceled) && ctx.Err() != nil {
			if s == StageMesh && r.starved.IsZero() && j.base.Err() == nil {
				r.starved = time.Now()
			}
			return
		}
		if s == StageMesh {
			r.starved = time.Time{}
		}
		if u.Err == errRests {
			continue
		}
		r.deliver(u)
		if s == StageMesh && u.Err != nil {
			return
		}
	}
}

// stage does one stage. A panic of the solver becomes the stage's error; what the solver held may be half done, so the
// next stage gets a new one.
func (r *Runner) stage(ctx context.Context, j *job, s Stage) (u Update) {
	began := time.Now()
	u = Update{Rev: j.Rev, Plan: j.Plan, Draft: j.Draft, Field: j.Field, Stage: s}
	defer func() {
		if v := recover(); v != nil {
			u.Sights, u.Approaches, u.Routes, u.Problems, u.Distances, u.Reach, u.Findings = nil, nil, nil, nil, nil, nil, nil
			u.Err = &Crash{Stage: s, Value: v, Stack: debug.Stack()}
			r.solver = r.fresh()
			j.note(u)
		}
		u.Took = time.Since(began)
	}()
	if (s != StageReach || j.Reach) && r.kept.fill(&u) {
		j.note(u)
		return u
	}
	if !j.wants(s) {
		u.Err = errRests
		return u
	}
	ctx = r.listen(ctx, j, s)
	switch s {
	case StageMesh:
		r.recall(j.Plan)
		if u.Err = r.solver.Mesh(ctx, j.Plan); u.Err == nil {
			u.Problems = r.solver.Problems(j.Plan)
		}
	case StageSights:
		u.Sights, u.Err = r.solver.Sights(ctx, j.Plan)
	case StageApproaches:
		u.Approaches, u.Err = r.solver.Approaches(ctx, j.Plan)
	case StageSeenFrom:
		u.Sights, u.Err = r.solver.SeenFrom(ctx, j.Plan)
	case StageRoutes:
		u.Routes, u.Err = r.solver.Routes(ctx, j.Plan)
	case StageDistances:
		u.Distances, u.Err = r.distances(ctx, j)
	case StageFindings:
		u.Findings, u.Err = r.solver.Findings(ctx, j.Plan, j.rows, j.routes)
	case StageReach:
		u.Reach, u.Err = r.solver.Reaches(ctx, j.Plan)
	case StageWidths:
		if u.Err = j.fail; u.Err != nil {
			return u
		}
		u.Approaches = slices.Clone(j.rows) // those of the other stage are already shown
		u.Err = r.solver.ClearWidths(ctx, j.Plan, u.Approaches)
	}
	if u.Err == nil {
		r.kept.keep(u)
	}
	j.note(u)
	return u
}

// errRests is the error of a stage that is not asked for. It is not delivered.
var errRests = errors.New("live: not asked for")

// note keeps what later stages go on from.
func (j *job) note(u Update) {
	switch u.Stage {
	case StageApproaches:
		j.rows, j.fail = u.Approaches, u.Err
	case StageRoutes:
		j.routes = u.Routes
	}
}

// Crash is the error of a stage that panicked.
type Crash struct {
	Stage Stage
	Value any
	Stack []byte
}

func (c *Crash) Error() string { return fmt.Sprintf("live: %v: crashed: %v", c.Stage, c.Value) }
