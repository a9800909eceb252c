package arrange_test

import (
	"fmt"
	"testing"

	"enfilade/solver/arrange"
	"enfilade/solver/plan"
)

// rows draws n walls in rows of ten, each with a corner and a door.
func rows(n int) *plan.Plan {
	var p plan.Parts
	for i := range n {
		x, y := int32(i%10)*50_000, int32(i/10)*40_000
		w := plan.Wall{ID: fmt.Sprint("W", i), Height: plan.Ceiling, Thickness: 2000,
			Line: plan.ChainOf(pt(x, y), pt(x+50_000, y), pt(x+50_000, y+30_000))}
		p.Walls = append(p.Walls, w)
		p.Openings = append(p.Openings, door(fmt.Sprint("D", i), w.ID, 0, 10_000, 9000))
	}
	return plan.From(p)
}

func BenchmarkDraw(b *testing.B) {
	for _, n := range []int{1000, 10_000, 100_000} {
		p := rows(n)
		b.Run(fmt.Sprintf("walls=%d", n), func(b *testing.B) {
			b.ReportAllocs()
			for b.Loop() {
				arrange.Draw(p)
			}
		})
	}
}

func ExampleDraw() {
	o, problems := arrange.Draw(plan.From(plan.Parts{Walls: []plan.Wall{
		{ID: "W1", Height: plan.Ceiling, Thickness: 2000, Line: chain("0,0 50000,0 50000,30000")},
		{ID: "W2", Height: plan.Ceiling, Line: chain("7,7 7,7")},
	}}))
	fmt.Println(len(o.Bodies), "bodies,", len(o.Segments), "segments")
	fmt.Println(problems[0].Items[0].ID, problems[0].Text)
	// Output:
	// 2 bodies, 10 segments
	// W2 spans nothing; its line needs two points that differ
}
