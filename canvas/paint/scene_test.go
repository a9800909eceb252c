package paint_test

import (
	"context"
	"testing"

	"enfilade/canvas/paint"
	"enfilade/canvas/view"
	"enfilade/solver/plan"
	"enfilade/solver/plantest"
	"enfilade/solver/study"
)

// twoRooms is a small house: thick walls with an open door and a shut one, a thin wall, glazing, a screen, a low case.
const twoRooms = `
	floor 0,0 10,0 10,6 0,6
	wall 0.1,0.1 9.9,0.1 9.9,5.9 0.1,5.9 0.1,0.1 th=0.2
	wall 5,0.1 5,5.9 th=0.2; door W2 at=2 w=1 leaf=solid; door W1 at=1 w=1.2 leaf=solid shut side=right
	wall 7,3.5 8,3.5; glass 5.1,4.5 6.5,4.5; screen 6,1 6,2
	block 2,3.5 3,3.5 3,4.2 2,4.2 h=0.9; block 7.5,1 8,1 8,1.5 7.5,1.5
	zone name=study 0.2,0.2 4.9,0.2 4.9,5.8 0.2,5.8 room; zone name=hall 5.1,0.2 9.8,0.2 9.8,5.8 5.1,5.8 room
	observer 1.5,2.6 heading=30; observer 8.6,4.4 view=90 heading=180
	target 9.79,2.5; target 0.21,5; start 1.7,0.2; start 9,5
`

// named returns the plan of a notation with names for its targets and starts.
func named(t testing.TB, text string) *plan.Plan {
	t.Helper()
	parts := plantest.Parse(t, text).Parts()
	parts.Sheet.Title, parts.Sheet.Place = "Two rooms", "Tallow Row 3"
	for i := range parts.Targets {
		parts.Targets[i].Name = []string{"Lamp", "Orrery", "Globe"}[i%3]
	}
	for i := range parts.Starts {
		parts.Starts[i].Name = []string{"Street door", "Stool"}[i%2]
	}
	if len(parts.Starts) > 0 {
		in := 90.0
		parts.Starts[0].Facing = &in
	}
	return plan.From(parts)
}

// sceneOf solves a plan and shows it whole.
func sceneOf(t testing.TB, p *plan.Plan, w, h int, k float64) *paint.Scene {
	t.Helper()
	r, err := study.Solve(context.Background(), p)
	if err != nil {
		t.Fatal(err)
	}
	s := &paint.Scene{Plan: p, Result: r, Theme: paint.Light(), Camera: view.Fit(paint.Bounds(p), w, h, k)}
	s.Observer, s.Start, s.Target = paint.Choose(p)
	return s
}

func overlayOf(s *paint.Scene) *paint.List {
	var l paint.List
	paint.Overlay(s, &l)
	return &l
}
