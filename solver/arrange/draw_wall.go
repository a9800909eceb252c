package arrange

import (
	"enfilade/solver/exact"
	"enfilade/solver/plan"
)

// strand is a wall that can be drawn.
type strand struct {
	wall          plan.Wall
	item          int32
	pts           []exact.Pt // the wall's line, no two neighbours equal
	legs          []int32    // legs[i] is what the wall's straight piece i became in pts, or noLeg
	closed        bool       // the last point is the first, and something lies between
	right2, left2 int32      // reach of the body on either side of the line, in half units; both 0 for a line
	gaps          []gap      // openings, in order along the wall
	mates         [2]mate    // what the start and the end are mitred to
}

// noLeg stands for a straight piece without length.
const noLeg int32 = -1

// gap is an opening cut into one leg of a strand.
type gap struct {
	leg      int32
	from, to int32 // distances along the leg
	toEnd    bool  // it reaches the leg's end
	opening  int   // index into the plan's openings
}

// span is a stretch of one leg between two gaps.
type span struct {
	leg         int32
	after, till int // the gaps on either side, indices into strand.gaps; noGap at an end of the leg
}

const noGap = -1

// thick reports whether the wall has a body.
func (s *strand) thick() bool { return s.right2 > 0 || s.left2 > 0 }

// legCount returns the number of straight pieces with length.
func (s *strand) legCount() int { return len(s.pts) - 1 }

// dir returns the vector along leg i.
func (s *strand) dir(i int) exact.Vec { return s.pts[i+1].Sub(s.pts[i]) }

// stops returns what the wall stops.
func (s *strand) stops() Stops {
	switch s.wall.Kind {
	case plan.Glazing:
		return Stops{Walk: true}
	case plan.Screen:
		return Stops{Top: s.wall.Height}
	}
	return Stops{Walk: true, Top: s.wall.Height}
}

// readWalls takes the walls that can be drawn into d.strands.
func (d *drawer) readWalls() {
	for _, w := range d.plan.Walls() {
		kind, fault := wallFault(w)
		s := strand{wall: w}
		if fault == "" && !d.readLine(&s) {
			kind, fault = plan.ProblemShape, "spans nothing; its line needs two points that differ"
		}
		if fault != "" {
			var at exact.Pt
			if w.Line.Len() > 0 {
				at = w.Line.At(0)
			}
			d.problem(kind, plan.Ref{Kind: plan.KindWall, ID: w.ID}, at, fault)
			continue
		}
		s.item = d.addItem(plan.KindWall, w.ID)
		d.strands = append(d.strands, s)
	}
}

// wallFault says why a wall cannot be drawn, its line's points apart; empty when it can.
func wallFault(w plan.Wall) (plan.ProblemKind, string) {
	for _, p := range w.Line.All() {
		if !plan.InRange(p) {
			return plan.ProblemShape, "lies outside the legal range of 50 km about the origin"
		}
	}
	switch {
	case w.Thickness < 0 || w.Thickness > plan.MaxThickness:
		return plan.ProblemShape, "needs a thickness from 0 to 100 m"
	case w.Kind == plan.Low && (w.Height == plan.Ceiling || w.Height <= 0):
		return plan.ProblemLow, "is a low wall and needs a height above 0"
	case w.Height <= 0:
		return plan.ProblemShape, "needs a height above 0, or none for up to the ceiling"
	}
	return 0, ""
}

// readLine fills in the strand's line and reports whether it spans anything.
func (d *drawer) readLine(s *strand) bool {
	n := s.wall.Line.Len()
	if n == 0 {
		return false
	}
	at, legAt := len(d.points), len(d.legs)
	d.points = append(d.points, s.wall.Line.At(0))
	for i := 1; i < n; i++ {
		p, last := s.wall.Line.At(i), len(d.points)-1
		if p == d.points[last] {
			d.legs = append(d.legs, noLeg)
			continue
		}
		d.legs = append(d.legs, int32(last-at))
		d.points = append(d.points, p)
	}
	s.pts, s.legs = d.points[at:], d.legs[legAt:]
	last := len(s.pts) - 1
	s.closed = last > 2 && s.pts[0] == s.pts[last]
	s.right2, s.left2 = s.wall.Sides2()
	return last > 0
}

// drawWall draws one wall and the leaves in it.
func (d *drawer) drawWall(s *strand) {
	if s.thick() {
		d.drawBody(s)
	} else {
		d.spans = s.spans(d.spans[:0])
		for _, sp := range d.spans {
			d.addLine(s.station(sp.leg, sp.after, true, 0), s.station(sp.leg, sp.till, false, 0), s.stops(), s.item)
		}
	}
	for i := range s.gaps {
		if o := &d.openings[s.gaps[i].opening]; o.Shut && o.Leaf != plan.NoLeaf {
			d.drawLeaf(s, i, o)
		}
	}
}

// drawLeaf fills a gap through the wall's whole thickness.
func (d *drawer) drawLeaf(s *strand, i int, o *plan.Opening) {
	stops := Stops{Walk: true}
	if o.Leaf == plan.SolidLeaf {
		stops.Top = s.wall.Height
	}
	g := &s.gaps[i]
	item := d.addItem(plan.KindOpening, o.ID)
	if !s.thick() {
		d.addLine(s.station(g.leg, i, false, 0), s.station(g.leg, i, true, 0), stops, item)
		return
	}
	d.addRing(d.addBody(stops, item), []exact.Pt{
		s.station(g.leg, i, false, -s.right2), s.station(g.leg, i, true, -s.right2),
		s.station(g.leg, i, true, s.left2), s.station(g.leg, i, false, s.left2),
	})
}

// spans appends to list the stretches of the strand that no opening takes, in order.
func (s *strand) spans(list []span) []span {
	next := 0
	for leg := range int32(s.legCount()) {
		open := span{leg: leg, after: noGap}
		full := false // the leg is taken up to its end
		pos := int32(0)
		for ; next < len(s.gaps) && s.gaps[next].leg == leg; next++ {
			g := &s.gaps[next]
			if g.from > pos {
				open.till = next
				list = append(list, open)
			}
			pos, full = g.to, g.toEnd
			open.after = next
		}
		if !full {
			open.till = noGap
			list = append(list, open)
		}
	}
	return list
}

// station returns the place at one side of gap g on a leg (its far side when far is set), beside the line by side2 half
// units, positive to the left. noGap stands for the leg's ends: far for its start, where what follows the gap begins.
func (s *strand) station(leg int32, g int, far bool, side2 int32) exact.Pt {
	d := s.dir(int(leg))
	switch {
	case g == noGap && far, g != noGap && !far && s.gaps[g].from == 0:
		return beside(s.pts[leg], d, 0, side2)
	case g == noGap, far && s.gaps[g].toEnd:
		return beside(s.pts[leg+1], d, 0, side2)
	case far:
		return beside(s.pts[leg], d, s.gaps[g].to, side2)
	}
	return beside(s.pts[leg], d, s.gaps[g].from, side2)
}
