package exact

// InRing reports whether p lies in the closed region that the ring winds around, by the crossings of a ray to the right. The ring
// may touch and cross itself. O(n) for n corners.
func InRing(ring []Pt, p Pt) bool {
	wind := 0
	for i, a := range ring {
		b := ring[(i+1)%len(ring)]
		if OnSegment(a, b, p) {
			return true
		}
		switch {
		case a.Y <= p.Y && b.Y > p.Y && Orient(a, b, p) > 0:
			wind++
		case b.Y <= p.Y && a.Y > p.Y && Orient(a, b, p) < 0:
			wind--
		}
	}
	return wind != 0
}
