package cgal_test

import (
	"errors"
	"math"
	"slices"
	"testing"

	"enfilade/solver/arrange"
	"enfilade/solver/exact"
	"enfilade/solver/plan"
	"enfilade/solver/plantest/cgal"
)

const metre = 10000

func pt(x, y float64) exact.Pt { return exact.Pt{X: int32(x * metre), Y: int32(y * metre)} }

var (
	solid   = arrange.Stops{Walk: true, Top: plan.Ceiling}
	glazing = arrange.Stops{Walk: true}
	screen  = arrange.Stops{Top: plan.Ceiling}
	low     = arrange.Stops{Walk: true, Top: 9000}
)

// sketch is a graph in the making whose edges meet only at ends.
type sketch struct {
	bodies []arrange.Body
	lines  map[[2]exact.Pt]arrange.Stops
	winds  map[[2]exact.Pt][]arrange.Wind
}

// room starts a sketch with a floor.
func room(ring ...exact.Pt) *sketch {
	s := &sketch{lines: map[[2]exact.Pt]arrange.Stops{}, winds: map[[2]exact.Pt][]arrange.Wind{}}
	return s.body(solid, ring...)
}

func (s *sketch) line(stops arrange.Stops, chain ...exact.Pt) *sketch {
	for i := 1; i < len(chain); i++ {
		s.lines[ordered(chain[i-1], chain[i])] = stops
	}
	return s
}

func (s *sketch) body(stops arrange.Stops, ring ...exact.Pt) *sketch {
	for i, p := range ring {
		q := ring[(i+1)%len(ring)]
		w := arrange.Wind{Body: int32(len(s.bodies)), Delta: 1}
		if q.Less(p) {
			w.Delta = -1
		}
		key := ordered(p, q)
		s.lines[key] = stops
		s.winds[key] = append(s.winds[key], w)
	}
	s.bodies = append(s.bodies, arrange.Body{Stops: stops})
	return s
}

func ordered(p, q exact.Pt) [2]exact.Pt {
	if q.Less(p) {
		p, q = q, p
	}
	return [2]exact.Pt{p, q}
}

func (s *sketch) graph() *arrange.Graph {
	g := &arrange.Graph{Bodies: s.bodies}
	keys := make([][2]exact.Pt, 0, len(s.lines))
	for k := range s.lines {
		keys = append(keys, k)
		g.Pts = append(g.Pts, k[0], k[1])
	}
	slices.SortFunc(g.Pts, exact.Pt.Compare)
	g.Pts = slices.Compact(g.Pts)
	slices.SortFunc(keys, func(a, b [2]exact.Pt) int {
		if c := a[0].Compare(b[0]); c != 0 {
			return c
		}
		return a[1].Compare(b[1])
	})
	index := func(p exact.Pt) int32 {
		i, _ := slices.BinarySearchFunc(g.Pts, p, exact.Pt.Compare)
		return int32(i)
	}
	for _, k := range keys {
		e := arrange.Edge{A: index(k[0]), B: index(k[1]), Stops: s.lines[k], Wind0: int32(len(g.Winds))}
		g.Winds = append(g.Winds, s.winds[k]...)
		e.Wind1 = int32(len(g.Winds))
		g.Edges = append(g.Edges, e)
	}
	return g
}

func unitSquare() *sketch { return room(pt(0, 0), pt(1, 0), pt(1, 1), pt(0, 1)) }
func lRoom() *sketch      { return room(pt(0, 0), pt(6, 0), pt(6, 2), pt(2, 2), pt(2, 6), pt(0, 6)) }
func square(more ...exact.Pt) *sketch {
	return room(slices.Concat([]exact.Pt{pt(0, 0), pt(10, 0)}, more, []exact.Pt{pt(10, 10), pt(0, 10)})...)
}

func pillar(stops arrange.Stops) *sketch {
	return square().body(stops, pt(4, 4), pt(6, 4), pt(6, 6), pt(4, 6))
}

// halved is a square cut across at y = 5, by one thing up to x = 8 and by another beyond.
func halved(left, right arrange.Stops) *sketch {
	s := room(pt(0, 0), pt(10, 0), pt(10, 5), pt(10, 10), pt(0, 10), pt(0, 5))
	return s.line(left, pt(0, 5), pt(8, 5)).line(right, pt(8, 5), pt(10, 5))
}

