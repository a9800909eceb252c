package plan

import (
	"math"
	"slices"

	"enfilade/solver/exact"
)

// CutBack takes away what of a wall lies beyond another wall's line, at one of its ends. The wall then ends on that line, at
// the grid point nearest to where they cross. Openings in the part that goes, go with it.
type CutBack struct {
	Wall  string
	To    string
	Start bool // cut at the beginning of the line instead of its end
}

// Label says what the edit does.
func (e CutBack) Label() string { return "cut back wall" }

// Lengthen carries a wall on, straight, until it meets another wall's line, at one of its ends. It then ends at the grid point
// nearest to where they meet.
type Lengthen struct {
	Wall  string
	To    string
	Start bool // carry on the beginning of the line instead of its end
}

// Label says what the edit does.
func (e Lengthen) Label() string { return "lengthen wall" }

// Apply fails when the walls do not cross, or an opening lies across the place where they do.
func (e CutBack) Apply(p *Plan) (*Plan, error) {
	return meet(p, e.Wall, e.To, e.Start, func(w, to *Wall, openings list[Opening]) (list[Opening], error) {
		seg, at, ok := lastCrossing(w.Line, to.Line)
		if !ok {
			return openings, fault(KindWall, w.ID, "does not cross wall "+to.ID+"; lengthen it to that wall instead")
		}
		pts := w.Line.Points()[:seg+1]
		if at != pts[seg] {
			pts = append(pts, at)
		}
		if len(pts) < 2 {
			return openings, fault(KindWall, w.ID, "would be gone; it begins on wall "+to.ID)
		}
		return cutOff(openings, w, seg, at, pts)
	})
}

// cutOff shortens the wall to some points and drops the openings beyond a place on one of its pieces.
func cutOff(openings list[Opening], w *Wall, seg int, at exact.Pt, pts []exact.Pt) (list[Opening], error) {
	len2 := exact.Dist2(w.Line.At(seg), at)
	beyond := func(o *Opening) bool {
		return o.Wall == w.ID && (o.Segment > seg || o.Segment == seg && int64(o.At)*int64(o.At) >= len2)
	}
	for _, o := range openings.refs() {
		if o.Wall == w.ID && o.Segment == seg && !beyond(o) && !upTo(len2, int64(o.At)+int64(o.Width)) {
			return openings, errAcross(o)
		}
	}
	w.Line = Chain{pts}
	left, _ := openings.without(func(_ int, o *Opening) bool { return beyond(o) })
	return left, nil
}

// Apply fails when the wall would not meet the other one, or ends there already.
func (e Lengthen) Apply(p *Plan) (*Plan, error) {
	return meet(p, e.Wall, e.To, e.Start, func(w, to *Wall, openings list[Opening]) (list[Opening], error) {
		at, ok := firstMeeting(w.Line, to.Line)
		n := w.Line.Len()
		switch {
		case !ok:
			return openings, fault(KindWall, w.ID, "does not meet wall "+to.ID+" straight on; turn it, or lengthen its other end")
		case at == w.Line.At(n-1):
			return openings, fault(KindWall, w.ID, "ends on wall "+to.ID+" already")
		}
		pts := w.Line.Points()
		pts[n-1] = at
		w.Line = Chain{pts}
		return openings, nil
	})
}

// meet changes the end of a wall for the sake of another: its beginning when start says so, for which the wall is turned about
// and back again.
func meet(p *Plan, id, toID string, start bool, change func(w, to *Wall, openings list[Opening]) (list[Opening], error)) (*Plan, error) {
	i := at(&p.obstacles.walls, id)
	to, ok := p.Wall(toID)
	switch {
	case i < 0:
		return nil, missing(KindWall, id)
	case !ok:
		return nil, missing(KindWall, toID)
	case id == toID:
		return nil, fault(KindWall, id, "cannot meet itself; click another wall")
	}
	w := *p.obstacles.walls.at(i)
	if w.Line.Closed() {
		return nil, fault(KindWall, id, "is closed, so it has no end")
	}
	openings := p.obstacles.openings
	about := func() {
		openings = openings.changed(func(o *Opening) bool { return o.Wall == id }, func(o *Opening) { o.turnAbout(&w) })
		w = w.backwards()
	}
	if start {
		about()
	}
	openings, err := change(&w, &to, openings)
	if err != nil {
		return nil, err
	}
	if start {
		about()
	}
	if openings, err = fitted(openings, &w); err != nil {
		return nil, err
	}
	d := draftOf(p)
	d.obstacles().walls, d.obstacles().openings = p.obstacles.walls.put(i, w), openings
	return d.plan(), nil
}

