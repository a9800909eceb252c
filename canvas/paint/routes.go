package paint

import (
	"strconv"

	"enfilade/assets"
	"enfilade/solver/exact"
	"enfilade/solver/plan"
)

// Sizes of routes, in px at 100 %.
const (
	routeLine     = 1.3
	routeChosen   = 2.2 // of a selected route, or one that is being drawn
	waypointSize  = 3.4 // the dot's radius
	waypointShift = 7   // from the dot to its number
	routeStrength = 0.7
)

// routes draws every route as straight legs from its start over its waypoints to its target, with a numbered dot on each
// waypoint. A selected route, and one that is being drawn, is stronger and lies on a casing.
func (p *pen) routes() {
	for _, r := range p.s.Plan.Routes() {
		ref := plan.Ref{Kind: plan.KindRoute, ID: r.ID}
		if r.Hidden {
			continue
		}
		p.route(r, p.s.selected(ref) || p.s.dragged(ref) || p.s.Hover == ref)
	}
}

func (p *pen) route(r plan.Route, strong bool) {
	line := p.work.route[:0]
	add := func(c place) { line = append(line, c) }
	if s, ok := p.s.Plan.Start(r.From); ok {
		add(p.point(s.At))
	}
	for _, q := range r.Via.All() {
		add(p.point(q))
	}
	if t, ok := p.s.Plan.Target(r.To); ok {
		add(p.targetPlace(t))
	}
	p.work.route = line
	width, red := float32(routeLine), at(p.theme.Red, routeStrength)
	if strong {
		width, red = routeChosen, p.theme.Red
	}
	if len(line) > 1 {
		m := p.begin()
		p.addLine(p.frame, line, 0)
		if strong {
			p.op(m, p.stroked(p.theme.Floor, StrokeStyle{Width: casing, Join: RoundJoin}))
			p.again(p.stroked(red, StrokeStyle{Width: width, Join: RoundJoin, Cap: RoundCap}))
		} else {
			p.op(m, p.stroked(red, StrokeStyle{Width: width, Join: RoundJoin, Cap: RoundCap}))
		}
	}
	for i, q := range r.Via.All() {
		p.waypoint(q, i+1)
	}
}

// obstructRoutes keeps labels off the routes' waypoints and their numbers.
func (p *pen) obstructRoutes() {
	for _, r := range p.s.Plan.Routes() {
		if r.Hidden {
			continue
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
