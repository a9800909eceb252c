package plan_test

import (
	"fmt"
	"math"
	"reflect"
	"strings"
	"testing"

	"enfilade/solver/exact"
	"enfilade/solver/plan"
)

func pt(x, y int32) exact.Pt { return exact.Pt{X: x, Y: y} }

func chain(xy ...int32) plan.Chain {
	var pts []exact.Pt
	for i := 0; i < len(xy); i += 2 {
		pts = append(pts, pt(xy[i], xy[i+1]))
	}
	return plan.ChainOf(pts...)
}

func ref(kind plan.Kind, id string) plan.Ref { return plan.Ref{Kind: kind, ID: id} }

// room is a plan with one or two of everything.
func room() *plan.Plan {
	normal := 90.0
	return plan.From(plan.Parts{
		Floor: chain(0, 0, 10_000, 0, 10_000, 10_000, 0, 10_000),
		Walls: []plan.Wall{
			{ID: "W1", Line: chain(0, 0, 5000, 0, 5000, 3000), Height: plan.Ceiling},
			{ID: "W2", Line: chain(5000, 3000, 9000, 3000), Height: plan.Ceiling, Thickness: 200},
			{ID: "W7", Line: chain(0, 0, 500, 0, 500, 500, 0, 0), Height: plan.Ceiling},
		},
		Openings: []plan.Opening{{ID: "D1", Wall: "W1", At: 1000, Width: 900}, {ID: "D2", Wall: "W1", At: 3000, Width: 900},
			{ID: "D3", Wall: "W2", At: 0, Width: 900}},
		Blocks: []plan.Block{{ID: "B1", Ring: plan.CircleRing(pt(700, 700), 50, 12), Height: plan.Ceiling, Circle: &plan.Circle{At: pt(700, 700), Radius: 50}}},
		Zones:  []plan.Zone{{ID: "Z1", Name: "Nook", Ring: chain(0, 0, 9, 0, 0, 9)}},
		Observers: []plan.Observer{{ID: "O1", At: pt(100, 100), Eye: 16_000, View: 360, Colour: -1},
			{ID: "O2", At: pt(200, 200), Eye: 16_000, View: 90, Colour: 1}},
		Targets: []plan.Target{{ID: "T1", At: pt(5, 5), Face: &[2]exact.Pt{pt(0, 5), pt(10, 5)}, Normal: &normal, Colour: -1}},
		Starts:  []plan.Start{{ID: "S1", At: pt(9, 9)}},
		Routes:  []plan.Route{{ID: "R1", From: "S1", Via: chain(1, 1, 2, 2), To: "T1"}},
		Walker:  plan.DefaultWalker(),
		Sheet:   plan.Sheet{Unit: "m", Underlay: &plan.Underlay{Image: "a.png", At: pt(3, 3), MMPerPixel: 1, Opacity: 1}},
	})
}

// Parts of a plan that an edit may touch.
const (
	none      = 0
	obstacles = 1 << iota
	marks
	sheet
)

func touched(p, q *plan.Plan) int {
	t := none
	if p.Obstacles() != q.Obstacles() {
		t |= obstacles
	}
	if p.Marks() != q.Marks() {
		t |= marks
	}
	if p.Sheet() != q.Sheet() {
		t |= sheet
	}
	return t
}

