package walk_test

import (
	"context"
	"errors"
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
	"enfilade/solver/walk"
)

// lengths returns the lengths of the approach and of the full walk; +Inf where there is none.
func lengths(t interface{ Fatal(...any) }, m *mesh.Mesh, from, to exact.Pt, height int32) [2]float64 {
	cones, err := sight.New(m).Cones(to, height, sight.Clip{})
	if err != nil || cones == nil {
		cones = []sight.Cone{}
	}
	both := [2]float64{math.Inf(1), math.Inf(1)}
	paths, err := walk.New(m).Flood(context.Background(), from, []walk.Goal{{Eye: to, Cones: cones}, {Spot: walk.At(to)}})
	if errors.Is(err, walk.ErrInside) {
		return both
	}
	if err != nil {
		t.Fatal(err)
	}
	for i, p := range paths {
		if p.Found {
			both[i] = p.Length
		}
	}
	return both
}

// TestFloodLaws: an approach and a walk are as long as before when the plan is shifted, when its walls come in another order
// and when walls are split in two, and when it is turned or mirrored, unless a crossing lies on a border between pixels.
func TestFloodLaws(t *testing.T) {
	for name, plans := range plantest.Small() {
		t.Run(name, rapid.MakeCheck(func(t *rapid.T) {
			p := plans.Draw(t, "plan")
			if p.Floor().Len() == 0 {
				t.Skip("no floor: the box would follow the marks")
			}
			t.Log(plantest.Text(p))
			g, m := graphAndMesh(t, p)
			at := places(p, g)
			pick := rapid.IntRange(0, len(at)-1)
			from, to, height := at[pick.Draw(t, "from")], at[pick.Draw(t, "to")], heights.Draw(t, "height")
			want := lengths(t, m, from, to, height)
			law := func(what string, q *plan.Plan, move plantest.Motion) {
				_, n := graphAndMesh(t, q)
				got := lengths(t, n, move.Point(from), move.Point(to), height)
				if !near(got[0], want[0]) || !near(got[1], want[1]) {
					t.Errorf("%s: approach and walk from %v to %v %v, want %v", what, from, to, got, want)
				}
			}
			shift := plantest.Motion{Shift: exact.Vec{X: rapid.Int32Range(-1e6, 1e6).Draw(t, "dx"), Y: rapid.Int32Range(-1e6, 1e6).Draw(t, "dy")}}
			law("shifted", plantest.Moved(p, shift), shift)
			law("shuffled", plantest.Shuffled(p, rapid.Uint64().Draw(t, "seed")), plantest.Motion{})
			if o, _ := arrange.Draw(p); !plantest.Halves(o) {
				turn := plantest.Motion{Mirror: rapid.Bool().Draw(t, "mirror"), Turns: rapid.IntRange(0, 3).Draw(t, "turns")}
				law("turned", plantest.Moved(p, turn), turn)
			}
			if split, n := plantest.SplitWalls(p); n > 0 && !plantest.Bends(p, split) {
				law("split", split, plantest.Motion{})
			}
		}))
	}
}

// seeded are plans in general position, larger than the slow twin could take.
func seeded(t *testing.T, walls int) map[string]*plan.Plan {
	t.Helper()
	return map[string]*plan.Plan{
		"office": plantest.Office(11, walls), "clutter": plantest.Clutter(12, walls), "maze": plantest.Maze(13, walls),
	}
}

// TestWalkLaws: a walk is as long backwards, never longer than by way of a third place, never shorter than the straight
// line, and never shorter than the approach to what sees its end.
func TestWalkLaws(t *testing.T) {
	for name, p := range seeded(t, 800) {
		_, m := graphAndMesh(t, p)
		var at []exact.Pt
		for _, s := range p.Starts() {
			at = append(at, s.At)
		}
		n := len(at)
		approach, full := make([][]float64, n), make([][]float64, n)
		walks := 0
		for i := range at {
			for j := range at {
				l := lengths(t, m, at[i], at[j], eye)
				approach[i], full[i] = append(approach[i], l[0]), append(full[i], l[1])
			}
		}
		for i := range at {
			for j := range at {
				if !near(full[i][j], full[j][i]) {
					t.Errorf("%s: %v from %v to %v, %v back", name, full[i][j], at[i], at[j], full[j][i])
				}
				if math.IsInf(full[i][j], 1) {
					continue
				}
				walks++
				if full[i][j] < exact.Dist(at[i], at[j])*(1-1e-12) || approach[i][j] > full[i][j]*(1+1e-12) {
					t.Errorf("%s: from %v to %v: approach %v, walk %v", name, at[i], at[j], approach[i][j], full[i][j])
				}
				for k := range at {
					if full[i][j] > (full[i][k]+full[k][j])*(1+1e-9) {
						t.Errorf("%s: %v from %v to %v, less by way of %v", name, full[i][j], at[i], at[j], at[k])
					}
				}
			}
		}
		if walks < n*n/3 {
			t.Errorf("%s: only %d walks of %d", name, walks, n*n)
		}
	}
}

