package mesh

import (
	"context"
	"math/rand/v2"
	"testing"

	"enfilade/solver/exact"
)

// TestWander: whoever tosses for the way arrives where one who goes straight on does, and so does one who puts points in.
func TestWander(t *testing.T) {
	for seed := range uint64(20) {
		r := rand.New(rand.NewPCG(seed, 9))
		side := []int32{8, 60, 1 << 20}[seed%3]
		var pts []exact.Pt
		for range 80 {
			pts = append(pts, exact.Pt{X: r.Int32N(side), Y: r.Int32N(side)})
		}
		pts = distinct(pts)
		tr, err := Triangulate(context.Background(), pts, nil)
		if err != nil {
			t.Fatal(err)
		}
		m, err := tr.Finish(context.Background(), nil, make([]Tag, tr.Len()))
		if err != nil {
			t.Fatal(err)
		}
		in := inserter{tr: tr, n: uint32(len(tr.Pts))}
		m.unsettle() // tr is asked too
		lo, hi := m.Box()
		for range 500 {
			from, p := r.Int32N(int32(len(m.Tris))), exact.Pt{X: r.Int32N(side+2) - 1, Y: r.Int32N(side+2) - 1}
			p.X, p.Y = min(max(p.X, lo.X), hi.X), min(max(p.Y, lo.Y), hi.Y)
			t1, _, z1 := m.walkTo(from, p)
			t2, _, z2 := m.wander(from, p)
			t3, on3, ok3 := in.find(from, p)
			t4, on4, ok4 := tr.walk(from, p)
			if z1 != z2 || z1 == 0 && (t1 != t2 || t3 != t1 || t4 != t1) || (on3 < 0) != (on4 < 0) || ok3 != ok4 {
				t.Fatalf("seed %d: %v from %d: in %d (%d), %d (%d), %d (%d, %v), %d (%d, %v)", seed, p, from, t1, z1, t2, z2, t3, on3, ok3, t4, on4, ok4)
			}
		}
	}
}

func distinct(pts []exact.Pt) (out []exact.Pt) {
	seen := map[exact.Pt]bool{}
	for _, p := range pts {
		if !seen[p] {
			seen[p], out = true, append(out, p)
		}
	}
	return out
}
