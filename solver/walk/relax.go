package walk

import (
	"cmp"
	"math"
	"slices"

	"enfilade/solver/exact"
	"enfilade/solver/mesh"
)

// tied reports whether two lengths differ by no more than four units in the last place.
func tied(a, b float64) bool {
	m := max(a, b)
	return math.Abs(a-b) <= 4*(math.Nextafter(m, math.Inf(1))-m)
}

// other is a walk to a node that is as long as its own and comes over another corner.
type other struct {
	parent int32
	g      float64
	next   int32 // -1 for none
}

// relax makes k the root of its sector if it is nearer to the start than the one before and can lead to a goal. An equally near
// one is remembered; its cones would be the same.
func (f *Finder) relax(k node) {
	old := f.best[k.sector]
	if old >= 0 {
		o := &f.nodes[old]
		if tied(k.g, o.g) {
			if o.parent != k.parent {
				if o.others < 0 {
					f.tied = append(f.tied, old)
				}
				f.others = append(f.others, other{k.parent, k.g, o.others})
				o.others = int32(len(f.others) - 1)
			}
			return
		}
		if k.g > o.g {
			return
		}
	}
	key := k.g + f.left(k.at, k.at)
	if key > f.limit {
		return
	}
	f.best[k.sector] = int32(len(f.nodes))
	f.nodes = append(f.nodes, k)
	f.queue.push(cone{key: key, node: f.best[k.sector], in: mesh.None})
}

// settleTies chooses among equally long walks, to the nodes first, the nearest one before the others, then to the goals: the
// order in which a flood finds them must not show.
func (f *Finder) settleTies() {
	slices.SortFunc(f.tied, func(a, b int32) int { return cmp.Compare(f.nodes[a].g, f.nodes[b].g) })
	for _, n := range f.tied {
		o := &f.nodes[n]
		for i := o.others; i >= 0; i = f.others[i].next {
			f.settleTie(o, &f.others[i])
		}
	}
	for i := range f.goals {
		o := &f.goals[i]
		if o.last < 0 {
			continue
		}
		o.end = f.ends[o.last]
		for k := o.end.next; k >= 0; k = f.ends[k].next {
			f.settleEnd(o, &f.ends[k])
		}
	}
}

// settleTie chooses between two equally long walks to one root: the one with fewer turns, then the one whose points come first
// in order. A second, different way is told as a tie.
func (f *Finder) settleTie(o *node, k *other) {
	fork := f.fork(o.parent, k.parent)
	// A step beyond the fork, where a straight stretch of both may end, the walks are the same.
	stop := f.nodes[fork].parent
	if stop >= 0 {
		stop = f.nodes[stop].parent
	}
	f.one = f.chainUpTo(f.one[:0], o.parent, o.at, stop)
	f.two = f.chainUpTo(f.two[:0], k.parent, o.at, stop)
	switch c := compareWalks(f.one, f.two); {
	case c == 0:
		o.ties = o.ties || f.tiesUpTo(k.parent, fork)
	case c > 0:
		o.parent, o.g, o.ties = k.parent, k.g, true
	default:
		o.ties = true
	}
}

// tiesOn reports whether there is another walk as long to a node on the walk to n.
func (f *Finder) tiesOn(n int32) bool { return f.tiesUpTo(n, -1) }

// tiesUpTo is tiesOn without node stop and what comes before it.
func (f *Finder) tiesUpTo(n, stop int32) bool {
	for ; n != stop; n = f.nodes[n].parent {
		if f.nodes[n].ties {
			return true
		}
	}
	return false
}

// chain appends the points of the walk to node n and on to end, without straight ones, from the end backwards.
func (f *Finder) chain(dst []exact.Pt, n int32, end exact.Pt) []exact.Pt {
	return f.chainUpTo(dst, n, end, -1)
}

// chainUpTo is chain without node stop and what comes before it.
func (f *Finder) chainUpTo(dst []exact.Pt, n int32, end exact.Pt, stop int32) []exact.Pt {
	dst = append(dst, end)
	for ; n != stop; n = f.nodes[n].parent {
		p := f.nodes[n].at
		if k := len(dst); k >= 2 && straight(dst[k-2], dst[k-1], p) {
			dst[k-1] = p
			continue
		}
		dst = append(dst, p)
	}
	return dst
}

// fork returns the last node that the walks to nodes a and b have in common.
func (f *Finder) fork(a, b int32) int32 {
	for a != b {
		if f.nodes[a].g > f.nodes[b].g {
			a = f.nodes[a].parent
		} else {
			b = f.nodes[b].parent
		}
	}
	return a
}

