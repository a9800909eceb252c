package mesh

import (
	"fmt"
	"slices"

	"enfilade/solver/exact"
)

// dead marks a triangle that has been taken out, in place of its first corner; its first neighbour is one that took its place.
const dead int32 = -1

// Editor changes a mesh in place: points and edges go and come, each at a cost proportional to what lies around it. The
// triangulation that results is the one that would be built from the points and edges left (see Triangulation.wrong), but
// for the numbering.
//
// Between NewEditor and Close the mesh answers no queries.
type Editor struct {
	m       *Mesh
	tr      *Triangulation
	changed []int32
}

// NewEditor begins a change of m. The first one takes O(n).
func NewEditor(m *Mesh) *Editor {
	m.unsettle()
	m.raw.log, m.raw.logs = m.raw.log[:0], true
	if m.raw.out == nil { // only changes ask for it
		m.raw.findOut()
	}
	return &Editor{m: m, tr: m.raw}
}

// Free takes the constraint off the edge from a to b.
//
//   - Errors: when there is no such edge or nothing holds it.
func (d *Editor) Free(a, b int32) error {
	e := d.tr.lookup(a, b)
	if e == None || d.tr.tris[e.Tri()].c[e.Corner()] < 0 {
		return fmt.Errorf("mesh: no edge from %v to %v", d.m.Pts[a], d.m.Pts[b])
	}
	d.tr.mark(e, -1)
	d.tr.work = append(d.tr.work[:0], [2]int32{a, b})
	d.tr.restore()
	return nil
}

// Held reports whether a constraint lies between a and b.
func (d *Editor) Held(a, b int32) bool {
	e := d.tr.lookup(a, b)
	return e != None && d.tr.tris[e.Tri()].c[e.Corner()] >= 0
}

// Remove takes point v out, at which no constraint may end.
//
// Edges at v are flipped away until three or four are left, then its triangles are joined (flips as in Devillers, "On
// deletion in Delaunay triangulations", SoCG 1999, without his priorities: what is not Delaunay is mended afterwards).
func (d *Editor) Remove(v int32) error {
	tr := d.tr
	star, err := d.star(v)
	if err != nil {
		return err
	}
	// Whether an edge can be flipped depends on its two neighbours, so after a flip only these are tried again: O(degree).
	e, left, kept := star[0], len(star), 0 // kept edges in a row, up to e, cannot be flipped
	for left > 3 && kept < left {
		tr.steps++
		if !tr.convex(e) {
			kept++
			e = tr.tris[e.Tri()].n[e.Prev().Corner()]
			continue
		}
		t, u := tr.flipTracked(e)
		tr.review(t, u)
		left--
		kept = max(0, min(kept-1, left-2))
		e = EdgeOf(t, 1) // the neighbour clockwise
	}
	if star, err = d.star(v); err != nil {
		return err
	}
	d.join(v, star)
	tr.restore()
	return nil
}

// star returns the half-edges that leave v, counter-clockwise.
func (d *Editor) star(v int32) ([]Edge, error) {
	var star []Edge
	for e := d.tr.out[v]; ; {
		r := &d.tr.tris[e.Tri()]
		if r.c[e.Corner()] >= 0 {
			return nil, fmt.Errorf("mesh: point %v still has an edge", d.tr.Pts[v])
		}
		star = append(star, e)
		d.tr.steps++
		if e = r.n[e.Prev().Corner()]; e == None {
			return nil, fmt.Errorf("mesh: point %v is a corner of the box", d.tr.Pts[v])
		} else if e == star[0] {
			return star, nil
		}
	}
}

