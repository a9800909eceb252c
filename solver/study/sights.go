package study

import (
	"context"
	"math"

	"github.com/paulmach/orb"

	"enfilade/solver/exact"
	"enfilade/solver/plan"
	"enfilade/solver/pulse"
	"enfilade/solver/sight"
)

// Sights returns what each observer sees, in the plane of its own eye.
//
// It ignores cancellation once the mesh is ready: it is the stage that must keep up with a drag.
func (s *Solver) Sights(ctx context.Context, p *plan.Plan) ([]Sight, error) {
	if err := s.Mesh(ctx, p); err != nil {
		return nil, err
	}
	out := make([]Sight, 0, p.NumObservers())
	for _, o := range p.Observers() {
		out = append(out, s.scene.observed(p, o))
	}
	return out, nil
}

// SeenFrom returns the places that see each target, in the plane of the walker's eye.
func (s *Solver) SeenFrom(ctx context.Context, p *plan.Plan) ([]Sight, error) {
	if err := s.Mesh(ctx, p); err != nil {
		return nil, err
	}
	out := make([]Sight, 0, p.NumTargets())
	for i, t := range p.Targets() {
		if err := pulse.Tell(ctx, float64(i)/float64(p.NumTargets())); err != nil {
			return nil, err
		}
		e, err := s.scene.seenFrom(ctx, t, p.Walker())
		if err != nil {
			return nil, err
		}
		out = append(out, e)
	}
	return out, nil
}

// seenFrom returns the places that see one target.
func (sc *scene) seenFrom(ctx context.Context, t plan.Target, w plan.Walker) (Sight, error) {
	e := Sight{Item: plan.Ref{Kind: plan.KindTarget, ID: t.ID}, Name: t.Name, At: pointMM(targetPoint(t)), Eye: mm(w.Eye)}
	k, err := sc.lookFor(ctx, sc.plain, sc.sight, t, w, true)
	e.Asked = k.asked
	switch {
	case err != nil:
		return e, err
	case k.fault != "":
		e.Problem = k.fault
	case k.view != nil && (k.asked.Face || k.lim.Near != nil):
		e.At = pointMM(k.at)
		e.fill(k.view.on.Outline(k.view.pieces, k.at, w.Eye))
	default:
		clip := k.clip
		clip.Range = k.lim.Far
		sc.measure(&e, k.at, w.Eye, clip)
	}
	return e, nil
}

// observed returns what one observer sees.
func (sc *scene) observed(p *plan.Plan, o plan.Observer) Sight {
	e := Sight{Item: plan.Ref{Kind: plan.KindObserver, ID: o.ID}, Name: o.Name, At: pointMM(o.At), Eye: mm(o.Eye)}
	f := sc.stand(o.At, sc.plain.sighted(o.Eye))
	if !f.ok {
		e.Problem = f.text
		return e
	}
	clip := sight.View(o.Heading, o.View)
	if o.Range > 0 && !sc.reachesAll(f.at, o.Range) {
		if !legalRange(f.at, o.Range) {
			e.Problem = "has a range that leads beyond the legal 50 km; shorten it, or leave it out for no limit"
			return e
		}
		clip.Range = sight.RangePolygon(f.at, max(o.Range, minRange))
	}
	sc.measure(&e, f.at, o.Eye, clip)
	if e.Problem != "" {
		return e
	}
	for _, t := range p.Targets() {
		if sc.seenBy(t, f.at, o.Eye, clip) {
			e.TargetsSeen = append(e.TargetsSeen, t.ID)
		}
	}
	return e
}

// minRange is the shortest range that has a polygon, in grid units.
const minRange = 16

// reachesAll reports whether the range ends beyond every corner of the mesh.
func (sc *scene) reachesAll(eye exact.Pt, r int32) bool {
	lo, hi := sc.plain.mesh.Box()
	for _, c := range [4]exact.Pt{lo, {X: hi.X, Y: lo.Y}, hi, {X: lo.X, Y: hi.Y}} {
		if exact.Dist2(eye, c) >= int64(r)*int64(r) {
			return false
		}
	}
	return true
}

func legalRange(eye exact.Pt, r int32) bool {
	most := max(eye.X, -eye.X, eye.Y, -eye.Y)
	return int64(most)+int64(r) < exact.Limit
}

// measure fills in the region seen from eye.
func (sc *scene) measure(e *Sight, eye exact.Pt, height int32, clip sight.Clip) {
	e.At = pointMM(eye)
	r, err := sc.sight.Clipped(eye, height, clip)
	if err != nil {
		e.Problem = "sees nothing: it stands on a wall and looks into it; turn it round"
		return
	}
	l := r.Lengths()
	e.border(r.Area(), l)
	e.Boundary, e.Kinds = ringOf(r)
}

// fill fills in a region of several rings, the largest part first.
func (e *Sight) fill(rings []sight.Region) {
	e.border(sight.Measure(rings))
	for i := range rings {
		ring, kinds := ringOf(&rings[i])
		if i == 0 {
			e.Boundary, e.Kinds = ring, kinds
		} else {
			e.More = append(e.More, Border{ring, kinds})
		}
	}
}

// border fills in the area and the length of the border, given in grid units.
func (e *Sight) border(area float64, l [3]float64) {
	e.Area = area / perM2
	e.Wall, e.Occluding, e.Clip = l[sight.Wall]/perM, l[sight.Occluding]/perM, l[sight.ClipSide]/perM
	e.Perimeter = e.Wall + e.Occluding + e.Clip
}

// ringOf returns a ring in mm, and what its border is.
func ringOf(r *sight.Region) (orb.Ring, []EdgeKind) {
	ring, of := make(orb.Ring, r.Len()), make([]EdgeKind, r.Len())
	for i := range r.Len() {
		x, y := r.Point(i)
		ring[i] = orb.Point{mm(x), mm(y)}
		of[i] = kinds[r.Kind(i)]
	}
	return ring, of
}

var kinds = [...]EdgeKind{sight.Wall: EdgeWall, sight.Occluding: EdgeOccluding, sight.ClipSide: EdgeClip}

// targetPoint returns the point at which a target is looked for: the middle of its face, to the grid, when it has one.
func targetPoint(t plan.Target) exact.Pt {
	if t.Face == nil {
		return t.At
	}
	a, b := t.Face[0], t.Face[1]
	return exact.Pt{X: half(a.X, b.X), Y: half(a.Y, b.Y)}
}

// half returns the middle of a and b, halves rounded away from zero.
func half(a, b int32) int32 { return int32(math.Round((float64(a) + float64(b)) / 2)) }
