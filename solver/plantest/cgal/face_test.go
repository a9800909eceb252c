package cgal_test

import (
	"errors"
	"testing"

	"enfilade/solver/exact"
	"enfilade/solver/plantest"
	"enfilade/solver/plantest/cgal"
	"enfilade/solver/sight"
)

// TestFacesAgainstCGAL holds the places that see any part of a face, and all of it, against how much of the face CGAL finds in
// the region of single places, those a few units beside lines through two corners among them.
func TestFacesAgainstCGAL(t *testing.T) {
	ask := func(each func(t *testing.T, shard uint64, f func(s *specimen))) func(*testing.T, *cgal.Reference, uint64, *tally) {
		return func(t *testing.T, r *cgal.Reference, shard uint64, c *tally) {
			none, part, all := 0, 0, 0
			each(t, shard, func(s *specimen) {
				r.Plan(s.graph, plantest.Eye)
				c.add(s)
				for range 3 {
					s.compareFace(t, r, s.face(), func(any, whole bool) {
						c.questions++
						switch {
						case whole:
							all++
						case any:
							part++
						default:
							none++
						}
					})
				}
			})
			if none < 50 || all < 50 || part < 50 {
				t.Errorf("of the places %d see nothing, %d a part and %d all: the test has lost its aim", none, part, all)
			}
		}
	}
	sharded(t, "places that see a face in seeded plans", ask(func(t *testing.T, shard uint64, f func(*specimen)) {
		eachSpecimen(t, shard, 150, f)
	}))
	sharded(t, "places that see a face in tangles", ask(func(t *testing.T, shard uint64, f func(*specimen)) {
		eachTangle(t, shard, 600, f)
	}))
}

// face draws an edge of the graph or half of one, from either side.
func (s *specimen) face() sight.Face {
	e := s.graph.Edges[s.IntN(len(s.graph.Edges))]
	c := sight.Face{A: s.graph.Pts[e.A], B: s.graph.Pts[e.B]}
	if x, y := c.A.X+c.B.X, c.A.Y+c.B.Y; x%2 == 0 && y%2 == 0 && s.IntN(2) == 0 {
		c.A = exact.Pt{X: x / 2, Y: y / 2}
	}
	if s.IntN(2) == 0 {
		c.A, c.B = c.B, c.A
	}
	return c
}

// probe draws a place near the line through two points of the graph.
func (s *specimen) probe() exact.Pt {
	p, q := s.graph.Pts[s.IntN(len(s.graph.Pts))], s.graph.Pts[s.IntN(len(s.graph.Pts))]
	k := s.Int32N(17) - 4
	return exact.Pt{X: p.X + (q.X-p.X)/8*k + s.Int32N(7) - 3, Y: p.Y + (q.Y-p.Y)/8*k + s.Int32N(7) - 3}
}

func (s *specimen) compareFace(t *testing.T, r *cgal.Reference, c sight.Face, found func(any, whole bool)) {
	t.Helper()
	f := sight.New(s.mesh)
	all, _ := f.Whole(nil, c, plantest.Eye)
	if !f.Free(c, plantest.Eye) {
		return
	}
	some, err := f.Partly(t.Context(), nil, c, plantest.Eye)
	if err != nil {
		t.Fatal(err)
	}
	for range 12 {
		p := s.probe()
		if _, ok := s.mesh.Locate(p); !ok {
			continue
		}
		share, whole := 0.0, false
		if exact.Orient(c.A, c.B, p) > 0 { // seen from in front
			var err error
			if share, whole, err = r.Share(p, c.A, c.B); err != nil && !errors.Is(err, cgal.ErrInside) {
				t.Errorf("%s: %v sees %v: CGAL %v\n%s", s.name, p, c, err, s.text())
				continue
			}
		}
		found(share > 0, whole)
		if in, inside := s.hold(some, p); share > 0 && !in || inside && share == 0 {
			t.Errorf("%s: %v sees %v of %v by CGAL; in the region of any %v, inside it %v\n%s", s.name, p, share, c, in, inside, s.text())
		}
		in, inside := s.hold(all, p)
		// Who looks along a wall sees all past both sides of it, but not after a step aside.
		if whole && !in && !s.along(p) || inside && !whole {
			t.Errorf("%s: %v sees %v of %v by CGAL; in the region of all %v, inside it %v\n%s", s.name, p, share, c, in, inside, s.text())
		}
	}
}

// hold tells how far a place lies in the union of pieces: in one with its border, or strictly inside one.
func (s *specimen) hold(pieces []sight.Piece, p exact.Pt) (in, inside bool) {
	for _, k := range pieces {
		worst := 1
		corners := s.mesh.Tris[k.Tri].P
		for i := range corners {
			worst = min(worst, exact.Orient(corners[i], corners[(i+1)%3], p))
		}
		for _, l := range k.Lines[:k.N] {
			worst = min(worst, l.Side(p))
		}
		in, inside = in || worst >= 0, inside || worst > 0
	}
	return in, inside
}

// along reports whether some edge of the graph lies in line with p.
func (s *specimen) along(p exact.Pt) bool {
	for _, e := range s.graph.Edges {
		if exact.Orient(s.graph.Pts[e.A], s.graph.Pts[e.B], p) == 0 {
			return true
		}
	}
	return false
}
