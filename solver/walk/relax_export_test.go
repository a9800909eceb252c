package walk

import (
	"cmp"
	"context"
	"slices"

	"enfilade/solver/exact"
)

// Settled is how a tie came out: the node before, the distance, and whether another walk there is as long.
type Settled struct {
	Parent int32
	G      float64
	Ties   bool
}

// SettleTwice floods all of the floor from start and settles the ties of every root, as Flood does and by comparing whole walks.
func (f *Finder) SettleTwice(ctx context.Context, start exact.Pt) (fast, slow []Settled, err error) {
	defer f.reset()
	f.field = &Field{m: f.m}
	if err := f.run(ctx, start); err != nil {
		return nil, nil, err
	}
	nodes := slices.Clone(f.nodes)
	f.settleTies()
	fast = f.howSettled()
	copy(f.nodes, nodes)
	f.settleTiesSlow()
	return fast, f.howSettled(), nil
}

func (f *Finder) howSettled() []Settled {
	list := make([]Settled, len(f.nodes))
	for i, n := range f.nodes {
		list[i] = Settled{n.parent, n.g, f.tiesOn(int32(i))}
	}
	return list
}

func (f *Finder) settleTiesSlow() {
	slices.SortFunc(f.tied, func(a, b int32) int { return cmp.Compare(f.nodes[a].g, f.nodes[b].g) })
	for _, n := range f.tied {
		o := &f.nodes[n]
		for i := o.others; i >= 0; i = f.others[i].next {
			k := &f.others[i]
			switch c := compareWalks(f.chain(nil, o.parent, o.at), f.chain(nil, k.parent, o.at)); {
			case c == 0:
				o.ties = o.ties || f.tiesOn(k.parent)
			case c > 0:
				o.parent, o.g, o.ties = k.parent, k.g, true
			default:
				o.ties = true
			}
		}
	}
}