// TestApproachEnds holds the law of where an approach ends: on a border of the region, square to it, or at one of its ends,
// or where something that stops walking meets it. Just before, the target is not seen.
func TestApproachEnds(t *testing.T) {
	square, ends, cut := 0, 0, 0
	for name, p := range seeded(t, 800) {
		g, m := graphAndMesh(t, p)
		eyes, walls := sight.New(m), stoppers(g)
		for _, target := range p.Targets() {
			r, err := eyes.Region(target.At, eye)
			if err != nil {
				continue
			}
			ring := borderOf(r)
			cones, _ := eyes.Cones(target.At, eye, sight.Clip{})
			for _, s := range p.Starts() {
				paths, err := walk.New(m).Flood(context.Background(), s.At, []walk.Goal{{Eye: target.At, Cones: cones}})
				if err != nil || !paths[0].Found || paths[0].Length < 20 {
					continue
				}
				a := paths[0]
				switch {
				case slices.ContainsFunc(ring, func(b border) bool { return b.from(a.End) < tiny && b.squareTo(lastLeg(a)) }):
					square++
				case slices.ContainsFunc(ring, func(b border) bool { return math.Hypot(b.a[0]-a.End[0], b.a[1]-a.End[1]) < tiny }):
					ends++
				case slices.ContainsFunc(walls, func(b border) bool { return b.from(a.End) < tiny }):
					cut++
				default:
					t.Errorf("%s: the approach from %v to %v ends at %v by no law", name, s.At, target.At, a.End)
				}
				if before, ok := justBefore(a, walls); ok && eyes.Sees(target.At, before, eye) {
					t.Errorf("%s: the approach from %v to %v ends at %v, yet the target is seen from %v", name, s.At, target.At, a.End, before)
				}
			}
		}
	}
	t.Logf("%d ends square to a border, %d at an end, %d at something that stops walking", square, ends, cut)
	if square < 20 || ends < 20 {
		t.Errorf("the plans lost their aim: %d ends square to a border, %d at an end of one", square, ends)
	}
}

func lastLeg(a walk.Path) [2]float64 {
	last := a.Turns[len(a.Turns)-1]
	return [2]float64{a.End[0] - float64(last.X), a.End[1] - float64(last.Y)}
}

// justBefore returns the grid point two millimetres before a walk's end, if the last leg is long enough. On the way along the
// back of a thin wall the front may be seen, as the point is and the walker's side is not: there is no such point then.
func justBefore(a walk.Path, walls []border) (exact.Pt, bool) {
	leg, last := lastLeg(a), a.Turns[len(a.Turns)-1]
	long := math.Hypot(leg[0], leg[1])
	if long < 40 {
		return exact.Pt{}, false
	}
	k := 1 - 20/long
	p := exact.Pt{X: last.X + int32(math.Round(k*leg[0])), Y: last.Y + int32(math.Round(k*leg[1]))}
	onWall := slices.ContainsFunc(walls, func(b border) bool { return b.from([2]float64{float64(p.X), float64(p.Y)}) < 1 })
	return p, !onWall
}

// tiny is how far apart, in grid units, two places may be measured that are one: coordinates of 2^23 carry 2^-29.
const tiny = 1e-6

// border is a straight piece.
type border struct{ a, b [2]float64 }

func borderOf(r *sight.Region) []border {
	var ring []border
	for i := range r.Len() {
		ax, ay := r.Point(i)
		bx, by := r.Point((i + 1) % r.Len())
		ring = append(ring, border{[2]float64{ax, ay}, [2]float64{bx, by}})
	}
	return ring
}

func stoppers(g *arrange.Graph) []border {
	var list []border
	for _, e := range g.Edges {
		if a, b := g.Pts[e.A], g.Pts[e.B]; e.Walk {
			list = append(list, border{a: [2]float64{float64(a.X), float64(a.Y)}, b: [2]float64{float64(b.X), float64(b.Y)}})
		}
	}
	return list
}

// from returns the distance of p from the piece.
func (b border) from(p [2]float64) float64 {
	dx, dy := b.b[0]-b.a[0], b.b[1]-b.a[1]
	k := ((p[0]-b.a[0])*dx + (p[1]-b.a[1])*dy) / (dx*dx + dy*dy)
	k = min(max(k, 0), 1)
	return math.Hypot(b.a[0]+k*dx-p[0], b.a[1]+k*dy-p[1])
}

func (b border) squareTo(leg [2]float64) bool {
	dx, dy := b.b[0]-b.a[0], b.b[1]-b.a[1]
	return math.Abs(dx*leg[0]+dy*leg[1]) < 1e-7*math.Hypot(dx, dy)*math.Hypot(leg[0], leg[1])
}
