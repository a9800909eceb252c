package walk

import (
	"context"
	"errors"
	"math"

	"enfilade/solver/exact"
	"enfilade/solver/mesh"
	"enfilade/solver/sight"
)

// ErrInside reports a start that lies off the mesh or strictly inside something that stops walking.
var ErrInside = errors.New("walk: the start is inside a body or off the floor")

// Goal is where a flood is to lead: a spot, or a region, given as its cones of sight from Eye or as convex pieces, which may
// overlap.
type Goal struct {
	Spot   *Spot
	Eye    exact.Pt
	Cones  []sight.Cone
	Pieces []sight.Piece
}

// Path is a shortest walk: from the start, the first of Turns, over the corners that follow to End.
type Path struct {
	Found  bool
	Length float64    // grid units
	Turns  []exact.Pt // no straight points, and not the end
	End    [2]float64 // grid units
	Piece  int        // index of the goal's piece that the walk ends at, -1 when the goal has none
	Ties   bool       // another walk is equally long, to 4 units in the last place
}

// Finder walks one mesh. It keeps its buffers from call to call; it is not for concurrent use.
type Finder struct {
	m     *mesh.Mesh
	queue queue
	nodes []node
	best  []int32   // for each turning sector its best node, or -1
	reach []float64 // for each point of the mesh that is one place for walkers, an upper bound of its distance
	wiped []int32   // points whose reach must be reset

	goals   []goal
	ends    []ending
	tied    []int32 // nodes to which there are equally long walks over other corners
	others  []other // those walks
	heads   []int32 // for each triangle the first of its marks, or -1
	marks   []mark
	marked  []int32 // triangles whose head must be reset
	limit   float64 // no cone beyond this distance can help any goal
	settled float64 // a cone beyond this distance tells that some goal's walk is found
	ahead   []ahead // the goals still open
	boxes   []box
	field   *Field // which keeps the cones of the flood; nil when nobody asked

	necks    *necks   // nil until it pays to know them
	spent    int      // triangles entered by the floods before
	narrowed bool     // the flood enters only wanted parts
	round    uint32   // of the floods that were narrowed, the present one
	wanted   []uint32 // for each part the last round in which it was to be entered
	tops     []int32  // in each room of the start the wanted part that is least deep

	clip     clipper
	one, two []exact.Pt
	Expanded int // cones that entered a triangle during the last flood
}

// node is a root: a place where walks turn.
type node struct {
	at     exact.Pt
	sector int32 // -1 for the start
	parent int32
	g      float64
	toward exact.Vec // from the parent; zero for the start
	left   bool      // the walk turns left here, around something on its left
	ties   bool
	others int32 // the last of the equally long walks here, -1 for none
}

// mark says that a triangle holds a part of a goal.
type mark struct {
	goal  int32
	next  int32
	tri   int32
	piece int32     // index into the goal's pieces, or -1
	r, l  exact.Vec // the cone; zero when the goal is none of cones
}

type goal struct {
	spot   *Spot
	eye    exact.Pt
	pieces []sight.Piece
	first  int     // of its marks
	box    box     // around all of it
	near   bool    // it has a part in a room of the start; known once the flood is narrowed
	closed bool    // nothing more is to be found
	g      float64 // of the shortest walk so far
	last   int32   // the last of the ends at this distance, -1 for none
	end    ending  // the one of them that counts
	ties   bool
}

// ending is where a walk to a goal ends: at an offset from the node it last turned at, on a piece of the goal.
type ending struct {
	g     float64
	node  int32
	off   [2]float64
	piece int32
	next  int32 // another one equally far, -1 for none
}

// New returns a finder for m.
func New(m *mesh.Mesh) *Finder {
	f := &Finder{m: m}
	f.best = make([]int32, m.NumSectors())
	f.heads = make([]int32, len(m.Tris))
	f.reach = make([]float64, len(m.Pts))
	fill(f.best, -1)
	fill(f.heads, -1)
	fill(f.reach, math.Inf(1))
	return f
}

func fill[T any](s []T, v T) {
	for i := range s {
		s[i] = v
	}
}

