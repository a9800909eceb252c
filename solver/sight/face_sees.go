package sight

import "enfilade/solver/exact"

// SeesPart reports whether any part of a face is seen from an eye before it, both in the plane of the given height, within a
// clip; a part without width does not count. The front of the face must be free.
func (f *Finder) SeesPart(eye exact.Pt, c Face, height int32, clip Clip) bool {
	r, l := c.A.Sub(eye), c.B.Sub(eye)
	if r.Cross(l) <= 0 || !f.findStarts(eye, height) {
		return false
	}
	parts := [2][2]exact.Vec{{r, l}}
	n := 1
	if clip.Sides {
		n = 0
		for _, half := range [2][2]exact.Vec{{clip.Right, clip.Mid}, {clip.Mid, clip.Left}} {
			if a, b, ok := clipCone(r, l, half[0], half[1]); ok {
				parts[n] = [2]exact.Vec{a, b}
				n++
			}
		}
	}
	for _, part := range parts[:n] {
		f.hits = f.hits[:0]
		f.rotateStarts(part[0])
		f.sweepStarts(eye, height, &part)
		for _, h := range f.hits {
			if h.in >= 0 && f.reachesFace(h, eye, c) && inRange(clip.Range, eye, c, h.r, h.l) {
				return true
			}
		}
	}
	return false
}

// reachesFace reports whether what a hit is on lies behind the face, or on it.
func (f *Finder) reachesFace(h hit, eye exact.Pt, c Face) bool {
	p := f.pieceOf(h)
	face := piece{a: c.A, b: c.B}
	r := p.reach(eye, h.r).compare(face.reach(eye, h.r))
	l := p.reach(eye, h.l).compare(face.reach(eye, h.l))
	return r > 0 || l > 0 || r == 0 && l == 0
}

// inRange reports whether some stretch of a face between the directions r and l lies within the polygon of a range. Where both
// cross they do so once for each edge of the polygon, so it is enough to compare them at its corners.
func inRange(ring []exact.Pt, eye exact.Pt, c Face, r, l exact.Vec) bool {
	if ring == nil {
		return true
	}
	face := piece{a: c.A, b: c.B}
	now := r
	for i := rangeEdge(ring, eye, r); ; i = (i + 1) % len(ring) {
		edge := piece{a: ring[i], b: ring[(i+1)%len(ring)]}
		end, done := edge.b.Sub(eye), false
		if end.Cross(l) <= 0 {
			end, done = l, true
		}
		if face.reach(eye, now).compare(edge.reach(eye, now)) < 0 || face.reach(eye, end).compare(edge.reach(eye, end)) < 0 {
			return true
		}
		if done {
			return false
		}
		now = end
	}
}

// Glimpse returns the point of a face that is seen from the point (x, y) of piece p, which Partly found, all in grid units; it
// only measures. Where the piece lies right before the face that is the nearest point. Elsewhere, of the sight lines that
// cross where the two sides of the beam do, it is the one through (x, y): with both sides it passes between all that bounds
// the beam.
func (f *Finder) Glimpse(c Face, p *Piece, x, y float64) (u, v float64) {
	ax, ay := float64(c.A.X)-x, float64(c.A.Y)-y
	dx, dy := float64(c.B.X)-float64(c.A.X), float64(c.B.Y)-float64(c.A.Y)
	if p.N == 1 {
		lo, hi := f.chord(c, p.Tri)
		t := min(max(-(ax*dx+ay*dy)/(dx*dx+dy*dy), lo), hi)
		return x + ax + t*dx, y + ay + t*dy
	}
	// Each line as its value at a point, which grows to its left; r·left - l·right vanishes at (x, y) and where both do.
	value := func(k exact.Line, px, py float64) float64 {
		return float64(k.Dir.X)*(py+y-float64(k.At.Y)) - float64(k.Dir.Y)*(px+x-float64(k.At.X))
	}
	left, right := p.Lines[0], p.Lines[1]
	l, r := max(value(left, 0, 0), 0), max(value(right, 0, 0), 0)
	if l == 0 && r == 0 {
		r = 1
	}
	at := func(px, py float64) float64 { return r*value(left, px, py) - l*value(right, px, py) }
	a, b := at(ax, ay), at(ax+dx, ay+dy)
	t := 0.5
	if a != b {
		t = min(max(a/(a-b), 0), 1)
	}
	return x + ax + t*dx, y + ay + t*dy
}

// chord returns the stretch of a face within a triangle as shares of the way from A to B; it only measures.
func (f *Finder) chord(c Face, t int32) (lo, hi float64) {
	lo, hi = 0, 1
	line := c.front()
	for _, e := range edgesOf(&f.m.Tris[t]) {
		num, den := line.Meet(e)
		switch s := float64(num) / float64(den); {
		case den == 0:
		case e.Dir.Cross(line.Dir) > 0:
			lo = max(lo, s)
		default:
			hi = min(hi, s)
		}
	}
	return lo, max(lo, hi)
}
