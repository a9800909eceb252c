package paint

import (
	"math"

	"github.com/paulmach/orb"

	"enfilade/solver/plan"
	"enfilade/solver/study"
)

// box is a rectangle of the picture, in device pixels.
type box struct{ x0, y0, x1, y1 float64 }

// overlap returns the area two boxes share.
func (a box) overlap(b box) float64 {
	w, h := min(a.x1, b.x1)-max(a.x0, b.x0), min(a.y1, b.y1)-max(a.y0, b.y0)
	if w <= 0 || h <= 0 {
		return 0
	}
	return w * h
}

// leg is one straight piece of a route.
type leg struct{ a, b place }

// label is a line of text that has found its place.
type label struct {
	text text
	at   place // left end of its base line
	look textLook
	room bool // a room's name, drawn before the walks
}

// rank orders labels: who places first. It also names them in the list's memory.
type rank uint8

const (
	rankProblem rank = iota
	rankFirstSight
	rankStart
	rankTarget
	rankLetter
	rankFigure
	rankRoom
	rankTick
	rankContour
)

type labelKey struct {
	rank rank
	id   string
}

// memory is what a list keeps from frame to frame.
type memory struct {
	places map[labelKey]int8 // the place a label had, so that it keeps it

	contours contourMarks

	drawing *Drawing // of the plan, when the scene brought none
	held    *Drawing // of what is being dragged
	heldOf  heldKey

	heldRefs map[plan.Ref]bool // of a drag of dragged in the plan with the obstacles heldIn
	heldIn   *plan.Obstacles
	dragged  []plan.Ref

	chosen manyChosen
}

// work is room that a list reuses.
type work struct {
	ring, route, floor []place
	cut                [2][]place
	cuts               []float64
	boxes              []box
	legs               []leg // routes
	edges              []leg // the border of the chosen region, which figures and names avoid if they can
	labels             []label
	spots              []place
}

// taken adds a glyph's box about a place, half w by half h px at 100 %.
func (p *pen) taken(c place, halfW, halfH float64) {
	w, h := halfW*p.k, halfH*p.k
	b := box{c.x - w, c.y - h, c.x + w, c.y + h}
	if b.overlap(p.view()) > 0 {
		p.work.boxes = append(p.work.boxes, b)
	}
}

// view is the part of the picture that labels may stand in.
func (p *pen) view() box {
	return box{float64(p.Left), float64(p.Left), float64(p.W), float64(p.H)}
}

// routed adds a walk to what labels keep off.
func (p *pen) routed(points []orb.Point) {
	for i := 1; i < len(points); i++ {
		p.routeLeg(p.mm(points[i-1]), p.mm(points[i]))
	}
}

func (p *pen) routeLeg(a, b place) {
	f := p.frame
	if _, _, ok := f.segment(a.x, a.y, b.x, b.y); ok {
		p.work.legs = append(p.work.legs, leg{a, b})
	}
}

// bordered adds the border of the chosen region.
func (p *pen) bordered(r *study.Sight) {
	p.borderedRing(r.Boundary)
	for i := range r.More {
		p.borderedRing(r.More[i].Ring)
	}
}

func (p *pen) borderedRing(ring orb.Ring) {
	for i, q := range ring {
		a, b := p.mm(ring[(i+len(ring)-1)%len(ring)]), p.mm(q)
		if _, _, ok := p.frame.segment(a.x, a.y, b.x, b.y); ok {
			p.work.edges = append(p.work.edges, leg{a, b})
		}
	}
}

// boxOf returns the box that a line of text takes, with a little air around it.
func (p *pen) boxOf(at place, width float64, look textLook) box {
	s := look.size * p.k
	air := max(1.5, look.halo-3) * p.k // a wide halo would cover what is nearer
	return box{at.x - air, at.y - 0.74*s - air, at.x + width + air, at.y + 0.2*s + air}
}

// cost says how bad a place is: 0 when the box touches no glyph, route, ink or earlier label and lies in the picture.
func (p *pen) cost(b box) float64 {
	area := (b.x1 - b.x0) * (b.y1 - b.y0)
	c := 0.0
	if in := b.overlap(p.view()); in < area-0.5 {
		c += 4 * (area - in)
	}
	for _, q := range p.work.boxes {
		c += 4 * b.overlap(q) // a hidden glyph is worse than a line across the drawing's ink
	}
	f := frame(b)
	for i := range p.work.legs {
		l := &p.work.legs[i]
		if t0, t1, ok := f.segment(l.a.x, l.a.y, l.b.x, l.b.y); ok {
			c += (t1-t0)*math.Hypot(l.b.x-l.a.x, l.b.y-l.a.y)*4*p.k + 1
		}
	}
	if p.inked(b) {
		c += 0.3 * area
	}
	return c
}