// straight reports whether b lies on the way straight on from a to c. At the end of a thin wall a walk may turn straight
// back, which is a turn.
func straight(a, b, c exact.Pt) bool {
	return exact.Orient(a, b, c) == 0 && b.Sub(a).Dot(c.Sub(b)) > 0
}

// compareWalks orders walks given backwards from a common end: fewer turns first, then by their points from the start on.
func compareWalks(a, b []exact.Pt) int {
	if len(a) != len(b) {
		return len(a) - len(b)
	}
	for i := len(a) - 1; i >= 0; i-- {
		if c := a[i].Compare(b[i]); c != 0 {
			return c
		}
	}
	return 0
}

// offer takes a walk from node n to the point at offset end as a candidate for goal i; piece is the goal's piece it belongs to.
func (f *Finder) offer(i int32, n int32, g float64, end [2]float64, piece int32) {
	o := &f.goals[i]
	e := ending{g, n, end, piece, -1}
	if tied(g, o.g) {
		e.next = o.last
	} else if g > o.g {
		return
	}
	o.last = int32(len(f.ends))
	f.ends = append(f.ends, e)
	if g < o.g {
		o.g = g
		f.bound()
	}
}

// settleEnd chooses between two equally long walks to one goal.
func (f *Finder) settleEnd(o *goal, e *ending) {
	f.one = f.turnsTo(f.one[:0], o.end.node, o.end.off)
	f.two = f.turnsTo(f.two[:0], e.node, e.off)
	ax, ay := f.place(o.end.node, o.end.off)
	bx, by := f.place(e.node, e.off)
	c := compareWalks(f.one, f.two)
	// Ends are measured, not decided: two candidates a thousandth of a unit apart are one place seen from two triangles.
	apart := math.Hypot(ax-bx, ay-by) > 1.0/1024
	if c == 0 && !apart {
		if e.g < o.end.g || e.g == o.end.g && (ax > bx || ax == bx && ay > by) { // the same walk; which bits it gets must not depend on the order
			o.end = *e
		}
		o.ties = o.ties || f.tiesOn(e.node)
		return
	}
	if c == 0 {
		c = cmp.Or(cmp.Compare(ax, bx), cmp.Compare(ay, by))
	}
	if c > 0 {
		o.end = *e
	}
	o.ties = true
}

// place returns the point at offset end from node n, in grid units.
func (f *Finder) place(n int32, end [2]float64) (x, y float64) {
	p := f.nodes[n].at
	return float64(p.X) + end[0], float64(p.Y) + end[1]
}

// turnsTo appends the points at which the walk to offset end from node n starts and turns, backwards. The end itself is not
// among them, nor is the last corner when the walk passes it straight on or ends there.
func (f *Finder) turnsTo(dst []exact.Pt, n int32, end [2]float64) []exact.Pt {
	k := &f.nodes[n]
	if k.parent >= 0 {
		// Not k.toward: of two equally long ways that may be the direction of the other one.
		in := k.at.Sub(f.nodes[k.parent].at)
		// The offset is measured, so whether the last bend is one is, too: a bend of less than 2^-40 is none.
		cross := float64(in.X)*end[1] - float64(in.Y)*end[0]
		dot := float64(in.X)*end[0] + float64(in.Y)*end[1]
		if end == [2]float64{} || dot > 0 && math.Abs(cross) <= 0x1p-40*math.Hypot(end[0], end[1])*math.Sqrt(float64(in.Len2())) {
			return f.chain(dst, k.parent, k.at)[1:]
		}
	}
	return f.chain(dst, k.parent, k.at)
}

// path reads a goal's walk back to the start.
func (f *Finder) path(o *goal) Path {
	if o.last < 0 {
		return Path{Piece: -1}
	}
	f.one = f.turnsTo(f.one[:0], o.end.node, o.end.off)
	back := slices.Clone(f.one)
	slices.Reverse(back)
	x, y := f.place(o.end.node, o.end.off)
	return Path{Found: true, Length: lengthOf(back, x, y), Turns: back, End: [2]float64{x, y}, Piece: int(o.end.piece),
		Ties: o.ties || f.tiesOn(o.end.node)}
}

// lengthOf adds the walk's legs up, from the start on: the sum then depends on the walk alone and not on the corners at which
// the search happened to notice its straight stretches.
func lengthOf(turns []exact.Pt, x, y float64) float64 {
	sum := 0.0
	for i := 1; i < len(turns); i++ {
		sum += exact.Dist(turns[i-1], turns[i])
	}
	last := turns[len(turns)-1]
	return sum + math.Hypot(x-float64(last.X), y-float64(last.Y))
}
