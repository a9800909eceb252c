package paint

import (
	"math"

	"enfilade/assets"
	"enfilade/canvas/view"
)

// Rulers, scale bar and title slip come last in the overlay: they stay in their place while the base under them is being
// shifted or redrawn.

func (p *pen) rulers() {
	left := float64(p.Left)
	w, h := float64(p.W), float64(p.H)
	free := len(p.Ops)
	m := p.begin()
	p.rect(0, 0, w, left)
	p.rect(0, left, left, h)
	p.fill(m, p.theme.Panel)
	u := unitOf(p.s.Plan)
	steps := view.RulerSteps(p.cam.Scale / p.k * u.mm)
	p.ticks(u, steps)
	p.rulerFigures(u, steps)
	// The corner hides what the two rulers have there.
	m = p.begin()
	p.rect(0, 0, left, left)
	p.fill(m, p.theme.Panel)
	line := math.Max(1, math.Round(p.k))
	m = p.begin()
	p.rect(0, left-line, w, left)
	p.rect(left-line, 0, left, left-line)
	p.rect(left-line, left, left, h)
	p.fill(m, p.theme.Rule)
	from := p.say()
	p.words(u.name)
	p.centred(p.said(from), left/2, 14*p.k, textLook{size: rulerText, weight: assets.Regular, colour: p.theme.Ink3})
	p.pointerMarks()
	for i := free; i < len(p.Ops); i++ {
		p.Ops[i].Free = true
	}
}

// eachTick calls f with the place of every mark of a ruler, counted in steps, along x or up along y.
func (p *pen) eachTick(u unit, step float64, up bool, f func(i, at float64)) {
	win := p.cam.Window(0)
	axis := 0
	if up {
		axis = 1
	}
	for i := math.Ceil(win.Min[axis] / u.mm / step); i*step*u.mm <= win.Max[axis]; i++ {
		var q [2]float64
		q[axis] = i * step * u.mm
		c := p.mm(q)
		if up {
			f(i, c.y)
		} else {
			f(i, c.x)
		}
	}
}

func (p *pen) ticks(u unit, s view.Steps) {
	m := p.begin()
	p.tickFamily(u, s.Minor, 3.5, s.Mid)
	p.tickFamily(u, s.Mid, 6.5, s.Major)
	p.fill(m, p.theme.Ink3)
	m = p.begin()
	p.tickFamily(u, s.Major, 9, 0)
	p.fill(m, p.theme.Ink3)
}

// tickFamily adds the marks at every step but those of the next longer family.
func (p *pen) tickFamily(u unit, step, length, but float64) {
	every := math.Round(but / step)
	edge := float64(p.Left) - math.Max(1, math.Round(p.k))
	wide := math.Max(1, math.Round(p.k))
	for axis := range 2 {
		p.eachTick(u, step, axis == 1, func(i, at float64) {
			if every > 0 && math.Mod(i, every) == 0 {
				return
			}
			at = math.Floor(at - wide/2 + 0.5)
			if axis == 0 {
				p.rect(at, math.Round(edge-length*p.k), at+wide, edge)
			} else {
				p.rect(math.Round(edge-length*p.k), at, edge, at+wide)
			}
		})
	}
}

// rulerFigures writes the figures: above the upper ruler's marks, and upwards beside those of the left one.
func (p *pen) rulerFigures(u unit, s view.Steps) {
	decimals := max(0, int(math.Ceil(-math.Log10(s.Label)-1e-9)))
	look := textLook{size: rulerText, weight: assets.Regular, colour: p.theme.Ink2}
	base := 11 * p.k
	for axis := range 2 {
		look.up = axis == 1
		p.eachTick(u, s.Label, axis == 1, func(i, at float64) {
			from := p.say()
			p.number(i*s.Label, decimals)
			t := p.said(from)
			half := p.width(t, look) / 2
			switch {
			case axis == 0 && at+5*p.k+half < float64(p.W) && at+5*p.k-half > float64(p.Left):
				p.centred(t, at+5*p.k, base, look)
			case axis == 1 && at-9*p.k+half < float64(p.H) && at-9*p.k-half > float64(p.Left):
				p.centred(t, base, at-9*p.k, look)
			}
		})
	}
}

// pointerMarks are two triangles on the rulers at the pointer.
func (p *pen) pointerMarks() {
	if p.s.Pointer == nil {
		return
	}
	x, y := p.s.Pointer[0], p.s.Pointer[1]
	left, side := float64(p.Left)-math.Max(1, math.Round(p.k)), 4*p.k
	m := p.begin()
	if x >= left && x <= float64(p.W) {
		p.move(x, left)
		p.line(x-side, left-1.5*side)
		p.line(x+side, left-1.5*side)
		p.close()
	}
	if y >= left && y <= float64(p.H) {
		p.move(left, y)
		p.line(left-1.5*side, y+side)
		p.line(left-1.5*side, y-side)
		p.close()
	}
	p.fill(m, p.theme.Ink)
}
