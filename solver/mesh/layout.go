package mesh

import (
	"context"

	"enfilade/solver/exact"
	"enfilade/solver/pulse"
)

// chunk is how many triangles of one stretch of floor are laid side by side before the layout goes on along the curve: about
// what a room has.
const chunk = 64

// arrange numbers the points as they were given and puts the triangles in their final order, each with its first point in
// front. pts are the points as given, curve says which of them each point is.
func (tr *Triangulation) arrange(ctx context.Context, pts []exact.Pt, curve []int32) error {
	order, place := tr.layout()
	first := make([]uint8, len(tr.tris))
	_, err := pulse.Split(pulse.Part(ctx, 0.3, 0.5), len(first), func(_ context.Context, lo, hi int) (none struct{}, err error) {
		for t := lo; t < hi; t++ {
			first[t] = tr.firstCorner(&tr.tris[t])
		}
		return none, nil
	})
	if err != nil {
		return err
	}
	tris := make([]rawTri, len(order))
	_, err = pulse.Split(pulse.Part(ctx, 0.5, 1), len(tris), func(ctx context.Context, lo, hi int) (none struct{}, err error) {
		for k := lo; k < hi && err == nil; k++ {
			tris[k] = tr.arranged(order[k], curve, place, first)
			err = pulse.Step(ctx, k-lo, hi-lo)
		}
		return none, err
	})
	if err != nil {
		return err
	}
	tr.tris, tr.Pts, tr.out = tris, pts, nil
	return nil
}

// arranged returns triangle t as it is to be: its first corner and those of others turned to the front, points and triangles
// named anew.
func (tr *Triangulation) arranged(t int32, curve, place []int32, first []uint8) (q rawTri) {
	r := &tr.tris[t]
	i := int(first[t])
	for j := range 3 {
		q.v[j], q.c[j], q.n[j] = curve[r.v[i]], r.c[i], None
		if n := r.n[i]; n != None {
			corner := n.Corner() - int(first[n.Tri()])
			if corner < 0 {
				corner += 3
			}
			q.n[j] = EdgeOf(place[n.Tri()], corner)
		}
		i = inc[i]
	}
	return q
}

// layout orders the triangles so that those that a cone passes one after the other lie near each other in memory: room by
// room along the curve, points being numbered along it. order[k] is the old index of triangle k, place the inverse. O(n).
func (tr *Triangulation) layout() (order, place []int32) {
	key := make([]int32, len(tr.tris))
	for t := range tr.tris {
		v := &tr.tris[t].v
		key[t] = min(v[0], v[1], v[2])
	}
	along := byKey(key, len(tr.Pts))
	order, place = make([]int32, 0, len(along)), key
	for t := range place {
		place[t] = -1
	}
	for _, t := range along {
		if place[t] >= 0 {
			continue
		}
		first := len(order)
		place[t] = int32(first)
		order = append(order, t)
		for next := first; next < len(order) && len(order) < first+chunk; next++ {
			r := &tr.tris[order[next]]
			for i, n := range r.n {
				if n != None && r.c[i] < 0 && place[n.Tri()] < 0 {
					place[n.Tri()] = int32(len(order))
					order = append(order, n.Tri())
				}
			}
		}
	}
	return order, place
}

// byKey returns the indices of keys, all of them below n, in the order of the keys, equal ones as they come. O(n) by counting.
func byKey(keys []int32, n int) []int32 {
	next := make([]int32, n+1)
	for _, k := range keys {
		next[k+1]++
	}
	for i := 1; i < len(next); i++ {
		next[i] += next[i-1]
	}
	order := make([]int32, len(keys))
	for i, k := range keys {
		order[next[k]] = int32(i)
		next[k]++
	}
	return order
}
