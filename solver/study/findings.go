package study

import (
	"context"
	"math"
	"slices"

	"enfilade/solver/exact"
	"enfilade/solver/mesh"
	"enfilade/solver/plan"
)

// Findings returns all that looks wrong with p, with what would mend it where that is sure: the problems that Problems tells,
// what plan.Inspect sees in the drawing, targets that no walk leads in sight of, and routes that cannot be walked. rows are the
// approaches of p, routes its routes.
//
//   - Errors: the context's when it is cancelled.
func (s *Solver) Findings(ctx context.Context, p *plan.Plan, rows []Approach, routes []Route) ([]plan.Finding, error) {
	if err := s.Mesh(ctx, p); err != nil {
		return nil, err
	}
	var out []plan.Finding
	problems := s.Problems(p)
	for _, f := range problems {
		out = append(out, s.mended(p, f))
		if err := ctx.Err(); err != nil {
			return nil, err
		}
	}
	more, err := doubts(ctx, p, rows, routes, problems)
	return append(out, more...), err
}

// doubts is what looks wrong besides the problems that were told: what cannot be reached or walked, and what plan.Inspect sees.
func doubts(ctx context.Context, p *plan.Plan, rows []Approach, routes []Route, told []plan.Problem) ([]plan.Finding, error) {
	out := append(unreached(p, rows, told), unwalked(p, routes, told)...)
	out = append(out, plan.Inspect(p, func() bool { return ctx.Err() != nil })...)
	if err := ctx.Err(); err != nil {
		return nil, err
	}
	return out, nil
}

// unwalked are the routes that cannot be walked to their end, where no problem names what is wrong with them: a leg is closed,
// or they lead nowhere.
func unwalked(p *plan.Plan, routes []Route, told []plan.Problem) (out []plan.Finding) {
	for i := range routes {
		r := &routes[i]
		ref := plan.Ref{Kind: plan.KindRoute, ID: r.ID}
		named := func(x plan.Ref) bool {
			return slices.ContainsFunc(told, func(f plan.Problem) bool { return f.Kind != plan.ProblemMoved && slices.Contains(f.Items, x) })
		}
		f := plan.Problem{Kind: plan.ProblemClosed, Items: []plan.Ref{ref}}
		switch start, ok := p.Start(r.From); {
		case r.Problem == "" && r.Closed == 0:
			continue
		case r.Problem == "":
			f.At, f.Text = r.closedAt(p), "no walk leads to "+r.ClosedTo+": "+r.Reason
		case named(ref), named(plan.Ref{Kind: plan.KindStart, ID: r.From}), named(plan.Ref{Kind: plan.KindTarget, ID: r.To}), !ok:
			continue
		default:
			f.At, f.Text = start.At, r.Problem
		}
		out = append(out, plan.Finding{Problem: f})
	}
	return out
}

// closedAt is the place that the closed leg of a route leads to.
func (r *Route) closedAt(p *plan.Plan) exact.Pt {
	for _, x := range p.Routes() {
		if i := r.Closed - 1; x.ID == r.ID && i >= 0 && i < x.Via.Len() {
			return x.Via.At(i)
		}
	}
	t, _ := p.Target(r.To) // a closed leg leads to a waypoint or to a target
	return targetPoint(t)
}

// mended finds what would mend a problem.
func (s *Solver) mended(p *plan.Plan, f plan.Problem) plan.Finding {
	out := plan.Finding{Problem: f}
	first := f.Items[0]
	switch f.Kind {
	case plan.ProblemMissing:
		out.Fix, out.Offer = plan.Delete{Items: f.Items[:1]}, "Delete it"
	case plan.ProblemInside, plan.ProblemOutside, plan.ProblemTight, plan.ProblemMoved:
		at, demand, g := f.At, s.scene.plain.standing(), s.scene.plain
		switch first.Kind {
		case plan.KindObserver:
			o, _ := p.Observer(first.ID)
			demand = s.scene.plain.sighted(o.Eye)
		case plan.KindTarget:
			demand = s.scene.plain.sighted(p.Walker().Eye)
		case plan.KindStart:
			g = s.scene.wide
			demand = g.standing()
		default:
			return out
		}
		if to, ok := g.freeNear(at, demand.shut); ok {
			out.Fix, out.Offer = plan.MoveItems{Items: []plan.Ref{first}, By: to.Sub(at)}, "Move to free floor"
			if f.Kind == plan.ProblemMoved {
				out.Offer = "Move to the face"
			}
		}
	}
	return out
}

