package study

import (
	"context"
	"fmt"

	"github.com/paulmach/orb"

	"enfilade/solver/exact"
	"enfilade/solver/plan"
	"enfilade/solver/pulse"
	"enfilade/solver/walk"
)

// Routes returns every route of p as it is walked, in the plan's order: from its start over its waypoints in turn to its target,
// each leg the shortest walk.
//
//   - A route with a start, a waypoint or a target that nobody can stand at has a Problem; it is walked up to there.
//   - Errors: the context's when it is cancelled.
//   - Cost: one flood for each leg.
func (s *Solver) Routes(ctx context.Context, p *plan.Plan) ([]Route, error) {
	if err := s.Mesh(ctx, p); err != nil {
		return nil, err
	}
	var all []Route
	for i, r := range p.Routes() {
		if err := pulse.Tell(ctx, float64(i)/float64(p.NumRoutes())); err != nil {
			return nil, err
		}
		row, err := s.scene.route(ctx, p, r)
		if err != nil {
			return nil, err
		}
		all = append(all, row)
	}
	return all, nil
}

// stop is a point that a route calls at, made ready to be walked to.
type stop struct {
	sought
	name  string // "waypoint 2"
	fault string // why nobody can come there
}

// route walks one route, up to the first leg that is closed or leads where nobody can stand.
func (sc *scene) route(ctx context.Context, p *plan.Plan, r plan.Route) (Route, error) {
	row := Route{ID: r.ID, From: r.From, To: r.To}
	at, stops, fault, err := sc.stops(ctx, p, r)
	if row.Problem = fault; err != nil || fault != "" {
		return row, err
	}
	row.Points = []orb.Point{pointMM(at)}
	for i, k := range stops {
		if k.fault != "" {
			row.Closed, row.ClosedTo, row.Problem = i+1, k.name, k.fault
			return row, nil
		}
		paths, err := sc.walk.Flood(ctx, at, []walk.Goal{{Spot: sc.destination(k.sought, at)}})
		if err != nil {
			return row, err
		}
		if !paths[0].Found {
			row.Closed, row.ClosedTo, row.Reason = i+1, k.name, k.closed
			if row.Reason == "" {
				b := barrierFinder{scene: sc, start: at}
				row.Reason = b.beforePoint(k.at)
			}
			return row, nil
		}
		row.add(paths[0], k.name, p.Walker().Pace)
		at = k.at
	}
	return row, nil
}

// add appends a leg that was walked.
func (r *Route) add(path walk.Path, to string, pace float64) {
	leg := Leg{To: to, Length: mm(path.Length), First: len(r.Points) - 1}
	r.Points = append(r.Points, pointsOf(path)[1:]...)
	leg.Last = len(r.Points) - 1
	if pace > 0 {
		leg.Seconds = leg.Length / 1000 / pace
	}
	r.Legs = append(r.Legs, leg)
	r.Length += leg.Length
	r.Seconds += leg.Seconds
}

// stops returns where a route begins and all that it calls at, up to the first where nobody can stand; or what is wrong with
// where it begins.
func (sc *scene) stops(ctx context.Context, p *plan.Plan, r plan.Route) (at exact.Pt, all []stop, fault string, err error) {
	start, ok := p.Start(r.From)
	if !ok {
		return at, nil, missingEnd("start", r.From), nil
	}
	f := sc.begin(start.At)
	if !f.ok {
		return at, nil, "start " + r.From + " " + f.text, nil
	}
	for i, q := range r.Via.All() {
		w := sc.call(q)
		if !w.ok {
			return f.at, append(all, stop{name: waypoint(i), fault: waypoint(i) + " " + w.text}), "", nil
		}
		all = append(all, stop{sought: sought{look: look{at: w.at}, stood: true}, name: waypoint(i)})
	}
	if r.To == "" && len(all) == 0 {
		return at, nil, "leads nowhere; give it a waypoint or a target", nil
	}
	if r.To == "" {
		return f.at, all, "", nil
	}
	t, ok := p.Target(r.To)
	last := stop{name: "target " + r.To}
	if !ok {
		last.fault = missingEnd("target", r.To)
		return f.at, append(all, last), "", nil
	}
	if last.sought, err = sc.arrive(ctx, t, p.Walker()); err == nil && last.sought.fault != "" {
		last.fault = last.name + " " + last.sought.fault
	}
	return f.at, append(all, last), "", err
}

// missingEnd says that a route's start or target is not in the plan.
func missingEnd(kind, id string) string {
	if id == "" {
		return "has no " + kind + "; choose one"
	}
	return "has the " + kind + " " + id + ", which is not in the plan; choose another"
}

// waypoint names a waypoint by its index, as it is numbered in the picture.
func waypoint(i int) string { return fmt.Sprintf("waypoint %d", i+1) }

// call finds a footing for a waypoint. One with floor on both sides of what it lies on would let the walk through: it is none.
func (sc *scene) call(p exact.Pt) footing {
	f := sc.begin(p)
	if !f.ok {
		return f
	}
	item, parted := sc.wide.parted(f.at)
	if !parted {
		return f
	}
	what := "lies in a gap exactly as wide as the walker"
	if f.ok = false; item.Kind != plan.KindWalker {
		f.item, what = item, "lies on "+sc.nameOf(item)
	}
	f.text = what + ", with floor on both sides; move it to one"
	return f
}

// arrive makes a target ready to be walked to. From where it is seen matters only where nobody can stand at it.
func (sc *scene) arrive(ctx context.Context, t plan.Target, w plan.Walker) (sought, error) {
	foot := sc.stand(targetPoint(t), sc.plain.sighted(w.Eye))
	if foot.ok && sc.wide.free(foot.at, sc.wide.shut) {
		return sought{look: look{at: foot.at}, target: t, stood: true}, nil
	}
	return sc.find(ctx, t, w)
}

// tellRoutes appends what is wrong with the waypoints of routes.
func (sc *scene) tellRoutes(all []plan.Problem, p *plan.Plan) []plan.Problem {
	for _, r := range p.Routes() {
		for i, q := range r.Via.All() {
			n := len(all)
			all = sc.tell(all, plan.Ref{Kind: plan.KindRoute, ID: r.ID}, q, sc.call(q))
			for ; n < len(all); n++ {
				all[n].Text = waypoint(i) + " " + all[n].Text
			}
		}
	}
	return all
}
