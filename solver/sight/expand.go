package sight

import (
	"slices"

	"enfilade/solver/exact"
	"enfilade/solver/mesh"
)

// later marks, in a frame's complemented edge, a hit that has been found but must wait its turn in the order of sight. It
// lies above every half-edge of a mesh within the legal size.
const later mesh.Edge = 1 << 29

// after and before return the corners that follow and precede corner i counter-clockwise: octal digits of a number, since a
// table would have to be read.
func after(i uint32) uint32  { return 0o021 >> (3 * i) & 7 }
func before(i uint32) uint32 { return 0o102 >> (3 * i) & 7 }

// inc is the next corner counter-clockwise.
var inc = [3]int{1, 2, 0}

// expand sends one cone through the mesh and appends what its parts end on, from right to left. The loop keeps the
// rightmost open cone in hand and the others on a stack, so that triangles are visited in the order in which they are seen.
// It costs two cross products a triangle, and no allocation once the buffers have grown.
func (f *Finder) expand(now frame, eye exact.Pt, height int32) {
	f.stack = f.stack[:0]
	for !f.run(&now, eye, height) {
		f.grow()
	}
}

// grow gives run's buffers more room.
func (f *Finder) grow() {
	f.stack = slices.Grow(f.stack, cap(f.stack)+64)
	f.hits = slices.Grow(f.hits, cap(f.hits)+64)
	if f.keep {
		f.cones = slices.Grow(f.cones, cap(f.cones)+64)
	}
}

// run is the loop of expand. It returns false when a buffer may not do for the next triangle, to be called again with larger
// ones: it calls nothing itself, which lets the compiler keep the cone in registers.
func (f *Finder) run(cone *frame, eye exact.Pt, height int32) bool {
	tris, stack, hits := f.m.Tris, f.stack[:cap(f.stack)], f.hits[:cap(f.hits)]
	now, depth, nhits, count := *cone, len(f.stack), len(f.hits), f.count
	for depth+nhits+3 <= len(hits) && depth+2 <= len(stack) {
		// Seen from the eye, the edge of entry runs from its end (right) to its corner (left); the apex lies behind.
		t := &tris[uint32(now.in)>>2]
		corner := uint32(now.in & 3)
		out, left := after(corner), before(corner)
		if f.keep {
			n := len(f.cones)
			if n == cap(f.cones) {
				break
			}
			f.cones = f.cones[:n+1]
			f.cones[n] = Cone{now.in.Tri(), now.r, now.l}
		}
		count++
		v := t.P[left].Sub(eye)
		onRight, onLeft := now.r.Cross(v), v.Cross(now.l)
		if (onRight-1)|(onLeft-1) >= 0 { // the apex splits the cone: the right edge comes first, the left one waits
			wait := ^(now.in + mesh.Edge(left) - mesh.Edge(corner) | later)
			next, top := t.N[left], t.Top[left]
			if top < height {
				wait = next
			}
			stack[depth] = frame{wait, v, now.l}
			depth++
			now.l = v
		} else {
			if onRight == 0 {
				if t.Top[out] >= height && now.r.Cross(t.P[out].Sub(eye)) == 0 { // the right edge is seen edge-on
					hits[nhits] = hit{^(now.in + mesh.Edge(out) - mesh.Edge(corner)), now.r, now.r}
					nhits++
				}
			} else if onLeft == 0 && t.Top[left] >= height && now.l.Cross(t.P[corner].Sub(eye)) == 0 {
				stack[depth] = frame{^(now.in + mesh.Edge(left) - mesh.Edge(corner)), now.l, now.l}
				depth++
			}
			if onRight <= 0 { // only the left edge is crossed
				out = left
			}
		}
		if t.Top[out] < height {
			now.in = t.N[out]
			continue
		}
		now.in += mesh.Edge(out) - mesh.Edge(corner)
		hits[nhits] = hit(now)
		nhits++
		for {
			if depth == 0 {
				f.hits, f.count = hits[:nhits], count
				return true
			}
			depth--
			now = stack[depth]
			if now.in >= 0 {
				break
			}
			if e := ^now.in; e&later != 0 {
				now.in = e &^ later
			}
			hits[nhits] = hit(now)
			nhits++
		}
	}
	*cone, f.stack, f.hits, f.count = now, stack[:depth], hits[:nhits], count
	return false
}