// near holds got against want to a relative error of 1e-12: closed forms leave CGAL only the rounding of its last steps.
func near(got, want float64) bool {
	return got == want || math.Abs(got-want) <= 1e-12*math.Abs(want)
}

// The reference itself is held against closed forms before it judges anything else.
func TestReferenceRegion(t *testing.T) {
	r := cgal.Start(t)
	thin := square().line(solid, pt(2, 5), pt(8, 5))
	cross := square().line(solid, pt(2, 5), pt(5, 5)).line(solid, pt(5, 5), pt(8, 5)).line(solid, pt(5, 2), pt(5, 5))
	for _, c := range []struct {
		name               string
		plan               *sketch
		eye                exact.Pt
		sectors            int
		area, wall, unseen float64 // square metres, metres
	}{
		{"unit square", unitSquare(), pt(0.5, 0.5), 1, 1, 4, 0},
		{"unit square, eye on a side", unitSquare(), pt(0, 0.5), 1, 1, 4, 0},
		{"unit square, eye in a corner", unitSquare(), pt(0, 0), 1, 1, 4, 0},
		// The ray past the inner corner (2,2) runs from (5,1) to (0, 8/3).
		{"L", lRoom(), pt(5, 1), 1, 38.0 / 3, 14 + 2.0/3, 2 * math.Sqrt(10) / 3},
		{"L, eye in the inner corner", lRoom(), pt(2, 2), 1, 20, 24, 0},
		{"L, eye in line with a side", lRoom(), pt(2, 1), 1, 20, 24, 0},
		// The rays past (4,4) and (6,4) end at (2,10) and (8,10) and hide a trapezium of 24 square metres.
		{"pillar", pillar(solid), pt(5, 1), 1, 76, 36, 4 * math.Sqrt(10)},
		{"pillar seen over", pillar(low), pt(5, 1), 1, 100, 40, 0},
		{"eye on the pillar's face", pillar(solid), pt(5, 4), 1, 40, 20, 8},
		{"eye on the pillar's corner", pillar(solid), pt(4, 4), 1, 64, 32, 8},
		{"thin wall", thin, pt(5, 1), 1, 100 - 10*10.0/2 + 16.0/3, 31 + 1.0/3, 20.0 / 3},
		{"eye on the wall", thin, pt(5, 5), 2, 100, 40, 0},
		{"eye at the wall's end", thin, pt(8, 5), 1, 100, 40, 0},
		{"wall edge-on", thin, pt(9, 5), 1, 100, 40, 0},
		{"eye where walls meet", cross, pt(5, 5), 3, 100, 40, 0},
		{"glazing hides nothing", halved(glazing, glazing), pt(5, 1), 1, 100, 40, 0},
		{"a screen hides", halved(screen, screen), pt(5, 1), 1, 50, 30, 0},
	} {
		r.Plan(c.plan.graph(), 16000)
		got, err := r.Region(c.eye)
		if err != nil {
			t.Errorf("%s: %v", c.name, err)
			continue
		}
		if got.Sectors != c.sectors || !near(got.Area, c.area*metre*metre) || !near(got.Wall, c.wall*metre) ||
			!near(got.Occluding, c.unseen*metre) {
			t.Errorf("%s: got %+v, want %d sectors, %v m², %v m on walls, %v m occluding", c.name, got, c.sectors, c.area,
				c.wall, c.unseen)
		}
	}
}

