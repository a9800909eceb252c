package mesh

import (
	"math/bits"
	"slices"

	"enfilade/solver/exact"
)

// curveOrder returns the indices of pts in their order along a Hilbert curve. O(n).
func curveOrder(pts []exact.Pt) []int32 {
	lo, shift := curveFrame(pts)
	keys := make([]uint64, 2*len(pts))
	keys, tmp := keys[:len(pts)], keys[len(pts):]
	for i, p := range pts {
		keys[i] = uint64(hilbert(uint32(p.X-lo.X)>>shift, uint32(p.Y-lo.Y)>>shift))<<32 | uint64(i)
	}
	exact.SortKeys(keys, tmp)
	order := make([]int32, len(pts))
	for i, k := range keys {
		order[i] = int32(uint32(k))
	}
	return order
}

// insertionOrder returns the order in which pts, given along a curve, are to be inserted, but for those left out: rounds of
// doubling size chosen by a hash of the coordinates, so that the expected number of flips stays constant, and each round along
// the curve, so that the walk to the next point is short. It depends on the points alone. Round r, of which the last one is 0,
// ends before order[ends[r]]. O(n).
func insertionOrder(pts []exact.Pt, out []int32) (order []int32, ends [rounds]int32) {
	var next [rounds]int32 // where the next point of each round goes; the last round, of half the points, is round 0
	for _, p := range pts {
		next[round(hash(p))]++
	}
	for _, i := range out {
		next[round(hash(pts[i]))]--
	}
	for r, sum := rounds-1, int32(0); r >= 0; r-- {
		next[r], sum = sum, sum+next[r]
	}
	order = make([]int32, len(pts)-len(out))
	for i, p := range pts {
		if !slices.Contains(out, int32(i)) {
			r := round(hash(p))
			order[next[r]] = int32(i)
			next[r]++
		}
	}
	return order, next
}

// curveFrame returns the lower left corner of pts and the shift that brings their extent to 16 bits.
func curveFrame(pts []exact.Pt) (lo exact.Pt, shift uint) {
	if len(pts) == 0 {
		return lo, 0
	}
	lo, hi := pts[0], pts[0]
	for _, p := range pts {
		lo.X, lo.Y = min(lo.X, p.X), min(lo.Y, p.Y)
		hi.X, hi.Y = max(hi.X, p.X), max(hi.Y, p.Y)
	}
	for uint32(max(hi.X-lo.X, hi.Y-lo.Y))>>shift >= 1<<16 {
		shift++
	}
	return lo, shift
}

// rounds is the number of rounds of insertion.
const rounds = 12

// round counts the trailing zero bits of h, below rounds: half of all points are of round 0, which comes last, a quarter of
// round 1, which comes before it, and so on.
func round(h uint32) int { return min(bits.TrailingZeros32(h), rounds-1) }

// hash mixes the coordinates of p (constants of the finaliser of MurmurHash3, Appleby, public domain).
func hash(p exact.Pt) uint32 {
	h := uint32(p.X)*0x9e3779b1 ^ uint32(p.Y)*0x85ebca6b
	h ^= h >> 16
	h *= 0x85ebca6b
	h ^= h >> 13
	h *= 0xc2b2ae35
	return h ^ h>>16
}

// hilbert returns the position of the cell x, y of a 2^16 square along the Hilbert curve of that order: four bits of each at a
// time.
func hilbert(x, y uint32) uint32 {
	var d, turned uint32
	for s := 12; s >= 0; s -= 4 {
		step := uint32(hilbertSteps[turned<<8|x>>s&15<<4|y>>s&15])
		d, turned = d<<8|step>>2, step&3
	}
	return d
}

// hilbertSteps is what four bits of x and four of y, lower ones, add to the position along the Hilbert curve, in a square that is
// turned in one of four ways: eight bits of the position, then two of how the cell is turned. A square is turned by taking the
// complements of its coordinates (1), or by swapping them (2), or both.
var hilbertSteps = makeHilbertSteps()

func makeHilbertSteps() (table [4 << 8]uint16) {
	for k := range table {
		turned, x, y, d := k>>8, k>>4&15, k&15, 0
		for s := 3; s >= 0; s-- {
			rx, ry := x>>s&1^turned&1, y>>s&1^turned&1
			if turned&2 != 0 {
				rx, ry = ry, rx
			}
			d = d<<2 | 3*rx ^ ry
			if ry == 0 {
				turned ^= rx | 2
			}
		}
		table[k] = uint16(d<<2 | turned)
	}
	return table
}
