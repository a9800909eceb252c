package walk_test

import (
	"context"
	"math"
	"math/rand/v2"
	"testing"

	"pgregory.net/rapid"

	"enfilade/solver/exact"
	"enfilade/solver/mesh"
	"enfilade/solver/plan"
	"enfilade/solver/plantest"
	"enfilade/solver/walk"
)

// TestFieldAgainstTwin holds distances against the slow exact walks, from and to faces, ends, corners, crossings and places
// in the open.
func TestFieldAgainstTwin(t *testing.T) {
	for name, plans := range plantest.Small() {
		t.Run(name, rapid.MakeCheck(func(t *rapid.T) {
			p := plans.Draw(t, "plan")
			t.Log(plantest.Text(p))
			g, m := graphAndMesh(t, p)
			twin := plantest.NewTwin(g)
			at := append(places(p, g), openPlaces(m, nil)...)
			pick := rapid.IntRange(0, len(at)-1)
			from := at[pick.Draw(t, "from")]
			d, err := walk.New(m).Field(context.Background(), from)
			for range 5 {
				to := at[pick.Draw(t, "to")]
				far, ok := math.Inf(1), false
				if err == nil {
					far, ok = d.At(to)
				}
				want := twin.Walk(from, to).Length
				if ok == math.IsInf(want, 1) || !near(far, want) {
					t.Errorf("from %v to %v: %v, %v, want %v", from, to, far, ok, want)
				}
			}
		}))
	}
}

// TestFieldOfPlans holds distances against floods to single goals on larger plans, with the flood shared by goals and field.
func TestFieldOfPlans(t *testing.T) {
	for name, p := range seeded(t, 400) {
		_, m := graphAndMesh(t, p)
		at := openPlaces(m, nil)
		var goals []walk.Goal
		for i := range 60 {
			goals = append(goals, walk.Goal{Spot: walk.At(at[i*7919%len(at)])})
		}
		f := walk.New(m)
		for _, s := range p.Parts().Starts[:4] {
			want, err := f.Flood(context.Background(), s.At, goals)
			if err != nil {
				continue
			}
			got, d, err := f.FloodField(context.Background(), s.At, goals)
			if err != nil {
				t.Fatal(err)
			}
			for i := range goals {
				far, ok := d.At(at[i*7919%len(at)])
				if ok != want[i].Found || ok && !near(far, want[i].Length) || got[i].Length != want[i].Length || got[i].End != want[i].End {
					t.Errorf("%s: from %v to %v: the field says %v, its flood %v, a flood %v", name, s.At, at[i*7919%len(at)], far, got[i], want[i])
				}
			}
		}
	}
}

// sampler draws grid points of the walkable floor.
type sampler struct {
	*rand.Rand
	m *mesh.Mesh
}

// within draws a point near triangle t's inside.
func (s sampler) within(t *mesh.Tri) exact.Pt {
	u, v := s.Float64(), s.Float64()
	if u+v > 1 {
		u, v = 1-u, 1-v
	}
	a, b, c := t.P[0], t.P[1].Sub(t.P[0]), t.P[2].Sub(t.P[0])
	return exact.Pt{X: a.X + int32(u*float64(b.X)+v*float64(c.X)), Y: a.Y + int32(u*float64(b.Y)+v*float64(c.Y))}
}

// small draws the plans whose places are far apart compared with the grid.
func small() map[string]*rapid.Generator[*plan.Plan] {
	return map[string]*rapid.Generator[*plan.Plan]{"tangles": plantest.Tangles(), "lines": plantest.Lines(), "slivers": plantest.Slivers()}
}

