package mesh

import (
	"context"
	"fmt"
	"slices"

	"enfilade/solver/exact"
	"enfilade/solver/pulse"
)

// inserter puts points into a triangulation that no constraint has changed yet, or one by one into any. It may be told to keep
// to its own part, the triangles with all corners among the points from lo on, n of them, so that several work side by side:
// it writes these alone, but for the twins that triangles on the border name, each of which only one part can write.
type inserter struct {
	tr   *Triangulation
	lo   int32
	n    uint32
	next int32   // the triangles from here on are free for it to write
	last int32   // one of its own triangles, near the last point
	todo []int32 // stack of triangles around a new point to examine
	late []late

	before []anchor // along the curve
}

// anchor is one of an inserter's own triangles, and a point near it that went in before the parts were made.
type anchor struct{ p, t int32 }

// late is a point that has to wait, as triangles would change that are not the inserter's own, and a triangle near it.
type late struct{ p, t int32 }

// outside reports whether v is not among the inserter's own points.
func (in *inserter) outside(v int32) bool { return uint32(v-in.lo) >= in.n }

// put makes p a corner of the triangulation, inside triangle t or on its edge on, when that is not -1, and flips until all is
// as it should be. It writes two more triangles: u and w. Both have p as their last corner.
func (in *inserter) put(p, t int32, on int, u, w int32) {
	if on < 0 {
		in.splitTri(t, u, w, p)
	} else {
		in.splitEdge(EdgeOf(t, on), u, w, p)
	}
	in.settle()
}

// insert puts points in, or makes them wait.
//
//   - Errors: when a point is there already or lies outside the box; the context's when it is cancelled.
func (in *inserter) insert(ctx context.Context, points []int32) error {
	for i, p := range points {
		if err := pulse.Step(ctx, i, len(points)); err != nil {
			return err
		}
		if err := in.locateAndPut(p, in.last); err != nil {
			return err
		}
	}
	return nil
}

// insertLate puts the points in that have waited, each from the triangle it was last seen near. They are all its own now.
func (in *inserter) insertLate(ctx context.Context) error {
	in.lo, in.n = 0, uint32(len(in.tr.Pts))
	for i, l := range in.late {
		if err := pulse.Step(ctx, i, len(in.late)); err != nil {
			return err
		}
		if err := in.locateAndPut(l.p, l.t); err != nil {
			return err
		}
	}
	return nil
}

func (in *inserter) locateAndPut(p, from int32) error {
	tr := in.tr
	t, on, ok := in.find(from, tr.Pts[p])
	if t < 0 && len(in.before) > 0 { // the way may lead around a bay of the part: there is another one from nearby
		t, on, ok = in.find(in.near(p), tr.Pts[p])
	}
	switch {
	case t < 0:
		in.late = append(in.late, late{p, ^t})
		return nil
	case !ok:
		return fmt.Errorf("mesh: point %v twice or outside the box", tr.Pts[p])
	case on >= 0:
		if n := tr.tris[t].n[on]; in.outside(tr.tris[n.Tri()].v[n.Prev().Corner()]) {
			in.late = append(in.late, late{p, t})
			return nil
		}
	}
	in.put(p, t, on, in.next, in.next+1)
	in.last, in.next = in.next, in.next+2
	return nil
}

// near returns one of the inserter's own triangles near point p.
func (in *inserter) near(p int32) int32 {
	k, _ := slices.BinarySearchFunc(in.before, p, func(a anchor, p int32) int { return int(a.p - p) })
	return in.before[min(k, len(in.before)-1)].t
}

// strides is how many triangles find crosses before it takes to walk, and walkTo before it wanders; any number is right.
const strides = 1 << 8

// find is Triangulation.walk for a triangulation without constraints; it starts from one of the inserter's own triangles, and
// when the way leads out of them it gives up and returns the complement of where it stands. It need not toss for its way: in a
// Delaunay triangulation no walk across edges that have p behind them goes in circles (De Floriani, Falcidieno, Nagy and
// Pienovi, "On sorting triangles in a Delaunay tessellation", Algorithmica 6, 1991). Parts that wait for each other are not
// Delaunay at their border, so it does when it has not arrived after many strides.
func (in *inserter) find(t int32, p exact.Pt) (tri int32, on int, ok bool) {
	tr := in.tr
	r := &tr.tris[t]
	e := EdgeOf(t, 0)
	a, b := tr.Pts[r.v[0]], tr.Pts[r.v[1]]
	s := exact.Area2(a, b, p)
	if s < 0 {
		if e, a, b = r.n[0], b, a; e == None {
			return t, -1, false
		}
	}
	for range strides {
		r = &tr.tris[e.Tri()]
		v := r.v[e.Prev().Corner()]
		if in.outside(v) {
			return ^e.Tri(), -1, false
		}
		c := tr.Pts[v]
		s1 := exact.Area2(b, c, p)
		if s1 < 0 {
			if e, a, s = r.n[e.Next().Corner()], c, 1; e == None {
				return t, -1, false
			}
			continue
		}
		s2 := exact.Area2(c, a, p)
		if s2 < 0 {
			if e, b, s = r.n[e.Prev().Corner()], c, 1; e == None {
				return t, -1, false
			}
			continue
		}
		switch {
		case s1 == 0:
			return e.Tri(), e.Next().Corner(), s != 0 && s2 != 0
		case s2 == 0:
			return e.Tri(), e.Prev().Corner(), s != 0
		case s == 0:
			return e.Tri(), e.Corner(), true
		}
		return e.Tri(), -1, true
	}
	if int(in.n) < len(tr.Pts) {
		return ^e.Tri(), -1, false
	}
	return tr.walk(e.Tri(), p)
}

