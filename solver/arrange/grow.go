package arrange

import (
	"enfilade/solver/exact"
	"enfilade/solver/mesh"
	"enfilade/solver/plan"
)

// Grow returns o with one body more: the floor on which a walker of the given radius cannot stand because something that
// stops walking is too near. It stops walking only, and its outline is drawn around everything that does in the mesh m of
// o's rounded graph.
//
// The grown body is the sum of the obstacles and the walker's polygon (Disc). Its outline is the convolution of the two
// (Guibas, Ramshaw and Stolfi, "A kinetic framework for computational geometry", FOCS 1983): every edge of an obstacle moved
// out by the polygon's farthest corner, and around every outward corner the polygon's own sides. Places about which it winds
// are those nearer than the polygon; at an inward corner the outline goes back to the corner, which no arithmetic can get
// wrong, or, where both edges run along the axes and are long, straight to the crossing of the two edges moved out. All its
// corners are sums of grid points, so nothing is rounded before the crossings are.
//
// The outline goes along the obstacles with the floor on its other side, so it winds about open floor once the wrong way
// round: a ring around everything makes that up, and what it makes solid besides is solid already.
//
//   - Cost: O(n) segments for n edges; an outward corner adds up to half the polygon's sides.
func Grow(o *Outline, m *mesh.Mesh, radius int32, sides int) *Outline {
	disc, _ := Disc(radius, sides)
	g := grower{mesh: m, disc: disc, out: &Outline{
		Items:  append(append([]plan.Ref(nil), o.Items...), plan.Ref{Kind: plan.KindWalker}),
		Bodies: append([]Body(nil), o.Bodies...),
	}}
	for _, v := range disc {
		g.reach = max(g.reach, v.X)
	}
	g.item = int32(len(g.out.Items) - 1)
	g.body = int32(len(g.out.Bodies))
	g.out.Bodies = append(g.out.Bodies, Body{Stops: Stops{Walk: true}, Item: g.item})
	// Twice over: to count the segments first takes less memory than a list that grows.
	count := 0
	g.emit = func(Segment) { count++ }
	g.draw(o)
	g.out.Segments = append(make([]Segment, 0, len(o.Segments)+count), o.Segments...)
	g.emit = func(s Segment) { g.out.Segments = append(g.out.Segments, s) }
	g.draw(o)
	return g.out
}

type grower struct {
	mesh       *mesh.Mesh
	disc       []exact.Vec
	reach      int32 // how far the disc reaches along an axis
	out        *Outline
	item, body int32
	emit       func(Segment)
	ring       []exact.Pt
}

// draw draws the outline of the grown body.
func (g *grower) draw(o *Outline) {
	g.around(o)
	m := g.mesh
	done := make([]uint8, len(m.Tris)) // which edges have been gone along
	for t := range m.Tris {
		tri := &m.Tris[t]
		if tri.Flags&mesh.FlagNoWalk != 0 {
			continue
		}
		for i := range 3 {
			if tri.StopsWalk(i) && done[t]>>i&1 == 0 {
				g.readRing(mesh.EdgeOf(int32(t), i), done)
				g.drawRing()
			}
		}
	}
}

// around adds a ring around everything drawn, beyond what a walker off the floor could reach over.
func (g *grower) around(o *Outline) {
	if len(o.Segments) == 0 {
		return
	}
	lo, hi := o.Segments[0].A, o.Segments[0].A
	for _, s := range o.Segments {
		lo = exact.Pt{X: min(lo.X, s.A.X, s.B.X), Y: min(lo.Y, s.A.Y, s.B.Y)}
		hi = exact.Pt{X: max(hi.X, s.A.X, s.B.X), Y: max(hi.Y, s.A.Y, s.B.Y)}
	}
	const far = 2 * MaxRadius
	a, c := exact.Pt{X: lo.X - far, Y: lo.Y - far}, exact.Pt{X: hi.X + far, Y: hi.Y + far}
	b, d := exact.Pt{X: c.X, Y: a.Y}, exact.Pt{X: a.X, Y: c.Y}
	g.segment(a, b, Stops{})
	g.segment(b, c, Stops{})
	g.segment(c, d, Stops{})
	g.segment(d, a, Stops{})
}

