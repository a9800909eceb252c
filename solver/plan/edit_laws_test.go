package plan_test

import (
	"fmt"
	"strings"
	"testing"

	"pgregory.net/rapid"

	"enfilade/solver/exact"
	"enfilade/solver/plan"
)

// genRef draws an item of room(), or now and then one that is not in it.
func genRef(t *rapid.T) plan.Ref {
	return rapid.SampledFrom([]plan.Ref{ref(plan.KindWall, "W1"), ref(plan.KindWall, "W2"), ref(plan.KindWall, "W7"),
		ref(plan.KindOpening, "D1"), ref(plan.KindOpening, "D2"), ref(plan.KindOpening, "D3"), ref(plan.KindBlock, "B1"),
		ref(plan.KindZone, "Z1"), ref(plan.KindObserver, "O1"), ref(plan.KindObserver, "O2"), ref(plan.KindTarget, "T1"),
		ref(plan.KindStart, "S1"), ref(plan.KindRoute, "R1"), ref(plan.KindFloor, ""), ref(plan.KindStart, "S5")}).Draw(t, "item")
}

func genVec(t *rapid.T) exact.Vec {
	c := rapid.Int32Range(-3000, 3000)
	return exact.Vec{X: c.Draw(t, "dx"), Y: c.Draw(t, "dy")}
}

func genEdit(t *rapid.T) plan.Edit {
	at := pt(0, 0).Add(genVec(t))
	switch rapid.IntRange(0, 8).Draw(t, "edit") {
	case 0:
		return plan.AddWall{Wall: plan.Wall{Line: plan.ChainOf(at, at.Add(genVec(t))), Height: plan.Ceiling}}
	case 1:
		return plan.AddOpening{Opening: plan.Opening{Wall: genRef(t).ID, At: at.X, Width: at.Y, Segment: rapid.IntRange(0, 2).Draw(t, "segment")}}
	case 2:
		return plan.AddObserver{Observer: plan.Observer{At: at, Eye: 1, View: 360}}
	case 3:
		return plan.MoveItems{Items: rapid.SliceOfN(rapid.Custom(genRef), 1, 4).Draw(t, "items"), By: genVec(t)}
	case 4:
		return plan.Delete{Items: rapid.SliceOfN(rapid.Custom(genRef), 1, 2).Draw(t, "items")}
	case 5:
		return plan.SetFloor{Ring: plan.ChainOf(at, pt(0, 0), pt(1, 1))}
	case 6:
		return plan.SetOpening{Opening: plan.Opening{ID: genRef(t).ID, Wall: "W1", At: at.X, Width: at.Y}}
	}
	return plan.MoveCorner{Corner: plan.Corner{Item: genRef(t), Index: rapid.IntRange(0, 3).Draw(t, "index")}, To: at, Along: rapid.Bool().Draw(t, "along")}
}

// TestEditLaws applies random edits one after another: no edit changes the plan it is given, marks alone never touch the
// obstacles nor the other way round, ids stay apart, and openings go on fitting their walls side by side.
func TestEditLaws(t *testing.T) {
	done, refused, alike := 0, 0, 0
	rapid.Check(t, func(t *rapid.T) {
		p := room()
		for range 12 {
			e := genEdit(t)
			before := p.Parts()
			kept := fmt.Sprintf("%+v", before) // chains are shared, so what they hold is written down
			q, err := e.Apply(p)
			if !same(p.Parts(), before) || fmt.Sprintf("%+v", p.Parts()) != kept {
				t.Fatalf("%+v changed the plan it was given", e)
			}
			if err != nil {
				refused++
				continue
			}
			done++
			a, b := p.Parts(), q.Parts()
			if p.Obstacles() != q.Obstacles() {
				a.Floor, a.Walls, a.Openings, a.Blocks = b.Floor, b.Walls, b.Openings, b.Blocks
			}
			if p.Marks() != q.Marks() {
				a.Zones, a.Observers, a.Targets, a.Starts, a.Routes, a.Walker = b.Zones, b.Observers, b.Targets, b.Starts, b.Routes, b.Walker
			}
			if !same(a, b) {
				t.Fatalf("%+v changed a part it says it shares", e)
			}
			if plan.SameItems(p, q) {
				alike++
				if got, want := names(q), names(p); got != want {
					t.Fatalf("%+v: items %s, said to be the same as %s", e, got, want)
				}
			}
			checkFits(t, b)
			p = q
		}
	})
	if done < 200 || refused < 100 || alike < 50 {
		t.Errorf("%d edits done, %d refused, %d left the items the same: the generator lost its aim", done, refused, alike)
	}
}

// names lists what is in a plan.
func names(p *plan.Plan) string {
	var out []any
	for _, w := range p.Walls() {
		out = append(out, w.ID)
	}
	for _, o := range p.Openings() {
		out = append(out, o.ID)
	}
	for _, b := range p.Blocks() {
		out = append(out, b.ID)
	}
	for _, z := range p.Zones() {
		out = append(out, z.ID)
	}
	for _, o := range p.Observers() {
		out = append(out, o.ID)
	}
	for _, t := range p.Targets() {
		out = append(out, t.ID)
	}
	for _, s := range p.Starts() {
		out = append(out, s.ID)
	}
	for _, r := range p.Routes() {
		out = append(out, r.ID)
	}
	return fmt.Sprintln(append(out, p.Floor().Len() > 0, p.Sheet().Underlay != nil)...)
}

func checkFits(t *rapid.T, p plan.Parts) {
	byID := map[string]plan.Wall{}
	for _, w := range p.Walls {
		if _, twice := byID[w.ID]; twice {
			t.Fatalf("two walls %s", w.ID)
		}
		byID[w.ID] = w
	}
	for i, o := range p.Openings {
		w := byID[o.Wall]
		if _, fault := w.Fit(o); fault != "" {
			t.Fatalf("opening %s %s", o.ID, fault)
		}
		for _, q := range p.Openings[:i] {
			if q.Over(o) || q.ID == o.ID {
				t.Fatalf("openings %+v and %+v", q, o)
			}
		}
	}
}

// TestMoveLaws holds that what is moved there and back again is where it was, and that what is added and deleted is gone.
func TestMoveLaws(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		items := rapid.SliceOfNDistinct(rapid.Custom(genRef), 1, 5, rapid.ID).Draw(t, "items")
		by := genVec(t)
		there, err := plan.MoveItems{Items: items, By: by}.Apply(room())
		if err != nil {
			t.Skip(err)
		}
		back, err := plan.MoveItems{Items: items, By: by.Neg()}.Apply(there)
		if err != nil {
			if strings.HasPrefix(err.Error(), "opening") { // it stopped at the end of its wall, and would now pass another
				t.Skip(err)
			}
			t.Fatal(err)
		}
		want, got := room().Parts(), back.Parts()
		for i := range want.Openings { // an opening stops at the end of its wall, so it may not come back
			want.Openings[i].At = got.Openings[i].At
		}
		if !same(got, want) {
			t.Fatalf("got\n%+v\nwant\n%+v", got, want)
		}
		add := plan.AddWall{Wall: plan.Wall{Line: chain(0, 0, 5, 5), Height: 1}}
		more, err := add.Apply(there)
		if err != nil {
			t.Fatal(err)
		}
		less, err := plan.Delete{Items: []plan.Ref{add.Added(there)}}.Apply(more)
		if err != nil || !same(less.Parts(), there.Parts()) {
			t.Fatalf("added and deleted: %v, %+v", err, less.Parts())
		}
	})
}
