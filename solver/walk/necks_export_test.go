package walk

import (
	"context"

	"enfilade/solver/exact"
	"enfilade/solver/mesh"
)

// KnowNecks lets every flood be narrowed from the first on.
func (f *Finder) KnowNecks() { f.knowNecks() }

// Necks returns for each triangle of m its part, and for each part the one it hangs on, its depth and its room.
func Necks(m *mesh.Mesh) (part, up, depth, room []int32) {
	k := findNecks(m)
	return k.part, k.up, k.depth, k.room
}

// Wanted tells for each part whether a flood from start to the goals enters it, and for each goal whether it is in a room of
// the start.
func (f *Finder) Wanted(start exact.Pt, goals []Goal) (parts, near []bool) {
	defer f.reset()
	f.knowNecks()
	f.setGoals(goals)
	f.narrow(start)
	for _, round := range f.wanted {
		parts = append(parts, round == f.round)
	}
	for i := range f.goals {
		near = append(near, !f.goals[i].closed)
	}
	return parts, near
}

// FloodNotNarrowed is Flood that enters every part of the floor.
func (f *Finder) FloodNotNarrowed(ctx context.Context, start exact.Pt, goals []Goal) ([]Path, error) {
	known, spent := f.necks, f.spent
	f.necks, f.spent = nil, -len(f.m.Tris)*1000
	defer func() { f.necks, f.spent = known, spent }()
	return f.Flood(ctx, start, goals)
}

// Holders calls do for every triangle of m that holds p.
func Holders(m *mesh.Mesh, p exact.Pt, do func(tri int32)) { holders(m, p, do) }
