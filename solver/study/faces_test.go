package study_test

import (
	"context"
	"math"
	"slices"
	"strings"
	"testing"

	"github.com/paulmach/orb"

	"enfilade/solver/exact"
	"enfilade/solver/plan"
	"enfilade/solver/plantest"
	"enfilade/solver/study"
)

// solveWith studies a plan after its parts have been changed.
func solveWith(t testing.TB, text string, change func(*plan.Parts)) *study.Result {
	t.Helper()
	parts := plantest.Parse(t, text).Parts()
	change(&parts)
	r, err := study.Solve(context.Background(), plan.From(parts))
	if err != nil {
		t.Fatal(err)
	}
	return r
}

func seen(kind plan.SeenKind, share float64) func(*plan.Parts) {
	return func(p *plan.Parts) { p.Walker.Seen, p.Walker.Share = kind, share }
}

// TestFaceByHand walks through the L-room until a strip of its left wall, 3 to 5 m up, is in view, worked out by hand. The corner
// (2,2) hides it: the first glimpse lies square to the line from the strip's lower end past the corner, y = 3 - x/2; all of it
// is in view below the line from its upper end, which meets the wall at (10/3, 0). A share from its lower end up is bounded by
// the line from (0, 3 + 2s): the nearest windows begin there.
func TestFaceByHand(t *testing.T) {
	const room = roomL + "start 5,1; target 0,5 0,3"
	for _, c := range []struct {
		name         string
		seen         plan.SeenKind
		share        float64
		length, x, y float64
		toX, toY     float64 // what is in view
	}{
		{"any", plan.SeenAny, 0, 1 / math.Sqrt(5), 4.8, 0.6, 0, 3},
		{"all", plan.SeenAll, 0, math.Sqrt(34) / 3, 10. / 3, 0, 0, 4},
		{"share 1", plan.SeenShare, 1, math.Sqrt(34) / 3, 10. / 3, 0, 0, 4},
		// Half of it: below the line from (0,4) past the corner, y = 4 - x, which (5,1) lies square to at (4,0).
		{"half", plan.SeenShare, 0.5, math.Sqrt2, 4, 0, 0, 3.5},
	} {
		r := solveWith(t, room, seen(c.seen, c.share))
		a := r.Approaches[0]
		if a.Status != study.StatusApproach || !agree(a.Length/1000, c.length) {
			t.Errorf("%s: status %v, %.12g m, want %.12g", c.name, a.Status, a.Length/1000, c.length)
		}
		for _, f := range []struct {
			what      string
			got, want float64
		}{
			{"x", a.FirstSight[0] / 1000, c.x}, {"y", a.FirstSight[1] / 1000, c.y}, {"in view x", a.SightTo[0] / 1000, c.toX},
			{"in view y", a.SightTo[1] / 1000, c.toY}, {"sight line", a.SightLine / 1000, math.Hypot(c.x-c.toX, c.y-c.toY)},
		} {
			if math.Abs(f.got-f.want) > 1e-9 {
				t.Errorf("%s: %s %.12g, want %.12g", c.name, f.what, f.got, f.want)
			}
		}
		want := study.Asked{Face: true, Seen: c.seen}
		if c.seen == plan.SeenShare && c.share < 1 {
			want.Share, want.ShareError = c.share, (1-c.share)/32+4./20000
		} else if c.share == 1 {
			want.Seen = plan.SeenAll
		}
		if a.Asked != want || r.SeenFrom[0].Asked != want {
			t.Errorf("%s: asked %+v and %+v, want %+v", c.name, a.Asked, r.SeenFrom[0].Asked, want)
		}
	}
	// A point asks for nothing, whatever the walker wants to see of faces.
	r := solveWith(t, roomL+"start 5,1; target 1,5", seen(plan.SeenAll, 0))
	if a := r.Approaches[0]; a.Asked != (study.Asked{}) || !agree(a.Length/1000, 8/math.Sqrt(10)) || a.SightTo != (orb.Point{1000, 5000}) {
		t.Errorf("a point: %+v", a)
	}
}

