package sight

import (
	"enfilade/solver/exact"
	"enfilade/solver/mesh"
)

// later marks, in a frame's complemented edge, a hit that has been found but must wait its turn in the order of sight. It
// lies above every half-edge of a mesh within the legal size.
const later mesh.Edge = 1 << 29

// inc is the next corner counter-clockwise.
var inc = [3]int{1, 2, 0}

// expand sends one cone through the mesh and appends what its parts end on, from right to left. The loop keeps the
// rightmost open cone in hand and the others on a stack, so that triangles are visited in the order in which they are seen.
// It costs three cross products a triangle at most, and no allocation once the buffers have grown.
func (f *Finder) expand(now frame, eye exact.Pt, height int32) {
	tris := f.m.Tris
	base := len(f.stack)
	for {
		t := &tris[now.in.Tri()]
		f.count++
		if f.keep {
			f.cones = append(f.cones, Cone{now.in.Tri(), now.r, now.l})
		}
		// Seen from the eye, the edge of entry runs from its end (right) to its corner (left); the apex lies behind.
		left := now.in.Corner()
		right := inc[left]
		apex := inc[right]
		first := now.in - mesh.Edge(left)
		v := t.P[apex].Sub(eye)
		onRight, onLeft := now.r.Cross(v), v.Cross(now.l)
		var next frame
		if onRight <= 0 { // only the left edge is crossed
			if onRight == 0 && t.Top[right] >= height && now.r.Cross(t.P[right].Sub(eye)) == 0 {
				f.hits = append(f.hits, hit{^(first + mesh.Edge(right)), now.r, now.r})
			}
			next = frame{first + mesh.Edge(apex), now.r, now.l}
		} else if onLeft <= 0 { // only the right edge is crossed
			if onLeft == 0 && t.Top[apex] >= height && now.l.Cross(t.P[left].Sub(eye)) == 0 {
				f.stack = append(f.stack, frame{^(first + mesh.Edge(apex)), now.l, now.l})
			}
			next = frame{first + mesh.Edge(right), now.r, now.l}
		} else { // the apex splits the cone
			if t.Top[apex] >= height {
				f.stack = append(f.stack, frame{^(first + mesh.Edge(apex) | later), v, now.l})
			} else {
				f.stack = append(f.stack, frame{t.N[apex], v, now.l})
			}
			next = frame{first + mesh.Edge(right), now.r, v}
		}
		if c := next.in.Corner(); t.Top[c] < height {
			next.in = t.N[c]
			now = next
			continue
		}
		f.hits = append(f.hits, hit(next))
		for {
			if len(f.stack) == base {
				return
			}
			now = f.stack[len(f.stack)-1]
			f.stack = f.stack[:len(f.stack)-1]
			if now.in >= 0 {
				break
			}
			if e := ^now.in; e&later != 0 {
				now.in = e &^ later
			}
			f.hits = append(f.hits, hit(now))
		}
	}
}
