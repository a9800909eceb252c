package plantest

import (
	"math/big"
	"slices"

	"enfilade/solver/exact"
)

// Piece is a straight piece of a region's border.
type Piece struct {
	A, B Spot
	Wall bool // it runs on something that stops sight; else the floor goes on behind it
}

// border finds the pieces of a region's border: the far side of every gap, and along each critical direction the stretch
// that lies in the region of one of its two gaps only.
//
// Such a stretch is wall where an edge that stops sight runs along it (a face or a thin wall seen edge-on, with the region
// on one side of it) and occluding elsewhere. Where the region lies on both sides there is no border, wall or not.
func (w *Twin) border(r *Region, height int32) {
	zero := new(big.Rat)
	for i, g := range r.Gaps {
		before := r.Gaps[(i+len(r.Gaps)-1)%len(r.Gaps)]
		lo, hi := before.K2, g.K1
		if before.Edge < 0 {
			lo = zero
		}
		if g.Edge < 0 {
			hi = zero
		}
		if lo.Cmp(hi) > 0 {
			lo, hi = hi, lo
		}
		if lo.Cmp(hi) < 0 {
			w.alongRay(r, g.D1, lo, hi, height)
		}
		if g.Edge >= 0 {
			r.Border = append(r.Border, Piece{g.P1, g.P2, true})
		}
	}
}

// alongRay adds the border from eye + lo d to eye + hi d, cut where walls run along it.
func (w *Twin) alongRay(r *Region, d exact.Vec, lo, hi *big.Rat, height int32) {
	type stretch struct{ from, to *big.Rat }
	var walls []stretch
	for i, e := range w.g.Edges {
		a, b := w.g.Pts[e.A].Sub(r.Eye), w.g.Pts[e.B].Sub(r.Eye)
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
	add := func(from, to *big.Rat, wall bool) {
		if from.Cmp(to) < 0 {
			r.Border = append(r.Border, Piece{spotAt(r.Eye, d, from), spotAt(r.Eye, d, to), wall})
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
			add(at, from, false)
			add(from, to, true)
			at = to
		}
	}
	add(at, hi, false)
}

// WallLength and OccludingLength return the two parts of the border's length, in grid units.
func (r *Region) WallLength() float64      { return r.length(true) }
func (r *Region) OccludingLength() float64 { return r.length(false) }

func (r *Region) length(wall bool) float64 {
	sum := 0.0
	for _, p := range r.Border {
		if p.Wall == wall {
			sum += dist(p.A, p.B)
		}
	}
	return sum
}
