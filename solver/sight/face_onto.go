package sight

import (
	"cmp"
	"slices"

	"enfilade/solver/exact"
	"enfilade/solver/mesh"
)

// Onto appends to dst the pieces of another finder's mesh, cut into pieces of this one's. Both meshes must have the same edges
// that stop sight where the pieces are. O(pieces · triangles that each overlaps).
func (f *Finder) Onto(dst, pieces []Piece, from *Finder) []Piece {
	if f.m == from.m {
		return append(dst, pieces...)
	}
	f.newTurn()
	order := make([]int, len(pieces))
	for i := range order {
		order[i] = i
	}
	slices.SortStableFunc(order, func(a, b int) int { return cmp.Compare(pieces[a].Tri, pieces[b].Tri) })
	var under []int32
	last := int32(-1)
	for _, i := range order {
		p := &pieces[i]
		if t := &from.m.Tris[p.Tri]; p.Tri != last {
			last = p.Tri
			under = f.under(under[:0], t)
		}
		for _, g := range under {
			q := *p
			q.Tri = g
			for _, l := range edgesOf(&from.m.Tris[p.Tri]) {
				q.add(l, false)
			}
			if n := len(dst); len(f.record(dst, &q)) > n {
				f.faces.convex.trim(&q)
				dst = append(dst, q)
			}
		}
	}
	return dst
}

// newTurn forgets which triangles are seen all over.
func (f *Finder) newTurn() {
	b := &f.faces
	if b.turn++; len(b.full) < len(f.m.Tris) {
		b.full = make([]int32, len(f.m.Tris))
	}
}

func edgesOf(t *mesh.Tri) [3]exact.Line {
	return [3]exact.Line{exact.Through(t.P[0], t.P[1]), exact.Through(t.P[1], t.P[2]), exact.Through(t.P[2], t.P[0])}
}

// under appends the triangles that share more than a border with t, a triangle of another mesh: it goes from one that does to
// its neighbours.
func (f *Finder) under(dst []int32, t *mesh.Tri) []int32 {
	b := &f.faces
	if b.look++; len(b.seen) < len(f.m.Tris) {
		b.seen = make([]int32, len(f.m.Tris))
	}
	try := func(g int32) {
		if b.seen[g] != b.look {
			b.seen[g] = b.look
			if f.shares(g, t) {
				dst = append(dst, g)
			}
		}
	}
	n := len(dst)
	if place, ok := f.m.Locate(t.P[0]); ok { // around a corner of t some triangle shares its inside
		try(place.Tri)
		switch {
		case place.Corner >= 0:
			f.m.Around(mesh.EdgeOf(place.Tri, place.Corner), func(e mesh.Edge) { try(e.Tri()) })
		case place.Edge != mesh.None:
			try(f.m.Twin(place.Edge).Tri())
		}
	}
	for ; n < len(dst); n++ {
		for _, e := range f.m.Tris[dst[n]].N {
			if e != mesh.None {
				try(e.Tri())
			}
		}
	}
	return dst
}

// shares reports whether triangle g shares more than a border with t.
func (f *Finder) shares(g int32, t *mesh.Tri) bool {
	f.faces.convex.Start(&f.m.Tris[g])
	for _, l := range edgesOf(t) {
		if !f.faces.convex.Cut(l) {
			return false
		}
	}
	return true
}