func TestEdit(t *testing.T) {
	wall := func(change func(*plan.Wall)) plan.Wall { w, _ := room().Wall("W1"); change(&w); return w }
	eye, _ := room().Observer("O1")
	eye.Heading = 45
	underlay := *room().Sheet().Underlay
	underlay.At = pt(4, 4)
	tests := []struct {
		name    string
		edit    plan.Edit
		label   string
		touches int
		want    func(*plan.Parts) // what the edit makes of room()
	}{
		{"add wall", plan.AddWall{Wall: plan.Wall{Line: chain(0, 0, 1, 1), Height: 9, Kind: plan.Low}}, "draw low wall", obstacles, func(p *plan.Parts) {
			p.Walls = append(p.Walls, plan.Wall{ID: "W8", Line: chain(0, 0, 1, 1), Height: 9, Kind: plan.Low})
		}},
		{"add with an id", plan.AddStart{Start: plan.Start{ID: "door", At: pt(1, 1)}}, "place start", marks, func(p *plan.Parts) {
			p.Starts = append(p.Starts, plan.Start{ID: "door", At: pt(1, 1)})
		}},
		{"add opening between two", plan.AddOpening{Opening: plan.Opening{Wall: "W1", At: 1900, Width: 1100, Leaf: plan.SolidLeaf}}, "cut door", obstacles,
			func(p *plan.Parts) {
				p.Openings = append(p.Openings, plan.Opening{ID: "D4", Wall: "W1", At: 1900, Width: 1100, Leaf: plan.SolidLeaf})
			}},
		{"add block", plan.AddBlock{Block: plan.Block{Ring: chain(0, 0, 1, 0, 0, 1), Height: plan.Ceiling}}, "draw block", obstacles, func(p *plan.Parts) {
			p.Blocks = append(p.Blocks, plan.Block{ID: "B2", Ring: chain(0, 0, 1, 0, 0, 1), Height: plan.Ceiling})
		}},
		{"add zone", plan.AddZone{Zone: plan.Zone{Ring: chain(0, 0, 1, 0, 0, 1)}}, "draw zone", marks, func(p *plan.Parts) {
			p.Zones = append(p.Zones, plan.Zone{ID: "Z2", Ring: chain(0, 0, 1, 0, 0, 1)})
		}},
		{"add observer", plan.AddObserver{Observer: plan.Observer{At: pt(1, 1), Eye: 5, View: 1}}, "place observer", marks, func(p *plan.Parts) {
			p.Observers = append(p.Observers, plan.Observer{ID: "O3", At: pt(1, 1), Eye: 5, View: 1})
		}},
		{"add target", plan.AddTarget{Target: plan.Target{At: pt(1, 1)}}, "place target", marks, func(p *plan.Parts) {
			p.Targets = append(p.Targets, plan.Target{ID: "T2", At: pt(1, 1)})
		}},
		{"add route", plan.AddRoute{Route: plan.Route{From: "S1"}}, "draw route", marks, func(p *plan.Parts) {
			p.Routes = append(p.Routes, plan.Route{ID: "R2", From: "S1"})
		}},
		{"set wall shorter slides its openings", plan.SetWall{Wall: wall(func(w *plan.Wall) { w.Line = chain(0, 0, 3800, 0) })}, "change wall", obstacles,
			func(p *plan.Parts) { p.Walls[0].Line = chain(0, 0, 3800, 0); p.Openings[1].At = 2900 }},
		{"set opening", plan.SetOpening{Opening: plan.Opening{ID: "D1", Wall: "W2", At: 900, Width: 3100}}, "change opening", obstacles, func(p *plan.Parts) {
			p.Openings[0] = plan.Opening{ID: "D1", Wall: "W2", At: 900, Width: 3100}
		}},
		{"set block", plan.SetBlock{Block: plan.Block{ID: "B1", Ring: chain(0, 0, 1, 0, 0, 1), Height: 4}}, "change block", obstacles, func(p *plan.Parts) {
			p.Blocks[0] = plan.Block{ID: "B1", Ring: chain(0, 0, 1, 0, 0, 1), Height: 4}
		}},
		{"set zone", plan.SetZone{Zone: plan.Zone{ID: "Z1", Ring: chain(0, 0, 1, 0, 0, 1)}}, "change zone", marks, func(p *plan.Parts) {
			p.Zones[0] = plan.Zone{ID: "Z1", Ring: chain(0, 0, 1, 0, 0, 1)}
		}},
		{"set observer", plan.SetObserver{Observer: eye}, "change observer", marks, func(p *plan.Parts) { p.Observers[0].Heading = 45 }},
		{"set target", plan.SetTarget{Target: plan.Target{ID: "T1", At: pt(8, 8)}}, "change target", marks, func(p *plan.Parts) {
			p.Targets[0] = plan.Target{ID: "T1", At: pt(8, 8)}
		}},
		{"set start", plan.SetStart{Start: plan.Start{ID: "S1", At: pt(8, 8)}}, "change start", marks, func(p *plan.Parts) { p.Starts[0].At = pt(8, 8) }},
		{"set route", plan.SetRoute{Route: plan.Route{ID: "R1"}}, "change route", marks, func(p *plan.Parts) { p.Routes[0] = plan.Route{ID: "R1"} }},
		{"set walker", plan.SetWalker{Walker: plan.Walker{Pace: 1, Eye: 9}}, "change walker", marks, func(p *plan.Parts) { p.Walker = plan.Walker{Pace: 1, Eye: 9} }},
		{"set floor", plan.SetFloor{Ring: chain(0, 0, 1, 0, 0, 1)}, "draw floor", obstacles, func(p *plan.Parts) { p.Floor = chain(0, 0, 1, 0, 0, 1) }},
		{"no floor", plan.SetFloor{}, "draw floor", obstacles, func(p *plan.Parts) { p.Floor = plan.Chain{} }},
		{"set sheet", plan.SetSheet{Sheet: plan.Sheet{Title: "Deck", Unit: "ft"}}, "change title", sheet, func(p *plan.Parts) { p.Sheet = plan.Sheet{Title: "Deck", Unit: "ft"} }},
		{"move observer, twice told", plan.MoveItems{Items: []plan.Ref{ref(plan.KindObserver, "O2"), ref(plan.KindObserver, "O2")}, By: exact.Vec{X: 1, Y: -1}},
			"move items", marks, func(p *plan.Parts) { p.Observers[1].At = pt(201, 199) }},
		{"move marks", plan.MoveItems{Items: []plan.Ref{ref(plan.KindTarget, "T1"), ref(plan.KindStart, "S1"), ref(plan.KindZone, "Z1"), ref(plan.KindRoute, "R1")},
			By: exact.Vec{X: 1}}, "move items", marks, func(p *plan.Parts) {
			p.Targets[0].At, p.Targets[0].Face, p.Starts[0].At = pt(6, 5), &[2]exact.Pt{pt(1, 5), pt(11, 5)}, pt(10, 9)
			p.Zones[0].Ring, p.Routes[0].Via = chain(1, 0, 10, 0, 1, 9), chain(2, 1, 3, 2)
		}},
		{"move wall", plan.MoveItems{Items: []plan.Ref{ref(plan.KindWall, "W1"), ref(plan.KindOpening, "D1")}, By: exact.Vec{X: 100}}, "move items", obstacles,
			func(p *plan.Parts) { p.Walls[0].Line = chain(100, 0, 5100, 0, 5100, 3000) }},
		{"move opening", plan.MoveItems{Items: []plan.Ref{ref(plan.KindOpening, "D1")}, By: exact.Vec{X: -400, Y: 300}}, "move opening", obstacles,
			func(p *plan.Parts) { p.Openings[0].At = 600 }},
		{"move opening as far as it goes", plan.MoveItems{Items: []plan.Ref{ref(plan.KindOpening, "D2")}, By: exact.Vec{X: 1 << 30}}, "move opening", obstacles,
			func(p *plan.Parts) { p.Openings[1].At = 4100 }},
		{"move block and floor", plan.MoveItems{Items: []plan.Ref{ref(plan.KindBlock, "B1"), ref(plan.KindFloor, "")}, By: exact.Vec{X: 300, Y: 300}}, "move items", obstacles,
			func(p *plan.Parts) {
				p.Blocks[0].Ring, p.Blocks[0].Circle = plan.CircleRing(pt(1000, 1000), 50, 12), &plan.Circle{At: pt(1000, 1000), Radius: 50}
				p.Floor = chain(300, 300, 10_300, 300, 10_300, 10_300, 300, 10_300)
			}},
		{"move underlay", plan.MoveItems{Items: []plan.Ref{ref(plan.KindUnderlay, "")}, By: exact.Vec{X: 1, Y: 1}}, "move underlay", sheet,
			func(p *plan.Parts) { p.Sheet.Underlay = &underlay }},
		{"move corner alone", plan.MoveCorner{Corner: plan.Corner{Item: ref(plan.KindWall, "W1"), Index: 2}, To: pt(5000, 4000)}, "move corner", obstacles,
			func(p *plan.Parts) { p.Walls[0].Line = chain(0, 0, 5000, 0, 5000, 4000) }},
		{"move corner and what meets it", plan.MoveCorner{Corner: plan.Corner{Item: ref(plan.KindWall, "W1"), Index: 2}, To: pt(5000, 4000), Along: true},
			"move corner", obstacles, func(p *plan.Parts) {
				p.Walls[0].Line, p.Walls[1].Line = chain(0, 0, 5000, 0, 5000, 4000), chain(5000, 4000, 9000, 3000)
			}},
		{"closed wall stays closed", plan.MoveCorner{Corner: plan.Corner{Item: ref(plan.KindWall, "W7"), Index: 3}, To: pt(-5, -5)}, "move corner", obstacles,
			func(p *plan.Parts) { p.Walls[2].Line = chain(-5, -5, 500, 0, 500, 500, -5, -5) }},
		{"corner of the floor", plan.MoveCorner{Corner: plan.Corner{Item: ref(plan.KindFloor, ""), Index: 1}, To: pt(7, 7), Along: true}, "move corner", obstacles,
			func(p *plan.Parts) { p.Floor = chain(0, 0, 7, 7, 10_000, 10_000, 0, 10_000) }},
		{"a column's corner makes it a block", plan.MoveCorner{Corner: plan.Corner{Item: ref(plan.KindBlock, "B1"), Index: 0}, To: pt(800, 700)}, "move corner", obstacles,
			func(p *plan.Parts) {
				pts := p.Blocks[0].Ring.Points()
				pts[0] = pt(800, 700)
				p.Blocks[0].Ring, p.Blocks[0].Circle = plan.ChainOf(pts...), nil
			}},
		{"corners of zone and route", plan.MoveCorners{Corners: []plan.Corner{{Item: ref(plan.KindZone, "Z1"), Index: 2}, {Item: ref(plan.KindRoute, "R1"), Index: 0}},
			By: exact.Vec{X: 5}}, "move corner", marks, func(p *plan.Parts) { p.Zones[0].Ring, p.Routes[0].Via = chain(0, 0, 9, 0, 5, 9), chain(6, 1, 2, 2) }},
		{"shortened piece slides its openings", plan.MoveCorners{Corners: []plan.Corner{{Item: ref(plan.KindWall, "W1"), Index: 1}}, By: exact.Vec{X: -1200}},
			"move corner", obstacles, func(p *plan.Parts) { p.Walls[0].Line = chain(0, 0, 3800, 0, 5000, 3000); p.Openings[1].At = 2900 }},
		{"delete wall", plan.Delete{Items: []plan.Ref{ref(plan.KindWall, "W1")}}, "delete wall", obstacles, func(p *plan.Parts) { p.Walls, p.Openings = p.Walls[1:], p.Openings[2:] }},
		{"delete start", plan.Delete{Items: []plan.Ref{ref(plan.KindStart, "S1")}}, "delete start", marks, func(p *plan.Parts) { p.Starts, p.Routes = nil, nil }},
		{"delete much", plan.Delete{Items: []plan.Ref{ref(plan.KindFloor, ""), ref(plan.KindUnderlay, ""), ref(plan.KindBlock, "B1"), ref(plan.KindOpening, "D2"),
			ref(plan.KindZone, "Z1"), ref(plan.KindObserver, "O1"), ref(plan.KindTarget, "T1")}}, "delete items", obstacles | marks | sheet, func(p *plan.Parts) {
			p.Floor, p.Sheet.Underlay, p.Blocks, p.Zones, p.Targets, p.Routes = plan.Chain{}, nil, nil, nil, nil, nil
			p.Openings, p.Observers = append(p.Openings[:1:1], p.Openings[2]), p.Observers[1:]
		}},
		{"steps", plan.Steps{Text: "draw corner", Edits: []plan.Edit{plan.AddWall{Wall: plan.Wall{Line: chain(1, 1, 2, 2), Height: 7}},
			plan.MoveCorner{Corner: plan.Corner{Item: ref(plan.KindWall, "W8")}, To: pt(0, 0)}}}, "draw corner", obstacles, func(p *plan.Parts) {
			p.Walls = append(p.Walls, plan.Wall{ID: "W8", Line: chain(0, 0, 2, 2), Height: 7})
		}},
	}
	for _, tt := range tests {
		t.Run(tt.name, func(t *testing.T) {
			p := room()
			q, err := tt.edit.Apply(p)
			if err != nil {
				t.Fatal(err)
			}
			if tt.edit.Label() != tt.label {
				t.Errorf("label %q, want %q", tt.edit.Label(), tt.label)
			}
			want := room().Parts()
			tt.want(&want)
			if got := q.Parts(); !same(got, want) {
				t.Errorf("got\n%+v\nwant\n%+v", got, want)
			}
			if got := touched(p, q); got != tt.touches {
				t.Errorf("touches parts %b, want %b", got, tt.touches)
			}
			if !same(p.Parts(), room().Parts()) {
				t.Errorf("the old plan changed: %+v", p.Parts())
			}
		})
	}
}

