package paint

import (
	"enfilade/assets"
	"enfilade/solver/study"
)

// gap is the tightest spot of a walk: two points that a body has to pass between, and how far apart they are, in mm.
type gap struct {
	a, b  place
	width float64
}

// tightest returns the tightest spot of the chosen walk; ok is false when nothing narrows it or it is not in the picture.
// Where the walker itself is too wide for it there is no walk, but there still is a spot to look at.
func (p *pen) tightest(a *study.Approach) (g gap, ok bool) {
	switch {
	case a == nil:
		return g, false
	case a.HasFullClearWidth:
		g.width = a.FullClearWidth
	case a.HasClearWidth:
		g.width = a.ClearWidth
	}
	if a.Tightest[0] == a.Tightest[1] {
		return g, false
	}
	g.a, g.b = p.mm(a.Tightest[0]), p.mm(a.Tightest[1])
	return g, p.shows(g.a) && p.shows(g.b)
}

// half returns the middle of the gap, the direction across it and half its width, in device pixels.
func (g gap) half() (mid place, u vec, half float64) {
	u, length := vec(g.a).towards(vec(g.b))
	return place{(g.a.x + g.b.x) / 2, (g.a.y + g.b.y) / 2}, u, length / 2
}

// tightMark draws two ticks that face each other across the tightest spot, from either side to a third of the way at most.
func (p *pen) tightMark(a *study.Approach) {
	g, ok := p.tightest(a)
	if !ok {
		return
	}
	_, u, half := g.half()
	d := min(gapTick*p.k, 2*half/3)
	m := p.begin()
	p.move(g.a.x, g.a.y)
	p.line(g.a.x+u.x*d, g.a.y+u.y*d)
	p.move(g.b.x, g.b.y)
	p.line(g.b.x-u.x*d, g.b.y-u.y*d)
	p.op(m, p.stroked(p.theme.Floor, StrokeStyle{Width: gapLine + 2.4}))
	p.again(p.stroked(p.theme.Ink, StrokeStyle{Width: gapLine}))
}

// obstructGap keeps labels off the ticks.
func (p *pen) obstructGap(a *study.Approach) {
	if g, ok := p.tightest(a); ok {
		p.routeLeg(g.a, g.b)
	}
}

// placeGap puts the width of the tightest spot beside it, on the way before or behind, and beside the walk that passes there.
func (p *pen) placeGap(a *study.Approach) {
	g, ok := p.tightest(a)
	if !ok {
		return
	}
	look := textLook{size: figureText, weight: assets.Semibold, colour: p.theme.Ink, halo: labelHalo}
	from := p.say()
	p.clearWidth(g.width, unitOf(p.s.Plan))
	t := p.said(from)
	w := p.width(t, look)
	mid, u, _ := g.half()
	n := u.left()
	if n.y < 0 || n.y == 0 && n.x < 0 { // below the gap first, or to its right
		n = n.times(-1)
	}
	spots := p.work.spots[:0]
	for _, off := range [...]float64{4, 14, 26} {
		for _, shift := range [...]float64{0, 12, -12, 24, -24} {
			for _, side := range [...]float64{1, -1} {
				c := n.times(side * off * p.k).plus(u.times(shift * p.k))
				spots = append(spots, p.beside(place{mid.x + c.x, mid.y + c.y}, n.times(side), w, look))
			}
		}
	}
	p.work.spots = spots
	p.settle(labelKey{rankFigure, "gap"}, t, look, spots, false)
}

// clearWidth appends a clear width in mm with its unit. A door is told to the centimetre, so it has a decimal more than a
// distance where that is coarser.
func (l *List) clearWidth(mm float64, u unit) {
	decimals := u.decimals
	if u.mm > 100 {
		decimals++
	}
	l.number(mm/u.mm, decimals)
	l.words(" ")
	l.words(u.name)
}
