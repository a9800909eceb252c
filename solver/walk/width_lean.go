package walk

import (
	"context"

	"enfilade/solver/mesh"
)

// leanMesh triangulates the edges of m that stop someone on the floor, and nothing else. O(n log n) expected.
func leanMesh(ctx context.Context, m *mesh.Mesh) (*mesh.Mesh, error) {
	floor := func(t int32) bool { return m.Tris[t].Flags&mesh.FlagNoWalk == 0 }
	stops := func(e mesh.Edge) bool { return m.Tris[e.Tri()].StopsWalk(e.Corner()) }
	return mesh.Lean(ctx, m, floor, stops, mesh.Tag{Walk: true}, false)
}
