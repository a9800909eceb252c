package gui

import (
	"strings"
	"time"

	"enfilade/app/live"
	"enfilade/app/session"
	"enfilade/canvas/tool"
	"enfilade/solver/plan"
	"enfilade/solver/study"
)

// blink is how long a solve may take before the last result is dimmed and the progress shown.
const blink = 120 * time.Millisecond

// pair names one approach.
type pair struct{ start, target string }

// results is what was studied about the open plan, and what of it is shown.
type results struct {
	rev     uint64    // of the plan that is shown
	want    live.Ask  // what was asked last
	askedAt time.Time // when its study was asked for
	opened  uint64    // the open plan's first revision: answers to older ones belong to another plan
	state   *live.State
	result  *study.Result // nil before the first answer
	slow    bool          // the study has been asked for longer than a blink ago and is not done
	stopped bool          // it was cancelled before it was done

	observer, start, target string // the chosen ones
	passing                 string // an observer that is shown in place of the chosen one while it is on the pointer
	hover                   *pair  // the approach under the pointer in the table
	all                     bool   // show the regions of all observers
}

// asked notes what was asked for.
func (r *results) asked(a live.Ask, now time.Time) {
	r.rev, r.want, r.askedAt, r.slow, r.stopped = a.Rev, a, now, false, false
}

// reset forgets everything about the plan before; rev is the new plan's first revision.
func (r *results) reset(rev uint64) {
	*r = results{rev: r.rev, want: r.want, askedAt: r.askedAt, opened: rev, all: r.all}
}

// answer takes the newest answers over.
func (r *results) answer(s *live.State) {
	r.state = s
	if l := s.Latest[live.StageSights]; l.Plan != nil && l.Rev >= r.opened {
		r.result = s.Result()
		if a := s.Latest[live.StageApproaches]; a.Rev < r.opened {
			r.result.Approaches = nil
		}
		if a := s.Latest[live.StageSeenFrom]; a.Rev < r.opened {
			r.result.SeenFrom = nil
		}
		if a := s.Latest[live.StageRoutes]; a.Rev < r.opened {
			r.result.Routes = nil
		}
		if a := s.Latest[live.StageReach]; a.Rev < r.opened {
			r.result.Reach = nil
		}
	}
	if r.done() {
		r.slow = false
	}
}

// done reports whether everything about the plan that is shown is known.
func (r *results) done() bool { return r.state != nil && r.state.Done(r.want) }

// stale reports whether the answer of a stage is out of date for so long that it must not look like the truth.
func (r *results) stale(s live.Stage) bool {
	return r.slow && (r.state == nil || !r.state.Fresh(s, r.rev)) || r.failed(s) != nil
}

// failed returns why a stage has no answer for the plan that is shown, nil when it has or may yet have one.
func (r *results) failed(s live.Stage) error {
	if r.state == nil {
		return nil
	}
	for _, t := range []live.Stage{live.StageMesh, s} {
		if f := r.state.Failed[t]; f.Plan != nil && f.Rev == r.rev && (t != live.StageDistances || f.Field == r.want.Field) {
			return f.Err
		}
	}
	return nil
}

// follow lets the chosen observer, start and target follow the selection, and replaces those that are gone.
func (r *results) follow(s *session.Session, k tool.Sketch) {
	p := s.Plan()
	r.passing = ""
	if k.Show.Kind == plan.KindObserver {
		r.passing = k.Show.ID
	}
	r.observer = lastOf(s.Selection(), plan.KindObserver, r.observer)
	r.start = lastOf(s.Selection(), plan.KindStart, r.start)
	r.target = lastOf(s.Selection(), plan.KindTarget, r.target)
	if _, ok := p.Observer(r.observer); !ok {
		r.observer = ""
		for _, o := range p.Observers() {
			r.observer = o.ID
			break
		}
	}
	if _, ok := p.Start(r.start); !ok {
		r.start = ""
		for _, o := range p.Starts() {
			r.start = o.ID
			break
		}
	}
	if _, ok := p.Target(r.target); !ok {
		r.target = ""
		for _, o := range p.Targets() {
			r.target = o.ID
			break
		}
	}
}

// lastOf returns the last item of a kind in a selection; the one that was chosen before when it is among them or there is none.
func lastOf(sel []plan.Ref, kind plan.Kind, before string) string {
	last := before
	for _, ref := range sel {
		if ref.Kind == kind {
			if last = ref.ID; last == before {
				return before
			}
		}
	}
	return last
}

