package exact

// SortKeys sorts keys in ascending order, in place, by counting digits of 11 bits from the lowest up (LSD radix sort: Knuth,
// The Art of Computer Programming 3, section 5.2.5). Digits that all keys share cost one look. tmp must be as long as keys.
// O(n) for n keys; a comparison sort is several times slower for packed points, of which few bits differ.
func SortKeys(keys, tmp []uint64) {
	const digit = 11
	if len(keys) < 2 {
		return
	}
	var differ uint64
	for _, k := range keys {
		differ |= k ^ keys[0]
	}
	from, to := keys, tmp[:len(keys)]
	for shift := uint(0); shift < 64; shift += digit {
		if differ>>shift&(1<<digit-1) == 0 {
			continue
		}
		var count [1 << digit]int32
		for _, k := range from {
			count[k>>shift&(1<<digit-1)]++
		}
		sum := int32(0)
		for i, c := range count {
			count[i] = sum
			sum += c
		}
		for _, k := range from {
			d := k >> shift & (1<<digit - 1)
			to[count[d]] = k
			count[d]++
		}
		from, to = to, from
	}
	if &from[0] != &keys[0] {
		copy(keys, from)
	}
}
