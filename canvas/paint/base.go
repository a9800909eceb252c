package paint

import (
	"image/color"
	"math"
	"slices"

	"enfilade/solver/exact"
	"enfilade/solver/plan"
)

// Base lists what lies under the study: ground, grid, floor, lines of walking distance, low walls and blocks, walls and blocks, glazing, screens and
// doors. It covers the whole picture and leaves out what is being dragged. It may run on any goroutine.
func Base(s *Scene) *List {
	l := &List{}
	p := newPen(s, l)
	shown := s.resting()
	l.Drawing, l.InkColour = s.Drawing, s.Theme.Poche
	if !l.Drawing.fits(shown) {
		l.Drawing = NewDrawing(shown)
	}
	p.paper(shown)
	p.underlay()
	p.contours()
	held := heldBy(s, shown)
	p.doorways(l.Drawing, func(ref plan.Ref) bool { return !held[ref] })
	p.obstacles(l.Drawing, func(ref plan.Ref) bool { return !held[ref] })
	return l
}

func (p *pen) paper(shown *plan.Plan) {
	m := p.begin()
	p.rect(0, 0, float64(p.W), float64(p.H))
	p.fill(m, p.theme.Ground)
	p.gridLines(nil, p.theme.Ground, 1)
	ring := p.floorRing(shown)
	if len(ring) == 0 {
		return
	}
	m = p.begin()
	p.addRing(p.frame, ring)
	p.fill(m, p.theme.Floor)
	p.gridLines(ring, p.theme.Floor, 0.6)
}

// rect adds a rectangle by two corners.
func (l *List) rect(x0, y0, x1, y1 float64) {
	l.move(x0, y0)
	l.line(x1, y0)
	l.line(x1, y1)
	l.line(x0, y1)
	l.close()
}

// floorRing returns the floor's outline: the plan's own, or the box of everything drawn with a margin. It is good until the
// next call; it is empty for an empty plan.
func (p *pen) floorRing(shown *plan.Plan) []place {
	ring := p.work.floor[:0]
	if f := shown.Floor(); f.Len() > 0 {
		for _, q := range f.All() {
			ring = append(ring, p.point(q))
		}
	} else if lo, hi, some := plan.Bounds(shown); some {
		x0, y0, x1, y1 := lo.X-floorMargin, lo.Y-floorMargin, hi.X+floorMargin, hi.Y+floorMargin
		for _, q := range [...]exact.Pt{{X: x0, Y: y0}, {X: x1, Y: y0}, {X: x1, Y: y1}, {X: x0, Y: y1}} {
			ring = append(ring, p.point(q))
		}
	}
	p.work.floor = ring
	return ring
}

// gridLines lists the lines each metre and each five metres, in px per metre fading as the zoom changes: the fine ones
// come in from 12 to 28 and go out from 90 to 180, the coarse ones come in from 2 to 6 and go out with the fine ones.
// They are drawn over one known colour, so they are mixed with it here and overlap without darkening.
func (p *pen) gridLines(within []place, ground color.NRGBA, strength float64) {
	if !p.s.layer(LayerGrid) {
		return
	}
	perM := p.cam.PerMetre()
	out := 1 - ramp(perM, 90, 180)
	fine, coarse := ramp(perM, 12, 28)*out, ramp(perM, 2, 6)*out
	if fine > 0 {
		p.gridFamily(within, 1000, mix(ground, p.theme.Grid1, fine*strength))
	}
	if coarse > 0 {
		p.gridFamily(within, 5000, mix(ground, p.theme.Grid5, coarse*strength))
	}
}

// ramp rises from 0 at lo to 1 at hi.
func ramp(v, lo, hi float64) float64 { return min(max((v-lo)/(hi-lo), 0), 1) }

func mix(a, b color.NRGBA, t float64) color.NRGBA {
	f := func(x, y uint8) uint8 { return uint8(float64(x)*(1-t) + float64(y)*t + 0.5) }
	return color.NRGBA{R: f(a.R, b.R), G: f(a.G, b.G), B: f(a.B, b.B), A: 255}
}

