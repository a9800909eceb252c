package study

import (
	"context"
	"errors"
	"fmt"
	"math"

	"github.com/paulmach/orb"

	"enfilade/solver/plan"
	"enfilade/solver/pulse"
	"enfilade/solver/walk"
)

// ClearWidths adds to the approaches of p, as Approaches returned them, how wide a body can be and still make the walk: to
// first sight and to the target itself. They do not depend on the walker's own radius, so they tell by how much a body is too
// wide, and they are of all walks, not only of the shortest.
//
//   - A row with a Problem stays as it is. Where the gaps of the plan are too crowded to be found, all others have
//     WidthsUnknown set, and no number.
//   - Errors: the context's when it is cancelled.
//   - Cost: O(n log n) for n edges that stop walking when they are first asked for after a change of the obstacles; then, for
//     each start, time proportional to the gaps of the plan.
func (s *Solver) ClearWidths(ctx context.Context, p *plan.Plan, rows []Approach) error {
	if len(rows) != p.NumStarts()*p.NumTargets() {
		panic("study: the approaches are not those of the plan")
	}
	if err := s.Mesh(ctx, p); err != nil || len(rows) == 0 {
		return err
	}
	sc := s.scene
	err := sc.findGaps(pulse.Part(ctx, 0, 0.8))
	if errors.Is(err, walk.ErrCrowded) {
		for i := range rows {
			rows[i].WidthsUnknown = rows[i].Problem == ""
		}
		return nil
	}
	if err != nil {
		return err
	}
	ends, err := sc.findEnds(ctx, p)
	if err != nil {
		return err
	}
	search := pulse.Part(ctx, 0.8, 1)
	for i, start := range p.Starts() {
		if err := pulse.Tell(search, float64(i)/float64(p.NumStarts())); err != nil {
			return err
		}
		f := sc.stand(start.At, sc.plain.standing())
		if !f.ok {
			continue
		}
		if err := sc.gaps.From(f.at); err != nil {
			return fmt.Errorf("study: start %s: %w", start.ID, err)
		}
		for j := range ends {
			if row := &rows[i*len(ends)+j]; row.Problem == "" {
				sc.fillWidths(row, &ends[j])
			}
		}
	}
	return nil
}

// findGaps makes the gaps of the plain ground ready, or remembers that they are too crowded.
func (sc *scene) findGaps(ctx context.Context) error {
	if sc.gaps != nil {
		return nil
	}
	if sc.crowded {
		return walk.ErrCrowded
	}
	gaps, err := walk.NewWidths(ctx, sc.plain.mesh)
	if err != nil {
		sc.crowded = errors.Is(err, walk.ErrCrowded)
		return err
	}
	sc.gaps = gaps
	return nil
}

// end is a target as someone of any width is to reach it.
type end struct {
	look              // on the plain ground
	stood bool        // a point can stand at the target
	seen  walk.Places // from where the target is in view
	full  walk.Places // the target itself, when a point can stand there
}

// findEnds finds every target on the plain ground. The rows of one that cannot be looked for have a Problem.
func (sc *scene) findEnds(ctx context.Context, p *plan.Plan) ([]end, error) {
	ends := make([]end, 0, p.NumTargets())
	for _, t := range p.Targets() {
		k, err := sc.lookFor(ctx, sc.plain, sc.sight, t, p.Walker(), false)
		if err != nil {
			return nil, err
		}
		ends = append(ends, sc.endOf(k))
	}
	return ends, nil
}

// endOf finds where a walk to a target may end.
func (sc *scene) endOf(k look) end {
	e := end{look: k}
	if k.fault != "" {
		return e
	}
	if k.view != nil {
		e.seen = sc.gaps.InPieces(k.view.pieces)
	} else {
		e.seen = sc.gaps.InCones(k.at, k.cones)
	}
	if e.stood = sc.plain.free(k.at, sc.plain.shut); e.stood {
		e.full = sc.gaps.AtPoint(k.at)
	}
	return e
}

// fillWidths fills in the clear widths of one row. The gaps' start is the row's.
func (sc *scene) fillWidths(a *Approach, e *end) {
	sightWidth := sc.gaps.To(e.seen)
	a.ClearWidth, a.HasClearWidth = widthOf(sightWidth)
	if a.HasClearWidth {
		a.Tightest = gapOf(sightWidth)
	}
	if !e.stood {
		return
	}
	full := sc.gaps.To(e.full)
	a.FullClearWidth, a.HasFullClearWidth = widthOf(full)
	a.Tightest = gapOf(full)
}

// widthOf returns a clear width in mm, and false where there is no number: no way, or none that passes a gap.
func widthOf(w walk.Width) (float64, bool) {
	if !w.Found || math.IsInf(w.Clear, 1) {
		return 0, false
	}
	return mm(w.Clear), true
}

// gapOf returns the two points of a way's tightest gap in mm.
func gapOf(w walk.Width) [2]orb.Point {
	return [2]orb.Point{{mm(w.Gap[0][0]), mm(w.Gap[0][1])}, {mm(w.Gap[1][0]), mm(w.Gap[1][1])}}
}
