package study

import (
	"context"
	"fmt"
	"slices"

	"github.com/paulmach/orb"

	"enfilade/solver/arrange"
	"enfilade/solver/exact"
	"enfilade/solver/plan"
	"enfilade/solver/pulse"
	"enfilade/solver/walk"
)

// Reaches returns how far every zone is from every start, starts outermost.
//
//   - A start that cannot stand where it is has a Problem in its rows.
//   - Errors: the context's when it is cancelled.
//   - Cost: one flood over all of the floor for each start; Solve shares it with the approaches.
func (s *Solver) Reaches(ctx context.Context, p *plan.Plan) ([]Reach, error) {
	if err := s.Mesh(ctx, p); err != nil {
		return nil, err
	}
	zones, err := s.scene.zones(ctx, p)
	if err != nil {
		return nil, err
	}
	var rows []Reach
	for i, start := range p.Starts() {
		if err := pulse.Tell(ctx, float64(i)/float64(p.NumStarts())); err != nil {
			return nil, err
		}
		f := sentry{start: start, footing: s.scene.begin(start.At)}
		if rows, err = s.scene.reach(ctx, rows, &f, zones); err != nil {
			return nil, err
		}
	}
	return rows, nil
}

// zone is a zone made ready to be measured.
type zone struct {
	id   string
	area *walk.Zone
}

// zones lays every zone over the walkable floor. A ring may cross itself: what it winds around is the zone.
func (sc *scene) zones(ctx context.Context, p *plan.Plan) ([]zone, error) {
	var all []zone
	for _, z := range p.Zones() {
		o := arrange.Outline{Items: make([]plan.Ref, 1), Bodies: make([]arrange.Body, 1)}
		for i, a := range z.Ring.All() {
			if b := z.Ring.At((i + 1) % z.Ring.Len()); a != b {
				o.Segments = append(o.Segments, arrange.Segment{A: a, B: b})
			}
		}
		area, err := arrange.Build(ctx, arrange.Round(&o))
		if err != nil {
			return nil, fmt.Errorf("study: zone %s: %w", z.ID, err)
		}
		all = append(all, zone{z.ID, walk.NewZone(sc.wide.mesh, area)})
	}
	return all, nil
}

// reach appends how far the zones are from a start, whose flood may have kept the distances.
func (sc *scene) reach(ctx context.Context, rows []Reach, f *sentry, zones []zone) ([]Reach, error) {
	if f.ok && f.field == nil && len(zones) > 0 {
		var err error
		if f.field, err = sc.walk.Field(ctx, f.at); err != nil {
			return nil, err
		}
	}
	for _, z := range zones {
		row := Reach{Start: f.start.ID, Zone: z.id}
		if f.ok {
			row.fill(f.field.Span(z.area))
		} else {
			row.Problem = "start " + f.start.ID + " " + f.text
		}
		rows = append(rows, row)
	}
	return rows, nil
}

func (r *Reach) fill(s walk.Span) {
	if !s.Found {
		return
	}
	r.Found, r.Cut = true, s.Cut
	r.Nearest, r.Farthest = mm(s.Near), mm(s.Far)
	r.NearestAt = orb.Point{mm(s.NearAt[0]), mm(s.NearAt[1])}
	r.FarthestAt = orb.Point{mm(s.FarAt[0]), mm(s.FarAt[1])}
}

// Field tells how far every point of the floor is from one start, by the shortest walk. It is good until its solver is given
// a plan with other obstacles.
type Field struct{ field *walk.Field }

// Field returns the distances from a start of p.
//
//   - Errors: one that says why the start cannot stand where it is; the context's when it is cancelled.
//   - Cost: one flood over all of the floor.
func (s *Solver) Field(ctx context.Context, p *plan.Plan, start string) (*Field, error) {
	if err := s.Mesh(ctx, p); err != nil {
		return nil, err
	}
	from, ok := p.Start(start)
	if !ok {
		return nil, fmt.Errorf("study: the plan has no start %s", start)
	}
	f := s.scene.begin(from.At)
	if !f.ok {
		return nil, fmt.Errorf("study: start %s %s", start, f.text)
	}
	field, err := s.scene.walk.Field(ctx, f.at)
	if err != nil {
		return nil, err
	}
	return &Field{field}, nil
}

// At returns the distance of p from the start in mm, and false where no walk leads. On a wall the nearer side counts.
func (f *Field) At(p exact.Pt) (float64, bool) {
	far, ok := f.field.At(p)
	return mm(far), ok
}

// Contour is a piece of the line on which the distance from the start is Level.
type Contour struct {
	Level float64        // mm
	Line  orb.LineString // mm
}

// flatness is how far the chords of a contour may stray from its arcs, in grid units: 1 mm.
const flatness = 1 * exact.PerMM

// Contours returns the lines on which the distance is a multiple of step, which is in mm and more than 0, in pieces. The points
// of a piece are exactly as far as its level, to measuring; its chords stray from the line by at most 1 mm.
func (f *Field) Contours(ctx context.Context, step float64) ([]Contour, error) {
	parts, err := pulse.Split(ctx, f.field.Triangles(), func(ctx context.Context, lo, hi int) (list []Contour, err error) {
		var room orb.LineString // what the lines are cut from
		err = f.field.ContoursIn(ctx, lo, hi, step*exact.PerMM, flatness, func(level float64, line [][2]float64) {
			if len(room) < len(line) {
				room = make(orb.LineString, max(len(line), 1<<12))
			}
			c := Contour{Level: mm(level), Line: room[:len(line):len(line)]}
			room = room[len(line):]
			for i, p := range line {
				c.Line[i] = orb.Point{mm(p[0]), mm(p[1])}
			}
			list = append(list, c)
		})
		return list, err
	})
	return slices.Concat(parts...), err
}
