package paint

import (
	"cmp"
	"math"
	"slices"
	"strconv"

	"github.com/paulmach/orb"

	"enfilade/assets"
	"enfilade/solver/study"
)

// Lines of equal walking distance: thin and red, a little stronger at each fifth, as the ticks of a walk are.
const (
	contourLine   = 0.9
	contourFifth  = 1.3
	contourFaint  = 0.5 // strength
	contourStrong = 0.75
	contourApart  = 9   // px between two lines at least; with less only some of them are drawn
	contourLabels = 44  // px between two lines that are both labelled at least
	contourCell   = 320 // px, about
)

// contourEvery returns which lines are drawn: each so many, by five and two in turn, that they stay so many px apart.
func (p *pen) contourEvery(apart float64) int {
	every := 1
	for f := 5; p.s.ContourStep*p.cam.Scale/p.k*float64(every) < apart && every < 1e9; f = 10 / f {
		every *= f
	}
	return every
}

// contourNumber returns which multiple of the step a line is of.
func (s *Scene) contourNumber(c *study.Contour) int { return int(math.Round(c.Level / s.ContourStep)) }

// contours draws the lines of equal walking distance.
func (p *pen) contours() {
	if len(p.s.Contours) == 0 {
		return
	}
	every := p.contourEvery(contourApart)
	p.contourFamily(every, false, contourFaint, contourLine)
	p.contourFamily(every, true, contourStrong, contourFifth)
}

// contourFamily draws each fifth of the drawn lines, or the others.
func (p *pen) contourFamily(every int, fifth bool, strength, width float64) {
	if p.s.ContoursOld {
		strength /= 2
	}
	m := p.begin()
	for i := range p.s.Contours {
		c := &p.s.Contours[i]
		if n := p.s.contourNumber(c); n%every == 0 && (n/every%5 == 0) == fifth {
			p.contourPath(c.Line)
		}
	}
	p.op(m, p.stroked(at(p.theme.Red, strength), StrokeStyle{Width: float32(width), Join: RoundJoin}))
}

// contourPath adds a line without the points that lie within a pixel of the one before.
func (p *pen) contourPath(line orb.LineString) {
	ring := p.work.ring[:0]
	for i, q := range line {
		c := p.mm(q)
		if n := len(ring); n > 0 && i < len(line)-1 && math.Hypot(c.x-ring[n-1].x, c.y-ring[n-1].y) < 1 {
			continue
		}
		ring = append(ring, c)
	}
	p.work.ring = ring
	p.addLine(p.frame, ring, 0)
}

// contourMarks are the places at which lines are labelled: of each labelled line one in each cell of a grid on the plan, so that
// labels stay where they are while the picture pans.
type contourMarks struct {
	of    *study.Contour // the first of the lines
	every int
	cell  float64 // mm
	marks []contourMark
}

type contourMark struct {
	at    orb.Point
	level float64
	id    string
}

// findContourMarks brings the places in the list's memory up to date.
func (p *pen) findContourMarks() []contourMark {
	if len(p.s.Contours) == 0 {
		return nil
	}
	cell := math.Exp2(math.Round(math.Log2(contourCell * p.k / p.cam.Scale)))
	every := p.contourEvery(contourLabels)
	m := &p.memory.contours
	if m.of == &p.s.Contours[0] && m.every == every && m.cell == cell {
		return m.marks
	}
	type key struct{ n, x, y int }
	longest := map[key]contourMark{}
	reach := map[key]float64{}
	for i := range p.s.Contours {
		c := &p.s.Contours[i]
		n := p.s.contourNumber(c)
		if n%every != 0 || len(c.Line) < 2 {
			continue
		}
		mid := middleOf(c.Line)
		k := key{n, int(math.Floor(mid[0] / cell)), int(math.Floor(mid[1] / cell))}
		if l := lengthOf(c.Line); l > reach[k] {
			reach[k] = l
			longest[k] = contourMark{at: mid, level: c.Level}
		}
	}
	keys := make([]key, 0, len(longest))
	for k := range longest {
		keys = append(keys, k)
	}
	slices.SortFunc(keys, func(a, b key) int { return cmp.Or(a.n-b.n, a.x-b.x, a.y-b.y) })
	*m = contourMarks{of: &p.s.Contours[0], every: every, cell: cell}
	for _, k := range keys {
		c := longest[k]
		c.id = strconv.Itoa(k.n) + " " + strconv.Itoa(k.x) + " " + strconv.Itoa(k.y)
		m.marks = append(m.marks, c)
	}
	return m.marks
}

// placeContours puts the distance on the lines, where there is room.
func (p *pen) placeContours() {
	u := unitOf(p.s.Plan)
	decimals := 0
	for step := p.s.ContourStep / u.mm; decimals < 2 && math.Abs(step-math.Round(step)) > 1e-6; decimals++ {
		step *= 10
	}
	look := p.walkFigure(tickText, assets.Medium)
	for _, mark := range p.findContourMarks() {
		c := p.mm(mark.at)
		if !p.frame.holds(c.x, c.y) {
			continue
		}
		from := p.say()
		p.number(mark.level/u.mm, decimals)
		p.words(" ")
		p.words(u.name)
		t := p.said(from)
		spots := append(p.work.spots[:0], place{c.x - p.width(t, look)/2, c.y + 0.36*look.size*p.k})
		p.work.spots = spots
		p.settle(labelKey{rankContour, mark.id}, t, look, spots, false)
	}
}

// lengthOf returns the length of a line.
func lengthOf(line orb.LineString) (sum float64) {
	for i := 1; i < len(line); i++ {
		sum += math.Hypot(line[i][0]-line[i-1][0], line[i][1]-line[i-1][1])
	}
	return sum
}

// middleOf returns the point half way along a line.
func middleOf(line orb.LineString) orb.Point {
	half := lengthOf(line) / 2
	for i := 1; i < len(line); i++ {
		a, b := line[i-1], line[i]
		l := math.Hypot(b[0]-a[0], b[1]-a[1])
		if half <= l && l > 0 {
			return orb.Point{a[0] + (b[0]-a[0])*half/l, a[1] + (b[1]-a[1])*half/l}
		}
		half -= l
	}
	return line[len(line)-1]
}
