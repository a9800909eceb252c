package paint

import (
	"image/color"
	"math"

	"github.com/paulmach/orb"

	"enfilade/canvas/view"
	"enfilade/solver/exact"
	"enfilade/solver/plan"
	"enfilade/solver/study"
)

// faint is the strength of the old place of what is being dragged.
const faint = 0.22

// observer draws an eye: a disc with a slot along its heading; a ring for the second four colours. A narrow view has an arc,
// the chosen one a ring and a handle to turn it by. An eye that stands in something is hollow, with a bar.
func (p *pen) observer(o plan.Observer, colour int, chosen, hollow bool, strength float64) {
	c := at(p.theme.ObserverColour(colour), strength)
	t := p.turtleAt(p.point(o.At), o.Heading)
	if strength == 1 {
		m := p.begin()
		p.disc(t.at, ObserverHalo*p.k)
		p.fill(m, p.theme.Floor)
	}
	m := p.begin()
	switch {
	case hollow:
		p.disc(t.at, 7.7*p.k)
		p.strip(turtle{t.at, math.Sqrt2 / 2, -math.Sqrt2 / 2, p.k}, [2]float64{-7.7, 0}, [2]float64{7.7, 0})
		p.op(m, p.stroked(c, StrokeStyle{Width: 1.6}))
	case Open(colour):
		gap := math.Asin(ObserverSlot / 2 / 7.0)
		p.arcOf(t.at, 7*p.k, t.angle()+gap, 2*math.Pi-2*gap)
		p.op(m, p.stroked(c, StrokeStyle{Width: 3}))
		m = p.begin()
		p.disc(t.at, 2*p.k)
		p.fill(m, c)
	default:
		p.slottedDisc(t, ObserverRadius, ObserverSlot)
		p.fill(m, c)
	}
	if o.View < 360 && !hollow {
		m = p.begin()
		half := o.View / 2 * math.Pi / 180
		p.arcOf(t.at, ViewArc*p.k, t.angle()-half, 2*half)
		p.op(m, p.stroked(c, StrokeStyle{Width: 1.3}))
	}
	if chosen && strength == 1 {
		p.observerHandle(t, c)
	}
}

func (p *pen) observerHandle(t turtle, c color.NRGBA) {
	ring := p.stroked(c, StrokeStyle{Width: 1.3})
	m := p.begin()
	p.disc(t.at, ObserverRing*p.k)
	p.strip(t, [2]float64{ObserverRing, 0}, [2]float64{HandleDistance - HandleRadius, 0})
	p.op(m, ring)
	m = p.begin()
	p.disc(t.to(HandleDistance, 0), HandleRadius*p.k)
	p.fill(m, p.theme.Floor)
	p.again(ring)
}

// HandlePlace returns the middle of the handle that turns an observer, in device pixels.
func HandlePlace(cam view.Camera, o plan.Observer) (x, y float64) {
	x, y = cam.Pixel(o.At)
	sin, cos := math.Sincos(o.Heading * math.Pi / 180)
	return x + HandleDistance*cam.K*cos, y - HandleDistance*cam.K*sin
}

// targetPoint returns a target's place in grid units: the middle of its face, or its point.
func targetPoint(t plan.Target) vec {
	if t.Face != nil {
		return vecOf(t.Face[0]).plus(vecOf(t.Face[1])).times(0.5)
	}
	return vecOf(t.At)
}

func (p *pen) targetPlace(t plan.Target) place { return p.grid(targetPoint(t)) }

// inView returns what of a target is in view where an approach ends: a target's point, or the part of its face that comes into
// sight, past what hides the rest.
func (p *pen) inView(a *study.Approach, t plan.Target) place {
	if a.Asked.Face && a.Status != study.StatusNone {
		return p.mm(a.SightTo)
	}
	return p.targetPlace(t)
}

// targetNormal returns the direction a target is looked at against, in degrees of the plan; ok is false when it hangs on
// nothing and names none.
func (p *pen) targetNormal(t plan.Target) (degrees float64, ok bool) {
	switch {
	case t.Face != nil:
		v := t.Face[1].Sub(t.Face[0]).Left()
		return math.Atan2(float64(v.Y), float64(v.X)) * 180 / math.Pi, true
	case t.Normal != nil:
		return *t.Normal, true
	}
	return p.drawing.ink.normal(vecOf(t.At))
}

