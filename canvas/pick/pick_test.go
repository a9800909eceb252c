package pick_test

import (
	"fmt"
	"math"
	"testing"

	"pgregory.net/rapid"

	"enfilade/canvas/pick"
	"enfilade/canvas/view"
	"enfilade/solver/exact"
	"enfilade/solver/plan"
)

// m returns the grid point at x, y metres.
func m(x, y float64) exact.Pt {
	return exact.Pt{X: int32(math.Round(x * 10000)), Y: int32(math.Round(y * 10000))}
}

// cam is 40 px to the metre, with 0, 0 at the picture's centre.
func cam(k float64) view.Camera {
	return view.Camera{Scale: 0.04 * k, W: int(1000 * k), H: int(800 * k), K: k}
}

func room() *plan.Plan {
	facing := 0.0
	return plan.From(plan.Parts{
		Floor: plan.ChainOf(m(-8, -6), m(8, -6), m(8, 6), m(-8, 6)),
		Walls: []plan.Wall{
			{ID: "W1", Line: plan.ChainOf(m(-4, 0), m(4, 0), m(4, 3)), Thickness: 4000, Height: plan.Ceiling},
			{ID: "W2", Line: plan.ChainOf(m(-4, 4), m(-1, 4)), Kind: plan.Screen},
			{ID: "W3", Line: plan.ChainOf(m(-7, -5), m(-4, -2)), Thickness: 2000},
			{ID: "W9", Line: plan.ChainOf(m(5, 5), m(7, 5)), Meta: plan.Meta{Hidden: true}},
		},
		Openings:  []plan.Opening{{ID: "D1", Wall: "W1", Segment: 0, At: 20000, Width: 9000}},
		Blocks:    []plan.Block{{ID: "B1", Ring: plan.ChainOf(m(0, -4), m(2, -4), m(2, -3), m(0, -3))}},
		Zones:     []plan.Zone{{ID: "Z1", Ring: plan.ChainOf(m(-3, 1), m(-1, 1), m(-1, 3), m(-3, 3))}},
		Observers: []plan.Observer{{ID: "O1", At: m(1, 2), Heading: 90, View: 360}},
		Targets:   []plan.Target{{ID: "T1", At: m(-3, 0.2)}},
		Starts:    []plan.Start{{ID: "S1", At: m(3, -1), Facing: &facing}},
	})
}

func TestAt(t *testing.T) {
	p := room()
	sel := []plan.Ref{{Kind: plan.KindObserver, ID: "O1"}}
	for _, k := range []float64{1, 2} {
		for _, c := range []struct {
			name   string
			x, y   float64 // metres
			dx, dy float64 // px at 100 %, y down
			want   string
		}{
			{"observer", 1, 2, 8, 0, "observer O1"},
			{"beside the observer", 1, 2, 14, 0, ""},
			{"heading handle", 1, 2, 0, -34, "observer O1 heading"},
			{"target on a wall", -3, 0.2, 3, 2, "target T1"},
			{"start", 3, -1, -5, 5, "start S1"},
			{"start's mat, behind it", 3 - 0.78, -1, 0, 0, "start S1"},
			{"wall inside its body", -3.5, 0, 0, 7, "wall W1"},
			{"wall end", -4, 0, -3, 3, "wall W1 corner 0"},
			{"wall bend", 4, 0, 3, 3, "wall W1 corner 1"},
			{"door", -1.5, 0, 0, 0, "opening D1"},
			{"beside the door", -0.9, 0, 0, 0, "wall W1"},
			{"screen", -2.5, 4, 0, 4, "wall W2"},
			{"off the screen", -2.5, 4, 0, 6, ""},
			{"slanted wall", -5.5, -3.5, 1, 0, "wall W3"},
			{"block", 1, -3.5, 0, 0, "block B1"},
			{"block edge", 1, -3, 0, -4, "block B1"},
			{"block corner", 2, -3, 2, -2, "block B1 corner 2"},
			{"zone outline", -2, 1, 0, -3, "zone Z1"},
			{"in the zone", -2, 2, 0, 0, ""},
			{"floor outline", -8, 2, 3, 0, "floor "},
			{"hidden wall", 6, 5, 0, 0, ""},
		} {
			px, py := cam(k).Pixel(m(c.x, c.y))
			h, ok := pick.At(p, cam(k), px+c.dx*k, py+c.dy*k, sel)
			if got := describe(h, ok); got != c.want {
				t.Errorf("k %g: %s: got %q, want %q", k, c.name, got, c.want)
			}
		}
	}
	px, py := cam(1).Pixel(m(1, 2))
	if h, ok := pick.At(p, cam(1), px, py-34, nil); ok {
		t.Errorf("the heading handle of an observer that is not selected was hit: %v", h)
	}
}

