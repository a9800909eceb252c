package arrange

import (
	"slices"

	"enfilade/solver/exact"
	"enfilade/solver/mesh"
)

// pair names an edge by its points, the first in order first.
type pair struct{ a, b int32 }

// edit carries the change out in graph and mesh: edges that go, points that go, points that come, edges that come.
func (c *change) edit() error {
	s := c.s
	d := mesh.NewEditor(s.Mesh)
	old, err := c.freeEdges(d)
	if err != nil {
		return err
	}
	for _, v := range c.cooled {
		if err := d.Remove(v); err != nil {
			return err
		}
	}
	for _, p := range c.hot {
		v, err := d.Add(p)
		if err != nil {
			return err
		}
		c.heated = append(c.heated, v)
		cell := s.cells.of(p)
		s.later.ptsIn[cell] = append(s.later.ptsIn[cell], v)
	}
	c.nameHeated()
	if err := c.holdEdges(d, old); err != nil {
		return err
	}
	d.Close(s.later.tags, c.solids(d))
	return nil
}

// freeEdges takes the constraint off every edge that a segment concerned ran along, and returns them all: those that remain
// are held again when their segments are known.
func (c *change) freeEdges(d *mesh.Editor) ([]pair, error) {
	var all []pair
	for _, chain := range c.before {
		for i := 1; i < len(chain); i++ {
			all = append(all, c.pairOf(chain[i-1], chain[i]))
		}
	}
	all = sorted(all)
	for _, e := range all {
		if err := d.Free(e.a, e.b); err != nil {
			return nil, err
		}
	}
	return all, nil
}

func sorted(all []pair) []pair {
	slices.SortFunc(all, func(p, q pair) int {
		if p.a != q.a {
			return int(p.a - q.a)
		}
		return int(p.b - q.b)
	})
	return slices.Compact(all)
}

func (c *change) pairOf(a, b int32) pair {
	if c.place(b).Less(c.place(a)) {
		a, b = b, a
	}
	return pair{a, b}
}

// place returns where point v lies, also when it has just come.
func (c *change) place(v int32) exact.Pt {
	if i := slices.Index(c.heated, v); i >= 0 {
		return c.hot[i]
	}
	return c.s.Mesh.Pts[v]
}

// nameHeated writes the new points' own numbers into the segments that pass them.
func (c *change) nameHeated() {
	rename := func(g int32) {
		chain := c.s.later.chain[g]
		for i, v := range chain {
			if v < 0 {
				chain[i] = c.heated[-v-1]
			}
		}
	}
	for g := range c.moved {
		rename(g)
	}
	for _, g := range c.drawn {
		rename(g)
	}
}

// holdEdges makes the edges between the points of every segment concerned, those freed included.
func (c *change) holdEdges(d *mesh.Editor, old []pair) error {
	s := c.s
	all := slices.Clone(old)
	note := func(g int32) {
		chain := s.later.chain[g]
		for i := 1; i < len(chain); i++ {
			all = append(all, c.pairOf(chain[i-1], chain[i]))
		}
	}
	for g := range c.moved {
		note(g)
	}
	for _, g := range c.drawn {
		note(g)
	}
	for _, e := range sorted(all) {
		links := c.linksAlong(e)
		if len(links) == 0 {
			continue
		}
		n := len(s.Graph.Edges)
		s.Graph.mergeLinks(e.a, s.segs, links)
		if len(s.Graph.Edges) == n {
			continue
		}
		edge := s.Graph.Edges[n]
		s.later.tags = append(s.later.tags, mesh.Tag{Top: edge.Top, Walk: edge.Walk})
		if d.Held(e.a, e.b) { // by segments that are not concerned, along which one now runs
			if err := d.Free(e.a, e.b); err != nil {
				return err
			}
		}
		if err := d.Hold(e.a, e.b, int32(n)); err != nil {
			return err
		}
	}
	return nil
}

// linksAlong returns the pieces of segments that run along edge e, in the order of the segments.
func (c *change) linksAlong(e pair) []link {
	s := c.s
	var links []link
	s.eachSegment(c.place(e.a), func(g int32) {
		chain := s.chainOf(g)
		for i := 1; i < len(chain); i++ {
			switch {
			case chain[i-1] == e.a && chain[i] == e.b:
				links = append(links, link{e.b, g, false})
			case chain[i-1] == e.b && chain[i] == e.a:
				links = append(links, link{e.b, g, true})
			}
		}
	})
	return links
}

// solids finds what the triangles stop that changed or lie, even in part, in the box around the change. Nothing else can:
// outside it no winding number is another than before.
func (c *change) solids(d *mesh.Editor) map[int32]mesh.Tag {
	solid := map[int32]mesh.Tag{}
	g := c.s.Graph
	for _, t := range d.Changed() {
		if _, done := solid[t]; done {
			continue
		}
		w := winding{count: make([]int32, len(g.Bodies)), bodies: g.Bodies}
		d.Path(t, func(edge, from int32) { w.cross(g, edge, g.leaving(edge, from)) })
		g.flood(d, &w, t, func(t int32) bool {
			_, done := solid[t]
			return !done && (d.Touched(t) || c.nearBox(d, t))
		}, func(t int32, s mesh.Tag) { solid[t] = s })
	}
	return solid
}

// triangles is a triangulation as flood walks over it.
type triangles interface {
	Corners(t int32) [3]int32
	Neighbour(t int32, i int) (tri, constraint int32)
}

// flood walks over the mesh for as long as enter accepts the next triangle, face by face, a face being what no edge of the
// graph parts. It keeps the winding numbers of the place in w, which hold for the first triangle, tells what each triangle
// stops, and takes every step across an edge back when it has seen what lies behind it. O(triangles entered).
func (g *Graph) flood(f triangles, w *winding, first int32, enter func(t int32) bool, found func(t int32, s mesh.Tag)) {
	type border struct {
		tri  int32 // behind it
		edge int32 // of the graph, or -1
		sign int32 // +1 when it is crossed from its right to its left
		back bool
	}
	borders := []border{{tri: first, edge: -1}}
	var face []int32
	for len(borders) > 0 {
		b := borders[len(borders)-1]
		borders = borders[:len(borders)-1]
		if b.back {
			w.cross(g, b.edge, -b.sign)
			continue
		}
		if !enter(b.tri) {
			continue
		}
		if b.edge >= 0 {
			w.cross(g, b.edge, b.sign)
			borders = append(borders, border{edge: b.edge, sign: b.sign, back: true})
		}
		stops := w.stops()
		found(b.tri, stops)
		for face = append(face, b.tri); len(face) > 0; {
			t := face[len(face)-1]
			face = face[:len(face)-1]
			for i := range 3 {
				next, edge := f.Neighbour(t, i)
				if next < 0 || !enter(next) {
					continue
				}
				if edge >= 0 {
					borders = append(borders, border{tri: next, edge: edge, sign: g.leaving(edge, f.Corners(t)[i])})
					continue
				}
				found(next, stops)
				face = append(face, next)
			}
		}
	}
}

// nearBox reports whether triangle t reaches into the box around the change. Rounding moves a segment by less than a unit.
func (c *change) nearBox(d *mesh.Editor, t int32) bool {
	v := d.Corners(t)
	p, q, r := d.Point(v[0]), d.Point(v[1]), d.Point(v[2])
	return min(p.X, q.X, r.X) <= c.hi.X+1 && max(p.X, q.X, r.X) >= c.lo.X-1 &&
		min(p.Y, q.Y, r.Y) <= c.hi.Y+1 && max(p.Y, q.Y, r.Y) >= c.lo.Y-1
}
