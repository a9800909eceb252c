package study_test

import (
	"context"
	"math"
	"reflect"
	"strings"
	"testing"

	"github.com/paulmach/orb"
	"pgregory.net/rapid"

	"enfilade/solver/arrange"
	"enfilade/solver/exact"
	"enfilade/solver/plan"
	"enfilade/solver/plantest"
	"enfilade/solver/study"
)

// TestRoutesByHand holds routes against figures worked out by hand, in m.
func TestRoutesByHand(t *testing.T) {
	ten := math.Sqrt(10)
	const thin = room10 + "wall 5,0 5,4; start 1,1; target 9,1; "
	for _, c := range []struct {
		name, plan string
		legs       []float64
		points     int
		closed     int
		says       string // the problem, or where and why it is closed
	}{
		{"straight on", room10 + "start 1,1; target 9,1; route from=S1 4,1 to=T1", []float64{3, 5}, 3, 0, ""},
		{"there and back", room10 + "start 1,1; route from=S1 4,1 1,1", []float64{3, 3}, 3, 0, ""},
		{"a waypoint twice", room10 + "start 1,1; route from=S1 4,1 4,1", []float64{3, 0}, 2, 0, ""},
		{"without waypoints", roomL + "start 5,1; target 1,5; route from=S1 to=T1", []float64{2 * ten}, 3, 0, ""},
		{"round the bend and on", roomL + "start 5,1; target 0,6; route from=S1 1,5 to=T1", []float64{2 * ten, math.Sqrt2}, 4, 0, ""},
		{"round a thin wall", thin + "route from=S1 4,1 6,1 to=T1", []float64{3, 2 * ten, 3}, 5, 0, ""},
		{"over the end of a thin wall", thin + "route from=S1 5,4 to=T1", []float64{5, 5}, 3, 0, ""},
		{"on a face", pillar10 + "start 1,1; route from=S1 5,4", []float64{5}, 2, 0, ""},
		{"half a millimetre deep in a face", pillar10 + "start 5,1; route from=S1 5,4.0005", []float64{3}, 2, 0, ""},
		{"closed at once", room10 + "glass 5,0 5,10; start 1,1; target 9,1; route from=S1 to=T1", nil, 1, 1, "target T1: glazing W1 closes the way"},
		{"closed on the way", room10 + "glass 5,0 5,10; start 1,1; target 2,9; route from=S1 4,1 9,1 to=T1", []float64{3}, 2, 2, "waypoint 2: glazing W1 closes the way"},
		{"a target in a low block", room10 + "block 8,0 10,0 10,2 8,2 h=0.9; start 1,1; target 9,1; route from=S1 4,1 to=T1", []float64{3}, 2, 2,
			"target T1: the target stands in block B1, where nobody walks"},
		{"too narrow", room10 + "wall 5,0 5,4; wall 5,4.8 5,10; start 1,5; route from=S1 9,5; walker radius=0.5", nil, 1, 1,
			"waypoint 1: every way there is too narrow for a body of radius 500 mm"},
		{"a waypoint on a thin wall", thin + "route from=S1 4,1 5,2 to=T1", []float64{3}, 2, 2, "waypoint 2 lies on wall W1, with floor on both sides"},
		{"a waypoint on a corner of a thin wall", room10 + "wall 5,0 5,4 8,4; start 1,1; route from=S1 5,4", nil, 1, 1, "waypoint 1 lies on wall W1"},
		{"a waypoint in a block", pillar10 + "start 1,1; route from=S1 2,2 5,5", []float64{math.Sqrt2}, 2, 2, "waypoint 2 is inside block B1"},
		{"a waypoint off the floor", room10 + "start 1,1; route from=S1 11,5 2,2", nil, 1, 1, "waypoint 1 lies outside the floor"},
		{"a waypoint without room", room10 + "start 5,5; route from=S1 0.1,5; walker radius=0.5", nil, 1, 1, "waypoint 1 has no room for a body of radius 500 mm"},
		{"a start in a block", pillar10 + "start 5,5; route from=S1 2,2", nil, 0, 0, "start S1 is inside block B1"},
		{"a target in a block", pillar10 + "start 1,1; target 5,5; route from=S1 to=T1", nil, 1, 1, "target T1 is inside block B1"},
		{"no such start", room10 + "route from=S9 2,2", nil, 0, 0, "has the start S9, which is not in the plan"},
		{"no such target", room10 + "start 1,1; route from=S1 2,2 to=T9", []float64{math.Sqrt2}, 2, 2, "has the target T9, which is not in the plan"},
		{"no end", room10 + "start 1,1; route from=S1", nil, 0, 0, "leads nowhere"},
	} {
		r := solve(t, c.plan).Routes[0]
		says := r.Problem
		if r.Closed > 0 && says == "" {
			says = r.ClosedTo + ": " + r.Reason
		}
		if !strings.HasPrefix(says, c.says) || (says == "") != (c.says == "") || r.Closed != c.closed || len(r.Points) != c.points || len(r.Legs) != len(c.legs) {
			t.Errorf("%s: %+v", c.name, r)
			continue
		}
		sum := 0.0
		for i, want := range c.legs {
			sum += want
			if l := r.Legs[i]; !agree(l.Length/1000, want) || !agree(l.Seconds, want/1.2) {
				t.Errorf("%s: leg %d is %+v, want %v m", c.name, i+1, l, want)
			}
		}
		if !agree(r.Length/1000, sum) || !agree(r.Seconds, sum/1.2) {
			t.Errorf("%s: %v mm, %v s, want %v m", c.name, r.Length, r.Seconds, sum)
		}
	}
}

