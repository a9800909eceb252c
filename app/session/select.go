package session

import (
	"iter"
	"slices"

	"enfilade/solver/plan"
)

// Selection returns the selected items in the order they were selected. The caller does not change the slice.
func (s *Session) Selection() []plan.Ref { return s.selected }

// Select makes refs the selection, without doubles and without items the shown plan does not have.
func (s *Session) Select(refs ...plan.Ref) {
	s.selected = s.Plan().Present(refs)
}

// Toggle adds r to the selection, or takes it out when it is there.
func (s *Session) Toggle(r plan.Ref) {
	if i := slices.Index(s.selected, r); i >= 0 {
		s.selected = slices.Delete(slices.Clone(s.selected), i, i+1)
		return
	}
	s.Select(append(slices.Clone(s.selected), r)...)
}

// Selected reports whether r is selected.
func (s *Session) Selected(r plan.Ref) bool { return slices.Contains(s.selected, r) }

// All yields every item of p that can be selected, in the order of the plan's lists.
func All(p *plan.Plan) iter.Seq[plan.Ref] {
	return func(yield func(plan.Ref) bool) {
		_ = each(p.Walls(), plan.KindWall, func(w plan.Wall) string { return w.ID }, yield) &&
			each(p.Openings(), plan.KindOpening, func(o plan.Opening) string { return o.ID }, yield) &&
			each(p.Blocks(), plan.KindBlock, func(b plan.Block) string { return b.ID }, yield) &&
			each(p.Zones(), plan.KindZone, func(z plan.Zone) string { return z.ID }, yield) &&
			each(p.Observers(), plan.KindObserver, func(o plan.Observer) string { return o.ID }, yield) &&
			each(p.Targets(), plan.KindTarget, func(t plan.Target) string { return t.ID }, yield) &&
			each(p.Starts(), plan.KindStart, func(t plan.Start) string { return t.ID }, yield) &&
			each(p.Routes(), plan.KindRoute, func(r plan.Route) string { return r.ID }, yield)
	}
}

// each yields the refs of one list and reports whether the caller wants more.
func each[T any](list iter.Seq2[int, T], kind plan.Kind, id func(T) string, yield func(plan.Ref) bool) bool {
	for _, item := range list {
		if !yield(plan.Ref{Kind: kind, ID: id(item)}) {
			return false
		}
	}
	return true
}

// OfKind yields the items of p of one kind that can be picked: those that are not hidden.
func OfKind(p *plan.Plan, kind plan.Kind) iter.Seq[plan.Ref] {
	return func(yield func(plan.Ref) bool) {
		for r := range Shown(p) {
			if r.Kind == kind && !yield(r) {
				return
			}
		}
	}
}

// Shown yields every item of p that can be selected and is not hidden.
func Shown(p *plan.Plan) iter.Seq[plan.Ref] {
	return func(yield func(plan.Ref) bool) {
		_ = shown(p.Walls(), plan.KindWall, func(w plan.Wall) (string, bool) { return w.ID, w.Hidden }, yield) &&
			shown(p.Openings(), plan.KindOpening, func(o plan.Opening) (string, bool) { return o.ID, o.Hidden }, yield) &&
			shown(p.Blocks(), plan.KindBlock, func(b plan.Block) (string, bool) { return b.ID, b.Hidden }, yield) &&
			shown(p.Zones(), plan.KindZone, func(z plan.Zone) (string, bool) { return z.ID, z.Hidden }, yield) &&
			shown(p.Observers(), plan.KindObserver, func(o plan.Observer) (string, bool) { return o.ID, o.Hidden }, yield) &&
			shown(p.Targets(), plan.KindTarget, func(t plan.Target) (string, bool) { return t.ID, t.Hidden }, yield) &&
			shown(p.Starts(), plan.KindStart, func(t plan.Start) (string, bool) { return t.ID, t.Hidden }, yield) &&
			shown(p.Routes(), plan.KindRoute, func(r plan.Route) (string, bool) { return r.ID, r.Hidden }, yield)
	}
}

// shown yields the refs of one list without what is hidden, and reports whether the caller wants more.
func shown[T any](list iter.Seq2[int, T], kind plan.Kind, id func(T) (string, bool), yield func(plan.Ref) bool) bool {
	for _, item := range list {
		if name, hidden := id(item); !hidden && !yield(plan.Ref{Kind: kind, ID: name}) {
			return false
		}
	}
	return true
}
