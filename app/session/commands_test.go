package session_test

import (
	"fmt"
	"go/ast"
	"go/parser"
	"go/token"
	"maps"
	"path/filepath"
	"reflect"
	"slices"
	"strings"
	"testing"

	"pgregory.net/rapid"

	"enfilade/app/session"
	"enfilade/solver/exact"
	"enfilade/solver/plan"
)

// hall is a plan with some of everything, walls that cross and meet among it.
func hall() *plan.Plan {
	c := func(xy ...int32) plan.Chain {
		var pts []exact.Pt
		for i := 0; i < len(xy); i += 2 {
			pts = append(pts, exact.Pt{X: xy[i], Y: xy[i+1]})
		}
		return plan.ChainOf(pts...)
	}
	wall := func(id string, line plan.Chain) plan.Wall {
		return plan.Wall{ID: id, Line: line, Height: plan.Ceiling, Thickness: 200}
	}
	return plan.From(plan.Parts{
		Floor: c(-9000, -9000, 9000, -9000, 9000, 9000, -9000, 9000),
		Walls: []plan.Wall{wall("W1", c(0, 0, 5000, 0)), wall("W2", c(5000, 0, 9000, 0, 9000, 4000)), wall("W3", c(3000, -2000, 3000, 2000)),
			wall("W4", c(0, 3000, 4000, 7000)), wall("W5", c(-500, -500, -4000, -500, -4000, -4000)), wall("W6", c(-8000, 8000, -7000, 8000)), wall("W7", c(-5000, 7000, -5000, 9000))},
		Openings:  []plan.Opening{{ID: "D1", Wall: "W1", At: 500, Width: 900}, {ID: "D2", Wall: "W4", At: 100, Width: 900, Leaf: plan.SolidLeaf}},
		Blocks:    []plan.Block{{ID: "B1", Ring: plan.CircleRing(exact.Pt{X: 700, Y: 700}, 50, 12), Height: plan.Ceiling, Circle: &plan.Circle{At: exact.Pt{X: 700, Y: 700}, Radius: 50}}},
		Zones:     []plan.Zone{{ID: "Z1", Name: "Nook", Ring: c(0, 0, 900, 0, 0, 900)}},
		Observers: []plan.Observer{{ID: "O1", At: exact.Pt{X: 9}, Eye: 16_000, View: 360, Colour: -1}},
		Targets:   []plan.Target{{ID: "T1", At: exact.Pt{X: 5}, Colour: -1}},
		Starts:    []plan.Start{{ID: "S1", At: exact.Pt{Y: 5}}},
		Routes:    []plan.Route{{ID: "R1", From: "S1", To: "T1", Via: c(5, 5)}},
		Walker:    plan.DefaultWalker(),
		Sheet:     plan.Sheet{Unit: "m", Underlay: &plan.Underlay{Image: "a.png", MMPerPixel: 1, Opacity: 1}},
	})
}

