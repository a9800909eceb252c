package mesh_test

import (
	"context"
	"math/rand/v2"
	"slices"
	"testing"

	"enfilade/solver/exact"
	"enfilade/solver/mesh"
)

// shape returns the triangles of a mesh as points, in order, and what each of their edges and they stop.
func shape(m *mesh.Mesh) []mesh.Tri {
	var all []mesh.Tri
	for _, t := range m.Tris {
		if t.P[0] != t.P[1] {
			all = append(all, mesh.Tri{P: t.P, Top: t.Top, Flags: t.Flags})
		}
	}
	slices.SortFunc(all, func(a, b mesh.Tri) int {
		for i := range 3 {
			if c := a.P[i].Compare(b.P[i]); c != 0 {
				return c
			}
		}
		return 0
	})
	return all
}

// TestEditorLaws changes meshes at random and holds every result against one built from nothing.
func TestEditorLaws(t *testing.T) {
	removed := 0
	for seed := range uint64(150) {
		r := rand.New(rand.NewPCG(seed, 3))
		side := []int32{5, 9, 40, 3000}[seed%4]
		pts, edges := scene(r, 4+r.IntN(50), side, 40)
		corners := []exact.Pt{{X: -20, Y: -20}, {X: side + 20, Y: side + 20}} // so that the rectangle stays the same
		pts = append(pts, corners...)
		tr, err := mesh.Triangulate(context.Background(), pts, edges)
		if err != nil {
			t.Fatal(err)
		}
		m := finish(t, tr, len(edges))
		held := map[[2]exact.Pt]bool{}
		for _, e := range edges {
			held[[2]exact.Pt{pts[e[0]], pts[e[1]]}] = true
		}
		index := map[exact.Pt]int32{}
		for i, p := range pts {
			index[p] = int32(i)
		}
		tags := make([]mesh.Tag, len(edges))
		for range 12 {
			d := mesh.NewEditor(m)
			for range 1 + r.IntN(4) {
				removed += change(t, r, d, side, index, held, &tags)
			}
			solid := map[int32]mesh.Tag{}
			for _, k := range d.Changed() {
				solid[k] = mesh.Tag{}
			}
			d.Close(tags, solid)
			compare(t, seed, m, index, held)
		}
	}
	if removed < 200 {
		t.Errorf("only %d points were removed", removed)
	}
}

// change takes an edge off, or a point out or in, or an edge in.
func change(t *testing.T, r *rand.Rand, d *mesh.Editor, side int32, index map[exact.Pt]int32, held map[[2]exact.Pt]bool, tags *[]mesh.Tag) int {
	t.Helper()
	must := func(err error) {
		if err != nil {
			t.Helper()
			t.Fatal(err)
		}
	}
	pts := sortedPoints(index)
	switch r.IntN(4) {
	case 0:
		for e := range held {
			must(d.Free(index[e[0]], index[e[1]]))
			delete(held, e)
			return 0
		}
	case 1:
		p := pts[r.IntN(len(pts))]
		if p.X < -10 || p.X > side+10 {
			return 0
		}
		for e := range held {
			if e[0] == p || e[1] == p {
				must(d.Free(index[e[0]], index[e[1]]))
				delete(held, e)
			}
		}
		must(d.Remove(index[p]))
		delete(index, p)
		return 1
	case 2:
		p := exact.Pt{X: r.Int32N(side), Y: r.Int32N(side)}
		if _, there := index[p]; there {
			return 0
		}
		for e := range held {
			if exact.OnSegment(e[0], e[1], p) {
				if _, err := d.Add(p); err == nil {
					t.Fatalf("%v went in on the edge %v", p, e)
				}
				return 0
			}
		}
		v, err := d.Add(p)
		must(err)
		index[p] = v
	case 3:
		a, b := pts[r.IntN(len(pts))], pts[r.IntN(len(pts))]
		if a == b || !fitsHeld(pts, held, a, b) {
			return 0
		}
		held[[2]exact.Pt{a, b}] = true
		*tags = append(*tags, mesh.Tag{})
		must(d.Hold(index[a], index[b], int32(len(*tags)-1)))
	}
	return 0
}

func fitsHeld(pts []exact.Pt, held map[[2]exact.Pt]bool, a, b exact.Pt) bool {
	all := slices.Clone(pts)
	var edges [][2]int32
	at := func(p exact.Pt) int32 { return int32(slices.Index(all, p)) }
	for e := range held {
		edges = append(edges, [2]int32{at(e[0]), at(e[1])})
	}
	return fits(all, edges, [2]int32{at(a), at(b)})
}

func sortedPoints(index map[exact.Pt]int32) []exact.Pt {
	var pts []exact.Pt
	for p := range index {
		pts = append(pts, p)
	}
	slices.SortFunc(pts, exact.Pt.Compare)
	return pts
}

// compare holds m against a mesh built from the points and edges left.
func compare(t *testing.T, seed uint64, m *mesh.Mesh, index map[exact.Pt]int32, held map[[2]exact.Pt]bool) {
	t.Helper()
	pts := sortedPoints(index)
	var edges [][2]int32
	for e := range held {
		edges = append(edges, [2]int32{int32(slices.Index(pts, e[0])), int32(slices.Index(pts, e[1]))})
	}
	tr, err := mesh.Triangulate(context.Background(), pts, edges)
	if err != nil {
		t.Fatalf("seed %d: %v", seed, err)
	}
	want := shape(finish(t, tr, len(edges)))
	if err := m.Check(); err != nil {
		t.Fatalf("seed %d: %v", seed, err)
	}
	if got := shape(m); !slices.Equal(got, want) {
		t.Fatalf("seed %d: the changed mesh has other triangles than a new one (%d, %d)", seed, len(got), len(want))
	}
	for range 20 {
		p := exact.Pt{X: rand.Int32N(60), Y: rand.Int32N(60)}
		if lo, hi := m.Box(); exact.InBox(lo, hi, p) {
			place, _ := m.Locate(p)
			checkPlace(t, m, p, place)
		}
	}
}
