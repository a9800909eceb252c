package plan_test

import (
	"math"
	"strings"
	"testing"

	"enfilade/solver/exact"
	"enfilade/solver/plan"
)

// TestShapeEdits is one line for each edit that turns, copies, parts or joins: what it makes of room().
func TestShapeEdits(t *testing.T) {
	yes, no := true, false
	w1, w2 := ref(plan.KindWall, "W1"), ref(plan.KindWall, "W2")
	t1, _ := room().Target("T1")
	tests := []struct {
		name    string
		edit    plan.Edit
		label   string
		touches int
		want    func(*plan.Parts)
	}{
		{"quarter turn of a wall", plan.Rotate{Items: []plan.Ref{w2}, About: pt(5000, 3000), Degrees: 90}, "rotate wall", obstacles,
			func(p *plan.Parts) { p.Walls[1].Line = chain(5000, 3000, 5000, 7000) }},
		{"half turn of marks", plan.Rotate{Items: []plan.Ref{ref(plan.KindTarget, "T1"), ref(plan.KindObserver, "O1")}, Degrees: -180}, "rotate items", marks,
			func(p *plan.Parts) {
				n := 270.0
				p.Targets[0].At, p.Targets[0].Face, p.Targets[0].Normal = pt(-5, -5), &[2]exact.Pt{pt(0, -5), pt(-10, -5)}, &n
				p.Observers[0].At, p.Observers[0].Heading = pt(-100, -100), 180
			}},
		{"a turn by 30 degrees", plan.Rotate{Items: []plan.Ref{w2}, About: pt(5000, 3000), Degrees: 30}, "rotate wall", obstacles,
			func(p *plan.Parts) { p.Walls[1].Line = chain(5000, 3000, 8464, 5000) }},
		{"a copy is turned", plan.Rotate{Items: []plan.Ref{w2}, About: pt(5000, 3000), Degrees: 180, Copy: true}, "rotate wall", obstacles,
			func(p *plan.Parts) {
				w := p.Walls[1]
				w.ID, w.Line = "W8", chain(5000, 3000, 1000, 3000)
				p.Walls = append(p.Walls, w)
				p.Openings = append(p.Openings, plan.Opening{ID: "D4", Wall: "W8", At: 0, Width: 900})
			}},
		{"an upright mirror", plan.Mirror{Items: []plan.Ref{w2, ref(plan.KindTarget, "T1")}, Line: [2]exact.Pt{pt(0, 0), pt(0, 9)}}, "mirror items", obstacles | marks,
			func(p *plan.Parts) {
				p.Walls[1].Line, p.Openings[2].SideRight = chain(-5000, 3000, -9000, 3000), true
				p.Targets[0].At, p.Targets[0].Face = pt(-5, 5), &[2]exact.Pt{pt(-10, 5), pt(0, 5)}
			}},
		{"a mirrored ring winds the same way", plan.Mirror{Items: []plan.Ref{ref(plan.KindZone, "Z1")}, Line: [2]exact.Pt{pt(0, 0), pt(0, 9)}}, "mirror zone", marks,
			func(p *plan.Parts) { p.Zones[0].Ring = chain(0, 0, 0, 9, -9, 0) }},
		{"duplicate", plan.Duplicate{Items: []plan.Ref{w2}, Columns: 2, Rows: 1, Step: exact.Vec{X: 10, Y: 20}}, "duplicate wall", obstacles,
			func(p *plan.Parts) {
				w := p.Walls[1]
				w.ID, w.Line = "W8", chain(5010, 3000, 9010, 3000)
				p.Walls = append(p.Walls, w)
				p.Openings = append(p.Openings, plan.Opening{ID: "D4", Wall: "W8", At: 0, Width: 900})
			}},
		{"duplicate in rows", plan.Duplicate{Items: []plan.Ref{ref(plan.KindStart, "S1")}, Columns: 2, Rows: 2, Step: exact.Vec{X: 10, Y: 20}}, "duplicate start", marks,
			func(p *plan.Parts) {
				p.Starts = append(p.Starts, plan.Start{ID: "S2", At: pt(19, 9)}, plan.Start{ID: "S3", At: pt(9, 29)}, plan.Start{ID: "S4", At: pt(19, 29)})
			}},
		{"a route goes between the copies", plan.Duplicate{Items: []plan.Ref{ref(plan.KindRoute, "R1"), ref(plan.KindStart, "S1"), ref(plan.KindTarget, "T1")}, Columns: 2, Rows: 1},
			"duplicate items", marks, func(p *plan.Parts) {
				t := t1
				t.ID = "T2"
				p.Starts, p.Targets = append(p.Starts, plan.Start{ID: "S2", At: pt(9, 9)}), append(p.Targets, t)
				p.Routes = append(p.Routes, plan.Route{ID: "R2", From: "S2", To: "T2", Via: chain(1, 1, 2, 2)})
			}},
		{"parallel to the left", plan.ParallelWall{Wall: "W1", Distance: 500}, "parallel wall", obstacles,
			func(p *plan.Parts) {
				p.Walls = append(p.Walls, plan.Wall{ID: "W8", Line: chain(0, 500, 4500, 500, 4500, 3000), Height: plan.Ceiling})
			}},
		{"parallel to the right", plan.ParallelWall{Wall: "W1", Distance: 500, Right: true}, "parallel wall", obstacles,
			func(p *plan.Parts) {
				p.Walls = append(p.Walls, plan.Wall{ID: "W8", Line: chain(0, -500, 5500, -500, 5500, 3000), Height: plan.Ceiling})
			}},
		{"parallel of a ring is a ring", plan.ParallelWall{Wall: "W7", Distance: 100, Right: true}, "parallel wall", obstacles,
			func(p *plan.Parts) {
				p.Walls = append(p.Walls, plan.Wall{ID: "W8", Line: chain(-241, -100, 600, -100, 600, 741, -241, -100), Height: plan.Ceiling})
			}},
		{"split between two doors", plan.SplitWall{Wall: "W1", Segment: 0, At: pt(2500, 0)}, "split wall", obstacles,
			func(p *plan.Parts) {
				w := p.Walls[0]
				p.Walls[0].Line = chain(0, 0, 2500, 0)
				w.ID, w.Line = "W8", chain(2500, 0, 5000, 0, 5000, 3000)
				p.Walls = append(p.Walls, w)
				p.Openings[1].Wall, p.Openings[1].At = "W8", 500
			}},
		{"split at a corner", plan.SplitWall{Wall: "W1", Segment: 0, At: pt(5000, 0)}, "split wall", obstacles,
			func(p *plan.Parts) {
				w := p.Walls[0]
				p.Walls[0].Line = chain(0, 0, 5000, 0)
				w.ID, w.Line = "W8", chain(5000, 0, 5000, 3000)
				p.Walls = append(p.Walls, w)
			}},
		{"split a closed wall", plan.SplitWall{Wall: "W7", Segment: 1, At: pt(500, 200)}, "split wall", obstacles,
			func(p *plan.Parts) {
				w := p.Walls[2]
				p.Walls[2].Line = chain(0, 0, 500, 0, 500, 200)
				w.ID, w.Line = "W8", chain(500, 200, 500, 500, 0, 0)
				p.Walls = append(p.Walls, w)
			}},
		{"another door beside a door", plan.DuplicateOpening{Opening: "D1"}, "duplicate opening", obstacles, func(p *plan.Parts) {
			p.Openings = append(p.Openings, plan.Opening{ID: "D4", Wall: "W1", At: 1900, Width: 900})
		}},
		{"close a wall", plan.CloseWall{Wall: "W1"}, "close wall", obstacles, func(p *plan.Parts) { p.Walls[0].Line = chain(0, 0, 5000, 0, 5000, 3000, 0, 0) }},
		{"lock", plan.Mark{Items: []plan.Ref{w1, ref(plan.KindObserver, "O2"), ref(plan.KindUnderlay, "")}, Locked: &yes}, "lock items", obstacles | marks | sheet,
			func(p *plan.Parts) {
				p.Walls[0].Locked, p.Observers[1].Locked = true, true
				u := *p.Sheet.Underlay
				u.Locked = true
				p.Sheet.Underlay = &u
			}},
		{"show", plan.Mark{Items: []plan.Ref{w1}, Hidden: &no}, "show wall", obstacles, func(p *plan.Parts) {}},
		{"change many", plan.SetItems{Text: "change thickness", Walls: []plan.Wall{{ID: "W7", Line: chain(0, 0, 9, 9), Height: 5}, {ID: "W2", Line: chain(0, 0, 900, 0), Height: 6}}},
			"change thickness", obstacles, func(p *plan.Parts) {
				p.Walls[1], p.Walls[2] = plan.Wall{ID: "W2", Line: chain(0, 0, 900, 0), Height: 6}, plan.Wall{ID: "W7", Line: chain(0, 0, 9, 9), Height: 5}
			}},
	}
	for _, tt := range tests {
		t.Run(tt.name, func(t *testing.T) { checkEdit(t, room, tt.edit, tt.label, tt.touches, tt.want) })
	}
}