// splitTri puts p strictly inside t and leaves the three edges around it to examine. p is the last corner of all triangles
// around it: t, u and w.
func (in *inserter) splitTri(t, u, w, p int32) {
	tr := in.tr
	r := &tr.tris[t]
	a, b, c := r.v[0], r.v[1], r.v[2]
	n1, n2 := r.n[1], r.n[2]
	tr.tris[u] = rawTri{[3]int32{b, c, p}, [3]Edge{n1, EdgeOf(w, 2), EdgeOf(t, 1)}, [3]int32{r.c[1], -1, -1}}
	tr.tris[w] = rawTri{[3]int32{c, a, p}, [3]Edge{n2, EdgeOf(t, 2), EdgeOf(u, 1)}, [3]int32{r.c[2], -1, -1}}
	r.v[2], r.n[1], r.n[2], r.c[1], r.c[2] = p, EdgeOf(u, 2), EdgeOf(w, 1), -1, -1
	tr.pair(n1, EdgeOf(u, 0))
	tr.pair(n2, EdgeOf(w, 0))
	in.todo = append(in.todo, t, u, w)
}

// splitEdge puts p on e, inside the box, and leaves the four edges around it to examine. p is the last corner of all triangles
// around it.
func (in *inserter) splitEdge(e Edge, w, x, p int32) {
	tr := in.tr
	f := tr.tris[e.Tri()].n[e.Corner()]
	t, u := e.Tri(), f.Tri()
	i, j := e.Corner(), f.Corner()
	rt, ru := tr.tris[t], tr.tris[u]
	i1, i2, j1, j2 := inc[i], inc[inc[i]], inc[j], inc[inc[j]]
	a, b, c, d := rt.v[i], rt.v[i1], rt.v[i2], ru.v[j2]
	bc, ca, ad, db := rt.n[i1], rt.n[i2], ru.n[j1], ru.n[j2]
	// Around p: c a | a d | d b | b c.
	tr.tris[t] = rawTri{[3]int32{c, a, p}, [3]Edge{ca, EdgeOf(u, 2), EdgeOf(x, 1)}, [3]int32{rt.c[i2], -1, -1}}
	tr.tris[u] = rawTri{[3]int32{a, d, p}, [3]Edge{ad, EdgeOf(w, 2), EdgeOf(t, 1)}, [3]int32{ru.c[j1], -1, -1}}
	tr.tris[w] = rawTri{[3]int32{d, b, p}, [3]Edge{db, EdgeOf(x, 2), EdgeOf(u, 1)}, [3]int32{ru.c[j2], -1, -1}}
	tr.tris[x] = rawTri{[3]int32{b, c, p}, [3]Edge{bc, EdgeOf(t, 2), EdgeOf(w, 1)}, [3]int32{rt.c[i1], -1, -1}}
	tr.pair(ca, EdgeOf(t, 0))
	tr.pair(ad, EdgeOf(u, 0))
	tr.pair(db, EdgeOf(w, 0))
	tr.pair(bc, EdgeOf(x, 0))
	in.todo = append(in.todo, t, u, w, x)
}

// settle examines edge 0 of each triangle on the stack, opposite the new point, which is their last corner, and flips until all
// are as they should be (Lawson, "Software for C1 surface interpolation", 1977). It leaves alone what is not its own.
func (in *inserter) settle() {
	tr := in.tr
	stack, tris, pts := in.todo, tr.tris, tr.Pts
	for len(stack) > 0 {
		t := stack[len(stack)-1]
		stack = stack[:len(stack)-1]
		r := &tris[t]
		a, b, p := r.v[0], r.v[1], r.v[2]
		for {
			f := r.n[0]
			if f == None || r.c[0] >= 0 {
				break
			}
			u, j := f.Tri(), f.Corner()
			s := &tris[u]
			j1, j2 := inc[j], inc[inc[j]]
			d := s.v[j2]
			if !outdone(pts[a], pts[b], pts[p], pts[d]) || in.outside(d) {
				break
			}
			// Of (a, b, p) and (a, d, b) become (a, d, p), which stays t, and (d, b, p).
			ad, db, bp := s.n[j1], s.n[j2], r.n[1]
			cad, cdb, cbp := s.c[j1], s.c[j2], r.c[1]
			r.v[1], r.n[0], r.n[1], r.c[0], r.c[1] = d, ad, EdgeOf(u, 2), cad, -1
			*s = rawTri{[3]int32{d, b, p}, [3]Edge{db, bp, EdgeOf(t, 1)}, [3]int32{cdb, cbp, -1}}
			tr.pair(ad, EdgeOf(t, 0))
			tr.pair(db, EdgeOf(u, 0))
			tris[bp.Tri()].n[bp.Corner()] = EdgeOf(u, 1)
			stack = append(stack, u)
			b = d
		}
	}
	in.todo = stack
}

// pair makes e, if it is an edge at all, name f as its twin.
func (tr *Triangulation) pair(e, f Edge) {
	if e != None {
		tr.tris[e.Tri()].n[e.Corner()] = f
	}
}
