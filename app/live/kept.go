package live

import (
	"iter"

	"enfilade/solver/plan"
)

// kept holds the last answers of the stages that do not look at observers, so that dragging an observer does not solve
// the approaches again.
type kept struct {
	approaches, seenFrom, routes, distances, widths, reach Update
}

// fill answers u from what is kept and reports whether it could.
func (k *kept) fill(u *Update) bool {
	switch {
	case u.Stage == StageApproaches && k.approaches.Plan != nil && sameWalks(k.approaches.Plan, u.Plan):
		u.Approaches = k.approaches.Approaches
	case u.Stage == StageSeenFrom && k.seenFrom.Plan != nil && sameWalks(k.seenFrom.Plan, u.Plan):
		u.Sights = k.seenFrom.Sights
	case u.Stage == StageRoutes && k.routes.Plan != nil && sameWalks(k.routes.Plan, u.Plan) && sameRoutes(k.routes.Plan, u.Plan):
		u.Routes = k.routes.Routes
	case u.Stage == StageDistances && k.distances.Plan != nil && u.Field.Start != "" && u.Field == k.distances.Field &&
		k.distances.Distances.holds(u.Plan):
		u.Distances = k.distances.Distances
	case u.Stage == StageReach && k.reach.Plan != nil && sameWalks(k.reach.Plan, u.Plan) && sameZones(k.reach.Plan, u.Plan):
		u.Reach = k.reach.Reach
	case u.Stage == StageWidths && k.widths.Plan != nil && sameWalks(k.widths.Plan, u.Plan):
		u.Approaches = k.widths.Approaches
	default:
		return false
	}
	return true
}

func (k *kept) keep(u Update) {
	switch u.Stage {
	case StageApproaches:
		k.approaches = u
	case StageSeenFrom:
		k.seenFrom = u
	case StageRoutes:
		k.routes = u
	case StageDistances:
		k.distances = u
	case StageWidths:
		k.widths = u
	case StageReach:
		k.reach = u
	}
}

// sameWalks reports whether p and q have the same approaches and the same regions of targets, for all that can be told
// quickly: the same obstacles, targets, starts and walker. A plan without a floor has one that follows its marks, so
// there nothing may differ.
func sameWalks(p, q *plan.Plan) bool {
	if p.Obstacles() != q.Obstacles() || p.Floor().Len() == 0 && p.Marks() != q.Marks() {
		return false
	}
	if p.Marks() == q.Marks() {
		return true
	}
	return p.Walker() == q.Walker() && p.NumTargets() == q.NumTargets() && p.NumStarts() == q.NumStarts() &&
		equal(p.Targets(), q.Targets()) && equal(p.Starts(), q.Starts())
}

// sameZones reports whether p and q have the same zones, for all that can be told quickly.
func sameZones(p, q *plan.Plan) bool {
	return p.Marks() == q.Marks() || alike(p.Zones(), q.Zones(), func(x, y plan.Zone) bool { return x.ID == y.ID && x.Ring.Equal(y.Ring) })
}

// sameRoutes reports whether p and q have the same routes, for all that can be told quickly.
func sameRoutes(p, q *plan.Plan) bool {
	return p.Marks() == q.Marks() || alike(p.Routes(), q.Routes(), func(x, y plan.Route) bool {
		return x.ID == y.ID && x.From == y.From && x.To == y.To && x.Via.Equal(y.Via)
	})
}

// alike reports whether two lists are of the same length and hold the same, one after the other.
func alike[T any](a, b iter.Seq2[int, T], same func(T, T) bool) bool {
	next, stop := iter.Pull2(b)
	defer stop()
	for _, x := range a {
		if _, y, ok := next(); !ok || !same(x, y) {
			return false
		}
	}
	_, _, more := next()
	return !more
}

// equal compares two lists of the same length.
func equal[T comparable](a, b iter.Seq2[int, T]) bool {
	next, stop := iter.Pull2(b)
	defer stop()
	for _, x := range a {
		if _, y, ok := next(); !ok || x != y {
			return false
		}
	}
	return true
}
