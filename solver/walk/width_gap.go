package walk

import (
	"cmp"
	"context"
	"math"
	"slices"

	"enfilade/solver/exact"
	"enfilade/solver/mesh"
	"enfilade/solver/pulse"
)

// gap is a passage between two obstacle points: a corner, and another corner or the foot of the perpendicular on an edge.
type gap struct {
	disc
	width float64
	edge  mesh.Edge // the edge that it is, or else one of the triangle that it leaves its corner in
	whole bool      // it is an edge
	a, b  int32     // the pieces on its two sides
}

// ends returns the two points of the gap, in order.
func (g *gap) ends() [2][2]float64 {
	k := float64(g.num) / float64(g.den)
	p := [2]float64{float64(g.at.X), float64(g.at.Y)}
	q := [2]float64{p[0] + k*float64(g.dir.X), p[1] + k*float64(g.dir.Y)}
	if q[0] < p[0] || q[0] == p[0] && q[1] < p[1] {
		p, q = q, p
	}
	return [2][2]float64{p, q}
}

// gapFinder finds the gaps of a lean mesh and cuts its triangles along them.
type gapFinder struct {
	*pieces
	flat  []uint8 // for each triangle the corners, as bits, whose floor opens by half a turn exactly
	chain []int32
	stack []mesh.Edge
}

// find looks for the gaps between two corners, which are edges, and for those between a corner and an edge.
func (b *gapFinder) find(ctx context.Context) error {
	b.findFlat()
	for t := range b.m.Tris {
		if err := pulse.Step(ctx, t, len(b.m.Tris)); err != nil {
			return err
		}
		if err := b.crowded(); err != nil {
			return err
		}
		tri := &b.m.Tris[t]
		if tri.Flags&mesh.FlagNoWalk != 0 {
			continue
		}
		for i := range 3 {
			e := mesh.EdgeOf(int32(t), i)
			if !tri.StopsWalk(i) && e < tri.N[i] {
				b.betweenCorners(e)
			}
			b.toEdge(int32(t), i)
		}
	}
	return nil
}

// betweenCorners adds the gap along edge e, if it is one. A gap between corners is an edge of every Delaunay triangulation,
// since the disc on it is empty, and the triangles beside it have no right or obtuse angle opposite.
func (b *gapFinder) betweenCorners(e mesh.Edge) {
	t, u := &b.m.Tris[e.Tri()], &b.m.Tris[b.m.Twin(e).Tri()]
	p, q := b.m.Ends(e)
	v, w := t.P[e.Prev().Corner()], u.P[b.m.Twin(e).Prev().Corner()]
	if p.Sub(v).Dot(q.Sub(v)) <= 0 || p.Sub(w).Dot(q.Sub(w)) <= 0 || b.isFlat(e) && b.isFlat(e.Next()) {
		return
	}
	d := disc{at: p, dir: q.Sub(p), num: 1, den: 1}
	b.stack = append(b.stack[:0], e, b.m.Twin(e))
	if b.empty(&d, mesh.None) {
		b.gaps = append(b.gaps, gap{disc: d, width: exact.Dist(p, q), edge: e, whole: true})
	}
}

// toEdge adds the gap between corner i of triangle t and the edge that the perpendicular through the triangle meets, if it
// is one.
//
// The perpendicular passes an edge only if the feet on it fall between its ends, else the nearer end would lie in the disc;
// and of the two edges beyond, one at most is such, else the triangulation would not be Delaunay. So the search goes one
// way. From a flat corner it need not begin.
func (b *gapFinder) toEdge(t int32, i int) {
	if b.isFlat(mesh.EdgeOf(t, i)) {
		return
	}
	at := b.m.Tris[t].P[i]
	b.chain = append(b.chain[:0], t)
	e := mesh.EdgeOf(t, inc[i])
	for b.footInside(at, e) {
		b.steps++
		if b.m.Tris[e.Tri()].StopsWalk(e.Corner()) {
			b.closeWith(at, mesh.EdgeOf(t, i), e)
			return
		}
		twin := b.m.Twin(e)
		b.chain = append(b.chain, twin.Tri())
		if e = twin.Next(); !b.footInside(at, e) {
			e = twin.Prev()
		}
	}
}

