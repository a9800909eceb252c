package walk

import (
	"math"

	"enfilade/solver/exact"
	"enfilade/solver/mesh"
)

// mostBoxes is up to how many goals are told apart when asking how far the nearest one is; beyond, one box around them all
// serves. The bench of many goals watches it.
const mostBoxes = 6

// aim looks for the goals that are still open: a walk to one of them is not shorter than a straight line to its box. With that
// bound the flood goes towards the goals first and leaves out what lies off the way (A*: Hart, Nilsson and Raphael, "A formal
// basis for the heuristic determination of minimum cost paths", IEEE Trans. SSC 4, 1968).
func (f *Finder) aim() {
	f.ahead = f.ahead[:0]
	f.limit, f.settled = -1, math.Inf(1)
	all := box{}
	for i := range f.goals {
		g := &f.goals[i]
		if g.closed {
			continue
		}
		f.limit = max(f.limit, g.g/tieSlack)
		f.settled = min(f.settled, g.g/tieSlack)
		all = all.with(g.box)
		f.ahead = append(f.ahead, g.box)
	}
	if len(f.ahead) > mostBoxes {
		f.ahead = append(f.ahead[:0], all)
	}
	if f.field != nil { // which wants all of the floor
		f.ahead, f.limit, f.settled = f.ahead[:0], math.Inf(1), math.Inf(1)
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

// left returns the least that is left to walk from the box of points a and b to an open goal. It only measures: to a few units
// in the last place, which tieSlack covers.
func (f *Finder) left(a, b exact.Pt) float64 { return boxAt(a, b).gap(f.ahead) }

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