// aside is how far from a face a mark is put when there is room, in grid units: 10 mm.
const aside = 10 * exact.PerMM

// freeNear returns a grid point of the nearest triangle that is not shut: a little inside it, as far as it is wide enough. O(n).
func (g *ground) freeNear(p exact.Pt, shut func(int32) bool) (exact.Pt, bool) {
	const few = 24 // triangles that are tried, for the nearest may be too slim to hold a grid point
	type candidate struct {
		tri  int32
		dist float64
	}
	var best []candidate
	for i := range g.mesh.Tris {
		t := &g.mesh.Tris[i]
		if shut(int32(i)) {
			continue
		}
		d := math.Inf(1)
		for k := range 3 {
			d = min(d, distance(p, t.P[k], t.P[mesh.Inc(k)]))
		}
		if len(best) == few && d >= best[few-1].dist {
			continue
		}
		at, _ := slices.BinarySearchFunc(best, d, func(c candidate, d float64) int {
			if c.dist <= d {
				return -1
			}
			return 1
		})
		best = slices.Insert(best, at, candidate{int32(i), d})
		best = best[:min(len(best), few)]
	}
	for _, c := range best {
		if q, ok := g.inside(c.tri, p, shut); ok {
			return q, true
		}
	}
	return exact.Pt{}, false
}

// inside returns a grid point of a triangle near p: from the nearest point of its border towards its middle.
func (g *ground) inside(tri int32, p exact.Pt, shut func(int32) bool) (exact.Pt, bool) {
	t := &g.mesh.Tris[tri]
	near, d := [2]float64{}, math.Inf(1)
	var mx, my float64
	for k := range 3 {
		a, b := t.P[k], t.P[mesh.Inc(k)]
		mx, my = mx+float64(a.X)/3, my+float64(a.Y)/3
		if e := distance(p, a, b); e < d {
			v := b.Sub(a)
			share := min(max(float64(p.Sub(a).Dot(v))/float64(v.Len2()), 0), 1)
			near, d = [2]float64{float64(a.X) + share*float64(v.X), float64(a.Y) + share*float64(v.Y)}, e
		}
	}
	dx, dy := mx-near[0], my-near[1]
	long := math.Hypot(dx, dy)
	for _, in := range [4]float64{aside, 1.5, 0, long} {
		k := min(in/long, 1)
		q := exact.Pt{X: int32(math.Round(near[0] + k*dx)), Y: int32(math.Round(near[1] + k*dy))}
		if g.free(q, shut) {
			return q, true
		}
	}
	return exact.Pt{}, false
}

// unreached are the targets that can be seen from somewhere, to where no walk leads from any start.
func unreached(p *plan.Plan, rows []Approach, told []plan.Problem) (out []plan.Finding) {
	for _, t := range p.Targets() {
		ref := plan.Ref{Kind: plan.KindTarget, ID: t.ID}
		own := slices.ContainsFunc(told, func(f plan.Problem) bool { return slices.Contains(f.Items, ref) && f.Kind != plan.ProblemMoved })
		solved, reason := 0, ""
		for i := range rows {
			r := &rows[i]
			if r.Target != t.ID || r.Problem != "" {
				continue
			}
			if r.Status != StatusNone {
				solved, own = solved+1, true
				break
			}
			solved, reason = solved+1, r.Reason
		}
		if own || solved == 0 {
			continue
		}
		text := "no walk leads in sight of it"
		if reason != "" {
			text += ": " + reason
		}
		out = append(out, plan.Finding{Problem: plan.Problem{Kind: plan.ProblemUnreached, Items: []plan.Ref{ref}, At: targetPoint(t), Text: text}})
	}
	return out
}
