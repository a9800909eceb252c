package sight

import (
	"cmp"
	"math"
	"slices"

	"enfilade/solver/exact"
)

// corner is a point of a border in lowest terms, so that equal points are equal values.
type corner struct {
	x, y   exact.Int128
	dx, dy int64
}

// cornerAt returns the point at t of line l. The numerators stay below 2^92.
func cornerAt(l exact.Line, t fraction) corner {
	g := gcd(t.num, t.den)
	num, den := t.num/g, t.den/g
	part := func(at, dir int32) (exact.Int128, int64) {
		h := gcd(int64(dir), den) // num and den have no common factor
		d := den / h
		return exact.Mul(int64(at), d).Add(exact.Mul(int64(dir)/h, num)), d
	}
	var c corner
	c.x, c.dx = part(l.At.X, l.Dir.X)
	c.y, c.dy = part(l.At.Y, l.Dir.Y)
	return c
}

// offset returns the point minus origin in grid units; it only measures.
func (c corner) offset(origin exact.Pt) [2]float64 {
	part := func(num exact.Int128, den int64, o int32) float64 {
		return num.Sub(exact.Mul(int64(o), den)).Float() / float64(den)
	}
	return [2]float64{part(c.x, c.dx, origin.X), part(c.y, c.dy, origin.Y)}
}

// gcd returns the greatest common divisor, at least 1 unless both are 0.
func gcd(a, b int64) int64 {
	for b != 0 {
		a, b = b, a%b
	}
	return max(a, -a)
}

// rings strings the stretches together. Where several rings meet at a corner, each goes on along the border of the part it came
// along.
func (u *union) rings(origin exact.Pt) []Region {
	starts := make(map[corner][]int, len(u.stretches))
	for i, s := range u.stretches {
		c := cornerAt(s.line, s.t0)
		starts[c] = append(starts[c], i)
	}
	used := make([]bool, len(u.stretches))
	var all []Region
	for i := range u.stretches {
		if used[i] {
			continue
		}
		var loop []int
		for k := i; !used[k]; k = u.follow(k, starts) {
			used[k] = true
			loop = append(loop, k)
		}
		all = append(all, u.ring(loop, origin))
	}
	slices.SortFunc(all, func(a, b Region) int {
		pa, pb := a.xy[a.first], b.xy[b.first]
		return cmp.Or(cmp.Compare(b.Area(), a.Area()), cmp.Compare(pa[0], pb[0]), cmp.Compare(pa[1], pb[1]))
	})
	return all
}

// follow returns the stretch that goes on from stretch k: at its end, the first border clockwise from the way back.
func (u *union) follow(k int, starts map[corner][]int) int {
	s := &u.stretches[k]
	list := starts[cornerAt(s.line, s.t1)]
	best := list[0]
	for _, i := range list[1:] {
		if turnsBefore(s.line.Dir.Neg(), u.stretches[best].line.Dir, u.stretches[i].line.Dir) {
			best = i
		}
	}
	return best
}

// ring makes a closed loop of stretches a ring without straight corners.
func (u *union) ring(loop []int, origin exact.Pt) Region {
	r := Region{Eye: origin}
	n := len(loop)
	for i, k := range loop {
		s, before := &u.stretches[k], &u.stretches[loop[(i+n-1)%n]]
		if s.kind == before.kind && sameWay(s.line.Dir, before.line.Dir) {
			continue
		}
		v := Vertex{s.line.At, s.line.Dir, s.t0.num, s.t0.den}
		r.ring = append(r.ring, v)
		r.kinds = append(r.kinds, s.kind)
		r.xy = append(r.xy, cornerAt(s.line, s.t0).offset(origin))
	}
	r.canonical()
	return r
}

// Measure returns the area of the union of regions and holes as Outline gives them, in grid units squared, and the length of
// their border by kind, in grid units.
func Measure(rings []Region) (area float64, lengths [3]float64) {
	for i := range rings {
		area += rings[i].Area()
		for k, l := range rings[i].Lengths() {
			lengths[k] += l
		}
	}
	return math.Max(area, 0), lengths
}
