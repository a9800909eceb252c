package paint

import (
	"strconv"

	"enfilade/assets"
	"enfilade/solver/exact"
	"enfilade/solver/plan"
	"enfilade/solver/study"
)

// Sizes of routes, in px at 100 %.
const (
	routeLine     = 1.3
	routeChosen   = 2.2 // of a selected route, or one that is being drawn
	waypointSize  = 3.4 // the dot's radius
	waypointShift = 7   // from the dot to its number
	routeStrength = 0.7
	routeDash     = 6 // from a closed leg on
	routeGap      = 4
	routeBar      = 8 // half the bar where a closed leg begins
)

// routes draws every route as it is walked from its start over its waypoints to its target, with a numbered dot on each
// waypoint; from a leg on that is closed it is dashed. While its walk is not known yet, its legs are straight. A selected route,
// and one that is being drawn, is stronger and lies on a casing.
func (p *pen) routes() {
	for _, r := range p.s.Plan.Routes() {
		ref := plan.Ref{Kind: plan.KindRoute, ID: r.ID}
		if !r.Hidden {
			p.route(r, p.s.selected(ref) || p.s.dragged(ref) || p.s.Hover == ref)
		}
	}
}

func (p *pen) route(r plan.Route, strong bool) {
	w := p.s.walked(r)
	switch {
	case w == nil:
		p.routeLine(p.rest(r, nil), strong, false)
	case len(w.Points) == 0: // nothing of it could be walked
		p.routeLine(p.rest(r, nil), strong, true)
	default:
		line := p.work.route[:0]
		for _, q := range w.Points {
			line = append(line, p.mm(q))
		}
		p.work.route = line
		if w.Closed > 0 {
			p.closedLeg(r, w, strong)
			line = p.work.route[:len(w.Points)]
		}
		p.routeLine(line, strong, false)
	}
	for i, q := range r.Via.All() {
		p.waypoint(q, i+1)
	}
}

// walked returns what is known of a route's walk, nil for nothing. It may be of the drawing a moment ago.
func (s *Scene) walked(r plan.Route) *study.Route {
	if s.Result == nil {
		return nil
	}
	for i := range s.Result.Routes {
		if w := &s.Result.Routes[i]; w.ID == r.ID && w.From == r.From && w.To == r.To {
			return w
		}
	}
	return nil
}

// rest appends to the line the points of a route that follow on its first legs, straight from one to the next: all of it
// without a walk, else what lies behind the legs that were walked.
func (p *pen) rest(r plan.Route, w *study.Route) []place {
	line, from := p.work.route[:0], 0
	if w != nil {
		line, from = p.work.route, min(len(w.Legs), r.Via.Len())
	} else if s, ok := p.s.Plan.Start(r.From); ok {
		line = append(line, p.point(s.At))
	}
	for i, q := range r.Via.All() {
		if i >= from {
			line = append(line, p.point(q))
		}
	}
	if t, ok := p.s.Plan.Target(r.To); ok {
		line = append(line, p.targetPlace(t))
	}
	p.work.route = line
	return line
}

// routeLine strokes a piece of a route.
func (p *pen) routeLine(line []place, strong, dashed bool) {
	if len(line) < 2 {
		return
	}
	style, red := StrokeStyle{Width: routeLine, Join: RoundJoin, Cap: RoundCap}, at(p.theme.Red, routeStrength)
	if strong {
		style.Width, red = routeChosen, p.theme.Red
	}
	period := 0.0
	if dashed {
		style.On, style.Off, style.Cap = routeDash, routeGap, Butt
		period = (routeDash + routeGap) * p.k
	}
	m := p.begin()
	p.addLine(p.frame, line, period)
	if strong {
		p.op(m, p.stroked(p.theme.Floor, StrokeStyle{Width: casing, Join: RoundJoin}))
		p.again(p.stroked(red, style))
		return
	}
	p.op(m, p.stroked(red, style))
}

// closedLeg draws what follows on the last leg that can be walked: a bar across, and the rest dashed.
func (p *pen) closedLeg(r plan.Route, w *study.Route, strong bool) {
	from, to, ok := p.closedEnds(r, w)
	if !ok {
		return
	}
	line := p.rest(r, w)[len(w.Points)-1:]
	p.routeLine(line, strong, true)
	u, _ := vec(from).towards(vec(to))
	bar := u.left().times(routeBar * p.k)
	m := p.begin()
	p.segment(place{from.x - bar.x, from.y - bar.y}, place{from.x + bar.x, from.y + bar.y})
	p.op(m, p.stroked(p.theme.Red, StrokeStyle{Width: 2.2}))
}

// closedEnds returns where a route's walk stops before a closed leg, a little way off where it stands, and where that leg leads.
func (p *pen) closedEnds(r plan.Route, w *study.Route) (from, to place, ok bool) {
	switch i := w.Closed - 1; {
	case i < 0 || len(w.Points) == 0:
		return from, to, false
	case i < r.Via.Len():
		to = p.point(r.Via.At(i))
	default:
		t, found := p.s.Plan.Target(r.To)
		if !found {
			return from, to, false
		}
		to = p.targetPlace(t)
	}
	from = p.mm(w.Points[len(w.Points)-1])
	u, length := vec(from).towards(vec(to))
	d := min(18*p.k, length/2)
	return place{from.x + u.x*d, from.y + u.y*d}, to, true
}

// placeRoutes says at each closed leg what closes it; what is wrong with a waypoint is said where that stands.
func (p *pen) placeRoutes() {
	look := p.walkFigure(labelText, assets.Semibold)
	for _, r := range p.s.Plan.Routes() {
		w := p.s.walked(r)
		if r.Hidden || w == nil || w.Closed == 0 || w.Problem != "" {
			continue
		}
		at, to, ok := p.closedEnds(r, w)
		if !ok || !p.shows(at) {
			continue
		}
		from := p.say()
		p.words(w.Reason)
		t := p.said(from)
		p.settle(labelKey{rankFirstSight, r.ID}, t, look, p.around(at, ring8{side: 13, up: 13, down: 13, dx: 10, dUp: 8, dDown: 8},
			octant(to.y-at.y, at.x-to.x), t, look), true)
	}
}

// obstructRoutes keeps labels off the routes, their waypoints and the numbers of those.
func (p *pen) obstructRoutes() {
	for _, r := range p.s.Plan.Routes() {
		if r.Hidden {
			continue
		}
		if w := p.s.walked(r); w != nil {
			p.routed(w.Points)
			if at, to, ok := p.closedEnds(r, w); ok {
				p.routeLeg(at, to)
				p.taken(at, routeBar, routeBar)
			}
		}
		for _, q := range r.Via.All() {
			c := p.point(q)
			p.taken(c, waypointSize+1, waypointSize+1)
			p.taken(place{c.x + (waypointShift+3)*p.k, c.y - 7*p.k}, 5, 6)
		}
	}
}

// waypoint draws a dot with its number.
func (p *pen) waypoint(q exact.Pt, number int) {
	c := p.point(q)
	if !p.shows(c) {
		return
	}
	m := p.begin()
	p.disc(c, waypointSize*p.k)
	p.fill(m, p.theme.Floor)
	p.again(p.stroked(p.theme.Red, StrokeStyle{Width: 1.6}))
	from := p.say()
	p.Chars = strconv.AppendInt(p.Chars, int64(number), 10)
	look := textLook{size: figureText, weight: assets.Semibold, colour: p.theme.Red, halo: redHalo, onGround: !p.onFloor(c)}
	p.put(p.said(from), c.x+waypointShift*p.k, c.y-3*p.k, look)
}
