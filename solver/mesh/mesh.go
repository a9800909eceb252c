package mesh

import (
	"context"

	"enfilade/solver/exact"
	"enfilade/solver/pulse"
)

// Ceiling is the height of what no eye sees over.
const Ceiling int32 = 1<<31 - 1

// Tag says what the line along an edge stops.
type Tag struct {
	Top  int32 // sight, from the floor up to this height; 0 for not at all
	Walk bool  // walking
}

// Tri is one triangle, laid out to fill one cache line.
//
// Edge i runs from corner i to the next; N[i] is its twin in the neighbouring triangle. Top[i] is the height up to which
// crossing edge i stops sight, the solidity of both triangles counted in.
type Tri struct {
	P     [3]exact.Pt
	V     [3]int32
	N     [3]Edge
	Top   [3]int32
	Flags uint32
}

// Bits of Tri.Flags: bits 0 to 2 say that edge 0 to 2 stops walking.
const (
	FlagNoWalk   uint32 = 1 << 3 // nobody stands in the triangle
	flagDead     uint32 = 1 << 4 // the triangle has been taken out; its first neighbour is one that took its place
	flagBoundary uint32 = 7
)

// StopsWalk reports whether edge i of t stops walking.
func (t *Tri) StopsWalk(i int) bool { return t.Flags>>uint(i)&1 != 0 }

// Mesh is a triangulation of a rectangle, laid out for queries. It does not change while it is asked; Edit changes it.
type Mesh struct {
	Pts   []exact.Pt // the graph's points, with the four corners of the box among them
	Tris  []Tri
	Solid []int32 // for each triangle the height up to which it is solid for sight
	shut  []bool  // for each triangle whether nobody stands in it, as its Flags say
	raw   *Triangulation
	con   [][3]int32 // for each triangle the constraints on its edges, unless raw has them
	tags  []Tag
	grid  grid
	turn  turning
}

// Box returns the lower left and the upper right corner of the rectangle.
func (m *Mesh) Box() (lo, hi exact.Pt) { return m.Pts[m.raw.box], m.Pts[m.raw.box+2] }

// Constraint returns the index of the edge that lies on e, or -1.
func (m *Mesh) Constraint(e Edge) int32 {
	if m.con != nil {
		return m.con[e.Tri()][e.Corner()]
	}
	return m.raw.tris[e.Tri()].c[e.Corner()]
}

// Twin returns the half-edge on the other side of e.
func (m *Mesh) Twin(e Edge) Edge { return m.Tris[e.Tri()].N[e.Corner()] }

// Ends returns the points that e runs between.
func (m *Mesh) Ends(e Edge) (a, b exact.Pt) {
	t := &m.Tris[e.Tri()]
	i := e.Corner()
	return t.P[i], t.P[inc[i]]
}

// Inc returns the corner that follows i counter-clockwise.
func Inc(i int) int { return inc[i] }

// Finish lays the triangulation out for queries; it must not be used by itself from then on.
//
//   - tags gives what each edge passed to Triangulate stops.
//   - solid gives for each triangle of tr the height up to which it is solid, and whether nobody stands in it.
//   - Errors: the context's when it is cancelled.
//   - Cost: O(n), n the number of triangles.
func (tr *Triangulation) Finish(ctx context.Context, tags []Tag, solid []Tag) (*Mesh, error) {
	n := len(tr.tris)
	m := &Mesh{Pts: tr.Pts, Tris: make([]Tri, n), Solid: make([]int32, n), shut: make([]bool, n), raw: tr, tags: tags}
	line := make([]Tag, len(tags)+1) // what lies along an edge, the first one without a constraint
	copy(line[1:], tags)
	_, err := pulse.Split(pulse.Part(ctx, 0, 0.6), n, func(ctx context.Context, lo, hi int) (none struct{}, err error) {
		for k := lo; k < hi && err == nil; k++ {
			m.lay(int32(k), solid, line)
			err = pulse.Step(ctx, k-lo, hi-lo)
		}
		return none, err
	})
	if err != nil {
		return nil, err
	}
	m.settle()
	if m.grid, err = makeGrid(pulse.Part(ctx, 0.6, 0.9), m); err != nil {
		return nil, err
	}
	return m, pulse.Tell(ctx, 1)
}

// firstCorner returns the corner of r that comes first in the order of points.
func (tr *Triangulation) firstCorner(r *rawTri) (first uint8) {
	least, b, c := packed(tr.Pts[r.v[0]]), packed(tr.Pts[r.v[1]]), packed(tr.Pts[r.v[2]])
	if b < least {
		first, least = 1, b
	}
	if c < least {
		first = 2
	}
	return first
}

// packed makes p a number, so that the order of numbers is that of points.
func packed(p exact.Pt) int64 { return int64(p.X)<<32 | int64(uint32(p.Y)^1<<31) }

func (m *Mesh) setSolid(t int32, s Tag) { m.Solid[t], m.shut[t] = s.Top, s.Walk }

// solid returns what triangle t stops.
func (m *Mesh) solid(t int32) Tag { return Tag{m.Solid[t], m.shut[t]} }

// lay is refresh for a mesh that is new: solid is what every triangle stops, line[k+1] what constraint k does. It asks no
// question whose answer is as often yes as no.
func (m *Mesh) lay(t int32, solid, line []Tag) {
	r, q := &m.raw.tris[t], &m.Tris[t]
	own := solid[t]
	m.Solid[t], m.shut[t] = own.Top, own.Walk
	flags := bit(own.Walk) * FlagNoWalk
	for i, n := range r.n {
		behind := Tag{Ceiling, true}
		if n != None {
			behind = solid[n.Tri()]
		}
		along := line[r.c[i]+1]
		q.P[i], q.Top[i] = m.Pts[r.v[i]], max(own.Top, behind.Top, along.Top)
		flags |= (bit(own.Walk) | bit(behind.Walk) | bit(along.Walk)) << uint(i)
	}
	q.V, q.N, q.Flags = r.v, r.n, flags
}

func bit(b bool) (v uint32) {
	if b {
		v = 1
	}
	return v
}

// refresh writes what queries read of triangle t, from its raw form and from what it and its neighbours stop.
func (m *Mesh) refresh(t int32) {
	r, q := &m.raw.tris[t], &m.Tris[t]
	own := m.solid(t)
	q.Flags = 0
	if own.Walk {
		q.Flags = FlagNoWalk
	}
	for i := range 3 {
		tag := own
		if n := r.n[i]; n != None {
			tag = merge(tag, m.solid(n.Tri()))
		} else {
			tag = Tag{Ceiling, true}
		}
		if r.c[i] >= 0 {
			tag = merge(tag, m.tags[r.c[i]])
		}
		q.P[i], q.V[i], q.N[i], q.Top[i] = m.Pts[r.v[i]], r.v[i], r.n[i], tag.Top
		if tag.Walk {
			q.Flags |= 1 << uint(i)
		}
	}
}

func merge(a, b Tag) Tag { return Tag{max(a.Top, b.Top), a.Walk || b.Walk} }

// Len returns the number of triangles.
func (tr *Triangulation) Len() int { return len(tr.tris) }

// Corners returns the indices of the corners of triangle t, counter-clockwise.
func (tr *Triangulation) Corners(t int32) [3]int32 { return tr.tris[t].v }

// Neighbour returns the triangle on the other side of edge i of t, or -1, and the constraint on that edge, or -1.
func (tr *Triangulation) Neighbour(t int32, i int) (tri, constraint int32) {
	r := &tr.tris[t]
	if r.n[i] == None {
		return -1, r.c[i]
	}
	return r.n[i].Tri(), r.c[i]
}
