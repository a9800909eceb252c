package walk_test

import (
	"context"
	"math"
	"slices"
	"testing"

	"pgregory.net/rapid"

	"enfilade/solver/arrange"
	"enfilade/solver/exact"
	"enfilade/solver/mesh"
	"enfilade/solver/plan"
	"enfilade/solver/plantest"
	"enfilade/solver/sight"
)

// TestWidthsAgainstPairs holds clear widths against a second answer that knows no mesh and no gaps: shut the connections of
// all pairs of obstacle points, shortest first, corner with corner and corner with edge, until start and goal are parted.
// That answer also narrows at the ends, where a body has no more room than twice the distance to the nearest obstacle.
func TestWidthsAgainstPairs(t *testing.T) {
	narrow, free, none := 0, 0, 0
	for name, plans := range map[string]*rapid.Generator[*plan.Plan]{"tangles": plantest.Tangles(), "lines": plantest.Lines()} {
		t.Run(name, rapid.MakeCheck(func(t *rapid.T) {
			p := plans.Draw(t, "plan")
			t.Log(plantest.Text(p))
			_, m := graphAndMesh(t, p)
			bars := barsOf(m)
			w := widthsOf(t, m)
			at := openPlaces(m, bars)
			if len(at) < 2 {
				t.Skip("no room")
			}
			pick := rapid.IntRange(0, len(at)-1)
			from, to := at[pick.Draw(t, "from")], at[pick.Draw(t, "to")]
			if err := w.From(from); err != nil {
				t.Fatal(err)
			}
			roomOf := func() float64 { return 2 * min(roomAt(bars, from), roomAt(bars, to)) }
			aim := rapid.Bool().Draw(t, "aim at a gap")
			for k := 0; k < len(at) && aim && w.ToPoint(to).Clear >= roomOf(); k++ {
				to = at[k]
			}
			got, room := w.ToPoint(to), roomOf()
			want, found := partedAt(t, bars, from, to)
			switch {
			case found != got.Found:
				t.Errorf("from %v to %v: found %v, want %v", from, to, got.Found, found)
			case !found:
				none++
			// Pairs are shut on the rounded grid: a place may be half a unit on the wrong side of one.
			case math.Abs(min(got.Clear, room)-min(want, room)) > 2:
				t.Errorf("from %v to %v: %v between %v, room for %v; want %v", from, to, got.Clear, got.Gap, room, want)
			case got.Clear < room:
				narrow++
			default:
				free++
			}
		}))
	}
	t.Logf("%d ways narrowed by a gap, %d by their ends, %d without a way", narrow, free, none)
	if narrow < 15 || none < 5 {
		t.Errorf("the plans lost their aim: %d ways narrowed by a gap, %d without a way", narrow, none)
	}
}

// bar is an edge that stops walking.
type bar struct{ a, b exact.Pt }

// barsOf lists the edges of m that stop someone on the floor.
func barsOf(m *mesh.Mesh) []bar {
	var bars []bar
	for i := range m.Tris {
		t := &m.Tris[i]
		for k := range 3 {
			if t.Flags&mesh.FlagNoWalk == 0 && t.StopsWalk(k) {
				a, b := t.P[k], t.P[mesh.Inc(k)]
				if b.Less(a) {
					a, b = b, a
				}
				bars = append(bars, bar{a, b})
			}
		}
	}
	slices.SortFunc(bars, func(x, y bar) int {
		if c := x.a.Compare(y.a); c != 0 {
			return c
		}
		return x.b.Compare(y.b)
	})
	return slices.Compact(bars)
}

func (b bar) border() border {
	return border{[2]float64{float64(b.a.X), float64(b.a.Y)}, [2]float64{float64(b.b.X), float64(b.b.Y)}}
}

// roomAt returns the distance of p from the nearest bar.
func roomAt(bars []bar, p exact.Pt) float64 {
	room := math.Inf(1)
	for _, b := range bars {
		room = min(room, b.border().from([2]float64{float64(p.X), float64(p.Y)}))
	}
	return room
}

// openPlaces returns the grid points next to the centres of the walkable triangles, and those at the middles of their edges.
func openPlaces(m *mesh.Mesh, bars []bar) []exact.Pt {
	var at []exact.Pt
	for i := range m.Tris {
		t := &m.Tris[i]
		if t.Flags&mesh.FlagNoWalk != 0 {
			continue
		}
		a, b, c := t.P[0], t.P[1], t.P[2]
		at = append(at, exact.Pt{X: (a.X + b.X + c.X) / 3, Y: (a.Y + b.Y + c.Y) / 3}, exact.Pt{X: (a.X + b.X) / 2, Y: (a.Y + b.Y) / 2})
	}
	return slices.DeleteFunc(at, func(p exact.Pt) bool { return roomAt(bars, p) < 3 })
}

// pair is a connection of two obstacle points.
type pair struct {
	a, b   exact.Pt // b rounded to the grid
	length float64
}

