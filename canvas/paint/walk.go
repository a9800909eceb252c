package paint

import (
	"image/color"
	"math"

	"github.com/paulmach/orb"

	"enfilade/assets"
	"enfilade/solver/study"
)

// approachOf returns what is known of the walk from a start to first sight of a target.
func (s *Scene) approachOf(start, target string) *study.Approach {
	if s.Result == nil || start == "" || target == "" {
		return nil
	}
	for i := range s.Result.Approaches {
		if a := &s.Result.Approaches[i]; a.Start == start && a.Target == target {
			return a
		}
	}
	return nil
}

// walkPath adds a walk as one line.
func (p *pen) walkPath(points []orb.Point, period float64) {
	line := p.work.ring[:0]
	for _, q := range points {
		line = append(line, p.mm(q))
	}
	p.work.ring = line
	p.addLine(p.frame, line, period)
}

// fullWalk draws the walk to the target itself, faint, and the sight line from first sight.
func (p *pen) fullWalk(a *study.Approach) {
	if a.HasFullWalk {
		m := p.begin()
		p.walkPath(a.FullPoints, 0)
		p.op(m, p.stroked(at(p.theme.Red, 0.55), StrokeStyle{Width: fullWalkLine, Join: RoundJoin}))
	}
}

// sight draws the dotted line from first sight to the target, on a thin casing that lifts it off the wash.
func (p *pen) sight(a *study.Approach) {
	target, ok := p.s.Plan.Target(a.Target)
	if !ok || a.Status == study.StatusNone || target.Hidden {
		return
	}
	const on, off = 2, 3
	from, to := p.mm(a.FirstSight), p.inView(a, target)
	m := p.begin()
	line := append(p.work.ring[:0], from, to)
	p.work.ring = line
	p.addLine(p.frame, line, (on+off)*p.k)
	p.op(m, p.stroked(at(p.theme.Floor, 0.6), StrokeStyle{Width: 3}))
	p.again(p.stroked(p.theme.Red, StrokeStyle{Width: sightLine, On: on, Off: off}))
}

// approach draws the walk to first sight with its casing and metre ticks.
func (p *pen) approach(a *study.Approach) {
	if a.Status == study.StatusNone {
		p.blocked(a)
		return
	}
	if len(a.Points) < 2 {
		return
	}
	m := p.begin()
	p.walkPath(a.Points, 0)
	p.op(m, p.stroked(p.theme.Floor, StrokeStyle{Width: casing, Join: RoundJoin}))
	p.again(p.stroked(p.theme.Red, StrokeStyle{Width: approachLine, Join: RoundJoin, Cap: RoundCap}))
	p.walkTicks(a.Points)
}

// otherApproach draws the approach from a start that is not chosen: thin, without ticks, sight line and figures.
func (p *pen) otherApproach(a *study.Approach) {
	if len(a.Points) < 2 || a.Status == study.StatusNone {
		return
	}
	m := p.begin()
	p.walkPath(a.Points, 0)
	p.op(m, p.stroked(at(p.theme.Red, 0.8), StrokeStyle{Width: otherLine, Join: RoundJoin}))
}

// tickStep returns the distance of the ticks along a walk in units: a metre or about as much, or so many times that by five
// and two in turn that they stay 9 px apart.
func (p *pen) tickStep(u unit) float64 {
	step := 1.0
	switch {
	case u.name == "ft":
		step = 2
	case u.mm < 1000:
		step = 1000 / u.mm
	}
	for f := 5.0; step*p.cam.Scale/p.k*u.mm < 9; f = 10 / f {
		step *= f
	}
	return step
}

// walkTicks draws a tick across the walk at every metre, a long one at each fifth.
func (p *pen) walkTicks(points []orb.Point) {
	step := p.tickStep(unitOf(p.s.Plan)) * unitOf(p.s.Plan).mm
	m := p.begin()
	eachTickOf(points, step, func(i int, q orb.Point, u vec) {
		half := tickLength / 2.0
		if i%5 == 0 {
			half = fifthLength / 2.0
		}
		half *= p.k
		c := p.mm(q)
		if p.frame.holds(c.x, c.y) {
			p.move(c.x+u.y*half, c.y+u.x*half) // the plan's y points up: (u.y, u.x) is across (u.x, -u.y)
			p.line(c.x-u.y*half, c.y-u.x*half)
		}
	})
	p.op(m, p.stroked(p.theme.Red, StrokeStyle{Width: tickLine}))
}

