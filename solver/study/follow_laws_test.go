package study_test

import (
	"context"
	"reflect"
	"testing"

	"pgregory.net/rapid"

	"enfilade/solver/exact"
	"enfilade/solver/plan"
	"enfilade/solver/plantest"
	"enfilade/solver/study"
)

// TestSolverFollowsTangles edits small plans full of degeneracies: items and corners move by whole lattice steps and by
// single grid units, things go and come back, doors open and shut, edits are undone. A solver that follows says after each
// edit what a new one says, bit for bit.
func TestSolverFollowsTangles(t *testing.T) {
	ctx := context.Background()
	for name, plans := range plantest.Small() {
		t.Run(name, rapid.MakeCheck(func(t *rapid.T) {
			p := plans.Draw(t, "plan")
			t.Log(plantest.Text(p))
			s := study.NewSolver()
			if err := s.Mesh(ctx, p); err != nil {
				t.Fatal(err)
			}
			past := []*plan.Plan{p}
			for range rapid.IntRange(1, 6).Draw(t, "edits") {
				if rapid.IntRange(0, 5).Draw(t, "undo") == 5 {
					p = past[rapid.IntRange(0, len(past)-1).Draw(t, "to")]
				} else if q, err := drawEdit(t, p).Apply(p); err == nil {
					p = q
				}
				past = append(past, p)
				got, err := s.Solve(ctx, p)
				if err != nil {
					t.Fatal(err)
				}
				want, err := study.Solve(ctx, p)
				if err != nil {
					t.Fatal(err)
				}
				if !reflect.DeepEqual(got, want) {
					t.Fatalf("after edit %d: %s\n%s", len(past)-1, difference(got, want), plantest.Text(p))
				}
			}
		}))
	}
}

// drawEdit draws an edit of p, which may fail.
func drawEdit(t *rapid.T, p *plan.Plan) plan.Edit {
	refs := append(everything(p), plan.Ref{Kind: plan.KindTarget, ID: "T1"})
	for _, d := range p.Openings() {
		refs = append(refs, plan.Ref{Kind: plan.KindOpening, ID: d.ID})
	}
	one := refs[rapid.IntRange(0, len(refs)-1).Draw(t, "item")]
	by := exact.Vec{X: drawStep(t, p), Y: drawStep(t, p)}
	switch rapid.IntRange(0, 5).Draw(t, "edit") {
	case 0:
		return plan.Delete{Items: []plan.Ref{one}}
	case 1, 2:
		if one.Kind == plan.KindWall || one.Kind == plan.KindBlock {
			return drawCorner(t, p, one, by)
		}
	case 3:
		for _, d := range p.Openings() {
			d.Shut = !d.Shut
			return plan.SetOpening{Opening: d}
		}
	}
	two := refs[rapid.IntRange(0, len(refs)-1).Draw(t, "another")]
	return plan.MoveItems{Items: []plan.Ref{one, two}, By: by}
}

func drawCorner(t *rapid.T, p *plan.Plan, r plan.Ref, by exact.Vec) plan.Edit {
	var line plan.Chain
	if w, ok := p.Wall(r.ID); ok && r.Kind == plan.KindWall {
		line = w.Line
	}
	for _, b := range p.Blocks() {
		if b.ID == r.ID && r.Kind == plan.KindBlock {
			line = b.Ring
		}
	}
	i := rapid.IntRange(0, line.Len()-1).Draw(t, "corner")
	return plan.MoveCorner{Corner: plan.Corner{Item: r, Index: i}, To: line.At(i).Add(by), Along: rapid.Bool().Draw(t, "along")}
}

// drawStep draws nothing, a grid unit or two, or a step or two of the plan's lattice, which shows in its first wall.
func drawStep(t *rapid.T, p *plan.Plan) int32 {
	unit := int32(1000)
	for _, w := range p.Walls() {
		d := w.Line.At(1).Sub(w.Line.At(0))
		switch long := max(d.X, -d.X, d.Y, -d.Y); {
		case long < 50:
			unit = 1
		case long > 10_000_000:
			unit = exact.Limit / 14
		}
		break
	}
	return rapid.SampledFrom([]int32{0, 1, -1, 2, unit, -unit, 2 * unit, -3 * unit}).Draw(t, "step")
}
