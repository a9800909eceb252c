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

// relax makes k the root of its sector if it is nearer to the start than the one before. Of two equally near ones the walk
// with fewer turns is kept, then the one whose points come first in order; a second, different way is remembered as a tie.
func (f *Finder) relax(k node) {
	old := f.best[k.sector]
	if old >= 0 {
		o := &f.nodes[old]
		if tied(k.g, o.g) {
			f.settleTie(o, &k)
			return
		}
		if k.g > o.g {
			return
		}
	}
	k.ties = f.nodes[k.parent].ties
	f.best[k.sector] = int32(len(f.nodes))
	f.nodes = append(f.nodes, k)
	f.queue.push(cone{key: k.g, node: f.best[k.sector], in: mesh.None})
}

// settleTie chooses between two equally long walks to one root; its cones serve both.
func (f *Finder) settleTie(o, k *node) {
	if o.parent == k.parent {
		return
	}
	f.one = f.chain(f.one[:0], o.parent, o.at)
	f.two = f.chain(f.two[:0], k.parent, k.at)
	switch c := compareWalks(f.one, f.two); {
	case c == 0:
		o.ties = o.ties || f.nodes[k.parent].ties
	case c > 0:
		o.parent, o.g, o.ties = k.parent, k.g, true
	default:
		o.ties = true
	}
}

// chain appends the points of the walk to node n and on to end, without straight ones, from the end backwards.
func (f *Finder) chain(dst []exact.Pt, n int32, end exact.Pt) []exact.Pt {
	dst = append(dst, end)
	for ; n >= 0; n = f.nodes[n].parent {
		p := f.nodes[n].at
		if k := len(dst); k >= 2 && straight(dst[k-2], dst[k-1], p) {
			dst[k-1] = p
			continue
		}
		dst = append(dst, p)
	}
	return dst
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
	if o.found && tied(g, o.g) {
		f.settleEnd(o, n, g, end, piece)
		return
	}
	if o.found && g > o.g {
		return
	}
	o.found, o.g, o.node, o.end, o.piece, o.ties = true, g, n, end, piece, false
	if f.field != nil {
		return // which wants all of the floor
	}
	worst := 0.0
	for k := range f.goals {
		worst = max(worst, f.goals[k].g)
	}
	f.limit = worst / tieSlack
}

// settleEnd chooses between two equally long walks to one goal.
func (f *Finder) settleEnd(o *goal, n int32, g float64, end [2]float64, piece int32) {
	f.one = f.turnsTo(f.one[:0], o.node, o.end)
	f.two = f.turnsTo(f.two[:0], n, end)
	ax, ay := f.place(o.node, o.end)
	bx, by := f.place(n, end)
	c := compareWalks(f.one, f.two)
	// Ends are measured, not decided: two candidates a thousandth of a unit apart are one place seen from two triangles.
	apart := math.Hypot(ax-bx, ay-by) > 1.0/1024
	if c == 0 && !apart {
		if g < o.g || g == o.g && (ax > bx || ax == bx && ay > by) { // the same walk; which bits it gets must not depend on the order
			o.g, o.node, o.end, o.piece = g, n, end, piece
		}
		o.ties = o.ties || f.nodes[n].ties
		return
	}
	if c == 0 {
		c = cmp.Or(cmp.Compare(ax, bx), cmp.Compare(ay, by))
	}
	if c > 0 {
		o.g, o.node, o.end, o.piece = g, n, end, piece
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
	if !o.found {
		return Path{Piece: -1}
	}
	back := f.turnsTo(nil, o.node, o.end)
	slices.Reverse(back)
	x, y := f.place(o.node, o.end)
	p := Path{Found: true, Length: lengthOf(back, x, y), Turns: back, End: [2]float64{x, y}, Piece: int(o.piece), Ties: o.ties || f.nodes[o.node].ties}
	for n := o.node; n >= 0 && !p.Ties; n = f.nodes[n].parent {
		p.Ties = f.nodes[n].ties
	}
	return p
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
