package sight

import (
	"slices"

	"enfilade/solver/exact"
	"enfilade/solver/mesh"
)

// piece is a stretch of border that ends cones: on the line from a (right) to b (left), between the directions r and l. A
// cut end lies where the line meets another one instead of on its direction.
type piece struct {
	kind       Kind
	a, b       exact.Pt
	r, l       exact.Vec
	cutR, cutL bool
	start, end Vertex // the cut ends
}

// span is a stretch of a ray along which something that stops sight is seen edge-on: from t0 to t1 of the ray's direction.
type span struct {
	t0, t1 fraction
}

type fraction struct{ num, den int64 } // den > 0

func (a fraction) compare(b fraction) int { return exact.CompareFractions(a.num, a.den, b.num, b.den) }

// assemble turns the hits into the ring of f.region.
func (f *Finder) assemble(eye exact.Pt, c *Clip) {
	f.region.reset(eye)
	// Walk the hits once around, from one that is a piece back to it.
	first := 0
	for f.hits[first].in < 0 {
		first++
	}
	if c.Range == nil {
		f.assembleWhole(eye, c, first)
	} else {
		f.assembleCut(eye, c, first)
	}
	f.region.canonical()
}

// side is a stretch of border as most are: on the line from a (right) to b (left), seen from direction r to l, all as offsets
// from the eye; onR and onL are 1 when it begins and ends at its corners.
type side struct {
	a, b, r, l exact.Vec
	onR, onL   int
}

// read makes s the side of hit h.
func (s *side) read(tris []mesh.Tri, h *hit, eye exact.Pt) {
	t, i := &tris[uint32(h.in)>>2], uint32(h.in&3)
	a, b := t.P[i].Sub(eye), t.P[after(i)].Sub(eye)
	s.onR, s.onL = one(h.r.Cross(a) == 0), one(h.l.Cross(b) == 0)
	s.a.X, s.a.Y, s.b.X, s.b.Y = a.X, a.Y, b.X, b.Y
	s.r.X, s.r.Y, s.l.X, s.l.Y = h.r.X, h.r.Y, h.l.X, h.l.Y
}

// one returns 1 for true.
func one(b bool) int {
	if b {
		return 1
	}
	return 0
}

// piece returns s in the form that the joiner works on.
func (s *side) piece(eye exact.Pt) piece {
	return piece{kind: Wall, a: eye.Add(s.a), b: eye.Add(s.b), r: s.r, l: s.l}
}

// assembleWhole strings hits together that no range cuts. Between most neighbours lies a corner that both meet at, or a ray
// from a corner to the wall behind it; everything else is left to the joiner.
func (f *Finder) assembleWhole(eye exact.Pt, c *Clip, first int) {
	j := joiner{f: f, eye: eye, clip: c}
	tris, hits := f.m.Tris, f.hits
	var sides [2]side // the side before and the one in hand, in turn
	sides[0].read(tris, &hits[first], eye)
	now := 0
	s := f.region.open(2 * len(hits))
	for k := range hits {
		if k += first + 1; k >= len(hits) {
			k -= len(hits)
		}
		h := &hits[k]
		if h.in < 0 {
			j.note(*h)
			continue
		}
		p := &sides[now&1]
		now ^= 1
		q := &sides[now&1]
		q.read(tris, h, eye)
		// One test: whether both sides have a corner here cannot be foretold, that they meet there can.
		apart := one((p.b.X^q.a.X)|(p.b.Y^q.a.Y) != 0)
		if p.onL|q.onR == 0 || p.onL&q.onR&apart != 0 || j.broken || len(f.spans) > 0 {
			f.region.close(s)
			pp, qq := p.piece(eye), q.piece(eye)
			j.join(&pp, &qq)
			s = f.region.open(2 * len(hits))
			continue
		}
		s.corner(p, q, &sides[(now^p.onL^1)&1])
	}
	f.region.close(s)
}

