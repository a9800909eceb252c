package arrange

import (
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
// a wheel do, and two that have do not cross: so only segments of different bunches are compared.
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

// spoke is a segment, and the one of its ends that the most segments in the cell share.
type spoke struct {
	hub uint64
	seg int32
}

// bunch sorts segments by their hubs.
func bunch(segs []Segment, list []int32) []spoke {
	ends := make(map[exact.Pt]int32, len(list))
	for _, s := range list {
		ends[segs[s].A]++
		ends[segs[s].B]++
	}
	out := make([]spoke, len(list))
	for i, s := range list {
		hub := segs[s].A
		if ends[segs[s].B] > ends[hub] {
			hub = segs[s].B
		}
		out[i] = spoke{key(hub), s}
	}
	slices.SortFunc(out, func(a, b spoke) int {
		if a.hub != b.hub {
			if a.hub < b.hub {
				return -1
			}
			return 1
		}
		return int(a.seg - b.seg)
	})
	return out
}
