package study

import (
	"context"
	"math"

	"github.com/paulmach/orb"

	"enfilade/solver/exact"
	"enfilade/solver/plan"
	"enfilade/solver/sight"
	"enfilade/solver/walk"
)

// sought is a target made ready to be walked to.
type sought struct {
	target plan.Target
	at     exact.Pt
	cones  []sight.Cone
	fault  string // why it cannot be looked for
	closed string // why nobody can stand at it
}

// Approaches returns the shortest walk to first sight and the full walk for every start and target, starts outermost, in
// the plane of the walker's eye.
func (s *Solver) Approaches(ctx context.Context, p *plan.Plan) ([]Approach, error) {
	if err := s.Mesh(ctx, p); err != nil {
		return nil, err
	}
	targets := s.scene.seek(p)
	out := make([]Approach, 0, p.NumStarts()*p.NumTargets())
	for _, start := range p.Starts() {
		rows, err := s.scene.fromStart(ctx, p, start, targets)
		if err != nil {
			return nil, err
		}
		out = append(out, rows...)
	}
	return out, nil
}

// seek finds the cones of every target once, for all starts.
func (sc *scene) seek(p *plan.Plan) []sought {
	eye := p.Walker().Eye
	all := make([]sought, 0, p.NumTargets())
	sc.cones = sc.cones[:0]
	for _, t := range p.Targets() {
		k := sought{target: t}
		f := sc.stand(targetPoint(t), sc.blindAt(eye))
		k.at = f.at
		if !f.ok {
			k.fault = "target " + t.ID + " " + f.text
			all = append(all, k)
			continue
		}
		cones, err := sc.sight.Cones(f.at, eye, frontOf(t))
		if err != nil {
			k.fault = "target " + t.ID + " faces into the wall it hangs on; turn its face round"
		}
		n := len(sc.cones)
		sc.cones = append(sc.cones, cones...)
		k.cones = sc.cones[n:len(sc.cones):len(sc.cones)]
		if g := sc.stand(f.at, sc.shut); !g.ok || g.at != f.at {
			k.closed = "the target stands in " + nameOf(sc.holder(f.at, sc.shut)) + ", where nobody walks"
		}
		all = append(all, k)
	}
	return all
}

// fromStart solves all approaches of one start in one flood.
func (sc *scene) fromStart(ctx context.Context, p *plan.Plan, start plan.Start, targets []sought) ([]Approach, error) {
	rows := make([]Approach, len(targets))
	f := sc.stand(start.At, sc.shut)
	var goals []walk.Goal
	for i, k := range targets {
		rows[i] = Approach{Start: start.ID, Target: k.target.ID}
		switch {
		case !f.ok:
			rows[i].Problem = "start " + start.ID + " " + f.text
		case k.fault != "":
			rows[i].Problem = k.fault
		default:
			goals = append(goals, walk.Goal{Eye: k.at, Cones: k.cones})
			if k.closed == "" {
				goals = append(goals, walk.Goal{Spot: walk.At(k.at)})
			}
		}
	}
	if len(goals) == 0 {
		return rows, nil
	}
	paths, err := sc.walk.Flood(ctx, f.at, goals)
	if err != nil {
		return nil, err
	}
	barriers := barrierFinder{scene: sc, start: f.at}
	for i, k := range targets {
		if rows[i].Problem != "" {
			continue
		}
		sc.fillApproach(&rows[i], k, paths[0], p.Walker().Pace, &barriers)
		paths = paths[1:]
		if k.closed != "" {
			rows[i].Reason = k.closed
			continue
		}
		sc.fillFullWalk(&rows[i], k, paths[0], &barriers)
		paths = paths[1:]
	}
	return rows, nil
}

// fillApproach fills in the walk to first sight.
func (sc *scene) fillApproach(a *Approach, k sought, path walk.Path, pace float64, b *barrierFinder) {
	if !path.Found {
		a.Reason = b.beforeCones(k.cones)
		return
	}
	a.Status = StatusApproach
	if path.Length == 0 {
		a.Status = StatusSeen
	}
	a.Length = mm(path.Length)
	a.Ties = path.Ties
	a.FirstSight = orb.Point{mm(path.End[0]), mm(path.End[1])}
	a.Points = pointsOf(path)
	a.SightLine = mm(math.Hypot(path.End[0]-float64(k.at.X), path.End[1]-float64(k.at.Y)))
	if pace > 0 {
		a.Seconds = a.Length / 1000 / pace
	}
}

// fillFullWalk fills in the walk to the target itself.
func (sc *scene) fillFullWalk(a *Approach, k sought, path walk.Path, b *barrierFinder) {
	if !path.Found {
		if a.Reason == "" {
			a.Reason = b.beforePoint(k.at)
		}
		return
	}
	a.HasFullWalk = true
	a.FullWalk = mm(path.Length)
	a.FullPoints = pointsOf(path)
}

// pointsOf returns the points of a walk in millimetres, its end included.
func pointsOf(path walk.Path) []orb.Point {
	out := make([]orb.Point, 0, len(path.Turns)+1)
	for _, p := range path.Turns {
		out = append(out, pointMM(p))
	}
	end := orb.Point{mm(path.End[0]), mm(path.End[1])}
	if path.Length > 0 {
		out = append(out, end)
	}
	return out
}
