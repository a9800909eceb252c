package arrange_test

import (
	"fmt"
	"strings"
	"testing"

	"enfilade/solver/arrange"
	"enfilade/solver/exact"
	"enfilade/solver/plan"
)

func pt(x, y int32) exact.Pt { return exact.Pt{X: x, Y: y} }

// chain reads "x,y x,y ..." in grid units.
func chain(text string) plan.Chain {
	var pts []exact.Pt
	for _, f := range strings.Fields(text) {
		var p exact.Pt
		if _, err := fmt.Sscanf(f, "%d,%d", &p.X, &p.Y); err != nil {
			panic(err)
		}
		pts = append(pts, p)
	}
	return plan.ChainOf(pts...)
}

func wall(id string, thickness int32, line string) plan.Wall {
	return plan.Wall{ID: id, Line: chain(line), Thickness: thickness, Height: plan.Ceiling}
}

func door(id, wall string, segment int, at, width int32) plan.Opening {
	return plan.Opening{ID: id, Wall: wall, Segment: segment, At: at, Width: width}
}

func shut(o plan.Opening, leaf plan.Leaf) plan.Opening {
	o.Shut, o.Leaf = true, leaf
	return o
}

// show writes everything drawn but the floor, one body or line a row: item, what it stops, rings.
func show(o *arrange.Outline) string {
	var b strings.Builder
	last := int32(-2)
	var end exact.Pt
	for _, s := range o.Segments {
		if s.Body == 0 {
			continue
		}
		if s.Body != last || s.Body == arrange.NoBody || s.A != end {
			if s.Body == last && s.Body != arrange.NoBody {
				b.WriteString(" |")
			} else {
				fmt.Fprintf(&b, "\n%s", o.Items[s.Item].ID)
				if !s.Walk {
					b.WriteString(" pass")
				}
				if s.Top != plan.Ceiling {
					fmt.Fprintf(&b, " top=%d", s.Top)
				}
				if s.Body == arrange.NoBody {
					b.WriteString(" line")
				}
				b.WriteString(":")
			}
			fmt.Fprintf(&b, " %d,%d", s.A.X, s.A.Y)
		}
		fmt.Fprintf(&b, " %d,%d", s.B.X, s.B.Y)
		last, end = s.Body, s.B
	}
	return strings.TrimSpace(b.String())
}

