package pick_test

import (
	"slices"
	"testing"

	"pgregory.net/rapid"

	"enfilade/canvas/pick"
	"enfilade/canvas/view"
	"enfilade/solver/exact"
	"enfilade/solver/plan"
)

// TestBoxTouches: what a box touches is what has an end in it or crosses one of its sides, and a block that holds it.
func TestBoxTouches(t *testing.T) {
	count := [2]int{}
	c := rapid.Int32Range(-6, 6)
	pt := func(t *rapid.T, name string) exact.Pt {
		return exact.Pt{X: c.Draw(t, name+"x"), Y: c.Draw(t, name+"y")}
	}
	rapid.Check(t, func(t *rapid.T) {
		for range aims {
			a, b, p, q := pt(t, "a"), pt(t, "b"), pt(t, "p"), pt(t, "q")
			got := len(pick.InBox(plan.From(plan.Parts{Walls: []plan.Wall{{ID: "W1", Line: plan.ChainOf(p, q)}}}), a, b, true)) == 1
			c, d := exact.Pt{X: a.X, Y: b.Y}, exact.Pt{X: b.X, Y: a.Y}
			want := exact.InBox(a, b, p) || exact.InBox(a, b, q)
			for _, s := range [][2]exact.Pt{{a, c}, {c, b}, {b, d}, {d, a}} {
				want = want || meet(p, q, s[0], s[1])
			}
			if got != want {
				t.Fatalf("the box %v %v touches the wall %v %v: %v, want %v", a, b, p, q, got, want)
			}
			if got {
				count[1]++
			} else {
				count[0]++
			}
		}
	})
	if min(count[0], count[1]) < 100 {
		t.Errorf("the aim is lost: %v", count)
	}
	block := plan.From(plan.Parts{Blocks: []plan.Block{{ID: "B1", Ring: plan.ChainOf(m(-5, -5), m(5, -5), m(5, 5), m(-5, 5))}}})
	if len(pick.InBox(block, m(-1, -1), m(1, 1), true)) != 1 || len(pick.InBox(block, m(-1, -1), m(1, 1), false)) != 0 {
		t.Error("a box within a block touches it and does not hold it")
	}
}

// meet reports whether two pieces have a point in common.
func meet(a, b, c, d exact.Pt) bool {
	if exact.OnSegment(a, b, c) || exact.OnSegment(a, b, d) || exact.OnSegment(c, d, a) || exact.OnSegment(c, d, b) {
		return true
	}
	return exact.Orient(a, b, c)*exact.Orient(a, b, d) < 0 && exact.Orient(c, d, a)*exact.Orient(c, d, b) < 0
}

func TestUnder(t *testing.T) {
	parts := room().Parts()
	parts.Blocks = append(parts.Blocks, plan.Block{ID: "B2", Ring: plan.ChainOf(m(0, 1), m(2, 1), m(2, 3), m(0, 3))},
		plan.Block{ID: "B3", Ring: plan.ChainOf(m(0, 1), m(2, 1), m(2, 3), m(0, 3)), Meta: plan.Meta{Hidden: true}})
	parts.Routes = []plan.Route{{ID: "R1", From: "S1", Via: plan.ChainOf(m(3, 2), m(-1, 2)), To: "T1"}}
	p := plan.From(parts)
	px, py := cam(1).Pixel(m(1, 2))
	var got []string
	for _, h := range pick.Under(p, cam(1), px, py) {
		got = append(got, h.Ref.String())
	}
	if want := []string{"observer O1", "block B2", "route R1"}; !slices.Equal(got, want) {
		t.Errorf("under the pointer lie %q, want %q", got, want)
	}
	if h, ok := pick.MarkAt(p, cam(1), px, py, plan.KindTarget); ok {
		t.Errorf("no target lies there, got %v", h)
	}
	px, py = cam(1).Pixel(m(3, 2))
	if h, ok := pick.At(p, cam(1), px+3, py, nil); !ok || h.Part != pick.Corner || h.Ref.ID != "R1" {
		t.Errorf("at the waypoint %v", h)
	}
}

func TestKnobs(t *testing.T) {
	parts := room().Parts()
	parts.Observers[0].View, parts.Observers[0].Range = 90, 30000
	parts.Targets[0].Face = &[2]exact.Pt{m(-3, .2), m(-2, .2)}
	p := plan.From(parts)
	sel := []plan.Ref{{Kind: plan.KindObserver, ID: "O1"}, {Kind: plan.KindTarget, ID: "T1"}}
	for _, r := range sel {
		for _, k := range pick.Knobs(p, cam(2), r) {
			h, ok := pick.At(p, cam(2), k.X+5, k.Y-5, sel)
			if !ok || h.Part != k.Part || h.Index != k.Index || h.Ref != r {
				t.Errorf("on the handle %+v of %v lies %+v", k, r, h)
			}
			if h, _ := pick.At(p, cam(2), k.X+5, k.Y-5, nil); h.Part == k.Part {
				t.Errorf("the handle %+v of %v is there without being selected", k, r)
			}
		}
	}
	far := view.Camera{Scale: 0.02, W: 1000, H: 800, K: 1}
	x, y := far.Pixel(m(-2.5, .2))
	if h, ok := pick.At(p, far, x+4, y, sel); !ok || h.Part != pick.Body || h.Ref.ID != "T1" {
		t.Errorf("from afar a short face is not taken as a whole but by %+v", h)
	}
	if n := len(pick.Knobs(p, cam(1), sel[0])); n != 4 {
		t.Errorf("an observer with view and range has %d handles, want 4", n)
	}
}
