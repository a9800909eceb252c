package arrange

import "slices"

// CrowdedCrossings returns the keys of the crossings of segments, as they are found in a crowded cell, in order.
func CrowdedCrossings(segs []Segment) []uint64 {
	list := make([]int32, len(segs))
	for i := range list {
		list[i] = int32(i)
	}
	keys := crowdedCrossings(nil, segs, list)
	slices.Sort(keys)
	return keys
}

// PairCrossings returns the same by trying all pairs.
func PairCrossings(segs []Segment) (keys []uint64) {
	for i := range segs {
		for j := range i {
			if p, ok := crossing(&segs[i], &segs[j]); ok {
				keys = append(keys, key(p))
			}
		}
	}
	slices.Sort(keys)
	return keys
}

// LeastSegments is leastSegments.
var LeastSegments = leastSegments
