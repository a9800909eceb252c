package plan

import "enfilade/solver/exact"

// Bounds returns the lower left and the upper right corner of the box around everything drawn and marked: the floor,
// walls with their thickness, blocks, zones, observers, targets, starts and waypoints. ok is false when there is nothing.
//
// A wall's box is that of its line, grown on every side by the wider of its two sides; mitres may reach beyond it.
// Openings lie within their walls; points outside the legal range do not count. Cost: one pass over all points.
func Bounds(p *Plan) (lo, hi exact.Pt, ok bool) {
	var b box
	b.chain(p.obstacles.floor, 0)
	for _, w := range p.obstacles.walls.refs() {
		right2, left2 := w.Sides2()
		b.chain(w.Line, (max(right2, left2)+1)/2)
	}
	for _, k := range p.obstacles.blocks.refs() {
		b.chain(k.Ring, 0)
	}
	b.marks(p.marks)
	return b.lo, b.hi, b.some
}

// Sides2 returns how far the wall's body reaches to the right and to the left of its line, in half grid units. A wall
// that is a line (no thickness, glazing or a screen) reaches nowhere.
func (w *Wall) Sides2() (right2, left2 int32) {
	if w.Thickness <= 0 || w.Kind == Glazing || w.Kind == Screen {
		return 0, 0
	}
	t := min(w.Thickness, MaxThickness)
	switch w.Justify {
	case Left:
		return 0, 2 * t
	case Right:
		return 2 * t, 0
	}
	return t, t
}

// box grows around what it is shown.
type box struct {
	lo, hi exact.Pt
	some   bool
}

func (b *box) marks(m *Marks) {
	for _, z := range m.zones.refs() {
		b.chain(z.Ring, 0)
	}
	for _, o := range m.observers.refs() {
		b.point(o.At, 0)
	}
	for _, t := range m.targets.refs() {
		b.point(t.At, 0)
		if t.Face != nil {
			b.point(t.Face[0], 0)
			b.point(t.Face[1], 0)
		}
	}
	for _, s := range m.starts.refs() {
		b.point(s.At, 0)
	}
	for _, r := range m.routes.refs() {
		b.chain(r.Via, 0)
	}
}

func (b *box) chain(c Chain, grow int32) {
	for _, p := range c.pts {
		b.point(p, grow)
	}
}

func (b *box) point(p exact.Pt, grow int32) {
	if !InRange(p) {
		return
	}
	if !b.some {
		b.lo, b.hi, b.some = exact.Pt{X: p.X - grow, Y: p.Y - grow}, exact.Pt{X: p.X + grow, Y: p.Y + grow}, true
		return
	}
	b.lo.X, b.lo.Y = min(b.lo.X, p.X-grow), min(b.lo.Y, p.Y-grow)
	b.hi.X, b.hi.Y = max(b.hi.X, p.X+grow), max(b.hi.Y, p.Y+grow)
}
