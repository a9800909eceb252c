package sight

import (
	"enfilade/solver/exact"
	"enfilade/solver/mesh"
)

// Face is a straight thing to be seen, from A to B, its front to the left.
type Face struct{ A, B exact.Pt }

// faceBuffers is what a finder keeps from call to call for faces.
type faceBuffers struct {
	steps  []step
	hems   []hem
	beams  []beam
	chains []exact.Pt
	rights [][]exact.Pt
	full   []int32 // triangles known to be seen all over: those marked with the present turn
	turn   int32
	seen   []int32 // triangles that a search has come to: those marked with the present look
	look   int32
	convex Convex
}

// front returns the line of the face, its front to the left.
func (c Face) front() exact.Line { return exact.Through(c.A, c.B) }

// step is a triangle that the front of a segment runs through, and the half-edges of it through which it comes in and goes
// out, mesh.None at the segment's ends.
type step struct {
	tri     int32
	in, out mesh.Edge
}

// alongFront appends the triangles that the segment from a to b runs through just to its left, in order. It reports false when
// an end lies off the mesh.
//
// The segment is taken to be shifted to the left by nothing at all: a corner on it lies to its right, an edge along it bounds
// only the triangle to the left. So there are no special cases but at the ends.
func (f *Finder) alongFront(dst []step, a, b exact.Pt) ([]step, bool) {
	if _, ok := f.m.Locate(b); !ok {
		return dst, false
	}
	t, ok := f.frontTriangle(a, b)
	if !ok {
		return dst, false
	}
	for in := mesh.None; ; {
		out := f.exit(t, a, b)
		p, q := f.m.Ends(out)
		if exact.Area2(p, q, b) >= 0 {
			return append(dst, step{t, in, mesh.None}), true
		}
		dst = append(dst, step{t, in, out})
		if in = f.m.Twin(out); in == mesh.None {
			return dst, false
		}
		t = in.Tri()
	}
}

// frontTriangle returns the triangle that holds the beginning of the segment from a to b, shifted to the left.
func (f *Finder) frontTriangle(a, b exact.Pt) (int32, bool) {
	place, ok := f.m.Locate(a)
	d := b.Sub(a)
	switch {
	case !ok:
		return 0, false
	case place.Corner >= 0:
		for e := mesh.EdgeOf(place.Tri, place.Corner); ; {
			t := &f.m.Tris[e.Tri()]
			r, l := t.P[inc[e.Corner()]].Sub(a), t.P[inc[inc[e.Corner()]]].Sub(a)
			if r.Cross(d) >= 0 && d.Cross(l) > 0 && (r.Cross(d) > 0 || r.Dot(d) > 0) {
				return e.Tri(), true
			}
			if e = f.m.Twin(e.Prev()); e == mesh.None || e == mesh.EdgeOf(place.Tri, place.Corner) {
				return 0, false
			}
		}
	case place.Edge != mesh.None:
		p, q := f.m.Ends(place.Edge)
		if c := q.Sub(p).Cross(d); c < 0 || c == 0 && q.Sub(p).Dot(d) < 0 {
			twin := f.m.Twin(place.Edge)
			return twin.Tri(), twin != mesh.None
		}
	}
	return place.Tri, true
}

// exit returns the edge of triangle t through which the line from a to b, shifted to the left, leaves it.
func (f *Finder) exit(t int32, a, b exact.Pt) mesh.Edge {
	tri := &f.m.Tris[t]
	for i := range 3 {
		// The line goes out where it comes from the left of one corner to the right of the next: the edge runs from its right
		// side to its left.
		if exact.Area2(a, b, tri.P[i]) <= 0 && exact.Area2(a, b, tri.P[inc[i]]) > 0 {
			return mesh.EdgeOf(t, i)
		}
	}
	panic("sight: a line does not leave a triangle it is in")
}

// Free reports whether the whole front of a face is open at a height: the places right before it are free of bodies, and
// nothing that stops sight comes up to it but at its ends. What lies along the face, or ends on it from behind, does not count.
// The cost is that of the triangles along it.
func (f *Finder) Free(c Face, height int32) bool {
	lo, hi, ok := f.FreeAround(c, c.A, height)
	return ok && lo == mesh.None && hi == mesh.None
}

// FreeAround finds the open stretch of a face's front that holds point m of the face, or lies next to it: it begins behind
// half-edge lo and ends at half-edge hi, each mesh.None when that is the face's own end. It reports false when the front is not
// open at m.
func (f *Finder) FreeAround(c Face, m exact.Pt, height int32) (lo, hi mesh.Edge, ok bool) {
	if c.A == c.B {
		return mesh.None, mesh.None, false
	}
	steps, ok := f.alongFront(f.faces.steps[:0], c.A, c.B)
	f.faces.steps = steps
	if !ok {
		return mesh.None, mesh.None, false
	}
	at := len(steps) - 1
	for i, s := range steps[:at] {
		if p, q := f.m.Ends(s.out); exact.Area2(p, q, m) >= 0 {
			at = i
			break
		}
	}
	if f.m.Solid[steps[at].tri] >= height {
		return mesh.None, mesh.None, false
	}
	lo, hi = mesh.None, mesh.None
	for i := at; i > 0 && lo == mesh.None; i-- {
		if f.stops(steps[i].in, height) {
			lo = steps[i].in
		}
	}
	for i := at; i < len(steps)-1 && hi == mesh.None; i++ {
		if f.stops(steps[i].out, height) {
			hi = steps[i].out
		}
	}
	return lo, hi, true
}

// stops reports whether half-edge e stops sight at a height.
func (f *Finder) stops(e mesh.Edge, height int32) bool {
	return f.m.Tris[e.Tri()].Top[e.Corner()] >= height
}
