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
	Body      Part = iota
	Corner         // a point of its line or ring
	Heading        // the handle that turns an observer
	View           // the handles that open an observer's view angle: 0 to the left of its heading, 1 to the right
	Range          // the handle that stretches an observer's range
	FaceEnd        // the handles at the ends of a target's face
	LegMiddle      // the handles half way along the legs of a route, which make new waypoints
)

// Hit is what lies under the pointer.
type Hit struct {
	Ref   plan.Ref
	Part  Part
	Index int      // of the corner in its line or ring, or which of two handles
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

	// HandleDist is how far the heading handle of a selected observer stands from its eye, ViewDist how far the handles
	// of its view angle.
	HandleDist = 34
	ViewDist   = 26
	// MatDist is how far the mat of a start lies from its point, outside the door: 0.78 m, in grid units.
	MatDist = 7800
)

// At returns what lies under the pixel place (x, y): first the handles of selected marks, then marks, corners, openings,
// walls and blocks, routes, zones and the floor's outline. Hidden items are passed over. Routes lie where walks says, if it is
// given.
func At(p *plan.Plan, cam view.Camera, x, y float64, selected []plan.Ref, walks ...Walks) (Hit, bool) {
	s := pointer(cam, x, y)
	if h, ok := knob(p, cam, s, selected, walks); ok {
		return h, true
	}
	return top(p, cam, s, nil, walks)
}

// Under returns all that lies under the pixel place (x, y), what lies on top first, each item once and handles left out.
func Under(p *plan.Plan, cam view.Camera, x, y float64, walks ...Walks) []Hit {
	const most = 32
	s := pointer(cam, x, y)
	var out []Hit
	skip := map[plan.Ref]bool{}
	for len(out) < most {
		h, ok := top(p, cam, s, skip, walks)
		if !ok {
			break
		}
		out = append(out, h)
		skip[h.Ref] = true
	}
	return out
}

// top returns what lies on top at a place, without the items of skip.
func top(p *plan.Plan, cam view.Camera, s spot, skip map[plan.Ref]bool, walks []Walks) (Hit, bool) {
	path := func(p *plan.Plan, cam view.Camera, s spot, skip map[plan.Ref]bool) (Hit, bool) {
		return path(p, cam, s, skip, walks)
	}
	for _, find := range [...]func(*plan.Plan, view.Camera, spot, map[plan.Ref]bool) (Hit, bool){
		mark, corner, opening, body, path, outline,
	} {
		if h, ok := find(p, cam, s, skip); ok {
			return h, true
		}
	}
	return Hit{}, false
}

// nearest keeps the hit with the smallest distance, the later one on a tie: it lies on top.
type nearest struct {
	skip map[plan.Ref]bool
	hit  Hit
	dist float64
	ok   bool
}

func (n *nearest) offer(d, reach float64, h Hit) {
	if d <= reach && (!n.ok || d <= n.dist) && !n.skip[h.Ref] {
		n.hit, n.dist, n.ok = h, d, true
	}
}

// mark finds observers, targets and starts.
func mark(p *plan.Plan, cam view.Camera, s spot, skip map[plan.Ref]bool) (Hit, bool) {
	n := nearest{skip: skip}
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
			h := Hit{Ref: plan.Ref{Kind: plan.KindTarget, ID: t.ID}, At: TargetAt(t)}
			n.offer(s.dist(spotOf(h.At)), units(cam, targetReach), h)
			if t.Face != nil {
				f, _ := s.foot(t.Face[0], t.Face[1])
				n.offer(s.dist(f), units(cam, lineReach), h)
			}
		}
	}
	for _, o := range p.Observers() {
		if !o.Hidden {
			n.offer(s.dist(spotOf(o.At)), units(cam, observerReach), Hit{Ref: plan.Ref{Kind: plan.KindObserver, ID: o.ID}, At: o.At})
		}
	}
	return n.hit, n.ok
}

// TargetAt returns the grid point nearest to a target's place: its point, or the middle of its face.
func TargetAt(t plan.Target) exact.Pt {
	if t.Face != nil {
		return middleOf(t.Face[0], t.Face[1])
	}
	return t.At
}

// chooseReach is how near the pointer must come to a mark that is to be chosen among its kind, in px at 100 %.
const chooseReach = 24

// MarkAt returns the mark of a kind, observer, target or start, that is nearest to the pixel place (x, y), within a wider
// reach than At: nothing else is looked for.
func MarkAt(p *plan.Plan, cam view.Camera, x, y float64, kind plan.Kind) (Hit, bool) {
	s, reach := pointer(cam, x, y), units(cam, chooseReach)
	var n nearest
	offer := func(id string, at exact.Pt, m plan.Meta, d float64) {
		if !m.Hidden {
			n.offer(d, reach, Hit{Ref: plan.Ref{Kind: kind, ID: id}, At: at})
		}
	}
	switch kind {
	case plan.KindStart:
		for _, t := range p.Starts() {
			d := s.dist(spotOf(t.At))
			if m, ok := mat(t); ok {
				d = min(d, s.dist(m))
			}
			offer(t.ID, t.At, t.Meta, d)
		}
	case plan.KindTarget:
		for _, t := range p.Targets() {
			at := TargetAt(t)
			d := s.dist(spotOf(at))
			if t.Face != nil {
				f, _ := s.foot(t.Face[0], t.Face[1])
				d = min(d, s.dist(f))
			}
			offer(t.ID, at, t.Meta, d)
		}
	case plan.KindObserver:
		for _, o := range p.Observers() {
			offer(o.ID, o.At, o.Meta, s.dist(spotOf(o.At)))
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
func opening(p *plan.Plan, cam view.Camera, s spot, skip map[plan.Ref]bool) (Hit, bool) {
	for _, o := range p.Openings() {
		w, ok := p.Wall(o.Wall)
		if o.Hidden || !ok || o.Segment < 0 || o.Segment+1 >= w.Line.Len() {
			continue
		}
		a, b := w.Line.At(o.Segment), w.Line.At(o.Segment+1)
		_, along := s.foot(a, b)
		right, left := sides(w, units(cam, lineReach))
		d := s.aside(a, b)
		ref := plan.Ref{Kind: plan.KindOpening, ID: o.ID}
		if along > float64(o.At) && along < float64(o.At+o.Width) && d <= left && d >= -right && !skip[ref] {
			return Hit{Ref: ref}, true
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
func body(p *plan.Plan, cam view.Camera, s spot, skip map[plan.Ref]bool) (Hit, bool) {
	n := nearest{skip: skip}
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
func outline(p *plan.Plan, cam view.Camera, s spot, skip map[plan.Ref]bool) (Hit, bool) {
	n := nearest{skip: skip}
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