// command draws one edit of a plan: every kind of edit there is, on items of the plan or now and then on none.
func command(t *rapid.T, p *plan.Plan) plan.Edit {
	c := rapid.Int32Range(-4000, 4000)
	at := exact.Pt{X: c.Draw(t, "x"), Y: c.Draw(t, "y")}
	by := exact.Vec{X: c.Draw(t, "dx"), Y: c.Draw(t, "dy")}
	refs := slices.Collect(session.All(p))
	refs = append(refs, plan.Ref{Kind: plan.KindFloor}, plan.Ref{Kind: plan.KindUnderlay}, plan.Ref{Kind: plan.KindStart, ID: "S99"})
	some := rapid.SliceOfN(rapid.SampledFrom(refs), 1, 4).Draw(t, "items")
	var walls []string
	for _, w := range p.Walls() {
		walls = append(walls, w.ID)
	}
	walls = append(walls, "W99")
	wall := func() string { return rapid.SampledFrom(walls).Draw(t, "wall") }
	yes := rapid.Bool().Draw(t, "yes")
	ring := plan.ChainOf(at, at.Add(by), at.Add(by.Left()))
	own, _ := p.Wall(wall())
	var piece int
	if own.Line.Len() > 1 {
		piece, at = plan.NearestOn(own.Line, at)
	}
	corner := plan.Corner{Item: some[0], Index: rapid.IntRange(0, 2).Draw(t, "corner")}
	edits := []plan.Edit{
		plan.AddWall{Wall: plan.Wall{Line: plan.ChainOf(at, at.Add(by)), Height: plan.Ceiling}}, plan.AddBlock{Block: plan.Block{Ring: ring, Height: 5}},
		plan.AddOpening{Opening: plan.Opening{Wall: wall(), At: max(0, by.X), Width: max(1, by.Y)}}, plan.AddZone{Zone: plan.Zone{Ring: ring}},
		plan.AddObserver{Observer: plan.Observer{At: at, Eye: 1, View: 90}}, plan.AddTarget{Target: plan.Target{At: at}},
		plan.AddStart{Start: plan.Start{At: at}}, plan.AddRoute{Route: plan.Route{From: "S1", To: "T1", Via: ring}},
		plan.SetWall{Wall: own}, plan.SetOpening{Opening: plan.Opening{ID: "D1", Wall: "W1", At: max(0, by.X), Width: 90}},
		plan.SetBlock{Block: plan.Block{ID: "B1", Ring: ring, Height: 7}}, plan.SetZone{Zone: plan.Zone{ID: "Z1", Ring: ring}},
		plan.SetObserver{Observer: plan.Observer{ID: "O1", At: at, Eye: 1, View: 90}}, plan.SetTarget{Target: plan.Target{ID: "T1", At: at}},
		plan.SetStart{Start: plan.Start{ID: "S1", At: at}}, plan.SetRoute{Route: plan.Route{ID: "R1", From: "S1", Via: ring}},
		plan.SetWalker{Walker: plan.Walker{Radius: max(0, by.X), Pace: 1, Eye: 5}}, plan.SetFloor{Ring: ring}, plan.SetSheet{Sheet: plan.Sheet{Unit: "m", Title: fmt.Sprint(by)}},
		plan.MoveItems{Items: some, By: by}, plan.MoveCorner{Corner: corner, To: at, Along: yes}, plan.MoveCorners{Corners: []plan.Corner{corner}, By: by},
		plan.Delete{Items: some[:1]}, plan.Steps{Text: "both", Edits: []plan.Edit{plan.AddStart{Start: plan.Start{At: at}}, plan.MoveItems{Items: some, By: by}}},
		plan.Rotate{Items: some, About: at, Degrees: float64(by.X) / 10, Copy: yes}, plan.Rotate{Items: some, About: at, Degrees: 90},
		plan.Mirror{Items: some, Line: [2]exact.Pt{at, at.Add(by)}, Copy: yes}, plan.Duplicate{Items: some, Columns: 2, Rows: 2, Step: by},
		plan.Paste{Clip: plan.Extract(p, some), By: by}, plan.ParallelWall{Wall: wall(), Distance: 1 + max(0, by.X), Right: yes},
		plan.SplitWall{Wall: own.ID, Segment: piece, At: at}, plan.DuplicateOpening{Opening: "D1"}, plan.CloseWall{Wall: wall()}, plan.JoinWalls{Walls: []string{"W1", "W2"}},
		plan.JoinWalls{Walls: []string{wall(), wall()}}, plan.CutBack{Wall: wall(), To: wall(), Start: yes}, plan.CutBack{Wall: "W1", To: "W3", Start: yes},
		plan.Lengthen{Wall: wall(), To: wall(), Start: yes}, plan.Lengthen{Wall: "W6", To: "W7"},
		plan.SetUnderlay{Underlay: plan.Underlay{Image: "b.png", At: at, MMPerPixel: 2, Opacity: 0.5}}, plan.Mark{Items: some, Locked: &yes}, plan.SetItems{Text: "change", Walls: []plan.Wall{own}, Starts: []plan.Start{{ID: "S1", At: at}}},
	}
	return rapid.SampledFrom(edits).Draw(t, "edit")
}

