package paint

import (
	"math"

	"github.com/paulmach/orb"

	"enfilade/solver/exact"
	"enfilade/solver/plan"
)

// inkIndex finds what ink lies in a box of the plan: a grid of square cells over all segments of bodies and lines, each
// cell with the segments that pass through it.
//
//   - Room: about two segments a cell, and no more than two cells for each segment and row it passes.
//   - A query looks at the cells of its box, and for the inside of bodies at the cells left of it.
type inkIndex struct {
	segs       []inkSeg
	x0, y0     float64 // lower left corner, grid units
	size       float64 // of a cell, grid units
	cols, rows int
	first      []int32 // segments of cell c are items[first[c]:first[c+1]]
	items      []int32
}

type inkSeg struct {
	ax, ay, bx, by float64
	area           bool // the outline of a body, its inside to the left
}

func newInkIndex(d *Drawing) inkIndex {
	var x inkIndex
	for _, b := range d.bodies {
		if b.hidden {
			continue
		}
		for _, r := range d.rings[b.rings[0]:b.rings[1]] {
			pts := d.pts[r[0]:r[1]]
			for i, p := range pts {
				x.add(p, pts[(i+1)%len(pts)], true)
			}
		}
	}
	for _, l := range d.lines {
		if l.hidden {
			continue
		}
		for i := l.pts[0] + 1; i < l.pts[1]; i++ {
			x.add(d.pts[i-1], d.pts[i], false)
		}
	}
	for i := range d.doors {
		dr := &d.doors[i]
		if dr.hidden || dr.leaf == plan.NoLeaf {
			continue
		}
		x.line(dr.hinge, dr.tip)
		x.line(dr.left[0], dr.left[1])
		x.line(dr.right[0], dr.right[1])
	}
	x.build()
	return x
}

func (x *inkIndex) add(a, b exact.Pt, area bool) {
	x.segs = append(x.segs, inkSeg{float64(a.X), float64(a.Y), float64(b.X), float64(b.Y), area})
}

func (x *inkIndex) line(a, b vec) { x.segs = append(x.segs, inkSeg{a.x, a.y, b.x, b.y, false}) }

// build sorts the segments into cells, counting first.
func (x *inkIndex) build() {
	if len(x.segs) == 0 {
		return
	}
	x1, y1 := math.Inf(-1), math.Inf(-1)
	x.x0, x.y0 = math.Inf(1), math.Inf(1)
	for _, s := range x.segs {
		x.x0, x.y0 = min(x.x0, s.ax, s.bx), min(x.y0, s.ay, s.by)
		x1, y1 = max(x1, s.ax, s.bx), max(y1, s.ay, s.by)
	}
	w, h := max(x1-x.x0, 1), max(y1-x.y0, 1)
	x.size = max(math.Sqrt(w*h/float64(len(x.segs)))*1.4, max(w, h)/4000, 1)
	x.cols, x.rows = int(w/x.size)+1, int(h/x.size)+1
	x.first = make([]int32, x.cols*x.rows+1)
	for i := range x.segs {
		x.cells(&x.segs[i], func(c int) { x.first[c+1]++ })
	}
	for c := 1; c < len(x.first); c++ {
		x.first[c] += x.first[c-1]
	}
	x.items = make([]int32, x.first[len(x.first)-1])
	next := append([]int32(nil), x.first...)
	for i := range x.segs {
		x.cells(&x.segs[i], func(c int) {
			x.items[next[c]] = int32(i)
			next[c]++
		})
	}
}

func (x *inkIndex) col(v float64) int { return min(max(int((v-x.x0)/x.size), 0), x.cols-1) }
func (x *inkIndex) row(v float64) int { return min(max(int((v-x.y0)/x.size), 0), x.rows-1) }