func TestDraw(t *testing.T) {
	low := func(w plan.Wall, height int32) plan.Wall { w.Kind, w.Height = plan.Low, height; return w }
	kind := func(w plan.Wall, k plan.WallKind) plan.Wall { w.Kind = k; return w }
	just := func(w plan.Wall, j plan.Justify) plan.Wall { w.Justify = j; return w }
	tests := []struct {
		name  string
		parts plan.Parts
		want  string
	}{
		{"thin wall", plan.Parts{Walls: []plan.Wall{wall("W1", 0, "0,0 100,0 100,50")}},
			"W1 line: 0,0 100,0\nW1 line: 100,0 100,50"},
		{"doubled points and zero pieces", plan.Parts{Walls: []plan.Wall{wall("W1", 0, "0,0 0,0 100,0 100,0")}},
			"W1 line: 0,0 100,0"},
		{"glazing and screen are lines whatever their thickness", plan.Parts{Walls: []plan.Wall{
			kind(wall("W1", 60, "0,0 100,0"), plan.Glazing), kind(wall("W2", 60, "0,9 100,9"), plan.Screen)}},
			"W1 top=0 line: 0,0 100,0\nW2 pass line: 0,9 100,9"},
		{"low thin wall", plan.Parts{Walls: []plan.Wall{low(wall("W1", 0, "0,0 100,0"), 9500)}}, "W1 top=9500 line: 0,0 100,0"},
		{"thick wall", plan.Parts{Walls: []plan.Wall{wall("W1", 20, "0,0 100,0")}}, "W1: 0,-10 100,-10 100,10 0,10 0,-10"},
		{"justified left", plan.Parts{Walls: []plan.Wall{just(wall("W1", 20, "0,0 100,0"), plan.Left)}},
			"W1: 0,0 100,0 100,20 0,20 0,0"},
		{"justified right", plan.Parts{Walls: []plan.Wall{just(wall("W1", 20, "0,0 100,0"), plan.Right)}},
			"W1: 0,-20 100,-20 100,0 0,0 0,-20"},
		{"odd thickness rounds away on both sides", plan.Parts{Walls: []plan.Wall{wall("W1", 5, "0,0 100,0")}},
			"W1: 0,-3 100,-3 100,3 0,3 0,-3"},
		{"left turn", plan.Parts{Walls: []plan.Wall{wall("W1", 20, "0,0 100,0 100,100")}},
			"W1: 0,-10 110,-10 110,100 90,100 90,10 0,10 0,-10"},
		{"right turn", plan.Parts{Walls: []plan.Wall{wall("W1", 20, "0,0 100,0 100,-100")}},
			"W1: 0,-10 90,-10 90,-100 110,-100 110,10 0,10 0,-10"},
		{"justified left turn", plan.Parts{Walls: []plan.Wall{just(wall("W1", 20, "0,0 100,0 100,100"), plan.Left)}},
			"W1: 0,0 100,0 100,100 80,100 80,20 0,20 0,0"},
		{"3-4-5 mitre is exact", plan.Parts{Walls: []plan.Wall{wall("W1", 40, "0,0 1000,0 1600,800")}},
			"W1: 0,-20 1010,-20 1616,788 1584,812 990,20 0,20 0,-20"},
		{"leg too short for the clean corner", plan.Parts{Walls: []plan.Wall{wall("W1", 20, "0,0 100,0 100,5")}},
			"W1: 0,-10 110,-10 110,5 90,5 90,0 100,0 100,10 0,10 0,-10"},
		{"mitre limit: just within", plan.Parts{Walls: []plan.Wall{wall("W1", 32, "0,0 1000,0 300,388")}},
			"W1: 0,-16 1062,-16 308,402 292,374 938,16 0,16 0,-16"},
		{"mitre limit: just beyond", plan.Parts{Walls: []plan.Wall{wall("W1", 32, "0,0 1000,0 300,387")}},
			"W1: 0,-16 1000,-16 1008,14 308,401 292,373 992,-14 1000,0 1000,16 0,16 0,-16"},
		{"u-turn", plan.Parts{Walls: []plan.Wall{wall("W1", 20, "0,0 100,0 40,0")}},
			"W1: 0,-10 100,-10 100,0 100,10 40,10 40,-10 100,-10 100,0 100,10 0,10 0,-10"},
		{"there and back is open, its ends meet in a u-turn", plan.Parts{Walls: []plan.Wall{wall("W1", 20, "0,0 100,0 0,0")}},
			"W1: 0,-10 100,-10 100,0 100,10 0,10 0,0 0,-10 100,-10 100,0 100,10 0,10 0,0 0,-10"},
		{"closed", plan.Parts{Walls: []plan.Wall{wall("W1", 20, "0,0 100,0 100,100 0,100 0,0")}},
			"W1: 110,-10 110,110 -10,110 -10,-10 110,-10 | 10,10 10,90 90,90 90,10 10,10"},
		{"closed, clockwise", plan.Parts{Walls: []plan.Wall{wall("W1", 20, "0,0 0,100 100,100 100,0 0,0")}},
			"W1: 10,90 90,90 90,10 10,10 10,90 | -10,-10 110,-10 110,110 -10,110 -10,-10"},
		{"closed with one door", plan.Parts{Walls: []plan.Wall{wall("W1", 20, "0,0 100,0 100,100 0,100 0,0")},
			Openings: []plan.Opening{door("D1", "W1", 1, 30, 40)}},
			"W1: 110,70 110,110 -10,110 -10,-10 110,-10 110,30 90,30 90,10 10,10 10,90 90,90 90,70 110,70"},
		{"door in the middle", plan.Parts{Walls: []plan.Wall{wall("W1", 20, "0,0 100,0")},
			Openings: []plan.Opening{door("D1", "W1", 0, 30, 40)}},
			"W1: 0,-10 30,-10 30,10 0,10 0,-10\nW1: 70,-10 100,-10 100,10 70,10 70,-10"},
		{"door at the start", plan.Parts{Walls: []plan.Wall{wall("W1", 20, "0,0 100,0")},
			Openings: []plan.Opening{door("D1", "W1", 0, 0, 40)}}, "W1: 40,-10 100,-10 100,10 40,10 40,-10"},
		{"door at the end", plan.Parts{Walls: []plan.Wall{wall("W1", 20, "0,0 100,0")},
			Openings: []plan.Opening{door("D1", "W1", 0, 60, 40)}}, "W1: 0,-10 60,-10 60,10 0,10 0,-10"},
		{"door over the whole piece", plan.Parts{Walls: []plan.Wall{wall("W1", 20, "0,0 100,0")},
			Openings: []plan.Opening{door("D1", "W1", 0, 0, 100)}}, ""},
		{"two doors touch", plan.Parts{Walls: []plan.Wall{wall("W1", 20, "0,0 100,0")},
			Openings: []plan.Opening{door("D2", "W1", 0, 50, 30), door("D1", "W1", 0, 20, 30)}},
			"W1: 0,-10 20,-10 20,10 0,10 0,-10\nW1: 80,-10 100,-10 100,10 80,10 80,-10"},
		{"door at the end of a slanted wall reaches it", plan.Parts{Walls: []plan.Wall{wall("W1", 0, "0,0 100,100")},
			Openings: []plan.Opening{door("D1", "W1", 0, 41, 100)}}, "W1 line: 0,0 29,29"},
		{"door at a corner", plan.Parts{Walls: []plan.Wall{wall("W1", 20, "0,100 0,0 100,0")},
			Openings: []plan.Opening{door("D1", "W1", 1, 0, 40)}},
			"W1: -10,100 -10,0 10,0 10,100 -10,100\nW1: 40,-10 100,-10 100,10 40,10 40,-10"},
		{"door over part of a corner", plan.Parts{Walls: []plan.Wall{wall("W1", 20, "0,100 0,0 100,0")},
			Openings: []plan.Opening{door("D1", "W1", 1, 5, 40)}},
			"W1: -10,100 -10,-10 5,-10 5,10 0,10 0,0 10,0 10,100 -10,100\nW1: 45,-10 100,-10 100,10 45,10 45,-10"},
		{"leaves", plan.Parts{Walls: []plan.Wall{wall("W1", 20, "0,0 100,0"), low(wall("W2", 20, "0,50 100,50"), 900)},
			Openings: []plan.Opening{shut(door("D1", "W1", 0, 0, 20), plan.SolidLeaf), shut(door("D2", "W1", 0, 80, 20), plan.GlazedLeaf),
				shut(door("D3", "W2", 0, 0, 100), plan.SolidLeaf), shut(door("D4", "W1", 0, 40, 20), plan.NoLeaf)}},
			"W1: 20,-10 40,-10 40,10 20,10 20,-10\nW1: 60,-10 80,-10 80,10 60,10 60,-10\nD1: 0,-10 20,-10 20,10 0,10 0,-10\n" +
				"D2 top=0: 80,-10 100,-10 100,10 80,10 80,-10\nD3 top=900: 0,40 100,40 100,60 0,60 0,40"},
		{"leaf in a line", plan.Parts{Walls: []plan.Wall{wall("W1", 0, "0,0 100,0"), kind(wall("W2", 9, "0,50 100,50"), plan.Glazing)},
			Openings: []plan.Opening{shut(door("D1", "W1", 0, 20, 20), plan.GlazedLeaf), shut(door("D2", "W2", 0, 0, 20), plan.SolidLeaf)}},
			"W1 line: 0,0 20,0\nW1 line: 40,0 100,0\nD1 top=0 line: 20,0 40,0\nW2 top=0 line: 20,50 100,50\nD2 line: 0,50 20,50"},
		{"two walls mitre end to start", plan.Parts{Walls: []plan.Wall{wall("W1", 20, "0,0 100,0"), wall("W2", 20, "100,0 100,100")}},
			"W1: 0,-10 110,-10 100,0 90,10 0,10 0,-10\nW2: 110,-10 110,100 90,100 90,10 100,0 110,-10"},
		{"two walls mitre end to end", plan.Parts{Walls: []plan.Wall{wall("W1", 20, "0,0 100,0"), wall("W2", 20, "100,100 100,0")}},
			"W1: 0,-10 110,-10 100,0 90,10 0,10 0,-10\nW2: 90,100 90,10 100,0 110,-10 110,100 90,100"},
		{"two walls mitre start to start, justified alike", plan.Parts{Walls: []plan.Wall{
			just(wall("W1", 20, "100,0 0,0"), plan.Right), just(wall("W2", 20, "100,0 100,100"), plan.Left)}},
			"W1: 80,20 0,20 0,0 100,0 80,20\nW2: 100,0 100,100 80,100 80,20 100,0"},
		{"justified apart do not mitre", plan.Parts{Walls: []plan.Wall{
			just(wall("W1", 20, "100,0 0,0"), plan.Left), just(wall("W2", 20, "100,0 100,100"), plan.Left)}},
			"W1: 100,0 0,0 0,-20 100,-20 100,0\nW2: 100,0 100,100 80,100 80,0 100,0"},
		{"unequal walls do not mitre", plan.Parts{Walls: []plan.Wall{wall("W1", 20, "0,0 100,0"), wall("W2", 30, "100,0 100,100")}},
			"W1: 0,-10 100,-10 100,10 0,10 0,-10\nW2: 115,0 115,100 85,100 85,0 115,0"},
		{"low and full walls do not mitre", plan.Parts{Walls: []plan.Wall{wall("W1", 20, "0,0 100,0"), low(wall("W2", 20, "100,0 100,100"), 9)}},
			"W1: 0,-10 100,-10 100,10 0,10 0,-10\nW2 top=9: 110,0 110,100 90,100 90,0 110,0"},
		{"three ends do not mitre", plan.Parts{Walls: []plan.Wall{wall("W1", 20, "0,0 100,0"), wall("W2", 20, "100,0 100,100"),
			wall("W3", 20, "100,0 200,0")}}, "W1: 0,-10 100,-10 100,10 0,10 0,-10\nW2: 110,0 110,100 90,100 90,0 110,0\n" +
			"W3: 100,-10 200,-10 200,10 100,10 100,-10"},
		{"a thin end does not part a mitre", plan.Parts{Walls: []plan.Wall{wall("W1", 20, "0,0 100,0"), wall("W2", 20, "100,0 100,100"),
			wall("W3", 0, "100,0 200,0")}}, "W1: 0,-10 110,-10 100,0 90,10 0,10 0,-10\n" +
			"W2: 110,-10 110,100 90,100 90,10 100,0 110,-10\nW3 line: 100,0 200,0"},
		{"a door at the joint of two walls parts it", plan.Parts{Walls: []plan.Wall{wall("W1", 20, "0,0 100,0"), wall("W2", 20, "100,0 100,100")},
			Openings: []plan.Opening{door("D1", "W2", 0, 0, 30)}},
			"W1: 0,-10 100,-10 100,10 0,10 0,-10\nW2: 110,30 110,100 90,100 90,30 110,30"},
		{"two walls bevel, each takes the wedge", plan.Parts{Walls: []plan.Wall{wall("W1", 32, "0,0 1000,0"), wall("W2", 32, "1000,0 125,484")}},
			"W1: 0,-16 1000,-16 1008,14 1000,0 1000,16 0,16 0,-16\nW2: 1000,-16 1008,14 133,498 117,470 992,-14 1000,0 1000,-16"},
		{"two walls with a leg too short", plan.Parts{Walls: []plan.Wall{wall("W1", 20, "0,0 100,0"), wall("W2", 20, "100,0 100,5")}},
			"W1: 0,-10 110,-10 100,0 100,10 0,10 0,-10\nW2: 110,-10 110,5 90,5 90,0 100,0 110,-10"},
		{"block, turned counter-clockwise", plan.Parts{Blocks: []plan.Block{{ID: "B1", Height: 950, Ring: chain("0,0 0,10 10,10 10,10 10,0 0,0")}}},
			"B1 top=950: 10,0 10,10 0,10 0,0 10,0"},
		{"block that crosses itself", plan.Parts{Blocks: []plan.Block{{ID: "B1", Height: plan.Ceiling, Ring: chain("0,0 10,10 10,0 0,10")}}},
			"B1: 0,0 10,10 10,0 0,10 0,0"},
	}
	for _, tt := range tests {
		t.Run(tt.name, func(t *testing.T) {
			o, problems := arrange.Draw(plan.From(tt.parts))
			if len(problems) > 0 {
				t.Errorf("problems: %v", problems)
			}
			if got := show(o); got != tt.want {
				t.Errorf("got\n%s\nwant\n%s", got, tt.want)
			}
		})
	}
}