// pairsOf lists the connections of corners with corners and with the feet on bars that cross no bar, shortest first.
func pairsOf(bars []bar) []pair {
	var corners []exact.Pt
	for _, b := range bars {
		corners = append(corners, b.a, b.b)
	}
	slices.SortFunc(corners, exact.Pt.Compare)
	corners = slices.Compact(corners)
	var pairs []pair
	add := func(a, b exact.Pt, length float64, on bar) {
		for _, w := range bars {
			if w != on && exact.Orient(a, b, w.a)*exact.Orient(a, b, w.b) < 0 && exact.Orient(w.a, w.b, a)*exact.Orient(w.a, w.b, b) < 0 {
				return
			}
		}
		if a != b {
			pairs = append(pairs, pair{a, b, length})
		}
	}
	for i, c := range corners {
		for _, d := range corners[:i] {
			add(c, d, exact.Dist(c, d), bar{})
		}
		for _, w := range bars {
			along := w.b.Sub(w.a)
			k := float64(c.Sub(w.a).Dot(along)) / float64(along.Len2())
			if k <= 0 || k >= 1 || exact.Orient(w.a, w.b, c) == 0 {
				continue
			}
			foot := exact.Pt{X: w.a.X + int32(math.Round(k*float64(along.X))), Y: w.a.Y + int32(math.Round(k*float64(along.Y)))}
			add(c, foot, math.Abs(float64(along.Cross(c.Sub(w.a))))/math.Sqrt(float64(along.Len2())), w)
		}
	}
	slices.SortStableFunc(pairs, func(p, q pair) int {
		switch {
		case p.length < q.length:
			return -1
		case p.length > q.length:
			return 1
		}
		return 0
	})
	return pairs
}

// partedAt returns the length of the pair whose shutting parts from and to, all shorter ones being shut, +Inf when they stay
// connected, and false when they are parted from the first. The bars stand in a box of floor.
func partedAt(t interface{ Fatal(...any) }, bars []bar, from, to exact.Pt) (float64, bool) {
	const far = 1 << 28
	o := arrange.Outline{Items: make([]plan.Ref, 1), Bodies: make([]arrange.Body, 1)}
	box := []exact.Pt{{X: -far, Y: -far}, {X: far, Y: -far}, {X: far, Y: far}, {X: -far, Y: far}}
	for i, a := range box {
		o.Segments = append(o.Segments, arrange.Segment{A: a, B: box[(i+1)%4]})
	}
	for _, b := range bars {
		o.Segments = append(o.Segments, arrange.Segment{A: b.a, B: b.b, Stops: arrange.Stops{Walk: true}, Body: arrange.NoBody})
	}
	pairs, n := pairsOf(bars), len(o.Segments)
	joined := func(count int) bool {
		o.Segments = o.Segments[:n]
		for _, p := range pairs[:count] {
			o.Segments = append(o.Segments, arrange.Segment{A: p.a, B: p.b, Stops: arrange.Stops{Walk: true}, Body: arrange.NoBody})
		}
		m, err := arrange.Build(context.Background(), arrange.Round(&o))
		if err != nil {
			t.Fatal(err)
		}
		return connected(m, from, to)
	}
	if !joined(0) {
		return 0, false
	}
	lo, hi := 0, len(pairs)+1 // joined with lo shut, parted with hi
	for hi-lo > 1 {
		if mid := (lo + hi) / 2; joined(mid) {
			lo = mid
		} else {
			hi = mid
		}
	}
	if lo == len(pairs) {
		return math.Inf(1), true
	}
	return pairs[lo].length, true
}

// connected reports whether a walk leads from one point to another, by flooding triangles.
func connected(m *mesh.Mesh, from, to exact.Pt) bool {
	seen := map[int32]bool{}
	var stack []int32
	holders := func(p exact.Pt, do func(int32)) {
		place, ok := m.Locate(p)
		switch {
		case !ok:
		case place.Corner >= 0:
			m.Around(mesh.EdgeOf(place.Tri, place.Corner), func(e mesh.Edge) { do(e.Tri()) })
		default:
			do(place.Tri)
			if place.Edge != mesh.None {
				do(m.Twin(place.Edge).Tri())
			}
		}
	}
	visit := func(t int32) {
		if !seen[t] && m.Tris[t].Flags&mesh.FlagNoWalk == 0 {
			seen[t] = true
			stack = append(stack, t)
		}
	}
	holders(from, visit)
	for len(stack) > 0 {
		t := stack[len(stack)-1]
		stack = stack[:len(stack)-1]
		for i := range 3 {
			if !m.Tris[t].StopsWalk(i) {
				visit(m.Tris[t].N[i].Tri())
			}
		}
	}
	found := false
	holders(to, func(t int32) { found = found || seen[t] })
	return found
}