// cells calls f with each cell a segment passes through, row by row.
func (x *inkIndex) cells(s *inkSeg, f func(cell int)) {
	lo, hi := min(s.ay, s.by), max(s.ay, s.by)
	for r := x.row(lo); r <= x.row(hi); r++ {
		// The part of the segment inside this row, in x.
		ylo, yhi := x.y0+float64(r)*x.size, x.y0+float64(r+1)*x.size
		xa, xb := s.at(max(ylo, lo)), s.at(min(yhi, hi))
		if s.ay == s.by {
			xa, xb = s.ax, s.bx
		}
		for c := x.col(min(xa, xb)); c <= x.col(max(xa, xb)); c++ {
			f(r*x.cols + c)
		}
	}
}

// at returns the x of the segment at height y; the segment is not level.
func (s *inkSeg) at(y float64) float64 {
	if s.ay == s.by {
		return s.ax
	}
	return s.ax + (s.bx-s.ax)*(y-s.ay)/(s.by-s.ay)
}

// touches reports whether any ink lies in the box, given in grid units: a segment crosses it, or its middle lies inside of
// a body.
func (x *inkIndex) touches(box orb.Bound) bool {
	if len(x.segs) == 0 {
		return false
	}
	f := frame{box.Min[0], box.Min[1], box.Max[0], box.Max[1]}
	for r := x.row(f.y0); r <= x.row(f.y1); r++ {
		for c := x.col(f.x0); c <= x.col(f.x1); c++ {
			cell := r*x.cols + c
			for _, i := range x.items[x.first[cell]:x.first[cell+1]] {
				s := &x.segs[i]
				if _, _, ok := f.segment(s.ax, s.ay, s.bx, s.by); ok {
					return true
				}
			}
		}
	}
	return x.inside((f.x0+f.x1)/2, (f.y0+f.y1)/2)
}

// inside reports whether a place lies inside of a body: it adds up the outlines that a ray to the left crosses. A crossing
// counts in the cell it lies in, so a segment in many cells counts once.
func (x *inkIndex) inside(px, py float64) bool {
	if px < x.x0 || py < x.y0 || px > x.x0+float64(x.cols)*x.size || py > x.y0+float64(x.rows)*x.size {
		return false
	}
	r, wind := x.row(py), 0
	for c := x.col(px); c >= 0; c-- {
		cell := r*x.cols + c
		for _, i := range x.items[x.first[cell]:x.first[cell+1]] {
			s := &x.segs[i]
			if !s.area || (s.ay <= py) == (s.by <= py) {
				continue
			}
			if at := s.at(py); at < px && x.col(at) == c {
				if s.ay > s.by {
					wind++
				} else {
					wind--
				}
			}
		}
	}
	return wind != 0
}

// hangs is how near a face something must be to hang on it, in grid units: sample targets stand 10 mm off, and hands put
// them nearer.
const hangs = 500

// normal returns the direction away from the nearest face that a place hangs on, in degrees.
func (x *inkIndex) normal(q vec) (degrees float64, ok bool) {
	if len(x.segs) == 0 {
		return 0, false
	}
	best := float64(hangs)
	for r := x.row(q.y - hangs); r <= x.row(q.y+hangs); r++ {
		for c := x.col(q.x - hangs); c <= x.col(q.x+hangs); c++ {
			cell := r*x.cols + c
			for _, i := range x.items[x.first[cell]:x.first[cell+1]] {
				s := &x.segs[i]
				u, length := vec{s.ax, s.ay}.towards(vec{s.bx, s.by})
				along := (q.x-s.ax)*u.x + (q.y-s.ay)*u.y
				off := (q.y-s.ay)*u.x - (q.x-s.ax)*u.y // to the left of the segment
				// The free side of a body's outline is the right; a line has two.
				if along < 0 || along > length || s.area && off > 0 || math.Abs(off) >= best {
					continue
				}
				best, ok = math.Abs(off), true
				n := math.Atan2(u.x, -u.y)
				if off < 0 || s.area {
					n += math.Pi
				}
				degrees = n * 180 / math.Pi
			}
		}
	}
	return degrees, ok
}