// join replaces the three or four triangles around v by one or two, and leaves the edges around to be examined.
func (d *Editor) join(v int32, star []Edge) {
	tr := d.tr
	n := len(star)
	far := func(i int) exact.Pt { return tr.Pts[tr.tris[star[i].Tri()].v[star[i].Next().Corner()]] }
	if n == 4 && exact.Area2(far(0), far(2), tr.Pts[v]) != 0 {
		star = append(star[1:], star[0])
	}
	ring, out, con := make([]int32, n), make([]Edge, n), make([]int32, n)
	for i, e := range star {
		r := &tr.tris[e.Tri()]
		o := e.Next()
		ring[i], out[i], con[i] = r.v[o.Corner()], r.n[o.Corner()], r.c[o.Corner()]
	}
	for i := range n {
		tr.work = append(tr.work, [2]int32{ring[i], ring[(i+1)%n]})
	}
	t := star[0].Tri()
	if n == 3 {
		tr.set(t, rawTri{[3]int32{ring[0], ring[1], ring[2]}, [3]Edge{out[0], out[1], out[2]}, [3]int32{con[0], con[1], con[2]}})
		d.kill(star[1:], t)
	} else {
		// Of four edges none can be flipped only when v lies between two of the far ends. These are joined: where the ring has
		// an inward corner, it is one of them.
		u := star[2].Tri()
		tr.set(t, rawTri{[3]int32{ring[0], ring[1], ring[2]}, [3]Edge{out[0], out[1], EdgeOf(u, 2)}, [3]int32{con[0], con[1], -1}})
		tr.set(u, rawTri{[3]int32{ring[2], ring[3], ring[0]}, [3]Edge{out[2], out[3], EdgeOf(t, 2)}, [3]int32{con[2], con[3], -1}})
		tr.work = append(tr.work, [2]int32{ring[0], ring[2]})
		d.kill([]Edge{star[1], star[3]}, t)
		d.relink(u)
	}
	d.relink(t)
	tr.out[v] = None
}

// kill takes triangles out; whoever still names one is sent to t.
func (d *Editor) kill(gone []Edge, t int32) {
	for _, e := range gone {
		d.tr.set(e.Tri(), rawTri{v: [3]int32{dead, dead, dead}, n: [3]Edge{EdgeOf(t, 0), None, None}, c: [3]int32{-1, -1, -1}})
		d.tr.free = append(d.tr.free, e.Tri())
	}
}

// relink makes t's neighbours name t, and its corners leave through it.
func (d *Editor) relink(t int32) {
	r := d.tr.tris[t]
	for i := range 3 {
		if r.n[i] != None {
			d.tr.tris[r.n[i].Tri()].n[r.n[i].Corner()] = EdgeOf(t, i)
		}
		d.tr.out[r.v[i]] = EdgeOf(t, i)
	}
}

// Add puts a new point in and returns its index.
//
//   - Errors: when p is there already, lies on a constraint, or is not strictly inside the rectangle.
func (d *Editor) Add(p exact.Pt) (int32, error) {
	tr := d.tr
	if lo, hi := d.m.Box(); p.X <= lo.X || p.X >= hi.X || p.Y <= lo.Y || p.Y >= hi.Y {
		return 0, fmt.Errorf("mesh: point %v lies outside the rectangle", p)
	}
	t, on, ok := tr.walk(d.alive(d.m.hint(p)), p)
	if !ok || on >= 0 && tr.tris[t].c[on] >= 0 {
		return 0, fmt.Errorf("mesh: point %v is there already or lies on an edge", p)
	}
	v := int32(len(tr.Pts))
	tr.Pts, tr.out = append(tr.Pts, p), append(tr.out, None)
	u, w := tr.fresh(), tr.fresh()
	in := inserter{tr: tr, n: uint32(len(tr.Pts))}
	in.put(v, t, on, u, w)
	// What changed is what lies around the new point.
	for first, e := EdgeOf(u, 2), EdgeOf(u, 2); ; {
		tr.log = append(tr.log, e.Tri())
		for i, w := range tr.tris[e.Tri()].v {
			tr.out[w] = EdgeOf(e.Tri(), i)
		}
		if e = tr.tris[e.Tri()].n[e.Prev().Corner()]; e == first {
			return v, nil
		}
	}
}

// alive returns t, or a triangle that took its place.
func (d *Editor) alive(t int32) int32 {
	for d.tr.tris[t].v[0] == dead {
		t = d.tr.tris[t].n[0].Tri()
	}
	return t
}

// Hold forces the edge from a to b in as constraint k.
//
//   - Errors: ErrCrossing.
func (d *Editor) Hold(a, b, k int32) error { return d.tr.constrain(a, b, k) }

// Changed returns the triangles that changed since NewEditor, in order, each once, without those taken out.
func (d *Editor) Changed() []int32 {
	all := slices.Clone(d.tr.log)
	slices.Sort(all)
	all = slices.Compact(all)
	d.changed = slices.DeleteFunc(all, func(t int32) bool { return d.tr.tris[t].v[0] == dead })
	return d.changed
}

