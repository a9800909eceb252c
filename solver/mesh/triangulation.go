package mesh

import (
	"context"
	"errors"

	"enfilade/solver/exact"
	"enfilade/solver/pulse"
)

// Edge is a half-edge: triangle index times four plus the corner it starts at. It runs from that corner to the next one,
// counter-clockwise, with its triangle to the left. None is no edge.
type Edge int32

// None marks a missing neighbour.
const None Edge = -1

// Tri returns the triangle to the left of e.
func (e Edge) Tri() int32 { return int32(e) >> 2 }

// Corner returns which corner of its triangle e starts at: 0, 1 or 2.
func (e Edge) Corner() int { return int(e) & 3 }

// Next returns the half-edge that follows e around its triangle.
func (e Edge) Next() Edge {
	if e&3 == 2 {
		return e - 2
	}
	return e + 1
}

// Prev returns the half-edge before e around its triangle.
func (e Edge) Prev() Edge {
	if e&3 == 0 {
		return e + 2
	}
	return e - 1
}

// EdgeOf returns half-edge corner of triangle t.
func EdgeOf(t int32, corner int) Edge { return Edge(t<<2 | int32(corner)) }

// ErrCrossing reports input edges that do not meet only at shared ends.
var ErrCrossing = errors.New("mesh: edges cross or pass through a point")

// Triangulation is a constrained Delaunay triangulation under construction.
type Triangulation struct {
	Pts   []exact.Pt // the given points, then the four corners of the box around them, then points added later
	tris  []rawTri
	box   int32      // index of the first corner of the box
	out   []Edge     // some half-edge leaving each point; nil until it is needed
	work  [][2]int32 // edges to examine, by their ends
	free  []int32    // triangles taken out, to be used again
	log   []int32    // triangles changed since the last call of Edit
	logs  bool       // keep the log
	steps int        // half-edges looked at to find edges by their ends
}

// rawTri is a triangle: its corners, the twins of its three half-edges, and the constraint on each, or -1.
type rawTri struct {
	v [3]int32
	n [3]Edge
	c [3]int32
}

// margin is how far the box reaches beyond the points, in grid units; any positive number will do.
const margin = 10000

// Triangulate returns the constrained Delaunay triangulation of pts and of the edges between them, given by index.
//
//   - Input: distinct points; edges that meet only at shared ends, each once.
//   - Errors: ErrCrossing when they do not; the context's error when it is cancelled.
//   - Cost: O(n log n) expected for the points; an edge costs time proportional to what it crosses.
func Triangulate(ctx context.Context, pts []exact.Pt, edges [][2]int32) (*Triangulation, error) {
	loose, err := TriangulatePoints(pulse.Part(ctx, 0, 0.65), pts)
	if err != nil {
		return nil, err
	}
	return loose.Constrain(pulse.Part(ctx, 0.65, 1), edges)
}

// Loose is the Delaunay triangulation of points whose edges are still to come.
type Loose struct {
	tr           *Triangulation
	given        []exact.Pt // the points as given, with the corners of the box
	curve, along []int32    // which of the given points each point along the curve is, and the inverse
}

// TriangulatePoints is the first step of Triangulate, for those who do not know the edges yet. Constrain is the other one.
func TriangulatePoints(ctx context.Context, pts []exact.Pt) (*Loose, error) {
	return triangulatePoints(ctx, pts, partsOf(len(pts)))
}

func triangulatePoints(ctx context.Context, pts []exact.Pt, parts int) (*Loose, error) {
	// While it is made, points are numbered along a curve: neighbours then lie near each other in memory.
	all := boxed(pts)
	l := &Loose{given: all, curve: curveOrder(all), along: make([]int32, len(all))}
	l.tr = &Triangulation{Pts: make([]exact.Pt, len(all)), box: int32(len(pts))}
	for i, v := range l.curve {
		l.tr.Pts[i], l.along[v] = all[v], int32(i)
	}
	if err := l.tr.insertAll(ctx, l.along, parts); err != nil {
		return nil, err
	}
	return l, nil
}

// Constrain forces the edges in, as Triangulate does. l is used up.
func (l *Loose) Constrain(ctx context.Context, edges [][2]int32) (*Triangulation, error) {
	if err := l.tr.constrainAll(pulse.Part(ctx, 0, 0.7), edges, l.along); err != nil {
		return nil, err
	}
	if err := l.tr.arrange(pulse.Part(ctx, 0.7, 1), l.given, l.curve); err != nil {
		return nil, err
	}
	return l.tr, pulse.Tell(ctx, 1)
}

// boxed returns pts followed by the corners of a box that holds them strictly inside.
func boxed(pts []exact.Pt) []exact.Pt {
	lo, hi := exact.Pt{}, exact.Pt{}
	if len(pts) > 0 {
		lo, hi = pts[0], pts[0]
	}
	for _, p := range pts {
		lo.X, lo.Y = min(lo.X, p.X), min(lo.Y, p.Y)
		hi.X, hi.Y = max(hi.X, p.X), max(hi.Y, p.Y)
	}
	const most = exact.Limit - 1
	lo = exact.Pt{X: max(lo.X-margin, -most), Y: max(lo.Y-margin, -most)}
	hi = exact.Pt{X: min(hi.X+margin, most), Y: min(hi.Y+margin, most)}
	all := make([]exact.Pt, len(pts), len(pts)+4)
	copy(all, pts)
	return append(all, lo, exact.Pt{X: hi.X, Y: lo.Y}, hi, exact.Pt{X: lo.X, Y: hi.Y})
}