// checkEdit applies an edit to a plan and holds what comes of it, and that the plan it was given is as it was.
func checkEdit(t *testing.T, of func() *plan.Plan, e plan.Edit, label string, touches int, want func(*plan.Parts)) {
	t.Helper()
	p := of()
	q, err := e.Apply(p)
	if err != nil {
		t.Fatal(err)
	}
	if e.Label() != label {
		t.Errorf("label %q, want %q", e.Label(), label)
	}
	parts := of().Parts()
	want(&parts)
	if got := q.Parts(); !same(got, parts) {
		t.Errorf("got\n%+v\nwant\n%+v", got, parts)
	}
	if got := touched(p, q); touches >= 0 && got != touches {
		t.Errorf("touches parts %b, want %b", got, touches)
	}
	if !same(p.Parts(), of().Parts()) {
		t.Errorf("the old plan changed: %+v", p.Parts())
	}
}

// ends is a plan of walls that cross and miss each other: A runs east with doors, B north through it, C lies beyond A's end, F
// crosses B twice, and G lies before D with two pieces.
func endsPlan() *plan.Plan {
	return plan.From(plan.Parts{
		Walls: []plan.Wall{
			{ID: "A", Line: chain(0, 0, 4000, 0, 10_000, 0), Height: plan.Ceiling, Thickness: 100, Justify: plan.Left},
			{ID: "B", Line: chain(8000, -3000, 8000, 3000), Height: plan.Ceiling},
			{ID: "C", Line: chain(12_000, -1000, 13_000, 1000), Height: plan.Ceiling},
			{ID: "D", Line: chain(2000, -500, 2000, 500), Height: plan.Ceiling},
			{ID: "E", Line: chain(15_000, 0, 10_000, 0), Height: plan.Ceiling, Thickness: 100, Justify: plan.Right},
			{ID: "F", Line: chain(7000, -2000, 9000, -2000, 9000, 2000, 7000, 2000), Height: plan.Ceiling},
			{ID: "G", Line: chain(1000, 6000, 3000, 6000, 3000, 4000, 1000, 4000), Height: plan.Ceiling},
		},
		Openings: []plan.Opening{{ID: "D1", Wall: "A", At: 500, Width: 900}, {ID: "D2", Wall: "A", Segment: 1, At: 4500, Width: 900},
			{ID: "D3", Wall: "A", Segment: 1, At: 1000, Width: 900}, {ID: "D4", Wall: "E", At: 100, Width: 900}},
	})
}