// TestFaceRegionByHand measures the places that see the strip of TestFaceByHand. Any of it: all but the arm's part above the
// line y = 3 - x/2, which leaves the arm at (6,0): 4 m by 2 m above it halved. All: what lies below y = 5 - 3x/2.
func TestFaceRegionByHand(t *testing.T) {
	const room = roomL + "target 0,5 0,3"
	any := solveWith(t, room, seen(plan.SeenAny, 0)).SeenFrom[0]
	if !agree(any.Area, 20-4) || !agree(any.Occluding, math.Hypot(4, 2)) || any.Clip != 0 || len(any.More) != 0 {
		t.Errorf("any: area %v, open %v, clip %v, %d more rings", any.Area, any.Occluding, any.Clip, len(any.More))
	}
	all := solveWith(t, room, seen(plan.SeenAll, 0)).SeenFrom[0]
	// The upright arm of 2 by 6 m, and of the other one a triangle of 4/3 by 2.
	if !agree(all.Area, 12+4./3) || !agree(all.Occluding, math.Hypot(4./3, 2)) {
		t.Errorf("all: area %v, open %v", all.Area, all.Occluding)
	}
	// A column before the middle of a wide face: behind it nothing of the face is seen, and the region has a hole around both.
	r := solveWith(t, "floor 0,0 20,0 20,20 0,20; block 9,4 11,4 11,6 9,6; target 5,0 15,0", seen(plan.SeenAny, 0))
	// From the face's ends past the column's far corners: (5,0)-(9,6) and (15,0)-(11,6) meet at (10,7.5).
	// Seen from (5,0) the outermost corner on that side is (9,6), so the dark triangle is 2 by 1.5 halved.
	hole := r.SeenFrom[0]
	if !agree(hole.Area, 400-4-1.5) || len(hole.More) != 1 || !agree(hole.Occluding, 2*math.Hypot(1, 1.5)) || len(hole.Boundary) != 4 {
		t.Errorf("around a column: area %v, open %v, %d corners, more %v", hole.Area, hole.Occluding, len(hole.Boundary), hole.More)
	}
}

// TestLimitsByHand reads a sign at (0,0) that faces +x from at most 4 m away and 60 degrees off, on open floor, worked out by
// hand: from (1,6) the nearest such place is the sector's corner (2, 2 sqrt 3). The circle is a polygon that lies up to 1 mm
// inside it.
func TestLimitsByHand(t *testing.T) {
	far, angle := int32(4*10000), 60.
	want := math.Sqrt(49 - 24*math.Sqrt(3))
	for _, sign := range []string{"target 0,0", "target 0,0.0001 0,-0.0001"} {
		r := solveWith(t, "floor -20,-20 20,-20 20,20 -20,20; start 1,6; "+sign, func(p *plan.Parts) {
			normal := 0.
			p.Targets[0].Far, p.Targets[0].MaxAngle, p.Targets[0].Normal = &far, &angle, &normal
		})
		a := r.Approaches[0]
		if a.Length/1000 < want-1e-3 || a.Length/1000 > want+1e-3 || math.Hypot(a.FirstSight[0]/1000-2, a.FirstSight[1]/1000-2*math.Sqrt(3)) > 1.5e-3 {
			t.Errorf("%s: %.9g m to %v, want %.9g m", sign, a.Length/1000, a.FirstSight, want)
		}
		if area := 16 * math.Pi / 3; r.SeenFrom[0].Area > area*(1+1e-8) || r.SeenFrom[0].Area < area*(1-1e-3) {
			t.Errorf("%s: area %v, want a little less than %v", sign, r.SeenFrom[0].Area, area)
		}
		if r.SeenFrom[0].Occluding != 0 || r.SeenFrom[0].Wall != 0 || math.Abs(r.SeenFrom[0].Clip-(8+8*math.Pi/3)) > 0.01 {
			t.Errorf("%s: border %+v", sign, r.SeenFrom[0])
		}
	}
}

