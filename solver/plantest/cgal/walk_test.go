package cgal_test

import (
	"errors"
	"math"
	"slices"
	"testing"

	"enfilade/solver/exact"
	"enfilade/solver/plantest"
	"enfilade/solver/plantest/cgal"
	"enfilade/solver/sight"
	"enfilade/solver/walk"
)

// TestWalkAgainstCGAL compares full walks, approaches and first sights, from and to open floor, walls, their ends and the
// places where they meet.
func TestWalkAgainstCGAL(t *testing.T) {
	sharded(t, "walks and approaches in seeded plans", func(t *testing.T, r *cgal.Reference, shard uint64, c *tally) {
		eachSpecimen(t, shard, 5000, func(s *specimen) {
			starts, targets := s.starts(), s.targets()
			// A start costs CGAL a sequence tree over the whole plan.
			if s.walls >= 1000 {
				starts, targets = starts[:1], targets[:4]
			} else {
				starts, targets = append(starts[:2], s.onWalls(1)...), append(targets[:4], s.onWalls(2)...)
			}
			compareWalks(t, r, s, starts, targets, c)
		})
	})
	sharded(t, "walks and approaches in tangles", func(t *testing.T, r *cgal.Reference, shard uint64, c *tally) {
		eachTangle(t, shard, 1000, func(s *specimen) {
			compareWalks(t, r, s, append(s.starts(), s.onWalls(3)...), append(s.targets(), s.onWalls(3)...), c)
		})
	})
}

// TestBodiesAgainstCGAL does the same for walkers with a body.
func TestBodiesAgainstCGAL(t *testing.T) {
	sharded(t, "walks and approaches of bodies in seeded plans", func(t *testing.T, r *cgal.Reference, shard uint64, c *tally) {
		seed := 0
		eachSpecimen(t, shard, 150, func(s *specimen) {
			if seed++; seed%8 == 0 {
				s.grow(t, 500*(1+s.Int32N(8))) // 50 to 400 mm
				compareWalks(t, r, s, append(s.starts()[:2], s.onWalls(1)...), append(s.targets()[:3], s.onWalls(1)...), c)
			}
		})
	})
	sharded(t, "walks and approaches of bodies in tangles", func(t *testing.T, r *cgal.Reference, shard uint64, c *tally) {
		eachTangle(t, shard, 200, func(s *specimen) {
			s.grow(t, s.radius())
			compareWalks(t, r, s, append(s.starts(), s.onWalls(2)...), append(s.targets(), s.onWalls(2)...), c)
		})
	})
}

func compareWalks(t *testing.T, r *cgal.Reference, s *specimen, starts, targets []exact.Pt, c *tally) {
	t.Helper()
	r.Plan(s.graph, plantest.Eye)
	eye, walker := sight.New(s.mesh), walk.New(s.mesh)
	c.add(s)
	var goals []walk.Goal // for each target that can be seen its region and itself
	for _, target := range targets {
		if cones, err := eye.Cones(target, plantest.Eye, sight.Clip{}); err == nil {
			goals = append(goals, walk.Goal{Eye: target, Cones: slices.Clone(cones)}, walk.Goal{Spot: walk.At(target)})
		}
	}
	for _, start := range starts {
		_, wantErr := r.Walk(start, start)
		paths, err := walker.Flood(t.Context(), start, goals)
		if wantErr != nil || err != nil {
			if !errors.Is(wantErr, cgal.ErrInside) || !errors.Is(err, walk.ErrInside) {
				t.Errorf("%s: start at %v: error %v, CGAL %v\n%s", s.name, start, err, wantErr, s.text())
			}
			continue
		}
		for i := 0; i < len(paths); i += 2 {
			compareApproach(t, r, s, start, goals[i].Eye, paths[i])
			compareFullWalk(t, r, s, start, goals[i].Eye, paths[i+1])
			c.questions += 2
		}
	}
}

func length(p walk.Path) float64 {
	if !p.Found {
		return math.Inf(1)
	}
	return p.Length
}

// agreeLength holds lengths to nine digits, and those below one grid unit to a billionth of it: that is what float64 leaves
// of a place in a plan of some hundred metres.
func agreeLength(got, want float64) bool {
	return got == want || math.Abs(got-want) <= 1e-9*math.Max(1, want)
}

func compareFullWalk(t *testing.T, r *cgal.Reference, s *specimen, start, target exact.Pt, p walk.Path) {
	t.Helper()
	want, err := r.Walk(start, target)
	if errors.Is(err, cgal.ErrInside) { // in something low: seen, but not to be stood on
		want, err = math.Inf(1), nil
	}
	if err != nil || !agreeLength(length(p), want) {
		t.Errorf("%s: walk from %v to %v: %v, CGAL %v %v\n%s", s.name, start, target, length(p), want, err, s.text())
	}
}

func compareApproach(t *testing.T, r *cgal.Reference, s *specimen, start, target exact.Pt, p walk.Path) {
	t.Helper()
	want, x, y, err := r.Approach(start, target)
	if err != nil || !agreeLength(length(p), want) {
		t.Errorf("%s: approach from %v to what sees %v: %v, CGAL %v, ending at %v %v, %v\n%s", s.name, start, target, length(p),
			want, x, y, err, s.text())
		return
	}
	if !p.Found || p.Length == 0 {
		return
	}
	// Several first sights may be equally near, so ours is judged by itself: on a way into the region, and as far as told.
	off, walked, err := r.Judge(start, target, p.End[0], p.End[1])
	if err != nil || off > 1e-5 || !agreeLength(p.Length, walked) {
		t.Errorf("%s: first sight of %v from %v at %v: %v off the border, %v walked, told %v, %v\n%s", s.name, target, start, p.End,
			off, walked, p.Length, err, s.text())
	}
}
