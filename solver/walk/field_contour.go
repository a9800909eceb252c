package walk

import (
	"context"
	"math"
	"slices"

	"enfilade/solver/mesh"
	"enfilade/solver/pulse"
)

// Contours calls do for every piece of the lines on which the distance is a multiple of step: a multiple and a polyline in grid
// units, valid until do returns. The pieces are those of single triangles; they join at the triangles' edges.
//
// A contour is made of arcs around roots. Within a triangle, an arc is cut where it leaves the triangle or the root's cone, and
// where another root's cone holds places that are nearer. Points of a polyline lie on the arc, and its chords stray from it by
// no more than flat grid units, towards the start. The cuts are measured, not decided exactly: they place the ends of pieces to
// a part in 2^40 of the radius.
//
//   - Errors: the context's when it is cancelled.
//   - Cost: for each triangle with k parts and each multiple, O(k² log k) and the points of the polylines; no allocation once
//     the buffers have grown.
func (d *Field) Contours(ctx context.Context, step, flat float64, do func(level float64, line [][2]float64)) error {
	return d.ContoursIn(ctx, 0, d.Triangles(), step, flat, do)
}

// Triangles returns the number of triangles that the field lies on.
func (d *Field) Triangles() int { return len(d.m.Tris) }

// ContoursIn is Contours for the triangles from lo up to hi alone. Several may run at once.
func (d *Field) ContoursIn(ctx context.Context, lo, hi int, step, flat float64, do func(level float64, line [][2]float64)) error {
	c := contourer{field: d, flat: flat, do: do}
	for t := lo; t < hi; t++ {
		if err := pulse.Step(ctx, t-lo, hi-lo); err != nil {
			return err
		}
		if c.tri, c.parts = &d.m.Tris[t], d.of(int32(t)); len(c.parts) == 0 {
			continue
		}
		near, far := c.begin()
		for n := math.Max(math.Ceil(near/step), 1); n*step <= far; n++ {
			for i := range c.parts {
				c.arc(i, n*step)
			}
		}
	}
	return nil
}

// contourer draws the contours of one triangle after another.
type contourer struct {
	field *Field
	flat  float64
	do    func(level float64, line [][2]float64)
	tri   *mesh.Tri
	parts []part
	spans [][2]float64 // of each part, distances that none of the triangle's points has less of, or more
	cuts  []float64
	line  [][2]float64
}

// begin measures the parts of a triangle and returns a distance that no point of it falls short of, and one that none
// exceeds: from a corner on, it grows no faster than the way.
func (c *contourer) begin() (near, far float64) {
	c.spans = c.spans[:0]
	near, far = math.Inf(1), math.Inf(1)
	var corners [3]float64
	for i := range corners {
		corners[i] = math.Inf(1)
	}
	for i := range c.parts {
		k := &c.parts[i]
		lo, hi := c.span(k)
		c.spans = append(c.spans, [2]float64{lo, hi})
		near = min(near, lo)
		for n, p := range c.tri.P {
			if v := p.Sub(c.field.roots[k.root].at); k.r.Cross(v) >= 0 && v.Cross(k.l) >= 0 {
				corners[n] = min(corners[n], c.field.roots[k.root].g+math.Sqrt(float64(v.Len2())))
			}
		}
	}
	for n, p := range c.tri.P {
		a, b := c.tri.P[inc[n]].Sub(p), c.tri.P[inc[inc[n]]].Sub(p)
		far = min(far, corners[n]+math.Sqrt(float64(max(a.Len2(), b.Len2()))))
	}
	return near, far
}