// same reports whether two plans hold the same, with empty lists equal to missing ones.
func same(a, b plan.Parts) bool {
	for _, p := range []*plan.Parts{&a, &b} {
		v := reflect.ValueOf(p).Elem()
		for i := range v.NumField() {
			if f := v.Field(i); f.Kind() == reflect.Slice && f.Len() == 0 {
				f.SetZero()
			}
		}
	}
	return reflect.DeepEqual(a, b)
}

func TestEditErrors(t *testing.T) {
	far := chain(0, 0, plan.MaxCoord+1, 0)
	nan := math.NaN()
	move := func(kind plan.Kind, id string) plan.Edit {
		return plan.MoveItems{Items: []plan.Ref{ref(kind, id)}, By: exact.Vec{X: plan.MaxCoord}}
	}
	corner := func(kind plan.Kind, id string, index int, to exact.Pt) plan.Edit {
		return plan.MoveCorner{Corner: plan.Corner{Item: ref(kind, id), Index: index}, To: to}
	}
	wall := plan.Wall{Line: chain(0, 0, 9, 9), Height: plan.Ceiling}
	with := func(change func(*plan.Wall)) plan.Edit { w := wall; change(&w); return plan.AddWall{Wall: w} }
	eye := func(change func(*plan.Observer)) plan.Edit {
		o, _ := room().Observer("O1")
		change(&o)
		return plan.SetObserver{Observer: o}
	}
	target := func(change func(*plan.Target)) plan.Edit {
		o, _ := room().Target("T1")
		change(&o)
		return plan.SetTarget{Target: o}
	}
	walker := func(change func(*plan.Walker)) plan.Edit {
		w := plan.DefaultWalker()
		change(&w)
		return plan.SetWalker{Walker: w}
	}
	negative := int32(-1)
	tests := []struct {
		edit plan.Edit
		want string
	}{
		{with(func(w *plan.Wall) { w.ID = "W1" }), "wall W1: is in the plan already"},
		{with(func(w *plan.Wall) { w.Line = far }), "wall W8: lies outside the legal range"},
		{with(func(w *plan.Wall) { w.Line = chain(1, 1) }), "wall W8: needs 2 points or more, has 1"},
		{with(func(w *plan.Wall) { w.Height = 0 }), "wall W8: needs a height"},
		{with(func(w *plan.Wall) { w.Height = plan.MaxCoord + 1 }), "wall W8: needs a height"},
		{with(func(w *plan.Wall) { w.Thickness = -1 }), "wall W8: needs a thickness"},
		{plan.AddOpening{Opening: plan.Opening{Width: 5}}, "opening D4: needs the id of the wall"},
		{plan.AddOpening{Opening: plan.Opening{Wall: "W9", Width: 5}}, `opening D4: names wall "W9"`},
		{plan.AddOpening{Opening: plan.Opening{Wall: "W1", At: 4999, Width: 5}}, "opening D4: reaches beyond the end"},
		{plan.AddOpening{Opening: plan.Opening{Wall: "W1", At: 999, Width: 2}}, "opening D4: would lie over opening D1"},
		{plan.AddBlock{Block: plan.Block{Ring: chain(0, 0, 1, 1), Height: 5}}, "block B2: needs 3 points or more, has 2"},
		{plan.AddBlock{Block: plan.Block{Ring: chain(0, 0, 1, 1, 1, 0), Height: 5, Circle: &plan.Circle{}}}, "block B2: needs a circle"},
		{plan.AddZone{Zone: plan.Zone{}}, "zone Z2: needs 3 points or more, has 0"},
		{plan.AddStart{Start: plan.Start{At: pt(0, plan.MaxCoord+1)}}, "start S2: lies outside"},
		{plan.AddStart{Start: plan.Start{Facing: &nan}}, "start S2: needs a facing"},
		{plan.AddRoute{Route: plan.Route{Via: far}}, "route R2: lies outside"},
		{eye(func(o *plan.Observer) { o.ID = "O9" }), "observer O9: is not in the plan"},
		{eye(func(o *plan.Observer) { o.At = pt(-plan.MaxCoord-1, 0) }), "observer O1: lies outside"},
		{eye(func(o *plan.Observer) { o.Eye = 0 }), "observer O1: needs an eye height"},
		{eye(func(o *plan.Observer) { o.Heading = 361 }), "observer O1: needs a heading"},
		{eye(func(o *plan.Observer) { o.Heading = nan }), "observer O1: needs a heading"},
		{eye(func(o *plan.Observer) { o.View = nan }), "observer O1: needs a view angle"},
		{eye(func(o *plan.Observer) { o.Range = -1 }), "observer O1: needs a range"},
		{eye(func(o *plan.Observer) { o.Colour = -2 }), "observer O1: needs a colour"},
		{target(func(o *plan.Target) { o.Face = &[2]exact.Pt{} }), "target T1: needs a face"},
		{target(func(o *plan.Target) { o.Face[0].X = plan.MaxCoord + 1 }), "target T1: lies outside"},
		{target(func(o *plan.Target) { o.Bottom = &negative }), "target T1: needs a bottom"},
		{target(func(o *plan.Target) { o.MaxAngle = &nan }), "target T1: needs a greatest angle"},
		{walker(func(w *plan.Walker) { w.Radius = -1 }), "walker: needs a body radius"},
		{walker(func(w *plan.Walker) { w.Pace = nan }), "walker: needs a pace"},
		{walker(func(w *plan.Walker) { w.Eye = 0 }), "walker: needs an eye height"},
		{walker(func(w *plan.Walker) { w.Seen = plan.SeenShare }), "walker: needs a share"},
		{plan.SetFloor{Ring: chain(0, 0, 1, 1)}, "floor: needs 3 points or more, has 2"},
		{plan.SetSheet{Sheet: plan.Sheet{Unit: "yd"}}, "plan: needs a display unit"},
		{plan.SetSheet{Sheet: plan.Sheet{Unit: "m", Brief: "{}"}}, "plan: needs a brief"},
		{plan.SetWall{Wall: plan.Wall{ID: "W9", Line: wall.Line, Height: 1}}, "wall W9: is not in the plan"},
		{plan.SetWall{Wall: plan.Wall{ID: "W1", Line: chain(0, 0, 800, 0), Height: 1}}, "opening D1: reaches beyond the end"},
		{plan.SetWall{Wall: plan.Wall{ID: "W1", Line: chain(0, 0, 2000, 0), Height: 1}}, "opening D2: would lie over opening D1"},
		{plan.SetOpening{Opening: plan.Opening{ID: "D9", Wall: "W1", Width: 5}}, "opening D9: is not in the plan"},
		{plan.SetOpening{Opening: plan.Opening{ID: "D1", Wall: "W1", At: 2900, Width: 200}}, "opening D1: would lie over opening D2"},
		{move(plan.KindWall, "W1"), "wall W1: lies outside"},
		{move(plan.KindBlock, "B1"), "block B1: lies outside"},
		{move(plan.KindFloor, ""), "floor: lies outside"},
		{move(plan.KindTarget, "T1"), "target T1: lies outside"},
		{move(plan.KindStart, "S1"), "start S1: lies outside"},
		{move(plan.KindUnderlay, ""), "underlay: lies outside"},
		{move(plan.KindWalker, ""), "walker: cannot be moved"},
		{move(plan.KindWall, "W9"), "wall W9: is not in the plan"},
		{plan.MoveItems{Items: []plan.Ref{ref(plan.KindOpening, "D1")}, By: exact.Vec{X: 2000}}, "opening D1: would lie over opening D2"},
		{plan.MoveItems{Items: []plan.Ref{ref(plan.KindStart, "S1"), ref(plan.KindOpening, "D9")}}, "opening D9: is not in the plan"},
		{corner(plan.KindWall, "W9", 0, pt(0, 0)), "wall W9: is not in the plan"},
		{corner(plan.KindWall, "W1", 3, pt(0, 0)), "wall W1: has no such corner"},
		{corner(plan.KindWall, "W1", -1, pt(0, 0)), "wall W1: has no such corner"},
		{corner(plan.KindWall, "W1", 1, pt(plan.MaxCoord+1, 0)), "wall W1: lies outside"},
		{corner(plan.KindWall, "W1", 1, pt(10, 0)), "opening D1: reaches beyond the end"},
		{corner(plan.KindObserver, "O1", 0, pt(10, 0)), "observer O1: has no corners"},
		{corner(plan.KindFloor, "", 4, pt(10, 0)), "floor: has no such corner"},
		{plan.MoveCorners{Corners: []plan.Corner{{Item: ref(plan.KindZone, "Z1"), Index: 3}}}, "zone Z1: has no such corner"},
		{plan.MoveCorners{Corners: []plan.Corner{{Item: ref(plan.KindFloor, ""), Index: 9}}}, "floor: has no such corner"},
		{plan.MoveCorners{Corners: []plan.Corner{{Item: ref(plan.KindBlock, "B9")}}}, "block B9: is not in the plan"},
		{plan.MoveCorners{Corners: []plan.Corner{{Item: ref(plan.KindStart, "S1")}}}, "start S1: has no corners"},
		{plan.Delete{Items: []plan.Ref{ref(plan.KindStart, "S1"), ref(plan.KindStart, "S2")}}, "start S2: is not in the plan"},
		{plan.Delete{Items: []plan.Ref{ref(plan.KindWalker, "")}}, "walker: cannot be deleted"},
		{plan.Steps{Edits: []plan.Edit{plan.SetFloor{}, plan.Delete{Items: []plan.Ref{ref(plan.KindFloor, "")}}}}, "floor: is not in the plan"},
	}
	for _, tt := range tests {
		t.Run(tt.want, func(t *testing.T) {
			p := room()
			q, err := tt.edit.Apply(p)
			if err == nil || q != nil || !strings.HasPrefix(err.Error(), tt.want) {
				t.Errorf("got %v, %v; want %s ...", q, err, tt.want)
			}
			if !same(p.Parts(), room().Parts()) {
				t.Errorf("the old plan changed: %+v", p.Parts())
			}
		})
	}
}

