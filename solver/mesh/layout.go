package mesh

// chunk is how many triangles of one open stretch of floor are laid side by side before the layout goes on along the curve:
// about what a room has.
const chunk = 64

// layout orders the triangles so that those that a cone passes one after the other lie near each other in memory: first the
// open ones, room by room along the curve through the points, then those that are solid, which no cone enters. order[k] is the
// old index of triangle k, place the inverse. O(n).
func (tr *Triangulation) layout(solid []Tag) (order, place []int32) {
	along := tr.alongCurve()
	order, place = make([]int32, 0, len(along)), make([]int32, len(along))
	for t := range place {
		place[t] = -1
	}
	put := func(t int32) {
		place[t] = int32(len(order))
		order = append(order, t)
	}
	for _, t := range along {
		if place[t] >= 0 || solid[t].Top > 0 {
			continue
		}
		first := len(order)
		put(t)
		for next := first; next < len(order) && len(order) < first+chunk; next++ {
			r := &tr.tris[order[next]]
			for i, n := range r.n {
				if n != None && r.c[i] < 0 && place[n.Tri()] < 0 {
					put(n.Tri())
				}
			}
		}
	}
	for _, t := range along {
		if place[t] < 0 {
			put(t)
		}
	}
	return order, place
}

// alongCurve lists the triangles in the order in which the curve through the points comes to them. O(n) by counting.
func (tr *Triangulation) alongCurve() []int32 {
	along := make([]int32, len(tr.Pts))
	for r, p := range tr.curve {
		along[p] = int32(r)
	}
	key := make([]int32, len(tr.tris))
	count := make([]int32, len(tr.Pts)+1)
	for t := range tr.tris {
		v := tr.tris[t].v
		key[t] = min(along[v[0]], along[v[1]], along[v[2]])
		count[key[t]+1]++
	}
	for i := 1; i < len(count); i++ {
		count[i] += count[i-1]
	}
	list := make([]int32, len(tr.tris))
	for t, k := range key {
		list[count[k]] = int32(t)
		count[k]++
	}
	return list
}
