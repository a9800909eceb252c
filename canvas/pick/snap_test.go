package pick_test

import (
	"fmt"
	"math"
	"math/big"
	"slices"
	"testing"

	"pgregory.net/rapid"

	"enfilade/canvas/pick"
	"enfilade/canvas/view"
	"enfilade/solver/arrange"
	"enfilade/solver/exact"
	"enfilade/solver/plan"
)

// drawing is a plan of some walls and blocks crowded into what a hand reaches, some of them level, upright or parallel.
func drawing(t *rapid.T) plan.Parts {
	c := rapid.Int32Range(-30000, 30000)
	var parts plan.Parts
	slope := exact.Vec{X: 20000, Y: 7000}
	for i := range rapid.IntRange(1, 12).Draw(t, "walls") {
		a, b := exact.Pt{X: c.Draw(t, "ax"), Y: c.Draw(t, "ay")}, exact.Pt{X: c.Draw(t, "bx"), Y: c.Draw(t, "by")}
		switch rapid.IntRange(0, 3).Draw(t, "way") {
		case 0:
			b.Y = a.Y
		case 1:
			b.X = a.X
		case 2:
			b = a.Add(slope)
		}
		parts.Walls = append(parts.Walls, plan.Wall{ID: fmt.Sprint("W", i), Line: plan.ChainOf(a, b), Height: plan.Ceiling})
	}
	return parts
}

// aim is where the pointer is: anywhere, or near an end or a crossing.
func aim(t *rapid.T, parts plan.Parts, k view.Camera) (x, y float64) {
	at := exact.Pt{X: rapid.Int32Range(-30000, 30000).Draw(t, "x"), Y: rapid.Int32Range(-30000, 30000).Draw(t, "y")}
	i, j := rapid.IntRange(0, len(parts.Walls)-1).Draw(t, "i"), rapid.IntRange(0, len(parts.Walls)-1).Draw(t, "j")
	switch rapid.IntRange(0, 3).Draw(t, "near") {
	case 0:
		at = parts.Walls[i].Line.At(0)
	case 1:
		if q, ok := slowCrossing(parts.Walls[i].Line, parts.Walls[j].Line); ok {
			at = q
		}
	case 2:
		a, b := parts.Walls[i].Line.At(0), parts.Walls[i].Line.At(1)
		at = exact.Pt{X: (a.X + b.X) / 2, Y: (a.Y + b.Y) / 2}
	}
	x, y = k.Pixel(at)
	return x + rapid.Float64Range(-12, 12).Draw(t, "dx"), y + rapid.Float64Range(-12, 12).Draw(t, "dy")
}

// slowCrossing returns where two pieces cross, by fractions, rounded with halves up.
func slowCrossing(c, d plan.Chain) (exact.Pt, bool) {
	r := func(v int32) *big.Rat { return big.NewRat(int64(v), 1) }
	sub := func(a, b *big.Rat) *big.Rat { return new(big.Rat).Sub(a, b) }
	mul := func(a, b *big.Rat) *big.Rat { return new(big.Rat).Mul(a, b) }
	ax, ay, bx, by := r(c.At(0).X), r(c.At(0).Y), r(c.At(1).X), r(c.At(1).Y)
	px, py, qx, qy := r(d.At(0).X), r(d.At(0).Y), r(d.At(1).X), r(d.At(1).Y)
	ux, uy, vx, vy := sub(bx, ax), sub(by, ay), sub(qx, px), sub(qy, py)
	den := sub(mul(ux, vy), mul(uy, vx))
	if den.Sign() == 0 {
		return exact.Pt{}, false
	}
	along := func(wx, wy *big.Rat) *big.Rat {
		return new(big.Rat).Quo(sub(mul(sub(px, ax), wy), mul(sub(py, ay), wx)), den)
	}
	s, u := along(vx, vy), along(ux, uy)
	one := big.NewRat(1, 1)
	if s.Sign() < 0 || s.Cmp(one) > 0 || u.Sign() < 0 || u.Cmp(one) > 0 {
		return exact.Pt{}, false
	}
	half := func(v *big.Rat) int32 {
		v = new(big.Rat).Add(v, big.NewRat(1, 2))
		q := new(big.Int).Div(v.Num(), v.Denom()) // floors
		return int32(q.Int64())
	}
	return exact.Pt{X: half(new(big.Rat).Add(ax, mul(s, ux))), Y: half(new(big.Rat).Add(ay, mul(s, uy)))}, true
}