// target draws a ring on the wall's face and a tick along its normal; a dot in the observer's colour when it is seen.
func (p *pen) target(t plan.Target, ring color.NRGBA, dot *color.NRGBA, strength float64) {
	c := p.targetPlace(t)
	normal, hung := p.targetNormal(t)
	tt := p.turtleAt(c, normal)
	ring = at(ring, strength)
	if t.Face != nil {
		m := p.begin()
		p.segment(p.point(t.Face[0]), p.point(t.Face[1]))
		for _, end := range t.Face {
			p.strip(p.turtleAt(p.point(end), normal), [2]float64{0, 0}, [2]float64{FaceEnd, 0})
		}
		p.op(m, p.stroked(ring, StrokeStyle{Width: 2}))
	}
	m := p.begin()
	p.disc(c, TargetRadius*p.k)
	p.fill(m, at(p.theme.Floor, strength))
	p.again(p.stroked(ring, StrokeStyle{Width: 1.8}))
	if hung {
		m = p.begin()
		p.strip(tt, [2]float64{TargetRadius, 0}, [2]float64{TargetTick, 0})
		p.op(m, p.stroked(ring, StrokeStyle{Width: 1.6}))
	}
	if dot != nil {
		m = p.begin()
		p.disc(c, TargetDot*p.k)
		p.fill(m, at(*dot, strength))
	}
}

// MatPlace returns the middle of a start's mat in device pixels: before the point when the start has a facing, else on it.
func MatPlace(cam view.Camera, s plan.Start) (x, y float64) {
	x, y = cam.Pixel(s.At)
	if s.Facing == nil {
		return x, y
	}
	d := max(MatDistance*cam.Scale, MatLeast*cam.K)
	sin, cos := math.Sincos(*s.Facing * math.Pi / 180)
	return x - d*cos, y + d*sin
}

func (p *pen) mat(s plan.Start) place {
	x, y := MatPlace(p.cam, s)
	return place{x, y}
}

// startHeading returns the direction a walk leaves a start in, in degrees of the plan: its facing, or that of the chosen walk.
func (p *pen) startHeading(s plan.Start) float64 {
	if s.Facing != nil {
		return *s.Facing
	}
	if a := p.s.approachOf(s.ID, p.s.Target); a != nil && len(a.Points) > 1 {
		d := orb.Point{a.Points[1][0] - a.Points[0][0], a.Points[1][1] - a.Points[0][1]}
		return math.Atan2(d[1], d[0]) * 180 / math.Pi
	}
	return 0
}

// start draws a mat with a chevron that points the way in.
func (p *pen) start(s plan.Start, strength float64) {
	t := p.turtleAt(p.mat(s), p.startHeading(s))
	ink, red := at(p.theme.Ink, strength), at(p.theme.Red, strength)
	m := p.begin()
	p.roundRect(t, MatWidth+3, MatLength+3, 3)
	p.fill(m, at(p.theme.Floor, strength))
	m = p.begin()
	p.roundRect(t, MatWidth, MatLength, 2)
	p.op(m, p.stroked(ink, StrokeStyle{Width: 1.3}))
	m = p.begin()
	for _, bar := range [...]float64{-5, 5} {
		p.strip(t, [2]float64{bar, -10}, [2]float64{bar, 10})
	}
	p.op(m, p.stroked(at(ink, 0.55), StrokeStyle{Width: 0.7}))
	m = p.begin()
	p.strip(t, [2]float64{-2.5, -5}, [2]float64{2.5, 0}, [2]float64{-2.5, 5})
	p.op(m, p.stroked(red, StrokeStyle{Width: 2, Cap: RoundCap, Join: RoundJoin}))
}

// problemRing draws the ring on a faulty spot.
func (p *pen) problemRing(q exact.Pt) {
	m := p.begin()
	p.disc(p.point(q), ProblemRadius*p.k)
	p.op(m, p.stroked(p.theme.Red, StrokeStyle{Width: 1.8}))
}