// TestUndoOfEveryCommand does random commands, each kind of edit there is among them; undoing them all gives back every plan in
// turn, the very same one with the very same content, and redoing them too. A save in between changes nothing about it.
func TestUndoOfEveryCommand(t *testing.T) {
	done := map[string]int{}
	rapid.Check(t, func(t *rapid.T) {
		s := session.New(hall(), "a.enfilade", nil)
		plans, texts, labels := []*plan.Plan{s.Plan()}, []string{content(s.Plan())}, []string{}
		for range rapid.IntRange(5, 25).Draw(t, "steps") {
			e := command(t, s.Committed())
			if err := s.Preview(e); err != nil && s.Do(e) == nil {
				t.Fatalf("%+v cannot be previewed, but done", e)
			}
			before := s.Committed()
			if s.Previewing() && s.Do(e) != nil {
				t.Fatalf("%+v can be previewed, but not done", e)
			}
			if s.Committed() == before {
				continue
			}
			done[reflect.TypeOf(e).Name()]++
			plans, texts, labels = append(plans, s.Plan()), append(texts, content(s.Plan())), append(labels, e.Label())
			if rapid.IntRange(0, 4).Draw(t, "save") == 0 {
				s.Saved(s.Committed(), "a.enfilade")
			}
		}
		for i := len(labels) - 1; i >= 0; i-- {
			if label, ok := s.UndoLabel(); !ok || label != labels[i] {
				t.Fatalf("undo is called %q, want %q", label, labels[i])
			}
			s.Undo()
			if s.Plan() != plans[i] || content(s.Plan()) != texts[i] {
				t.Fatalf("undoing %q gave another plan", labels[i])
			}
		}
		for i := range labels {
			s.Redo()
			if s.Plan() != plans[i+1] || content(s.Plan()) != texts[i+1] {
				t.Fatalf("redoing %q gave another plan", labels[i])
			}
		}
	})
	for _, name := range editTypes(t) {
		if done[name] < 3 {
			t.Errorf("%s was done %d times: the generator lost its aim", name, done[name])
		}
	}
}

// content is all that a plan holds, as text, points of chains and what pointers lead to included.
func content(p *plan.Plan) string {
	parts := p.Parts()
	var b strings.Builder
	fmt.Fprintf(&b, "%+v", parts)
	for _, t := range parts.Targets {
		fmt.Fprintf(&b, "%v %v", deref(t.Face), deref(t.Normal))
	}
	for _, s := range parts.Starts {
		fmt.Fprintf(&b, "%v", deref(s.Facing))
	}
	for _, k := range parts.Blocks {
		fmt.Fprintf(&b, "%v", deref(k.Circle))
	}
	fmt.Fprintf(&b, "%v", deref(parts.Sheet.Underlay))
	return b.String()
}

func deref[T any](p *T) (v T) {
	if p != nil {
		v = *p
	}
	return v
}

// editTypes are the names of all types of package plan that are edits, read from its source.
func editTypes(t *testing.T) []string {
	files, err := filepath.Glob("../../solver/plan/*.go")
	if err != nil {
		t.Fatal(err)
	}
	names := map[string]bool{}
	for _, name := range files {
		f, err := parser.ParseFile(token.NewFileSet(), name, nil, 0)
		if err != nil {
			t.Fatal(err)
		}
		if strings.HasSuffix(name, "_test.go") {
			continue
		}
		for _, d := range f.Decls {
			fn, ok := d.(*ast.FuncDecl)
			if !ok || fn.Recv == nil || fn.Name.Name != "Apply" {
				continue
			}
			if id, ok := fn.Recv.List[0].Type.(*ast.Ident); ok {
				names[id.Name] = true
			}
		}
	}
	if len(names) < 30 {
		t.Fatalf("only %d edits found in the source", len(names))
	}
	return slices.Sorted(maps.Keys(names))
}
