package plan

import (
	"unsafe"

	"enfilade/solver/exact"
)

// Unshared returns about how many bytes q holds that p does not: the pieces of its lists that are q's own, and in them the points
// of chains that p does not have. What the strings hold is left out. Cost: one pass over those pieces.
func Unshared(p, q *Plan) int {
	n := 0
	if p.sheet != q.sheet {
		n += int(unsafe.Sizeof(Sheet{})) + len(q.sheet.Brief)
	}
	if a, b := p.obstacles, q.obstacles; a != b {
		n += int(unsafe.Sizeof(Obstacles{}))
		if !b.floor.same(a.floor) {
			n += b.floor.bytes()
		}
		n += own(&a.walls, &b.walls, func(w *Wall) Chain { return w.Line }) + own(&a.openings, &b.openings, func(*Opening) Chain { return Chain{} }) +
			own(&a.blocks, &b.blocks, func(k *Block) Chain { return k.Ring })
	}
	if a, b := p.marks, q.marks; a != b {
		n += int(unsafe.Sizeof(Marks{})) + own(&a.zones, &b.zones, func(z *Zone) Chain { return z.Ring }) +
			own(&a.routes, &b.routes, func(r *Route) Chain { return r.Via }) + own(&a.observers, &b.observers, func(*Observer) Chain { return Chain{} }) +
			own(&a.targets, &b.targets, func(*Target) Chain { return Chain{} }) + own(&a.starts, &b.starts, func(*Start) Chain { return Chain{} })
	}
	return n
}

// same reports whether two chains are the same piece of memory.
func (c Chain) same(d Chain) bool {
	return len(c.pts) == len(d.pts) && unsafe.SliceData(c.pts) == unsafe.SliceData(d.pts)
}

func (c Chain) bytes() int { return cap(c.pts) * int(unsafe.Sizeof(exact.Pt{})) }

// own returns the bytes of list b beside list a: its row of chunks and the chunks that are not a's, and in them the chains that a has neither at the
// same place from the beginning nor from the end.
func own[T any](a, b *list[T], chain func(*T) Chain) (n int) {
	if len(b.chunks) == 0 || len(a.chunks) == len(b.chunks) && &a.chunks[0] == &b.chunks[0] {
		return 0
	}
	n = cap(b.chunks) * int(unsafe.Sizeof(b.chunks[0]))
	has := func(i int, c Chain) bool { return i >= 0 && i < a.n && chain(a.at(i)).same(c) }
	for k, items := range b.chunks {
		if k < len(a.chunks) && len(a.chunks[k]) == len(items) && &a.chunks[k][0] == &items[0] {
			continue
		}
		n += cap(items) * int(unsafe.Sizeof(items[0]))
		for j := range items {
			i := k*chunkLen + j
			if c := chain(&items[j]); !has(i, c) && !has(i+a.n-b.n, c) {
				n += c.bytes()
			}
		}
	}
	return n
}
