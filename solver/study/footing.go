package study

import (
	"cmp"
	"fmt"
	"slices"

	"enfilade/solver/exact"
	"enfilade/solver/mesh"
	"enfilade/solver/plan"
)

// footing is where a mark can be taken to stand, or why it cannot.
type footing struct {
	at   exact.Pt
	ok   bool
	off  bool     // it lies off the floor
	item plan.Ref // what it stands in
	text string
}

// near is how deep inside a face a mark may lie and still be moved to the face's free side, in grid units: 1 mm.
const near = 1 * exact.PerMM

// blindAt says of a triangle whether it is solid at the height of an eye.
func (sc *scene) blindAt(eye int32) func(tri int32) bool {
	return func(tri int32) bool { return sc.mesh.Solid[tri] >= eye }
}

// shut says of a triangle whether nobody stands in it.
func (sc *scene) shut(tri int32) bool { return sc.mesh.Tris[tri].Flags&mesh.FlagNoWalk != 0 }

// stand finds a footing for a mark at p: p itself when some triangle that holds it is not shut; else the nearest grid point
// less than 1 mm away of which that is true.
func (sc *scene) stand(p exact.Pt, shut func(int32) bool) footing {
	if sc.free(p, shut) {
		return footing{at: p, ok: true}
	}
	for _, d := range nearby {
		if q := p.Add(d); sc.free(q, shut) {
			return footing{at: q, ok: true}
		}
	}
	f := footing{at: p}
	if f.off = !inRing(sc.floor, p); f.off {
		f.text = "lies outside the floor; move it inside"
		return f
	}
	f.item = sc.holder(p, shut)
	f.text = fmt.Sprintf("is inside %s; move it out, or lower what it stands in", nameOf(f.item))
	return f
}

func (sc *scene) free(p exact.Pt, shut func(int32) bool) bool {
	place, ok := sc.mesh.Locate(p)
	switch {
	case !ok:
		return false
	case place.Corner >= 0:
		some := false
		sc.mesh.Around(mesh.EdgeOf(place.Tri, place.Corner), func(e mesh.Edge) { some = some || !shut(e.Tri()) })
		return some
	case place.Edge != mesh.None:
		twin := sc.mesh.Twin(place.Edge)
		return !shut(place.Tri) || twin != mesh.None && !shut(twin.Tri())
	}
	return !shut(place.Tri)
}

// nearby lists the grid vectors shorter than 1 mm, shortest first.
var nearby = func() []exact.Vec {
	var all []exact.Vec
	for x := int32(-near); x <= near; x++ {
		for y := int32(-near); y <= near; y++ {
			if v := (exact.Vec{X: x, Y: y}); v.Len2() > 0 && v.Len2() < near*near {
				all = append(all, v)
			}
		}
	}
	slices.SortFunc(all, func(a, b exact.Vec) int {
		return cmp.Or(cmp.Compare(a.Len2(), b.Len2()), cmp.Compare(a.X, b.X), cmp.Compare(a.Y, b.Y))
	})
	return all
}()

// inRing reports whether p lies in the closed region that the ring winds around, by the crossings of a ray to the right.
func inRing(ring []exact.Pt, p exact.Pt) bool {
	wind := 0
	for i, a := range ring {
		b := ring[(i+1)%len(ring)]
		if exact.OnSegment(a, b, p) {
			return true
		}
		switch {
		case a.Y <= p.Y && b.Y > p.Y && exact.Orient(a, b, p) > 0:
			wind++
		case b.Y <= p.Y && a.Y > p.Y && exact.Orient(a, b, p) < 0:
			wind--
		}
	}
	return wind != 0
}

// holder returns the item whose outline lies nearest, counted in triangles, around the solid place p.
func (sc *scene) holder(p exact.Pt, shut func(int32) bool) plan.Ref {
	place, ok := sc.mesh.Locate(p)
	if !ok {
		return plan.Ref{Kind: plan.KindFloor}
	}
	queue, seen := []int32{place.Tri}, map[int32]bool{place.Tri: true}
	for len(queue) > 0 {
		t := queue[0]
		queue = queue[1:]
		for i := range 3 {
			e := mesh.EdgeOf(t, i)
			n := sc.mesh.Twin(e)
			if n == mesh.None {
				continue
			}
			if con := sc.mesh.Con[e]; con >= 0 && !shut(n.Tri()) {
				return sc.outline.Items[sc.graph.Edges[con].Item]
			}
			if !seen[n.Tri()] {
				seen[n.Tri()] = true
				queue = append(queue, n.Tri())
			}
		}
	}
	return plan.Ref{Kind: plan.KindFloor}
}

// kindWords are the words of the trade for kinds of item.
var kindWords = map[plan.Kind]string{
	plan.KindWall: "wall", plan.KindOpening: "door", plan.KindBlock: "block", plan.KindZone: "zone",
	plan.KindObserver: "observer", plan.KindTarget: "target", plan.KindStart: "start", plan.KindRoute: "route",
}

// nameOf names an item in a sentence.
func nameOf(r plan.Ref) string {
	if w, ok := kindWords[r.Kind]; ok {
		return w + " " + r.ID
	}
	return "the edge of the floor"
}
