package cgal_test

import (
	"errors"
	"testing"

	"enfilade/solver/exact"
	"enfilade/solver/plantest"
	"enfilade/solver/plantest/cgal"
	"enfilade/solver/sight"
)

// TestRegionAgainstCGAL compares regions of eyes on open floor, on walls, at their ends and where they meet.
func TestRegionAgainstCGAL(t *testing.T) {
	sharded(t, "regions in seeded plans", func(t *testing.T, r *cgal.Reference, shard uint64, c *tally) {
		eachSpecimen(t, shard, 5000, func(s *specimen) {
			eyes := s.onWalls(8)
			if s.walls >= 1000 {
				eyes = s.onWalls(3)
			}
			compareRegions(t, r, s, append(eyes, s.observers()...), c)
		})
	})
	sharded(t, "regions in tangles", func(t *testing.T, r *cgal.Reference, shard uint64, c *tally) {
		eachTangle(t, shard, 1500, func(s *specimen) {
			compareRegions(t, r, s, append(s.observers(), s.graph.Pts...), c)
		})
	})
	// Narrowed floors have many edges more, which sight must pass as if they were not there.
	sharded(t, "regions on narrowed floors", func(t *testing.T, r *cgal.Reference, shard uint64, c *tally) {
		eachTangle(t, shard, 120, func(s *specimen) {
			s.grow(t, s.radius())
			compareRegions(t, r, s, append(s.observers(), s.onWalls(4)...), c)
		})
	})
}

func compareRegions(t *testing.T, r *cgal.Reference, s *specimen, eyes []exact.Pt, c *tally) {
	t.Helper()
	r.Plan(s.graph, plantest.Eye)
	f := sight.New(s.mesh)
	c.add(s)
	for _, eye := range eyes {
		want, wantErr := r.Region(eye)
		region, err := f.Region(eye, plantest.Eye)
		if wantErr != nil || err != nil {
			if !errors.Is(wantErr, cgal.ErrInside) || !errors.Is(err, sight.ErrOutside) {
				t.Errorf("%s: eye at %v: error %v, CGAL %v\n%s", s.name, eye, err, wantErr, s.text())
			}
			continue
		}
		c.questions++
		l := region.Lengths()
		if !agree(region.Area(), want.Area) || !agree(l[sight.Wall], want.Wall) || !agree(l[sight.Occluding], want.Occluding) {
			t.Errorf("%s: eye at %v: area %v, border %v, CGAL %+v\n%s", s.name, eye, region.Area(), l, want, s.text())
		}
	}
}

// text writes a small plan out, to be read from the message of a failed test.
func (s *specimen) text() string {
	if s.walls > 30 {
		return ""
	}
	return plantest.Text(s.plan)
}
