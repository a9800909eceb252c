package study

import (
	"cmp"
	"fmt"
	"math"
	"slices"

	"enfilade/solver/exact"
	"enfilade/solver/plan"
)

// footing is where a mark can be taken to stand, or why it cannot.
type footing struct {
	at    exact.Pt
	ok    bool
	off   bool     // it lies off the floor
	tight bool     // the walker's body has no room there
	item  plan.Ref // what it stands in
	text  string
}

// near is how deep inside a face a mark may lie and still be moved to the face's free side, in grid units: 1 mm.
const near = 1 * exact.PerMM

// stand finds a footing on the plain ground for a mark at p: p itself when some triangle that holds it gives what d asks for; else the
// nearest grid point less than 1 mm away of which that is true.
func (sc *scene) stand(p exact.Pt, d demand) footing {
	if sc.plain.free(p, d.shut) {
		return footing{at: p, ok: true}
	}
	for _, v := range nearby {
		if q := p.Add(v); sc.plain.free(q, d.shut) {
			return footing{at: q, ok: true}
		}
	}
	f := footing{at: p}
	if f.off = !exact.InRing(sc.floor, p); f.off {
		f.text = "lies outside the floor; move it inside"
		return f
	}
	f.item = sc.plain.holder(p, d.by)
	f.text = fmt.Sprintf("is inside %s; move it out, or lower what it stands in", sc.nameOf(f.item))
	return f
}

// begin finds a footing for a walk's start. Where only the walker's body is in the way, it is told how far standing room is.
func (sc *scene) begin(p exact.Pt) footing {
	f := sc.stand(p, sc.plain.standing())
	if !f.ok || sc.wide.free(f.at, sc.wide.shut) {
		return f
	}
	f.ok, f.tight = false, true
	room := sc.wide.roomNear(f.at)
	if math.IsInf(room, 1) {
		f.text = fmt.Sprintf("has no standing room anywhere for a body of radius %.0f mm; make the walker narrower", mm(sc.radius))
		return f
	}
	f.text = fmt.Sprintf("has no room for a body of radius %.0f mm; standing room begins %.0f mm away", mm(sc.radius), math.Ceil(mm(room)))
	return f
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