func TestReferenceWalk(t *testing.T) {
	r := cgal.Start(t)
	thin := square().line(solid, pt(2, 5), pt(8, 5))
	inf := math.Inf(1)
	for _, c := range []struct {
		name        string
		plan        *sketch
		start, goal exact.Pt
		walk        float64 // metres
		approach    float64 // metres, to where goal is seen
	}{
		{"across the unit square", unitSquare(), pt(0, 0), pt(1, 1), math.Sqrt2, 0},
		// From (1,5) square to the ray through (5,1) and (2,2), of slope -1/3.
		{"round the corner of the L", lRoom(), pt(1, 5), pt(5, 1), 2 * math.Sqrt(10), 2.529822128134704},
		{"round the pillar", pillar(solid), pt(5, 1), pt(5, 9), 2 + 2*math.Sqrt(10), 2.529822128134704},
		{"round what is seen over", pillar(low), pt(5, 1), pt(5, 9), 2 + 2*math.Sqrt(10), 0},
		// The ray from (5,1) past (8,5) rises 4 for each 3: the foot of the perpendicular is (8.84, 6.12).
		{"round a thin wall", thin, pt(5, 9), pt(5, 1), 10, 4.8},
		{"from the wall itself", thin, pt(5, 5), pt(5, 9), 4, 0},
		{"along a ray that grazes the wall's end", thin, pt(5, 9), pt(8, 3), 7, 3},
		{"no way round glazing", halved(glazing, glazing), pt(5, 9), pt(5, 1), inf, 0},
		{"no way at all", halved(solid, solid), pt(5, 9), pt(5, 1), inf, inf},
		{"through a screen", halved(screen, screen), pt(5, 9), pt(5, 1), 8, 4},
		{"through the screen beside glazing", halved(glazing, screen), pt(5, 9), pt(9, 1), 5 + math.Sqrt(17), 0},
	} {
		r.Plan(c.plan.graph(), 16000)
		walk, err := r.Walk(c.start, c.goal)
		if err != nil {
			t.Errorf("%s: %v", c.name, err)
			continue
		}
		if !near(walk, c.walk*metre) {
			t.Errorf("%s: walk %v m, want %v", c.name, walk/metre, c.walk)
		}
		length, x, y, err := r.Approach(c.start, c.goal)
		if err != nil || !near(length, c.approach*metre) {
			t.Errorf("%s: approach %v m, %v, want %v", c.name, length/metre, err, c.approach)
			continue
		}
		if length == 0 || math.IsInf(length, 1) {
			continue
		}
		off, walked, err := r.Judge(c.start, c.goal, x, y)
		if err != nil || off > 1e-6 || !near(walked, length) {
			t.Errorf("%s: its own first sight is judged %v off the border, %v walked, %v", c.name, off, walked, err)
		}
	}
}

func TestReferenceSees(t *testing.T) {
	r := cgal.Start(t)
	r.Plan(square().line(solid, pt(2, 5), pt(8, 5)).graph(), 16000)
	for _, c := range []struct {
		eye, p exact.Pt
		want   bool
	}{
		{pt(5, 1), pt(5, 4), true}, {pt(5, 1), pt(5, 5), true}, {pt(5, 1), pt(5, 6), false}, {pt(8, 1), pt(8, 9), true},
		{pt(9, 5), pt(1, 5), true}, {pt(5, 5), pt(5, 9), true}, {pt(5, 5), pt(5, 1), true}, {pt(5, 1), pt(8, 6), false},
	} {
		if got, err := r.Sees(c.eye, c.p); err != nil || got != c.want {
			t.Errorf("Sees(%v, %v) = %v, %v, want %v", c.eye, c.p, got, err, c.want)
		}
	}
}

// The reference finds out when a graph breaks its promises.
func TestReferenceFaults(t *testing.T) {
	r := cgal.Start(t)
	unbordered := pillar(solid)
	for k := range unbordered.lines {
		if k[0].X == 4*metre && k[1].X == 4*metre {
			unbordered.lines[k] = glazing
		}
	}
	open := pillar(solid)
	for k := range open.winds {
		if k[0].X == 4*metre && k[1].X == 4*metre {
			delete(open.winds, k)
		}
	}
	for _, c := range []struct {
		name string
		plan *sketch
		want string
	}{
		{"crossing", square().line(solid, pt(1, 1), pt(3, 3)).line(solid, pt(3, 1), pt(1, 4)), "cgal: edges cross"},
		{"touching", square().line(solid, pt(0, 5), pt(3, 5)), "cgal: an edge runs through a point"},
		{"border", unbordered, "cgal: a body's border does not stop what the body stops"},
		{"winding", open, "cgal: winding numbers do not close"},
	} {
		r.Plan(c.plan.graph(), 16000)
		if _, err := r.Region(pt(9, 9)); err == nil || err.Error() != c.want {
			t.Errorf("%s: got %v, want %s", c.name, err, c.want)
		}
	}
	r.Plan(pillar(solid).graph(), 16000)
	for _, p := range []exact.Pt{pt(5, 5), pt(11, 5)} {
		if _, err := r.Region(p); !errors.Is(err, cgal.ErrInside) {
			t.Errorf("an eye at %v: got %v, want %v", p, err, cgal.ErrInside)
		}
		if _, err := r.Walk(p, pt(1, 1)); !errors.Is(err, cgal.ErrInside) {
			t.Errorf("a start at %v: got %v, want %v", p, err, cgal.ErrInside)
		}
	}
}
