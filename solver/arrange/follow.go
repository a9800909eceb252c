package arrange

import (
	"cmp"
	"slices"

	"enfilade/solver/exact"
)

// mostChanged is how many segments may change before building anew is no dearer than following.
const mostChanged = 2000

// change is one step of a site from one outline to the next.
type change struct {
	s      *Site
	number []int32  // of each segment of the new outline; -1 for those to be drawn
	gone   []int32  // numbers of segments that go
	drawn  []int32  // numbers of segments that come
	lo, hi exact.Pt // the box around all of them

	cooled []int32           // points that are no longer hot
	hot    []exact.Pt        // pixels that become hot
	heated []int32           // their points, once they are in the mesh; -(i+1) stands for hot[i] before
	moved  map[int32]bool    // segments, other than those that come and go, whose points change
	before map[int32][]int32 // the points of every segment concerned before the change
}

// compare finds the segments that differ, item by item.
func (s *Site) compare(o *Outline) (*change, bool) {
	old := s.Outline
	if !s.whole || !slices.Equal(o.Items, old.Items) || !slices.Equal(o.Bodies, old.Bodies) || len(s.segs) > 2*len(old.Segments)+mostChanged {
		return nil, false
	}
	c := &change{s: s, number: make([]int32, len(o.Segments)), moved: map[int32]bool{}, before: map[int32][]int32{}}
	for i, j := 0, 0; i < len(old.Segments) || j < len(o.Segments); {
		if i < len(old.Segments) && j < len(o.Segments) && old.Segments[i] == o.Segments[j] {
			c.number[j] = s.numberOf(i)
			i, j = i+1, j+1
			continue
		}
		// From here to the end of the item in both, everything counts as changed.
		item := min(itemAt(old.Segments, i), itemAt(o.Segments, j))
		for ; i < len(old.Segments) && old.Segments[i].Item == item; i++ {
			c.gone = append(c.gone, s.numberOf(i))
		}
		for ; j < len(o.Segments) && o.Segments[j].Item == item; j++ {
			c.number[j] = -1
		}
		if len(c.gone) > mostChanged {
			return nil, false
		}
	}
	return c, c.fits(o)
}

// itemAt returns the item of segment i, beyond every item when there is none.
func itemAt(segs []Segment, i int) int32 {
	if i < len(segs) {
		return segs[i].Item
	}
	return 1<<31 - 1
}

func (s *Site) numberOf(i int) int32 {
	if s.number == nil {
		return int32(i)
	}
	return s.number[i]
}

// fits reports whether all that comes lies within the cells, and takes the box around what changes.
func (c *change) fits(o *Outline) bool {
	cs := c.s.cells
	far := exact.Pt{X: cs.lo.X + (cs.nx<<cs.shift - 1), Y: cs.lo.Y + (cs.ny<<cs.shift - 1)}
	mlo, mhi := c.s.Mesh.Box()
	c.lo, c.hi = mhi, mlo
	grow := func(p exact.Pt) {
		c.lo.X, c.lo.Y = min(c.lo.X, p.X), min(c.lo.Y, p.Y)
		c.hi.X, c.hi.Y = max(c.hi.X, p.X), max(c.hi.Y, p.Y)
	}
	for _, g := range c.gone {
		grow(c.s.segs[g].A)
		grow(c.s.segs[g].B)
	}
	drawn := 0
	for j, n := range c.number {
		if n >= 0 {
			continue
		}
		drawn++
		for _, p := range [2]exact.Pt{o.Segments[j].A, o.Segments[j].B} {
			if !exact.InBox(cs.lo, far, p) || p.X <= mlo.X || p.Y <= mlo.Y || p.X >= mhi.X || p.Y >= mhi.Y {
				return false
			}
			grow(p)
		}
	}
	return drawn <= mostChanged
}

// draw takes the segments that go out of the site and puts those that come in.
func (c *change) draw(o *Outline) {
	s := c.s
	for _, g := range c.gone {
		c.before[g] = s.chainOf(g)
		s.gone[g] = true
	}
	for j, n := range c.number {
		if n >= 0 {
			continue
		}
		g := int32(len(s.segs))
		s.segs, s.gone = append(s.segs, o.Segments[j]), append(s.gone, false)
		c.number[j] = g
		c.drawn = append(c.drawn, g)
		s.cells.touch(o.Segments[j].A, o.Segments[j].B, func(cell int32) {
			s.later.segsIn[cell] = append(s.later.segsIn[cell], g)
		})
	}
}