// TestWidthsAgainstGrown walks with bodies a little narrower and as wide as the clear width: the first passes, the second
// does not. The polygon that stands for a body may exceed it by its stated excess.
func TestWidthsAgainstGrown(t *testing.T) {
	tried := 0
	for name, p := range seeded(t, 150) {
		o, _ := arrange.Draw(p)
		_, m := graphAndMesh(t, p)
		w, bars := widthsOf(t, m), barsOf(m)
		at := openPlaces(m, bars)
		for i, most := 0, tried+15; i < 300 && tried < most; i++ {
			from, to := at[i*7919%len(at)], at[i*104729%len(at)]
			if err := w.From(from); err != nil {
				t.Fatal(err)
			}
			got := w.ToPoint(to)
			room := min(roomAt(bars, from), roomAt(bars, to))
			if !got.Found || got.Clear/2 > arrange.MaxRadius {
				continue
			}
			stuck := int32(math.Ceil(got.Clear / 2)) // a body of this radius does not pass
			sides := []int{arrange.FineSides, arrange.CoarseSides}[tried%2]
			_, excess := arrange.Disc(stuck, sides)
			less := int32(got.Clear/2 - excess - 3) // rounding moves each outline by a unit at most
			if less < 1 || float64(stuck)+excess > room {
				continue
			}
			tried++
			for r, want := range map[int32]bool{less: true, stuck: false} {
				wide, err := arrange.Build(context.Background(), arrange.Round(arrange.Grow(o, m, r, sides)))
				if err != nil {
					t.Fatal(err)
				}
				if connected(wide, from, to) != want {
					t.Errorf("%s: clear width %v between %v from %v to %v: a body of radius %v passes: %v", name, got.Clear, got.Gap, from, to, r, !want)
				}
			}
		}
	}
	t.Logf("%d ways", tried)
	if tried < 30 {
		t.Errorf("only %d ways", tried)
	}
}

// TestWidthsToConesAgainstPoints: the way to a region is as wide as the widest one to a point of it.
func TestWidthsToConesAgainstPoints(t *testing.T) {
	same, less := 0, 0
	for seed := range plantest.Seeds(3) {
		for name, p := range map[string]*plan.Plan{"office": plantest.Office(seed, 60), "clutter": plantest.Clutter(seed, 60), "maze": plantest.Maze(seed, 60)} {
			_, m := graphAndMesh(t, p)
			w := widthsOf(t, m)
			for _, s := range p.Starts() {
				if w.From(s.At) != nil {
					continue
				}
				for _, target := range p.Targets() {
					cones, err := sight.New(m).Cones(target.At, eye, sight.Clip{})
					if err != nil {
						continue
					}
					got, most := w.ToCones(target.At, cones), 0.0
					for _, c := range cones {
						if q, ok := middleOf(m, target.At, c); ok && m.Tris[c.Tri].Flags&mesh.FlagNoWalk == 0 {
							if v := w.ToPoint(q); v.Found {
								most = max(most, v.Clear)
							}
						}
					}
					switch {
					case got.Clear == most:
						same++
					case got.Clear > most:
						less++
					default:
						t.Errorf("%s, seed %d: from %v to what sees %v %v, to a point there %v", name, seed, s.At, target.At, got.Clear, most)
					}
				}
			}
		}
	}
	t.Logf("%d as wide as to one of the middles, %d wider", same, less)
	if less*20 > same {
		t.Errorf("%d ways to regions are wider than to the middles of their cones, %d as wide", less, same)
	}
}

// middleOf returns a grid point inside a cone's part of its triangle, found by cutting it into its corners' mean; it reports
// false for slivers that hold none.
func middleOf(m *mesh.Mesh, from exact.Pt, c sight.Cone) (exact.Pt, bool) {
	t := &m.Tris[c.Tri]
	ring := [][2]float64{}
	for _, p := range t.P {
		ring = append(ring, [2]float64{float64(p.X - from.X), float64(p.Y - from.Y)})
	}
	for _, d := range [][2]float64{{float64(c.R.X), float64(c.R.Y)}, {-float64(c.L.X), -float64(c.L.Y)}} {
		var cut [][2]float64
		side := func(p [2]float64) float64 { return d[0]*p[1] - d[1]*p[0] }
		for i, p := range ring {
			q := ring[(i+1)%len(ring)]
			if side(p) >= 0 {
				cut = append(cut, p)
			}
			if side(p)*side(q) < 0 {
				k := side(p) / (side(p) - side(q))
				cut = append(cut, [2]float64{p[0] + k*(q[0]-p[0]), p[1] + k*(q[1]-p[1])})
			}
		}
		ring = cut
	}
	x, y := 0.0, 0.0
	for _, p := range ring {
		x, y = x+p[0]/float64(len(ring)), y+p[1]/float64(len(ring))
	}
	q := exact.Pt{X: from.X + int32(math.Round(x)), Y: from.Y + int32(math.Round(y))}
	v := q.Sub(from)
	inside := c.R.Cross(v) > 0 && v.Cross(c.L) > 0
	for i := range 3 {
		inside = inside && exact.Orient(t.P[i], t.P[mesh.Inc(i)], q) > 0
	}
	return q, inside
}