// readRing reads the border of the floor that e begins, the floor to its left, into the ring: its corners alone.
func (g *grower) readRing(e mesh.Edge, done []uint8) {
	g.ring = g.ring[:0]
	for done[e.Tri()]>>e.Corner()&1 == 0 {
		done[e.Tri()] |= 1 << e.Corner()
		a, b := g.mesh.Ends(e)
		e = g.after(e)
		_, c := g.mesh.Ends(e)
		if !straight(b.Sub(a), c.Sub(b)) {
			g.ring = append(g.ring, b)
		}
	}
}

// after returns the edge of the floor's border that starts where e ends, along the same floor.
func (g *grower) after(e mesh.Edge) mesh.Edge {
	for {
		next := e.Next()
		if g.mesh.Tris[next.Tri()].StopsWalk(next.Corner()) {
			return next
		}
		e = g.mesh.Twin(next)
	}
}

// straight reports whether someone who comes in direction u and leaves in direction v goes straight on.
func straight(u, v exact.Vec) bool { return u.Cross(v) == 0 && u.Dot(v) > 0 }

// drawRing draws what every edge of the ring and the corner at its start contribute.
func (g *grower) drawRing() {
	n := len(g.ring)
	for i, a := range g.ring {
		b := g.ring[(i+1)%n]
		before, d, next := a.Sub(g.ring[(i+n-1)%n]), b.Sub(a), g.ring[(i+2)%n].Sub(b)
		out := g.farthest(d)
		start, end := a.Add(g.disc[out]), b.Add(g.disc[out])
		if v, ok := g.mitre(d, next); ok {
			end = b.Add(v)
		}
		turn := before.Cross(d)
		if turn <= 0 {
			// The obstacle's corner points outwards: the polygon's sides around it, counter-clockwise from this edge's to the
			// one's before.
			from := g.farthest(before)
			k := out
			if next := (k + 1) % len(g.disc); k != from && g.alongside(d, k, next) { // the polygon's side goes straight on
				k, start = next, a.Add(g.disc[next])
			}
			g.segment(end, start, Stops{Walk: true})
			for ; k != from; k = (k + 1) % len(g.disc) {
				g.segment(a.Add(g.disc[k]), a.Add(g.disc[(k+1)%len(g.disc)]), Stops{Walk: true})
			}
			continue
		}
		if v, ok := g.mitre(before, d); ok {
			g.segment(end, a.Add(v), Stops{Walk: true})
			continue
		}
		g.segment(end, start, Stops{Walk: true})
		if from := g.farthest(before); from != out {
			g.segment(start, a, Stops{})
			g.segment(a, a.Add(g.disc[from]), Stops{})
		}
	}
}

// mitre returns where the edges moved out cross, as seen from an inward corner between an edge in direction u and one in
// direction v, when both run along the axes and are long. What lies beyond the line from the corner to there is nearer to the
// other edge, and that is long enough to shut it.
func (g *grower) mitre(u, v exact.Vec) (exact.Vec, bool) {
	if u.Cross(v) <= 0 || u.X != 0 && u.Y != 0 || v.X != 0 && v.Y != 0 {
		return exact.Vec{}, false
	}
	if long := 9 * int64(g.reach) * int64(g.reach); u.Len2() < long || v.Len2() < long {
		return exact.Vec{}, false
	}
	p, q := u.Left(), v.Left()
	return exact.Vec{X: g.reach * int32(exact.Sign(int64(p.X)+int64(q.X))), Y: g.reach * int32(exact.Sign(int64(p.Y)+int64(q.Y)))}, true
}

// farthest returns the corner of the disc that lies farthest to the left of direction d, the last of two clockwise when d runs
// along a side. O(sides).
func (g *grower) farthest(d exact.Vec) int {
	n, sides := d.Left(), len(g.disc)
	best := 0
	for i, v := range g.disc {
		if n.Dot(v) > n.Dot(g.disc[best]) {
			best = i
		}
	}
	if last := (best + sides - 1) % sides; n.Dot(g.disc[last]) == n.Dot(g.disc[best]) {
		return last
	}
	return best
}

// alongside reports whether direction d runs along the side of the disc between corners i and j.
func (g *grower) alongside(d exact.Vec, i, j int) bool {
	return d.Left().Dot(g.disc[i]) == d.Left().Dot(g.disc[j])
}

func (g *grower) segment(a, b exact.Pt, s Stops) {
	if a != b {
		g.emit(Segment{A: a, B: b, Stops: s, Item: g.item, Body: g.body})
	}
}
