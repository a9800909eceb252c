package gui

import (
	"fmt"

	"enfilade/app/live"
	"enfilade/solver/exact"
	"enfilade/solver/plan"
)

// walking is how walking distances are shown.
type walking struct {
	shown bool
	step  float64 // mm from one line to the next; 0 for the usual
}

// asking returns what is to be asked of the runner about a plan, as things stand.
func (w *window) asking(rev uint64, p *plan.Plan) live.Ask {
	a := live.Ask{Rev: rev, Plan: p, Draft: w.session.Previewing()}
	if w.walking.shown && w.results.start != "" {
		a.Field = live.FieldAsk{Start: w.results.start, Step: w.walkingStep()}
	}
	sel := w.session.Selection()
	a.Reach = len(sel) == 1 && sel[0].Kind == plan.KindZone && p.NumStarts() > 0
	return a
}

// submit asks the runner.
func (w *window) submit(a live.Ask) {
	w.results.asked(a, w.now())
	w.runner.Submit(a)
	w.watchSlow()
}

// askMore asks again about the same plan when more is to be known of it than was asked. What is known already is not worked
// out again.
func (w *window) askMore() {
	was := w.results.want
	if was.Plan == nil {
		return
	}
	a := w.asking(was.Rev, was.Plan)
	if more := a.Field.Start != "" && a.Field != was.Field || a.Reach && !was.Reach; more {
		w.submit(a)
		return
	}
	w.results.want.Field, w.results.want.Reach = a.Field, a.Reach // less is known as well
}

// walkingStep returns the distance between two lines in mm.
func (w *window) walkingStep() float64 {
	if w.walking.step > 0 {
		return w.walking.step
	}
	return w.walkingSteps()[2]
}

// walkingSteps are the distances between two lines that the menu offers, in mm.
func (w *window) walkingSteps() []float64 {
	if w.unit() == "ft" {
		return []float64{5 * 304.8, 10 * 304.8, 20 * 304.8, 50 * 304.8, 100 * 304.8}
	}
	return []float64{1000, 2000, 5000, 10000, 20000}
}

// distances returns the walking distances from the chosen start, nil when they are not shown or not known.
func (w *window) distances() *live.Distances {
	r := &w.results
	if !w.walking.shown || r.state == nil {
		return nil
	}
	u := &r.state.Latest[live.StageDistances]
	if u.Distances == nil || u.Rev < r.opened || u.Distances.Start != r.start {
		return nil
	}
	return u.Distances
}

// toggleWalking shows or hides the lines of walking distance.
func (w *window) toggleWalking() {
	w.walking.shown = !w.walking.shown
	w.acted()
}

// setWalkingStep sets how far lines are apart, in mm.
func (w *window) setWalkingStep(step float64) {
	w.walking.step = step
	w.acted()
}

// walkingMenu offers how far the lines are apart while they are shown.
func (w *window) walkingMenu() (list []command) {
	if !w.walking.shown {
		return nil
	}
	for _, step := range w.walkingSteps() {
		list = append(list, command{label: "a line every " + w.stepText(step), inner: true,
			do: func() { w.setWalkingStep(step) }, checked: step == w.walkingStep()})
	}
	return list
}

// stepText writes the distance between two lines with its unit.
func (w *window) stepText(step float64) string {
	if w.unit() == "ft" {
		return trimDecimals(step/304.8, 0, 1) + " ft"
	}
	return trimDecimals(step/1000, 0, 1) + " m"
}

// stepField is the form's field for how far lines are apart.
func (w *window) stepField() field {
	f := w.lengthField("A line every", int32(w.walkingStep()*exact.PerMM+0.5), func(v int32) error {
		return w.within(v, leastStep, plan.MaxCoord, func() error {
			w.setWalkingStep(float64(v) / exact.PerMM)
			return nil
		})
	})
	f.group = "Walking distance"
	return f
}

// leastStep is how near lines may be to each other, in grid units: 10 cm.
const leastStep = 100 * exact.PerMM

// onFoot puts how far the pointer's place is on foot before a hint.
func (w *window) onFoot(hint string) string {
	d := w.distances()
	if d == nil || !w.view.inside {
		return hint
	}
	far, ok := d.At(w.view.cam.Grid(w.view.place()))
	if !ok {
		return hint
	}
	return fmt.Sprintf("%s on foot from %s   ·   %s", w.host.FormatLength(far*exact.PerMM), startName(w.session.Plan(), d.Start), hint)
}