// shownObserver returns the id of the observer whose region is washed.
func (r *results) shownObserver() string {
	if r.passing != "" {
		return r.passing
	}
	return r.observer
}

// shownPair returns the start and the target whose approach is drawn full.
func (r *results) shownPair() pair {
	if r.hover != nil {
		return *r.hover
	}
	return pair{r.start, r.target}
}

// sightOf returns the region of an observer.
func (r *results) sightOf(id string) (study.Sight, bool) {
	if r.result != nil {
		for _, s := range r.result.Sight {
			if s.Item.ID == id {
				return s, true
			}
		}
	}
	return study.Sight{}, false
}

// seenFrom returns the region of the places that see a target.
func (r *results) seenFrom(id string) (study.Sight, bool) {
	if r.result != nil {
		for _, s := range r.result.SeenFrom {
			if s.Item.ID == id {
				return s, true
			}
		}
	}
	return study.Sight{}, false
}

// approach returns the approach of a pair.
func (r *results) approach(p pair) (study.Approach, bool) {
	if r.result != nil {
		for _, a := range r.result.Approaches {
			if a.Start == p.start && a.Target == p.target {
				return a, true
			}
		}
	}
	return study.Approach{}, false
}

// route returns a route as it is walked.
func (r *results) route(id string) (study.Route, bool) {
	if r.result != nil {
		for _, w := range r.result.Routes {
			if w.ID == id {
				return w, true
			}
		}
	}
	return study.Route{}, false
}

// took returns how long the study of the plan that is shown has taken.
func (r *results) took() (sum time.Duration) {
	if r.state == nil {
		return 0
	}
	for s := range live.NumStages {
		if r.state.Fresh(s, r.rev) {
			sum += r.state.Latest[s].Took
		}
	}
	return sum
}

// answered is told the newest answers, on the toolkit's goroutine.
func (w *window) answered(s *live.State) {
	if w.closing {
		return
	}
	w.results.answer(s)
	w.report()
	w.problems.update()
	w.status.count(w.session.Plan(), w.problems)
	w.view.Refresh()
	w.form.update(w.session.Plan(), w.session.Selection())
	w.table.update()
	w.foot.update(w)
}

// watchSlow looks again after a blink whether the study is done, and from then on how far it is.
func (w *window) watchSlow() {
	rev := w.results.rev
	time.AfterFunc(blink, func() {
		w.do(func() {
			if !w.waiting(rev) {
				return
			}
			w.results.slow = true
			w.report()
			w.view.Refresh()
			w.table.update()
			w.watchProgress(rev)
		})
	})
}

// glance is the time between two looks at how far a study is.
const glance = 80 * time.Millisecond

// watchProgress keeps the progress bar up to date until the study of a revision is done.
func (w *window) watchProgress(rev uint64) {
	time.AfterFunc(glance, func() {
		w.do(func() {
			if w.waiting(rev) {
				w.report()
				w.watchProgress(rev)
			}
		})
	})
}

// waiting reports whether the study of a revision is what the window waits for.
func (w *window) waiting(rev uint64) bool {
	return !w.closing && w.results.rev == rev && !w.results.stopped && !w.results.done()
}

// stopStudy cancels a study that takes long, and reports whether there was one. What it has not found out stays open until
// the next change of the plan.
func (w *window) stopStudy() bool {
	if !w.results.slow || !w.waiting(w.results.rev) {
		return false
	}
	w.runner.Cancel()
	w.results.stopped = true
	w.report()
	return true
}

// report shows in the status line how the study stands.
func (w *window) report() {
	r := &w.results
	for s := range live.NumStages {
		if err := r.failed(s); err != nil {
			text := failure(err)
			if s == live.StageDistances {
				text = "no walking distances: " + strings.TrimPrefix(text, "study: ")
			}
			w.status.solve.set(text)
			w.status.progress.Hide()
			return
		}
	}
	switch {
	case emptyPlan(w.session.Plan()):
		w.status.solve.set("nothing to solve")
		w.status.progress.Hide()
	case r.done():
		w.status.solved(r.took())
		w.status.progress.Hide()
	case r.stopped:
		w.status.solve.set("stopped; the next change solves anew")
		w.status.progress.Hide()
	case r.slow:
		if p := w.runner.Progress(); p.Rev == r.rev {
			w.status.solve.set("working out " + p.Stage.String() + " (Esc stops)")
			w.status.progress.set(float32(p.Done))
		} else { // the worker is still letting go of the plan before
			w.status.progress.set(0)
		}
		w.status.progress.Show()
	}
}
