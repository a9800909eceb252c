package plan

import (
	"unsafe"

	"enfilade/solver/exact"
)

// Unshared returns about how many bytes q holds that p does not: the lists of each part that is q's own, and in them the points
// of chains that p does not have. What the strings hold is left out. Cost: one pass over the lists of those parts.
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
		n += own(a.walls, b.walls, func(w *Wall) Chain { return w.Line }) + own(a.openings, b.openings, func(*Opening) Chain { return Chain{} }) +
			own(a.blocks, b.blocks, func(k *Block) Chain { return k.Ring })
	}
	if a, b := p.marks, q.marks; a != b {
		n += int(unsafe.Sizeof(Marks{})) + own(a.zones, b.zones, func(z *Zone) Chain { return z.Ring }) +
			own(a.routes, b.routes, func(r *Route) Chain { return r.Via }) + own(a.observers, b.observers, func(*Observer) Chain { return Chain{} }) +
			own(a.targets, b.targets, func(*Target) Chain { return Chain{} }) + own(a.starts, b.starts, func(*Start) Chain { return Chain{} })
	}
	return n
}

// same reports whether two chains are the same piece of memory.
func (c Chain) same(d Chain) bool {
	return len(c.pts) == len(d.pts) && unsafe.SliceData(c.pts) == unsafe.SliceData(d.pts)
}

func (c Chain) bytes() int { return cap(c.pts) * int(unsafe.Sizeof(exact.Pt{})) }

// own returns the bytes of list b beside list a: nothing when they are the same, else its items, and the chains between the
// items that both have at the beginning and at the end.
func own[T any](a, b []T, chain func(*T) Chain) (n int) {
	if len(b) == 0 || len(a) == len(b) && unsafe.SliceData(a) == unsafe.SliceData(b) {
		return 0
	}
	// A list that was appended to in place shares its memory, but the next one may not: it counts as whole.
	n = cap(b) * int(unsafe.Sizeof(b[0]))
	lo, hi := 0, 0
	for lo < min(len(a), len(b)) && chain(&a[lo]).same(chain(&b[lo])) {
		lo++
	}
	for hi < min(len(a), len(b))-lo && chain(&a[len(a)-1-hi]).same(chain(&b[len(b)-1-hi])) {
		hi++
	}
	for i := lo; i < len(b)-hi; i++ {
		n += chain(&b[i]).bytes()
	}
	return n
}