// TestNearByHand keeps 2 m away from a point in the middle of a room: the places that see it are the room less a disc, which
// stands for a hole, and whoever starts too near walks out of it.
func TestNearByHand(t *testing.T) {
	near := int32(2 * 10000)
	r := solveWith(t, room10+"start 5,6; start 5,9; target 5,5; observer 5,6; observer 5,8", func(p *plan.Parts) { p.Targets[0].Near = &near })
	s := r.SeenFrom[0]
	if s.Area > 100-4*math.Pi || s.Area < 100-math.Pi*2.001*2.001 || len(s.More) != 1 || s.Wall != 40 {
		t.Errorf("area %v, wall %v, %d more rings", s.Area, s.Wall, len(s.More))
	}
	if a := r.Approaches[0]; a.Length < 1000 || a.Length > 1001 || a.FullWalk != 1000 {
		t.Errorf("from too near: %+v", a)
	}
	if a := r.Approaches[1]; a.Status != study.StatusSeen {
		t.Errorf("from far enough: %+v", a)
	}
	if len(r.Sight[0].TargetsSeen) != 0 || len(r.Sight[1].TargetsSeen) != 1 {
		t.Errorf("observers see %v and %v", r.Sight[0].TargetsSeen, r.Sight[1].TargetsSeen)
	}
}

// TestFaceFaults holds what is said of faces that cannot be seen, and what is taken of those that run into things.
func TestFaceFaults(t *testing.T) {
	zero, far, near, chamber := 0., int32(10000), int32(20000), int32(25000)
	for _, c := range []struct {
		name, plan, problem, reason string
		change                      func(*plan.Parts)
	}{
		{"into its wall", "wall 0,5 10,5 th=0.2; target 6,5.1 4,5.1", "faces into the wall", "", seen(plan.SeenAny, 0)},
		{"at no angle", "target 4,5 6,5", "at no angle", "", func(p *plan.Parts) { p.Targets[0].MaxAngle = &zero }},
		{"near beyond far", "target 4,5 6,5", "no farther than its nearest", "", func(p *plan.Parts) { p.Targets[0].Near, p.Targets[0].Far = &near, &far }},
		{"through a gap", "target 6,5 4,5; wall 4,5 4,3; wall 6,5 6,3; wall 4,3 4.9,3; wall 5.1,3 6,3", "", "no place sees all of its face", func(p *plan.Parts) {
			p.Walker.Seen, p.Targets[0].Near = plan.SeenAll, &chamber // from outside a chamber with a gap of 0.2 m
		}},
	} {
		r := solveWith(t, room10+"start 5,1; "+c.plan, c.change)
		a, s := r.Approaches[0], r.SeenFrom[0]
		if !strings.Contains(a.Problem, c.problem) || !strings.Contains(s.Problem, c.problem) || (a.Problem == "") != (c.problem == "") ||
			!strings.Contains(a.Reason, c.reason) {
			t.Errorf("%s: problem %q and %q, reason %q", c.name, a.Problem, s.Problem, a.Reason)
		}
	}
	// A face drawn through the walls at its ends is what lies between them; on a slanting wall it is moved off less than 1 mm.
	for _, text := range []string{
		"wall 2,0 2,10 th=0.2; wall 8,0 8,10 th=0.2; target 1.95,5 8.05,5",
		"wall 2,0 2.3,10 th=0.2; wall 8,0 7.7,10 th=0.2; target 2,5.001 8,5.001",
	} {
		r := solveWith(t, room10+"start 5,6; start 5,4; "+text, seen(plan.SeenAll, 0))
		if a := r.Approaches[0]; a.Status != study.StatusSeen {
			t.Errorf("%s: before the face %+v", text, a)
		}
		if a := r.Approaches[1]; a.Status != study.StatusApproach && a.Status != study.StatusNone {
			t.Errorf("%s: behind the face %+v", text, a)
		}
		if !slices.ContainsFunc(r.Problems, func(p plan.Problem) bool { return strings.Contains(p.Text, "runs into wall W") }) {
			t.Errorf("%s: nobody is told: %v", text, r.Problems)
		}
	}
}