func describe(h pick.Hit, ok bool) string {
	if !ok {
		return ""
	}
	kind := map[plan.Kind]string{plan.KindFloor: "floor", plan.KindWall: "wall", plan.KindOpening: "opening",
		plan.KindBlock: "block", plan.KindZone: "zone", plan.KindObserver: "observer", plan.KindTarget: "target",
		plan.KindStart: "start"}[h.Ref.Kind]
	s := kind + " " + h.Ref.ID
	switch h.Part {
	case pick.Corner:
		s += fmt.Sprintf(" corner %d", h.Index)
	case pick.Heading:
		s += " heading"
	}
	return s
}

// TestSmallThingsKeepTheirBody: the corners of a column must not stop it from being taken.
func TestSmallThingsKeepTheirBody(t *testing.T) {
	p := plan.From(plan.Parts{Blocks: []plan.Block{{ID: "B1", Ring: plan.ChainOf(m(0, 0), m(.2, 0), m(.2, .2), m(0, .2))}}})
	for x := 0.0; x <= 0.2; x += 0.02 {
		px, py := cam(1).Pixel(m(x, x))
		if h, ok := pick.At(p, cam(1), px, py, nil); !ok || h.Part != pick.Body {
			t.Errorf("at %g: %s, want the body", x, describe(h, ok))
		}
	}
}

func TestCornersAt(t *testing.T) {
	p := plan.From(plan.Parts{
		Floor:  plan.ChainOf(m(0, 0), m(5, 0), m(5, 5)),
		Walls:  []plan.Wall{{ID: "W1", Line: plan.ChainOf(m(0, 0), m(5, 0), m(0, 0))}, {ID: "W2", Line: plan.ChainOf(m(0, 0), m(1, 1)), Meta: plan.Meta{Locked: true}}},
		Blocks: []plan.Block{{ID: "B1", Ring: plan.ChainOf(m(0, 0), m(1, 0), m(1, 1))}},
	})
	got := fmt.Sprint(pick.CornersAt(p, m(0, 0)))
	want := fmt.Sprint([]plan.Corner{
		{Item: plan.Ref{Kind: plan.KindFloor}}, {Item: plan.Ref{Kind: plan.KindBlock, ID: "B1"}},
		{Item: plan.Ref{Kind: plan.KindWall, ID: "W1"}}, {Item: plan.Ref{Kind: plan.KindWall, ID: "W1"}, Index: 2}})
	if got != want {
		t.Errorf("corners %s, want %s", got, want)
	}
}

func TestInBox(t *testing.T) {
	got := fmt.Sprint(pick.InBox(room(), m(5, -5), m(-1, 2.5), false))
	if want := fmt.Sprint([]plan.Ref{{Kind: plan.KindBlock, ID: "B1"}, {Kind: plan.KindObserver, ID: "O1"}, {Kind: plan.KindStart, ID: "S1"}}); got != want {
		t.Errorf("in the box %s, want %s", got, want)
	}
}

