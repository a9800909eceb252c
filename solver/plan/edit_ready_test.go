package plan_test

import (
	"slices"
	"testing"

	"enfilade/solver/exact"
	"enfilade/solver/plan"
)

// TestReady: a prepared edit gives the plan it was prepared for the very plan that was made, and any other plan its own.
func TestReady(t *testing.T) {
	p := room()
	e := plan.Paste{Clip: p, By: exact.Vec{X: 500}}
	r := plan.Prepare(e, p)
	first, err := r.Apply(p)
	again, _ := r.Apply(p)
	if err != nil || first != again {
		t.Fatalf("%v: made twice", err)
	}
	for _, from := range []*plan.Plan{p, first} {
		want, err := e.Apply(from)
		if err != nil {
			t.Fatal(err)
		}
		got, err := r.Apply(from)
		if err != nil || !same(got.Parts(), want.Parts()) {
			t.Errorf("%v, %+v, want %+v", err, got.Parts(), want.Parts())
		}
		if got, want := r.Added(from), e.Added(from); !slices.Equal(got, want) {
			t.Errorf("added %v, want %v", got, want)
		}
	}
}
