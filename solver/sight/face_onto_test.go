package sight_test

import (
	"context"
	"math"
	"testing"

	"pgregory.net/rapid"

	"enfilade/solver/mesh"
	"enfilade/solver/plantest"
	"enfilade/solver/sight"
)

// lean returns the mesh of only those edges of m that stop sight at a height.
func lean(t interface{ Fatal(...any) }, m *mesh.Mesh, height int32, same bool) *mesh.Mesh {
	open := func(t int32) bool { return m.Solid[t] < height }
	stops := func(e mesh.Edge) bool { return m.Tris[e.Tri()].Top[e.Corner()] >= height }
	l, err := mesh.Lean(context.Background(), m, open, stops, mesh.Tag{Top: mesh.Ceiling}, same)
	if err != nil {
		t.Fatal(err)
	}
	return l
}

// TestFacesOnLeanMesh holds that corners that stop no sight make no difference: the places that see any part of a face, and
// all of it, have the same border bit for bit on the whole mesh, on a lean one, and when they are taken from the lean one to the
// whole one.
func TestFacesOnLeanMesh(t *testing.T) {
	leaner, split := 0, 0
	for name, plans := range plantest.Small() {
		t.Run(name, rapid.MakeCheck(func(t *rapid.T) {
			p := plans.Draw(t, "plan")
			t.Log(plantest.Text(p))
			g, m := graphAndMesh(t, p)
			height := heights.Draw(t, "height")
			l := lean(t, m, height, false)
			if err := l.Check(); err != nil {
				t.Fatal(err)
			}
			f, thin := sight.New(m), sight.New(l)
			c := faceOf(t, g, places(p, g))
			t.Logf("face %v, height %v", c, height)
			if c.A == c.B {
				return
			}
			if f.Free(c, height) != thin.Free(c, height) {
				t.Fatalf("free on the mesh: %v, on the lean one: %v", f.Free(c, height), thin.Free(c, height))
			}
			if !f.Free(c, height) {
				return
			}
			if len(l.Tris) < len(m.Tris) {
				leaner++
			}
			a, _ := f.Partly(context.Background(), nil, c, height)
			b, _ := thin.Partly(context.Background(), nil, c, height)
			onto := f.Onto(nil, b, thin)
			if len(onto) > len(b) {
				split++
			}
			want := f.Outline(a, c.A, height)
			sameRings(t, "any, lean", thin.Outline(b, c.A, height), want)
			sameRings(t, "any, from lean", f.Outline(onto, c.A, height), want)
			a, _ = f.Whole(nil, c, height)
			b, _ = thin.Whole(nil, c, height)
			sameRings(t, "all", thin.Outline(b, c.A, height), f.Outline(a, c.A, height))
		}))
	}
	if leaner < 50 || split < 50 {
		t.Errorf("%d leaner meshes, %d split pieces: the test has lost its aim", leaner, split)
	}
}

func sameRings(t *rapid.T, what string, got, want []sight.Region) {
	if len(got) != len(want) {
		t.Fatalf("%s: %d rings, want %d", what, len(got), len(want))
	}
	for i := range want {
		if got[i].Len() != want[i].Len() || got[i].Area() != want[i].Area() || got[i].Lengths() != want[i].Lengths() {
			t.Fatalf("%s: ring %d: %d corners, area %v, border %v; want %d, %v, %v", what, i, got[i].Len(), got[i].Area(), got[i].Lengths(),
				want[i].Len(), want[i].Area(), want[i].Lengths())
		}
		for k := range want[i].Len() {
			x, y := got[i].Point(k)
			u, v := want[i].Point(k)
			if x != u || y != v || got[i].Kind(k) != want[i].Kind(k) || math.IsNaN(x) {
				t.Fatalf("%s: ring %d, corner %d: %v %v %v, want %v %v %v", what, i, k, x, y, got[i].Kind(k), u, v, want[i].Kind(k))
			}
		}
	}
}
