package mesh

import (
	"context"
	"math/rand/v2"
	"runtime"
	"slices"
	"testing"

	"enfilade/solver/exact"
)

// TestParts: points put in by several parts side by side make the triangulation that one after the other makes, whatever
// their places: scattered, crowded on a small grid, on few lines and circles.
func TestParts(t *testing.T) {
	defer runtime.GOMAXPROCS(runtime.GOMAXPROCS(4))
	waited, all := 0, 0
	for seed := range uint64(60) {
		r := rand.New(rand.NewPCG(seed, 6))
		pts := crowd(r, 400+r.IntN(1500), int(seed%5))
		want := corners(t, pts, 1)
		for _, parts := range []int{2, 3, 8} {
			if got := corners(t, pts, parts); !slices.Equal(got, want) {
				t.Fatalf("seed %d: %d points in %d parts: other triangles", seed, len(pts), parts)
			}
		}
		waited, all = waited+waiting(t, pts), all+len(pts)
	}
	if waited < all/50 || waited > all/2 {
		t.Errorf("%d of %d points had to wait", waited, all)
	}
}

// waiting returns how many points have to wait when there are two parts.
func waiting(t *testing.T, pts []exact.Pt) (n int) {
	l, err := triangulatePoints(context.Background(), pts, 1)
	if err != nil {
		t.Fatal(err)
	}
	tr := l.tr
	end := len(pts)
	order, ends := insertionOrder(tr.Pts, l.along[end:])
	fresh := Triangulation{Pts: tr.Pts, box: tr.box, tris: make([]rawTri, len(tr.tris))}
	first := fresh.begin(l.along[end:])
	if err := first.insert(context.Background(), order[:ends[alone]]); err != nil {
		t.Fatal(err)
	}
	ins, shares := fresh.shareOut(order, ends, 2, first.next)
	for i := range ins {
		for _, list := range shares[i] {
			if err := ins[i].insert(context.Background(), list); err != nil {
				t.Fatal(err)
			}
		}
		n += len(ins[i].late)
	}
	return n
}

// crowd returns distinct points of one of five kinds.
func crowd(r *rand.Rand, n, kind int) (pts []exact.Pt) {
	for range n {
		p := exact.Pt{X: r.Int32N(1 << 20), Y: r.Int32N(1 << 20)}
		switch kind {
		case 1:
			p.X, p.Y = p.X&63*1000, p.Y&31*1000
		case 2:
			p.X = p.X & 7
		case 3:
			p.X, p.Y = r.Int32N(1<<10)<<10, (r.Int32N(3)-1)*r.Int32N(2)*1000
		case 4:
			q := [][2]int32{{3, 4}, {4, 3}, {5, 0}, {0, 5}}[r.IntN(4)]
			k := 1 + r.Int32N(300)
			p = exact.Pt{X: q[0] * k * (1 - 2*r.Int32N(2)), Y: q[1] * k * (1 - 2*r.Int32N(2))}
		}
		pts = append(pts, p)
	}
	return distinct(pts)
}

// corners returns the corners of all triangles, each from its first, in order.
func corners(t *testing.T, pts []exact.Pt, parts int) (all [][3]int32) {
	t.Helper()
	l, err := triangulatePoints(context.Background(), pts, parts)
	if err != nil {
		t.Fatal(err)
	}
	tr, err := l.Constrain(context.Background(), nil)
	if err != nil {
		t.Fatal(err)
	}
	if err := tr.Check(); err != nil {
		t.Fatalf("%d parts: %v", parts, err)
	}
	for _, r := range tr.tris {
		v := r.v
		for v[0] != min(v[0], v[1], v[2]) {
			v = [3]int32{v[1], v[2], v[0]}
		}
		all = append(all, v)
	}
	slices.SortFunc(all, func(a, b [3]int32) int { return slices.Compare(a[:], b[:]) })
	return all
}
