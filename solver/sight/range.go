package sight

import (
	"math"

	"enfilade/solver/exact"
)

// RangePolygon returns a polygon with grid corners inside the circle of the given radius around eye, counter-clockwise and
// nowhere more than 1 mm from it, so that floor beyond the range is never claimed. It is the same under quarter turns and
// mirroring.
//
// An edge's middle lies r(1 - cos(pi/n)) inside the circle, and cutting its ends to the grid brings it in by at most
// sqrt 2 units; n keeps the first below 8, the sum below 10. The radius, at least 16 units, must leave the corners legal.
func RangePolygon(eye exact.Pt, radius int32) []exact.Pt {
	r := float64(radius)
	n := 8 * int(math.Ceil(math.Pi/math.Acos(1-8/r)/8))
	return octants(eye, n, func(i int) exact.Vec {
		s, c := math.Sincos(2 * math.Pi * float64(i) / float64(n))
		return exact.Vec{X: int32(r * c), Y: int32(r * s)}
	})
}

// octants returns the ring of n corners about eye, n a multiple of 8, of which corner gives those of the first octant, from +x
// to the diagonal; the others follow by turning and mirroring.
func octants(eye exact.Pt, n int, corner func(i int) exact.Vec) []exact.Pt {
	quarter := n / 4
	ring := make([]exact.Pt, n)
	for i := range quarter {
		v := exact.Vec{}
		if i <= n/8 {
			v = corner(i)
		} else { // the second half of the quarter mirrors the first
			w := corner(quarter - i)
			v = exact.Vec{X: w.Y, Y: w.X}
		}
		for q := range 4 {
			ring[i+q*quarter] = eye.Add(v)
			v = v.Left()
		}
	}
	return ring
}

// cutByRange appends to f.pieces what piece w becomes when the range's polygon, star-shaped around the eye as the region
// is, hides what lies beyond it. Both are compared along every direction in which one of them has a corner.
func (f *Finder) cutByRange(w piece, j *joiner) {
	ring := j.clip.Range
	now := w.r
	for i := rangeEdge(ring, j.eye, w.r); ; i = (i + 1) % len(ring) {
		a, b := ring[i], ring[(i+1)%len(ring)]
		end, done := b.Sub(j.eye), false
		if end.Cross(w.l) <= 0 {
			end, done = w.l, true
		}
		f.cutByEdge(w, a, b, now, end, j.eye)
		if done {
			return
		}
		now = end
	}
}

// cutByEdge appends what w becomes between the directions r and l, where the polygon's border is its edge from a to b.
func (f *Finder) cutByEdge(w piece, a, b exact.Pt, r, l exact.Vec, eye exact.Pt) {
	far := piece{kind: ClipSide, a: a, b: b, r: r, l: l}
	near := piece{kind: Wall, a: w.a, b: w.b, r: r, l: l}
	atR := near.reach(eye, r).compare(far.reach(eye, r))
	atL := near.reach(eye, l).compare(far.reach(eye, l))
	switch {
	case atR <= 0 && atL <= 0:
		f.addPiece(near)
	case atR >= 0 && atL >= 0:
		f.addPiece(far)
	default:
		x := crossingOf(exact.Through(w.a, w.b), exact.Through(a, b))
		one, two := near, far
		if atR > 0 {
			one, two = far, near
		}
		one.cutL, one.end = true, x
		two.cutR, two.start = true, x
		f.addPiece(one)
		f.addPiece(two)
	}
}

// addPiece appends p, as part of the piece before it when both lie on one line and meet.
func (f *Finder) addPiece(p piece) {
	if n := len(f.pieces); n > 0 {
		if q := &f.pieces[n-1]; q.a == p.a && q.b == p.b && !q.cutL && !p.cutR {
			q.l, q.cutL, q.end = p.l, p.cutL, p.end
			return
		}
	}
	f.pieces = append(f.pieces, p)
}

// reach returns how far along direction d the line of p lies.
func (p *piece) reach(eye exact.Pt, d exact.Vec) fraction {
	num, den := exact.Line{At: eye, Dir: d}.Meet(exact.Through(p.a, p.b))
	return fraction{num, den}
}

// crossingOf returns the vertex at which two lines that are not parallel meet.
func crossingOf(k, l exact.Line) Vertex {
	num, den := k.Meet(l)
	if den < 0 {
		num, den = -num, -den
	}
	return Vertex{k.At, k.Dir, num, den}
}

// rangeEdge returns the index of the ring's edge that direction d meets, its start included and its end not. O(log n).
func rangeEdge(ring []exact.Pt, eye exact.Pt, d exact.Vec) int {
	first := ring[0].Sub(eye)
	lo, hi := 0, len(ring)
	for hi-lo > 1 {
		mid := (lo + hi) / 2
		if v := ring[mid].Sub(eye); turnsBefore(first, v, d) || sameWay(v, d) {
			lo = mid
		} else {
			hi = mid
		}
	}
	return lo
}