// span returns the least and the greatest distance that the triangle's points can have by way of a part.
func (c *contourer) span(k *part) (lo, hi float64) {
	from := &c.field.roots[k.root]
	in := true
	near := math.Inf(1)
	for i, p := range c.tri.P {
		v, w := p.Sub(from.at), c.tri.P[inc[i]].Sub(from.at)
		hi = max(hi, float64(v.Len2()))
		in = in && v.Cross(w) >= 0
		f := c.tri.P[inc[i]].Sub(p)
		s := min(max(-float64(v.Dot(f))/float64(f.Len2()), 0), 1)
		near = min(near, math.Hypot(float64(v.X)+s*float64(f.X), float64(v.Y)+s*float64(f.Y)))
	}
	if in {
		near = 0
	}
	return from.g + near, from.g + math.Sqrt(hi)
}

// arc draws what part i has of the contour at a level.
func (c *contourer) arc(i int, level float64) {
	k := &c.parts[i]
	from := &c.field.roots[k.root]
	if s := c.spans[i]; level < s[0] || level > s[1] || level <= from.g {
		return
	}
	a := arc{radius: level - from.g}
	long := math.Sqrt(float64(k.r.Len2()))
	a.ux, a.uy = float64(k.r.X)/long, float64(k.r.Y)/long
	a.end = math.Atan2(float64(k.r.Cross(k.l)), float64(k.r.Dot(k.l)))
	a.point()
	if !c.enter(&a, from) {
		return
	}
	a.point()
	for j := range c.parts {
		if j != i && c.spans[j][0] < level {
			c.cutByPart(&a, k, &c.parts[j], level)
		}
	}
	slices.Sort(c.cuts)
	// Sides that two cones share are met twice, a few roundings apart; between them there is nothing to draw.
	c.cuts = slices.CompactFunc(c.cuts, func(u, v float64) bool { return math.Abs(u-v) < 0x1p-40 })
	begun := -1.0
	for n := 1; n < len(c.cuts); n++ {
		x, y := a.at((c.cuts[n-1] + c.cuts[n]) / 2)
		switch drawn := c.within(from, x, y) && c.leads(i, x, y, level); {
		case drawn && begun < 0:
			begun = c.cuts[n-1]
		case !drawn && begun >= 0:
			c.draw(&a, from, begun, c.cuts[n-1], level)
			begun = -1
		}
	}
	if begun >= 0 {
		c.draw(&a, from, begun, c.cuts[len(c.cuts)-1], level)
	}
}

// enter cuts the arc by the triangle and narrows it to what lies between the first and the last point there. It reports false
// when nothing does: most arcs end here.
func (c *contourer) enter(a *arc, from *root) bool {
	c.cuts = append(c.cuts[:0], 0, a.end)
	for e, p := range c.tri.P {
		v, w := p.Sub(from.at), c.tri.P[inc[e]]
		c.cutByLine(a, float64(v.X), float64(v.Y), float64(w.X-p.X), float64(w.Y-p.Y))
	}
	slices.Sort(c.cuts)
	first, last := -1, -1
	for n := 1; n < len(c.cuts); n++ {
		if x, y := a.at((c.cuts[n-1] + c.cuts[n]) / 2); c.within(from, x, y) {
			if last = n; first < 0 {
				first = n - 1
			}
		}
	}
	if first < 0 {
		return false
	}
	c.cuts = append(c.cuts[:0], c.cuts[first:last+1]...)
	a.start, a.end = c.cuts[0], c.cuts[len(c.cuts)-1]
	return true
}

// arc is a stretch of a circle around a root, less than half of it; angles are counted from the right side of a cone.
type arc struct {
	radius, ux, uy, start, end float64

	sx, sy, ex, ey float64 // directions from the root to its start and its end
}

// point finds the directions to the arc's start and end.
func (a *arc) point() {
	s, c := math.Sincos(a.start)
	a.sx, a.sy = c*a.ux-s*a.uy, s*a.ux+c*a.uy
	s, c = math.Sincos(a.end)
	a.ex, a.ey = c*a.ux-s*a.uy, s*a.ux+c*a.uy
}

