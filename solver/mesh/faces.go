package mesh

import (
	"context"

	"enfilade/solver/pulse"
)

// Faces finds what each triangle stops, face by face, a face being what no constraint parts. It begins at a triangle at the
// box and goes from face to face across the constraints between them, and every such step it takes back when it has seen what
// lies behind.
//
//   - cross is told of each step across a constraint, which its half-edge starts at point from on the side that is left.
//   - stops is asked once for each face, when the steps told lead there.
//   - Errors: the context's when it is cancelled.
//   - Cost: O(n) for n triangles; cross is called less than twice for each face.
func (tr *Triangulation) Faces(ctx context.Context, cross func(constraint, from int32), stops func() Tag) ([]Tag, error) {
	n := len(tr.tris)
	f := faces{tr: tr, solid: make([]Tag, n), seen: make([]bool, n), borders: make([]Edge, 0, n/2), face: make([]int32, 0, n/16)}
	if err := f.fill(ctx, tr.outermost(), stops()); err != nil {
		return nil, err
	}
	for len(f.borders) > 0 {
		e := f.borders[len(f.borders)-1]
		f.borders = f.borders[:len(f.borders)-1]
		if e < 0 { // on the way back
			e = ^e
			r := &tr.tris[e.Tri()]
			cross(r.c[e.Corner()], r.v[e.Corner()])
			continue
		}
		if f.seen[e.Tri()] {
			continue
		}
		r := &tr.tris[e.Tri()]
		cross(r.c[e.Corner()], r.v[inc[e.Corner()]])
		f.borders = append(f.borders, ^e)
		if err := f.fill(ctx, e.Tri(), stops()); err != nil {
			return nil, err
		}
	}
	return f.solid, nil
}

// faces is the state of Faces.
type faces struct {
	tr      *Triangulation
	solid   []Tag
	seen    []bool
	done    int     // triangles seen
	borders []Edge  // into the faces met behind constraints, and complements of those that were gone through, for the way back
	face    []int32 // triangles of the present face whose neighbours are still to be seen
}

// fill writes what the face of triangle t stops, and adds its borders.
func (f *faces) fill(ctx context.Context, t int32, s Tag) error {
	tris, seen, solid, face, borders := f.tr.tris, f.seen, f.solid, append(f.face, t), f.borders
	seen[t], solid[t] = true, s
	for len(face) > 0 {
		r := &tris[face[len(face)-1]]
		face = face[:len(face)-1]
		if f.done++; f.done&pulse.Every == 0 {
			if err := pulse.Tell(ctx, float64(f.done)/float64(len(tris))); err != nil {
				return err
			}
		}
		for i, n := range r.n {
			switch {
			case n == None || seen[n.Tri()]:
			case r.c[i] >= 0:
				borders = append(borders, n)
			default:
				seen[n.Tri()], solid[n.Tri()] = true, s
				face = append(face, n.Tri())
			}
		}
	}
	f.face, f.borders = face, borders
	return nil
}

// outermost returns a triangle at a side of the box.
func (tr *Triangulation) outermost() int32 {
	for t := range tr.tris {
		if n := &tr.tris[t].n; n[0] == None || n[1] == None || n[2] == None {
			return int32(t)
		}
	}
	panic("mesh: the box has no side")
}
