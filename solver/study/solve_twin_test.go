package study_test

import (
	"context"
	"math"
	"slices"
	"testing"

	"pgregory.net/rapid"

	"enfilade/solver/arrange"
	"enfilade/solver/exact"
	"enfilade/solver/plan"
	"enfilade/solver/plantest"
	"enfilade/solver/study"
)

// TestSolveAgainstTwin holds whole studies of plans full of degeneracies against the slow exact twin: what observers see,
// from where targets are seen, approaches and full walks.
func TestSolveAgainstTwin(t *testing.T) {
	for name, plans := range plantest.Small() {
		t.Run(name, rapid.MakeCheck(func(t *rapid.T) {
			p := plans.Draw(t, "plan")
			t.Log(plantest.Text(p))
			r, err := study.Solve(context.Background(), p)
			if err != nil {
				t.Fatal(err)
			}
			o, _ := arrange.Draw(p)
			twin := plantest.NewTwin(arrange.Round(o))
			for i, o := range p.Parts().Observers {
				sameSight(t, twin, r.Sight[i], o.At, o.Eye)
				sameTargetsSeen(t, twin, p, r.Sight[i], o)
			}
			for i, q := range p.Parts().Targets {
				sameSight(t, twin, r.SeenFrom[i], q.At, p.Walker().Eye)
			}
			for i, s := range p.Parts().Starts {
				for j, q := range p.Parts().Targets {
					sameApproach(t, twin, r.Approaches[i*p.NumTargets()+j], s.At, q.At, p.Walker().Eye)
				}
			}
		}))
	}
}

// gridPoint turns a place in millimetres back into the grid point it stands for.
func gridPoint(p [2]float64) exact.Pt {
	return exact.Pt{X: int32(math.Round(p[0] * exact.PerMM)), Y: int32(math.Round(p[1] * exact.PerMM))}
}

// closeTo reports whether two figures agree to 1e-9 of the larger, or to what a millionth of a grid unit makes of them.
func closeTo(got, want, slack float64) bool {
	return got == want || math.Abs(got-want) <= math.Max(slack, 1e-9*math.Max(math.Abs(got), math.Abs(want)))
}

func sameSight(t *rapid.T, twin *plantest.Twin, e study.Sight, at exact.Pt, eye int32) {
	if e.Problem != "" {
		if !twin.Region(at, eye).Empty() {
			t.Errorf("%v at %v: problem %q, yet the twin sees something", e.Item, at, e.Problem)
		}
		return
	}
	at = gridPoint(e.At) // a mark may have been moved out of a body
	r := twin.Region(at, eye)
	l := r.Lengths()
	border := (l[0] + l[1] + l[2]) / 1e4
	if !closeTo(e.Area, r.Area()/1e8, 1e-10*border) || !closeTo(e.Wall, l[plantest.OnWall]/1e4, 1e-10) ||
		!closeTo(e.Occluding, l[plantest.Occluding]/1e4, 1e-10) || !closeTo(e.Perimeter, border, 1e-10) || e.Clip != 0 {
		t.Errorf("%v at %v: area %v, wall %v, occluding %v, want %v, %v", e.Item, at, e.Area, e.Wall, e.Occluding, r.Area()/1e8, l)
	}
}

func sameTargetsSeen(t *rapid.T, twin *plantest.Twin, p *plan.Plan, e study.Sight, o plan.Observer) {
	if e.Problem != "" {
		return
	}
	for _, q := range p.Targets() {
		if twin.Region(q.At, o.Eye).Empty() {
			continue // in a body: it may have been moved
		}
		got, want := slices.Contains(e.TargetsSeen, q.ID), twin.Sees(gridPoint(e.At), q.At, o.Eye)
		if got != want {
			t.Errorf("%v sees target %s: %v, want %v", e.Item, q.ID, got, want)
		}
	}
}

func sameApproach(t *rapid.T, twin *plantest.Twin, a study.Approach, from, to exact.Pt, eye int32) {
	if twin.Region(to, eye).Empty() || !twin.Stands(from) {
		return // in a body: it may have been moved
	}
	if a.Problem != "" {
		t.Errorf("%s to %s: problem %q, yet both stand free", a.Start, a.Target, a.Problem)
		return
	}
	want, full := twin.Approach(from, to, eye), twin.Walk(from, to)
	status, length, walk := study.StatusApproach, want.Length/exact.PerMM, full.Length/exact.PerMM
	switch {
	case math.IsInf(length, 1):
		status, length = study.StatusNone, 0
	case length == 0:
		status = study.StatusSeen
	}
	if a.Status != status || !closeTo(a.Length, length, 1e-7) {
		t.Errorf("%s to %s: status %v, %v mm, want %v, %v mm", a.Start, a.Target, a.Status, a.Length, status, length)
	}
	if a.HasFullWalk == math.IsInf(walk, 1) || a.HasFullWalk && !closeTo(a.FullWalk, walk, 1e-7) {
		t.Errorf("%s to %s: full walk %v, %v mm, want %v mm", a.Start, a.Target, a.HasFullWalk, a.FullWalk, walk)
	}
	if (a.Status == study.StatusNone || !a.HasFullWalk) && a.Reason == "" {
		t.Errorf("%s to %s: status %v, full walk %v, and no reason", a.Start, a.Target, a.Status, a.HasFullWalk)
	}
}
