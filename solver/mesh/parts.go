package mesh

import (
	"context"
	"slices"

	"enfilade/solver/pulse"
)

// insertAll starts from the box, whose corners along names last, and inserts the other points. The first rounds are put in one
// after the other; then the curve is cut into parts, each of which goes through the other rounds by itself; then what lies
// between the parts is mended, and the points follow that had to wait. The number of parts is no question of processors, so the
// outcome is the same on any number of them. O(n log n) expected, all but the mending in parts.
func (tr *Triangulation) insertAll(ctx context.Context, along []int32, parts int) error {
	n := len(along) - 4
	tr.tris = make([]rawTri, 2*n+2)
	first := tr.begin(along[n:])
	order, ends := insertionOrder(tr.Pts, along[n:])
	if parts < 2 {
		return first.insert(ctx, order)
	}
	if err := first.insert(pulse.Part(ctx, 0, 0.1), order[:ends[alone]]); err != nil {
		return err
	}
	ins, shares := tr.shareOut(order, ends, parts, first.next)
	err := pulse.Each(pulse.Part(ctx, 0.1, 0.9), parts, func(ctx context.Context, i int) error {
		for r, list := range shares[i] {
			if err := ins[i].insert(pulse.Part(ctx, partOfRound(r), partOfRound(r+1)), list); err != nil {
				return err
			}
		}
		return nil
	})
	if err != nil {
		return err
	}
	tr.mendBorders(parts)
	for i := range ins {
		if err := ins[i].insertLate(pulse.Part(ctx, 0.9, 1)); err != nil {
			return err
		}
	}
	return nil
}

// begin makes the two triangles of the box, whose corners are given, and an inserter for all points.
func (tr *Triangulation) begin(box []int32) inserter {
	a, b, c, d := box[0], box[1], box[2], box[3]
	free := [3]int32{-1, -1, -1}
	tr.tris[0] = rawTri{[3]int32{a, b, c}, [3]Edge{None, None, EdgeOf(1, 0)}, free}
	tr.tris[1] = rawTri{[3]int32{a, c, d}, [3]Edge{EdgeOf(0, 2), None, None}, free}
	return inserter{tr: tr, n: uint32(len(tr.Pts)), next: 2}
}

// alone is the last round of insertion that is not done in parts. The round r is half of what follows it and itself: a sixteenth
// of all points goes in before the parts do, so that few triangles lie across their borders.
const alone = 4

// partOfRound returns how much of a part is done before its round r, 0 for the first after alone.
func partOfRound(r int) float64 { return float64(int(1)<<r-1) / (1<<alone - 1) }

// partsOf returns into how many parts the insertion of n points is cut: of few points, too many lie near a border and have to
// wait (one in thirty of 400,000 points in four parts, one in eight of 4,000 in two).
func partsOf(n int) int {
	switch {
	case n < 1<<16:
		return 1
	case n < 1<<19:
		return 4
	}
	return 8
}

// cut returns where part i of the points along the curve begins.
func (tr *Triangulation) cut(i, parts int) int32 { return int32(i * len(tr.Pts) / parts) }

// shareOut makes an inserter for each part, and gives it its points of each round after alone. The triangles from next on are
// theirs to write, two for each point.
func (tr *Triangulation) shareOut(order []int32, ends [rounds]int32, parts int, next int32) ([]inserter, [][alone][]int32) {
	ins, shares := make([]inserter, parts), make([][alone][]int32, parts)
	for i := range ins {
		lo, hi := tr.cut(i, parts), tr.cut(i+1, parts)
		in := inserter{tr: tr, lo: lo, n: uint32(hi - lo), next: next}
		for k := ends[alone+1]; k < ends[alone]; k++ {
			t := 2 + 2*k // written when the point went in
			if v := &tr.tris[t].v; !in.outside(v[0]) && !in.outside(v[1]) && !in.outside(v[2]) {
				in.before = append(in.before, anchor{order[k], t})
			}
		}
		for r := range alone {
			list := order[ends[alone-r]:ends[alone-1-r]]
			from, _ := slices.BinarySearch(list, lo)
			to, _ := slices.BinarySearch(list, hi)
			shares[i][r] = list[from:to]
			next += 2 * int32(to-from)
		}
		if len(in.before) > 0 {
			in.last = in.before[0].t
		} else {
			shares[i] = in.postpone(shares[i])
		}
		ins[i] = in
	}
	return ins, shares
}

// postpone makes all points of a part wait that has no triangle of its own.
func (in *inserter) postpone(share [alone][]int32) (none [alone][]int32) {
	for _, list := range share {
		for _, p := range list {
			in.late = append(in.late, late{p, 0})
		}
	}
	return none
}

// mendBorders makes the triangulation Delaunay where parts meet: elsewhere it is.
func (tr *Triangulation) mendBorders(parts int) {
	var stack []Edge
	for t := range tr.tris {
		v := &tr.tris[t].v
		lo, hi := min(v[0], v[1], v[2]), max(v[0], v[1], v[2])
		for i := 1; i < parts; i++ {
			if cut := tr.cut(i, parts); lo < cut && cut <= hi {
				stack = append(stack, EdgeOf(int32(t), 0), EdgeOf(int32(t), 1), EdgeOf(int32(t), 2))
				break
			}
		}
	}
	// A flip gives the four edges around it new names, so they are examined under those; an old name is that of another edge,
	// which it does no harm to examine.
	for len(stack) > 0 {
		e := stack[len(stack)-1]
		stack = stack[:len(stack)-1]
		if tr.wrong(e) {
			t, u := tr.flip(e)
			stack = append(stack, EdgeOf(t, 0), EdgeOf(t, 1), EdgeOf(u, 0), EdgeOf(u, 1))
		}
	}
}
