package mesh

import (
	"context"

	"enfilade/solver/exact"
	"enfilade/solver/pulse"
)

// grid is a uniform grid over the mesh; each cell names a triangle near its middle, so that a walk from there is short
// whatever the size of the plan.
type grid struct {
	lo     exact.Pt
	shiftX uint
	nx, ny int32
	near   []int32
}

// makeGrid lays a grid of about half as many square cells as there are triangles. O(n) expected: the walk from one cell's
// middle to the next is short.
func makeGrid(ctx context.Context, m *Mesh) (grid, error) {
	lo, hi := m.Box()
	w, h := int64(hi.X)-int64(lo.X), int64(hi.Y)-int64(lo.Y)
	g := grid{lo: lo}
	for (w>>g.shiftX+1)*(h>>g.shiftX+1) > int64(len(m.Tris)/2+1) {
		g.shiftX++
	}
	g.nx, g.ny = int32(w>>g.shiftX)+1, int32(h>>g.shiftX)+1
	g.near = make([]int32, g.nx*g.ny)
	half := int32(1) << g.shiftX >> 1
	_, err := pulse.Split(ctx, len(g.near), func(ctx context.Context, from, to int) (none struct{}, err error) {
		t := int32(0)
		for k := from; k < to && err == nil; k++ {
			y, x := int32(k)/g.nx, int32(k)%g.nx
			if y&1 == 1 {
				x = g.nx - 1 - x // to and fro, so that the next cell is near
			}
			p := exact.Pt{X: min(g.lo.X+x<<g.shiftX+half, hi.X), Y: min(g.lo.Y+y<<g.shiftX+half, hi.Y)}
			t, _, _ = m.walkTo(t, p)
			g.near[y*g.nx+x] = t
			err = pulse.Step(ctx, k-from, to-from)
		}
		return none, err
	})
	return g, err
}

// Place is where a point lies in the mesh.
type Place struct {
	Tri    int32 // a triangle that holds it
	Edge   Edge  // the half-edge of Tri that it lies on, strictly between its ends; None otherwise
	Corner int   // the corner of Tri that it is; -1 otherwise
}

// Locate finds p, and reports false when p lies outside the mesh's rectangle. Expected time is constant for meshes whose
// triangles are spread evenly.
func (m *Mesh) Locate(p exact.Pt) (Place, bool) {
	if lo, hi := m.Box(); !exact.InBox(lo, hi, p) {
		return Place{}, false
	}
	t, zero, zeros := m.walkTo(m.hint(p), p)
	place := Place{Tri: t, Edge: None, Corner: -1}
	switch {
	case zeros == 2:
		for i, q := range m.Tris[t].P {
			if q == p {
				place.Corner = i
			}
		}
	case zeros == 1:
		place.Edge = EdgeOf(t, zero)
	}
	return place, true
}

// hint returns a triangle near p. A triangle that has been taken out names one that took its place.
func (m *Mesh) hint(p exact.Pt) int32 {
	g := &m.grid
	t := g.near[(p.Y-g.lo.Y)>>g.shiftX*g.nx+(p.X-g.lo.X)>>g.shiftX]
	for m.Tris[t].Flags&flagDead != 0 {
		t = m.Tris[t].N[0].Tri()
	}
	return t
}

// walkTo walks from triangle t to one that holds p, which must lie in the mesh's rectangle. It returns the triangle, the last
// of its edges with p on their line, and how many such edges there are.
//
// It goes straight on as long as it may, and tosses for its way from then on: around constraints a walk that does not may go in
// circles for ever (see Triangulation.walk).
func (m *Mesh) walkTo(t int32, p exact.Pt) (tri int32, zero, zeros int) {
	r := &m.Tris[t]
	e := EdgeOf(t, 0)
	a, b := r.P[0], r.P[1]
	s := exact.Area2(a, b, p)
	if s < 0 {
		e, a, b = r.N[0], b, a
	}
	for range strides {
		r = &m.Tris[e.Tri()]
		next, last := e.Next(), e.Prev()
		c := r.P[last.Corner()]
		s1 := exact.Area2(b, c, p)
		if s1 < 0 {
			e, a, s = r.N[next.Corner()], c, 1
			continue
		}
		s2 := exact.Area2(c, a, p)
		if s2 < 0 {
			e, b, s = r.N[last.Corner()], c, 1
			continue
		}
		if s == 0 {
			zero, zeros = e.Corner(), 1
		}
		if s1 == 0 {
			zero, zeros = next.Corner(), zeros+1
		}
		if s2 == 0 {
			zero, zeros = last.Corner(), zeros+1
		}
		return e.Tri(), zero, zeros
	}
	return m.wander(e.Tri(), p)
}

// wander is walkTo for those who have not arrived.
func (m *Mesh) wander(t int32, p exact.Pt) (tri int32, zero, zeros int) {
	came := int32(-1)
	for turn := uint32(1); ; turn = turn*1664525 + 1013904223 {
		r := &m.Tris[t]
		first := int(turn>>16) % 3
		next := None
		zero, zeros = -1, 0
		for k := range 3 {
			i := first + k
			if i > 2 {
				i -= 3
			}
			n := r.N[i]
			if came >= 0 && n != None && n.Tri() == came {
				continue
			}
			s := exact.Area2(r.P[i], r.P[inc[i]], p)
			if s < 0 {
				next = n
				break
			}
			if s == 0 {
				zero = i
				zeros++
			}
		}
		if next == None {
			return t, zero, zeros
		}
		came, t = t, next.Tri()
	}
}

// Around calls f for each half-edge that leaves the starting corner of start, counter-clockwise, start first. The corner must
// lie strictly inside the mesh's rectangle.
func (m *Mesh) Around(start Edge, f func(Edge)) {
	for e := start; ; {
		f(e)
		if e = m.Twin(e.Prev()); e == start || e == None {
			return
		}
	}
}
