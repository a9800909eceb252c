package mesh

import (
	"context"
	"fmt"

	"enfilade/solver/exact"
	"enfilade/solver/pulse"
)

// constrainAll forces every edge into the triangulation and restores the Delaunay property around it. Most edges are there
// already, as corners of a plan lie close along its walls: they are recognised in one pass over the triangles, and the others
// are forced in one by one, in the order of their first points along the curve. O(n) for those that are there.
func (tr *Triangulation) constrainAll(ctx context.Context, edges [][2]int32, along []int32) error {
	h := holdBy(edges, along)
	_, err := pulse.Split(pulse.Part(ctx, 0, 0.3), len(tr.tris), func(ctx context.Context, lo, hi int) (none struct{}, err error) {
		for t := lo; t < hi && err == nil; t++ {
			tr.recognise(int32(t), h)
			err = pulse.Step(ctx, t-lo, hi-lo)
		}
		return none, err
	})
	if err != nil {
		return err
	}
	ctx = pulse.Part(ctx, 0.3, 1)
	for i, e := range h.list {
		if err := pulse.Step(ctx, i, len(edges)); err != nil {
			return err
		}
		if e.done {
			continue
		}
		if tr.out == nil {
			tr.findOut()
		}
		ends := edges[e.edge]
		if err := tr.constrain(along[ends[0]], along[ends[1]], e.edge); err != nil {
			return err
		}
	}
	return nil
}

// held is an edge as known to the one of its ends that comes first along the curve: the other end, and whether it has been
// marked.
type held struct {
	to, edge int32
	done     bool
}

// holds are edges by their first ends: those of point v are list[start[v]:start[v+1]].
type holds struct {
	start []int32
	list  []held
}

// holdBy gathers edges by counting. O(n).
func holdBy(edges [][2]int32, along []int32) holds {
	h := holds{make([]int32, len(along)+2), make([]held, len(edges))}
	next := h.start[1:] // which becomes where the next point's begin
	for _, e := range edges {
		h.start[min(along[e[0]], along[e[1]])+2]++
	}
	for i := 2; i < len(h.start); i++ {
		h.start[i] += h.start[i-1]
	}
	for k, e := range edges {
		a, b := along[e[0]], along[e[1]]
		a, b = min(a, b), max(a, b)
		h.list[next[a]] = held{to: b, edge: int32(k)}
		next[a]++
	}
	return h
}

// few is how many edges of one point recognise goes through; any number is right.
const few = 16

// recognise marks those edges of triangle t that are to be held, each from one of its two sides.
func (tr *Triangulation) recognise(t int32, h holds) {
	r := &tr.tris[t]
	for i, n := range r.n {
		if n < EdgeOf(t, i) {
			continue // or None
		}
		a, b := r.v[i], r.v[inc[i]]
		a, b = min(a, b), max(a, b)
		list := h.list[h.start[a]:h.start[a+1]]
		if len(list) > few {
			continue // those of a point where many meet are found from their other ends
		}
		for k := range list {
			if e := &list[k]; e.to == b && !e.done {
				e.done = true
				r.c[i] = e.edge
				tr.tris[n.Tri()].c[n.Corner()] = e.edge
				break
			}
		}
	}
}

// findOut finds a half-edge that leaves each point. O(n).
func (tr *Triangulation) findOut() {
	tr.out = make([]Edge, len(tr.Pts))
	for t := range tr.tris {
		if tr.tris[t].v[0] == dead {
			continue
		}
		for i, v := range tr.tris[t].v {
			tr.out[v] = EdgeOf(int32(t), i)
		}
	}
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
	if crossed && tr.apexBehind(e) == b && tr.tris[e.Tri()].c[e.Corner()] < 0 {
		// One edge is crossed. The four around it remain in the triangulation, as a new edge only takes sight away.
		t, _ := tr.flipTracked(e)
		tr.mark(EdgeOf(t, 2), k)
		return nil
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

// apexBehind returns the corner that lies opposite e in the triangle on the other side of it.
func (tr *Triangulation) apexBehind(e Edge) int32 {
	f := tr.tris[e.Tri()].n[e.Corner()]
	return tr.tris[f.Tri()].v[f.Prev().Corner()]
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