func TestMeetEdits(t *testing.T) {
	tests := []struct {
		name string
		edit plan.Edit
		want func(*plan.Parts)
	}{
		{"cut back", plan.CutBack{Wall: "A", To: "B"}, func(p *plan.Parts) {
			p.Walls[0].Line = chain(0, 0, 4000, 0, 8000, 0)
			p.Openings = append(p.Openings[:1:1], p.Openings[2:]...)
		}},
		{"cut back the beginning", plan.CutBack{Wall: "A", To: "D", Start: true}, func(p *plan.Parts) {
			p.Walls[0].Line = chain(2000, 0, 4000, 0, 10_000, 0)
			p.Openings = p.Openings[1:]
		}},
		{"cut back where it is crossed last", plan.CutBack{Wall: "B", To: "F"}, func(p *plan.Parts) { p.Walls[1].Line = chain(8000, -3000, 8000, 2000) }},
		{"cut back where its beginning is crossed first", plan.CutBack{Wall: "B", To: "F", Start: true}, func(p *plan.Parts) {
			p.Walls[1].Line = chain(8000, -2000, 8000, 3000)
		}},
		{"lengthen to the nearest piece", plan.Lengthen{Wall: "D", To: "G"}, func(p *plan.Parts) { p.Walls[3].Line = chain(2000, -500, 2000, 4000) }},
		{"lengthen", plan.Lengthen{Wall: "A", To: "C"}, func(p *plan.Parts) { p.Walls[0].Line = chain(0, 0, 4000, 0, 12_500, 0) }},
		{"lengthen the beginning", plan.Lengthen{Wall: "E", To: "C"}, nil},
		{"join drops the corner between straight pieces", plan.JoinWalls{Walls: []string{"A", "E"}}, func(p *plan.Parts) {
			p.Walls = append(p.Walls[:4:4], p.Walls[5:]...)
			p.Walls[0].Line = chain(0, 0, 4000, 0, 15_000, 0)
			p.Openings[3] = plan.Opening{ID: "D4", Wall: "A", Segment: 1, At: 10_000, Width: 900, HingeEnd: true, SideRight: true}
		}},
		{"join in the other direction", plan.JoinWalls{Walls: []string{"E", "A"}}, func(p *plan.Parts) {
			p.Walls = p.Walls[1:]
			p.Walls[3].Line = chain(15_000, 0, 4000, 0, 0, 0)
			p.Openings[0] = plan.Opening{ID: "D1", Wall: "E", Segment: 1, At: 2600, Width: 900, HingeEnd: true, SideRight: true}
			p.Openings[1] = plan.Opening{ID: "D2", Wall: "E", At: 5600, Width: 900, HingeEnd: true, SideRight: true}
			p.Openings[2] = plan.Opening{ID: "D3", Wall: "E", At: 9100, Width: 900, HingeEnd: true, SideRight: true}
		}},
	}
	for _, tt := range tests {
		t.Run(tt.name, func(t *testing.T) {
			if tt.want == nil {
				if _, err := tt.edit.Apply(endsPlan()); err == nil {
					t.Error("no error")
				}
				return
			}
			checkEdit(t, endsPlan, tt.edit, tt.edit.Label(), obstacles, tt.want)
		})
	}
}