// TestFieldSpanLaws holds the span of zones against distances of their points: none is nearer or farther, and the nearest and
// the farthest are as far as told, as nearly as a grid point beside them can tell.
func TestFieldSpanLaws(t *testing.T) {
	apart, found := 0, 0
	for name, plans := range small() {
		t.Run(name, rapid.MakeCheck(func(t *rapid.T) {
			p := plans.Draw(t, "plan")
			t.Log(plantest.Text(p))
			g, m := graphAndMesh(t, p)
			at := places(p, g)
			point := rapid.SampledFrom(at)
			d, err := walk.New(m).Field(context.Background(), point.Draw(t, "start"))
			if err != nil {
				t.Skip("no room")
			}
			var ring []exact.Pt
			for range rapid.IntRange(3, 5).Draw(t, "corners") {
				ring = append(ring, point.Draw(t, "corner"))
			}
			if exact.Orient(ring[0], ring[1], ring[2]) == 0 {
				t.Skip("no zone")
			}
			t.Logf("zone %v", ring)
			area := zoneMesh(t, ring)
			s := d.Span(walk.NewZone(m, area))
			pick := sampler{rand.New(rand.NewPCG(1, uint64(len(at)))), m}
			least, most := math.Inf(1), 0.0
			// On a wall the nearer side counts, which may not be the zone's.
			bars := barsOf(m)
			inZone := func(q exact.Pt) bool { return connected(area, q, q) && roomAt(bars, q) >= 1 }
			for i := range area.Tris {
				if area.Tris[i].Flags&mesh.FlagNoWalk != 0 {
					continue
				}
				for range 15 {
					q := pick.within(&area.Tris[i])
					if _, ok := d.At(q); ok && inZone(q) {
						least = min(least, climb(d, q, inZone, -1))
						most = max(most, climb(d, q, inZone, 1))
					}
				}
			}
			switch {
			case !s.Found && most > 0:
				t.Errorf("nothing of the zone is reached, yet there are points as far as %v", most)
			case !s.Found:
			case least < s.Near-1e-6 || most > s.Far*(1+1e-12)+1e-6:
				t.Errorf("from %v to %v, yet there are points from %v to %v: %+v", s.Near, s.Far, least, most, s)
			default:
				nearTri, farTri := s.Tris()
				for _, end := range []struct {
					at  [2]float64
					far float64
					tri int32
				}{{s.NearAt, s.Near, nearTri}, {s.FarAt, s.Far, farTri}} {
					switch off := besides(d, m, end.tri, end.at, end.far); {
					case math.IsInf(off, 1):
						apart++
					case off > 1e-4:
						t.Errorf("%v is told to be %v far, yet one beside it is %v more or less than can be", end.at, end.far, off)
					default:
						found++
					}
				}
			}
		}))
	}
	t.Logf("%d nearest and farthest points confirmed, %d without a grid point beside them", found, apart)
	if found < 100 || apart > found {
		t.Errorf("%d nearest and farthest points confirmed, %d without a grid point beside them", found, apart)
	}
}

// besides returns by how much the distances of grid points of a triangle near a place differ more from what is told for it than
// they can, being no farther apart than they are; +Inf when there are no such points.
func besides(d *walk.Field, m *mesh.Mesh, tri int32, at [2]float64, told float64) float64 {
	off, t := math.Inf(1), &m.Tris[tri]
	for dx := -4; dx <= 4; dx++ {
		for dy := -4; dy <= 4; dy++ {
			q := exact.Pt{X: int32(math.Round(at[0])) + int32(dx), Y: int32(math.Round(at[1])) + int32(dy)}
			if exact.Orient(t.P[0], t.P[1], q) >= 0 && exact.Orient(t.P[1], t.P[2], q) >= 0 && exact.Orient(t.P[2], t.P[0], q) >= 0 {
				over := math.Abs(d.AtWithin(tri, q)-told) - math.Hypot(float64(q.X)-at[0], float64(q.Y)-at[1])
				if math.IsInf(off, 1) || over > off {
					off = over
				}
			}
		}
	}
	return off
}