// TestRouteProblems: a faulty waypoint is told among the plan's problems, where it stands.
func TestRouteProblems(t *testing.T) {
	got := solve(t, pillar10+"start 1,1; route from=S1 2,2 5,5 5,4.0005 11,2").Problems
	want := []string{"waypoint 2 is inside block B1", "waypoint 3 less than 1 mm inside a face", "waypoint 4 lies outside the floor"}
	if len(got) != len(want) {
		t.Fatalf("%+v", got)
	}
	for i, p := range got {
		if !strings.HasPrefix(p.Text, want[i]) || p.Items[0] != (plan.Ref{Kind: plan.KindRoute, ID: "R1"}) {
			t.Errorf("%+v, want %s", p, want[i])
		}
	}
	if got[0].At != (exact.Pt{X: 50000, Y: 50000}) || len(got[0].Items) != 2 {
		t.Errorf("%+v", got[0])
	}
}

// TestRoutesAgainstTwin: on plans full of degeneracies each leg of a route is as long as the full walk of a study of its own,
// with a start and a target at its ends, for walkers with and without a body; for points also as long as the slow twin's.
func TestRoutesAgainstTwin(t *testing.T) {
	for name, plans := range plantest.Small() {
		t.Run(name, rapid.MakeCheck(func(t *rapid.T) {
			p := drawRoute(t, plans.Draw(t, "plan"))
			t.Log(plantest.Text(p))
			rows, err := study.NewSolver().Routes(context.Background(), p)
			if err != nil {
				t.Fatal(err)
			}
			for _, r := range rows {
				sameLegs(t, p, r)
			}
		}))
	}
}

// drawRoute gives a plan a route over corners of its walls and points about them, and a walker.
func drawRoute(t *rapid.T, p *plan.Plan) *plan.Plan {
	parts := p.Parts()
	var pool []exact.Pt
	for _, w := range parts.Walls {
		pool = append(pool, w.Line.Points()...)
	}
	for _, m := range parts.Targets {
		pool = append(pool, m.At)
	}
	pool = append(pool, exact.Pt{})
	point := func(label string) exact.Pt {
		q := rapid.SampledFrom(pool).Draw(t, label)
		return q.Add(exact.Vec{X: drawStep(t, p), Y: drawStep(t, p)})
	}
	parts.Starts = []plan.Start{{ID: "S1", At: point("start")}}
	r := plan.Route{ID: "R1", From: "S1"}
	var via []exact.Pt
	for range rapid.IntRange(0, 3).Draw(t, "waypoints") {
		via = append(via, point("waypoint"))
	}
	if r.Via = plan.ChainOf(via...); len(parts.Targets) > 0 && (len(via) == 0 || rapid.Bool().Draw(t, "to a target")) {
		r.To = parts.Targets[0].ID
	}
	parts.Routes = []plan.Route{r}
	parts.Walker.Radius = rapid.SampledFrom([]int32{0, 0, 1, 40, 300, 2000}).Draw(t, "radius")
	return plan.From(parts)
}

