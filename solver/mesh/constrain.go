package mesh

import (
	"context"
	"fmt"

	"enfilade/solver/exact"
	"enfilade/solver/pulse"
)

// constrainAll forces every edge into the triangulation and restores the Delaunay property around it. The edges are taken in
// the order of their first points along the curve.
func (tr *Triangulation) constrainAll(ctx context.Context, edges [][2]int32, along []int32) error {
	tr.out = make([]Edge, len(tr.Pts))
	for t := range tr.tris {
		for i, v := range tr.tris[t].v {
			tr.out[v] = EdgeOf(int32(t), i)
		}
	}
	first := make([]int32, len(edges))
	for k, e := range edges {
		first[k] = along[e[0]]
	}
	for i, k := range byKey(first, len(along)) {
		if err := pulse.Step(ctx, i, len(edges)); err != nil {
			return err
		}
		if err := tr.constrain(along[edges[k][0]], along[edges[k][1]], k); err != nil {
			return err
		}
	}
	return nil
}

// constrain forces the edge from a to b in as constraint k.
func (tr *Triangulation) constrain(a, b, k int32) error {
	e, crossed, err := tr.towards(a, b)
	if err != nil {
		return err
	}
	if crossed && tr.tris[e.Tri()].v[e.Prev().Corner()] == b {
		a, b = b, a // the way leads from the other end
	}
	if crossed {
		if err := tr.flipThrough(a, b, e); err != nil {
			return err
		}
		e = tr.lookup(a, b)
	}
	if tr.tris[e.Tri()].c[e.Corner()] >= 0 {
		return fmt.Errorf("%w: edge %v to %v twice", ErrCrossing, tr.Pts[a], tr.Pts[b])
	}
	tr.mark(e, k)
	if crossed {
		tr.restore()
	}
	return nil
}

// mark writes constraint k, -1 for none, on both sides of e.
func (tr *Triangulation) mark(e Edge, k int32) {
	f := tr.tris[e.Tri()].n[e.Corner()]
	tr.tris[e.Tri()].c[e.Corner()] = k
	tr.tris[f.Tri()].c[f.Corner()] = k
	if tr.logs {
		tr.log = append(tr.log, e.Tri(), f.Tri())
	}
}

// flipThrough flips every edge that crosses the segment from a to b, the first of which is e, until the segment is an edge.
// Edges are remembered by their ends, since flips move half-edges about. The new edges are left in tr.work.
//
// The crossing edges are gone through forth and back: of many that meet in one point, often only the first or the last can be
// flipped, and then the next one. As long as edges cross, some can be flipped so that fewer meet in one point; a throw of a coin
// keeps the rest from being flipped to and fro for ever.
func (tr *Triangulation) flipThrough(a, b int32, e Edge) error {
	pa, pb := tr.Pts[a], tr.Pts[b]
	var queue [][2]int32
	for {
		r := &tr.tris[e.Tri()]
		i := e.Corner()
		if r.c[i] >= 0 {
			return fmt.Errorf("%w: near %v", ErrCrossing, tr.Pts[r.v[i]])
		}
		queue = append(queue, [2]int32{r.v[i], r.v[inc[i]]})
		f := r.n[i]
		apex := tr.tris[f.Tri()].v[f.Prev().Corner()]
		if apex == b {
			break
		}
		switch s := exact.Area2(pa, pb, tr.Pts[apex]); {
		case s > 0:
			e = f.Next()
		case s < 0:
			e = f.Prev()
		default:
			return fmt.Errorf("%w: %v lies on the edge from %v to %v", ErrCrossing, tr.Pts[apex], pa, pb)
		}
	}
	tr.work = tr.work[:0]
	var later [][2]int32
	for pass, coin := 0, uint32(1); len(queue) > 0; pass++ {
		for len(queue) > 0 {
			q := queue[len(queue)-1]
			queue = queue[:len(queue)-1]
			coin = coin*1664525 + 1013904223
			if d := tr.lookup(q[0], q[1]); !tr.convex(d) || pass > 4 && coin>>16&1 == 0 {
				later = append(later, q)
			} else if c, x := tr.flipAcross(d); tr.apart(a, b, c, x) {
				later = append(later, [2]int32{c, x})
			} else {
				tr.work = append(tr.work, [2]int32{c, x})
			}
		}
		queue, later = later, queue
	}
	return nil
}

// flipAcross flips d and returns the ends of the new diagonal.
func (tr *Triangulation) flipAcross(d Edge) (c, x int32) {
	t, u := tr.flipTracked(d)
	return tr.tris[t].v[0], tr.tris[u].v[0]
}

// apart reports whether c and x, which are joined by an edge, lie on different sides of the segment from a to b.
func (tr *Triangulation) apart(a, b, c, x int32) bool {
	pa, pb := tr.Pts[a], tr.Pts[b]
	return c != a && c != b && x != a && x != b && exact.Orient(pa, pb, tr.Pts[c])*exact.Orient(pa, pb, tr.Pts[x]) < 0
}

// convex reports whether the two triangles at e form a strictly convex quadrilateral.
func (tr *Triangulation) convex(e Edge) bool {
	r := &tr.tris[e.Tri()]
	i := e.Corner()
	f := r.n[i]
	a, b, c := tr.Pts[r.v[i]], tr.Pts[r.v[inc[i]]], tr.Pts[r.v[inc[inc[i]]]]
	d := tr.Pts[tr.tris[f.Tri()].v[f.Prev().Corner()]]
	return exact.Area2(c, a, d) > 0 && exact.Area2(d, b, c) > 0
}

// flipTracked flips e and keeps the half-edges that leave its four corners known.
func (tr *Triangulation) flipTracked(e Edge) (t, u int32) {
	t, u = tr.flip(e)
	for i, v := range tr.tris[t].v {
		tr.out[v] = EdgeOf(t, i)
	}
	b := tr.tris[u].v[1]
	tr.out[b] = EdgeOf(u, 1)
	return t, u
}

// restore makes the edges of tr.work, and whatever flips around them, Delaunay where no constraint holds them. It empties
// tr.work.
func (tr *Triangulation) restore() {
	for len(tr.work) > 0 {
		w := tr.work[len(tr.work)-1]
		tr.work = tr.work[:len(tr.work)-1]
		e := tr.lookup(w[0], w[1])
		if e == None || !tr.wrong(e) {
			continue
		}
		tr.review(tr.flipTracked(e))
	}
}

// review leaves the four edges around a flip, whose triangles are t and u, to be examined.
func (tr *Triangulation) review(t, u int32) {
	c, a, d, b := tr.tris[t].v[0], tr.tris[t].v[1], tr.tris[t].v[2], tr.tris[u].v[1]
	tr.work = append(tr.work, [2]int32{c, a}, [2]int32{a, d}, [2]int32{d, b}, [2]int32{b, c})
}