// inked reports whether the box touches ink of the drawing.
func (p *pen) inked(b box) bool {
	lo, hi := p.cam.MM(b.x0, b.y1), p.cam.MM(b.x1, b.y0)
	const units = 10 // grid units a mm
	in := orb.Bound{Min: orb.Point{lo[0] * units, lo[1] * units}, Max: orb.Point{hi[0] * units, hi[1] * units}}
	return p.drawing.ink.touches(in) || p.held != nil && p.held.ink.touches(in)
}

// settle gives a line of text the first of some spots, each the left end of its base line, at which it is free; the spot it
// had in the frame before comes first. When none is free it takes the least bad one if it must, and else is dropped.
// Figures and names also keep off the region's border where they can.
func (p *pen) settle(key labelKey, t text, look textLook, spots []place, must bool) {
	if t[0] == t[1] || len(spots) == 0 {
		return
	}
	w := p.width(t, look)
	best, bestCost := -1, math.Inf(1)
	if was, ok := p.memory.places[key]; ok && int(was) < len(spots) {
		best, bestCost = int(was), p.cost(p.boxOf(spots[was], w, look))
	}
	for i := 0; i < len(spots) && bestCost > 0; i++ {
		b := p.boxOf(spots[i], w, look)
		c := p.cost(b)
		if key.rank >= rankFigure && c == 0 && p.onEdge(b) {
			c = edgeCost
		}
		if c < bestCost {
			best, bestCost = i, c
		}
	}
	if bestCost > edgeCost && !must {
		delete(p.memory.places, key)
		return
	}
	if p.memory.places == nil {
		p.memory.places = map[labelKey]int8{}
	}
	p.memory.places[key] = int8(best)
	p.work.boxes = append(p.work.boxes, p.boxOf(spots[best], w, look))
	p.work.labels = append(p.work.labels, label{text: t, at: spots[best], look: look, room: key.rank == rankRoom})
}

// edgeCost is the cost of lying over the region's border and nothing else: less than that of any true collision that shows.
const edgeCost = 1e-3

// onEdge reports whether a box touches the border of the chosen region.
func (p *pen) onEdge(b box) bool {
	f := frame(b)
	for i := range p.work.edges {
		l := &p.work.edges[i]
		if _, _, ok := f.segment(l.a.x, l.a.y, l.b.x, l.b.y); ok {
			return true
		}
	}
	return false
}

// ring8 says how far from a glyph's middle its label stands at each of the eight places, in px at 100 %.
type ring8 struct {
	side     float64 // to the right or left: where the text begins or ends
	up, down float64 // above: the base line; below: the top of capitals
	dx       float64 // at a corner: where the text begins or ends
	dUp      float64
	dDown    float64
}

// The eight places, clockwise on the picture.
const (
	east = iota
	southEast
	south
	southWest
	west
	northWest
	north
	northEast
)

// spot returns the left end of the base line of a text at one of the eight places.
func (p *pen) spot(c place, r ring8, dir int, width float64, look textLook) place {
	k, s := p.k, look.size*p.k
	q := c
	switch dir {
	case east:
		q.x += r.side * k
	case west:
		q.x -= r.side*k + width
	case north, south:
		q.x -= width / 2
	case northEast, southEast:
		q.x += r.dx * k
	default:
		q.x -= r.dx*k + width
	}
	const capHeight = 0.72
	switch dir {
	case east, west:
		q.y += capHeight / 2 * s
	case north:
		q.y -= r.up * k
	case south:
		q.y += r.down*k + capHeight*s
	case northEast, northWest:
		q.y -= r.dUp * k
	default:
		q.y += r.dDown*k + capHeight*s
	}
	return q
}

// around returns the eight places about a glyph, beginning with one and going clockwise. The result is good until the next
// call.
func (p *pen) around(c place, r ring8, first int, t text, look textLook) []place {
	w := p.width(t, look)
	spots := p.work.spots[:0]
	for i := range 8 {
		spots = append(spots, p.spot(c, r, (first+i)%8, w, look))
	}
	p.work.spots = spots
	return spots
}

// octant returns the place nearest to a direction of the picture.
func octant(dx, dy float64) int {
	return (int(math.Round(math.Atan2(dy, dx)/(math.Pi/4))) + 8) % 8
}