// footInside reports whether the foot of the perpendicular from p on e falls strictly between its ends.
func (b *gapFinder) footInside(p exact.Pt, e mesh.Edge) bool {
	u, v := b.m.Ends(e)
	return p.Sub(u).Dot(v.Sub(u)) > 0 && p.Sub(v).Dot(u.Sub(v)) > 0
}

// closeWith adds the gap from the corner at, the start of half-edge corner, to edge e, if its disc is empty.
func (b *gapFinder) closeWith(at exact.Pt, corner, e mesh.Edge) {
	u, v := b.m.Ends(e)
	along := v.Sub(u)
	d := disc{at: at, dir: along.Left().Neg(), num: along.Cross(at.Sub(u)), den: along.Len2()}
	b.stack = b.stack[:0]
	for f := corner; ; {
		if p, _ := b.m.Ends(f); p != at && d.holds(p) || !b.pass(&d, e, f) {
			return
		}
		if f = f.Next(); f == corner {
			break
		}
	}
	if !b.empty(&d, e) {
		return
	}
	id := int32(len(b.gaps))
	b.gaps = append(b.gaps, gap{disc: d, width: float64(d.num) / math.Sqrt(float64(d.den)), edge: corner})
	for _, t := range b.chain {
		b.split(t, id)
	}
}

// empty reports whether nothing that stops walking meets the closed disc, other than its two ends, within the triangles that
// the half-edges on the stack lead into and those beyond. The far end lies on edge wall, or is a corner when that is None.
func (b *gapFinder) empty(d *disc, wall mesh.Edge) bool {
	for len(b.stack) > 0 {
		b.steps++
		in := b.stack[len(b.stack)-1]
		b.stack = b.stack[:len(b.stack)-1]
		z := b.m.Tris[in.Tri()].P[in.Prev().Corner()]
		if !b.isEnd(d, wall, z) && d.holds(z) || !b.pass(d, wall, in.Next()) || !b.pass(d, wall, in.Prev()) {
			return false
		}
	}
	return true
}

// pass puts the triangle beyond edge e on the stack if the disc reaches there. It reports false when e stops walking.
func (b *gapFinder) pass(d *disc, wall, e mesh.Edge) bool {
	if e == wall || !b.meets(d, wall, e) {
		return true
	}
	if b.m.Tris[e.Tri()].StopsWalk(e.Corner()) {
		return false
	}
	b.stack = append(b.stack, b.m.Twin(e))
	return true
}

// isEnd reports whether p is a corner at which the gap ends.
func (b *gapFinder) isEnd(d *disc, wall mesh.Edge, p exact.Pt) bool {
	return p == d.at || wall == mesh.None && p == d.at.Add(d.dir)
}

// meets reports whether edge e meets the closed disc, or, when it leaves from an end of the gap, goes into it.
func (b *gapFinder) meets(d *disc, wall mesh.Edge, e mesh.Edge) bool {
	p, q := b.m.Ends(e)
	if b.isEnd(d, wall, q) {
		p, q = q, p
	}
	switch {
	case p == d.at:
		return q.Sub(p).Dot(d.dir) > 0
	case b.isEnd(d, wall, p):
		return q.Sub(p).Dot(d.dir) < 0
	}
	return d.meets(p, q)
}

// byWidth orders gaps from the widest down; equally wide ones by their points.
func byWidth(g, h *gap) int {
	if g.width != h.width {
		return cmp.Compare(h.width, g.width)
	}
	a, b := g.ends(), h.ends()
	return cmp.Or(slices.Compare(a[0][:], b[0][:]), slices.Compare(a[1][:], b[1][:]))
}
