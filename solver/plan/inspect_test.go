package plan_test

import (
	"fmt"
	"strings"
	"testing"

	"enfilade/solver/plan"
	"enfilade/solver/plantest"
)

func TestInspect(t *testing.T) {
	wall := func(thick int32, xy ...int32) plan.Wall {
		return plan.Wall{Line: chain(xy...), Height: plan.Ceiling, Thickness: thick}
	}
	tests := []struct {
		name  string
		walls []plan.Wall
		want  string // "" for no finding
		line  plan.Chain
	}{
		{"meets", []plan.Wall{wall(0, 0, 0, 1000, 0), wall(0, 1000, -500, 1000, 500)}, "", plan.Chain{}},
		{"crosses", []plan.Wall{wall(0, 0, 0, 1050, 0), wall(0, 1000, -500, 1000, 500)}, "", plan.Chain{}},
		{"12 mm before a line", []plan.Wall{wall(0, 0, 0, 880, 0), wall(0, 1000, -500, 1000, 500)}, "wall W1 ends 12.0 mm before wall W2", chain(0, 0, 1000, 0)},
		{"20 mm", []plan.Wall{wall(0, 0, 0, 800, 0), wall(0, 1000, -500, 1000, 500)}, "wall W1 ends 20.0 mm before wall W2", chain(0, 0, 1000, 0)},
		{"more than 20 mm", []plan.Wall{wall(0, 0, 0, 799, 0), wall(0, 1000, -500, 1000, 500)}, "", plan.Chain{}},
		{"touches the body", []plan.Wall{wall(0, 0, 0, 900, 0), wall(200, 1000, -500, 1000, 500)}, "", plan.Chain{}},
		{"3 mm before the body", []plan.Wall{wall(100, 0, 0, 870, 0), wall(200, 1000, -500, 1000, 500)}, "wall W1 ends 3.0 mm before wall W2", chain(0, 0, 1000, 0)},
		{"body on the far side", []plan.Wall{wall(0, 0, 0, 900, 0), {Line: chain(1000, -500, 1000, 500), Height: 5, Thickness: 200, Justify: plan.Left}}, "", plan.Chain{}},
		{"end to end", []plan.Wall{wall(0, 0, 0, 900, 0), wall(0, 950, 20, 950, 3000)}, "wall W1 ends 5.4 mm before wall W2", chain(0, 0, 950, 20)},
		{"ring not closed", []plan.Wall{wall(0, 0, 0, 9000, 0, 9000, 9000, 0, 9000, 0, 100)}, "wall W1 ends 10.0 mm before itself", plan.Chain{}},
		{"the same again", []plan.Wall{wall(0, 0, 0, 900, 0), wall(0, 900, 0, 0, 0)}, "wall W2 lies on wall W1, all along", plan.Chain{}},
		{"partly", []plan.Wall{wall(0, 0, 0, 900, 0), wall(0, 500, 0, 1500, 0)}, "wall W2 lies on wall W1 for a part", plan.Chain{}},
		{"one after the other", []plan.Wall{wall(0, 0, 0, 900, 0), wall(0, 900, 0, 1500, 0)}, "", plan.Chain{}},
		{"slanted, doubled", []plan.Wall{wall(0, 0, 0, 3000, 2001), wall(0, 1000, 667, 2000, 1334)}, "wall W2 lies on wall W1 for a part", plan.Chain{}},
		{"side by side", []plan.Wall{wall(0, 0, 0, 3000, 2000), wall(0, 1000, 667, 2000, 1333)}, "", plan.Chain{}},
		{"outside the floor", []plan.Wall{wall(0, 60_000, 0, 61_000, 0)}, "wall W1 lies outside the floor", plan.Chain{}},
	}
	for _, tt := range tests {
		t.Run(tt.name, func(t *testing.T) {
			parts := plan.Parts{Walls: tt.walls, Floor: chain(-50_000, -50_000, 50_000, -50_000, 50_000, 50_000, -50_000, 50_000)}
			for i := range parts.Walls {
				parts.Walls[i].ID = fmt.Sprint("W", i+1)
			}
			p := plan.From(parts)
			got := plan.Inspect(p, nil)
			if tt.want == "" {
				if len(got) > 0 {
					t.Fatalf("%+v", got)
				}
				return
			}
			if len(got) != 1 || !strings.HasPrefix(got[0].Items[0].String()+" "+got[0].Text, tt.want) {
				t.Fatalf("%+v, want %q", got, tt.want)
			}
			if tt.line.Len() > 0 {
				q, err := got[0].Fix.Apply(p)
				if err != nil {
					t.Fatal(err)
				}
				if w, _ := q.Wall("W1"); !w.Line.Equal(tt.line) {
					t.Errorf("mended, the wall runs %v, want %v", w.Line, tt.line)
				}
				if left := plan.Inspect(q, nil); len(left) > 0 {
					t.Errorf("mended, there is left %+v", left)
				}
			}
		})
	}
}

// TestInspectDoubledDoor: of two walls that lie on one another the one without doors may go, and none when both have some.
func TestInspectDoubledDoor(t *testing.T) {
	parts := plan.Parts{Walls: []plan.Wall{{ID: "W1", Line: chain(0, 0, 9000, 0), Height: 5}, {ID: "W2", Line: chain(0, 0, 9000, 0), Height: 5}},
		Openings: []plan.Opening{{ID: "D1", Wall: "W2", At: 5, Width: 900}}}
	p := plan.From(parts)
	f := plan.Inspect(p, nil)
	if len(f) != 1 || f[0].Fix == nil {
		t.Fatalf("%+v", f)
	}
	q, err := f[0].Fix.Apply(p)
	if err != nil || !q.Has(ref(plan.KindWall, "W2")) || q.Has(ref(plan.KindWall, "W1")) || f[0].Fix.Label() != "delete doubled wall" {
		t.Errorf("%v, %+v", err, q.Parts())
	}
	parts.Openings = append(parts.Openings, plan.Opening{ID: "D2", Wall: "W1", At: 5, Width: 900})
	if f := plan.Inspect(plan.From(parts), nil); len(f) != 1 || f[0].Fix != nil {
		t.Errorf("%+v", f)
	}
}

func BenchmarkInspect(b *testing.B) {
	for name, make := range map[string]func(uint64, int) *plan.Plan{"office": plantest.Office, "clutter": plantest.Clutter, "comb": plantest.Comb} {
		for _, n := range []int{1000, 20_000, 100_000} {
			p := make(1, n)
			b.Run(fmt.Sprintf("plan=%s/walls=%d", name, n), func(b *testing.B) {
				for b.Loop() {
					plan.Inspect(p, nil)
				}
			})
		}
	}
}
