package walk

import (
	"math"

	"enfilade/solver/exact"
	"enfilade/solver/mesh"
)

// mostTold is up to how many open goals are told apart when asking how far the nearest one is; beyond, one box around them all
// serves, since they lie all around. The bench of many goals watches it.
const mostTold = 6

// cells is how many cells a side the grid has that sorts a goal into boxes, when it is the only one. On clutter of 10,000 walls,
// where regions are all spikes, cones fall to a half with 4, to 43 % with 8 and to 39 % with a box for each triangle.
const cells = 8

// afar is from how many times its size a goal is looked at as one box: from there its shape hardly tells. Clutter takes 4 % more
// cones with 1, and 2 % fewer with 4.
const afar = 2

// ahead holds an open goal, or several: in one box, and in smaller ones, which are Finder.boxes from lo up to hi.
type ahead struct {
	around box
	size2  int64 // the square of its longer side
	lo, hi int
}

// aim looks up which goals are still open. A walk to one of them is not shorter than a straight line to a box that holds a part
// of it; with that bound the flood goes towards the goals first and leaves out what lies off the way (A*: Hart, Nilsson and
// Raphael, "A formal basis for the heuristic determination of minimum cost paths", IEEE Trans. SSC 4, 1968). O(marks).
func (f *Finder) aim() {
	f.bound()
	f.ahead, f.boxes = f.ahead[:0], f.boxes[:0]
	if f.field != nil {
		return
	}
	open, all := 0, box{}
	for i := range f.goals {
		if g := &f.goals[i]; !g.closed {
			open++
			all = all.with(g.box)
		}
	}
	if open > mostTold {
		f.ahead = append(f.ahead, ahead{around: all})
		return
	}
	side := cells / int(math.Ceil(math.Sqrt(float64(max(open, 1)))))
	for i := range f.goals {
		if g := &f.goals[i]; !g.closed {
			lo := len(f.boxes)
			f.sortBoxes(int32(i), side)
			f.ahead = append(f.ahead, ahead{g.box, g.box.size2(), lo, len(f.boxes)})
		}
	}
}

// sortBoxes puts what goal i holds into the boxes of a grid with so many cells a side.
func (f *Finder) sortBoxes(i int32, side int) {
	var grid [cells * cells]box
	all := &f.goals[i].box
	x, y := float64(side)/float64(1+int64(all.hi.X)-int64(all.lo.X)), float64(side)/float64(1+int64(all.hi.Y)-int64(all.lo.Y))
	for k := f.goals[i].first; k < len(f.marks) && f.marks[k].goal == i; k++ {
		b := boxOf(&f.m.Tris[f.marks[k].tri])
		c := &grid[int(float64(b.hi.X-all.lo.X)*x)*side+int(float64(b.hi.Y-all.lo.Y)*y)]
		*c = c.with(b)
	}
	for _, b := range grid[:side*side] {
		if !b.empty() {
			f.boxes = append(f.boxes, b)
		}
	}
}

// bound looks up how far it is to the open goals at most.
func (f *Finder) bound() {
	f.limit, f.settled = -1, math.Inf(1)
	if f.field != nil { // which wants all of the floor
		f.limit = math.Inf(1)
		return
	}
	for i := range f.goals {
		if g := &f.goals[i]; !g.closed {
			f.limit = max(f.limit, g.g/tieSlack)
			f.settled = min(f.settled, g.g/tieSlack)
		}
	}
}

// close ends the search for the goals to which no cone can lead a walk as short as the one found, all having at least key.
func (f *Finder) close(key float64) {
	for i := range f.goals {
		if g := &f.goals[i]; key > g.g/tieSlack {
			g.closed = true
		}
	}
	f.aim()
}

// left returns the least that is left to walk from the box of points a and b to an open goal, 0 when there is none. It only
// measures: to a few units in the last place, which tieSlack covers.
func (f *Finder) left(a, b exact.Pt) float64 {
	if len(f.ahead) == 0 {
		return 0
	}
	from, least := boxAt(a, b), int64(math.MaxInt64)
	for i := range f.ahead {
		g := &f.ahead[i]
		d := from.gap2(&g.around)
		if d/(afar*afar) >= g.size2 {
			least = min(least, d)
			continue
		}
		boxes := f.boxes[g.lo:g.hi]
		for k := range boxes {
			least = min(least, from.gap2(&boxes[k]))
		}
	}
	return math.Sqrt(float64(least))
}

// Rooms numbers the stretches of floor between which nobody walks, and returns for each triangle its own; -1 where nobody
// stands. O(n).
func Rooms(m *mesh.Mesh) []int32 {
	room := make([]int32, len(m.Tris))
	fill(room, -1)
	var stack []int32
	count := int32(0)
	for t := range m.Tris {
		if room[t] >= 0 || m.Tris[t].Flags&mesh.FlagNoWalk != 0 {
			continue
		}
		room[t] = count
		for stack = append(stack, int32(t)); len(stack) > 0; {
			tri := &m.Tris[stack[len(stack)-1]]
			stack = stack[:len(stack)-1]
			for i, n := range tri.N {
				if !tri.StopsWalk(i) && room[n.Tri()] < 0 {
					room[n.Tri()] = count
					stack = append(stack, n.Tri())
				}
			}
		}
		count++
	}
	return room
}
