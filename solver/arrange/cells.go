package arrange

import "enfilade/solver/exact"

// cells is a uniform grid over the drawing with about one square cell a segment: which segments touch each cell, grown by
// one unit so that a segment is listed in the cell of every pixel it can pass.
type cells struct {
	lo     exact.Pt
	shift  uint
	nx, ny int32
	start  []int32 // the segments of cell i are seg[start[i]:start[i+1]]
	seg    []int32
}

// makeCells files every segment. O(n + cells touched).
func makeCells(segs []Segment) *cells {
	c := &cells{}
	lo, hi := segs[0].A, segs[0].A
	for _, s := range segs {
		lo.X, lo.Y = min(lo.X, s.A.X, s.B.X), min(lo.Y, s.A.Y, s.B.Y)
		hi.X, hi.Y = max(hi.X, s.A.X, s.B.X), max(hi.Y, s.A.Y, s.B.Y)
	}
	c.lo = lo
	w, h := int64(hi.X)-int64(lo.X), int64(hi.Y)-int64(lo.Y)
	for (w>>c.shift+1)*(h>>c.shift+1) > int64(len(segs)+1) {
		c.shift++
	}
	c.nx, c.ny = int32(w>>c.shift)+1, int32(h>>c.shift)+1
	c.start = make([]int32, c.nx*c.ny+1)
	for _, s := range segs {
		c.touch(s.A, s.B, func(cell int32) { c.start[cell+1]++ })
	}
	for i := 1; i < len(c.start); i++ {
		c.start[i] += c.start[i-1]
	}
	c.seg = make([]int32, c.start[len(c.start)-1])
	fill := make([]int32, len(c.start)-1)
	copy(fill, c.start)
	for i, s := range segs {
		c.touch(s.A, s.B, func(cell int32) {
			c.seg[fill[cell]] = int32(i)
			fill[cell]++
		})
	}
	return c
}

// of returns the cell that holds p.
func (c *cells) of(p exact.Pt) int32 {
	return (p.Y-c.lo.Y)>>c.shift*c.nx + (p.X-c.lo.X)>>c.shift
}

// touch calls f once for each cell that the segment ab, grown by one unit, may touch: row by row, from the least to the
// greatest x that the segment has in the row.
func (c *cells) touch(a, b exact.Pt, f func(cell int32)) {
	if b.Y < a.Y {
		a, b = b, a
	}
	row0 := max((a.Y-1-c.lo.Y)>>c.shift, 0)
	row1 := min((b.Y+1-c.lo.Y)>>c.shift, c.ny-1)
	dx, dy := int64(b.X)-int64(a.X), int64(b.Y)-int64(a.Y)
	for row := row0; row <= row1; row++ {
		x0, x1 := int64(a.X), int64(b.X)
		if dy > 0 && row0 != row1 {
			y0 := max(int64(c.lo.Y)+int64(row)<<c.shift-1, int64(a.Y))
			y1 := min(int64(c.lo.Y)+int64(row+1)<<c.shift+1, int64(b.Y))
			x0 = int64(a.X) + dx*(y0-int64(a.Y))/dy // truncation is off by less than the unit by which the row is grown
			x1 = int64(a.X) + dx*(y1-int64(a.Y))/dy
		}
		if x1 < x0 {
			x0, x1 = x1, x0
		}
		col0 := max((x0-2-int64(c.lo.X))>>c.shift, 0)
		col1 := min((x1+2-int64(c.lo.X))>>c.shift, int64(c.nx-1))
		for col := col0; col <= col1; col++ {
			f(row*c.nx + int32(col))
		}
	}
}
