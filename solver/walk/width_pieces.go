package walk

import (
	"enfilade/solver/exact"
	"enfilade/solver/mesh"
)

// pieces is a lean mesh whose triangles are cut along gaps. Gaps do not cross, so every gap that goes through a triangle cuts
// one of its pieces in two: the pieces of a triangle are the leaves of a binary tree of cuts.
type pieces struct {
	m     *mesh.Mesh
	gaps  []gap
	root  []int32 // for each triangle its tree: a cut, or the complement of a piece
	cuts  []cut
	count int32 // pieces in all
	steps int64 // how often a triangle or a cut was looked at while gaps were found
}

// cut cuts along a gap; to its right and to its left, as seen from the gap's corner, lies another cut or, complemented, a
// piece.
type cut struct {
	gap   int32
	right int32
	left  int32
}

func (p *pieces) begin(m *mesh.Mesh) {
	p.m, p.count = m, int32(len(m.Tris))
	p.root = make([]int32, len(m.Tris))
	for t := range p.root {
		p.root[t] = ^int32(t)
	}
}

// line returns the line along a gap.
func (g *gap) line() exact.Line { return exact.Line{At: g.at, Dir: g.dir} }

// split cuts triangle t along a gap that goes through it.
func (p *pieces) split(t, id int32) {
	at := &p.root[t]
	for *at >= 0 {
		p.steps++
		c := &p.cuts[*at]
		if p.sideWithin(t, id, c.gap) > 0 {
			at = &c.left
		} else {
			at = &c.right
		}
	}
	was := *at
	*at = int32(len(p.cuts))
	p.cuts = append(p.cuts, cut{gap: id, right: was, left: ^p.count})
	p.count++
}

// sideWithin returns the side of gap other on which gap id lies within triangle t; both go through it. It is told by the point
// in which gap id crosses an edge of the triangle, or by its corner.
func (p *pieces) sideWithin(t, id, other int32) int {
	g, k := &p.gaps[id], p.gaps[other].line()
	tri := &p.m.Tris[t]
	for i := range 3 {
		a, b := tri.P[i], tri.P[inc[i]]
		sa, sb := g.line().Side(a), g.line().Side(b)
		if a == g.at {
			if s := k.Side(a); s != 0 {
				return s
			}
		}
		if sa*sb >= 0 {
			continue
		}
		// The line of the gap and the edge, in the order that turns left.
		edge, line := exact.Through(a, b), g.line()
		first, second := edge, line
		if edge.Dir.Cross(line.Dir) < 0 {
			first, second = line, edge
		}
		if s := exact.SideOfMeet(first, second, k); s != 0 {
			return s
		}
	}
	panic("walk: two gaps meet in a triangle")
}

// beside returns the pieces of triangle t on the right and the left of a gap that goes through it.
func (p *pieces) beside(t, id int32) (right, left int32) {
	follow := func(at, side int32) int32 {
		for at >= 0 {
			c := &p.cuts[at]
			s := side
			if c.gap != id {
				s = int32(p.sideWithin(t, id, c.gap))
			}
			if at = c.right; s > 0 {
				at = c.left
			}
		}
		return ^at
	}
	return follow(p.root[t], -1), follow(p.root[t], 1)
}

// holding appends the pieces of triangle t that hold p, a point of it.
func (p *pieces) holding(dst []int32, t int32, at exact.Pt) []int32 {
	return p.under(dst, p.root[t], at)
}

func (p *pieces) under(dst []int32, node int32, at exact.Pt) []int32 {
	if node < 0 {
		return append(dst, ^node)
	}
	c := &p.cuts[node]
	s := p.gaps[c.gap].line().Side(at)
	if s <= 0 {
		dst = p.under(dst, c.right, at)
	}
	if s >= 0 {
		dst = p.under(dst, c.left, at)
	}
	return dst
}

// gapsOf appends the gaps that go through what lies under a node.
func (p *pieces) gapsOf(dst []int32, node int32) []int32 {
	if node < 0 {
		return dst
	}
	p.steps++
	c := &p.cuts[node]
	return p.gapsOf(p.gapsOf(append(dst, c.gap), c.right), c.left)
}

// along returns the piece of triangle t at the edge from a to b beyond the first n of the gaps that cross the edge there; rank
// gives their order, and no less than n for all other gaps.
func (p *pieces) along(t int32, a, b exact.Pt, rank []int32, n int) int32 {
	at := p.root[t]
	for at >= 0 {
		p.steps++
		c := &p.cuts[at]
		l := p.gaps[c.gap].line()
		s, far := l.Side(a), l.Side(b)
		if s*far < 0 {
			if int(rank[c.gap]) < n {
				s = far
			}
		} else if s == 0 {
			s = far
		}
		if at = c.right; s > 0 {
			at = c.left
		}
	}
	return ^at
}