// sameLegs holds the legs of a route against walks of studies of their own.
func sameLegs(t *rapid.T, p *plan.Plan, r study.Route) {
	if r.Problem != "" {
		return
	}
	o, _ := arrange.Draw(p)
	twin := plantest.NewTwin(arrange.Round(o))
	drawn, _ := p.Route(r.ID)
	from := gridPoint(r.Points[0])
	for i := range len(r.Legs) + min(r.Closed, 1) {
		parts := p.Parts()
		parts.Starts, parts.Routes = []plan.Start{{ID: "S1", At: from}}, nil
		if i < drawn.Via.Len() {
			parts.Targets = []plan.Target{{ID: "T1", At: drawn.Via.At(i)}}
		}
		own, err := study.Solve(context.Background(), plan.From(parts))
		if err != nil {
			t.Fatal(err)
		}
		a := own.Approaches[0]
		if i == len(r.Legs) {
			if a.Problem == "" && a.HasFullWalk {
				t.Errorf("leg %d is closed by %q, a study of its own walks %v mm", i+1, r.Reason, a.FullWalk)
			}
			return
		}
		l := r.Legs[i]
		if a.Problem != "" || !a.HasFullWalk || a.FullWalk != l.Length || !reflect.DeepEqual(a.FullPoints, r.Points[l.First:l.Last+1]) {
			t.Errorf("leg %d: %+v over %v, on its own %+v", i+1, l, r.Points[l.First:l.Last+1], a)
		}
		to := gridPoint(r.Points[l.Last])
		if p.Walker().Radius == 0 && !closeTo(l.Length, twin.Walk(from, to).Length/exact.PerMM, 1e-7) {
			t.Errorf("leg %d: %v mm, the twin walks %v", i+1, l.Length, twin.Walk(from, to).Length/exact.PerMM)
		}
		if from = to; i > 0 && r.Points[l.First] != r.Points[r.Legs[i-1].Last] {
			t.Errorf("leg %d does not begin where the one before ends: %v", i+1, r.Points)
		}
	}
}

// TestRoutesFollow: a solver that follows an edit walks routes as a new one does, and stops when it is told to.
func TestRoutesFollow(t *testing.T) {
	ctx := context.Background()
	p := plantest.Parse(t, thinDoors+"route from=S1 2,1 8,1 to=T1")
	s := study.NewSolver()
	if _, err := s.Solve(ctx, p); err != nil {
		t.Fatal(err)
	}
	moved, err := plan.MoveItems{Items: []plan.Ref{{Kind: plan.KindWall, ID: "W1"}}, By: exact.Vec{X: 10000}}.Apply(p)
	if err != nil {
		t.Fatal(err)
	}
	got, err := s.Routes(ctx, moved)
	if err != nil {
		t.Fatal(err)
	}
	if want, err := study.NewSolver().Routes(ctx, moved); err != nil || !reflect.DeepEqual(got, want) {
		t.Errorf("%+v followed, %+v anew: %v", got, want, err)
	}
	if want := (orb.Point{6000, 4000}); got[0].Points[2] != want {
		t.Errorf("the walk turns at %v, want %v", got[0].Points, want)
	}
	stopped, cancel := context.WithCancel(ctx)
	cancel()
	if _, err := s.Routes(stopped, moved); err == nil {
		t.Error("cancelled routes returned no error")
	}
}

const thinDoors = room10 + "wall 5,0 5,4; start 1,1; target 9,1; "
