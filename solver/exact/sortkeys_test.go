package exact_test

import (
	"math/rand/v2"
	"slices"
	"testing"

	"enfilade/solver/exact"
)

func TestSortKeys(t *testing.T) {
	r := rand.New(rand.NewPCG(1, 1))
	for _, mask := range []uint64{0, 1, 0xff00, 0xfff << 40, 1<<63 | 1, ^uint64(0)} {
		for _, n := range []int{0, 1, 2, 3, 100, 5000} {
			keys := make([]uint64, n)
			for i := range keys {
				keys[i] = r.Uint64()&mask | 0x123<<20&^mask
			}
			want := slices.Clone(keys)
			slices.Sort(want)
			if exact.SortKeys(keys, make([]uint64, n)); !slices.Equal(keys, want) {
				t.Errorf("mask %x, %d keys: not in order", mask, n)
			}
		}
	}
}