func TestNextID(t *testing.T) {
	p := room()
	for kind, want := range map[plan.Kind]string{plan.KindWall: "W8", plan.KindOpening: "D4", plan.KindBlock: "B2", plan.KindZone: "Z2",
		plan.KindObserver: "O3", plan.KindTarget: "T2", plan.KindStart: "S2", plan.KindRoute: "R2", plan.KindFloor: ""} {
		if got := plan.NextID(p, kind); got != want {
			t.Errorf("%v: %q, want %q", kind, got, want)
		}
	}
	for id, want := range map[string]int{"W12": 12, "W": 0, "w12": 0, "W-3": 0, "W+3": 0, "W1a": 0, "D5": 0, "W99999999999999999999": 0} {
		if got := ref(plan.KindWall, id).Number(); got != want {
			t.Errorf("%s: number %d, want %d", id, got, want)
		}
	}
	adders := []plan.Adder{plan.AddWall{}, plan.AddOpening{}, plan.AddBlock{}, plan.AddZone{}, plan.AddObserver{}, plan.AddTarget{}, plan.AddStart{}, plan.AddRoute{}}
	for _, a := range adders {
		if r := a.Added(p); r.ID == "" || r.ID != plan.NextID(p, r.Kind) {
			t.Errorf("%T adds %v", a, r)
		}
	}
	if got := (plan.AddStart{Start: plan.Start{ID: "door"}}).Added(p); got != ref(plan.KindStart, "door") {
		t.Errorf("adds %v", got)
	}
}