// crossing is where a line meets another, as the share num/den of one of its pieces.
type crossing struct{ num, den int64 }

func (c crossing) compare(d crossing) int { return exact.CompareFractions(c.num, c.den, d.num, d.den) }

// lastCrossing returns where a line crosses or touches another, farthest along it but before its very end.
func lastCrossing(line, other Chain) (seg int, at exact.Pt, ok bool) {
	for seg = line.Len() - 2; seg >= 0; seg-- {
		a, b := line.At(seg), line.At(seg+1)
		var best crossing
		for c := range crossings(a, b, other) {
			q := part(a, b.Sub(a), c.num, c.den)
			if c.num < 0 || c.num > c.den || q == line.At(line.Len()-1) || c.num == c.den && seg < line.Len()-2 {
				continue // beyond the piece, at the very end, or at the beginning of the next piece
			}
			if !ok || c.compare(best) > 0 {
				best, at, ok = c, q, true
			}
		}
		if ok {
			return seg, at, true
		}
	}
	return 0, exact.Pt{}, false
}

// firstMeeting returns where a line, carried on straight beyond its end, first meets another.
func firstMeeting(line, other Chain) (at exact.Pt, ok bool) {
	a, b := line.At(line.Len()-2), line.At(line.Len()-1)
	if a == b {
		return b, false
	}
	var best crossing
	for c := range crossings(a, b, other) {
		if c.num < c.den {
			continue
		}
		if !ok || c.compare(best) < 0 {
			best, at, ok = c, part(a, b.Sub(a), c.num, c.den), true
		}
	}
	return at, ok
}

// crossings yields where the whole line through a and b meets the pieces of a chain, as shares of the way from a to b. The
// places lie on the chain, so they are legal.
func crossings(a, b exact.Pt, other Chain) func(yield func(crossing) bool) {
	l := exact.Through(a, b)
	return func(yield func(crossing) bool) {
		for i := range other.Len() - 1 {
			c, d := other.At(i), other.At(i+1)
			m := exact.Through(c, d)
			num, den := l.Meet(m)
			if den == 0 {
				if l.Side(c) != 0 || a == b {
					continue
				}
				for _, q := range [2]exact.Pt{c, d} { // along the line itself: its ends
					if !yield(crossing{l.Dir.Dot(q.Sub(a)), l.Dir.Len2()}) {
						return
					}
				}
				continue
			}
			if l.Side(c)*l.Side(d) > 0 {
				continue
			}
			if den < 0 {
				num, den = -num, -den
			}
			if !yield(crossing{num, den}) {
				return
			}
		}
	}
}

// Overhang returns how far a wall's line reaches beyond where it crosses another at one of its ends, in grid units; infinite
// when they do not cross.
func Overhang(line, other Chain, start bool) float64 {
	pts := line.Points()
	if start {
		slices.Reverse(pts)
	}
	seg, at, ok := lastCrossing(Chain{pts}, other)
	if !ok {
		return math.Inf(1)
	}
	sum := exact.Dist(at, pts[seg+1])
	for i := seg + 1; i+1 < len(pts); i++ {
		sum += exact.Dist(pts[i], pts[i+1])
	}
	return sum
}

// Reach returns how much a wall's line would grow at one of its ends to meet another, in grid units; infinite when it would
// not.
func Reach(line, other Chain, start bool) float64 {
	pts := line.Points()
	if start {
		slices.Reverse(pts)
	}
	at, ok := firstMeeting(Chain{pts}, other)
	if end := pts[len(pts)-1]; ok && at != end {
		return exact.Dist(end, at)
	}
	return math.Inf(1)
}