// walk finds the triangle that holds p, starting at t: its index, the corner whose half-edge holds p or -1, and false when
// p is a corner of it. The order in which the sides are tried changes from step to step, so the walk cannot go round in
// circles for ever (Devillers, Pion and Teillaud, "Walking in a triangulation", SoCG 2001).
func (tr *Triangulation) walk(t int32, p exact.Pt) (tri int32, on int, ok bool) {
	came := int32(-1)
	for turn := uint32(1); ; turn = turn*1664525 + 1013904223 {
		r := &tr.tris[t]
		first := int(turn>>16) % 3
		next := None
		zero, zeros := -1, 0
		for k := range 3 {
			i := first + k
			if i > 2 {
				i -= 3
			}
			n := r.n[i]
			if came >= 0 && n != None && n.Tri() == came {
				continue // p lies on this side of the edge just crossed
			}
			s := exact.Area2(tr.Pts[r.v[i]], tr.Pts[r.v[inc[i]]], p)
			if s < 0 {
				if n == None {
					return t, -1, false
				}
				next = n
				break
			}
			if s == 0 {
				zero = i
				zeros++
			}
		}
		if next == None {
			return t, zero, zeros < 2
		}
		came, t = t, next.Tri()
	}
}

// inc is the next corner counter-clockwise.
var inc = [3]int{1, 2, 0}

func (tr *Triangulation) link(e, f Edge) {
	if e != None {
		tr.tris[e.Tri()].n[e.Corner()] = f
	}
	if f != None {
		tr.tris[f.Tri()].n[f.Corner()] = e
	}
}

// fresh returns the index of a triangle that is free to be written.
func (tr *Triangulation) fresh() int32 {
	if n := len(tr.free); n > 0 {
		t := tr.free[n-1]
		tr.free = tr.free[:n-1]
		return t
	}
	tr.tris = append(tr.tris, rawTri{})
	return int32(len(tr.tris) - 1)
}

// set writes triangle t.
func (tr *Triangulation) set(t int32, r rawTri) {
	tr.tris[t] = r
	if tr.logs {
		tr.log = append(tr.log, t)
	}
}

// wrong reports whether e must give way to the other diagonal of its two triangles: no constraint holds it, and the circle
// through one triangle has the apex of the other inside. When the four points lie on one circle, the diagonal that ends at
// the first of them in the order of points is kept. That is what pulling every point a little off the plane of the lifting
// does, the first one most, so the triangulation depends on points and edges alone and not on how it came about (symbolic
// perturbation: Edelsbrunner and Mücke, "Simulation of simplicity", ACM TOG 9, 1990).
func (tr *Triangulation) wrong(e Edge) bool {
	r, i := &tr.tris[e.Tri()], e.Corner()
	f := r.n[i]
	if f == None || r.c[i] >= 0 {
		return false
	}
	a, b, c := tr.Pts[r.v[i]], tr.Pts[r.v[inc[i]]], tr.Pts[r.v[inc[inc[i]]]]
	d := tr.Pts[tr.tris[f.Tri()].v[inc[inc[f.Corner()]]]]
	return outdone(a, b, c, d)
}

// outdone reports whether the edge from a to b, with c to its left and d to its right, must give way to the one from c to d.
func outdone(a, b, c, d exact.Pt) bool {
	side := exact.Inside(a, b, c, d)
	if side != 0 {
		return side > 0
	}
	if b.Less(a) {
		a = b
	}
	if d.Less(c) {
		c = d
	}
	return c.Less(a)
}

// flip replaces the diagonal e of its two triangles by the other one. With e from a to b and apexes c (left) and d
// (right), the triangles become (c, a, d) and (d, b, c), in that order of corners; constraints move with their edges.
func (tr *Triangulation) flip(e Edge) (t, u int32) {
	i := e.Corner()
	t = e.Tri()
	rt := tr.tris[t]
	f := rt.n[i]
	j := f.Corner()
	u = f.Tri()
	ru := tr.tris[u]
	i1, i2, j1, j2 := inc[i], inc[inc[i]], inc[j], inc[inc[j]]
	a, b, c, d := rt.v[i], rt.v[i1], rt.v[i2], ru.v[j2]
	tr.set(t, rawTri{[3]int32{c, a, d}, [3]Edge{rt.n[i2], ru.n[j1], EdgeOf(u, 2)}, [3]int32{rt.c[i2], ru.c[j1], -1}})
	tr.set(u, rawTri{[3]int32{d, b, c}, [3]Edge{ru.n[j2], rt.n[i1], EdgeOf(t, 2)}, [3]int32{ru.c[j2], rt.c[i1], -1}})
	tr.link(rt.n[i2], EdgeOf(t, 0))
	tr.link(ru.n[j1], EdgeOf(t, 1))
	tr.link(ru.n[j2], EdgeOf(u, 0))
	tr.link(rt.n[i1], EdgeOf(u, 1))
	return t, u
}
