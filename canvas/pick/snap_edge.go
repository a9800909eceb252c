package pick

import (
	"enfilade/solver/exact"
)

// onEdge returns where the place goes on the line it is near: to the foot of the way from the line's beginning, else to
// where a guide line meets it, else to the snap grid along a level or upright line, else to its own foot.
func (f *search) onEdge() Snap {
	s := f.along.snap
	a, b := s.Edge[0], s.Edge[1]
	if at, ok := f.squareFoot(a, b); ok {
		s.At, s.Kind = at, SnapSquare
		return s
	}
	best := f.reach
	found := false
	for _, r := range []*ray{&f.up, &f.level} {
		at, ok := f.meets(r, a, b)
		if d := f.s.dist(spotOf(at)); ok && d <= best {
			best, found = d, true
			s.At, s.Guides[0] = at, Guide{r.from, at}
		}
	}
	if found {
		return s
	}
	foot, _ := f.s.foot(a, b)
	s.At = alongEdge(foot, a, b, f.step)
	return s
}

// squareFoot returns the foot of the line's beginning on a piece, when it lies on the piece and near the place.
func (f *search) squareFoot(a, b exact.Pt) (exact.Pt, bool) {
	if f.to.From == nil || !f.n.On.Has(SnapSquare) {
		return exact.Pt{}, false
	}
	from := *f.to.From
	l := exact.Through(a, b)
	t, len2 := l.Dir.Dot(from.Sub(a)), l.Dir.Len2()
	if t < 0 || t > len2 || l.Side(from) == 0 {
		return exact.Pt{}, false
	}
	at := partOf(a, l.Dir, t, len2)
	return at, at != from && f.s.dist(spotOf(at)) <= f.reach
}

// meets returns where a level or upright guide line meets a piece.
func (f *search) meets(r *ray, a, b exact.Pt) (exact.Pt, bool) {
	if !r.ok || r.from == a || r.from == b {
		return exact.Pt{}, false
	}
	l, g := exact.Through(a, b), exact.Line{At: r.from, Dir: r.dir}
	num, den := l.Meet(g)
	if den < 0 {
		num, den = -num, -den
	}
	if den == 0 || num < 0 || num > den {
		return exact.Pt{}, false
	}
	return partOf(a, l.Dir, num, den), true
}

// alongEdge returns the grid point for a foot on a piece: on a level or upright piece it takes steps along it.
func alongEdge(f spot, a, b exact.Pt, step int32) exact.Pt {
	switch {
	case a.Y == b.Y:
		return exact.Pt{X: within(rounded(f.x, step), a.X, b.X), Y: a.Y}
	case a.X == b.X:
		return exact.Pt{X: a.X, Y: within(rounded(f.y, step), a.Y, b.Y)}
	}
	return f.grid()
}

func within(v, a, b int32) int32 { return min(max(v, min(a, b)), max(a, b)) }

// crossing returns where two pieces cross or touch, rounded exactly to the nearest grid point; not for parallel ones.
func crossing(a, b, c, d exact.Pt) (exact.Pt, bool) {
	if exact.Orient(a, b, c)*exact.Orient(a, b, d) > 0 || exact.Orient(c, d, a)*exact.Orient(c, d, b) > 0 {
		return exact.Pt{}, false
	}
	l := exact.Through(a, b)
	num, den := l.Meet(exact.Through(c, d))
	if den == 0 {
		return exact.Pt{}, false
	}
	if den < 0 {
		num, den = -num, -den
	}
	return partOf(a, l.Dir, num, den), true
}

// middleOf returns the grid point nearest to the middle of ab; halves go up.
func middleOf(a, b exact.Pt) exact.Pt { return partOf(a, b.Sub(a), 1, 2) }

// partOf returns the grid point nearest to a + v num/den, for 0 <= num <= den; halves go up. num and den stay below 2^61.
func partOf(a exact.Pt, v exact.Vec, num, den int64) exact.Pt {
	half := exact.Mul(den, 1)
	x := exact.Mul(2*int64(v.X), num).Add(half).FloorDiv(2 * den)
	y := exact.Mul(2*int64(v.Y), num).Add(half).FloorDiv(2 * den)
	return a.Add(exact.Vec{X: int32(x), Y: int32(y)})
}
