package plan

import (
	"cmp"
	"math"
	"slices"

	"enfilade/solver/exact"
)

// piece is one straight piece of something that walls can meet.
type piece struct {
	a, b        exact.Pt
	wall        int32 // index of the wall, -1 for another thing
	index       int32 // of the piece in its wall
	ref         Ref
	right, left float64 // how far the body reaches beside it, grid units
}

// cells sorts pieces into the square cells that their bodies touch, grown by the limit of gaps.
type cells struct {
	plan   *Plan
	pieces []piece
	side   float64
	in     []entry // by cell, then by piece
	doored map[string]bool
	stop   func() bool
}

// stopped asks, at each so-manieth step of a loop, whether to stop.
func (c *cells) stopped(step int) bool {
	const each = 4096
	return step%each == 0 && c.stop != nil && c.stop()
}

// entry is a piece in a cell.
type entry struct {
	x, y  int32
	piece int32
}

func (e entry) compare(f entry) int {
	return cmp.Or(cmp.Compare(e.x, f.x), cmp.Compare(e.y, f.y), cmp.Compare(e.piece, f.piece))
}

func newCells(p *Plan) *cells {
	c := &cells{plan: p, doored: map[string]bool{}}
	for _, o := range p.obstacles.openings.refs() {
		c.doored[o.Wall] = true
	}
	total := 0.0
	add := func(s piece) {
		if s.a == s.b || !InRange(s.a) || !InRange(s.b) {
			return
		}
		c.pieces = append(c.pieces, s)
		total += exact.Dist(s.a, s.b) + s.right + s.left
	}
	for i, w := range p.obstacles.walls.refs() {
		right2, left2 := w.Sides2()
		for k := range max(0, w.Line.Len()-1) {
			add(piece{w.Line.At(k), w.Line.At(k + 1), int32(i), int32(k), Ref{KindWall, w.ID}, float64(right2) / 2, float64(left2) / 2})
		}
	}
	ring := func(ref Ref, ring Chain) {
		for k := range ring.Len() {
			add(piece{a: ring.At(k), b: ring.At((k + 1) % ring.Len()), wall: -1, ref: ref})
		}
	}
	for _, b := range p.obstacles.blocks.refs() {
		ring(Ref{KindBlock, b.ID}, b.Ring)
	}
	ring(Ref{Kind: KindFloor}, p.obstacles.floor)
	// Cells as wide as pieces are long on the average: all pieces together then touch a few times their number of cells.
	c.side = max(total/float64(max(1, len(c.pieces))), 4*float64(GapLimit))
	for i := range c.pieces {
		c.sort(int32(i))
	}
	slices.SortFunc(c.in, entry.compare)
	return c
}

// sort notes a piece in every cell its body comes near to, column by column.
func (c *cells) sort(i int32) {
	s := &c.pieces[i]
	r := max(s.right, s.left) + float64(GapLimit) + 1
	a, b := s.a, s.b
	if b.X < a.X {
		a, b = b, a
	}
	ax, ay, bx, by := float64(a.X), float64(a.Y), float64(b.X), float64(b.Y)
	slope := 0.0
	if bx > ax {
		slope = (by - ay) / (bx - ax)
	}
	for x := c.cell(ax - r); x <= c.cell(bx+r); x++ {
		// What of the piece lies in the column, which is widened by the reach.
		from, to := max(ax, float64(x)*c.side-r), min(bx, float64(x+1)*c.side+r)
		y1, y2 := ay+(from-ax)*slope, ay+(to-ax)*slope
		if bx == ax {
			y1, y2 = ay, by
		}
		for y := c.cell(min(y1, y2) - r); y <= c.cell(max(y1, y2)+r); y++ {
			c.in = append(c.in, entry{x, y, i})
		}
	}
}

func (c *cells) cell(v float64) int32 { return int32(math.Floor(v / c.side)) }

// pairs calls do for every two pieces that share a cell; for some pairs more than once.
func (c *cells) pairs(do func(i, j int32)) {
	for from, step := 0, 0; from < len(c.in) && !c.stopped(step); step++ {
		to := from + 1
		for to < len(c.in) && c.in[to].x == c.in[from].x && c.in[to].y == c.in[from].y {
			to++
		}
		for i := from; i < to; i++ {
			for j := i + 1; j < to; j++ {
				do(c.in[i].piece, c.in[j].piece)
			}
		}
		from = to
	}
}

// near calls do for every piece that may have its body within the limit of q.
func (c *cells) near(q exact.Pt, do func(i int32)) {
	x, y := c.cell(float64(q.X)), c.cell(float64(q.Y))
	at, _ := slices.BinarySearchFunc(c.in, entry{x, y, -1}, entry.compare)
	for ; at < len(c.in) && c.in[at].x == x && c.in[at].y == y; at++ {
		do(c.in[at].piece)
	}
}
