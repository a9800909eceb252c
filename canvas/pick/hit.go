package pick

import (
	"math"

	"enfilade/canvas/view"
	"enfilade/solver/exact"
	"enfilade/solver/plan"
)

// Part says which part of an item lies under the pointer.
type Part uint8

// The parts of an item.
const (
	Body    Part = iota
	Corner       // a point of its line or ring
	Heading      // the handle that turns an observer
)

// Hit is what lies under the pointer.
type Hit struct {
	Ref   plan.Ref
	Part  Part
	Index int      // of the corner in its line or ring
	At    exact.Pt // of the corner, or the point of a mark
}

// Sizes of what a hand can hit, in px at 100 %. The glyphs are those of the picture: an observer's disc of 8.5, a target's
// ring of 5.2 and tick of 15; each with a margin that a mouse on a moving table needs.
const (
	observerReach = 11
	targetReach   = 9
	startReach    = 11
	matReach      = 14
	cornerReach   = 7
	lineReach     = 5
	handleReach   = 8

	// HandleDist is how far the heading handle of a selected observer stands from its eye.
	HandleDist = 34
	// MatDist is how far the mat of a start lies from its point, outside the door: 0.78 m, in grid units.
	MatDist = 7800
)

// At returns what lies under the pixel place (x, y): first the heading handle of a selected observer, then marks, corners,
// openings, walls and blocks, zones and the floor's outline. Hidden items are passed over.
func At(p *plan.Plan, cam view.Camera, x, y float64, selected []plan.Ref) (Hit, bool) {
	s := pointer(cam, x, y)
	for _, find := range []func() (Hit, bool){
		func() (Hit, bool) { return heading(p, cam, s, selected) },
		func() (Hit, bool) { return mark(p, cam, s) },
		func() (Hit, bool) { return corner(p, cam, s) },
		func() (Hit, bool) { return opening(p, cam, s) },
		func() (Hit, bool) { return body(p, cam, s) },
		func() (Hit, bool) { return outline(p, cam, s) },
	} {
		if h, ok := find(); ok {
			return h, true
		}
	}
	return Hit{}, false
}

// Handle returns the pixel place of an observer's heading handle.
func Handle(o plan.Observer, cam view.Camera) (x, y float64) {
	x, y = cam.Pixel(o.At)
	sin, cos := math.Sincos(o.Heading * math.Pi / 180)
	return x + cos*HandleDist*cam.K, y - sin*HandleDist*cam.K
}

func heading(p *plan.Plan, cam view.Camera, s spot, selected []plan.Ref) (Hit, bool) {
	for _, r := range selected {
		o, ok := p.Observer(r.ID)
		if r.Kind != plan.KindObserver || !ok {
			continue
		}
		if s.dist(handleSpot(cam, o)) <= units(cam, handleReach) {
			return Hit{Ref: r, Part: Heading, At: o.At}, true
		}
	}
	return Hit{}, false
}

// handleSpot returns the plan's place of an observer's heading handle.
func handleSpot(cam view.Camera, o plan.Observer) spot {
	x, y := Handle(o, cam)
	return pointer(cam, x, y)
}

// nearest keeps the hit with the smallest distance, the later one on a tie: it lies on top.
type nearest struct {
	hit  Hit
	dist float64
	ok   bool
}

func (n *nearest) offer(d, reach float64, h Hit) {
	if d <= reach && (!n.ok || d <= n.dist) {
		n.hit, n.dist, n.ok = h, d, true
	}
}

