package mesh

import (
	"context"
	"fmt"

	"enfilade/solver/exact"
	"enfilade/solver/pulse"
)

// insertAll starts from the box, whose corners along names last, and inserts the other points.
func (tr *Triangulation) insertAll(ctx context.Context, along []int32) error {
	n := len(along) - 4
	a, b, c, d := along[n], along[n+1], along[n+2], along[n+3]
	tr.tris = make([]rawTri, 2*n+2)
	free := [3]int32{-1, -1, -1}
	tr.tris[0] = rawTri{[3]int32{a, b, c}, [3]Edge{None, None, EdgeOf(1, 0)}, free}
	tr.tris[1] = rawTri{[3]int32{a, c, d}, [3]Edge{EdgeOf(0, 2), None, None}, free}
	last, next := int32(0), int32(2)
	for i, p := range insertionOrder(tr.Pts, along[n:]) {
		if err := pulse.Step(ctx, i, n); err != nil {
			return err
		}
		t, on, ok := tr.find(last, tr.Pts[p])
		if !ok {
			return fmt.Errorf("mesh: point %v twice or outside the box", tr.Pts[p])
		}
		tr.put(p, t, on, next, next+1)
		last, next = next, next+2
	}
	return nil
}

// strides is how many triangles find crosses before it takes to walk, and walkTo before it wanders; any number is right.
const strides = 1 << 8

// find is walk for a triangulation that no constraint has changed yet. It need not toss for its way: in a Delaunay
// triangulation no walk across edges that have p behind them goes in circles (De Floriani, Falcidieno, Nagy and Pienovi, "On
// sorting triangles in a Delaunay tessellation", Algorithmica 6, 1991).
func (tr *Triangulation) find(t int32, p exact.Pt) (tri int32, on int, ok bool) {
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
		c := tr.Pts[r.v[e.Prev().Corner()]]
		s1 := exact.Area2(b, c, p)
		if s1 < 0 {
			if e, a = r.n[e.Next().Corner()], c; e == None {
				return t, -1, false
			}
			s = 1
			continue
		}
		s2 := exact.Area2(c, a, p)
		if s2 < 0 {
			if e, b = r.n[e.Prev().Corner()], c; e == None {
				return t, -1, false
			}
			s = 1
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
	return tr.walk(e.Tri(), p)
}

// put makes p a corner of the triangulation, inside triangle t or on its edge on, when that is not -1, and flips until all is as
// it should be. It writes two more triangles: u and w. Both have p as their last corner.
func (tr *Triangulation) put(p, t int32, on int, u, w int32) {
	if on < 0 {
		tr.splitTri(t, u, w, p)
	} else {
		tr.splitEdge(EdgeOf(t, on), u, w, p)
	}
	tr.settle()
}

// splitTri puts p strictly inside t and leaves the three edges around it to examine. p is the last corner of all triangles
// around it: t, u and w.
func (tr *Triangulation) splitTri(t, u, w, p int32) {
	r := &tr.tris[t]
	a, b, c := r.v[0], r.v[1], r.v[2]
	n1, n2 := r.n[1], r.n[2]
	tr.tris[u] = rawTri{[3]int32{b, c, p}, [3]Edge{n1, EdgeOf(w, 2), EdgeOf(t, 1)}, [3]int32{r.c[1], -1, -1}}
	tr.tris[w] = rawTri{[3]int32{c, a, p}, [3]Edge{n2, EdgeOf(t, 2), EdgeOf(u, 1)}, [3]int32{r.c[2], -1, -1}}
	r.v[2], r.n[1], r.n[2], r.c[1], r.c[2] = p, EdgeOf(u, 2), EdgeOf(w, 1), -1, -1
	tr.pair(n1, EdgeOf(u, 0))
	tr.pair(n2, EdgeOf(w, 0))
	tr.todo = append(tr.todo, t, u, w)
}

// splitEdge puts p on e, inside the box, and leaves the four edges around it to examine. p is the last corner of all triangles
// around it.
func (tr *Triangulation) splitEdge(e Edge, w, x, p int32) {
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
	tr.todo = append(tr.todo, t, u, w, x)
}

// settle examines edge 0 of each triangle on the stack, opposite the new point, which is their last corner, and flips until all
// are as they should be (Lawson, "Software for C1 surface interpolation", 1977).
func (tr *Triangulation) settle() {
	stack, tris, pts := tr.todo, tr.tris, tr.Pts
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
			if !outdone(pts[a], pts[b], pts[p], pts[d]) {
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
	tr.todo = stack
}

// pair makes e, if it is an edge at all, name f as its twin.
func (tr *Triangulation) pair(e, f Edge) {
	if e != None {
		tr.tris[e.Tri()].n[e.Corner()] = f
	}
}
