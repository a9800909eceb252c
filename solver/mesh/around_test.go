package mesh

import (
	"context"
	"math"
	"math/rand/v2"
	"testing"

	"enfilade/solver/exact"
)

// comb is a row of n loose teeth well inside a floor, two corners of which end up joined to nearly all of them.
func comb(n int) (pts []exact.Pt, edges [][2]int32) {
	r := rand.New(rand.NewPCG(1, 3))
	const pitch = 4900
	w := int32(n+1) * pitch
	pts = []exact.Pt{{X: -20000, Y: -20000}, {X: w + 20000, Y: -20000}, {X: w + 20000, Y: 100000}, {X: -20000, Y: 100000}}
	edges = [][2]int32{{0, 1}, {1, 2}, {2, 3}, {3, 0}}
	for i := range n {
		x, k := int32(i+1)*pitch, int32(len(pts))
		pts = append(pts, exact.Pt{X: x - 1000 + r.Int32N(2000), Y: 80000}, exact.Pt{X: x - 1000 + r.Int32N(2000), Y: 20000 + r.Int32N(10000)})
		edges = append(edges, [2]int32{k, k + 1})
	}
	return pts, edges
}

// fan is n points around a first one, each joined to it, at distances drawn from near metres to 100.
func fan(n int, near float64) (pts []exact.Pt, edges [][2]int32) {
	pts = append(pts, exact.Pt{})
	r := rand.New(rand.NewPCG(2, 3))
	for i := range n {
		sin, cos := math.Sincos(2 * math.Pi * float64(i) / float64(n))
		far := 1e4 * (near + (100-near)*r.Float64())
		pts = append(pts, exact.Pt{X: int32(far * cos), Y: int32(far * sin)})
		edges = append(edges, [2]int32{0, int32(i) + 1})
	}
	return pts, edges
}

// most returns how many edges meet in the point where most do, corners of the box left aside.
func (tr *Triangulation) most() (most int32) {
	degree := make([]int32, len(tr.Pts))
	for _, r := range tr.tris {
		for _, v := range r.v {
			if degree[v]++; v < tr.box {
				most = max(most, degree[v])
			}
		}
	}
	return most
}

// TestCrowdedPoints holds that edges are found by their ends as quickly when thousands of edges meet in one of them.
func TestCrowdedPoints(t *testing.T) {
	for name, scene := range map[string]func(int) ([]exact.Pt, [][2]int32){
		"comb":  comb,
		"fan":   func(n int) ([]exact.Pt, [][2]int32) { return fan(n, 10) },
		"wheel": func(n int) ([]exact.Pt, [][2]int32) { return fan(n, 100) },
	} {
		steps := func(n int) (each int) {
			pts, edges := scene(n)
			tr, err := Triangulate(context.Background(), pts, edges)
			if err != nil {
				t.Fatal(err)
			}
			if err := tr.Check(); err != nil {
				t.Fatal(err)
			}
			if tr.most() < int32(n)/3 {
				t.Fatalf("%s of %d: at most %d edges meet in a point; wanted a crowd", name, n, tr.most())
			}
			tr.findOut()
			for k := range tr.tris { // every edge from both its ends
				for i, v := range tr.tris[k].v {
					if e := EdgeOf(int32(k), i); tr.lookup(v, tr.tris[k].v[inc[i]]) != e {
						t.Fatalf("edge %v was not found", e)
					}
				}
			}
			return tr.steps / n
		}
		few, many := steps(500), steps(8000)
		if many > 3*few+50 {
			t.Errorf("%s: %d steps for each of 500, %d for each of 8,000", name, few, many)
		}
	}
}

// TestRemoveCrowdedPoint takes out a point at which thousands of edges meet.
func TestRemoveCrowdedPoint(t *testing.T) {
	const n = 8000
	pts, _ := fan(n, 100)
	tr, err := Triangulate(context.Background(), pts, nil)
	if err != nil {
		t.Fatal(err)
	}
	if tr.most() < n/2 {
		t.Fatalf("at most %d edges meet in a point; wanted %d", tr.most(), n/2)
	}
	m, err := tr.Finish(context.Background(), nil, make([]Tag, tr.Len()))
	if err != nil {
		t.Fatal(err)
	}
	d, before := NewEditor(m), tr.steps
	if err := d.Remove(0); err != nil {
		t.Fatal(err)
	}
	if steps := tr.steps - before; steps > 100*n {
		t.Errorf("%d steps to take out a point with %d edges", steps, n)
	}
	solid := map[int32]Tag{}
	for _, k := range d.Changed() {
		solid[k] = Tag{}
	}
	d.Close(nil, solid)
	if err := m.Check(); err != nil {
		t.Error(err)
	}
}

// TestThroughPencil forces an edge in across thousands that meet in one point, of which at first only the last can be flipped.
func TestThroughPencil(t *testing.T) {
	const n, pitch = 1000, 100_000
	for _, back := range []bool{false, true} {
		pts := []exact.Pt{{X: -5, Y: 1}, {X: n*pitch + 5, Y: 1}, {X: n * pitch / 2, Y: 5 * n * pitch}}
		for i := range int32(n) {
			pts = append(pts, exact.Pt{X: i * pitch, Y: -i * i})
		}
		tr, err := Triangulate(context.Background(), pts, nil)
		if err != nil {
			t.Fatal(err)
		}
		crossing := 0
		for _, r := range tr.tris {
			for i, v := range r.v {
				if w := r.v[inc[i]]; v < w && v < tr.box && w < tr.box && tr.apart(0, 1, v, w) {
					crossing++
				}
			}
		}
		if crossing < n/3 {
			t.Fatalf("the edge crosses only %d", crossing)
		}
		a, b := int32(0), int32(1)
		if back {
			a, b = b, a
		}
		tr.findOut()
		before := tr.steps
		if err := tr.constrain(a, b, 0); err != nil {
			t.Fatal(err)
		}
		if steps := tr.steps - before; steps > 100*n {
			t.Errorf("%d steps to go through %d edges", steps, crossing)
		}
		if err := tr.Check(); err != nil {
			t.Error(err)
		}
	}
}