func (p *pen) gridFamily(within []place, step float64, c color.NRGBA) {
	m := p.begin()
	w := math.Max(1, math.Round(p.k))
	win := p.cam.Window(0)
	for i := math.Ceil(win.Min[0] / step); i*step <= win.Max[0]; i++ {
		at := p.mm([2]float64{i * step, 0}).x
		x := math.Floor(at - w/2 + 0.5)
		p.stretches(within, at, false, float64(p.H), func(a, b float64) { p.rect(x, a, x+w, b) })
	}
	for i := math.Ceil(win.Min[1] / step); i*step <= win.Max[1]; i++ {
		at := p.mm([2]float64{0, i * step}).y
		y := math.Floor(at - w/2 + 0.5)
		p.stretches(within, at, true, float64(p.W), func(a, b float64) { p.rect(a, y, b, y+w) })
	}
	p.fill(m, c)
}

// stretches calls f with each stretch of an upright (or level) line that lies inside the ring, cut to [0, end] and to whole
// pixels. Without a ring it is the whole line.
func (p *pen) stretches(ring []place, at float64, level bool, end float64, f func(a, b float64)) {
	if ring == nil {
		f(0, end)
		return
	}
	cuts := p.work.cuts[:0]
	for i, b := range ring {
		a := ring[(i+len(ring)-1)%len(ring)]
		if level {
			a, b = place{a.y, a.x}, place{b.y, b.x}
		}
		if (a.x <= at) != (b.x <= at) {
			cuts = append(cuts, a.y+(b.y-a.y)*(at-a.x)/(b.x-a.x))
		}
	}
	slices.Sort(cuts)
	p.work.cuts = cuts
	for i := 0; i+1 < len(cuts); i += 2 {
		a, b := math.Round(max(cuts[i], 0)), math.Round(min(cuts[i+1], end))
		if a < b {
			f(a, b)
		}
	}
}

// obstacles lists the bodies, lines and doors of a drawing that keep lets through and that are not hidden.
func (p *pen) obstacles(d *Drawing, keep func(plan.Ref) bool) {
	p.lowBodies(d, keep)
	p.wallBodies(d, keep)
	p.plainLines(d, keep)
	p.glazing(d, keep)
	p.screens(d, keep)
	p.doors(d, keep)
}

// ringsOf adds the rings of the bodies of one look.
func (p *pen) ringsOf(d *Drawing, lk look, keep func(plan.Ref) bool) {
	for i := range d.bodies {
		if b := &d.bodies[i]; b.look == lk && !b.hidden && keep(b.item) {
			p.body(d, b)
		}
	}
}

func (p *pen) body(d *Drawing, b *body) {
	for _, r := range d.rings[b.rings[0]:b.rings[1]] {
		ring := p.work.ring[:0]
		for _, q := range d.pts[r[0]:r[1]] {
			ring = append(ring, p.point(q))
		}
		p.work.ring = ring
		if p.sees(ring) {
			p.addRing(p.frame, ring)
		}
	}
}

// sees reports whether the box around a ring meets the frame.
func (p *pen) sees(ring []place) bool {
	x0, y0, x1, y1 := math.Inf(1), math.Inf(1), math.Inf(-1), math.Inf(-1)
	for _, q := range ring {
		x0, y0, x1, y1 = min(x0, q.x), min(y0, q.y), max(x1, q.x), max(y1, q.y)
	}
	f := p.frame
	return x0 <= f.x1 && x1 >= f.x0 && y0 <= f.y1 && y1 >= f.y0
}

func (p *pen) lowBodies(d *Drawing, keep func(plan.Ref) bool) {
	m := p.begin()
	p.ringsOf(d, lookLow, keep)
	if m == p.begin() {
		return
	}
	p.op(m, Op{Kind: Fill, Colour: p.theme.LowFill, Ink: LowInk})
	p.again(p.hatched(at(p.theme.Ink, lowHatch), lowHatchGap, false))
	line := p.stroked(p.theme.Ink, StrokeStyle{Width: lowOutline})
	line.Ink = LowInk
	p.again(line)
}

// hatched returns a step that hatches; one line goes through the plan's origin, so hatches pan with the plan. The offset is
// brought near to 0, where float32 is fine.
func (p *pen) hatched(c color.NRGBA, gap float64, rising bool) Op {
	o := p.point(exact.Pt{})
	gap *= p.k
	offset := o.x - o.y
	if rising {
		offset = o.x + o.y
	}
	p.Hatches = append(p.Hatches, HatchStyle{Gap: float32(gap), Width: float32(hatchLine * p.k), Rising: rising,
		Offset: float32(math.Mod(offset, gap*math.Sqrt2))})
	return Op{Kind: Hatch, Colour: c, Style: int32(len(p.Hatches) - 1), Ink: LowInk}
}