// slowSnap is the obvious search over everything: the distance to the nearest end, the nearest middle or crossing, and the
// nearest line, in px.
func slowSnap(parts plan.Parts, k view.Camera, x, y float64) (end, point, line float64) {
	px := func(q exact.Pt) float64 { a, b := k.Pixel(q); return math.Hypot(a-x, b-y) }
	end, point, line = math.Inf(1), math.Inf(1), math.Inf(1)
	for i, w := range parts.Walls {
		a, b := w.Line.At(0), w.Line.At(1)
		end = min(end, px(a), px(b))
		if a == b {
			continue
		}
		point = min(point, px(exact.Pt{X: (a.X+b.X+60001)/2 - 30000, Y: (a.Y+b.Y+60001)/2 - 30000}))
		ax, ay := k.Pixel(a)
		bx, by := k.Pixel(b)
		t := ((x-ax)*(bx-ax) + (y-ay)*(by-ay)) / ((bx-ax)*(bx-ax) + (by-ay)*(by-ay))
		t = min(max(t, 0), 1)
		line = min(line, math.Hypot(ax+t*(bx-ax)-x, ay+t*(by-ay)-y))
		for _, o := range parts.Walls[:i] {
			if q, ok := slowCrossing(w.Line, o.Line); ok && o.Line.At(0) != o.Line.At(1) {
				point = min(point, px(q))
			}
		}
	}
	return end, point, line
}

// TestSnapAgainstSearch: what a place snaps to is what the search over everything finds, and as near.
func TestSnapAgainstSearch(t *testing.T) {
	count := map[pick.SnapKind]int{}
	rapid.Check(t, func(t *rapid.T) {
		parts := drawing(t)
		k := cam(rapid.SampledFrom([]float64{1, 1.5, 2}).Draw(t, "k"))
		for range aims {
			againstSearch(t, parts, k, count)
		}
	})
	for _, k := range []pick.SnapKind{pick.SnapGrid, pick.SnapCorner, pick.SnapMiddle, pick.SnapCrossing, pick.SnapAlong, pick.SnapInLine} {
		if count[k] == 0 {
			t.Errorf("the aim is lost: nothing snapped as kind %d: %v", k, count)
		}
	}
}

// aims is how often the pointer is aimed at one drawing.
const aims = 20

func againstSearch(t *rapid.T, parts plan.Parts, k view.Camera, count map[pick.SnapKind]int) {
	x, y := aim(t, parts, k)
	s := pick.SnapAt(plan.From(parts), k, x, y, pick.SnapTo{})
	end, point, line := slowSnap(parts, k, x, y)
	count[s.Kind]++
	px, py := k.Pixel(s.At)
	d := math.Hypot(px-x, py-y)
	same := func(want float64) bool { return math.Abs(d-want) < 1e-6 }
	reach := pick.SnapReach * k.K
	switch {
	case end <= reach:
		if s.Kind != pick.SnapCorner || !same(end) {
			t.Fatalf("an end lies %g px away; snapped to kind %d at %g px", end, s.Kind, d)
		}
	case point <= reach:
		if s.Kind != pick.SnapMiddle && s.Kind != pick.SnapCrossing || !same(point) {
			t.Fatalf("a middle or crossing lies %g px away; snapped to kind %d at %g px", point, s.Kind, d)
		}
	case line <= 8*k.K-1e-6:
		if s.Kind != pick.SnapAlong || d < line-0.04 {
			t.Fatalf("a line lies %g px away; snapped to kind %d at %g px", line, s.Kind, d)
		}
	case line > 8*k.K+1e-6 && (s.Kind == pick.SnapAlong || s.Kind == pick.SnapCorner || s.Kind == pick.SnapMiddle):
		t.Fatalf("nothing lies near; snapped to kind %d at %g px", s.Kind, d)
	}
}

// TestSnapLaws: a place is never moved farther than the reach; a kind that is off is not snapped to; the place lies on what
// it snapped to, and on its guide lines, within the rounding to grid points.
func TestSnapLaws(t *testing.T) {
	count := map[pick.SnapKind]int{}
	rapid.Check(t, func(t *rapid.T) {
		parts := drawing(t)
		for range aims {
			snapLaws(t, parts, count)
		}
	})
	for kind := pick.SnapNone; kind <= pick.SnapInLine; kind++ {
		if count[kind] == 0 {
			t.Errorf("the aim is lost: nothing snapped as kind %d: %v", kind, count)
		}
	}
}

func snapLaws(t *rapid.T, parts plan.Parts, count map[pick.SnapKind]int) {
	k := cam(1)
	x, y := aim(t, parts, k)
	on := pick.Set(rapid.Uint16Range(0, uint16(pick.AllSnaps)).Draw(t, "on"))
	if rapid.Bool().Draw(t, "all") {
		on = pick.AllSnaps
	}
	to := pick.SnapTo{}
	if rapid.Bool().Draw(t, "begun") {
		from := parts.Walls[0].Line.At(0)
		if rapid.Bool().Draw(t, "elsewhere") {
			from = exact.Pt{X: rapid.Int32Range(-30000, 30000).Draw(t, "fx"), Y: rapid.Int32Range(-30000, 30000).Draw(t, "fy")}
		}
		to.From = &from
	}
	s := (&pick.Snapper{On: on}).At(plan.From(parts), k, x, y, to)
	count[s.Kind]++
	px, py := k.Pixel(s.At)
	if d := math.Hypot(px-x, py-y); d > pick.SnapReach+0.01 {
		t.Fatalf("kind %d moved the place by %g px", s.Kind, d)
	}
	if s.Kind != pick.SnapNone && !on.Has(s.Kind) && !(s.Kind == pick.SnapInLine && on.Has(pick.SnapParallel)) {
		t.Fatalf("snapped to kind %d, which is off", s.Kind)
	}
	switch s.Kind {
	case pick.SnapCorner:
		if !slices.ContainsFunc(parts.Walls, func(w plan.Wall) bool { return w.Line.At(0) == s.At || w.Line.At(1) == s.At }) {
			t.Fatalf("%v is no end", s.At)
		}
	case pick.SnapAlong, pick.SnapCrossing, pick.SnapMiddle:
		onLine(t, s.At, s.Edge, 0.7072)
	case pick.SnapParallel:
		if v, w := s.Edge[1].Sub(s.Edge[0]), s.At.Sub(*to.From); math.Abs(float64(v.Cross(w)))/math.Sqrt(float64(v.Len2())) > 0.7072 {
			t.Fatalf("the way to %v is not parallel to %v", s.At, s.Edge)
		}
	case pick.SnapSquare:
		if v, w := s.Edge[1].Sub(s.Edge[0]), s.At.Sub(*to.From); math.Abs(float64(v.Dot(w)))/math.Sqrt(float64(v.Len2())) > 0.7072 {
			t.Fatalf("the way to %v is not square to %v", s.At, s.Edge)
		}
	}
	for _, g := range s.Guides {
		if g.Shown() && g.To != s.At {
			t.Fatalf("the guide %v does not end at %v", g, s.At)
		}
	}
}

