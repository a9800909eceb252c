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
// It costs two cross products a triangle, and no allocation once the buffers have grown.
func (f *Finder) expand(now frame, eye exact.Pt, height int32) {
	steps := f.m.Steps
	hits, stack := f.hits, f.stack[:0]
	count := 0
	for {
		s := &steps[mesh.StepAt(now.in)]
		count++
		if f.keep {
			f.cones = append(f.cones, Cone{now.in.Tri(), now.r, now.l})
		}
		v := s.Apex.Sub(eye)
		onRight, onLeft := now.r.Cross(v), v.Cross(now.l)
		if onRight > 0 {
			if onLeft > 0 { // the apex splits the cone
				if s.TopLeft < height {
					stack = append(stack, frame{s.Left, v, now.l})
				} else {
					stack = append(stack, frame{^(now.in.Prev() | later), v, now.l})
				}
				now.l = v
			} else if onLeft == 0 && s.TopLeft >= height && f.edgeOn(now.in, now.l, eye) {
				stack = append(stack, frame{^now.in.Prev(), now.l, now.l})
			}
			// Only the right edge is crossed, or it comes first.
			if s.TopRight < height {
				now.in = s.Right
				continue
			}
			hits = append(hits, hit{now.in.Next(), now.r, now.l})
		} else { // only the left edge is crossed
			if onRight == 0 && s.TopRight >= height && f.edgeOn(now.in.Next(), now.r, eye) {
				hits = append(hits, hit{^now.in.Next(), now.r, now.r})
			}
			if s.TopLeft < height {
				now.in = s.Left
				continue
			}
			hits = append(hits, hit{now.in.Prev(), now.r, now.l})
		}
		for {
			if len(stack) == 0 {
				f.hits, f.stack = hits, stack
				f.count += count
				return
			}
			now = stack[len(stack)-1]
			stack = stack[:len(stack)-1]
			if now.in >= 0 {
				break
			}
			if e := ^now.in; e&later != 0 {
				now.in = e &^ later
			}
			hits = append(hits, hit(now))
		}
	}
}

// edgeOn reports whether the starting corner of e lies on direction d from the eye.
func (f *Finder) edgeOn(e mesh.Edge, d exact.Vec, eye exact.Pt) bool {
	return d.Cross(f.m.Tris[e.Tri()].P[e.Corner()].Sub(eye)) == 0
}
