package plan

import (
	"cmp"
	"math"

	"enfilade/solver/exact"
)

// tip is one end of a wall that may lie near to something.
type tip struct {
	piece      int32
	start      bool // it is the wall's first point
	touches    bool // it meets something: nothing is to be told of it
	wall       *Wall
	inner, end exact.Pt // of its piece
	best       gap
	box        area
}

// gap is how a wall's end comes near to a piece without touching it.
type gap struct {
	wide float64 // grid units
	to   int32   // the piece
}

// area is an upright rectangle.
type area struct{ x0, y0, x1, y1 float64 }

func (b area) and(c area) area {
	return area{min(b.x0, c.x0), min(b.y0, c.y0), max(b.x1, c.x1), max(b.y1, c.y1)}
}

// meets reports whether the straight line of a piece, grown by r, may reach the box: false is sure.
func (b area) meets(q *piece, r float64) bool {
	ax, ay, bx, by := float64(q.a.X), float64(q.a.Y), float64(q.b.X), float64(q.b.Y)
	if max(ax, bx)+r < b.x0 || min(ax, bx)-r > b.x1 || max(ay, by)+r < b.y0 || min(ay, by)-r > b.y1 {
		return false
	}
	// All four corners of the box, grown, on one side of the line: how far its middle is from the line, beside how far its
	// corners reach across.
	dx, dy := bx-ax, by-ay
	mid := dx*((b.y0+b.y1)/2-ay) - dy*((b.x0+b.x1)/2-ax)
	reach := math.Abs(dx)*((b.y1-b.y0)/2+r) + math.Abs(dy)*((b.x1-b.x0)/2+r)
	return math.Abs(mid) <= reach
}

// tips is a tree over the ends of walls: neighbours along a curve, in pairs of pairs.
type tips struct {
	list []tip
	ends []int32 // the tips along the curve
	box  []area  // node i has the nodes 2i and 2i+1 below it; the leaves are the last half
	left []int32 // how many tips below each node touch nothing yet
	leaf int     // number of leaves, a power of two
}

// bunch is how many tips lie in one leaf.
const bunch = 4

// newTips makes the tree over all ends of open walls. O(n log n).
func (s *survey) newTips() *tips {
	t := &tips{}
	for i := range s.pieces {
		if s.stopped(i) {
			break
		}
		q := &s.pieces[i]
		if q.wall < 0 {
			continue
		}
		w := s.plan.obstacles.walls.at(int(q.wall))
		if w.Line.Closed() {
			continue
		}
		if q.index == 0 {
			t.add(q, int32(i), w, true)
		}
		if int(q.index) == w.Line.Len()-2 {
			t.add(q, int32(i), w, false)
		}
	}
	type place struct {
		key uint64
		tip int32
	}
	along := make([]place, len(t.list))
	for i := range t.list {
		along[i] = place{curve(t.list[i].end), int32(i)}
	}
	sortAsking(s, along, func(a, b place) int { return cmp.Or(cmp.Compare(a.key, b.key), cmp.Compare(a.tip, b.tip)) })
	t.ends = make([]int32, len(along))
	for i, p := range along {
		t.ends[i] = p.tip
	}
	for t.leaf = 1; t.leaf*bunch < len(t.ends); {
		t.leaf *= 2
	}
	t.box, t.left = make([]area, 2*t.leaf), make([]int32, 2*t.leaf)
	for n := 2*t.leaf - 1; n > 0; n-- {
		b := area{math.Inf(1), math.Inf(1), math.Inf(-1), math.Inf(-1)}
		if n < t.leaf {
			t.box[n], t.left[n] = t.box[2*n].and(t.box[2*n+1]), t.left[2*n]+t.left[2*n+1]
			continue
		}
		for _, k := range t.leafAt(n) {
			b = b.and(t.list[k].box)
			t.left[n]++
		}
		t.box[n] = b
	}
	return t
}

// add notes one end of a wall, which its piece q has.
func (t *tips) add(q *piece, i int32, w *Wall, start bool) {
	p := tip{piece: i, start: start, wall: w, inner: q.a, end: q.b, best: gap{math.Inf(1), -1}}
	if start {
		p.inner, p.end = p.end, p.inner
	}
	p.box = area{float64(p.end.X), float64(p.end.Y), float64(p.end.X), float64(p.end.Y)}
	for _, c := range face(q, p.inner, p.end) {
		p.box = p.box.and(area{c[0], c[1], c[0], c[1]})
	}
	t.list = append(t.list, p)
}

// curve orders points so that neighbours along it are near: their bits in turn (Morton 1966).
func curve(p exact.Pt) uint64 {
	spread := func(v int32) (k uint64) {
		k = uint64(uint32(v) ^ 1<<31)
		k = (k | k<<16) & 0x0000ffff0000ffff
		k = (k | k<<8) & 0x00ff00ff00ff00ff
		k = (k | k<<4) & 0x0f0f0f0f0f0f0f0f
		k = (k | k<<2) & 0x3333333333333333
		return (k | k<<1) & 0x5555555555555555
	}
	return spread(p.X)<<1 | spread(p.Y)
}

// leafAt returns the tips of leaf node n.
func (t *tips) leafAt(n int) []int32 {
	from := min((n-t.leaf)*bunch, len(t.ends))
	return t.ends[from:min(from+bunch, len(t.ends))]
}

// near calls do for every tip that the body along piece q may be near to and that touches nothing yet. O(log n) and those near
// to its line for most drawings.
func (t *tips) near(q *piece, n int, do func(p *tip)) {
	if t.left[n] == 0 || !t.box[n].meets(q, max(q.right, q.left)+float64(GapLimit)+1) {
		return
	}
	if n < t.leaf {
		t.near(q, 2*n, do)
		t.near(q, 2*n+1, do)
		t.left[n] = t.left[2*n] + t.left[2*n+1]
		return
	}
	t.left[n] = 0
	for _, k := range t.leafAt(n) {
		p := &t.list[k]
		if !p.touches {
			do(p)
		}
		if !p.touches {
			t.left[n]++
		}
	}
}
