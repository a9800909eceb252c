package paint

import (
	"math"

	"enfilade/assets"
	"enfilade/solver/plan"
)

// placeRoom puts a room's name in capitals inside its outline: near its upper wall, where least happens, or as near to that
// as it is free.
func (p *pen) placeRoom(z plan.Zone) {
	ring := p.work.route[:0]
	for _, q := range z.Ring.All() {
		ring = append(ring, p.point(q))
	}
	p.work.route = ring
	if len(ring) < 3 || !p.sees(ring) {
		return
	}
	look := textLook{size: roomText, spacing: roomSpace, halo: roomHalo, weight: assets.Medium, colour: p.theme.Ink2}
	from := p.say()
	p.capitals(z.Name)
	t := p.said(from)
	w := p.width(t, look)
	h := 0.72 * look.size * p.k
	c := middle(ring)
	top := c.y
	for _, q := range ring {
		top = min(top, q.y)
	}
	c.y = min(c.y, top+max(0.16*2*(c.y-top), 2.4*h))
	spots := p.work.spots[:0]
	// Rings of spots about it, nearer ones first, closer together up and down than sideways as text is wide.
	for r := range roomRings {
		for i := range max(1, 8*r) {
			dx, dy := ringStep(r, i)
			q := place{c.x + dx*max(w/3, 14*p.k), c.y + dy*2*h}
			if p.holdsText(ring, q, w/2+4*p.k, h/2+4*p.k) {
				spots = append(spots, place{q.x - w/2, q.y + h/2})
			}
		}
	}
	p.work.spots = spots
	if len(spots) > math.MaxInt8 {
		spots = spots[:math.MaxInt8]
	}
	p.settle(labelKey{rankRoom, z.ID}, t, look, spots, false)
}

// roomRings is how many rings of spots a room's name tries.
const roomRings = 6

// ringStep returns place i of the square ring of radius r: 8r places, from straight above clockwise.
func ringStep(r, i int) (dx, dy float64) {
	if r == 0 {
		return 0, 0
	}
	side, at := (i+r)/(2*r)%4, (i+r)%(2*r)-r
	switch side {
	case 0:
		return float64(at), float64(-r)
	case 1:
		return float64(r), float64(at)
	case 2:
		return float64(-at), float64(r)
	}
	return float64(-r), float64(-at)
}

// middle returns the centre of a ring's area, or the mean of its corners when it has none.
func middle(ring []place) place {
	o := ring[0] // sums are taken from here, so that far places lose no digits
	area, x, y, mx, my := 0.0, 0.0, 0.0, 0.0, 0.0
	for i, b := range ring {
		a := ring[(i+len(ring)-1)%len(ring)]
		ax, ay, bx, by := a.x-o.x, a.y-o.y, b.x-o.x, b.y-o.y
		cross := ax*by - bx*ay
		area += cross
		x += (ax + bx) * cross
		y += (ay + by) * cross
		mx, my = mx+bx, my+by
	}
	if math.Abs(area) < 1e-9 {
		n := float64(len(ring))
		return place{o.x + mx/n, o.y + my/n}
	}
	return place{o.x + x/(3*area), o.y + y/(3*area)}
}

// holdsText reports whether a box about c lies in the ring: none of the ring's sides crosses it, and its middle is inside.
func (p *pen) holdsText(ring []place, c place, halfW, halfH float64) bool {
	f := frame{c.x - halfW, c.y - halfH, c.x + halfW, c.y + halfH}
	for i, b := range ring {
		a := ring[(i+len(ring)-1)%len(ring)]
		if _, _, ok := f.segment(a.x, a.y, b.x, b.y); ok {
			return false
		}
	}
	return within(ring, c)
}

// within reports whether a place lies inside of a ring.
func within(ring []place, c place) bool {
	in := false
	for i, b := range ring {
		a := ring[(i+len(ring)-1)%len(ring)]
		if (a.y > c.y) != (b.y > c.y) && c.x < a.x+(b.x-a.x)*(c.y-a.y)/(b.y-a.y) {
			in = !in
		}
	}
	return in
}

// onFloor reports whether a place of the picture lies on the floor.
func (p *pen) onFloor(c place) bool { return within(p.work.floor, c) }