func TestShapeEditErrors(t *testing.T) {
	tests := []struct {
		of   func() *plan.Plan
		edit plan.Edit
		want string
	}{
		{room, plan.Rotate{Items: []plan.Ref{ref(plan.KindOpening, "D1")}, Degrees: 90}, "opening D1: can only be rotated with its wall"},
		{room, plan.Rotate{Items: []plan.Ref{ref(plan.KindWall, "W9")}, Degrees: 90}, "wall W9: is not in the plan"},
		{room, plan.Rotate{Items: []plan.Ref{ref(plan.KindWall, "W1")}, About: pt(-plan.MaxCoord, 0), Degrees: 180}, "wall W1: lies outside"},
		{room, plan.Rotate{Items: []plan.Ref{ref(plan.KindWall, "W1")}, About: pt(-plan.MaxCoord, 0), Degrees: 179}, "wall W1: lies outside"},
		{room, plan.Rotate{Items: []plan.Ref{ref(plan.KindWalker, "")}}, "walker: cannot be rotated"},
		{room, plan.Rotate{Degrees: math.NaN()}, "plan: needs an angle"},
		{room, plan.Mirror{Items: []plan.Ref{ref(plan.KindUnderlay, "")}, Line: [2]exact.Pt{pt(0, 0), pt(0, 1)}}, "underlay: cannot be mirrored"},
		{room, plan.Mirror{}, "plan: needs a line through two points"},
		{room, plan.Duplicate{Items: []plan.Ref{ref(plan.KindWall, "W1")}, Columns: 1000, Rows: 1000}, "plan: would get more than 100000"},
		{room, plan.Duplicate{Items: []plan.Ref{ref(plan.KindWall, "W1")}, Columns: 0, Rows: 1}, "plan: needs one column"},
		{room, plan.Duplicate{Items: []plan.Ref{ref(plan.KindWall, "W1")}, Columns: 2, Rows: 1, Step: exact.Vec{X: plan.MaxCoord}}, "wall W8: lies outside"},
		{room, plan.ParallelWall{Wall: "W1", Distance: 0}, "wall W1: needs a distance"},
		{room, plan.ParallelWall{Wall: "W7", Distance: 400}, "wall W7: has a piece too short"},
		{room, plan.SplitWall{Wall: "W1", At: pt(1500, 0)}, "opening D1: lies across the place"},
		{room, plan.SplitWall{Wall: "W1", At: pt(0, 0)}, "wall W1: ends there"},
		{room, plan.SplitWall{Wall: "W1", Segment: 1, At: pt(5000, 3000)}, "wall W1: ends there"},
		{room, plan.SplitWall{Wall: "W1", At: pt(2500, 1)}, "wall W1: does not run through the place"},
		{room, plan.SplitWall{Wall: "W7", At: pt(0, 0)}, "wall W7: ends there"},
		{room, plan.CloseWall{Wall: "W2"}, "wall W2: has 2 corners"},
		{room, plan.CloseWall{Wall: "W7"}, "wall W7: is closed already"},
		{room, plan.JoinWalls{Walls: []string{"W1", "W2"}}, "wall W2: is not as thick"},
		{room, plan.JoinWalls{Walls: []string{"W1", "W7"}}, "wall W7: is closed"},
		{room, plan.JoinWalls{Walls: []string{"W1", "W1"}}, "wall W1: is named twice"},
		{room, plan.JoinWalls{Walls: []string{"W1"}}, "plan: needs two walls"},
		{endsPlan, plan.JoinWalls{Walls: []string{"B", "D"}}, "wall D: does not meet an end"},
		{endsPlan, plan.CutBack{Wall: "A", To: "C"}, "wall A: does not cross wall C"},
		{endsPlan, plan.CutBack{Wall: "A", To: "A"}, "wall A: cannot meet itself"},
		{endsPlan, plan.CutBack{Wall: "B", To: "E"}, "wall B: does not cross wall E"},
		{endsPlan, plan.Lengthen{Wall: "A", To: "B"}, "wall A: does not meet wall B straight on"},
		{endsPlan, plan.Lengthen{Wall: "A", To: "E"}, "wall A: ends on wall E already"},
		{room, plan.Lengthen{Wall: "W7", To: "W1"}, "wall W7: is closed"},
		{room, plan.Mark{Items: []plan.Ref{ref(plan.KindFloor, "")}}, "floor: cannot be locked"},
		{room, plan.Mark{Items: []plan.Ref{ref(plan.KindStart, "S4")}}, "start S4: is not in the plan"},
		{room, plan.SetItems{Walls: []plan.Wall{{ID: "W1", Line: chain(0, 0, 800, 0), Height: 5}}}, "opening D1: reaches beyond the end"},
		{room, plan.SetItems{Starts: []plan.Start{{ID: "S7"}}}, "start S7: is not in the plan"},
		{room, plan.SetItems{Openings: []plan.Opening{{ID: "D1", Wall: "W9"}}}, `opening D1: names wall "W9"`},
		{room, plan.SetItems{Observers: []plan.Observer{{ID: "O1"}}}, "observer O1: needs an eye height"},
	}
	for _, tt := range tests {
		t.Run(tt.want, func(t *testing.T) {
			p := tt.of()
			q, err := tt.edit.Apply(p)
			if err == nil || q != nil || !strings.HasPrefix(err.Error(), tt.want) {
				t.Errorf("got %v, %v; want %s ...", q, err, tt.want)
			}
			if !same(p.Parts(), tt.of().Parts()) {
				t.Errorf("the old plan changed: %+v", p.Parts())
			}
		})
	}
}

