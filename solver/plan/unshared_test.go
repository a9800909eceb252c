package plan_test

import (
	"testing"
	"unsafe"

	"enfilade/solver/exact"
	"enfilade/solver/plan"
)

// TestUnshared: an edit counts the lists it copies and the points it makes, and no more.
func TestUnshared(t *testing.T) {
	var long []exact.Pt
	for i := range int32(1000) {
		long = append(long, pt(i, i*i%77))
	}
	parts := room().Parts()
	parts.Walls = append(parts.Walls, plan.Wall{ID: "W20", Line: plan.ChainOf(long...), Height: plan.Ceiling},
		plan.Wall{ID: "W21", Line: plan.ChainOf(long...), Height: plan.Ceiling})
	p := plan.From(parts)
	if n := plan.Unshared(p, p); n != 0 {
		t.Errorf("a plan beside itself: %d", n)
	}
	walls := 5 * int(unsafe.Sizeof(plan.Wall{}))
	points := 1000 * int(unsafe.Sizeof(exact.Pt{}))
	tests := []struct {
		edit   plan.Edit
		lo, hi int
	}{
		{plan.MoveItems{Items: []plan.Ref{ref(plan.KindObserver, "O1")}, By: exact.Vec{X: 1}}, 100, 1500},
		{plan.MoveItems{Items: []plan.Ref{ref(plan.KindWall, "W2")}, By: exact.Vec{X: 1}}, walls, walls + 2500},
		{plan.MoveItems{Items: []plan.Ref{ref(plan.KindWall, "W21")}, By: exact.Vec{X: 1}}, walls + points, walls + points + 2500},
		{plan.Delete{Items: []plan.Ref{ref(plan.KindWall, "W2")}}, walls - 200, walls + 2500},
		{plan.SetFloor{Ring: plan.ChainOf(long...)}, points, points + 1500},
	}
	for _, tt := range tests {
		q, err := tt.edit.Apply(p)
		if err != nil {
			t.Fatal(err)
		}
		if n := plan.Unshared(p, q); n < tt.lo || n > tt.hi {
			t.Errorf("%T: %d bytes, want %d to %d", tt.edit, n, tt.lo, tt.hi)
		}
	}
}
