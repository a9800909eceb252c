package sight

import (
	"context"

	"enfilade/solver/exact"
	"enfilade/solver/mesh"
)

// beam is a set of sight lines out of a face that all pass the same things on the same side, about to enter a triangle through
// half-edge in. The lines go to the right of all points in left and to the left of all in right. Both lists are convex towards
// the beam, in the order in which the beam passes them, and begin where the outermost lines touch: the leftmost one passes
// right[0] and then tipL, the rightmost one left[0] and then tipR. Beyond in, all between these two is seen from the face.
type beam struct {
	in          mesh.Edge
	left, right []exact.Pt
	tipL, tipR  exact.Pt
}

func (b *beam) leftmost() exact.Line  { return exact.Through(b.right[0], b.tipL) }
func (b *beam) rightmost() exact.Line { return exact.Through(b.left[0], b.tipR) }

// Partly appends to dst the places that see any part of a face from its front, as convex pieces which may overlap; a part
// without width does not count. The whole front must be free, see Free.
//
// The face is expanded as an eye is, triangle by triangle, but it lets out beams instead of cones: where a corner splits a
// beam, the part on either side of it is bounded by the line that touches the corner and, before it, a thing on the other
// side of the beam (the separating tangents of Guibas, Hershberger, Leven, Sharir and Tarjan, "Linear-time algorithms for
// visibility and shortest path problems inside triangulated simple polygons", Algorithmica 2, 1987, section 4, taken round
// every obstacle on both sides). All bounds are lines through two grid points.
//
//   - Units: grid points, exact. The Origin of each piece is its own index, see Glimpse.
//   - Errors: the context's when it is cancelled.
//   - Cost: proportional to the number of beams in each triangle: on floor plans a small multiple of a region's triangles; it
//     grows with the pairs of corners that line up with some point of the face, at most as the square of the number of corners
//     in view, for each triangle. Corners that stop no sight split beams as well: leave them out of the mesh.
func (f *Finder) Partly(ctx context.Context, dst []Piece, c Face, height int32) ([]Piece, error) {
	steps, ok := f.alongFront(f.faces.steps[:0], c.A, c.B)
	f.faces.steps = steps
	if !ok {
		return dst, nil
	}
	b := &f.faces
	b.beams, b.chains = b.beams[:0], b.chains[:0]
	f.newTurn()
	for _, s := range steps {
		p := Piece{Tri: s.tri, Origin: int32(len(dst))}
		p.add(c.front(), true)
		dst = f.record(dst, &p)
	}
	f.letOut(c, steps, height)
	for n := 1; len(b.beams) > 0; n++ {
		if n&1023 == 0 && ctx.Err() != nil {
			return dst, ctx.Err()
		}
		now := b.beams[len(b.beams)-1]
		b.beams = b.beams[:len(b.beams)-1]
		p := Piece{Tri: now.in.Tri(), Origin: int32(len(dst))}
		l := now.leftmost()
		p.add(exact.Line{At: l.At, Dir: l.Dir.Neg()}, now.tipL == c.A && now.right[0] == c.B)
		p.add(now.rightmost(), now.tipR == c.B && now.left[0] == c.A)
		dst = f.record(dst, &p)
		f.split(now, height)
	}
	return dst, nil
}

// letOut lets the beams out of the triangles along the face. A sight line that begins in another of them passes the corners
// before the edges between: on its left those on the way from A, on its right those on the way from B. What begins later leaves
// them on the same side.
func (f *Finder) letOut(c Face, steps []step, height int32) {
	f.faces.rights = f.faces.rights[:0]
	right := f.chainOf(c.B)
	for i := len(steps) - 1; i >= 0; i-- {
		if e := steps[i].out; e != mesh.None {
			_, z := f.m.Ends(e)
			right = f.extended(right, z, -1)
		}
		f.faces.rights = append(f.faces.rights, right)
	}
	left := f.chainOf(c.A)
	for i, s := range steps {
		if s.in != mesh.None {
			z, _ := f.m.Ends(s.in)
			left = f.extended(left, z, 1)
		}
		for k := range 3 {
			if e := mesh.EdgeOf(s.tri, k); e != s.in && e != s.out && !f.stops(e, height) {
				f.beamThrough(c, e, left, f.faces.rights[len(steps)-1-i])
			}
		}
	}
}

