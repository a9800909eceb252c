package session_test

import (
	"fmt"
	"slices"
	"testing"

	"enfilade/app/session"
	"enfilade/solver/plan"
)

// TestSelectMany: a long selection follows the same rules as a short one: no doubles, nothing that is not there, and what an
// edit takes away leaves it.
func TestSelectMany(t *testing.T) {
	var parts plan.Parts
	for i := range 40 {
		parts.Starts = append(parts.Starts, plan.Start{ID: fmt.Sprint("S", i), Meta: plan.Meta{Hidden: i == 7}})
	}
	parts.Zones = []plan.Zone{{ID: "Z1"}}
	parts.Floor = plan.CircleRing(parts.Starts[0].At, 500, 12)
	s := session.New(plan.From(parts), "", nil)
	all := append(slices.Collect(session.All(s.Plan())), plan.Ref{Kind: plan.KindFloor})
	s.Select(append(append(all, all...), plan.Ref{Kind: plan.KindStart, ID: "S99"}, plan.Ref{Kind: plan.KindUnderlay})...)
	if len(s.Selection()) != 42 || s.Selection()[41].Kind != plan.KindFloor {
		t.Fatalf("%d selected", len(s.Selection()))
	}
	if err := s.Do(plan.Delete{Items: all[:5]}); err != nil || len(s.Selection()) != 37 {
		t.Errorf("%v: %d selected after five are gone", err, len(s.Selection()))
	}
	if n := len(slices.Collect(session.OfKind(s.Plan(), plan.KindStart))); n != 35 {
		t.Errorf("%d starts can be picked, want 36 but for the hidden one", n)
	}
}

func BenchmarkSelectAll(b *testing.B) {
	var parts plan.Parts
	for i := range 20_000 {
		parts.Walls = append(parts.Walls, plan.Wall{ID: fmt.Sprint("W", i)})
	}
	s := session.New(plan.From(parts), "", nil)
	all := slices.Collect(session.All(s.Plan()))
	for b.Loop() {
		s.Select(all...)
	}
}
