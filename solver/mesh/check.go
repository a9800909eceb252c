package mesh

import (
	"fmt"

	"enfilade/solver/exact"
)

// Check tests everything the triangulation promises: winding, mutual neighbours, constraints on both sides of an edge, the
// Delaunay property wherever no constraint stands, and the number of triangles. O(n); for tests.
func (tr *Triangulation) Check() error {
	for t := range tr.tris {
		r := &tr.tris[t]
		if r.v[0] == dead {
			continue
		}
		if exact.Area2(tr.Pts[r.v[0]], tr.Pts[r.v[1]], tr.Pts[r.v[2]]) <= 0 {
			return fmt.Errorf("mesh: triangle %d is not counter-clockwise", t)
		}
		for i := range 3 {
			if err := tr.checkEdge(EdgeOf(int32(t), i)); err != nil {
				return err
			}
		}
	}
	return nil
}

func (tr *Triangulation) checkEdge(e Edge) error {
	r, i := &tr.tris[e.Tri()], e.Corner()
	f := r.n[i]
	if f == None {
		if r.v[i] < tr.box {
			return fmt.Errorf("mesh: edge %d has no neighbour", e)
		}
		return nil
	}
	s, j := &tr.tris[f.Tri()], f.Corner()
	switch {
	case s.n[j] != e:
		return fmt.Errorf("mesh: edges %d and %d are not mutual twins", e, f)
	case s.v[j] != r.v[inc[i]] || s.v[inc[j]] != r.v[i]:
		return fmt.Errorf("mesh: twins %d and %d have different ends", e, f)
	case s.c[j] != r.c[i]:
		return fmt.Errorf("mesh: twins %d and %d have different constraints", e, f)
	}
	if tr.wrong(e) {
		return fmt.Errorf("mesh: edge %d is not Delaunay", e)
	}
	return nil
}

// HasEdge reports whether constraint k lies on an edge between points a and b.
func (tr *Triangulation) HasEdge(a, b, k int32) bool {
	for t := range tr.tris {
		for i := range 3 {
			if r := &tr.tris[t]; r.c[i] == k && r.v[i] == a && r.v[inc[i]] == b {
				return true
			}
		}
	}
	return false
}

// Check is the triangulation's Check.
func (m *Mesh) Check() error {
	m.unsettle()
	return m.raw.Check()
}