// corner adds the border from the end of p to the start of q, of which one is a corner, or both are the same: that corner,
// and where it hides a part of far, which is the other of the two, the point behind it. There are no branches in it, which
// nobody could foretell.
func (s *strip) corner(p, q, far *side) {
	w, dx, dy := far.b.Minus(far.a), p.l.X, p.l.Y
	num, den := far.a.Cross(w), int64(dx)*int64(w.Y)-int64(dy)*int64(w.X)
	t := float64(num) / float64(den)
	at, behind := s.n+1-p.onL, s.n+p.onL
	bx, by, gx, gy := p.b.X, p.b.Y, q.a.X, q.a.Y
	bent := one(int64(bx-p.a.X)*int64(q.b.Y-p.a.Y)-int64(by-p.a.Y)*int64(q.b.X-p.a.X) != 0)
	if p.onL != 0 {
		gx, gy = bx, by
	}
	// Field by field: a pair that was written in halves can be read whole only after both have reached the cache.
	v := &s.ring[behind]
	v.At.X, v.At.Y, v.Dir.X, v.Dir.Y, v.Num, v.Den = s.eye.X, s.eye.Y, dx, dy, num, den
	v = &s.ring[at]
	v.At.X, v.At.Y, v.Dir.X, v.Dir.Y, v.Num, v.Den = s.eye.X+gx, s.eye.Y+gy, 0, 0, 0, 1
	xy := &s.xy[behind]
	xy[0], xy[1] = t*float64(dx), t*float64(dy)
	xy = &s.xy[at]
	xy[0], xy[1] = float64(gx), float64(gy)
	two := p.onL ^ q.onR
	s.kinds[s.n], s.kinds[s.n+1] = Kind(two)*Occluding, Wall
	s.n += two + (two | bent)
}

// assembleCut strings hits together that the range may cut.
func (f *Finder) assembleCut(eye exact.Pt, c *Clip, first int) {
	j := joiner{f: f, eye: eye, clip: c}
	var begin, last piece
	for k := range f.hits {
		h := f.hits[(first+k)%len(f.hits)]
		if h.in < 0 {
			j.note(h)
			continue
		}
		f.pieces = f.pieces[:0]
		f.cutByRange(f.pieceOf(h), &j)
		for i, p := range f.pieces {
			if k == 0 && i == 0 {
				begin = p
			} else {
				j.join(&last, &p)
			}
			last = p
		}
	}
	j.join(&last, &begin)
}

func (f *Finder) pieceOf(h hit) piece {
	a, b := f.m.Ends(h.in)
	return piece{kind: Wall, a: a, b: b, r: h.r, l: h.l}
}

// addSpan notes that half-edge e is seen edge-on along direction d.
func (f *Finder) addSpan(eye exact.Pt, e mesh.Edge, d exact.Vec) {
	a, b := f.m.Ends(e)
	ta, tb := a.Sub(eye).Dot(d), b.Sub(eye).Dot(d)
	if ta > tb {
		ta, tb = tb, ta
	}
	den := d.Len2()
	f.spans = append(f.spans, span{fraction{max(ta, 0), den}, fraction{tb, den}})
}

// joiner strings pieces together.
type joiner struct {
	f      *Finder
	eye    exact.Pt
	clip   *Clip
	broken bool // the border runs through the eye between the two pieces
	split  int  // the spans before this one lie on the ray to the eye, the others on the ray from it
}

// note remembers what lies between two pieces.
func (j *joiner) note(h hit) {
	if h.in == breakEdge {
		j.broken, j.split = true, len(j.f.spans)
	} else {
		j.f.addSpan(j.eye, ^h.in, h.r)
	}
}

// join adds the border from the end of p to the start of q, and q's own border.
func (j *joiner) join(p, q *piece) {
	r, spans := &j.f.region, j.f.spans
	if j.broken {
		j.through(p, q)
	} else if p.cutL && q.cutR {
		r.add(q.start, q.kind)
	} else {
		end, start := p.endOn(j.eye, p.l), q.startOn(j.eye, p.l)
		te, ts := along(j.eye, end, p.l), along(j.eye, start, p.l)
		if te.compare(ts) == 0 {
			if p.kind != q.kind || exact.Area2(p.a, p.b, q.a) != 0 || exact.Area2(p.a, p.b, q.b) != 0 {
				r.add(start, q.kind)
			}
		} else {
			j.stretch(end, te, ts, p.l, spans, Occluding)
			r.add(start, q.kind)
		}
	}
	j.f.spans = spans[:0]
	j.broken, j.split = false, 0
}

