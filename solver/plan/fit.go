package plan

import "fmt"

// Fit says why an opening fits nowhere in the wall; fault is empty when it fits. toEnd reports that it reaches the end of
// its straight piece: a slanted piece's length is no whole number of units, so an opening that ends less than one unit
// before the piece's end reaches it. Whether it lies over another opening is not asked.
func (w *Wall) Fit(o Opening) (toEnd bool, fault string) {
	pieces := w.Line.Len() - 1
	switch {
	case o.Segment < 0 || o.Segment >= pieces:
		return false, fmt.Sprintf("names straight piece %d of wall %s, which has pieces 0 to %d", o.Segment, w.ID, pieces-1)
	case o.At < 0 || o.Width <= 0:
		return false, "needs a place of 0 or more along its wall, and a width above 0"
	}
	a, b := w.Line.At(o.Segment), w.Line.At(o.Segment+1)
	if a == b {
		return false, fmt.Sprintf("names straight piece %d of wall %s, which has no length", o.Segment, w.ID)
	}
	to, len2 := int64(o.At)+int64(o.Width), b.Sub(a).Len2()
	// Legal pieces are shorter than 2^31 units, so squares of what fits stay below 2^62.
	if to >= 1<<31 || to*to > len2 {
		return false, fmt.Sprintf("reaches beyond the end of straight piece %d of wall %s", o.Segment, w.ID)
	}
	return (to+1)*(to+1) > len2, ""
}

// Over reports whether two openings of one wall share more than a jamb.
func (o Opening) Over(q Opening) bool {
	return o.Wall == q.Wall && o.Segment == q.Segment && o.At < q.At+q.Width && q.At < o.At+o.Width
}
