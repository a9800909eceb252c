package live

import (
	"context"
	"sync"

	"enfilade/solver/exact"
	"enfilade/solver/plan"
	"enfilade/solver/study"
)

// FieldAsk asks for the walking distances from a start, and for their lines.
type FieldAsk struct {
	Start string  // empty for none
	Step  float64 // mm between two lines; more than 0
}

// Distances tells how far every point of the floor is from one start, on foot. Any goroutine may ask it.
type Distances struct {
	FieldAsk
	Lines []study.Contour // where the distance is a multiple of Step

	plan  *plan.Plan
	mu    sync.Mutex
	field *study.Field // nil once its mesh has changed
}

// At returns the distance of a point from the start in mm. It reports false where no walk leads, and when the plan has
// changed since, so that the distances no longer hold.
func (d *Distances) At(p exact.Pt) (float64, bool) {
	d.mu.Lock()
	defer d.mu.Unlock()
	if d.field == nil {
		return 0, false
	}
	return d.field.At(p)
}

// holds reports whether the distances are also those of another plan, on the mesh at hand.
func (d *Distances) holds(p *plan.Plan) bool {
	d.mu.Lock()
	defer d.mu.Unlock()
	from, ok := p.Start(d.Start)
	was, _ := d.plan.Start(d.Start)
	return d.field != nil && ok && from.At == was.At && sameGround(p, d.plan)
}

// sameGround reports whether p and q have the same floor for whoever walks. A plan without a floor has one that follows its
// marks, so there none of them may differ.
func sameGround(p, q *plan.Plan) bool {
	return p.Obstacles() == q.Obstacles() && p.Walker().Radius == q.Walker().Radius &&
		(p.Floor().Len() > 0 || p.Marks() == q.Marks())
}

// end makes d forget its field, whose mesh is about to change.
func (d *Distances) end() {
	d.mu.Lock()
	d.field = nil
	d.mu.Unlock()
}

// distances works out the distances that a job asks for, with the field at hand when it is of the same start.
func (r *Runner) distances(ctx context.Context, j *job) (*Distances, error) {
	d := &Distances{FieldAsk: j.Field, plan: j.Plan}
	if l := r.lent; l != nil && l.Start == d.Start && l.holds(j.Plan) {
		d.field = l.field
	}
	if d.field == nil {
		var err error
		if d.field, err = r.solver.Field(ctx, j.Plan, d.Start); err != nil {
			return nil, err
		}
	}
	var err error
	if d.Lines, err = d.field.Contours(ctx, d.Step); err != nil {
		return nil, err
	}
	if r.lent != nil {
		r.lent.end()
	}
	r.lent = d
	return d, nil
}

// recall ends the distances that were handed out when their mesh may change for another plan.
func (r *Runner) recall(p *plan.Plan) {
	if r.lent != nil && !sameGround(p, r.lent.plan) {
		r.lent.end()
		r.lent = nil
	}
}
