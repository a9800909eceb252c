package plan_test

import (
	"testing"

	"enfilade/solver/exact"
	"enfilade/solver/plan"
	"enfilade/solver/plantest"
)

// BenchmarkEdit measures edits in a plan of 20,000 walls: of one item, and of all of them.
func BenchmarkEdit(b *testing.B) {
	p := plantest.Office(1, 20000)
	var walls, all []plan.Ref
	for _, w := range p.Walls() {
		walls = append(walls, plan.Ref{Kind: plan.KindWall, ID: w.ID})
	}
	all = append(all, walls...)
	for _, o := range p.Openings() {
		all = append(all, plan.Ref{Kind: plan.KindOpening, ID: o.ID})
	}
	for _, o := range p.Observers() {
		all = append(all, plan.Ref{Kind: plan.KindObserver, ID: o.ID})
	}
	w, _ := p.Wall(walls[9].ID)
	yes, by := true, exact.Vec{X: 500}
	for _, c := range []struct {
		name string
		edit plan.Edit
	}{
		{"move-observer", plan.MoveItems{Items: all[len(all)-1:], By: by}},
		{"move-wall", plan.MoveItems{Items: walls[9:10], By: by}},
		{"corner", plan.MoveCorner{Corner: plan.Corner{Item: walls[9]}, To: w.Line.At(0).Add(by), Along: true}},
		{"draw", plan.AddWall{Wall: plan.Wall{Line: w.Line, Height: 9}}},
		{"delete-one", plan.Delete{Items: walls[:1]}},
		{"move-all", plan.MoveItems{Items: all, By: by}},
		{"rotate-all", plan.Rotate{Items: all, Degrees: 7}},
		{"delete-all", plan.Delete{Items: all}},
		{"lock-all", plan.Mark{Items: all, Locked: &yes}},
		{"paste-1000", plan.Paste{Clip: plan.Extract(p, walls[:1000]), By: by}},
	} {
		b.Run("do="+c.name, func(b *testing.B) {
			b.ReportAllocs()
			for b.Loop() {
				if _, err := c.edit.Apply(p); err != nil {
					b.Fatal(err)
				}
			}
		})
	}
}
