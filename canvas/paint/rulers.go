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
			if axis == 0 {
				p.centred(p.said(from), at+5*p.k, base, look)
			} else {
				p.centred(p.said(from), base, at-9*p.k, look)
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

// scaleBar stands at the lower left, under the plan's edge as long as that is in view.
func (p *pen) scaleBar() {
	u := unitOf(p.s.Plan)
	if p.cam.Scale <= 0 {
		return
	}
	perUnit := p.cam.Scale / p.k * u.mm
	length := view.BarSteps(perUnit)
	w := length * perUnit * p.k
	x, y := p.barLeft(w), float64(p.H)-24*p.k
	x, y = math.Round(x), math.Round(y)
	h := math.Round(5 * p.k)
	m := p.begin()
	p.rect(x, y, x+w, y+h)
	p.fill(m, p.theme.Poche)
	inset := math.Max(1, math.Round(p.k))
	m = p.begin()
	for i := 1; i < 5; i += 2 {
		p.rect(math.Round(x+w*float64(i)/5), y+inset, math.Round(x+w*float64(i+1)/5), y+h-inset)
	}
	p.fill(m, p.theme.Floor)
	look := textLook{size: rulerText, weight: assets.Regular, colour: p.theme.Ink2}
	base := y + h + 11*p.k
	decimals := max(0, int(math.Ceil(-math.Log10(length/5)-1e-9)))
	from := p.say()
	p.words("0")
	p.centred(p.said(from), x+3*p.k, base, look)
	from = p.say()
	p.number(length/5, decimals)
	p.centred(p.said(from), x+w/5, base, look)
	from = p.say()
	p.number(length, 0)
	if length != math.Trunc(length) {
		p.Chars = p.Chars[:from]
		p.number(length, decimals)
	}
	p.words(" ")
	p.words(u.name)
	p.centred(p.said(from), x+w, base, look)
}

func (p *pen) barLeft(w float64) float64 {
	least := float64(p.Left) + 24*p.k
	b := p.within
	if b.Max[0] < b.Min[0] {
		return least
	}
	return min(max(p.mm(b.Min).x, least), max(least, float64(p.W)/2-w))
}

// titleSlip stands at the lower right: the plan's title, its place, and in whose plane of the eye all is seen.
func (p *pen) titleSlip() {
	sheet := p.s.Plan.Sheet()
	right := float64(p.W) - 24*p.k
	if b := p.within; b.Max[0] >= b.Min[0] {
		right = max(min(right, p.mm(b.Max).x), float64(p.W)/2)
	}
	base := float64(p.H) - 12*p.k
	from := p.say()
	if sheet.Place != "" {
		p.words(sheet.Place)
		p.words(" · ")
	}
	p.eyePlane()
	small := textLook{size: placeText, weight: assets.Regular, colour: p.theme.Ink2}
	t := p.said(from)
	w := p.width(t, small)
	p.put(t, right-w, base, small)
	if sheet.Title == "" {
		return
	}
	from = p.say()
	p.words(sheet.Title)
	big := textLook{size: titleText, weight: assets.Semibold, colour: p.theme.Ink}
	t = p.said(from)
	p.put(t, right-w-12*p.k-p.width(t, big), base, big)
}

// eyePlane says at which height sight is solved: the chosen observer's eye for its region, the walker's for approaches.
func (p *pen) eyePlane() {
	u := unitOf(p.s.Plan)
	if u.mm == 1000 {
		u.decimals = 2
	}
	walker := p.s.Plan.Walker().Eye
	o, ok := p.s.Plan.Observer(p.s.Observer)
	p.words("in the plane of the eye, ")
	switch {
	case ok && o.Eye != walker:
		p.distance(float64(o.Eye)/10, u)
		p.words(", walker ")
		p.distance(float64(walker)/10, u)
	default:
		p.distance(float64(walker)/10, u)
	}
}
