package plantest

import (
	"enfilade/solver/exact"
	"enfilade/solver/plan"
)

// Aim counts the degeneracies of plans, so that a test can tell whether its random plans still hit what they are for.
type Aim struct {
	Plans      int
	SharedEnds int // two pieces with a common end
	Tees       int // a piece ends inside another
	Crosses    int // two pieces cross inside both
	Overlaps   int // two pieces share more than a point
	Collinear  int // two pieces lie on one line and do not meet
	OnFaces    int // a mark stands inside a piece
	OnEnds     int // a mark stands on a piece's end
	OnCrossing int // a mark stands on the grid point at which two pieces cross
	DoorEnds   int // an opening reaches an end of its wall's piece
}

// Add counts what p has, over the lines of its walls, the rings of its blocks and its floor.
func (a *Aim) Add(p *plan.Plan) {
	a.Plans++
	pieces := piecesOf(p)
	var crossings []exact.Pt
	for i, s := range pieces {
		for _, r := range pieces[:i] {
			if x, ok := a.pair(s, r); ok {
				crossings = append(crossings, x)
			}
		}
	}
	for _, m := range marksOf(p) {
		a.mark(m, pieces, crossings)
	}
	for _, d := range p.Openings() {
		w, _ := p.Wall(d.Wall)
		long := exact.Dist(w.Line.At(d.Segment), w.Line.At(d.Segment+1))
		if d.At == 0 || float64(d.At+d.Width)+1 > long {
			a.DoorEnds++
		}
	}
}

func (a *Aim) mark(m exact.Pt, pieces [][2]exact.Pt, crossings []exact.Pt) {
	for _, s := range pieces {
		switch {
		case m == s[0] || m == s[1]:
			a.OnEnds++
		case exact.OnSegment(s[0], s[1], m):
			a.OnFaces++
		}
	}
	for _, x := range crossings {
		if x == m {
			a.OnCrossing++
		}
	}
}

// pair counts how two pieces meet; it returns the grid point of a crossing.
func (a *Aim) pair(s, r [2]exact.Pt) (exact.Pt, bool) {
	if s[0] == r[0] || s[0] == r[1] || s[1] == r[0] || s[1] == r[1] {
		a.SharedEnds++
	}
	o1, o2 := exact.Orient(s[0], s[1], r[0]), exact.Orient(s[0], s[1], r[1])
	o3, o4 := exact.Orient(r[0], r[1], s[0]), exact.Orient(r[0], r[1], s[1])
	inside := 0
	for _, on := range []bool{within(s, r[0]), within(s, r[1]), within(r, s[0]), within(r, s[1])} {
		if on {
			inside++
		}
	}
	switch {
	case o1 == 0 && o2 == 0 && (inside > 1 || s == r || s[0] == r[1] && s[1] == r[0]):
		a.Overlaps++
	case o1 == 0 && o2 == 0:
		a.Collinear++
	case inside > 0:
		a.Tees++
	case o1*o2 < 0 && o3*o4 < 0:
		a.Crosses++
		return crossing(s[0], s[1], r[0], r[1])
	}
	return exact.Pt{}, false
}

// within reports whether p lies inside the piece, its ends left out.
func within(s [2]exact.Pt, p exact.Pt) bool {
	return p != s[0] && p != s[1] && exact.OnSegment(s[0], s[1], p)
}

func piecesOf(p *plan.Plan) [][2]exact.Pt {
	var pieces [][2]exact.Pt
	ring := func(c plan.Chain) {
		for i, q := range c.All() {
			pieces = append(pieces, [2]exact.Pt{q, c.At((i + 1) % c.Len())})
		}
	}
	ring(p.Floor())
	for _, w := range p.Walls() {
		for i := 1; i < w.Line.Len(); i++ {
			pieces = append(pieces, [2]exact.Pt{w.Line.At(i - 1), w.Line.At(i)})
		}
	}
	for _, b := range p.Blocks() {
		ring(b.Ring)
	}
	return pieces
}

func marksOf(p *plan.Plan) []exact.Pt {
	var at []exact.Pt
	for _, o := range p.Observers() {
		at = append(at, o.At)
	}
	for _, t := range p.Targets() {
		at = append(at, t.At)
	}
	for _, s := range p.Starts() {
		at = append(at, s.At)
	}
	return at
}