// climb walks over the grid to ever greater distances, or lesser ones when up is -1, and returns the last.
func climb(d *walk.Field, p exact.Pt, within func(exact.Pt) bool, up float64) float64 {
	best, _ := d.At(p)
	for step := int32(512); step > 0; {
		better := false
		for dx := int32(-2); dx <= 2; dx++ {
			for dy := int32(-2); dy <= 2; dy++ {
				q := p.Add(exact.Vec{X: dx * step, Y: dy * step})
				if far, ok := d.At(q); ok && (far-best)*up > 0 && within(q) {
					p, best, better = q, far, true
				}
			}
		}
		if !better {
			step /= 2
		}
	}
	return best
}

// TestFieldContoursLaws: every point of a contour is as far as it says, and the way from a nearer point to a farther one in the
// same triangle crosses the contours between.
func TestFieldContoursLaws(t *testing.T) {
	crossings := 0
	for name, plans := range small() {
		t.Run(name, rapid.MakeCheck(func(t *rapid.T) {
			p := plans.Draw(t, "plan")
			t.Log(plantest.Text(p))
			g, m := graphAndMesh(t, p)
			d, err := walk.New(m).Field(context.Background(), rapid.SampledFrom(places(p, g)).Draw(t, "start"))
			if err != nil {
				t.Skip("no room")
			}
			const step, flat = 777, 1
			lines, bars := map[float64][]border{}, barsOf(m)
			if err := d.Contours(context.Background(), step, flat, func(level float64, line [][2]float64) {
				for i := 1; i < len(line); i++ {
					lines[level] = append(lines[level], border{line[i-1], line[i]})
				}
				for _, q := range line {
					// The grid point beside it is as far but for the way there, unless a wall stands between.
					at := exact.Pt{X: int32(math.Round(q[0])), Y: int32(math.Round(q[1]))}
					if far, ok := d.At(at); ok && math.Abs(far-level) > 1.5 && roomAt(bars, at) > 2 {
						t.Errorf("the contour of %v passes %v, which is %v far", level, q, far)
					}
				}
			}); err != nil {
				t.Fatal(err)
			}
			pick := sampler{rand.New(rand.NewPCG(2, uint64(len(m.Tris)))), m}
			for i := range m.Tris {
				if m.Tris[i].Flags&mesh.FlagNoWalk != 0 {
					continue
				}
				for range 20 {
					a, b := pick.within(&m.Tris[i]), pick.within(&m.Tris[i])
					from, ok := d.At(a)
					to, _ := d.At(b)
					if !ok || a == b || roomAt(bars, a) < 3 || roomAt(bars, b) < 3 {
						continue
					}
					for level := float64(step); level <= max(from, to); level += step {
						if min(from, to) > level-3 || max(from, to) < level+3 {
							continue // on the same side, or too near to tell
						}
						crossings++
						if !crosses(lines[level], a, b) {
							t.Errorf("from %v, %v far, to %v, %v far, no contour of %v is crossed", a, from, b, to, level)
						}
					}
				}
			}
		}))
	}
	if crossings < 10000 {
		t.Errorf("only %d crossings", crossings)
	}
}

// crosses reports whether the straight way from a to b comes within a unit of one of the pieces' ends or crosses one.
func crosses(pieces []border, a, b exact.Pt) bool {
	way := border{[2]float64{float64(a.X), float64(a.Y)}, [2]float64{float64(b.X), float64(b.Y)}}
	for _, w := range pieces {
		if way.crosses(w) || way.from(w.a) < 1 || way.from(w.b) < 1 {
			return true
		}
	}
	return false
}

// crosses reports whether two pieces meet.
func (b border) crosses(o border) bool {
	side := func(w border, p [2]float64) float64 {
		return (w.b[0]-w.a[0])*(p[1]-w.a[1]) - (w.b[1]-w.a[1])*(p[0]-w.a[0])
	}
	return side(o, b.a)*side(o, b.b) <= 0 && side(b, o.a)*side(b, o.b) <= 0
}
