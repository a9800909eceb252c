package planfile

import "enfilade/solver/plan"

// The plan's lists, in no order of their own: readPlan and appendPlan say in which they stand.
var (
	walls = kind[plan.Wall]{"walls", plan.KindWall, readWall, appendWall,
		func(w *plan.Wall) *string { return &w.ID }, func(w *plan.Wall) *plan.Meta { return &w.Meta }}
	openings = kind[plan.Opening]{"openings", plan.KindOpening, readOpening, appendOpening,
		func(o *plan.Opening) *string { return &o.ID }, func(o *plan.Opening) *plan.Meta { return &o.Meta }}
	blocks = kind[plan.Block]{"blocks", plan.KindBlock, readBlock, appendBlock,
		func(b *plan.Block) *string { return &b.ID }, func(b *plan.Block) *plan.Meta { return &b.Meta }}
	zones = kind[plan.Zone]{"zones", plan.KindZone, readZone, appendZone,
		func(z *plan.Zone) *string { return &z.ID }, func(z *plan.Zone) *plan.Meta { return &z.Meta }}
	observers = kind[plan.Observer]{"observers", plan.KindObserver, readObserver, appendObserver,
		func(o *plan.Observer) *string { return &o.ID }, func(o *plan.Observer) *plan.Meta { return &o.Meta }}
	targets = kind[plan.Target]{"targets", plan.KindTarget, readTarget, appendTarget,
		func(t *plan.Target) *string { return &t.ID }, func(t *plan.Target) *plan.Meta { return &t.Meta }}
	starts = kind[plan.Start]{"starts", plan.KindStart, readStart, appendStart,
		func(s *plan.Start) *string { return &s.ID }, func(s *plan.Start) *plan.Meta { return &s.Meta }}
	routes = kind[plan.Route]{"routes", plan.KindRoute, readRoute, appendRoute,
		func(r *plan.Route) *string { return &r.ID }, func(r *plan.Route) *plan.Meta { return &r.Meta }}
)

// kind is how one list of the plan is read and written.
type kind[T any] struct {
	list   string // the list's name in the file
	kind   plan.Kind
	read   func(*object) T         // all but the id and what any item may carry
	append func([]byte, *T) []byte // the same, as members, each with a comma before it
	id     func(*T) *string
	meta   func(*T) *plan.Meta
}
