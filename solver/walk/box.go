package walk

import (
	"enfilade/solver/exact"
	"enfilade/solver/mesh"
)

// box is a bounding box; the zero box, which is empty, has no width.
type box struct{ lo, hi exact.Pt }

func boxOf(t *mesh.Tri) box {
	a, b, c := t.P[0], t.P[1], t.P[2]
	return box{exact.Pt{X: min(a.X, b.X, c.X), Y: min(a.Y, b.Y, c.Y)}, exact.Pt{X: max(a.X, b.X, c.X), Y: max(a.Y, b.Y, c.Y)}}
}

func (b box) empty() bool { return b.lo == b.hi }

func (b box) with(o box) box {
	if b.empty() {
		return o
	}
	return box{exact.Pt{X: min(b.lo.X, o.lo.X), Y: min(b.lo.Y, o.lo.Y)}, exact.Pt{X: max(b.hi.X, o.hi.X), Y: max(b.hi.Y, o.hi.Y)}}
}

// meets reports whether two boxes share more than a border.
func (b box) meets(o box) bool {
	return b.lo.X < o.hi.X && o.lo.X < b.hi.X && b.lo.Y < o.hi.Y && o.lo.Y < b.hi.Y && !b.empty() && !o.empty()
}

// gap2 returns the squared distance of two boxes, below 2^61.
func (b *box) gap2(o *box) int64 {
	dx := int64(max(b.lo.X-o.hi.X, o.lo.X-b.hi.X, 0))
	dy := int64(max(b.lo.Y-o.hi.Y, o.lo.Y-b.hi.Y, 0))
	return dx*dx + dy*dy
}

// size2 returns the square of the longer side.
func (b *box) size2() int64 {
	long := max(int64(b.hi.X)-int64(b.lo.X), int64(b.hi.Y)-int64(b.lo.Y))
	return long * long
}

// boxAt returns the box of two points.
func boxAt(a, b exact.Pt) box {
	return box{exact.Pt{X: min(a.X, b.X), Y: min(a.Y, b.Y)}, exact.Pt{X: max(a.X, b.X), Y: max(a.Y, b.Y)}}
}
