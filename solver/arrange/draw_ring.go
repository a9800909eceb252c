package arrange

import (
	"math/bits"
	"slices"

	"enfilade/solver/exact"
	"enfilade/solver/plan"
)

// margin is how far the floor of a plan that draws none reaches beyond everything drawn and marked: 2 m.
const margin = 2000 * exact.PerMM

// emptyHalf is half the side of the floor of an empty plan: 10 m.
const emptyHalf = 10_000 * exact.PerMM

// FloorBox returns the floor of a plan that draws none: the box of everything drawn and marked, grown by 2 m, as a
// counter-clockwise ring from its lower left corner. An empty plan has a box of 20 m about the origin.
//
// The marks belong to it, so a mark that moves may move this floor while the plan's obstacles stay the same.
func FloorBox(p *plan.Plan) [4]exact.Pt {
	lo, hi, ok := plan.Bounds(p)
	grow := int32(margin)
	if !ok {
		grow = emptyHalf
	}
	const far = exact.Limit - 1
	x0, y0 := max(lo.X-grow, -far), max(lo.Y-grow, -far)
	x1, y1 := min(hi.X+grow, far), min(hi.Y+grow, far)
	return [4]exact.Pt{{X: x0, Y: y0}, {X: x1, Y: y0}, {X: x1, Y: y1}, {X: x0, Y: y1}}
}

func (d *drawer) drawFloor() {
	body := d.addBody(solid, d.addItem(plan.KindFloor, ""))
	if floor := d.plan.Floor(); floor.Len() > 0 {
		ring, fault := ringOf(floor)
		if fault == "" {
			d.addRing(body, ring)
			return
		}
		d.problem(plan.ProblemShape, d.out.Items[0], floor.At(0), fault)
	}
	box := FloorBox(d.plan)
	d.addRing(body, box[:])
}

func (d *drawer) drawBlock(b plan.Block) {
	ref := plan.Ref{Kind: plan.KindBlock, ID: b.ID}
	ring, fault := ringOf(b.Ring)
	if fault == "" && b.Height <= 0 {
		fault = "needs a height above 0, or none for up to the ceiling"
	}
	if fault != "" {
		var at exact.Pt
		if b.Ring.Len() > 0 {
			at = b.Ring.At(0)
		}
		d.problem(plan.ProblemShape, ref, at, fault)
		return
	}
	d.addRing(d.addBody(Stops{Walk: true, Top: b.Height}, d.addItem(ref.Kind, ref.ID)), ring)
}

// ringOf returns a ring's points without doubled neighbours, turned counter-clockwise, or says why it is no ring. A ring
// that crosses itself is one; when its loops cancel out in area it keeps its direction.
func ringOf(c plan.Chain) (ring []exact.Pt, fault string) {
	ring = slices.Compact(c.Points())
	for len(ring) > 1 && ring[0] == ring[len(ring)-1] {
		ring = ring[:len(ring)-1]
	}
	flat := true
	for i, p := range ring {
		if !plan.InRange(p) {
			return nil, "lies outside the legal range of 50 km about the origin"
		}
		flat = flat && (i < 2 || exact.Area2(ring[0], ring[1], p) == 0)
	}
	if flat {
		return nil, "encloses nothing; a ring needs three corners that do not lie on one line"
	}
	if areaSign(ring) < 0 {
		slices.Reverse(ring)
	}
	return ring, ""
}

// areaSign returns the sign of a ring's signed area, positive for counter-clockwise. The area is summed in 128 bits:
// each term is below 2^61, so any number of corners fits.
func areaSign(ring []exact.Pt) int {
	var hi int64
	var lo uint64
	for i := 1; i+1 < len(ring); i++ {
		term := exact.Area2(ring[0], ring[i], ring[i+1])
		var carry uint64
		lo, carry = bits.Add64(lo, uint64(term), 0)
		hi += term>>63 + int64(carry)
	}
	switch {
	case hi < 0:
		return -1
	case hi > 0 || lo > 0:
		return 1
	}
	return 0
}