// TestPaste puts a part of one plan into another: new ids, openings with their walls, routes with their ends or not at all.
func TestPaste(t *testing.T) {
	yes := true
	p, err := plan.Mark{Items: []plan.Ref{ref(plan.KindWall, "W2")}, Locked: &yes}.Apply(room())
	if err != nil {
		t.Fatal(err)
	}
	clip := plan.Extract(p, []plan.Ref{ref(plan.KindWall, "W2"), ref(plan.KindOpening, "D1"), ref(plan.KindStart, "S1"), ref(plan.KindRoute, "R1"), ref(plan.KindFloor, "")})
	into := plan.From(plan.Parts{Walls: []plan.Wall{{ID: "W41", Line: chain(0, 0, 9, 9), Height: 5}}, Walker: plan.DefaultWalker()})
	e := plan.Paste{Clip: clip, By: exact.Vec{X: 5}}
	q, err := e.Apply(into)
	if err != nil {
		t.Fatal(err)
	}
	got := q.Parts()
	if len(got.Walls) != 2 || got.Walls[1].ID != "W42" || got.Walls[1].Locked || !got.Walls[1].Line.Equal(chain(5005, 3000, 9005, 3000)) {
		t.Errorf("walls %+v", got.Walls)
	}
	if len(got.Openings) != 1 || got.Openings[0].Wall != "W42" || got.Openings[0].ID != "D1" {
		t.Errorf("openings %+v: D3 goes with its wall, D1 stays behind without", got.Openings)
	}
	if len(got.Starts) != 1 || len(got.Routes) != 0 {
		t.Errorf("starts %+v, routes %+v: a route without its target is left out", got.Starts, got.Routes)
	}
	if !got.Floor.Equal(chain(5, 0, 10_005, 0, 10_005, 10_000, 5, 10_000)) {
		t.Errorf("floor %+v", got.Floor)
	}
	if added := e.Added(into); len(added) != 2 || added[0] != ref(plan.KindWall, "W42") || added[1] != ref(plan.KindStart, "S1") {
		t.Errorf("added %v", added)
	}
	again, err := plan.Paste{Clip: clip}.Apply(room())
	if err != nil || !again.Floor().Equal(room().Floor()) {
		t.Errorf("a plan with a floor keeps it: %v, %v", again.Floor(), err)
	}
	if r := again.Parts().Routes; len(r) != 2 || r[1].From != "S2" || r[1].To != "T1" {
		t.Errorf("in its own plan a route goes on to the target there: %+v", r)
	}
}