// through adds the border from p to the eye and on to q.
func (j *joiner) through(p, q *piece) {
	r, spans := &j.f.region, j.f.spans
	zero := fraction{0, 1}
	end, start := p.endOn(j.eye, p.l), q.startOn(j.eye, q.r)
	in, out := Occluding, Occluding
	if j.clip.Sides && sameWay(p.l, j.clip.Left) {
		in = ClipSide
	}
	if j.clip.Sides && sameWay(q.r, j.clip.Right) {
		out = ClipSide
	}
	j.stretch(end, along(j.eye, end, p.l), zero, p.l, spans[:j.split], in)
	at, before := r.Len(), r.kinds[r.Len()-1]
	j.stretch(gridVertex(j.eye), zero, along(j.eye, start, q.r), q.r, spans[j.split:], out)
	if p.l.Cross(q.r) == 0 && p.l.Dot(q.r) < 0 && r.kinds[at] == before {
		r.drop(at) // a straight wall at the eye's back
	}
	r.add(start, q.kind)
}

// stretch adds the border along direction d from vertex v at t0 up to t1, where another vertex follows: base, and Wall
// where a span covers it.
func (j *joiner) stretch(v Vertex, t0, t1 fraction, d exact.Vec, spans []span, base Kind) {
	r := &j.f.region
	outward := t0.compare(t1) < 0
	slices.SortFunc(spans, func(a, b span) int {
		if outward {
			return a.t0.compare(b.t0)
		}
		return b.t1.compare(a.t1)
	})
	sign := 1
	if !outward {
		sign = -1
	}
	now, kind := t0, base
	r.add(v, base)
	for _, s := range spans {
		from, to := s.t0, s.t1
		if !outward {
			from, to = to, from
		}
		if from.compare(t1)*sign >= 0 || to.compare(now)*sign <= 0 {
			continue
		}
		if from.compare(now)*sign > 0 { // free up to the span
			if kind != base {
				r.add(j.onRay(d, now), base)
			}
			r.add(j.onRay(d, from), Wall)
		} else if kind == base { // the span covers the present point
			r.kinds[r.Len()-1] = Wall
		}
		kind, now = Wall, to
		if to.compare(t1)*sign >= 0 {
			return
		}
	}
	if kind != base {
		r.add(j.onRay(d, now), base)
	}
}

// onRay returns the vertex at t along direction d.
func (j *joiner) onRay(d exact.Vec, t fraction) Vertex { return Vertex{j.eye, d, t.num, t.den} }

// startOn returns where p starts on direction d, which is its own r or runs the same way.
func (p *piece) startOn(eye exact.Pt, d exact.Vec) Vertex {
	if p.cutR {
		return p.start
	}
	return p.meet(eye, d, p.a)
}

// endOn returns where p ends on direction d, which is its own l or runs the same way.
func (p *piece) endOn(eye exact.Pt, d exact.Vec) Vertex {
	if p.cutL {
		return p.end
	}
	return p.meet(eye, d, p.b)
}

// meet returns where direction d meets the line of p, which is end itself when that lies on the direction.
func (p *piece) meet(eye exact.Pt, d exact.Vec, end exact.Pt) Vertex {
	if d.Cross(end.Sub(eye)) == 0 {
		return gridVertex(end)
	}
	num, den := exact.Line{At: eye, Dir: d}.Meet(exact.Through(p.a, p.b))
	return Vertex{eye, d, num, den}
}

// along returns where v lies along direction d from the eye.
func along(eye exact.Pt, v Vertex, d exact.Vec) fraction {
	if v.OnGrid() {
		return fraction{v.At.Sub(eye).Dot(d), d.Len2()}
	}
	return fraction{v.Num, v.Den}
}

// sameWay reports whether a and b point the same way.
func sameWay(a, b exact.Vec) bool { return a.Cross(b) == 0 && a.Dot(b) > 0 }

// drop removes vertex i.
func (r *Region) drop(i int) {
	r.ring = slices.Delete(r.ring, i, i+1)
	r.kinds = slices.Delete(r.kinds, i, i+1)
	r.xy = slices.Delete(r.xy, i, i+1)
}