func (p *pen) wallBodies(d *Drawing, keep func(plan.Ref) bool) {
	m := p.begin()
	p.ringsOf(d, lookWall, keep)
	p.op(m, Op{Kind: Fill, Colour: p.theme.Poche, Ink: HardInk})
	// Bodies too thin to see are made up to thinBody by a stroke around them.
	m = p.begin()
	least, wide := thinBody*p.k, 0.0
	for i := range d.bodies {
		b := &d.bodies[i]
		if b.look != lookWall || b.hidden || b.thick == 0 || !keep(b.item) {
			continue
		}
		if t := b.thick / exact.PerMM * p.cam.Scale; t < least {
			p.body(d, b)
			wide = max(wide, least-t)
		}
	}
	op := p.stroked(p.theme.Poche, StrokeStyle{Width: float32(wide / p.k)})
	op.Ink = HardInk
	p.op(m, op)
}

// linesOf adds the lines of one look.
func (p *pen) linesOf(d *Drawing, lk look, period float64, keep func(plan.Ref) bool) {
	for i := range d.lines {
		if ln := &d.lines[i]; ln.look == lk && !ln.hidden && keep(ln.item) {
			p.addLine(p.frame, p.chain(d, ln), period)
		}
	}
}

// chain returns the places of a line, until the next call.
func (p *pen) chain(d *Drawing, ln *inkLine) []place {
	line := p.work.ring[:0]
	for _, q := range d.pts[ln.pts[0]:ln.pts[1]] {
		line = append(line, p.point(q))
	}
	p.work.ring = line
	return line
}

func (p *pen) plainLines(d *Drawing, keep func(plan.Ref) bool) {
	m := p.begin()
	p.linesOf(d, lookWall, 0, keep)
	op := p.stroked(p.theme.Poche, StrokeStyle{Width: thinWall, Cap: Square})
	op.Ink = HardInk
	p.op(m, op)
	m = p.begin()
	p.linesOf(d, lookLow, 0, keep)
	op = p.stroked(p.theme.Ink, StrokeStyle{Width: lowOutline})
	op.Ink = LowInk
	p.op(m, op)
}

func (p *pen) screens(d *Drawing, keep func(plan.Ref) bool) {
	m := p.begin()
	const on, off = 7, 3.5
	p.linesOf(d, lookScreen, (on+off)*p.k, keep)
	op := p.stroked(p.theme.Ink, StrokeStyle{Width: screenLine, On: on, Off: off})
	op.Ink = HardInk
	p.op(m, op)
}

// glazing draws each straight piece as two lines, with a tick across at either third.
func (p *pen) glazing(d *Drawing, keep func(plan.Ref) bool) {
	m := p.begin()
	gap := max(glazingGap*p.cam.Scale, 1.5*p.k)
	for i := range d.lines {
		ln := &d.lines[i]
		if ln.look != lookGlazing || ln.hidden || !keep(ln.item) {
			continue
		}
		line := p.chain(d, ln)
		for j := 1; j < len(line); j++ {
			p.pane(line[j-1], line[j], gap)
		}
	}
	op := p.stroked(p.theme.Glazing, StrokeStyle{Width: glazingLine})
	op.Ink = HardInk
	p.op(m, op)
}

func (p *pen) pane(a, b place, gap float64) {
	u, length := vec(a).towards(vec(b))
	if length == 0 {
		return
	}
	n := place(u.left().times(gap))
	p.segment(place{a.x + n.x, a.y + n.y}, place{b.x + n.x, b.y + n.y})
	p.segment(place{a.x - n.x, a.y - n.y}, place{b.x - n.x, b.y - n.y})
	for _, t := range [...]float64{1. / 3, 2. / 3} {
		c := place{a.x + t*(b.x-a.x), a.y + t*(b.y-a.y)}
		p.segment(place{c.x + n.x, c.y + n.y}, place{c.x - n.x, c.y - n.y})
	}
}

// segment adds one straight line.
func (p *pen) segment(a, b place) {
	two := [2]place{a, b}
	p.addLine(p.frame, two[:], 0)
}
