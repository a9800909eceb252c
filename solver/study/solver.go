package study

import (
	"context"
	"fmt"

	"enfilade/solver/arrange"
	"enfilade/solver/exact"
	"enfilade/solver/plan"
	"enfilade/solver/pulse"
	"enfilade/solver/sight"
	"enfilade/solver/walk"
)

// Solver studies one plan after another. It keeps the mesh for as long as the obstacles stay the same, so that moving a mark
// costs no more than the question itself; it is not for concurrent use.
type Solver struct {
	obstacles *plan.Obstacles
	box       [4]exact.Pt // the floor of a plan that gives none, which depends on its marks
	radius    int32
	scene     *scene
}

// scene is what one plan's obstacles make: the ground for eyes, the ground for walkers, and all that works on them.
type scene struct {
	plain    *ground    // for eyes, and for walkers who are points
	wide     *ground    // for walkers with a body; the same as plain when there is none
	plan     *plan.Plan // whose obstacles these are
	problems []plan.Problem
	floor    []exact.Pt
	radius   int32
	excess   float64 // how far the polygon that stands for the walker exceeds its radius, grid units
	sight    *sight.Finder
	walk     *walk.Finder
	seek     *sight.Finder // of cones on the wide ground
	rooms    []int32       // for each triangle of the wide ground the floor it is connected to, once asked for
	gaps     *walk.Widths  // of the plain ground, once asked for
	crowded  bool          // its gaps were given up
}

// NewSolver returns a solver that has seen no plan yet.
func NewSolver() *Solver { return &Solver{} }

// Mesh makes the mesh of p ready unless the one at hand still fits.
//
//   - Errors: the context's when it is cancelled; the mesh at hand is then kept.
//   - Cost: O(n log n) for n edges when the obstacles changed, nothing otherwise.
func (s *Solver) Mesh(ctx context.Context, p *plan.Plan) error {
	var box [4]exact.Pt
	if p.Floor().Len() == 0 {
		box = arrange.FloorBox(p)
	}
	radius := min(p.Walker().Radius, arrange.MaxRadius)
	if s.scene != nil && s.obstacles == p.Obstacles() && s.box == box && s.radius == radius {
		return nil
	}
	if err := arrange.Fits(p); err != nil {
		return fmt.Errorf("study: %w", err)
	}
	outline, problems := arrange.Draw(p)
	half := 1.0
	if radius > 0 {
		half = 0.3
	}
	plain, err := s.groundFor(pulse.Part(ctx, 0, half), outline)
	if err != nil {
		return err
	}
	sc, err := makeScene(pulse.Part(ctx, half, 1), plain, radius, arrange.Sides(p))
	if err != nil {
		return err
	}
	sc.plan, sc.problems = p, problems
	s.obstacles, s.box, s.radius, s.scene = p.Obstacles(), box, radius, sc
	return nil
}

// groundFor returns the ground of an outline: the one at hand, when it can follow the change, or else a new one. From the
// moment that the old one has changed the old scene is gone.
func (s *Solver) groundFor(ctx context.Context, o *arrange.Outline) (*ground, error) {
	if s.scene != nil {
		site := s.scene.plain.site
		ok, err := site.Follow(o)
		if ok || err != nil {
			s.scene = nil
		}
		if ok {
			return groundOf(site), nil
		}
	}
	return makeGround(ctx, o)
}

// makeScene sets the scene on the plain ground. A walker with a body takes a second one: the obstacles are grown in the first.
func makeScene(ctx context.Context, plain *ground, radius int32, sides int) (*scene, error) {
	sc := &scene{plain: plain, wide: plain, floor: floorRing(plain.site.Outline), radius: radius}
	if radius > 0 {
		_, sc.excess = arrange.Disc(radius, sides)
		var err error
		if sc.wide, err = plain.grow(ctx, radius, sides); err != nil {
			return nil, err
		}
	}
	sc.sight, sc.seek, sc.walk = sight.New(sc.plain.mesh), sight.New(sc.wide.mesh), walk.New(sc.wide.mesh)
	return sc, nil
}