func TestBounds(t *testing.T) {
	if _, _, ok := plan.Bounds(plan.New()); ok {
		t.Error("an empty plan has bounds")
	}
	lo, hi, ok := plan.Bounds(room())
	if !ok || lo != pt(0, 0) || hi != pt(10_000, 10_000) {
		t.Errorf("got %v %v", lo, hi)
	}
	tests := []struct {
		wall   plan.Wall
		lo, hi exact.Pt
	}{
		{plan.Wall{Thickness: 0}, pt(0, 0), pt(100, 0)},
		{plan.Wall{Thickness: 21}, pt(-11, -11), pt(111, 11)},
		{plan.Wall{Thickness: 20, Justify: plan.Right}, pt(-20, -20), pt(120, 20)},
		{plan.Wall{Thickness: 20, Kind: plan.Glazing}, pt(0, 0), pt(100, 0)},
	}
	for _, tt := range tests {
		tt.wall.Line = chain(0, 0, 100, 0, plan.MaxCoord+1, 0)
		lo, hi, ok := plan.Bounds(plan.From(plan.Parts{Walls: []plan.Wall{tt.wall}}))
		if !ok || lo != tt.lo || hi != tt.hi {
			t.Errorf("%+v: got %v %v, want %v %v", tt.wall, lo, hi, tt.lo, tt.hi)
		}
	}
}

func TestCircleRing(t *testing.T) {
	ring := plan.CircleRing(pt(100, 200), 1000, 12)
	for i, p := range ring.All() {
		if d := exact.Dist(p, pt(100, 200)); math.Abs(d-1000) > 0.71 {
			t.Errorf("corner %d is %v from the centre", i, d)
		}
		if q := ring.At((i + 3) % 12); q != pt(100, 200).Add(p.Sub(pt(100, 200)).Left()) {
			t.Errorf("corner %d is not carried over by a quarter turn: %v %v", i, p, q)
		}
	}
	defer func() {
		if recover() == nil {
			t.Error("ten corners are no multiple of four")
		}
	}()
	plan.CircleRing(pt(0, 0), 10, 10)
}

func ExampleMoveItems() {
	p := room()
	q, err := plan.MoveItems{Items: []plan.Ref{{Kind: plan.KindObserver, ID: "O1"}}, By: exact.Vec{X: 10}}.Apply(p)
	o, _ := q.Observer("O1")
	fmt.Println(o.At, err, p.Obstacles() == q.Obstacles())
	// Output: {110 100} <nil> true
}
