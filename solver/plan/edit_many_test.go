package plan_test

import (
	"fmt"
	"math/rand/v2"
	"slices"
	"testing"

	"enfilade/solver/exact"
	"enfilade/solver/plan"
)

// row is a plan of n walls of two metres in a row, each with a door and every third with a block beside it.
func row(n int) *plan.Plan {
	parts := plan.Parts{Walker: plan.DefaultWalker(), Sheet: plan.Sheet{Unit: "m"}}
	for i := range n {
		x := int32(i) * 30000
		id := fmt.Sprint("W", i)
		parts.Walls = append(parts.Walls, plan.Wall{ID: id, Line: chain(x, 0, x+20000, 0), Height: plan.Ceiling})
		parts.Openings = append(parts.Openings, plan.Opening{ID: fmt.Sprint("D", i), Wall: id, At: 5000, Width: 9000})
		if i%3 == 0 {
			parts.Blocks = append(parts.Blocks, plan.Block{ID: fmt.Sprint("B", i), Ring: chain(x, 9, x+5, 9, x+5, 20), Height: 9})
		}
		parts.Starts = append(parts.Starts, plan.Start{ID: fmt.Sprint("S", i), At: pt(x, -100)})
	}
	return plan.From(parts)
}

// TestEditsOfMany changes random sets of items of a long plan, in random order and some listed twice, and compares what becomes of
// every item with what should: those of the set are changed, all others are what they were.
func TestEditsOfMany(t *testing.T) {
	r := rand.New(rand.NewPCG(7, 1))
	p := row(300)
	var all []plan.Ref
	for i := range 300 {
		all = append(all, ref(plan.KindWall, fmt.Sprint("W", i)), ref(plan.KindOpening, fmt.Sprint("D", i)), ref(plan.KindStart, fmt.Sprint("S", i)))
		if i%3 == 0 {
			all = append(all, ref(plan.KindBlock, fmt.Sprint("B", i)))
		}
	}
	for round := range 60 {
		r.Shuffle(len(all), func(i, j int) { all[i], all[j] = all[j], all[i] })
		items := slices.Clone(all[:1+r.IntN(len(all))/(1+round%9)])
		items = append(items, items[:len(items)/2]...)
		in := map[plan.Ref]bool{}
		for _, i := range items {
			in[i] = true
		}
		want := p.Parts()
		by := exact.Vec{X: int32(r.IntN(900)), Y: 7}
		var edit plan.Edit
		switch round % 3 {
		case 0:
			edit = plan.MoveItems{Items: items, By: by}
			for i := range want.Walls {
				w, o := &want.Walls[i], &want.Openings[i]
				if a := w.Line.At(0).Add(by); in[ref(plan.KindWall, w.ID)] {
					w.Line = chain(a.X, a.Y, a.X+20000, a.Y)
				} else if in[ref(plan.KindOpening, o.ID)] {
					o.At += by.X
				}
				if s := &want.Starts[i]; in[ref(plan.KindStart, s.ID)] {
					s.At = s.At.Add(by)
				}
			}
			for i := range want.Blocks {
				if b := &want.Blocks[i]; in[ref(plan.KindBlock, b.ID)] {
					a := b.Ring.At(0).Add(by)
					b.Ring = chain(a.X, a.Y, a.X+5, a.Y, a.X+5, a.Y+11)
				}
			}
		case 1:
			edit = plan.Delete{Items: items}
			want.Walls = slices.DeleteFunc(want.Walls, func(w plan.Wall) bool { return in[ref(plan.KindWall, w.ID)] })
			want.Openings = slices.DeleteFunc(want.Openings, func(o plan.Opening) bool {
				return in[ref(plan.KindOpening, o.ID)] || in[ref(plan.KindWall, o.Wall)]
			})
			want.Blocks = slices.DeleteFunc(want.Blocks, func(b plan.Block) bool { return in[ref(plan.KindBlock, b.ID)] })
			want.Starts = slices.DeleteFunc(want.Starts, func(s plan.Start) bool { return in[ref(plan.KindStart, s.ID)] })
		case 2:
			yes := true
			edit = plan.Mark{Items: items, Hidden: &yes}
			for i := range want.Walls {
				want.Walls[i].Hidden = in[ref(plan.KindWall, want.Walls[i].ID)]
				want.Openings[i].Hidden = in[ref(plan.KindOpening, want.Openings[i].ID)]
				want.Starts[i].Hidden = in[ref(plan.KindStart, want.Starts[i].ID)]
			}
			for i := range want.Blocks {
				want.Blocks[i].Hidden = in[ref(plan.KindBlock, want.Blocks[i].ID)]
			}
		}
		q, err := edit.Apply(p)
		if err != nil {
			t.Fatal(err)
		}
		if got := q.Parts(); !same(got, want) {
			t.Fatalf("round %d, %T of %d items: not what it should be", round, edit, len(items))
		}
	}
}