// floorRing reads the floor's ring back from the outline.
func floorRing(o *arrange.Outline) []exact.Pt {
	var ring []exact.Pt
	for _, s := range o.Segments {
		if s.Body == 0 {
			ring = append(ring, s.A)
		}
	}
	return ring
}

// Solve studies everything in p.
//
//   - A fault of one item is told in its entry and in Problems; the rest is solved.
//   - Errors: the context's when it is cancelled.
func Solve(ctx context.Context, p *plan.Plan) (*Result, error) {
	return NewSolver().Solve(ctx, p)
}

// Solve studies everything in p, as the function Solve does.
func (s *Solver) Solve(ctx context.Context, p *plan.Plan) (*Result, error) {
	if err := s.Mesh(pulse.Part(ctx, 0, 0.5), p); err != nil {
		return nil, err
	}
	r := &Result{WalkerEye: mm(p.Walker().Eye), WalkerRadius: mm(s.radius), RadiusExcess: s.scene.excess / exact.PerMM}
	var err error
	if r.Sight, err = s.Sights(pulse.Part(ctx, 0.5, 0.55), p); err != nil {
		return nil, err
	}
	if r.SeenFrom, err = s.SeenFrom(pulse.Part(ctx, 0.55, 0.6), p); err != nil {
		return nil, err
	}
	if r.Approaches, r.Reach, err = s.fromStarts(pulse.Part(ctx, 0.6, 0.8), p, true); err != nil {
		return nil, err
	}
	if err = s.ClearWidths(pulse.Part(ctx, 0.8, 0.95), p, r.Approaches); err != nil {
		return nil, err
	}
	if r.Routes, err = s.Routes(pulse.Part(ctx, 0.95, 0.98), p); err != nil {
		return nil, err
	}
	r.Problems = s.Problems(p)
	found, err := doubts(ctx, p, r.Approaches, r.Routes, r.Problems)
	for _, f := range found {
		r.Doubts = append(r.Doubts, f.Problem)
	}
	return r, err
}

// Problems returns what is wrong with the drawing of p: what cannot be outlined, and marks that cannot stand where they
// are. Mesh must have been called for p.
func (s *Solver) Problems(p *plan.Plan) []plan.Problem {
	all := append([]plan.Problem(nil), s.scene.problems...)
	for _, o := range p.Observers() {
		all = s.scene.tell(all, plan.Ref{Kind: plan.KindObserver, ID: o.ID}, o.At, s.scene.stand(o.At, s.scene.plain.sighted(o.Eye)))
	}
	for _, t := range p.Targets() {
		at := targetPoint(t)
		foot := s.scene.stand(at, s.scene.plain.sighted(p.Walker().Eye))
		all = s.scene.tell(all, plan.Ref{Kind: plan.KindTarget, ID: t.ID}, at, foot)
		all = s.scene.tellFace(all, t, foot, p.Walker().Eye)
	}
	for _, t := range p.Starts() {
		all = s.scene.tell(all, plan.Ref{Kind: plan.KindStart, ID: t.ID}, t.At, s.scene.begin(t.At))
	}
	return s.scene.tellRoutes(all, p)
}

// tell appends the problem of a mark that had to be moved or cannot stand where it is.
func (sc *scene) tell(all []plan.Problem, ref plan.Ref, at exact.Pt, f footing) []plan.Problem {
	p := plan.Problem{Items: []plan.Ref{ref}, At: at, Text: f.text}
	switch {
	case f.ok && f.at != at:
		p.Kind = plan.ProblemMoved
		p.Text = fmt.Sprintf("less than 1 mm inside a face; taken to be at %s, on its free side", millimetres(f.at))
	case f.ok:
		return all
	case f.off:
		p.Kind = plan.ProblemOutside
	case f.tight:
		p.Kind = plan.ProblemTight
	default:
		p.Kind = plan.ProblemInside
	}
	if !f.ok && f.item != (plan.Ref{}) {
		p.Items = append(p.Items, f.item)
	}
	return append(all, p)
}