// beamThrough lets the sight lines out of the face that leave a triangle along it through e, one of its own half-edges; left and
// right are the corners that those from other triangles pass on the way.
func (f *Finder) beamThrough(c Face, e mesh.Edge, left, right []exact.Pt) {
	r, l := f.m.Ends(e) // as seen on the way out
	front := c.front()
	rightIn, leftIn := front.Side(r) > 0, front.Side(l) > 0
	if !rightIn && !leftIn {
		return
	}
	b := beam{in: f.m.Twin(e), left: left, right: right, tipL: c.A, tipR: c.B}
	if leftIn {
		b.left, b.tipL = f.extended(left, l, 1), l
	}
	if rightIn {
		b.right, b.tipR = f.extended(right, r, -1), r
	}
	b.left, b.right = past(b.left, b.tipR, 1), past(b.right, b.tipL, -1)
	f.faces.beams = append(f.faces.beams, b)
}

// split lets a beam into its triangle and on through the two other edges.
func (f *Finder) split(b beam, height int32) {
	t := &f.m.Tris[b.in.Tri()]
	left := b.in.Corner()
	right := inc[left]
	apex := inc[right]
	v := t.P[apex]
	underL, overR := b.leftmost().Side(v) < 0, b.rightmost().Side(v) > 0
	if overR && t.Top[right] < height {
		next := b
		next.in = t.N[right]
		if underL { // the apex becomes a thing on the left
			next.right, next.tipL = past(b.right, v, -1), v
			next.left = f.extended(b.left, v, 1)
		}
		f.faces.beams = append(f.faces.beams, next)
	}
	if underL && t.Top[apex] < height {
		next := b
		next.in = t.N[apex]
		if overR {
			next.left, next.tipR = past(b.left, v, 1), v
			next.right = f.extended(b.right, v, -1)
		}
		f.faces.beams = append(f.faces.beams, next)
	}
}

// past drops the points at the beginning of a chain that the line from it to v does not touch any more. Turn is 1 for the
// things on the left, which such lines keep on their left, and -1 for those on the right.
func past(chain []exact.Pt, v exact.Pt, turn int) []exact.Pt {
	for len(chain) > 1 && exact.Orient(chain[0], v, chain[1])*turn <= 0 {
		chain = chain[1:]
	}
	return chain
}

// extended returns the chain with v at its end, without the points that no line past v can touch any more.
func (f *Finder) extended(chain []exact.Pt, v exact.Pt, turn int) []exact.Pt {
	n := len(chain)
	for n > 1 && exact.Orient(chain[n-2], chain[n-1], v)*turn <= 0 {
		n--
	}
	at := len(f.faces.chains)
	f.faces.chains = append(append(f.faces.chains, chain[:n]...), v)
	return f.faces.chains[at:len(f.faces.chains):len(f.faces.chains)]
}

// chainOf returns a chain of the given points.
func (f *Finder) chainOf(points ...exact.Pt) []exact.Pt {
	at := len(f.faces.chains)
	f.faces.chains = append(f.faces.chains, points...)
	return f.faces.chains[at:len(f.faces.chains):len(f.faces.chains)]
}

// record appends a piece that has an inside, unless its triangle is known to be seen all over.
func (f *Finder) record(dst []Piece, p *Piece) []Piece {
	b := &f.faces
	if b.full[p.Tri] == b.turn || !b.convex.Take(&f.m.Tris[p.Tri], p) {
		return dst
	}
	if !b.convex.cut() {
		b.full[p.Tri] = b.turn
	}
	return append(dst, *p)
}