func TestSnapAt(t *testing.T) {
	p := room()
	from, aside, onWall, footed := m(2.5, -5), m(-5, -6), m(-6, -4), m(-5.9, -2.2)
	for _, c := range []struct {
		name   string
		x, y   float64
		dx, dy float64
		to     pick.SnapTo
		at     exact.Pt
		kind   pick.SnapKind
	}{
		{"grid", 1.23, -5.37, 0, 0, pick.SnapTo{}, m(1.2, -5.4), pick.SnapGrid},
		{"in line with a corner beside it", 1.23, 0.97, 0, 0, pick.SnapTo{}, m(1.2, 1), pick.SnapInLine},
		{"in line with two corners", 4.07, -3.04, 0, 0, pick.SnapTo{}, m(4, -3), pick.SnapInLine},
		{"beyond the end of a slanted wall", -3.2, -1.3, 0, 0, pick.SnapTo{}, m(-3.25, -1.25), pick.SnapInLine},
		{"middle of a slanted wall", -5.51, -3.5, 0, 0, pick.SnapTo{}, m(-5.5, -3.5), pick.SnapMiddle},
		{"middle of a block's edge", 0.05, -3.45, 0, 0, pick.SnapTo{}, m(0, -3.5), pick.SnapMiddle},
		{"parallel to a slanted wall", -3.55, -4.45, 0, 0, pick.SnapTo{From: &aside}, m(-3.5, -4.5), pick.SnapParallel},
		{"square to the wall it begins on", -6.97, -2.96, 0, 0, pick.SnapTo{From: &onWall}, m(-7, -3), pick.SnapSquare},
		{"foot on a slanted wall", -4.97, -3.12, 0, 0, pick.SnapTo{From: &footed}, m(-5.0500, -3.0500), pick.SnapSquare},
		{"free", 1.23, 0.97, 0, 0, pick.SnapTo{Free: true}, m(1.23, 0.97), pick.SnapNone},
		{"corner", 4, 3, 6, 6, pick.SnapTo{}, m(4, 3), pick.SnapCorner},
		{"along a wall", 1.23, 0, 0, 6, pick.SnapTo{}, m(1.2, 0), pick.SnapAlong},
		{"along a slanted wall", -6.41, -4.4, 0, 0, pick.SnapTo{}, m(-6.405, -4.405), pick.SnapAlong},
		{"skipped wall", 1.23, 0, 0, 3, pick.SnapTo{Skip: func(r plan.Ref) bool { return r.ID == "W1" }}, m(1.2, -0.1), pick.SnapGrid},
		{"straight above the beginning", 2.4, -2, 0, 0, pick.SnapTo{From: &from}, m(2.5, -2), pick.SnapInLine},
		{"wall straight above the beginning", 2.4, 0, 0, 2, pick.SnapTo{From: &from}, m(2.5, 0), pick.SnapSquare},
		{"corner of the line being drawn", 3.01, -2.02, 0, 0, pick.SnapTo{More: []exact.Pt{m(3.1234, -2)}}, m(3.1234, -2), pick.SnapCorner},
	} {
		px, py := cam(1).Pixel(m(c.x, c.y))
		s := pick.SnapAt(p, cam(1), px+c.dx, py+c.dy, c.to)
		if s.At != c.at || s.Kind != c.kind {
			t.Errorf("%s: snapped to %v (%d), want %v (%d)", c.name, s.At, s.Kind, c.at, c.kind)
		}
	}
}

func TestGridStep(t *testing.T) {
	for perMetre, want := range map[float64]int32{37: 1000, 100: 500, 300: 100, 20: 2000, 10: 5000, 5: 10000, 1e5: 1, 0.001: 50_000_000} {
		c := view.Camera{Scale: perMetre / 1000, K: 1}
		if got := pick.GridStep(c); got != want {
			t.Errorf("%g px/m: step %d, want %d", perMetre, got, want)
		}
		c = view.Camera{Scale: perMetre / 500, K: 2}
		if got := pick.GridStep(c); got != want {
			t.Errorf("%g px/m at 200 %%: step %d, want %d", perMetre, got, want)
		}
	}
}

// TestFeetStep: the grid of a plan in feet and inches goes by whole inches and feet.
func TestFeetStep(t *testing.T) {
	for perMetre, want := range map[float64]int32{5000: 10, 300: 127, 150: 254, 40: 762, 20: 1524, 10: 3048, 5: 2 * 3048, 1: 10 * 3048} {
		if got := pick.FeetStep(view.Camera{Scale: perMetre / 1000, K: 1}); got != want {
			t.Errorf("%g px/m: step %d, want %d", perMetre, got, want)
		}
	}
	s := pick.Snapper{On: pick.AllSnaps, Feet: true}
	px, py := cam(1).Pixel(m(1.23, -5.37))
	if got := s.At(plan.New(), cam(1), px, py, pick.SnapTo{}); got.At.X%762 != 0 || got.At.Y%762 != 0 {
		t.Errorf("snapped to %v, want whole 3 inches", got.At)
	}
}

