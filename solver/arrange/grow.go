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
// wrong. All its corners are sums of grid points, so nothing is rounded before the crossings are.
//
// The outline goes along the obstacles with the floor on its other side, so it winds about open floor once the wrong way
// round: a ring around everything makes that up, and what it makes solid besides is solid already.
//
//   - Cost: O(n) segments for n edges; an outward corner adds up to half the polygon's sides.
func Grow(o *Outline, m *mesh.Mesh, radius int32) *Outline {
	disc, _ := Disc(radius)
	g := grower{mesh: m, disc: disc, out: &Outline{
		Items:    append(append([]plan.Ref(nil), o.Items...), plan.Ref{Kind: plan.KindWalker}),
		Segments: append([]Segment(nil), o.Segments...),
		Bodies:   append([]Body(nil), o.Bodies...),
	}}
	g.item = int32(len(g.out.Items) - 1)
	g.body = int32(len(g.out.Bodies))
	g.out.Bodies = append(g.out.Bodies, Body{Stops: Stops{Walk: true}, Item: g.item})
	g.around(o)
	for t := range m.Tris {
		tri := &m.Tris[t]
		if tri.Flags&mesh.FlagNoWalk != 0 {
			continue
		}
		for i := range 3 {
			if tri.StopsWalk(i) {
				g.edge(mesh.EdgeOf(int32(t), i))
			}
		}
	}
	return g.out
}

type grower struct {
	mesh       *mesh.Mesh
	disc       []exact.Vec
	out        *Outline
	item, body int32
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

// edge adds what edge e of an obstacle, with floor to its left, and the corner at its start contribute.
func (g *grower) edge(e mesh.Edge) {
	a, b := g.mesh.Ends(e)
	first, last := g.farthest(b.Sub(a))
	g.segment(b.Add(g.disc[last]), a.Add(g.disc[first]), Stops{Walk: true})
	before := g.before(e)
	_, from := g.farthest(before)
	turn := before.Cross(b.Sub(a))
	if turn < 0 || turn == 0 && before.Dot(b.Sub(a)) < 0 {
		// The obstacle's corner points outwards: the polygon's sides around it, counter-clockwise from this edge's to the one's
		// before.
		for k := first; k != from; k = (k + 1) % len(g.disc) {
			g.segment(a.Add(g.disc[k]), a.Add(g.disc[(k+1)%len(g.disc)]), Stops{Walk: true})
		}
		return
	}
	g.segment(a.Add(g.disc[first]), a, Stops{})
	g.segment(a, a.Add(g.disc[from]), Stops{})
}

// before returns the direction of the obstacle's edge that ends where e starts, along the same floor.
func (g *grower) before(e mesh.Edge) exact.Vec {
	for {
		in := e.Prev()
		if g.mesh.Tris[in.Tri()].StopsWalk(in.Corner()) {
			a, b := g.mesh.Ends(in)
			return b.Sub(a)
		}
		e = g.mesh.Twin(in)
	}
}

// farthest returns the corners of the disc that lie farthest to the left of direction d: the counter-clockwise last and the
// clockwise last of them, which differ only when d runs along one of its sides. O(sides).
func (g *grower) farthest(d exact.Vec) (ccw, cw int) {
	n, sides := d.Left(), len(g.disc)
	best := 0
	for i, v := range g.disc {
		if n.Dot(v) > n.Dot(g.disc[best]) {
			best = i
		}
	}
	if next := (best + 1) % sides; n.Dot(g.disc[next]) == n.Dot(g.disc[best]) {
		return next, best
	}
	if last := (best + sides - 1) % sides; n.Dot(g.disc[last]) == n.Dot(g.disc[best]) {
		return best, last
	}
	return best, best
}

func (g *grower) segment(a, b exact.Pt, s Stops) {
	if a != b {
		g.out.Segments = append(g.out.Segments, Segment{A: a, B: b, Stops: s, Item: g.item, Body: g.body})
	}
}
