package sight

import (
	"enfilade/solver/exact"
	"enfilade/solver/mesh"
)

// Sees reports whether b lies in the closed region seen from a, both in the plane of the given height. Only cones towards
// b are followed, so it costs the triangles along one line.
func (f *Finder) Sees(a, b exact.Pt, height int32) bool {
	return f.SeesWithin(a, b, height, Clip{})
}

// SeesWithin is Sees within a clip.
func (f *Finder) SeesWithin(a, b exact.Pt, height int32, c Clip) bool {
	if !f.findStarts(a, height) {
		return false
	}
	d := b.Sub(a)
	if a == b {
		return true
	}
	if !c.holds(b, d) {
		return false
	}
	for i := range f.starts {
		s := &f.starts[i]
		if s.r.Cross(d) < 0 || d.Cross(s.l) < 0 {
			continue
		}
		if !c.Sides {
			if f.reaches(s.edge, s.r, s.l, a, b, height) {
				return true
			}
			continue
		}
		// Straight ahead, b may be seen by one half of the view only. A sliver of the view without width sees nothing.
		for _, half := range [2][2]exact.Vec{{c.Right, c.Mid}, {c.Mid, c.Left}} {
			r, l, ok := clipCone(s.r, s.l, half[0], half[1])
			if ok && r.Cross(d) >= 0 && d.Cross(l) >= 0 && f.reaches(s.edge, r, l, a, b, height) {
				return true
			}
		}
	}
	return false
}

// reaches reports whether the cone from r to l, about to leave its triangle through e, holds b there or further on.
func (f *Finder) reaches(e mesh.Edge, r, l exact.Vec, eye, b exact.Pt, height int32) bool {
	d := b.Sub(eye)
	f.stack = append(f.stack[:0], frame{e, r, l})
	for len(f.stack) > 0 {
		now := f.stack[len(f.stack)-1]
		f.stack = f.stack[:len(f.stack)-1]
		t := &f.m.Tris[now.in.Tri()]
		i := now.in.Corner()
		if exact.Area2(t.P[i], t.P[inc[i]], b) >= 0 {
			f.stack = f.stack[:0]
			return true // b lies before the edge through which the cone would leave
		}
		if t.Top[i] >= height {
			continue
		}
		in := t.N[i]
		t = &f.m.Tris[in.Tri()]
		left := in.Corner()
		right := inc[left]
		apex := inc[right]
		first := in - mesh.Edge(left)
		v := t.P[apex].Sub(eye)
		rr, ll := now.r, now.l
		if now.r.Cross(v) > 0 { // part of the right edge is open
			lim := ll
			if v.Cross(ll) > 0 {
				lim = v
			}
			if d.Cross(lim) >= 0 {
				f.stack = append(f.stack, frame{first + mesh.Edge(right), rr, lim})
			}
		}
		if v.Cross(now.l) > 0 { // part of the left edge is open
			if now.r.Cross(v) > 0 {
				rr = v
			}
			if rr.Cross(d) >= 0 {
				f.stack = append(f.stack, frame{first + mesh.Edge(apex), rr, ll})
			}
		}
	}
	return false
}
