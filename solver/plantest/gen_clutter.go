package plantest

import (
	"math"

	"enfilade/solver/exact"
	"enfilade/solver/plan"
)

// Clutter returns a square floor strewn with exactly the given number of things (walls and blocks together): short walls
// of every kind, thin and thick, in any direction, and convex blocks, which may cross and overlap. Marks stand clear of
// all of them.
func Clutter(seed uint64, walls int) *plan.Plan {
	m := newMaker(seed, 2)
	side := int32(math.Sqrt(float64(walls))*1.5*metre) + 2*metre
	m.Floor = plan.ChainOf(pt(0, 0), pt(side, 0), pt(side, side), pt(0, side))
	c := &clutter{maker: m, side: side, cells: make(map[exact.Pt][]exact.Pt)}
	for range walls {
		c.thing()
	}
	m.putMarks(c.place)
	return plan.From(m.Parts)
}

// clutter remembers the middles of its things in cells of one metre, so that marks can keep clear of them.
type clutter struct {
	*maker
	side  int32
	cells map[exact.Pt][]exact.Pt
}

// reach bounds the distance from a thing's middle to its farthest point: half of 1.8 m and half a thickness of 0.2 m.
const reach = metre

func (c *clutter) thing() {
	at := pt(reach+c.Int32N(c.side-2*reach), reach+c.Int32N(c.side-2*reach))
	cell := pt(at.X/metre, at.Y/metre)
	c.cells[cell] = append(c.cells[cell], at)
	turn := c.Float64() * 2 * math.Pi
	if c.chance(0.35) {
		c.body(at, turn)
		return
	}
	half := float64(c.between(0.15, 0.9))
	dx, dy := int32(math.Round(half*math.Cos(turn))), int32(math.Round(half*math.Sin(turn)))
	a, b := pt(at.X-dx, at.Y-dy), pt(at.X+dx, at.Y+dy)
	switch c.IntN(10) {
	case 0:
		c.wall(plan.Glazing, 0, plan.Ceiling, a, b)
	case 1:
		c.wall(plan.Screen, 0, plan.Ceiling, a, b)
	case 2:
		c.wall(plan.Low, 0, c.lowHeight(), a, b)
	case 3, 4, 5:
		c.wall(plan.Solid, c.between(0.05, 0.2), plan.Ceiling, a, b)
	default:
		c.wall(plan.Solid, 0, plan.Ceiling, a, b)
	}
}

// body adds a convex block of three to eight corners about a place.
func (c *clutter) body(at exact.Pt, turn float64) {
	corners := 3 + c.IntN(6)
	radius := float64(c.between(0.15, 0.6))
	var ring []exact.Pt
	for i := range corners {
		a := turn + 2*math.Pi*float64(i)/float64(corners)
		ring = append(ring, pt(at.X+int32(math.Round(radius*math.Cos(a))), at.Y+int32(math.Round(radius*math.Sin(a)))))
	}
	height := plan.Ceiling
	if c.chance(0.25) {
		height = c.lowHeight()
	}
	c.block(height, ring...)
}

// place draws a place that no thing can cover; in a crowd it makes do with the last one tried.
func (c *clutter) place() exact.Pt {
	var at exact.Pt
	for range 1000 {
		at = pt(c.Int32N(c.side), c.Int32N(c.side))
		if c.clear(at) {
			break
		}
	}
	return at
}

func (c *clutter) clear(at exact.Pt) bool {
	for dx := int32(-1); dx <= 1; dx++ {
		for dy := int32(-1); dy <= 1; dy++ {
			for _, other := range c.cells[pt(at.X/metre+dx, at.Y/metre+dy)] {
				if exact.Dist2(at, other) < reach*reach/4 {
					return false
				}
			}
		}
	}
	return true
}
