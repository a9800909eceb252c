package walk

import (
	"math"
	"slices"

	"enfilade/solver/exact"
	"enfilade/solver/mesh"
)

// forest is a forest of disjoint sets (Tarjan, JACM 22, 1975).
type forest []int32

func newForest(n int32) forest {
	f := make(forest, n)
	for i := range f {
		f[i] = int32(i)
	}
	return f
}

func (f forest) find(i int32) int32 {
	for f[i] != i {
		f[i] = f[f[i]]
		i = f[i]
	}
	return i
}

// join unites two sets, and reports whether they were two.
func (f forest) join(i, j int32) bool {
	i, j = f.find(i), f.find(j)
	f[i] = j
	return i != j
}

// join unites the pieces that meet along an edge, unless the edge stops walking or is a gap, and tells all gaps the pieces on
// their two sides. What it returns are the cells: the pieces between which one walks without passing a gap. Errors: ErrCrowded.
func (b *gapFinder) join() (forest, error) {
	f := newForest(b.count)
	gapOn := b.sortOut()
	var crossing []int32
	rank := make([]int32, len(b.gaps)) // of the gaps that cross the edge at hand
	fill(rank, math.MaxInt32)
	for t := range b.m.Tris {
		tri := &b.m.Tris[t]
		for i := range 3 {
			e := mesh.EdgeOf(int32(t), i)
			if tri.StopsWalk(i) || tri.N[i] < e {
				continue
			}
			crossing = b.crossing(crossing[:0], e)
			for n, g := range crossing {
				rank[g] = int32(n)
			}
			for n := range len(crossing) + 1 {
				if err := b.crowded(); err != nil {
					return nil, err
				}
				x := b.along(int32(t), tri.P[i], tri.P[inc[i]], rank, n)
				y := b.along(tri.N[i].Tri(), tri.P[i], tri.P[inc[i]], rank, n)
				if len(gapOn) > 0 && b.gaps[gapOn[0]].edge == e {
					b.gaps[gapOn[0]].a, b.gaps[gapOn[0]].b = x, y
					gapOn = gapOn[1:]
				} else {
					f.join(x, y)
				}
			}
			for _, g := range crossing {
				rank[g] = math.MaxInt32
			}
		}
	}
	return f, nil
}

// sortOut lists the gaps that are edges, in the order of their edges: that in which they were found. The others, all of whose
// triangles have been cut by now, learn the pieces beside them.
func (b *gapFinder) sortOut() []int32 {
	var list []int32
	for i := range b.gaps {
		if g := &b.gaps[i]; g.whole {
			list = append(list, int32(i))
		} else {
			g.a, g.b = b.beside(g.edge.Tri(), int32(i))
		}
	}
	return list
}

// crossing appends the gaps that cross edge e, in the order along it.
func (b *gapFinder) crossing(dst []int32, e mesh.Edge) []int32 {
	if b.root[e.Tri()] < 0 {
		return dst
	}
	p, q := b.m.Ends(e)
	edge := exact.Through(p, q)
	dst = b.gapsOf(dst, b.root[e.Tri()])
	dst = slices.DeleteFunc(dst, func(g int32) bool {
		l := b.gaps[g].line()
		return l.Side(p)*l.Side(q) >= 0
	})
	slices.SortFunc(dst, func(g, h int32) int {
		x, y := meeting(edge, b.gaps[g].line()), meeting(edge, b.gaps[h].line())
		return exact.CompareFractions(x.Num, x.Den, y.Num, y.Den)
	})
	return dst
}

// connect numbers the cells, sorts the gaps from the widest down, and keeps those that the widest ways between cells need: the
// maximum spanning forest (Kruskal, 1956).
func (w *Widths) connect(f forest) {
	w.cell = make([]int32, w.count)
	cells := int32(0)
	for i := range w.cell {
		if f.find(int32(i)) == int32(i) {
			w.cell[i] = cells
			cells++
		}
	}
	for i := range w.cell {
		w.cell[i] = w.cell[f.find(int32(i))]
	}
	place := w.sortGaps()
	tree := newForest(cells)
	var kept []int32
	for i := range w.gaps {
		if tree.join(w.cell[w.gaps[i].a], w.cell[w.gaps[i].b]) {
			kept = append(kept, int32(i))
		}
	}
	for i := range w.cuts {
		w.cuts[i].gap = place[w.cuts[i].gap]
	}
	w.makeLinks(kept, cells)
}

// sortGaps sorts the gaps and returns for each old index the new one.
func (w *Widths) sortGaps() []int32 {
	order := make([]int32, len(w.gaps))
	for i := range order {
		order[i] = int32(i)
	}
	slices.SortFunc(order, func(i, j int32) int { return byWidth(&w.gaps[i], &w.gaps[j]) })
	place, sorted := make([]int32, len(order)), make([]gap, len(order))
	for k, i := range order {
		place[i], sorted[k] = int32(k), w.gaps[i]
	}
	w.gaps = sorted
	return place
}

// makeLinks files the kept gaps by the cells on their two sides.
func (w *Widths) makeLinks(kept []int32, cells int32) {
	w.first = make([]int32, cells+1)
	for _, g := range kept {
		w.first[w.cell[w.gaps[g].a]+1]++
		w.first[w.cell[w.gaps[g].b]+1]++
	}
	for c := range cells {
		w.first[c+1] += w.first[c]
	}
	w.links = make([]link, 2*len(kept))
	next := slices.Clone(w.first)
	for _, g := range kept {
		a, b := w.cell[w.gaps[g].a], w.cell[w.gaps[g].b]
		w.links[next[a]] = link{g, b}
		w.links[next[b]] = link{g, a}
		next[a]++
		next[b]++
	}
}
