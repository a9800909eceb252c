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
	r := cgal.Start(t)
	var seeded, tangled tally
	eachSpecimen(t, func(s *specimen) {
		var starts, targets []exact.Pt
		for _, x := range s.plan.Starts() {
			starts = append(starts, x.At)
		}
		for _, x := range s.plan.Targets() {
			targets = append(targets, x.At)
		}
		// A start costs CGAL a sequence tree over the whole plan.
		if s.walls >= 1000 {
			starts, targets = starts[:1], targets[:4]
		} else {
			starts, targets = append(starts[:2], s.onWalls(2)...), append(targets[:4], s.onWalls(2)...)
		}
		compareWalks(t, r, s, starts, targets, &seeded)
	})
	eachTangle(t, 1500, func(s *specimen) {
		var starts, targets []exact.Pt
		for _, x := range s.plan.Starts() {
			starts = append(starts, x.At)
		}
		for _, x := range s.plan.Targets() {
			targets = append(targets, x.At)
		}
		compareWalks(t, r, s, append(starts, s.onWalls(3)...), append(targets, s.onWalls(3)...), &tangled)
	})
	seeded.log(t, "walks and approaches in seeded plans")
	tangled.log(t, "walks and approaches in tangles")
}

func compareWalks(t *testing.T, r *cgal.Reference, s *specimen, starts, targets []exact.Pt, c *tally) {
	t.Helper()
	r.Plan(s.graph, plantest.Eye)
	eye, walker := sight.New(s.mesh), walk.New(s.mesh)
	c.plans++
	c.walls += s.walls
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
