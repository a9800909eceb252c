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
		set := s.sets[r.Kind]
		if set == nil {
			set = make([]uint64, p.count(r.Kind)/64+1)
			s.sets[r.Kind] = set
		}
		set[i/64] |= 1 << (i % 64)
	}
	return s
}

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