// TestFaceLaws holds the laws of what must be seen: whoever sees all of a face sees any share of it, whoever sees a share sees
// part of it, and a wider share is seen from less; a face of next to no length is seen as the point before it is; mirrors and
// quarter turns change nothing.
func TestFaceLaws(t *testing.T) {
	p := plantest.Parse(t, "floor 0,0 12,0 12,9 0,9; wall 6,0 6,4; block 3,4 4,4 4,5 3,5; block 7,6 9,5 8,7; glass 1,7 5,7; start 11,8; start 8,1; start 0.5,8.5; target 2,2 5,2; target 0,6 0,3")
	areas := func(p *plan.Plan, kind plan.SeenKind, share float64) (area, walk []float64) {
		parts := p.Parts()
		parts.Walker.Seen, parts.Walker.Share = kind, share
		r, err := study.Solve(context.Background(), plan.From(parts))
		if err != nil {
			t.Fatal(err)
		}
		for _, s := range r.SeenFrom {
			area = append(area, s.Area)
		}
		for _, a := range r.Approaches {
			walk = append(walk, a.Length)
		}
		return area, walk
	}
	last, lastWalk := areas(p, plan.SeenAny, 0)
	for _, share := range []float64{0.01, 0.25, 0.5, 0.75, 0.99, 1} {
		area, walk := areas(p, plan.SeenShare, share)
		for i := range area {
			if area[i] > last[i]*(1+1e-12) || area[i] == 0 {
				t.Errorf("share %v of target %d is seen from %v, less of it from %v", share, i, area[i], last[i])
			}
		}
		for i := range walk {
			if walk[i] < lastWalk[i]*(1-1e-12) {
				t.Errorf("walk %d to a share of %v: %v, to less of it %v", i, share, walk[i], lastWalk[i])
			}
		}
		last, lastWalk = area, walk
	}
	all, _ := areas(p, plan.SeenAll, 0)
	if !slices.Equal(last, all) {
		t.Errorf("a share of 1 is seen from %v, all of it from %v", last, all)
	}
	for _, m := range []plantest.Motion{{Turns: 1}, {Mirror: true}, {Mirror: true, Turns: 3, Shift: exact.Vec{X: 777, Y: -31}}} {
		for _, kind := range []plan.SeenKind{plan.SeenAny, plan.SeenAll, plan.SeenShare} {
			a, w := areas(p, kind, 0.5)
			b, v := areas(plantest.Moved(p, m), kind, 0.5)
			for i := range a {
				if !agree(a[i], b[i]) {
					t.Errorf("%+v: target %d is seen from %v, before it was %v", m, i, b[i], a[i])
				}
			}
			for i := range w {
				if math.Abs(w[i]-v[i]) > 1e-6 {
					t.Errorf("%+v: walk %d is %v, before it was %v", m, i, v[i], w[i])
				}
			}
		}
	}
	point := solveWith(t, "floor 0,0 12,0 12,9 0,9; block 3,4 4,4 4,5 3,5; target 3.5,0", seen(plan.SeenAny, 0)).SeenFrom[0]
	for _, kind := range []plan.SeenKind{plan.SeenAny, plan.SeenAll} {
		face := solveWith(t, "floor 0,0 12,0 12,9 0,9; block 3,4 4,4 4,5 3,5; target 3.4999,0 3.5001,0", seen(kind, 0)).SeenFrom[0]
		if math.Abs(face.Area-point.Area) > 1e-2 || face.Area == point.Area {
			t.Errorf("a face of 0.2 mm is seen from %v, a point from %v", face.Area, point.Area)
		}
	}
}
