package arrange

import (
	"cmp"
	"slices"

	"enfilade/solver/exact"
)

// crowd is how many segments of one cell are compared pair by pair without ado.
const crowd = 64

// crossings appends the keys of the pixels in which segments of one cell's list cross.
func crossings(keys []uint64, segs []Segment, list []int32) []uint64 {
	if len(list) > crowd {
		return crowdedCrossings(keys, segs, list)
	}
	for i, u := range list {
		for _, v := range list[:i] {
			if p, ok := crossing(&segs[u], &segs[v]); ok {
				keys = append(keys, key(p))
			}
		}
	}
	return keys
}

// crowdedCrossings does the same for a crowd. Thousands of segments in one cell mostly have an end in common, as the spokes of
// a wheel do, and two that have do not cross: so only segments of different bunches are compared, and of those that lie in one
// place, as the sides of a wall drawn a thousand times do, one.
func crowdedCrossings(keys []uint64, segs []Segment, list []int32) []uint64 {
	bunches := bunch(segs, list)
	for from := 0; from < len(bunches); {
		to := from
		for ; to < len(bunches) && bunches[to].hub == bunches[from].hub; to++ {
			for _, v := range bunches[:from] {
				if p, ok := crossing(&segs[bunches[to].seg], &segs[v.seg]); ok {
					keys = append(keys, key(p))
				}
			}
		}
		from = to
	}
	return keys
}

// spoke is a segment, the one of its ends that the most segments in the cell share, and the other one.
type spoke struct {
	hub, far uint64
	seg      int32
}

// bunch sorts segments by their hubs; of those with both ends in common it takes one.
func bunch(segs []Segment, list []int32) []spoke {
	ends := make(map[exact.Pt]int32, len(list))
	for _, s := range list {
		ends[segs[s].A]++
		ends[segs[s].B]++
	}
	out := make([]spoke, len(list))
	for i, s := range list {
		hub, far := segs[s].A, segs[s].B
		if ends[far] > ends[hub] || ends[far] == ends[hub] && far.Less(hub) {
			hub, far = far, hub
		}
		out[i] = spoke{key(hub), key(far), s}
	}
	slices.SortFunc(out, func(a, b spoke) int { return cmp.Or(cmp.Compare(a.hub, b.hub), cmp.Compare(a.far, b.far)) })
	return slices.CompactFunc(out, func(a, b spoke) bool { return a.hub == b.hub && a.far == b.far })
}
