package plan

import (
	"iter"
	"math/bits"
)

// picked is which items of a plan an edit is about: for each kind the places of its items in their list. Of what there is only one
// of, the place is 0.
type picked struct {
	plan *Plan
	sets [len(kinds)][]uint64 // a bit for each place; nil for none
	lost int                  // index of the first item named that is not in the plan, -1 for none
}

// pick looks items up, each once however often it is listed. Cost: constant for each of many.
func (p *Plan) pick(items []Ref) picked {
	s := picked{plan: p, lost: -1}
	for k, r := range items {
		i := p.place(r)
		if i < 0 {
			if s.lost < 0 {
				s.lost = k
			}
			continue
		}
		s.add(r.Kind, i)
	}
	return s
}

// add picks the item at a place, and reports whether it was not yet.
func (s *picked) add(kind Kind, i int) bool {
	set := s.sets[kind]
	if set == nil {
		set = make([]uint64, s.plan.count(kind)/64+1)
		s.sets[kind] = set
	}
	was := set[i/64]
	set[i/64] |= 1 << (i % 64)
	return set[i/64] != was
}

// Present returns the items that are in the plan, each once, in the order given. Cost: constant for each of many.
func (p *Plan) Present(items []Ref) []Ref {
	if len(items) == 0 {
		return nil
	}
	out := make([]Ref, 0, len(items))
	s := picked{plan: p}
	for _, r := range items {
		if i := p.place(r); i >= 0 && s.add(r.Kind, i) {
			out = append(out, r)
		}
	}
	return out
}

// SameItems reports whether q was made from p, or p from q, without an item being added or taken away. It may say no where that is
// so, and is quick.
func SameItems(p, q *Plan) bool {
	a, b, m, n := p.obstacles, q.obstacles, p.marks, q.marks
	return a.walls.ids == b.walls.ids && a.openings.ids == b.openings.ids && a.blocks.ids == b.blocks.ids &&
		m.zones.ids == n.zones.ids && m.observers.ids == n.observers.ids && m.targets.ids == n.targets.ids &&
		m.starts.ids == n.starts.ids && m.routes.ids == n.routes.ids &&
		(a.floor.Len() > 0) == (b.floor.Len() > 0) && (p.sheet.Underlay == nil) == (q.sheet.Underlay == nil)
}

// Set is a set of items of a plan, which tells at once what it holds.
type Set struct{ picked }

// SetOf returns the set of those of some items that are in the plan.
func (p *Plan) SetOf(items []Ref) Set { return Set{p.pick(items)} }

// Has reports whether an item is in the set.
func (s *Set) Has(r Ref) bool { return s.has(r.Kind, r.ID) }

// At reports whether the item of a kind at a place of the plan's list is in the set.
func (s *Set) At(kind Kind, i int) bool { return s.at(kind, i) }

// some reports whether any item of a kind is picked.
func (s *picked) some(kind Kind) bool { return s.sets[kind] != nil }

// at reports whether the item at a place is picked.
func (s *picked) at(kind Kind, i int) bool {
	set := s.sets[kind]
	return set != nil && i >= 0 && set[i/64]>>(i%64)&1 != 0
}

// has reports whether an item is picked.
func (s *picked) has(kind Kind, id string) bool {
	return s.some(kind) && s.at(kind, s.plan.place(Ref{kind, id}))
}

// places yields the places of the picked items of a kind, in order.
func (s *picked) places(kind Kind) iter.Seq[int] {
	return func(yield func(int) bool) {
		for w, set := range s.sets[kind] {
			for ; set != 0; set &= set - 1 {
				if !yield(w*64 + bits.TrailingZeros64(set)) {
					return
				}
			}
		}
	}
}

// place returns where in its list an item is, 0 for what there is only one of, and -1 for what is not in the plan.
func (p *Plan) place(r Ref) int {
	switch r.Kind {
	case KindWall:
		return at(&p.obstacles.walls, r.ID)
	case KindOpening:
		return at(&p.obstacles.openings, r.ID)
	case KindBlock:
		return at(&p.obstacles.blocks, r.ID)
	case KindZone:
		return at(&p.marks.zones, r.ID)
	case KindObserver:
		return at(&p.marks.observers, r.ID)
	case KindTarget:
		return at(&p.marks.targets, r.ID)
	case KindStart:
		return at(&p.marks.starts, r.ID)
	case KindRoute:
		return at(&p.marks.routes, r.ID)
	case KindFloor:
		if p.obstacles.floor.Len() == 0 {
			return -1
		}
	case KindUnderlay:
		if p.sheet.Underlay == nil {
			return -1
		}
	}
	if r.ID != "" {
		return -1
	}
	return 0
}

// count returns how many items of a kind the plan has, at most.
func (p *Plan) count(kind Kind) int {
	switch kind {
	case KindWall:
		return p.obstacles.walls.n
	case KindOpening:
		return p.obstacles.openings.n
	case KindBlock:
		return p.obstacles.blocks.n
	case KindZone:
		return p.marks.zones.n
	case KindObserver:
		return p.marks.observers.n
	case KindTarget:
		return p.marks.targets.n
	case KindStart:
		return p.marks.starts.n
	case KindRoute:
		return p.marks.routes.n
	}
	return 1
}
