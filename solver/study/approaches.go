package study

import (
	"context"
	"math"
	"slices"

	"github.com/paulmach/orb"

	"enfilade/solver/exact"
	"enfilade/solver/plan"
	"enfilade/solver/pulse"
	"enfilade/solver/walk"
)

// sought is a target made ready to be walked to.
type sought struct {
	look
	target plan.Target
	closed string // what it stands in, so that nobody can stand at it whatever their width
	stood  bool   // the walker can stand at it
}

// Approaches returns the shortest walk to first sight and the full walk for every start and target, starts outermost, in
// the plane of the walker's eye.
func (s *Solver) Approaches(ctx context.Context, p *plan.Plan) ([]Approach, error) {
	rows, _, err := s.fromStarts(ctx, p, false)
	return rows, err
}

// fromStarts solves all approaches, and on the way, if asked, how far every zone is from every start: one flood a start serves
// both.
func (s *Solver) fromStarts(ctx context.Context, p *plan.Plan, reach bool) ([]Approach, []Reach, error) {
	if err := s.Mesh(ctx, p); err != nil {
		return nil, nil, err
	}
	targets, err := s.scene.findAll(ctx, p)
	if err != nil {
		return nil, nil, err
	}
	var zones []zone
	if reach {
		if zones, err = s.scene.zones(ctx, p); err != nil {
			return nil, nil, err
		}
	}
	out := make([]Approach, 0, p.NumStarts()*p.NumTargets())
	var spans []Reach
	for i, start := range p.Starts() {
		if err := pulse.Tell(ctx, float64(i)/float64(p.NumStarts())); err != nil {
			return nil, nil, err
		}
		f := sentry{start: start, footing: s.scene.begin(start.At), keep: len(zones) > 0}
		rows, err := s.scene.fromStart(ctx, p, &f, targets)
		if err != nil {
			return nil, nil, err
		}
		out = append(out, rows...)
		if spans, err = s.scene.reach(ctx, spans, &f, zones); err != nil {
			return nil, nil, err
		}
	}
	return out, spans, nil
}

// sentry is a start made ready to walk from.
type sentry struct {
	footing
	start plan.Start
	keep  bool        // the flood is to keep the distances
	field *walk.Field // which it has kept
}

// flood finds the walks from a start.
func (sc *scene) flood(ctx context.Context, f *sentry, goals []walk.Goal) (paths []walk.Path, err error) {
	if !f.keep {
		return sc.walk.Flood(ctx, f.at, goals)
	}
	paths, f.field, err = sc.walk.FloodField(ctx, f.at, goals)
	return paths, err
}

// findAll finds the places that see each target once, for all starts.
func (sc *scene) findAll(ctx context.Context, p *plan.Plan) ([]sought, error) {
	all := make([]sought, 0, p.NumTargets())
	for _, t := range p.Targets() {
		k, err := sc.find(ctx, t, p.Walker())
		if err != nil {
			return nil, err
		}
		all = append(all, k)
	}
	return all, nil
}

func (sc *scene) find(ctx context.Context, t plan.Target, w plan.Walker) (sought, error) {
	l, err := sc.lookFor(ctx, sc.wide, sc.seek, t, w, false)
	k := sought{look: l, target: t}
	if err != nil || k.fault != "" {
		return k, err
	}
	k.stood = sc.wide.free(k.at, sc.wide.shut)
	if !sc.plain.free(k.at, sc.plain.shut) {
		k.closed = "the target stands in " + sc.nameOf(sc.plain.holder(k.at, sc.plain.standing().by)) + ", where nobody walks"
	}
	return k, nil
}

// goal returns where a walk to first sight ends.
func (k *look) goal() walk.Goal {
	if k.view != nil {
		return walk.Goal{Pieces: k.view.pieces}
	}
	return walk.Goal{Eye: k.at, Cones: k.cones}
}

// fromStart solves all approaches of one start in one flood.
func (sc *scene) fromStart(ctx context.Context, p *plan.Plan, f *sentry, targets []sought) ([]Approach, error) {
	rows := make([]Approach, len(targets))
	var goals []walk.Goal
	for i, k := range targets {
		rows[i] = Approach{Start: f.start.ID, Target: k.target.ID, Asked: k.asked}
		switch {
		case !f.ok:
			rows[i].Problem = "start " + f.start.ID + " " + f.text
		case k.fault != "":
			rows[i].Problem = "target " + k.target.ID + " " + k.fault
		default:
			goals = append(goals, k.goal(), walk.Goal{Spot: sc.destination(k, f.at)})
		}
	}
	if len(goals) == 0 {
		return rows, nil
	}
	paths, err := sc.flood(ctx, f, goals)
	if err != nil {
		return nil, err
	}
	barriers := barrierFinder{scene: sc, start: f.at}
	for i, k := range targets {
		if rows[i].Problem == "" {
			sc.fillApproach(&rows[i], k, paths[0], p.Walker().Pace, &barriers)
			sc.fillFullWalk(&rows[i], k, paths[1], &barriers)
			paths = paths[2:]
		}
	}
	return rows, nil
}

// destination returns where the full walk to a target ends: at the target itself, or, where the walker's body has no room at
// it, at the standing point nearest to it in a straight line that sees it. It returns nil when there is none, and for what
// stands in a body.
//
// A target on a thin wall is as near from either side: then the side connected to the start is taken. The two distances are
// measured, so they are the same when they differ by less than a part in 2^40.
func (sc *scene) destination(k sought, start exact.Pt) *walk.Spot {
	switch {
	case k.closed != "":
		return nil
	case k.stood:
		return walk.At(k.at)
	}
	spot, nearest, ok := sc.walk.Nearest(k.at, k.cones, func(int32) bool { return true })
	if !ok {
		return nil
	}
	if sc.rooms == nil {
		sc.rooms = walk.Rooms(sc.wide.mesh)
	}
	var from []int32
	sc.wide.holding(start, func(t int32) { from = append(from, sc.rooms[t]) })
	own, dist, ok := sc.walk.Nearest(k.at, k.cones, func(t int32) bool { return slices.Contains(from, sc.rooms[t]) })
	if ok && dist <= nearest*(1+0x1p-40) {
		return own
	}
	return spot
}

// fillApproach fills in the walk to first sight.
func (sc *scene) fillApproach(a *Approach, k sought, path walk.Path, pace float64, b *barrierFinder) {
	if !path.Found {
		if a.Reason = nowhere(k.asked); len(k.triangles()) > 0 {
			a.Reason = b.beforeTriangles(k.triangles())
		}
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
	x, y := float64(k.at.X), float64(k.at.Y)
	if k.asked.Face {
		x, y = k.view.inView(path.Piece, path.End[0], path.End[1])
	}
	a.SightTo = orb.Point{mm(x), mm(y)}
	a.SightLine = mm(math.Hypot(path.End[0]-x, path.End[1]-y))
	if pace > 0 {
		a.Seconds = a.Length / 1000 / pace
	}
}

// nowhere says that no place sees enough of a target.
func nowhere(a Asked) string {
	switch {
	case a.Seen == plan.SeenAll:
		return "no place sees all of its face"
	case a.Seen == plan.SeenShare:
		return "no place sees that much of its face"
	}
	return "no place from which it may be seen sees it"
}

// fillFullWalk fills in the walk to the target itself.
func (sc *scene) fillFullWalk(a *Approach, k sought, path walk.Path, b *barrierFinder) {
	switch {
	case path.Found:
	case k.closed != "":
		a.Reason = k.closed
		return
	case a.Reason == "":
		a.Reason = b.beforePoint(k.at)
		return
	default:
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
