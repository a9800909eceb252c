package sight

import (
	"slices"

	"enfilade/solver/exact"
	"enfilade/solver/mesh"
)

// MaxLines is how many lines may bound a piece besides the edges of its triangle: two sides of a beam, three edges of the
// triangle that it was found in on another mesh, four for a viewing angle and two distances.
const MaxLines = 10

// Piece is a convex part of a triangle: what of it lies to the left of N lines.
type Piece struct {
	Tri    int32
	Origin int32 // where the piece comes from, as whoever found it counts; pieces cut out of it keep it
	N      uint8
	Clip   uint16 // bit i says that Lines[i] is a side of the view or a limit of distance
	Lines  [MaxLines]exact.Line
}

// Pieces returns cones of sight as pieces; c is the clip they were found with.
func Pieces(eye exact.Pt, cones []Cone, c Clip) []Piece {
	list := make([]Piece, 0, len(cones))
	for _, k := range cones {
		p := Piece{Tri: k.Tri}
		p.add(exact.Line{At: eye, Dir: k.R}, c.Sides && sameWay(k.R, c.Right))
		p.add(exact.Line{At: eye, Dir: k.L.Neg()}, c.Sides && sameWay(k.L, c.Left))
		list = append(list, p)
	}
	return list
}

// add narrows the piece to the left of l; clip says that l is a side of the view or a limit of distance.
func (p *Piece) add(l exact.Line, clip bool) {
	p.Lines[p.N] = l
	if clip {
		p.Clip |= 1 << p.N
	}
	p.N++
}

// Convex is a convex polygon given by the lines of its edges, cut exactly by one line after another. Its corners are where
// neighbouring lines meet; they are never computed, only the side of a further line on which they lie is decided. It keeps its
// buffers, so a warm one does not allocate.
type Convex struct {
	lines []exact.Line
	ring  []int32 // indices into lines, counter-clockwise, each line once
	side  []int
	next  []int32
}

// Start makes the polygon triangle t.
func (c *Convex) Start(t *mesh.Tri) {
	c.lines = append(c.lines[:0], exact.Through(t.P[0], t.P[1]), exact.Through(t.P[1], t.P[2]), exact.Through(t.P[2], t.P[0]))
	c.ring = append(c.ring[:0], 0, 1, 2)
}

// Cut keeps the part to the left of l, and reports whether it has an inside. After it has not, the polygon must be started
// again.
func (c *Convex) Cut(l exact.Line) bool {
	k := int32(len(c.lines))
	c.lines = append(c.lines, l)
	n := len(c.ring)
	c.side = c.side[:0]
	some, none := false, true
	for i, e := range c.ring { // side[i] belongs to the corner between edge i and the next
		s := exact.SideOfMeet(c.lines[e], c.lines[c.ring[(i+1)%n]], l)
		c.side = append(c.side, s)
		some = some || s > 0
		none = none && s >= 0
	}
	if !some || none {
		return some
	}
	c.next = c.next[:0]
	for i, e := range c.ring {
		from, to := c.side[(i+n-1)%n], c.side[i]
		if from <= 0 && to <= 0 {
			continue
		}
		c.next = append(c.next, e)
		if to <= 0 { // the polygon leaves the half-plane along this edge and goes on along the line
			c.next = append(c.next, k)
		}
	}
	c.ring, c.next = c.next, c.ring
	return true
}

// CutCone keeps what lies between the directions r and l from at, less than half a turn, as Cut does.
func (c *Convex) CutCone(at exact.Pt, r, l exact.Vec) bool {
	return c.Cut(exact.Line{At: at, Dir: r}) && c.Cut(exact.Line{At: at, Dir: l.Neg()})
}

// CutTriangle keeps what lies in t too, as Cut does.
func (c *Convex) CutTriangle(t *mesh.Tri) bool {
	for i := range 3 {
		if !c.Cut(exact.Through(t.P[i], t.P[inc[i]])) {
			return false
		}
	}
	return true
}

// Take makes the polygon piece p of triangle t, and reports whether it has an inside.
func (c *Convex) Take(t *mesh.Tri, p *Piece) bool {
	c.Start(t)
	for _, l := range p.Lines[:p.N] {
		if !c.Cut(l) {
			return false
		}
	}
	return true
}

// trim takes the lines that do not bound it off a piece that the polygon was made from, but for sides and limits, which tell
// what a border is.
func (c *Convex) trim(p *Piece) {
	bounds := uint32(0)
	for _, k := range c.ring {
		bounds |= 1 << k
	}
	q := Piece{Tri: p.Tri, Origin: p.Origin}
	for i, l := range p.Lines[:p.N] {
		if clip := p.Clip>>i&1 != 0; clip || bounds>>(3+i)&1 != 0 {
			q.add(l, clip)
		}
	}
	*p = q
}

// cut reports whether any line but the triangle's edges bounds the polygon.
func (c *Convex) cut() bool {
	return slices.ContainsFunc(c.ring, func(k int32) bool { return k > 2 })
}

// bounded reports whether line i of the piece that the polygon was made from bounds it.
func (c *Convex) bounded(i int) bool { return slices.Contains(c.ring, int32(3+i)) }

// Len returns the number of edges.
func (c *Convex) Len() int { return len(c.ring) }

// Line returns the line of edge i, the polygon to its left; i may be one too small or too large.
func (c *Convex) Line(i int) exact.Line {
	if n := len(c.ring); i < 0 {
		i += n
	} else if i >= n {
		i -= n
	}
	return c.lines[c.ring[i]]
}

// Source says which line edge i lies on: 0 to 2 for the edges of the triangle, then the cuts in order.
func (c *Convex) Source(i int) int { return int(c.ring[i]) }