func onLine(t *rapid.T, q exact.Pt, e [2]exact.Pt, most float64) {
	if d := math.Abs(float64(exact.Area2(e[0], e[1], q))) / exact.Dist(e[0], e[1]); d > most {
		t.Fatalf("%v lies %g units off the line %v", q, d, e)
	}
}

// TestJunction: a wall whose end snaps onto another wall joins it: after the rounding of the whole drawing both share the
// end's point, so that nothing sees or walks between them.
func TestJunction(t *testing.T) {
	joined := 0
	rapid.Check(t, func(t *rapid.T) {
		parts := drawing(t)
		for range aims {
			junction(t, parts, &joined)
		}
	})
	if joined < 50 {
		t.Errorf("the aim is lost: %d junctions", joined)
	}
}

func junction(t *rapid.T, parts plan.Parts, joined *int) {
	k := cam(1)
	x, y := aim(t, parts, k)
	from := exact.Pt{X: 40000, Y: rapid.Int32Range(-30000, 30000).Draw(t, "from")}
	s := pick.SnapAt(plan.From(parts), k, x, y, pick.SnapTo{From: &from})
	if s.Kind != pick.SnapAlong && s.Kind != pick.SnapSquare || s.Ref.ID == "" || math.Abs(float64(exact.Area2(s.Edge[0], s.Edge[1], from)))/exact.Dist(s.Edge[0], s.Edge[1]) < 100 {
		return // one that runs along the wall is rounded onto it
	}
	*joined++
	parts.Walls = append(slices.Clone(parts.Walls), plan.Wall{ID: "W99", Line: plan.ChainOf(from, s.At), Height: plan.Ceiling})
	o, _ := arrange.Draw(plan.From(parts))
	g := arrange.Round(o)
	at := slices.Index(g.Pts, s.At)
	if at < 0 {
		t.Fatalf("the end %v is no point of the rounded drawing", s.At)
	}
	// A new wall that comes in flat is rounded onto the other for the last steps, and their edges there name the other.
	degree, met := 0, map[plan.Ref]bool{}
	for _, e := range g.Edges {
		if int(e.A) == at || int(e.B) == at {
			degree++
			met[g.Items[e.Item]] = true
		}
	}
	if degree < 2 || !met[s.Ref] && degree < 3 {
		t.Fatalf("at %v end %d edges, of %v; want the new wall to meet %s", s.At, degree, met, s.Ref.ID)
	}
}

// BenchmarkSnap is one move of the pointer while a wall is drawn and while the select tool hovers, in a plan of offices that
// fills the picture.
func BenchmarkSnap(b *testing.B) {
	for _, n := range []int{5000, 20000} {
		side := int(math.Sqrt(float64(n)))
		walls := make([]plan.Wall, 0, n)
		for i := range n {
			x, y := float64(i%side), float64(i/side)
			end := m(x+.8, y)
			if i%2 == 0 {
				end = m(x+.2, y+.9)
			}
			walls = append(walls, plan.Wall{ID: fmt.Sprint("W", i), Line: plan.ChainOf(m(x, y), end), Thickness: 1000})
		}
		p := plan.From(plan.Parts{Walls: walls})
		for name, scale := range map[string]float64{"room": 0.04, "whole": 800 / float64(side) / 1000} {
			c := view.Camera{CX: float64(side) * 500, CY: float64(side) * 500, Scale: scale, W: 1600, H: 1000, K: 1}
			from := m(float64(side)/2, float64(side)/3)
			b.Run(fmt.Sprintf("walls=%d/view=%s", n, name), func(b *testing.B) {
				s := &pick.Snapper{On: pick.AllSnaps}
				b.ReportAllocs()
				for b.Loop() {
					s.At(p, c, 803, 504, pick.SnapTo{From: &from})
				}
			})
		}
	}
}