// Flood returns the shortest walk from start to each goal, in the order of goals.
//
//   - A goal that cannot be reached has Found false.
//   - Errors: ErrInside; the context's error when it is cancelled.
//   - Cost: O(k log k) for k cones, which stop where a corner already reached leads everywhere beyond at least as shortly;
//     on floor plans k stays near the number of triangles through which a walk to an open goal can lead that is no longer
//     than the one looked for, measured straight to the goal's box, and that crosses no edge both ways. Once, when floods
//     have entered an eighth as many triangles as the mesh has, O(n) to learn its necks.
func (f *Finder) Flood(ctx context.Context, start exact.Pt, goals []Goal) ([]Path, error) {
	defer f.reset()
	f.setGoals(goals)
	if err := f.run(ctx, start); err != nil {
		return nil, err
	}
	return f.paths(), nil
}

// run sends cones from start until none can help any goal.
func (f *Finder) run(ctx context.Context, start exact.Pt) error {
	far := f.learn(start)
	f.aim()
	if err := f.begin(start); err != nil {
		return err
	}
	for n := 1; !f.queue.empty(); n++ {
		if n&1023 == 0 && ctx.Err() != nil {
			return ctx.Err()
		}
		c := f.queue.pop()
		if f.Expanded > far {
			far = f.learn(start)
			f.aim()
		}
		if c.key > f.settled {
			f.close(c.key)
		}
		if c.key > f.limit {
			break
		}
		if s := f.nodes[c.node].sector; s >= 0 && f.best[s] != c.node {
			continue // a shorter walk to the root has been found
		}
		if c.in == mesh.None {
			f.turn(c.node, c.key)
		} else {
			f.expand(c)
		}
	}
	return nil
}

// paths returns the walks to the goals.
func (f *Finder) paths() []Path {
	f.settleTies()
	paths := make([]Path, len(f.goals))
	for i := range f.goals {
		paths[i] = f.path(&f.goals[i])
	}
	return paths
}

// reset takes back what the last flood wrote, in time proportional to what it touched.
func (f *Finder) reset() {
	for _, n := range f.nodes {
		if n.sector >= 0 {
			f.best[n.sector] = -1
		}
	}
	for _, t := range f.marked {
		f.heads[t] = -1
	}
	for _, v := range f.wiped {
		f.reach[v] = math.Inf(1)
	}
	f.nodes, f.marks, f.marked, f.wiped, f.goals = f.nodes[:0], f.marks[:0], f.marked[:0], f.wiped[:0], f.goals[:0]
	f.ends, f.tied, f.others = f.ends[:0], f.tied[:0], f.others[:0]
	f.spent += f.Expanded
	f.narrowed = false
	f.queue.clear()
	f.field = nil
}

// setGoals files every goal in the triangles that hold a part of it.
func (f *Finder) setGoals(goals []Goal) {
	f.Expanded = 0
	for i, g := range goals {
		f.goals = append(f.goals, goal{spot: g.Spot, eye: g.Eye, pieces: g.Pieces, first: len(f.marks), g: math.Inf(1), last: -1})
		for _, c := range g.Cones {
			f.mark(c.Tri, mark{goal: int32(i), piece: -1, r: c.R, l: c.L})
		}
		for k := range g.Pieces {
			f.mark(g.Pieces[k].Tri, mark{goal: int32(i), piece: int32(k)})
		}
		if g.Spot != nil {
			f.eachHolder(g.Spot, func(t int32) { f.mark(t, mark{goal: int32(i), piece: -1}) })
		}
		f.goals[i].closed = f.goals[i].box.empty()
	}
}

func (f *Finder) mark(t int32, k mark) {
	if f.m.Tris[t].Flags&mesh.FlagNoWalk != 0 {
		return
	}
	if f.heads[t] < 0 {
		f.marked = append(f.marked, t)
	}
	f.goals[k.goal].box = f.goals[k.goal].box.with(boxOf(&f.m.Tris[t]))
	k.next, k.tri = f.heads[t], t
	f.heads[t] = int32(len(f.marks))
	f.marks = append(f.marks, k)
}

// eachCorner calls do for every triangle that holds p.
func (f *Finder) eachCorner(p exact.Pt, do func(tri int32)) { holders(f.m, p, do) }

// holders calls do for every triangle of m that holds p.
func holders(m *mesh.Mesh, p exact.Pt, do func(tri int32)) {
	place, ok := m.Locate(p)
	switch {
	case !ok:
	case place.Corner >= 0:
		m.Around(mesh.EdgeOf(place.Tri, place.Corner), func(e mesh.Edge) { do(e.Tri()) })
	case place.Edge != mesh.None:
		do(place.Tri)
		if twin := m.Twin(place.Edge); twin != mesh.None {
			do(twin.Tri())
		}
	default:
		do(place.Tri)
	}
}
