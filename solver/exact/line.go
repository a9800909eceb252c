package exact

import "math"

// Line is a directed line through a grid point: At + t·Dir. Its left side is the positive one.
type Line struct {
	At  Pt
	Dir Vec
}

// Through returns the line from a towards b.
func Through(a, b Pt) Line { return Line{a, b.Sub(a)} }

// Side returns the side of p: +1 left, 0 on the line, -1 right.
func (l Line) Side(p Pt) int { return Sign(l.Dir.Cross(p.Sub(l.At))) }

// Meet returns where l meets m as the fraction num/den of l.Dir from l.At; den is zero for parallel lines. Both are below
// 2^61 and exact.
func (l Line) Meet(m Line) (num, den int64) {
	return m.Dir.Cross(l.At.Sub(m.At)), l.Dir.Cross(m.Dir)
}

// Point returns At + t·Dir as floating-point offsets from origin; it only measures.
func (l Line) Point(origin Pt, t float64) (x, y float64) {
	return float64(l.At.X-origin.X) + t*float64(l.Dir.X), float64(l.At.Y-origin.Y) + t*float64(l.Dir.Y)
}

// constant returns c of the line's equation -Dir.Y·x + Dir.X·y + c = 0; it stays below 2^60.
func (l Line) constant() int64 {
	return int64(l.Dir.Y)*int64(l.At.X) - int64(l.Dir.X)*int64(l.At.Y)
}

// SideOfMeet returns the side of line k on which lines i and j meet. It needs i.Dir × j.Dir > 0.
// The determinant of the three equations is below 2^123.
func SideOfMeet(i, j, k Line) int {
	ci, cj, ck := i.constant(), j.constant(), k.constant()
	jk, ki, ij := j.Dir.Cross(k.Dir), k.Dir.Cross(i.Dir), i.Dir.Cross(j.Dir)
	// Filter: each product is off by at most 3u of itself (two conversions, one multiplication, u = 2^-53) and the two
	// additions by 2u of the sum of magnitudes together; 8u covers them with room.
	p, q, r := float64(ci)*float64(jk), float64(cj)*float64(ki), float64(ck)*float64(ij)
	det := p + q + r
	bound := 0x1p-50 * (math.Abs(p) + math.Abs(q) + math.Abs(r))
	switch {
	case det > bound:
		return 1
	case -det > bound:
		return -1
	}
	return Mul(ci, jk).Add(Mul(cj, ki)).Add(Mul(ck, ij)).Sign()
}
