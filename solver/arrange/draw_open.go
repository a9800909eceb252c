package arrange

import (
	"cmp"
	"fmt"
	"math/bits"
	"slices"

	"enfilade/solver/exact"
	"enfilade/solver/plan"
)

// readOpenings cuts the openings that fit into their strands. Of two that overlap the one that begins first is kept (then
// the narrower, then the smaller id), so their order in the plan does not matter.
func (d *drawer) readOpenings() {
	if d.plan.NumOpenings() == 0 {
		return
	}
	byID := make(map[string]int, len(d.strands))
	for i := range d.strands {
		if _, taken := byID[d.strands[i].wall.ID]; !taken {
			byID[d.strands[i].wall.ID] = i
		}
	}
	d.openings = d.plan.Parts().Openings
	for k := range d.openings {
		o := &d.openings[k]
		i, ok := byID[o.Wall]
		if !ok {
			d.openingProblem(plan.ProblemMissing, o, exact.Pt{}, d.whyNoWall(o.Wall))
			continue
		}
		s := &d.strands[i]
		g, fault := s.cut(o)
		if fault != "" {
			d.openingProblem(plan.ProblemOpening, o, s.pts[0], fault)
			continue
		}
		g.opening = k
		s.gaps = append(s.gaps, g)
	}
	for i := range d.strands {
		d.settleGaps(&d.strands[i])
	}
}

// whyNoWall says why an opening's wall is not among the strands.
func (d *drawer) whyNoWall(id string) string {
	if _, ok := d.plan.Wall(id); ok {
		return fmt.Sprintf("its wall %s cannot be drawn", id)
	}
	return fmt.Sprintf("names wall %q, which is not in the plan", id)
}

func (d *drawer) openingProblem(kind plan.ProblemKind, o *plan.Opening, at exact.Pt, text string) {
	d.problem(kind, plan.Ref{Kind: plan.KindOpening, ID: o.ID}, at, text)
}

// cut returns the gap an opening makes, or says why it fits nowhere.
func (s *strand) cut(o *plan.Opening) (g gap, fault string) {
	toEnd, fault := s.wall.Fit(*o)
	if fault != "" {
		return g, fault
	}
	return gap{leg: s.legs[o.Segment], from: o.At, to: o.At + o.Width, toEnd: toEnd}, ""
}

// settleGaps puts a strand's gaps in order and leaves out what overlaps an earlier one.
func (d *drawer) settleGaps(s *strand) {
	if len(s.gaps) < 2 {
		return
	}
	slices.SortStableFunc(s.gaps, func(a, b gap) int {
		return cmp.Or(cmp.Compare(a.leg, b.leg), cmp.Compare(a.from, b.from), cmp.Compare(a.to, b.to),
			cmp.Compare(d.openings[a.opening].ID, d.openings[b.opening].ID))
	})
	kept := s.gaps[:0]
	for _, g := range s.gaps {
		if n := len(kept); n > 0 && kept[n-1].leg == g.leg && kept[n-1].to > g.from {
			d.openingProblem(plan.ProblemOpening, &d.openings[g.opening], beside(s.pts[g.leg], s.dir(int(g.leg)), g.from, 0),
				fmt.Sprintf("lies over opening %s; openings in one wall must not overlap", d.openings[kept[n-1].opening].ID))
			continue
		}
		kept = append(kept, g)
	}
	s.gaps = kept
}

// room is how much of a leg stands before the first opening, seen from one of its ends.
type room struct {
	d    exact.Vec // along the leg, in the direction of travel
	dist int32     // place of the opening that bounds it, from the leg's start as drawn
	kind roomKind
}

// Corners at both ends of a leg share it, half for each, so that what they cut off never overlaps: the winding number about
// a body is then nowhere negative, rounding apart.

type roomKind uint8

const (
	roomAll  roomKind = iota // no opening, and nothing at the other end: the whole leg
	roomHalf                 // no opening, and a corner at the other end too
	roomNear                 // dist units from the end that is asked about
	roomFar                  // all but dist units
	roomNone                 // the opening takes this end
)

// roomAt returns what stands of leg i at its start or its end.
func (s *strand) roomAt(i int, atEnd bool) room {
	r := room{d: s.dir(i)}
	if s.turnsAt(i, !atEnd) {
		r.kind = roomHalf
	}
	if len(s.gaps) == 0 {
		return r
	}
	at, _ := slices.BinarySearchFunc(s.gaps, int32(i), func(g gap, leg int32) int { return cmp.Compare(g.leg, leg) })
	if at == len(s.gaps) || s.gaps[at].leg != int32(i) {
		return r
	}
	if !atEnd {
		r.kind, r.dist = roomNear, s.gaps[at].from
		if r.dist == 0 {
			r.kind = roomNone
		}
		return r
	}
	for at+1 < len(s.gaps) && s.gaps[at+1].leg == int32(i) {
		at++
	}
	r.kind, r.dist = roomFar, s.gaps[at].to
	if s.gaps[at].toEnd {
		r.kind = roomNone
	}
	return r
}

// turnsAt reports whether the wall goes on beyond the start or the end of leg i.
func (s *strand) turnsAt(i int, atEnd bool) bool {
	switch {
	case s.closed:
		return true
	case atEnd:
		return i < s.legCount()-1 || s.mates[1].s != nil
	}
	return i > 0 || s.mates[0].s != nil
}

// holds reports whether the foot of a corner lies on what stands. inward is the scalar product of the vector from the leg's
// end to the corner with the leg's direction away from that end: the foot's distance times the leg's length.
//
// Exact: the products stay below 2^62, their squares fit 128 bits.
func (r room) holds(inward int64) bool {
	len2 := r.d.Len2()
	switch {
	case inward <= 0:
		return true
	case r.kind == roomAll:
		return inward <= len2
	case r.kind == roomHalf:
		return 2*inward <= len2
	case r.kind == roomNear:
		return !squareLess(r.dist, len2, inward)
	case r.kind == roomFar:
		rest := len2 - inward // the foot's distance from the leg's other end, times the length
		return rest >= 0 && !squareLessThan(rest, r.dist, len2)
	}
	return false
}

// squareLess reports whether dist² · len2 < v², for v >= 0.
func squareLess(dist int32, len2, v int64) bool {
	h1, l1 := bits.Mul64(uint64(int64(dist)*int64(dist)), uint64(len2))
	h2, l2 := bits.Mul64(uint64(v), uint64(v))
	return h1 < h2 || h1 == h2 && l1 < l2
}

// squareLessThan reports whether v² < dist² · len2, for v >= 0.
func squareLessThan(v int64, dist int32, len2 int64) bool {
	h1, l1 := bits.Mul64(uint64(v), uint64(v))
	h2, l2 := bits.Mul64(uint64(int64(dist)*int64(dist)), uint64(len2))
	return h1 < h2 || h1 == h2 && l1 < l2
}
