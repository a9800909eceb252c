package mesh_test

import (
	"context"
	"errors"
	"math/rand/v2"
	"testing"

	"enfilade/solver/exact"
	"enfilade/solver/mesh"
)

// scene makes n distinct random points in a square of the given side, and edges between them that do not cross: each
// candidate is kept when it misses all kept ones and passes through no point.
func scene(r *rand.Rand, n int, side int32, tries int) ([]exact.Pt, [][2]int32) {
	seen := map[exact.Pt]bool{}
	var pts []exact.Pt
	for range n {
		p := exact.Pt{X: r.Int32N(side), Y: r.Int32N(side)}
		if !seen[p] {
			seen[p] = true
			pts = append(pts, p)
		}
	}
	var edges [][2]int32
	for range tries {
		e := [2]int32{r.Int32N(int32(len(pts))), r.Int32N(int32(len(pts)))}
		if e[0] != e[1] && fits(pts, edges, e) {
			edges = append(edges, e)
		}
	}
	return pts, edges
}

func fits(pts []exact.Pt, edges [][2]int32, e [2]int32) bool {
	a, b := pts[e[0]], pts[e[1]]
	for i, p := range pts {
		if int32(i) != e[0] && int32(i) != e[1] && exact.OnSegment(a, b, p) {
			return false
		}
	}
	for _, f := range edges {
		c, d := pts[f[0]], pts[f[1]]
		if f == e || f == [2]int32{e[1], e[0]} {
			return false
		}
		if exact.Orient(a, b, c)*exact.Orient(a, b, d) < 0 && exact.Orient(c, d, a)*exact.Orient(c, d, b) < 0 {
			return false
		}
	}
	return true
}

func TestTriangulateLaws(t *testing.T) {
	for seed := range uint64(300) {
		r := rand.New(rand.NewPCG(seed, 1))
		side := []int32{4, 7, 30, 1000, 1 << 28}[seed%5]
		pts, edges := scene(r, 3+r.IntN(80), side, 60)
		tr, err := mesh.Triangulate(context.Background(), pts, edges)
		if err != nil {
			t.Fatalf("seed %d: %v", seed, err)
		}
		if err := tr.Check(); err != nil {
			t.Fatalf("seed %d: %v", seed, err)
		}
		for k, e := range edges {
			if !tr.HasEdge(e[0], e[1], int32(k)) {
				t.Fatalf("seed %d: edge %d is not in the mesh", seed, k)
			}
		}
	}
}

func TestTriangulateRefusesCrossings(t *testing.T) {
	pts := []exact.Pt{{X: 0, Y: 0}, {X: 10, Y: 10}, {X: 0, Y: 10}, {X: 10, Y: 0}, {X: 5, Y: 5}}
	for _, edges := range [][][2]int32{{{0, 1}, {2, 3}}, {{0, 1}}, {{0, 4}, {4, 0}}} {
		if _, err := mesh.Triangulate(context.Background(), pts, edges); !errors.Is(err, mesh.ErrCrossing) {
			t.Errorf("edges %v: error %v, want ErrCrossing", edges, err)
		}
	}
}

func TestTriangulateStopsWhenCancelled(t *testing.T) {
	ctx, cancel := context.WithCancel(context.Background())
	cancel()
	if _, err := mesh.Triangulate(ctx, []exact.Pt{{X: 1, Y: 1}}, nil); !errors.Is(err, context.Canceled) {
		t.Errorf("error %v, want context.Canceled", err)
	}
}

// finish makes a mesh in which nothing stops anything.
func finish(t *testing.T, tr *mesh.Triangulation, edges int) *mesh.Mesh {
	t.Helper()
	m, err := tr.Finish(context.Background(), make([]mesh.Tag, edges), make([]mesh.Tag, tr.Len()))
	if err != nil {
		t.Fatal(err)
	}
	return m
}

func TestLocate(t *testing.T) {
	for seed := range uint64(40) {
		r := rand.New(rand.NewPCG(seed, 2))
		side := []int32{6, 40, 100000}[seed%3]
		pts, edges := scene(r, 60, side, 40)
		tr, err := mesh.Triangulate(context.Background(), pts, edges)
		if err != nil {
			t.Fatal(err)
		}
		m := finish(t, tr, len(edges))
		for range 300 {
			p := exact.Pt{X: r.Int32N(side+10) - 5, Y: r.Int32N(side+10) - 5}
			place, ok := m.Locate(p)
			if !ok {
				t.Fatalf("seed %d: %v not found", seed, p)
			}
			checkPlace(t, m, p, place)
		}
		if _, ok := m.Locate(exact.Pt{X: side + 20000, Y: 0}); ok {
			t.Fatal("found a point outside the rectangle")
		}
	}
}

func checkPlace(t *testing.T, m *mesh.Mesh, p exact.Pt, place mesh.Place) {
	t.Helper()
	tri := m.Tris[place.Tri]
	zeros := 0
	for i := range 3 {
		switch s := exact.Orient(tri.P[i], tri.P[mesh.Inc(i)], p); {
		case s < 0:
			t.Fatalf("%v lies outside the triangle it was located in", p)
		case s == 0:
			zeros++
		}
	}
	if (zeros == 1) != (place.Edge != mesh.None) || (zeros == 2) != (place.Corner >= 0) {
		t.Fatalf("%v: place %+v with %d zeros", p, place, zeros)
	}
	if place.Corner >= 0 && tri.P[place.Corner] != p {
		t.Fatalf("%v: wrong corner", p)
	}
	if place.Edge != mesh.None {
		if a, b := m.Ends(place.Edge); !exact.OnSegment(a, b, p) {
			t.Fatalf("%v: wrong edge", p)
		}
	}
}