func TestFaceAt(t *testing.T) {
	p := room()
	for _, c := range []struct {
		name   string
		x, y   float64
		at     exact.Pt
		normal float64
	}{
		{"above the wall", 2.03, 0.3, m(2, 0.2), 90},
		{"below the wall", 2.03, -0.3, m(2, -0.2), -90},
		{"inside the wall", 2.03, 0.05, m(2, 0.2), 90},
		{"above a screen", -2.01, 4.1, m(-2, 4), 90},
		{"below a screen", -2.01, 3.9, m(-2, 4), -90},
		{"left of the block", -0.1, -3.52, m(0, -3.5), 180},
		{"in the block", 1, -3.1, m(1, -3), 90},
		{"inside the floor", -7.8, 2.52, m(-8, 2.5), 0},
		{"outside the floor", -8.2, 2.52, m(-8, 2.5), 0},
	} {
		px, py := cam(1).Pixel(m(c.x, c.y))
		f, ok := pick.FaceAt(p, cam(1), px, py, pick.GridStep(cam(1)))
		if !ok || f.At != c.at || math.Abs(math.Remainder(f.Normal-c.normal, 360)) > 1e-9 {
			t.Errorf("%s: %+v %v, want %v facing %g", c.name, f, ok, c.at, c.normal)
		}
	}
	px, py := cam(1).Pixel(m(1, 1.5))
	if f, ok := pick.FaceAt(p, cam(1), px, py, pick.GridStep(cam(1))); ok {
		t.Errorf("far from every face: %+v", f)
	}
}

// TestFaceLaws: the place on the face of a slanted wall lies outside the wall's body and within 3 units of its face.
func TestFaceLaws(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		c := rapid.Int32Range(-100000, 100000)
		a, b := exact.Pt{X: c.Draw(t, "ax"), Y: c.Draw(t, "ay")}, exact.Pt{X: c.Draw(t, "bx"), Y: c.Draw(t, "by")}
		if exact.Dist(a, b) < 5000 {
			t.Skip("too short to aim at")
		}
		thick := rapid.Int32Range(0, 5000).Draw(t, "thick")
		p := plan.From(plan.Parts{Walls: []plan.Wall{{ID: "W1", Line: plan.ChainOf(a, b), Thickness: thick}}})
		mid := exact.Pt{X: (a.X + b.X) / 2, Y: (a.Y + b.Y) / 2}
		px, py := cam(1).Pixel(mid)
		f, ok := pick.FaceAt(p, cam(1), px+rapid.Float64Range(-15, 15).Draw(t, "dx"), py, pick.GridStep(cam(1)))
		if !ok {
			t.Fatal("no face at a wall's middle")
		}
		d := math.Abs(float64(exact.Area2(a, b, f.At))) / exact.Dist(a, b)
		lo, hi := float64(thick)/2, float64(thick)/2+3
		if a.X != b.X && a.Y != b.Y {
			lo += 0.5
		}
		if d < lo-1e-6 && thick%2 == 0 || d > hi {
			t.Fatalf("the place %v lies %g units off the line of a wall %d thick", f.At, d, thick)
		}
	})
}

func TestDoors(t *testing.T) {
	p := room()
	at := func(x, y float64) (float64, float64) { return cam(1).Pixel(m(x, y)) }
	px, py := at(-1.3, 0.3)
	if d, ok := pick.DoorAt(p, cam(1), px, py); !ok || d.At != m(-1.55, 0.2) || d.Facing != 90 || d.Ref.ID != "D1" {
		t.Errorf("above the door: %+v %v", d, ok)
	}
	px, py = at(-1.3, -0.3)
	if d, ok := pick.DoorAt(p, cam(1), px, py); !ok || d.At != m(-1.55, -0.2) || d.Facing != -90 {
		t.Errorf("below the door: %+v %v", d, ok)
	}
	px, py = at(1, 0.3)
	if d, ok := pick.DoorAt(p, cam(1), px, py); ok {
		t.Errorf("a door where there is none: %+v", d)
	}
	px, py = at(1.03, 0.1)
	if w, ok := pick.WallAt(p, cam(1), px, py, pick.GridStep(cam(1))); !ok || w.Wall != "W1" || w.Segment != 0 || w.Along != 50000 || w.Length != 80000 || !w.Left {
		t.Errorf("on the wall: %+v %v", w, ok)
	}
	px, py = at(-2.5, 4)
	if w, ok := pick.WallAt(p, cam(1), px, py, pick.GridStep(cam(1))); ok {
		t.Errorf("a screen takes no door: %+v", w)
	}
}

func BenchmarkAt(b *testing.B) {
	for _, n := range []int{1000, 100000} {
		walls := make([]plan.Wall, n)
		for i := range walls {
			x, y := float64(i%300), float64(i/300)
			walls[i] = plan.Wall{ID: fmt.Sprint("W", i), Line: plan.ChainOf(m(x, y), m(x+.8, y)), Thickness: 2000}
		}
		p := plan.From(plan.Parts{Walls: walls})
		b.Run(fmt.Sprintf("walls=%d", n), func(b *testing.B) {
			for b.Loop() {
				pick.At(p, cam(1), 503, 404, nil)
			}
		})
	}
}
