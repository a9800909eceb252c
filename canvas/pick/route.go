package pick

import (
	"enfilade/canvas/view"
	"enfilade/solver/exact"
	"enfilade/solver/plan"
)

// Walks tells where the legs of the route with an id are walked, as far as that is known: those from its start on, in order.
type Walks func(route string) [][]exact.Pt

// legLeast is how long a leg must be, in px at 100 %, to have a handle at its middle.
const legLeast = 44

// RoutePoints returns the points of a route: its start, where that is in the plan, its waypoints, and its target.
func RoutePoints(p *plan.Plan, r plan.Route) []exact.Pt {
	var out []exact.Pt
	if s, ok := p.Start(r.From); ok {
		out = append(out, s.At)
	}
	out = append(out, r.Via.Points()...)
	if t, ok := p.Target(r.To); ok {
		out = append(out, TargetAt(t))
	}
	return out
}

// Legs returns the legs of a route, each to the next of its waypoints and the last to its target: as they are walked, or straight
// where no walk is known. A leg whose start is not in the plan is empty.
func Legs(p *plan.Plan, r plan.Route, walks ...Walks) [][]exact.Pt {
	points, first := RoutePoints(p, r), 0
	if _, ok := p.Start(r.From); !ok {
		first = 1
	}
	legs := make([][]exact.Pt, first, len(points)+1)
	for i := 1; i < len(points); i++ {
		legs = append(legs, points[i-1:i+1])
	}
	for _, w := range walks {
		if walked := w(r.ID); len(walked) <= len(legs) {
			copy(legs, walked)
		}
	}
	return legs
}

// LegAt returns which leg of a route lies nearest to the pixel place (x, y).
func LegAt(p *plan.Plan, cam view.Camera, x, y float64, r plan.Route, walks ...Walks) int {
	s, at, best := pointer(cam, x, y), 0, -1.0
	for i, leg := range Legs(p, r, walks...) {
		if d := s.outlineDist(plan.ChainOf(leg...), false); len(leg) > 1 && (best < 0 || d < best) {
			at, best = i, d
		}
	}
	return at
}

// path finds routes by their legs.
func path(p *plan.Plan, cam view.Camera, s spot, skip map[plan.Ref]bool, walks []Walks) (Hit, bool) {
	n := nearest{skip: skip}
	reach := units(cam, lineReach)
	for _, r := range p.Routes() {
		if r.Hidden {
			continue
		}
		for _, leg := range Legs(p, r, walks...) {
			n.offer(s.outlineDist(plan.ChainOf(leg...), false), reach, Hit{Ref: plan.Ref{Kind: plan.KindRoute, ID: r.ID}})
		}
	}
	return n.hit, n.ok
}

// routeKnobs are the handles half way along the legs of a route.
func routeKnobs(p *plan.Plan, cam view.Camera, r plan.Route, walks []Walks) (out []Knob) {
	for i, leg := range Legs(p, r, walks...) {
		all := 0.0
		for j := 1; j < len(leg); j++ {
			all += exact.Dist(leg[j-1], leg[j])
		}
		if all/exact.PerMM*cam.Scale < legLeast*cam.K {
			continue
		}
		x, y := cam.Pixel(along(leg, all/2))
		out = append(out, Knob{LegMiddle, i, x, y})
	}
	return out
}

// along returns the grid point at a distance along a line of at least two points.
func along(line []exact.Pt, far float64) exact.Pt {
	for j := 1; ; j++ {
		a, b := line[j-1], line[j]
		d := exact.Dist(a, b)
		if far > d && j < len(line)-1 {
			far -= d
			continue
		}
		if d == 0 {
			return a
		}
		t := min(far/d, 1)
		return exact.Pt{X: a.X + int32(float64(b.X-a.X)*t), Y: a.Y + int32(float64(b.Y-a.Y)*t)}
	}
}