// at returns the point of the arc at an angle, as an offset from the root.
func (a *arc) at(angle float64) (x, y float64) {
	s, c := math.Sincos(angle)
	return a.radius * (c*a.ux - s*a.uy), a.radius * (s*a.ux + c*a.uy)
}

// cut notes the angle of the point at an offset from the root, if it lies on the arc.
func (c *contourer) cut(a *arc, x, y float64) {
	if a.sx*y-a.sy*x < 0 || a.ex*y-a.ey*x > 0 {
		return // most do not, and angles take long to measure
	}
	if angle := math.Atan2(a.ux*y-a.uy*x, a.ux*x+a.uy*y); angle > a.start && angle < a.end {
		c.cuts = append(c.cuts, angle)
	}
}

// cutByLine cuts the arc where it meets the line through the point at offset x, y in direction fx, fy.
func (c *contourer) cutByLine(a *arc, x, y, fx, fy float64) {
	off, long := x*fy-y*fx, fx*fx+fy*fy
	if a.radius*a.radius*long <= off*off {
		return
	}
	long = math.Sqrt(long)
	fx, fy, off = fx/long, fy/long, off/long
	along := x*fx + y*fy
	if half := a.radius*a.radius - off*off; half > 0 {
		half = math.Sqrt(half)
		footX, footY := x-along*fx, y-along*fy
		c.cut(a, footX+half*fx, footY+half*fy)
		c.cut(a, footX-half*fx, footY-half*fy)
	}
}

// cutByPart cuts the arc of part k where places begin to be nearer by way of another part.
func (c *contourer) cutByPart(a *arc, k, other *part, level float64) {
	p, q := &c.field.roots[k.root], &c.field.roots[other.root]
	v := q.at.Sub(p.at)
	x, y := float64(v.X), float64(v.Y)
	c.cutByLine(a, x, y, float64(other.r.X), float64(other.r.Y))
	c.cutByLine(a, x, y, float64(other.l.X), float64(other.l.Y))
	apart, radius := math.Hypot(x, y), level-q.g
	if apart == 0 || radius <= 0 {
		return
	}
	along := (a.radius*a.radius - radius*radius + apart*apart) / (2 * apart)
	if half := a.radius*a.radius - along*along; half > 0 {
		half = math.Sqrt(half)
		x, y = x/apart, y/apart
		c.cut(a, along*x-half*y, along*y+half*x)
		c.cut(a, along*x+half*y, along*y-half*x)
	}
}

// within reports whether the point at an offset from a root lies in the triangle.
func (c *contourer) within(from *root, x, y float64) bool {
	for i, p := range c.tri.P {
		v, w := p.Sub(from.at), c.tri.P[inc[i]]
		if float64(w.X-p.X)*(y-float64(v.Y))-float64(w.Y-p.Y)*(x-float64(v.X)) < 0 {
			return false
		}
	}
	return true
}

// leads reports whether no other part reaches the point at an offset from part i's root before the level.
func (c *contourer) leads(i int, x, y, level float64) bool {
	at := c.field.roots[c.parts[i].root].at
	for j := range c.parts {
		if j == i || c.spans[j][0] > level {
			continue
		}
		v := at.Sub(c.field.roots[c.parts[j].root].at)
		if far, ok := c.field.from(&c.parts[j], x+float64(v.X), y+float64(v.Y)); ok && (far < level || far == level && j < i) {
			return false
		}
	}
	return true
}

// draw flattens the arc between two angles: the chord of an angle strays from a circle by the radius times 1 - cos of its half.
func (c *contourer) draw(a *arc, from *root, start, end, level float64) {
	most := 2 * math.Acos(max(1-c.flat/a.radius, 0))
	n := max(int(math.Ceil((end-start)/most)), 1)
	c.line = c.line[:0]
	for i := range n + 1 {
		x, y := a.at(start + (end-start)*float64(i)/float64(n))
		c.line = append(c.line, [2]float64{float64(from.at.X) + x, float64(from.at.Y) + y})
	}
	c.do(level, c.line)
}
