package mesh

import "enfilade/solver/exact"

// Ceiling is the height of what no eye sees over.
const Ceiling int32 = 1<<31 - 1

// Tag says what the line along an edge stops.
type Tag struct {
	Top  int32 // sight, from the floor up to this height; 0 for not at all
	Walk bool  // walking
}

// Tri is one triangle, laid out to fill one cache line.
//
// Edge i runs from corner i to the next; N[i] is its twin in the neighbouring triangle. Top[i] is the height up to which
// crossing edge i stops sight, the solidity of both triangles counted in.
type Tri struct {
	P     [3]exact.Pt
	V     [3]int32
	N     [3]Edge
	Top   [3]int32
	Flags uint32
}

// Bits of Tri.Flags: bits 0 to 2 say that edge 0 to 2 stops walking.
const (
	FlagNoWalk   uint32 = 1 << 3 // nobody stands in the triangle
	flagBoundary uint32 = 7
)

// StopsWalk reports whether edge i of t stops walking.
func (t *Tri) StopsWalk(i int) bool { return t.Flags>>uint(i)&1 != 0 }

// Step is what a cone needs that enters a triangle through one of its half-edges: the apex opposite, and for the edges to the
// right and to the left of it, as seen on the way in, the half-edge to go on through and the height up to which it stops
// sight.
type Step struct {
	Apex              exact.Pt
	Right, Left       Edge
	TopRight, TopLeft int32
}

// Mesh is a finished triangulation of a rectangle. It never changes, so any goroutine may read it.
type Mesh struct {
	Pts   []exact.Pt // the graph's points, then the four corners of the box
	Tris  []Tri
	Steps []Step  // three a triangle, see StepAt
	Solid []int32 // for each triangle the height up to which it is solid for sight
	Con   []int32 // for each half-edge the index of the edge that lies on it, or -1
	grid  grid
	turn  turning
}

// StepAt returns the index in Steps of the step through half-edge e.
func StepAt(e Edge) int { return int(e - e>>2) }

// Twin returns the half-edge on the other side of e.
func (m *Mesh) Twin(e Edge) Edge { return m.Tris[e.Tri()].N[e.Corner()] }

// Ends returns the points that e runs between.
func (m *Mesh) Ends(e Edge) (a, b exact.Pt) {
	t := &m.Tris[e.Tri()]
	i := e.Corner()
	return t.P[i], t.P[inc[i]]
}

// Inc returns the corner that follows i counter-clockwise.
func Inc(i int) int { return inc[i] }

// Finish lays the triangulation out for queries.
//
//   - tags gives what each edge passed to Triangulate stops.
//   - solid gives for each triangle of tr the height up to which it is solid, and whether nobody stands in it.
//   - Cost: O(n), n the number of triangles.
func (tr *Triangulation) Finish(tags []Tag, solid []Tag) *Mesh {
	order, place := tr.layout()
	m := &Mesh{Pts: tr.Pts, Tris: make([]Tri, len(order)), Solid: make([]int32, len(order)), Con: make([]int32, 4*len(order))}
	for k, old := range order {
		r := &tr.tris[old]
		t := &m.Tris[k]
		m.Solid[k] = solid[old].Top
		if solid[old].Walk {
			t.Flags |= FlagNoWalk
		}
		for i := range 3 {
			t.P[i], t.V[i] = tr.Pts[r.v[i]], r.v[i]
			tag := Tag{Top: solid[old].Top, Walk: solid[old].Walk}
			t.N[i] = None
			if n := r.n[i]; n != None {
				t.N[i] = EdgeOf(place[n.Tri()], n.Corner())
				tag = merge(tag, solid[n.Tri()])
			} else {
				tag = Tag{Ceiling, true}
			}
			if r.c[i] >= 0 {
				tag = merge(tag, tags[r.c[i]])
			}
			m.Con[4*k+i] = r.c[i]
			t.Top[i] = tag.Top
			if tag.Walk {
				t.Flags |= 1 << uint(i)
			}
		}
	}
	m.makeSteps()
	m.grid = makeGrid(m)
	m.turn = makeTurning(m)
	return m
}

func (m *Mesh) makeSteps() {
	m.Steps = make([]Step, 3*len(m.Tris))
	for k := range m.Tris {
		t := &m.Tris[k]
		for i := range 3 {
			right, left := inc[i], inc[inc[i]]
			m.Steps[3*k+i] = Step{t.P[left], t.N[right], t.N[left], t.Top[right], t.Top[left]}
		}
	}
}

func merge(a, b Tag) Tag { return Tag{max(a.Top, b.Top), a.Walk || b.Walk} }

// layout orders the triangles along the curve through the points, so that neighbours lie near each other in
// memory: order[k] is the old index of triangle k, place the inverse. O(n) by counting.
func (tr *Triangulation) layout() (order, place []int32) {
	key := make([]int32, len(tr.tris))
	along := make([]int32, len(tr.Pts))
	for r, p := range tr.curve {
		along[p] = int32(r)
	}
	count := make([]int32, len(tr.Pts)+1)
	for t := range tr.tris {
		v := tr.tris[t].v
		key[t] = min(along[v[0]], along[v[1]], along[v[2]])
		count[key[t]+1]++
	}
	for i := 1; i < len(count); i++ {
		count[i] += count[i-1]
	}
	order, place = make([]int32, len(tr.tris)), make([]int32, len(tr.tris))
	for t, k := range key {
		order[count[k]] = int32(t)
		place[t] = count[k]
		count[k]++
	}
	return order, place
}

// Len returns the number of triangles.
func (tr *Triangulation) Len() int { return len(tr.tris) }

// Corners returns the indices of the corners of triangle t, counter-clockwise.
func (tr *Triangulation) Corners(t int32) [3]int32 { return tr.tris[t].v }

// Neighbour returns the triangle on the other side of edge i of t, or -1, and the constraint on that edge, or -1.
func (tr *Triangulation) Neighbour(t int32, i int) (tri, constraint int32) {
	r := &tr.tris[t]
	if r.n[i] == None {
		return -1, r.c[i]
	}
	return r.n[i].Tri(), r.c[i]
}
