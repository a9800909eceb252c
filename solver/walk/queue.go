package walk

import (
	"enfilade/solver/exact"
	"enfilade/solver/mesh"
)

// cone is a part of the floor that walks from one root may enter: through half-edge in of the triangle to be entered,
// between the directions r and l from the root, counter-clockwise. Without an edge it stands for the root itself.
type cone struct {
	key  float64 // no point beyond is nearer to the start than this
	node int32
	in   mesh.Edge
	r, l exact.Vec
}

// queue is a binary heap of cones, least key first.
type queue struct{ heap []cone }

func (q *queue) empty() bool { return len(q.heap) == 0 }
func (q *queue) clear()      { q.heap = q.heap[:0] }

func (q *queue) push(c cone) {
	h := append(q.heap, c)
	i := len(h) - 1
	for i > 0 {
		up := (i - 1) / 2
		if h[up].key <= c.key {
			break
		}
		h[i] = h[up]
		i = up
	}
	h[i] = c
	q.heap = h
}

func (q *queue) pop() cone {
	h := q.heap
	top, last := h[0], h[len(h)-1]
	h = h[:len(h)-1]
	q.heap = h
	if len(h) == 0 {
		return top
	}
	i := 0
	for {
		kid := 2*i + 1
		if kid >= len(h) {
			break
		}
		if kid+1 < len(h) && h[kid+1].key < h[kid].key {
			kid++
		}
		if h[kid].key >= last.key {
			break
		}
		h[i] = h[kid]
		i = kid
	}
	h[i] = last
	return top
}
