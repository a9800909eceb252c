package arrange_test

import (
	"fmt"
	"strings"
	"testing"

	"enfilade/solver/arrange"
	"enfilade/solver/exact"
	"enfilade/solver/plan"
)

func TestDrawProblems(t *testing.T) {
	good := wall("W1", 20, "0,0 100,0 100,100 100,100")
	walls := func(w ...plan.Wall) plan.Parts { return plan.Parts{Walls: append([]plan.Wall{good}, w...)} }
	open := func(o ...plan.Opening) plan.Parts { return plan.Parts{Walls: []plan.Wall{good}, Openings: o} }
	blocks := func(height int32, ring string) plan.Parts {
		return plan.Parts{Walls: []plan.Wall{good}, Blocks: []plan.Block{{ID: "B1", Ring: chain(ring), Height: height}}}
	}
	low := wall("W2", 0, "0,0 9,0")
	low.Kind = plan.Low
	flat := wall("W2", 0, "0,0 9,0")
	flat.Height = 0
	tests := []struct {
		name  string
		parts plan.Parts
		kind  plan.ProblemKind
		want  string
	}{
		{"one point", walls(wall("W2", 0, "5,5")), plan.ProblemShape, "W2 at 5,5: spans nothing"},
		{"no points", walls(wall("W2", 0, "")), plan.ProblemShape, "W2 at 0,0: spans nothing"},
		{"doubled point", walls(wall("W2", 0, "5,5 5,5")), plan.ProblemShape, "W2 at 5,5: spans nothing"},
		{"far away", walls(wall("W2", 0, "5,5 500000001,5")), plan.ProblemShape, "W2 at 5,5: lies outside"},
		{"too thick", walls(wall("W2", 1_000_001, "5,5 9,5")), plan.ProblemShape, "W2 at 5,5: needs a thickness"},
		{"less than no thickness", walls(wall("W2", -1, "5,5 9,5")), plan.ProblemShape, "W2 at 5,5: needs a thickness"},
		{"no height", walls(flat), plan.ProblemShape, "W2 at 0,0: needs a height"},
		{"low wall without a height", walls(low), plan.ProblemLow, "W2 at 0,0: is a low wall"},
		{"opening without a wall", open(door("D1", "W9", 0, 0, 10)), plan.ProblemMissing, `D1 at 0,0: names wall "W9"`},
		{"opening in a piece that is not there", open(door("D1", "W1", 3, 0, 10)), plan.ProblemOpening, "D1 at 0,0: names straight piece 3"},
		{"opening before the first piece", open(door("D1", "W1", -1, 0, 10)), plan.ProblemOpening, "D1 at 0,0: names straight piece -1"},
		{"opening in a piece without length", open(door("D1", "W1", 2, 0, 10)), plan.ProblemOpening, "D1 at 0,0: names straight piece 2"},
		{"opening before its piece", open(door("D1", "W1", 0, -1, 10)), plan.ProblemOpening, "D1 at 0,0: needs a place"},
		{"opening without width", open(door("D1", "W1", 0, 5, 0)), plan.ProblemOpening, "D1 at 0,0: needs a place"},
		{"opening beyond its piece", open(door("D1", "W1", 0, 91, 10)), plan.ProblemOpening, "D1 at 0,0: reaches beyond"},
		{"opening beyond every number", open(door("D1", "W1", 0, 1<<31-1, 1<<31-1)), plan.ProblemOpening, "D1 at 0,0: reaches beyond"},
		{"opening over another", open(door("D1", "W1", 0, 49, 10), door("D2", "W1", 0, 40, 10)), plan.ProblemOpening,
			"D1 at 49,0: lies over opening D2"},
		{"flat block", blocks(5, "0,0 5,5 9,9"), plan.ProblemShape, "B1 at 0,0: encloses nothing"},
		{"block without corners", blocks(5, ""), plan.ProblemShape, "B1 at 0,0: encloses nothing"},
		{"block without height", blocks(0, "0,0 5,0 5,9"), plan.ProblemShape, "B1 at 0,0: needs a height"},
		{"block far away", blocks(5, "0,0 5,0 5,500000001"), plan.ProblemShape, "B1 at 0,0: lies outside"},
		{"flat floor", plan.Parts{Walls: []plan.Wall{good}, Floor: chain("1,1 5,5")}, plan.ProblemShape, " at 1,1: encloses nothing"},
	}
	for _, tt := range tests {
		t.Run(tt.name, func(t *testing.T) {
			o, problems := arrange.Draw(plan.From(tt.parts))
			if len(problems) != 1 {
				t.Fatalf("problems %v, want one", problems)
			}
			p := problems[0]
			got := fmt.Sprintf("%s at %d,%d: %s", p.Items[0].ID, p.At.X, p.At.Y, p.Text)
			if p.Kind != tt.kind || !strings.HasPrefix(got, tt.want) {
				t.Errorf("kind %d, %q; want kind %d, %q", p.Kind, got, tt.kind, tt.want)
			}
			if !strings.HasPrefix(show(o), "W1:") {
				t.Errorf("the rest is not drawn: %s", show(o))
			}
			if want := 1; len(o.Bodies) > 2+want {
				t.Errorf("%d bodies, the item at fault is not left out", len(o.Bodies))
			}
		})
	}
}

