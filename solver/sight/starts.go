package sight

import (
	"enfilade/solver/exact"
	"enfilade/solver/mesh"
)

// findStarts lists the edges of the free triangles around eye, counter-clockwise, and reports whether there are any.
func (f *Finder) findStarts(eye exact.Pt, height int32) bool {
	f.starts = f.starts[:0]
	place, ok := f.m.Locate(eye)
	if !ok {
		return false
	}
	switch {
	case place.Corner >= 0:
		f.startsAtCorner(mesh.EdgeOf(place.Tri, place.Corner), eye, height)
	case place.Edge != mesh.None:
		f.startsOnEdge(place.Edge, eye, height)
	default:
		if f.m.Solid[place.Tri] >= height {
			return false
		}
		for i := range 3 {
			f.addStart(mesh.EdgeOf(place.Tri, i), eye)
		}
	}
	return len(f.starts) > 0
}

func (f *Finder) addStart(e mesh.Edge, eye exact.Pt) {
	a, b := f.m.Ends(e)
	f.starts = append(f.starts, start{tri: e.Tri(), edge: e, r: a.Sub(eye), l: b.Sub(eye), spoke: mesh.None, spokeTo: mesh.None})
}

// startsOnEdge lists the starts around an eye strictly inside edge e.
func (f *Finder) startsOnEdge(e mesh.Edge, eye exact.Pt, height int32) {
	for _, side := range [2]mesh.Edge{e, f.m.Twin(e)} {
		if side == mesh.None || f.m.Solid[side.Tri()] >= height {
			continue
		}
		n := len(f.starts)
		f.addStart(side.Next(), eye)
		f.addStart(side.Prev(), eye)
		if f.m.Tris[e.Tri()].Top[e.Corner()] >= height {
			f.starts[n].spoke, f.starts[n+1].spokeTo = side, side
		}
	}
	if len(f.starts) == 2 { // the other side is solid
		f.starts[0].broken = true
	}
}

// startsAtCorner lists the starts around an eye at the corner that half-edge first leaves from.
func (f *Finder) startsAtCorner(first mesh.Edge, eye exact.Pt, height int32) {
	broken := false
	for e := first; ; {
		if f.m.Solid[e.Tri()] >= height {
			broken = true
		} else {
			f.addStart(e.Next(), eye)
			s := &f.starts[len(f.starts)-1]
			s.broken = broken
			t := &f.m.Tris[e.Tri()]
			if t.Top[e.Corner()] >= height {
				s.spoke = e
			}
			if p := e.Prev(); t.Top[p.Corner()] >= height {
				s.spokeTo = p
			}
			broken = false
		}
		if e = f.m.Twin(e.Prev()); e == first || e == mesh.None {
			break
		}
	}
	if broken && len(f.starts) > 0 {
		f.starts[0].broken = true
	}
}

// rotateStarts turns the list of starts so that it begins at direction d: a sector of at most half a turn from d onwards
// then meets them in counter-clockwise order, and none twice, since no start is as wide as half a turn.
func (f *Finder) rotateStarts(d exact.Vec) {
	for i := range f.starts {
		s := &f.starts[i]
		if r, l := s.r.Cross(d), d.Cross(s.l); r >= 0 && l > 0 && (r > 0 || s.r.Dot(d) > 0) {
			turn(f.starts, i)
			return
		}
	}
	// No start holds d: begin with the first one that lies counter-clockwise of it.
	best := 0
	for i := range f.starts {
		if turnsBefore(d, f.starts[i].r, f.starts[best].r) {
			best = i
		}
	}
	turn(f.starts, best)
}

// turnsBefore reports whether, turning counter-clockwise from d, direction a comes before b.
func turnsBefore(d, a, b exact.Vec) bool {
	ha, hb := half(d, a), half(d, b)
	if ha != hb {
		return ha < hb
	}
	return a.Cross(b) > 0
}

// half tells in which half turn counter-clockwise from d a lies: 0 for [0, 180) degrees, 1 for the rest.
func half(d, a exact.Vec) int {
	if c := d.Cross(a); c > 0 || c == 0 && d.Dot(a) > 0 {
		return 0
	}
	return 1
}