// Touched reports whether triangle t changed since NewEditor. It is known after Changed has been called.
func (d *Editor) Touched(t int32) bool {
	_, found := slices.BinarySearch(d.changed, t)
	return found
}

// Point returns point v.
func (d *Editor) Point(v int32) exact.Pt { return d.tr.Pts[v] }

// Corners returns the indices of the corners of triangle t, counter-clockwise.
func (d *Editor) Corners(t int32) [3]int32 { return d.tr.tris[t].v }

// Neighbour is as Triangulation.Neighbour.
func (d *Editor) Neighbour(t int32, i int) (tri, constraint int32) { return d.tr.Neighbour(t, i) }

// Path calls cross for each edge that is crossed on a way from a triangle at the rectangle's first corner to triangle t: its
// constraint, or -1, and the point its half-edge starts at on the side that is left.
func (d *Editor) Path(t int32, cross func(constraint, from int32)) {
	tr := d.tr
	goal := tr.tris[t].v[0]
	for _, v := range tr.tris[t].v { // a corner of the rectangle cannot be gone around
		if v < tr.box || v >= tr.box+4 {
			goal = v
		}
	}
	p := tr.Pts[goal]
	step := func(e Edge) Edge {
		r := &tr.tris[e.Tri()]
		cross(r.c[e.Corner()], r.v[e.Corner()])
		return r.n[e.Corner()]
	}
	now := tr.out[tr.box].Tri()
	for turn := uint32(1); ; turn = turn*1664525 + 1013904223 {
		r := &tr.tris[now]
		next := None
		for k := range 3 {
			i := (int(turn>>16)%3 + k) % 3
			if exact.Area2(tr.Pts[r.v[i]], tr.Pts[r.v[inc[i]]], p) < 0 {
				next = EdgeOf(now, i)
				break
			}
		}
		if next == None {
			break
		}
		now = step(next).Tri()
	}
	// The triangle reached has that corner of t among its own: turn around it.
	e := EdgeOf(now, slices.Index(tr.tris[now].v[:], goal))
	for e.Tri() != t {
		e = step(e.Prev())
	}
}

// Close ends the change and makes the mesh fit to be asked again.
//
//   - tags are what each constraint stops now.
//   - solid names what triangles stop, for all that Changed returns and for whatever else stops something new.
func (d *Editor) Close(tags []Tag, solid map[int32]Tag) {
	m, tr := d.m, d.tr
	m.Pts, m.tags = tr.Pts, tags
	for len(m.Tris) < len(tr.tris) {
		m.Tris, m.Solid, m.shut = append(m.Tris, Tri{}), append(m.Solid, 0), append(m.shut, false)
	}
	for _, t := range tr.log {
		if tr.tris[t].v[0] == dead {
			m.bury(t)
		}
	}
	fresh := map[int32]bool{}
	for t, s := range solid {
		tr.turnFirst(t)
		m.setSolid(t, s)
		fresh[t] = true
		for i := range 3 {
			if n := tr.tris[t].n[i]; n != None {
				fresh[n.Tri()] = true
			}
		}
	}
	list := make([]int32, 0, len(fresh))
	for t := range fresh {
		m.refresh(t)
		list = append(list, t)
	}
	slices.Sort(list)
	m.turn.update(m, list)
	tr.logs = false
}

// bury makes a triangle that was taken out stop everything.
func (m *Mesh) bury(t int32) {
	m.setSolid(t, Tag{Ceiling, true})
	m.Tris[t] = Tri{N: [3]Edge{m.raw.tris[t].n[0], None, None}, Top: [3]int32{Ceiling, Ceiling, Ceiling}, Flags: FlagNoWalk | flagDead | flagBoundary}
}

// turnFirst turns triangle t so that its first corner in the order of points is in front.
func (tr *Triangulation) turnFirst(t int32) {
	r := tr.tris[t]
	k := int(tr.firstCorner(&r))
	if k == 0 {
		return
	}
	q := &tr.tris[t]
	for j := range 3 {
		i := (k + j) % 3
		q.v[j], q.n[j], q.c[j] = r.v[i], r.n[i], r.c[i]
		if n := r.n[i]; n != None {
			tr.tris[n.Tri()].n[n.Corner()] = EdgeOf(t, j)
		}
		tr.out[q.v[j]] = EdgeOf(t, j)
	}
}