// heat finds the pixels that cease to be hot and those that become so.
func (c *change) heat() {
	s := c.s
	seen := map[int32]bool{}
	for _, g := range c.gone {
		for _, v := range c.before[g] {
			if !seen[v] && !s.stillHot(s.Mesh.Pts[v]) {
				c.cooled = append(c.cooled, v)
				s.later.cold[v] = true
			}
			seen[v] = true
		}
	}
	for _, g := range c.drawn {
		d := &s.segs[g]
		c.addHot(d.A)
		c.addHot(d.B)
		s.cells.touch(d.A, d.B, func(cell int32) {
			s.eachIn(cell, func(h int32) {
				if p, ok := crossing(d, &s.segs[h]); ok && h != g {
					c.addHot(p)
				}
			})
		})
	}
	slices.SortFunc(c.hot, exact.Pt.Compare)
	c.hot = slices.Compact(c.hot)
	c.hot = slices.DeleteFunc(c.hot, func(p exact.Pt) bool { return s.pointAt(p) >= 0 })
}

func (c *change) addHot(p exact.Pt) { c.hot = append(c.hot, p) }

// eachIn calls do for every segment filed in a cell.
func (s *Site) eachIn(cell int32, do func(seg int32)) {
	for _, g := range s.cells.seg[s.cells.start[cell]:s.cells.start[cell+1]] {
		if !s.gone[g] {
			do(g)
		}
	}
	for _, g := range s.later.segsIn[cell] {
		if !s.gone[g] {
			do(g)
		}
	}
}

// pointAt returns the hot point at p, or -1.
func (s *Site) pointAt(p exact.Pt) int32 {
	found := int32(-1)
	s.eachPoint(s.cells.of(p), func(v int32) {
		if s.Mesh.Pts[v] == p {
			found = v
		}
	})
	return found
}

// stillHot reports whether a segment ends or two cross in the pixel of p: all of them pass it.
func (s *Site) stillHot(p exact.Pt) bool {
	var list []int32
	hot := false
	s.eachSegment(p, func(g int32) {
		d := &s.segs[g]
		if hot || !passes(d.A, d.B, p) {
			return
		}
		hot = d.A == p || d.B == p
		for _, h := range list {
			if q, ok := crossing(d, &s.segs[h]); ok && q == p {
				hot = true
			}
		}
		list = append(list, g)
	})
	return hot
}

// route finds the points of every segment that comes, and of those that pass a pixel which became or ceased to be hot. Pixels
// that are not points of the mesh yet are written -(i+1), i their index in c.hot.
func (c *change) route() {
	s := c.s
	add := map[int32][]int32{} // new points by segment
	for i, p := range c.hot {
		s.eachSegment(p, func(g int32) {
			if d := &s.segs[g]; passes(d.A, d.B, p) {
				add[g] = append(add[g], -int32(i)-1)
			}
		})
	}
	for _, v := range c.cooled {
		p := s.Mesh.Pts[v]
		s.eachSegment(p, func(g int32) {
			if d := &s.segs[g]; passes(d.A, d.B, p) && add[g] == nil {
				add[g] = []int32{}
			}
		})
	}
	for g, fresh := range add {
		if !slices.Contains(c.drawn, g) {
			c.before[g] = s.chainOf(g)
			c.moved[g] = true
			kept := slices.DeleteFunc(slices.Clone(c.before[g]), func(v int32) bool { return s.later.cold[v] })
			s.later.chain[g] = c.along(g, append(kept, fresh...))
		}
	}
	for _, g := range c.drawn {
		d := &s.segs[g]
		pts := add[g]
		s.cells.touch(d.A, d.B, func(cell int32) {
			s.eachPoint(cell, func(v int32) {
				if passes(d.A, d.B, s.Mesh.Pts[v]) {
					pts = append(pts, v)
				}
			})
		})
		s.later.chain[g] = c.along(g, pts)
	}
}

// at returns the place of a point as route writes it.
func (c *change) at(v int32) exact.Pt {
	if v < 0 {
		return c.hot[-v-1]
	}
	return c.s.Mesh.Pts[v]
}

// along sorts points along segment g.
func (c *change) along(g int32, pts []int32) []int32 {
	a, d := c.s.segs[g].A, c.s.segs[g].B.Sub(c.s.segs[g].A)
	slices.SortFunc(pts, func(p, q int32) int {
		return cmp.Compare(c.at(p).Sub(a).Dot(d), c.at(q).Sub(a).Dot(d))
	})
	return pts
}