// mark finds observers, targets and starts.
func mark(p *plan.Plan, cam view.Camera, s spot) (Hit, bool) {
	var n nearest
	for _, t := range p.Starts() {
		if !t.Hidden {
			h := Hit{Ref: plan.Ref{Kind: plan.KindStart, ID: t.ID}, At: t.At}
			n.offer(s.dist(spotOf(t.At)), units(cam, startReach), h)
			if m, ok := mat(t); ok {
				n.offer(s.dist(m), units(cam, matReach), h)
			}
		}
	}
	for _, t := range p.Targets() {
		if !t.Hidden {
			n.offer(s.dist(spotOf(t.At)), units(cam, targetReach), Hit{Ref: plan.Ref{Kind: plan.KindTarget, ID: t.ID}, At: t.At})
		}
	}
	for _, o := range p.Observers() {
		if !o.Hidden {
			n.offer(s.dist(spotOf(o.At)), units(cam, observerReach), Hit{Ref: plan.Ref{Kind: plan.KindObserver, ID: o.ID}, At: o.At})
		}
	}
	return n.hit, n.ok
}

// mat returns where a start's mat lies: behind someone who faces the way the start says.
func mat(t plan.Start) (spot, bool) {
	if t.Facing == nil {
		return spot{}, false
	}
	sin, cos := math.Sincos(*t.Facing * math.Pi / 180)
	return spot{float64(t.At.X) - cos*MatDist, float64(t.At.Y) - sin*MatDist}, true
}

// opening finds doors and gaps by their place in the wall.
func opening(p *plan.Plan, cam view.Camera, s spot) (Hit, bool) {
	for _, o := range p.Openings() {
		w, ok := p.Wall(o.Wall)
		if o.Hidden || !ok || o.Segment < 0 || o.Segment+1 >= w.Line.Len() {
			continue
		}
		a, b := w.Line.At(o.Segment), w.Line.At(o.Segment+1)
		_, along := s.foot(a, b)
		right, left := sides(w, units(cam, lineReach))
		d := s.aside(a, b)
		if along > float64(o.At) && along < float64(o.At+o.Width) && d <= left && d >= -right {
			return Hit{Ref: plan.Ref{Kind: plan.KindOpening, ID: o.ID}}, true
		}
	}
	return Hit{}, false
}

// sides returns how far a wall can be hit to the right and to the left of its line: its body, and at least the reach.
func sides(w plan.Wall, reach float64) (right, left float64) {
	r2, l2 := w.Sides2()
	return max(float64(r2)/2, reach), max(float64(l2)/2, reach)
}

// body finds walls and blocks. A line is preferred to a block it lies on.
func body(p *plan.Plan, cam view.Camera, s spot) (Hit, bool) {
	var n nearest
	reach := units(cam, lineReach)
	for _, b := range p.Blocks() {
		if b.Hidden || s.apart(b.Ring, reach) {
			continue
		}
		d := s.outlineDist(b.Ring, true)
		if s.inside(b.Ring) {
			d = min(d, reach)
		}
		n.offer(d, reach, Hit{Ref: plan.Ref{Kind: plan.KindBlock, ID: b.ID}})
	}
	for _, w := range p.Walls() {
		right, left := sides(w, reach)
		if w.Hidden || s.apart(w.Line, max(right, left)) {
			continue
		}
		edges(w.Line, false, func(_ int, a, b exact.Pt) bool {
			f, _ := s.foot(a, b)
			side := right
			if s.aside(a, b) > 0 {
				side = left
			}
			if d := s.dist(f); d <= side {
				n.offer(min(d, reach), reach, Hit{Ref: plan.Ref{Kind: plan.KindWall, ID: w.ID}})
			}
			return true
		})
	}
	return n.hit, n.ok
}

// outline finds zones and the floor by their outlines.
func outline(p *plan.Plan, cam view.Camera, s spot) (Hit, bool) {
	var n nearest
	reach := units(cam, lineReach)
	if p.Floor().Len() > 0 {
		n.offer(s.outlineDist(p.Floor(), true), reach, Hit{Ref: plan.Ref{Kind: plan.KindFloor}})
	}
	for _, z := range p.Zones() {
		if !z.Hidden {
			n.offer(s.outlineDist(z.Ring, true), reach, Hit{Ref: plan.Ref{Kind: plan.KindZone, ID: z.ID}})
		}
	}
	return n.hit, n.ok
}
