package walk

import (
	"math"

	"enfilade/solver/exact"
	"enfilade/solver/mesh"
)

// A neck is an edge of the mesh that alone joins the floor on its two sides, such as the doorway of a room without another
// one. A shortest walk crosses a neck only to come to a goal beyond: whoever comes back through it could have gone along it.
// So a flood need not enter what lies behind a neck where there is no goal, which is most of a maze and every room of an
// office that is only passed by.
//
// necks keeps the parts of the floor between the necks. They hang together as a tree in each room (a stretch of floor that
// nobody leaves): the triangles are the nodes of a graph whose edges are what one walks across, its bridges are the necks
// (Tarjan, "A note on finding the bridges of a graph", Information Processing Letters 2, 1974).
type necks struct {
	part  []int32 // for each triangle the part it belongs to, -1 where nobody stands
	up    []int32 // for each part the one on the other side of the neck towards the room's first part; -1 for that
	depth []int32 // for each part how many necks lie between it and the room's first part
	room  []int32 // for each part the room's first part
}

// findNecks finds the necks of m. O(n) time and memory for n triangles.
func findNecks(m *mesh.Mesh) *necks {
	d := delver{m: m, num: make([]int32, len(m.Tris)), low: make([]int32, len(m.Tris)), order: make([]mesh.Edge, 0, len(m.Tris))}
	for t := range m.Tris {
		if d.num[t] == 0 && m.Tris[t].Flags&mesh.FlagNoWalk == 0 {
			d.delve(int32(t))
		}
	}
	k := &necks{part: d.low} // what a triangle reaches is looked at before its part is written in its place
	firsts := d.firsts
	for i, in := range d.order {
		t, from := in.Tri(), int32(-1)
		if len(firsts) > 0 && firsts[0] == int32(i) {
			firsts = firsts[1:]
		} else {
			from = k.part[m.Twin(in).Tri()]
		}
		if from >= 0 && d.low[t] <= int32(i) {
			k.part[t] = from
			continue
		}
		k.part[t] = int32(len(k.up))
		k.add(from)
	}
	for t := range m.Tris {
		if d.num[t] == 0 {
			k.part[t] = -1
		}
	}
	return k
}

// add adds a part that hangs on part from, or, when from is -1, the first one of a room.
func (k *necks) add(from int32) {
	depth, room := int32(0), int32(len(k.up))
	if from >= 0 {
		depth, room = k.depth[from]+1, k.room[from]
	}
	k.up, k.depth, k.room = append(k.up, from), append(k.depth, depth), append(k.room, room)
}

// delver goes through the floor depth first.
type delver struct {
	m      *mesh.Mesh
	num    []int32     // for each triangle its place in the order, counted from 1; 0 as long as it has none
	low    []int32     // the first place that its part of the search tree reaches by an edge that is none of the tree's
	order  []mesh.Edge // for each triangle in order the half-edge, one of its own, through which it was entered
	firsts []int32     // the places of those that were entered from nowhere
	trail  []mesh.Edge // the way from the first triangle to the present one
}

// delve goes through the room of triangle t. Of each triangle it looks through the two edges that follow the one of entry, and
// of the first one through that as well.
func (d *delver) delve(t int32) {
	d.firsts = append(d.firsts, int32(len(d.order)))
	in := mesh.EdgeOf(t, 0)
	d.enter(in)
	for i := inc[0]; ; {
		first, entry := len(d.trail) == 1, in.Corner()
		if i < 0 || i == entry && !first {
			if first {
				d.trail = d.trail[:0]
				return
			}
			d.trail = d.trail[:len(d.trail)-1]
			back := d.m.Twin(in)
			d.low[back.Tri()] = min(d.low[back.Tri()], d.low[in.Tri()])
			in = d.trail[len(d.trail)-1]
			i = following(back.Corner(), in)
			continue
		}
		tri := &d.m.Tris[in.Tri()]
		next := tri.N[i]
		switch {
		case tri.StopsWalk(i):
		case d.num[next.Tri()] > 0:
			d.low[in.Tri()] = min(d.low[in.Tri()], d.num[next.Tri()])
		default:
			in, i = next, inc[next.Corner()]
			d.enter(in)
			continue
		}
		i = following(i, in)
	}
}

// following returns the edge to be looked through after edge i, -1 after the one of entry, which is the last.
func following(i int, in mesh.Edge) int {
	if i == in.Corner() {
		return -1
	}
	return inc[i]
}

func (d *delver) enter(in mesh.Edge) {
	d.order = append(d.order, in)
	d.num[in.Tri()], d.low[in.Tri()] = int32(len(d.order)), int32(len(d.order))
	d.trail = append(d.trail, in)
}

// learn narrows the flood from start, once the necks are known. They are looked for when floods have entered an eighth as many
// triangles as there are, which costs about as much; it returns how many this flood may enter until then.
func (f *Finder) learn(start exact.Pt) int {
	if f.field != nil { // which wants all of the floor
		return math.MaxInt
	}
	if left := len(f.m.Tris)/8 - f.spent - f.Expanded; f.necks == nil && left >= 0 {
		return f.Expanded + left
	}
	f.knowNecks()
	f.narrow(start)
	return math.MaxInt
}

func (f *Finder) knowNecks() {
	if f.necks == nil {
		f.necks = findNecks(f.m)
		f.wanted = make([]uint32, len(f.necks.up))
	}
}

// narrow lets the flood enter only the parts of the floor through which a walk from start to a goal can lead: those that hold
// the start or a goal, and those on the way of necks between them. Goals in rooms other than the start's are given up. The cost
// is proportional to the marks of the goals and to the parts that may be entered.
func (f *Finder) narrow(start exact.Pt) {
	f.round++
	f.tops = f.tops[:0]
	f.eachCorner(start, func(t int32) {
		if part := f.necks.part[t]; part >= 0 && !f.join(part) {
			f.wanted[part] = f.round
			f.tops = append(f.tops, part)
		}
	})
	for _, t := range f.marked {
		if f.join(f.necks.part[t]) {
			for i := f.heads[t]; i >= 0; i = f.marks[i].next {
				f.goals[f.marks[i].goal].near = true
			}
		}
	}
	for i := range f.goals {
		if g := &f.goals[i]; !g.near {
			g.closed = true
		}
	}
	f.narrowed = true
}

// join adds part, and what lies between, to the parts of its room that are wanted. It reports false when none is.
func (f *Finder) join(part int32) bool {
	k := f.necks
	for i, top := range f.tops {
		if k.room[top] != k.room[part] {
			continue
		}
		for f.wanted[part] != f.round { // top is the least deep of the parts that are wanted
			if k.depth[part] > k.depth[top] {
				f.wanted[part] = f.round
				part = k.up[part]
			} else {
				top = k.up[top]
				f.wanted[top] = f.round
			}
		}
		f.tops[i] = top
		return true
	}
	return false
}

// enters reports whether the flood is to enter triangle t.
func (f *Finder) enters(t int32) bool { return !f.narrowed || f.wanted[f.necks.part[t]] == f.round }
