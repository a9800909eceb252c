package plan

import (
	"math"
	"slices"

	"enfilade/solver/exact"
)

// What follows keeps openings where they are while the line of their wall is taken apart or put together.

// OnPiece reports whether q is the grid point of some place on the straight piece from a to b: whether the square of half a unit
// around q meets it.
func OnPiece(a, b, q exact.Pt) bool {
	if q.X < min(a.X, b.X) || q.X > max(a.X, b.X) || q.Y < min(a.Y, b.Y) || q.Y > max(a.Y, b.Y) {
		return false
	}
	// The corners of the square are half a unit from q in x and in y; everything doubled, |2·area| stays below 2^62 and the
	// shift |dx| + |dy| below 2^32.
	d := b.Sub(a)
	area := 2 * exact.Area2(a, b, q)
	reach := abs64(int64(d.X)) + abs64(int64(d.Y))
	return abs64(area) <= reach
}

func abs64(v int64) int64 {
	if v < 0 {
		return -v
	}
	return v
}

// NearestOn returns the grid point on a wall's line that is nearest to q, and its straight piece. The line has two points or
// more.
func NearestOn(line Chain, q exact.Pt) (segment int, at exact.Pt) {
	best := math.Inf(1)
	for i := range line.Len() - 1 {
		f := footOn(line.At(i), line.At(i+1), q)
		if d := exact.Dist(f, q); d < best {
			best, segment, at = d, i, f
		}
	}
	return segment, at
}

// footOn returns the grid point of the place on the straight piece from a to b that is nearest to q.
func footOn(a, b, q exact.Pt) exact.Pt {
	d := b.Sub(a)
	num, den := d.Dot(q.Sub(a)), d.Len2()
	switch {
	case num <= 0:
		return a
	case num >= den:
		return b
	}
	return part(a, d, num, den)
}

// part returns the grid point nearest to a + d·num/den, for den > 0. The result has to lie within the legal range.
func part(a exact.Pt, d exact.Vec, num, den int64) exact.Pt {
	return exact.Pt{
		X: int32(int64(a.X) + nearest(exact.Mul(int64(d.X), num), den)),
		Y: int32(int64(a.Y) + nearest(exact.Mul(int64(d.Y), num), den)),
	}
}

// upTo reports whether a piece whose squared length is given reaches a distance along it.
func upTo(len2, at int64) bool { return at*at <= len2 }

// backwards returns the wall with its line run through from its end to its beginning. The body stays where it is.
func (w Wall) backwards() Wall {
	pts := w.Line.Points()
	slices.Reverse(pts)
	w.Line, w.Justify = Chain{pts}, w.Justify.flipped()
	return w
}

// turnAbout makes an opening that fits a wall fit the same wall backwards. A slanted piece's length is rounded, so it may stand
// off by half a unit.
func (o *Opening) turnAbout(w *Wall) {
	long := exact.Dist(w.Line.At(o.Segment), w.Line.At(o.Segment+1))
	o.Segment = w.Line.Len() - 2 - o.Segment
	o.At = max(0, int32(math.Round(long-float64(o.At)-float64(o.Width))))
	o.HingeEnd, o.SideRight = !o.HingeEnd, !o.SideRight
}

// shifted moves an opening along its piece by a length, and holds it inside the piece.
func (o *Opening) shifted(w *Wall, by float64) {
	o.At = max(0, int32(math.Round(float64(o.At)+by)))
	if last := w.lastPlace(*o); last >= 0 {
		o.At = min(o.At, last)
	}
}

// errAcross is the fault of an opening where its wall would be cut.
func errAcross(o *Opening) error {
	return fault(KindOpening, o.ID, "lies across the place; move it along its wall first")
}
