package plantest

import (
	"math/big"
	"slices"

	"enfilade/solver/exact"
)

// Kind says what a piece of a region's border is.
type Kind uint8

// The kinds of border.
const (
	OnWall    Kind = iota // on something that stops sight
	Occluding             // the floor goes on behind it
	OnSide                // on a side of the view
	kinds
)

// Piece is a straight piece of a region's border.
type Piece struct {
	A, B Spot
	Kind Kind
}

// border finds the pieces of a region's border: the far side of every gap, and along each critical direction the stretch
// that lies in the region of one of its two gaps only.
//
// The pieces are in order and run counter-clockwise. A stretch along a direction is wall where an edge that stops sight runs along it (a face or a thin wall seen edge-on, with the region
// on one side of it) and occluding elsewhere. Where the region lies on both sides there is no border, wall or not.
func (w *Twin) border(r *Region, height int32, v *View) {
	zero := new(big.Rat)
	for i, g := range r.Gaps {
		before := r.Gaps[(i+len(r.Gaps)-1)%len(r.Gaps)]
		from, to := before.K2, g.K1
		if before.Edge < 0 {
			from = zero
		}
		if g.Edge < 0 {
			to = zero
		}
		open := Occluding
		if v.side(g.D1) {
			open = OnSide
		}
		switch from.Cmp(to) {
		case -1:
			r.Border = append(r.Border, w.alongRay(r.Eye, g.D1, from, to, height, open)...)
		case 1:
			r.Border = append(r.Border, reversed(w.alongRay(r.Eye, g.D1, to, from, height, open))...)
		}
		if g.Edge >= 0 {
			r.Border = append(r.Border, Piece{g.P1, g.P2, OnWall})
		}
	}
}

// reversed returns the pieces run through the other way.
func reversed(pieces []Piece) []Piece {
	slices.Reverse(pieces)
	for i, p := range pieces {
		pieces[i].A, pieces[i].B = p.B, p.A
	}
	return pieces
}

// alongRay returns the border from eye + lo d to eye + hi d, cut where walls run along it; where none does it is of the
// kind open.
func (w *Twin) alongRay(eye exact.Pt, d exact.Vec, lo, hi *big.Rat, height int32, open Kind) []Piece {
	type stretch struct{ from, to *big.Rat }
	var walls []stretch
	for i, e := range w.g.Edges {
		a, b := w.g.Pts[e.A].Sub(eye), w.g.Pts[e.B].Sub(eye)
		if d.Cross(a) != 0 || d.Cross(b) != 0 || !w.stopsSight(int32(i), height) {
			continue
		}
		s := stretch{big.NewRat(d.Dot(a), d.Len2()), big.NewRat(d.Dot(b), d.Len2())}
		if s.from.Cmp(s.to) > 0 {
			s.from, s.to = s.to, s.from
		}
		walls = append(walls, s)
	}
	slices.SortFunc(walls, func(a, b stretch) int { return a.from.Cmp(b.from) })
	var pieces []Piece
	add := func(from, to *big.Rat, k Kind) {
		if from.Cmp(to) < 0 {
			pieces = append(pieces, Piece{spotAt(eye, d, from), spotAt(eye, d, to), k})
		}
	}
	at := lo
	for _, s := range walls {
		from, to := s.from, s.to
		if from.Cmp(at) < 0 {
			from = at
		}
		if to.Cmp(hi) > 0 {
			to = hi
		}
		if from.Cmp(to) < 0 {
			add(at, from, open)
			add(from, to, OnWall)
			at = to
		}
	}
	add(at, hi, open)
	return pieces
}

// Ring returns the border with neighbouring pieces made one where they lie on one line and are of one kind. It touches
// itself where the region does, and runs through the eye where the eye is on the border.
func (r *Region) Ring() []Piece {
	ring := slices.Clone(r.Border)
	goOn := func(p, q Piece) bool {
		d, e := p.A.arrow(p.B), q.A.arrow(q.B)
		return p.Kind == q.Kind && d.same(e)
	}
	for i := 0; i < len(ring) && len(ring) > 1; {
		next := (i + 1) % len(ring)
		if !goOn(ring[i], ring[next]) {
			i++
			continue
		}
		ring[i].B = ring[next].B
		ring = slices.Delete(ring, next, next+1)
		if next < i {
			i--
		}
	}
	return ring
}

// Lengths returns the border's length by kind, in grid units.
func (r *Region) Lengths() [3]float64 {
	var sum [kinds]float64
	for _, p := range r.Border {
		sum[p.Kind] += dist(p.A, p.B)
	}
	return sum
}
