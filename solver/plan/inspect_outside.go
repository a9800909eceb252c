package plan

import (
	"slices"

	"enfilade/solver/exact"
)

// outsiders are the walls, blocks, zones and routes of which no point lies on the floor.
func (s *survey) outsiders() (out []Finding) {
	p := s.plan
	if p.obstacles.floor.Len() < 3 {
		return nil
	}
	floor, step := s.newGround(p.obstacles.floor.pts), 0
	tell := func(kind Kind, id string, c Chain) {
		if len(c.pts) == 0 || slices.ContainsFunc(c.pts, func(q exact.Pt) bool { step++; return s.stopped(step) || floor.has(q) }) {
			return
		}
		out = append(out, Finding{Problem: Problem{Kind: ProblemOutside, Items: []Ref{{kind, id}}, At: c.pts[0],
			Text: "lies outside the floor; move it inside, or draw the floor around it"}})
	}
	for _, w := range p.obstacles.walls.refs() {
		tell(KindWall, w.ID, w.Line)
	}
	for _, b := range p.obstacles.blocks.refs() {
		tell(KindBlock, b.ID, b.Ring)
	}
	for _, z := range p.marks.zones.refs() {
		tell(KindZone, z.ID, z.Ring)
	}
	for _, r := range p.marks.routes.refs() {
		tell(KindRoute, r.ID, r.Via)
	}
	return out
}

// ground is the floor's ring in rows of equal height: which of its edges reach into each.
type ground struct {
	ring   []exact.Pt
	lo, hi int64 // of the rows
	high   int64 // of one row
	first  []int32
	edges  []int32 // those of row i are edges[first[i]:first[i+1]]
}

// newGround sorts a ring's edges into as many rows, up to their number, as hold a few times as many of them altogether. O(n log n).
func (s *survey) newGround(ring []exact.Pt) *ground {
	g := &ground{ring: ring, lo: int64(ring[0].Y), hi: int64(ring[0].Y)}
	for _, q := range ring {
		g.lo, g.hi = min(g.lo, int64(q.Y)), max(g.hi, int64(q.Y))
	}
	for rows := int64(len(ring)); ; rows /= 2 {
		g.high = (g.hi-g.lo)/max(rows, 1) + 1
		total := int64(0)
		for i := range ring {
			from, to := g.rows(i)
			total += to - from + 1
		}
		if total <= 8*int64(len(ring)) || rows <= 1 {
			break
		}
	}
	g.first = make([]int32, (g.hi-g.lo)/g.high+2)
	for i := range ring {
		from, to := g.rows(i)
		for r := from; r <= to; r++ {
			g.first[r+1]++
		}
	}
	for r := 1; r < len(g.first); r++ {
		g.first[r] += g.first[r-1]
	}
	g.edges = make([]int32, g.first[len(g.first)-1])
	fill := slices.Clone(g.first)
	for i := range ring {
		if s.stopped(i) {
			break
		}
		from, to := g.rows(i)
		for r := from; r <= to; r++ {
			g.edges[fill[r]] = int32(i)
			fill[r]++
		}
	}
	return g
}

// ends returns the two ends of an edge of the ring.
func (g *ground) ends(i int) (a, b exact.Pt) { return g.ring[i], g.ring[(i+1)%len(g.ring)] }

// rows returns the first and the last row that an edge reaches into.
func (g *ground) rows(i int) (from, to int64) {
	a, b := g.ends(i)
	return (int64(min(a.Y, b.Y)) - g.lo) / g.high, (int64(max(a.Y, b.Y)) - g.lo) / g.high
}

// has reports whether q lies in the ring or on it, by the crossings of a ray to the right.
func (g *ground) has(q exact.Pt) bool {
	if y := int64(q.Y); y < g.lo || y > g.hi {
		return false
	}
	row := (int64(q.Y) - g.lo) / g.high
	in := false
	for _, i := range g.edges[g.first[row]:g.first[row+1]] {
		a, b := g.ends(int(i))
		if exact.OnSegment(a, b, q) {
			return true
		}
		if (a.Y > q.Y) != (b.Y > q.Y) && (exact.Orient(a, b, q) > 0) == (b.Y > a.Y) {
			in = !in
		}
	}
	return in
}
