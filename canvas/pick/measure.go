package pick

import (
	"math"

	"enfilade/canvas/view"
	"enfilade/solver/exact"
	"enfilade/solver/plan"
)

// spot is a place in grid units, as floats: the pointer, or a foot on a line.
type spot struct{ x, y float64 }

func spotOf(p exact.Pt) spot { return spot{float64(p.X), float64(p.Y)} }

// pointer returns the plan's place under a pixel, not rounded to the grid.
func pointer(cam view.Camera, x, y float64) spot {
	mm := cam.MM(x, y)
	return spot{mm[0] * exact.PerMM, mm[1] * exact.PerMM}
}

// units returns how many grid units so many px at 100 % are.
func units(cam view.Camera, px float64) float64 { return px * cam.K / cam.Scale * exact.PerMM }

// dist is below 2^31 and needs no care against overflow.
func (s spot) dist(t spot) float64 { return math.Sqrt(s.dist2(t)) }

func (s spot) dist2(t spot) float64 {
	dx, dy := s.x-t.x, s.y-t.y
	return dx*dx + dy*dy
}

// grid returns the nearest grid point, held inside the legal range.
func (s spot) grid() exact.Pt {
	return exact.Pt{X: held(s.x), Y: held(s.y)}
}

func held(v float64) int32 {
	return int32(math.Round(min(max(v, -float64(plan.MaxCoord)), float64(plan.MaxCoord))))
}

// foot returns the point of the segment ab nearest to s, and how far along it lies in units from a.
func (s spot) foot(a, b exact.Pt) (f spot, along float64) {
	ax, ay := float64(a.X), float64(a.Y)
	dx, dy := float64(b.X)-ax, float64(b.Y)-ay
	len2 := dx*dx + dy*dy
	if len2 == 0 {
		return spot{ax, ay}, 0
	}
	t := min(max(((s.x-ax)*dx+(s.y-ay)*dy)/len2, 0), 1)
	return spot{ax + t*dx, ay + t*dy}, t * math.Sqrt(len2)
}

// aside returns how far s lies to the left of the line from a to b, in units; negative to the right.
func (s spot) aside(a, b exact.Pt) float64 {
	return s.beside(a, float64(b.X)-float64(a.X), float64(b.Y)-float64(a.Y))
}

// beside returns how far s lies to the left of the line through a in the direction (dx, dy).
func (s spot) beside(a exact.Pt, dx, dy float64) float64 {
	l := math.Sqrt(dx*dx + dy*dy)
	if l == 0 {
		return 0
	}
	return (dx*(s.y-float64(a.Y)) - dy*(s.x-float64(a.X))) / l
}

// edges calls f for every straight piece of a chain, closing it when it is a ring, until f returns false.
func edges(c plan.Chain, ring bool, f func(i int, a, b exact.Pt) bool) {
	n := c.Len()
	for i := 0; i+1 < n; i++ {
		if !f(i, c.At(i), c.At(i+1)) {
			return
		}
	}
	if ring && n > 1 {
		f(n-1, c.At(n-1), c.At(0))
	}
}

// off reports whether s lies farther than r from the box around ab.
func (s spot) off(a, b exact.Pt, r float64) bool {
	return s.x < float64(min(a.X, b.X))-r || s.x > float64(max(a.X, b.X))+r || s.y < float64(min(a.Y, b.Y))-r || s.y > float64(max(a.Y, b.Y))+r
}

// outlineDist returns the distance from s to a chain or ring, infinite for an empty one.
func (s spot) outlineDist(c plan.Chain, ring bool) float64 {
	best := math.Inf(1)
	edges(c, ring, func(_ int, a, b exact.Pt) bool {
		f, _ := s.foot(a, b)
		best = min(best, s.dist(f))
		return true
	})
	return best
}

// inside reports whether s lies in a ring, by the number of its edges that a ray to the right crosses.
func (s spot) inside(ring plan.Chain) bool {
	in := false
	edges(ring, true, func(_ int, a, b exact.Pt) bool {
		ay, by := float64(a.Y), float64(b.Y)
		if (ay > s.y) != (by > s.y) && s.x < float64(a.X)+(s.y-ay)/(by-ay)*float64(b.X-a.X) {
			in = !in
		}
		return true
	})
	return in
}

// apart reports whether s lies farther than r from the box around a chain: a quick no.
func (s spot) apart(c plan.Chain, r float64) bool {
	if c.Len() == 0 {
		return true
	}
	b := boxAround(c)
	return s.off(b.lo, b.hi, r)
}
