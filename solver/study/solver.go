package study

import (
	"context"
	"fmt"

	"enfilade/solver/arrange"
	"enfilade/solver/exact"
	"enfilade/solver/mesh"
	"enfilade/solver/plan"
	"enfilade/solver/sight"
	"enfilade/solver/walk"
)

// Solver studies one plan after another. It keeps the mesh for as long as the obstacles stay the same, so that moving a mark
// costs no more than the question itself; it is not for concurrent use.
type Solver struct {
	obstacles *plan.Obstacles
	box       [4]exact.Pt // the floor of a plan that gives none, which depends on its marks
	scene     *scene
}

// scene is the mesh of one plan's obstacles with all that works on it.
type scene struct {
	outline  *arrange.Outline
	graph    *arrange.Graph
	mesh     *mesh.Mesh
	problems []plan.Problem
	floor    []exact.Pt
	sight    *sight.Finder
	walk     *walk.Finder
	cones    []sight.Cone
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
	if s.scene != nil && s.obstacles == p.Obstacles() && s.box == box {
		return nil
	}
	outline, problems := arrange.Draw(p)
	graph := arrange.Round(outline)
	if err := ctx.Err(); err != nil {
		return err
	}
	m, err := arrange.Build(ctx, graph)
	if err != nil {
		return fmt.Errorf("study: %w", err)
	}
	s.obstacles, s.box = p.Obstacles(), box
	s.scene = &scene{outline: outline, graph: graph, mesh: m, problems: problems, floor: floorRing(outline),
		sight: sight.New(m), walk: walk.New(m)}
	return nil
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
	if err := s.Mesh(ctx, p); err != nil {
		return nil, err
	}
	r := &Result{WalkerEye: mm(p.Walker().Eye)}
	var err error
	if r.Sight, err = s.Sights(ctx, p); err != nil {
		return nil, err
	}
	if r.SeenFrom, err = s.SeenFrom(ctx, p); err != nil {
		return nil, err
	}
	if r.Approaches, err = s.Approaches(ctx, p); err != nil {
		return nil, err
	}
	r.Problems = s.Problems(p)
	return r, nil
}

// Problems returns what is wrong with the drawing of p: what cannot be outlined, and marks that cannot stand where they
// are. Mesh must have been called for p.
func (s *Solver) Problems(p *plan.Plan) []plan.Problem {
	all := append([]plan.Problem(nil), s.scene.problems...)
	for _, o := range p.Observers() {
		all = s.scene.tell(all, plan.Ref{Kind: plan.KindObserver, ID: o.ID}, o.At, s.scene.stand(o.At, s.scene.blindAt(o.Eye)))
	}
	for _, t := range p.Targets() {
		at := targetPoint(t)
		all = s.scene.tell(all, plan.Ref{Kind: plan.KindTarget, ID: t.ID}, at, s.scene.stand(at, s.scene.blindAt(p.Walker().Eye)))
	}
	for _, t := range p.Starts() {
		all = s.scene.tell(all, plan.Ref{Kind: plan.KindStart, ID: t.ID}, t.At, s.scene.stand(t.At, s.scene.shut))
	}
	return all
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
	default:
		p.Kind = plan.ProblemInside
	}
	if !f.ok && f.item != (plan.Ref{}) {
		p.Items = append(p.Items, f.item)
	}
	return append(all, p)
}
