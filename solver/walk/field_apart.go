package walk

import "math"

// bound returns a distance that no point of the triangle exceeds: nowhere does it grow faster than the way.
func (s *spanner) bound() float64 {
	least := math.Inf(1)
	for i, p := range s.tri.P {
		v := p.Sub(s.at)
		a, b := s.tri.P[inc[i]].Sub(p), s.tri.P[inc[inc[i]]].Sub(p)
		least = min(least, s.least(float64(v.X), float64(v.Y))+math.Sqrt(float64(max(a.Len2(), b.Len2()))))
	}
	return least
}

// crossings measures the pair of triangles where it is as far by way of two roots at an edge or a cone's side, and where it is
// as far by way of three.
func (s *spanner) crossings() {
	for i := range s.sites {
		for j := range i {
			if s.parts[i].root == s.parts[j].root {
				continue
			}
			between := s.between(i, j)
			for _, w := range s.lines {
				s.meet(i, j, between, s.along(i, w))
			}
			for _, k := range [4]int{2 * i, 2*i + 1, 2 * j, 2*j + 1} {
				s.meet(i, j, between, s.along(i, s.sides[k]))
			}
			for k := range j {
				s.meet(i, j, between, s.between(i, k))
			}
		}
	}
}

// plane is an equation nx·x + ny·y - w·r = c for a point at offset x, y from a root and its distance r from there.
type plane struct{ nx, ny, w, c float64 }

// between returns the equation of the points that are as far by way of part j's root as by way of part i's, as offsets from
// the latter: the difference of the squares of |p| = r and |p - q| = r - g.
func (s *spanner) between(i, j int) plane {
	a, b := &s.sites[i], &s.sites[j]
	x, y, g := b.x-a.x, b.y-a.y, b.g-a.g
	return plane{x, y, g, (x*x + y*y - g*g) / 2}
}

// along returns the equation of a line, as offsets from part i's root.
func (s *spanner) along(i int, w wall) plane {
	return plane{w.nx, w.ny, 0, w.h - w.nx*s.sites[i].x - w.ny*s.sites[i].y}
}

// meet tries the points, at most two, that fulfil both equations, if both triangles and the cones of parts i and j hold them.
func (s *spanner) meet(i, j int, p, q plane) {
	try := func(x, y float64) {
		x, y = x+s.sites[i].x, y+s.sites[i].y
		for _, w := range s.lines {
			if !w.holds(x, y) {
				return
			}
		}
		for _, k := range [4]int{2 * i, 2*i + 1, 2 * j, 2*j + 1} {
			if !s.sides[k].holds(x, y) {
				return
			}
		}
		s.offerFar(s.least(x, y), x, y)
	}
	det := p.nx*q.ny - p.ny*q.nx
	if det == 0 {
		parallel(p, q, try)
		return
	}
	// Both equations make the point a linear function of its distance r: a + b r. Then |a + b r|² = r².
	ax, ay := (p.c*q.ny-q.c*p.ny)/det, (p.nx*q.c-q.nx*p.c)/det
	bx, by := (p.w*q.ny-q.w*p.ny)/det, (p.nx*q.w-q.nx*p.w)/det
	roots(bx*bx+by*by-1, ax*bx+ay*by, ax*ax+ay*ay, func(r float64) { try(ax+bx*r, ay+by*r) })
}

// parallel solves two equations whose lines are parallel: they tell the distance r, and the point lies on a line and a circle.
func parallel(p, q plane, try func(x, y float64)) {
	k := q.nx / p.nx
	if math.Abs(p.ny) > math.Abs(p.nx) {
		k = q.ny / p.ny
	}
	r := (q.c - k*p.c) / (k*p.w - q.w)
	n2 := p.nx*p.nx + p.ny*p.ny
	h := (p.c + p.w*r) / n2
	off := r*r/n2 - h*h
	if !(r >= 0 && off >= 0) {
		return
	}
	off = math.Sqrt(off)
	try(h*p.nx-off*p.ny, h*p.ny+off*p.nx)
	try(h*p.nx+off*p.ny, h*p.ny-off*p.nx)
}

// roots calls do for the solutions r of a r² + 2 b r + c = 0 that are no less than 0.
func roots(a, b, c float64, do func(r float64)) {
	disc := b*b - a*c
	if disc < 0 {
		return
	}
	// The sum without cancellation gives one solution, the product of both the other.
	sum := -b - math.Copysign(math.Sqrt(disc), b)
	if r := sum / a; r >= 0 && !math.IsInf(r, 1) {
		do(r)
	}
	if r := c / sum; r >= 0 && !math.IsInf(r, 1) {
		do(r)
	}
}
