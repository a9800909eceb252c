package plan

import (
	"cmp"
	"slices"

	"enfilade/solver/exact"
)

// Finding is a problem, with what would mend it.
type Finding struct {
	Problem
	Fix   Edit   // nil where no change is sure to be what is meant
	Offer string // what the fix does, for a button: "Close the gap"
}

// GapLimit is the widest gap between a wall's end and another thing that is told: 20 mm. Wider ones are meant.
const GapLimit int32 = 20 * exact.PerMM

// Inspect returns what looks wrong with a drawing by itself, without solving it: walls that nearly meet something, walls that
// lie on one another, and items outside the floor. They come in a fixed order. Of very many walls that lie on one another each
// is told with a few.
//
// stop, which may be nil, is asked every few thousand steps; when it says so, what was found so far is returned.
//
// Cost: O(n log n) for n straight pieces, and for each piece the ends of walls that are near to it and touch nothing yet.
func Inspect(p *Plan, stop func() bool) []Finding {
	return newSurvey(p, stop).findings()
}

// findings returns all that is found.
func (s *survey) findings() []Finding {
	out := append(s.gaps(), s.doubles()...)
	out = append(out, s.outsiders()...)
	sortAsking(s, out, func(a, b Finding) int {
		return cmp.Or(cmp.Compare(a.Kind, b.Kind), a.At.Compare(b.At))
	})
	return out
}

// piece is one straight piece of something that walls can meet.
type piece struct {
	a, b        exact.Pt
	wall        int32 // index of the wall, -1 for another thing
	index       int32 // of the piece in its wall
	ref         Ref
	right, left float64 // how far the body reaches beside it, grid units
}

// survey is a drawing taken to pieces.
type survey struct {
	plan   *Plan
	pieces []piece
	doored map[string]bool // the walls with openings
	stop   func() bool

	compared int // two pieces with one another
}

// stopped asks, at each so-manieth step of a loop, whether to stop.
func (s *survey) stopped(step int) bool {
	const each = 2048
	return step%each == 0 && s.stop != nil && s.stop()
}

func newSurvey(p *Plan, stop func() bool) *survey {
	s := &survey{plan: p, doored: map[string]bool{}, stop: stop}
	for i, o := range p.obstacles.openings.refs() {
		if s.stopped(i) {
			return s
		}
		s.doored[o.Wall] = true
	}
	add := func(q piece) {
		if q.a != q.b && InRange(q.a) && InRange(q.b) {
			s.pieces = append(s.pieces, q)
		}
	}
	for i, w := range p.obstacles.walls.refs() {
		if s.stopped(i) {
			return s
		}
		right2, left2 := w.Sides2()
		for k := range max(0, w.Line.Len()-1) {
			add(piece{w.Line.At(k), w.Line.At(k + 1), int32(i), int32(k), Ref{KindWall, w.ID}, float64(right2) / 2, float64(left2) / 2})
		}
	}
	ring := func(ref Ref, ring Chain) {
		for k := range ring.Len() {
			add(piece{a: ring.At(k), b: ring.At((k + 1) % ring.Len()), wall: -1, ref: ref})
		}
	}
	for i, b := range p.obstacles.blocks.refs() {
		if s.stopped(i) {
			return s
		}
		ring(Ref{KindBlock, b.ID}, b.Ring)
	}
	ring(Ref{Kind: KindFloor}, p.obstacles.floor)
	return s
}

// sortAsking sorts a list stably, in runs that are merged, and asks between them whether to stop: then the list is in some order.
// O(n log n).
func sortAsking[T any](s *survey, list []T, compare func(a, b T) int) {
	const run = 1024
	for from := 0; from < len(list); from += run {
		if s.stopped(0) {
			return
		}
		slices.SortStableFunc(list[from:min(from+run, len(list))], compare)
	}
	if len(list) <= run {
		return
	}
	from, to := list, make([]T, len(list))
	for size := run; size < len(list); size *= 2 {
		for lo := 0; lo < len(list); lo += 2 * size {
			mid, hi := min(lo+size, len(list)), min(lo+2*size, len(list))
			for i, j, k := lo, mid, lo; k < hi; k++ {
				if s.stopped(k) {
					return
				}
				if j == hi || i < mid && compare(from[i], from[j]) <= 0 {
					to[k] = from[i]
					i++
				} else {
					to[k] = from[j]
					j++
				}
			}
		}
		from, to = to, from
	}
	copy(list, from)
}