func TestDrawOpeningInABadWall(t *testing.T) {
	_, problems := arrange.Draw(plan.From(plan.Parts{Walls: []plan.Wall{wall("W1", 0, "5,5")},
		Openings: []plan.Opening{door("D1", "W1", 0, 0, 10)}}))
	if len(problems) != 2 || problems[1].Items[0].ID != "D1" || problems[1].Text != "its wall W1 cannot be drawn" {
		t.Errorf("problems %v", problems)
	}
}

// TestDrawFloor holds the floor of Bodies[0]: the plan's ring counter-clockwise, else the box of everything and 2 m.
func TestDrawFloor(t *testing.T) {
	at := pt(1000, -90_000)
	face := [2]exact.Pt{pt(5, 5), pt(70_000, 5)}
	tests := []struct {
		name  string
		parts plan.Parts
		want  string
	}{
		{"given, clockwise", plan.Parts{Floor: chain("0,0 0,50 90,50 90,0")}, "90,0 90,50 0,50 0,0"},
		{"empty", plan.Parts{}, "-100000,-100000 100000,-100000 100000,100000 -100000,100000"},
		{"thin wall", plan.Parts{Walls: []plan.Wall{wall("W1", 0, "0,0 100,0")}}, "-20000,-20000 20100,-20000 20100,20000 -20000,20000"},
		{"thick wall", plan.Parts{Walls: []plan.Wall{wall("W1", 20, "0,0 100,0")}}, "-20010,-20010 20110,-20010 20110,20010 -20010,20010"},
		{"marks and blocks", plan.Parts{Blocks: []plan.Block{{ID: "B1", Height: 5, Ring: chain("0,0 100,0 0,70")}},
			Observers: []plan.Observer{{ID: "O1", At: at}}, Starts: []plan.Start{{ID: "S1", At: pt(-5, 0)}},
			Targets: []plan.Target{{ID: "T1", At: pt(0, 99), Face: &face}},
			Routes:  []plan.Route{{ID: "R1", Via: chain("0,3000")}},
			Zones:   []plan.Zone{{ID: "Z1", Ring: chain("0,0 10,0 -700,5")}}},
			"-20700,-110000 90000,-110000 90000,23000 -20700,23000"},
	}
	for _, tt := range tests {
		t.Run(tt.name, func(t *testing.T) {
			o, problems := arrange.Draw(plan.From(tt.parts))
			if len(problems) > 0 {
				t.Errorf("problems: %v", problems)
			}
			var got []string
			for _, s := range o.Segments {
				if s.Body == 0 {
					got = append(got, fmt.Sprintf("%d,%d", s.A.X, s.A.Y))
				}
			}
			if strings.Join(got, " ") != tt.want {
				t.Errorf("got %s, want %s", strings.Join(got, " "), tt.want)
			}
			if b := o.Bodies[0]; !b.Walk || b.Top != plan.Ceiling || o.Items[b.Item].Kind != plan.KindFloor {
				t.Errorf("the floor's body is %+v", b)
			}
		})
	}
}

// TestDrawRange holds that what lies at the rim of the legal range stays legal for the solver.
func TestDrawRange(t *testing.T) {
	const m = plan.MaxCoord
	w := wall("W1", plan.MaxThickness, "0,0 1,0")
	w.Line = plan.ChainOf(pt(-m, -m), pt(m, m), pt(-m, m), pt(m-5, -m))
	o, problems := arrange.Draw(plan.From(plan.Parts{Walls: []plan.Wall{w}}))
	if len(problems) > 0 || len(o.Segments) < 8 {
		t.Fatalf("problems %v, %d segments", problems, len(o.Segments))
	}
	for _, s := range o.Segments {
		if !s.A.Legal() {
			t.Errorf("%v is outside the solver's range", s.A)
		}
	}
}