// eachTickOf calls f with each tick along a walk, counted from 1, its place in mm and the walk's direction there.
func eachTickOf(points []orb.Point, step float64, f func(i int, q orb.Point, u vec)) {
	i, run := 1, 0.0
	for j := 1; j < len(points); j++ {
		a, b := points[j-1], points[j]
		u, length := vec{a[0], a[1]}.towards(vec{b[0], b[1]})
		for ; float64(i)*step <= run+length; i++ {
			t := float64(i)*step - run
			f(i, orb.Point{a[0] + u.x*t, a[1] + u.y*t}, u)
		}
		run += length
	}
}

// blocked draws a walk that leads nowhere: as far as it is known, a bar across it, and the rest to the target dashed.
func (p *pen) blocked(a *study.Approach) {
	from, to, ok := p.blockedEnds(a)
	if !ok {
		return
	}
	if len(a.Points) > 1 {
		m := p.begin()
		p.walkPath(a.Points, 0)
		p.op(m, p.stroked(p.theme.Floor, StrokeStyle{Width: casing, Join: RoundJoin}))
		p.again(p.stroked(p.theme.Red, StrokeStyle{Width: approachLine, Join: RoundJoin}))
	}
	const on, off = 6, 4
	m := p.begin()
	line := append(p.work.ring[:0], from, to)
	p.work.ring = line
	p.addLine(p.frame, line, (on+off)*p.k)
	p.op(m, p.stroked(at(p.theme.Red, 0.55), StrokeStyle{Width: fullWalkLine, On: on, Off: off}))
	u, _ := vec(from).towards(vec(to))
	bar := u.left().times(9 * p.k)
	m = p.begin()
	p.segment(place{from.x - bar.x, from.y - bar.y}, place{from.x + bar.x, from.y + bar.y})
	p.op(m, p.stroked(p.theme.Red, StrokeStyle{Width: 2.2}))
}

// blockedEnds returns where a walk that leads nowhere stops, and its target.
func (p *pen) blockedEnds(a *study.Approach) (from, to place, ok bool) {
	start, ok1 := p.s.Plan.Start(a.Start)
	target, ok2 := p.s.Plan.Target(a.Target)
	if !ok1 || !ok2 || start.Hidden || target.Hidden {
		return from, to, false
	}
	to = p.targetPlace(target)
	if n := len(a.Points); n > 0 {
		return p.mm(a.Points[n-1]), to, true
	}
	// Nothing of the walk is known: the bar stands a little way off the start.
	from = p.point(start.At)
	u, length := vec(from).towards(vec(to))
	d := min(18*p.k, length/2)
	return place{from.x + u.x*d, from.y + u.y*d}, to, true
}

// firstSight draws the mark where the target comes into sight: the half that faces the target is filled.
func (p *pen) firstSight(at, target place, radius, halo float64, c color.NRGBA) {
	if !p.shows(at) {
		return
	}
	k := p.k
	m := p.begin()
	p.disc(at, halo*k)
	p.fill(m, p.theme.Floor)
	u, _ := vec(at).towards(vec(target))
	m = p.begin()
	p.arcOf(at, radius*k, math.Atan2(u.y, u.x)-math.Pi/2, math.Pi)
	p.close()
	p.fill(m, c)
	m = p.begin()
	p.disc(at, radius*k)
	p.op(m, p.stroked(c, StrokeStyle{Width: 1.8}))
}

// walkFigure is how the figures along walks are written.
func (p *pen) walkFigure(size float64, weight assets.Weight) textLook {
	return textLook{size: size, weight: weight, colour: p.theme.Red, halo: redHalo}
}
