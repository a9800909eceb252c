package paint

import (
	"math"

	"enfilade/assets"
	"enfilade/canvas/view"
)

// slip is the line at the foot of the picture: a scale bar at the left and the plan's title at the right, each under the
// plan's edge as long as that is in view and the plan fills half the picture, else at the picture's sides: under a plan that
// is just being begun they would wander with every wall. They never lie over each other.
type slip struct {
	unit       unit
	bar        box
	units      float64 // length of the bar
	barless    bool
	title      text
	note       text // place, and in whose plane of the eye all is seen
	titleAt, x float64
	base       float64
}

// slipMargin is the least distance of the slip from the picture's sides, in px at 100 %.
const slipMargin = 24

var (
	slipFigures = textLook{size: rulerText, weight: assets.Regular, halo: labelHalo}
	slipTitle   = textLook{size: titleText, weight: assets.Semibold, halo: labelHalo}
	slipNote    = textLook{size: placeText, weight: assets.Regular, halo: labelHalo}
)

// setSlip works out where bar and title stand, and keeps labels off them.
func (p *pen) setSlip() slip {
	s := slip{unit: unitOf(p.s.Plan)}
	perUnit := p.cam.Scale / p.k * s.unit.mm
	s.units = view.BarSteps(perUnit)
	left, right := float64(p.Left)+slipMargin*p.k, float64(p.W)-slipMargin*p.k
	x0, x1 := left, right
	if b := p.within; b.Max[0] >= b.Min[0] {
		from, to := max(p.mm(b.Min).x, left), min(p.mm(b.Max).x, right)
		if to-from >= (right-left)/2 {
			x0, x1 = from, to
		}
	}
	wide := s.units * perUnit * p.k
	x0 = math.Round(max(min(x0, float64(p.W)/2-wide), left))
	y := math.Round(float64(p.H) - 24*p.k)
	s.bar = box{x0, y, x0 + wide, y + math.Round(5*p.k)}
	s.base = float64(p.H) - 12*p.k

	free := s.bar.x1 + 30*p.k // the title keeps to the right of this
	p.slipWords(&s, right-free)
	note, title := p.width(s.note, slipNote), p.width(s.title, slipTitle)
	if free+note > right { // no room for both: what must be said stays
		s.barless, free = true, left
	}
	gap := 12 * p.k
	if s.title[0] == s.title[1] {
		gap = 0
	}
	x1 = min(max(x1, free+title+gap+note), right)
	s.x = x1 - note
	s.titleAt = s.x - gap - title
	p.work.boxes = append(p.work.boxes,
		box{s.bar.x0 - 4*p.k, s.bar.y0 - 3*p.k, s.bar.x1 + 14*p.k, float64(p.H)},
		box{s.titleAt - 6*p.k, s.base - 15*p.k, x1 + 4*p.k, float64(p.H)})
	return s
}

// slipWords writes the title's words; where there is no room the place goes first, then the title.
func (p *pen) slipWords(s *slip, room float64) {
	sheet := p.s.Plan.Sheet()
	from := p.say()
	p.words(sheet.Title)
	s.title = p.said(from)
	from = p.say()
	if sheet.Place != "" {
		p.words(sheet.Place)
		p.words(" · ")
	}
	plane := p.say()
	if p.within.Max[0] >= p.within.Min[0] { // in an empty plan nothing is seen
		p.eyePlane()
	}
	s.note = p.said(from)
	if p.width(s.note, slipNote)+p.width(s.title, slipTitle) > room {
		s.note[0] = plane
	}
	if p.width(s.note, slipNote)+p.width(s.title, slipTitle) > room {
		s.title[1] = s.title[0]
	}
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
	if ok && o.Eye != walker {
		p.distance(float64(o.Eye)/10, u)
		p.words(", walker ")
	}
	p.distance(float64(walker)/10, u)
}

func (p *pen) drawSlip(s slip) {
	if !s.barless {
		p.drawBar(s)
	}
	for _, run := range [...]struct {
		text text
		x    float64
		look textLook
	}{{s.title, s.titleAt, slipTitle}, {s.note, s.x, slipNote}} {
		run.look.colour = p.theme.Ink2
		if run.look.weight == assets.Semibold {
			run.look.colour = p.theme.Ink
		}
		run.look.onGround = !p.onFloor(place{run.x, s.base})
		p.put(run.text, run.x, s.base, run.look)
	}
}

func (p *pen) drawBar(s slip) {
	x, y, w, h := s.bar.x0, s.bar.y0, s.bar.x1-s.bar.x0, s.bar.y1-s.bar.y0
	m := p.begin()
	p.rect(x, y, math.Round(x+w), y+h)
	p.fill(m, p.theme.Poche)
	line := math.Max(1, math.Round(p.k))
	m = p.begin()
	for i := 1; i < 5; i += 2 {
		p.rect(math.Round(x+w*float64(i)/5), y+line, math.Round(x+w*float64(i+1)/5), y+h-line)
	}
	p.fill(m, p.theme.Floor)
	decimals := max(0, int(math.Ceil(-math.Log10(s.units/5)-1e-9)))
	base := y + h + 10*p.k
	look := slipFigures
	look.colour = p.theme.Ink2
	look.onGround = !p.onFloor(place{x, base})
	from := p.say()
	p.words("0")
	p.centred(p.said(from), x+3*p.k, base, look)
	from = p.say()
	p.number(s.units/5, decimals)
	p.centred(p.said(from), x+w/5, base, look)
	from = p.say()
	if s.units == math.Trunc(s.units) {
		decimals = 0
	}
	p.number(s.units, decimals)
	p.words(" ")
	p.words(s.unit.name)
	p.centred(p.said(from), x+w, base, look)
}
