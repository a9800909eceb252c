package paint

import (
	"math"
	"strconv"
	"strings"

	"github.com/paulmach/orb"

	"enfilade/assets"
	"enfilade/solver/plan"
	"enfilade/solver/study"
)

// Labels find their places here, by rank; nothing is drawn yet. First the glyphs and routes that they keep off.

// obstruct collects what labels must not touch.
func (p *pen) obstruct(main *study.Approach) {
	s := p.s
	for _, o := range s.Plan.Observers() {
		if o.Hidden {
			continue
		}
		c, r := p.point(o.At), ObserverHalo
		if o.ID == s.Observer {
			r = ObserverRing + 1
			x, y := HandlePlace(p.cam, o)
			p.taken(place{x, y}, HandleRadius+1, HandleRadius+1)
			p.routeLeg(c, place{x, y})
		}
		p.taken(c, r, r)
	}
	for _, t := range s.Plan.Targets() {
		if t.Hidden {
			continue
		}
		c := p.targetPlace(t)
		p.taken(c, TargetRadius+1, TargetRadius+1)
		if n, ok := p.targetNormal(t); ok {
			tip := p.turtleAt(c, n).to(TargetTick-2, 0)
			p.taken(tip, 2.5, 2.5)
		}
	}
	for _, st := range s.Plan.Starts() {
		if !st.Hidden {
			hw, hh := p.matHalf(st)
			p.taken(p.mat(st), hw+1, hh+1)
		}
	}
	if main != nil {
		p.obstructWalk(main)
	}
	if r := s.shownRegion(); r != nil {
		p.bordered(r)
	}
}

func (p *pen) obstructWalk(a *study.Approach) {
	p.routed(a.Points)
	p.routed(a.FullPoints)
	p.obstructGap(a)
	if a.Status == study.StatusNone {
		if from, to, ok := p.blockedEnds(a); ok {
			p.routeLeg(from, to)
			p.taken(from, 9, 9)
		}
		return
	}
	p.taken(p.mm(a.FirstSight), FirstSightHalo, FirstSightHalo)
	if t, ok := p.s.Plan.Target(a.Target); ok {
		p.routeLeg(p.mm(a.FirstSight), p.inView(a, t))
	}
}

// matHalf returns half the extent of a start's mat along x and y, in px at 100 %.
func (p *pen) matHalf(s plan.Start) (w, h float64) {
	sin, cos := math.Sincos(p.startHeading(s) * math.Pi / 180)
	sin, cos = math.Abs(sin), math.Abs(cos)
	return MatWidth/2*cos + MatLength/2*sin, MatWidth/2*sin + MatLength/2*cos
}

// placeLabels lets every label find its place, highest rank first.
func (p *pen) placeLabels(main *study.Approach) {
	p.problemTexts()
	if main != nil {
		p.placeFirstSight(main)
	}
	p.placeRoutes()
	for _, st := range p.s.Plan.Starts() {
		if !st.Hidden && p.shows(p.mat(st)) {
			p.placeStart(st)
		}
	}
	for _, t := range p.s.Plan.Targets() {
		if !t.Hidden && p.shows(p.targetPlace(t)) {
			p.placeTarget(t, main)
		}
	}
	for i, o := range p.s.Plan.Observers() {
		if !o.Hidden && p.shows(p.point(o.At)) {
			p.placeLetter(o, i)
		}
	}
	if main != nil {
		p.placeFigures(main)
	}
	for _, z := range p.s.Plan.Zones() {
		if z.Room && !z.Hidden && z.Name != "" {
			p.placeRoom(z)
		}
	}
	if main != nil && main.Status == study.StatusApproach {
		p.placeTicks(main)
	}
	p.placeContours()
}

// problemTexts says beside every ring what is wrong; what would help comes after a semicolon and is left to the form, for a
// long line finds no place that hides nothing.
func (p *pen) problemTexts() {
	if p.s.Result == nil {
		return
	}
	look := p.walkFigure(labelText, assets.Medium)
	for i := range p.s.Result.Problems {
		pr := &p.s.Result.Problems[i]
		if !ringed(pr) || !p.shows(p.point(pr.At)) {
			continue
		}
		from := p.say()
		id := ""
		if len(pr.Items) > 0 {
			id = pr.Items[0].ID
			p.words(p.s.nameOf(pr.Items[0]))
			p.words(" ")
		}
		what, _, _ := strings.Cut(pr.Text, "; ")
		p.words(what)
		t := p.said(from)
		r := ring8{side: 21, up: 21, down: 21, dx: 15, dUp: 14, dDown: 14}
		p.settle(labelKey{rankProblem, id}, t, look, p.around(p.point(pr.At), r, east, t, look), true)
	}
}

// nameOf returns what a person calls a part of the plan: its name, or its id where it has none.
func (s *Scene) nameOf(ref plan.Ref) string {
	name := ""
	switch ref.Kind {
	case plan.KindObserver:
		o, _ := s.Plan.Observer(ref.ID)
		name = o.Name
	case plan.KindTarget:
		t, _ := s.Plan.Target(ref.ID)
		name = t.Name
	case plan.KindStart:
		st, _ := s.Plan.Start(ref.ID)
		name = st.Name
	}
	if name == "" {
		return ref.ID
	}
	return name
}

// ringed reports whether a problem is marked in the drawing: all but the note that a mark was moved by less than a
// millimetre.
func ringed(pr *plan.Problem) bool { return pr.Kind != plan.ProblemMoved }

// placeFirstSight labels the mark of first sight with the length of the walk to it, or says why there is none.
func (p *pen) placeFirstSight(a *study.Approach) {
	u := unitOf(p.s.Plan)
	look := p.walkFigure(labelText, assets.Semibold)
	from := p.say()
	if a.Status == study.StatusNone {
		at, target, ok := p.blockedEnds(a)
		if !ok || !p.shows(at) {
			return
		}
		if p.words(a.Reason); a.Reason == "" {
			p.words("no way to first sight")
		}
		t := p.said(from)
		r := ring8{side: 13, up: 13, down: 13, dx: 10, dUp: 8, dDown: 8}
		p.settle(labelKey{rankFirstSight, ""}, t, look, p.around(at, r, octant(target.y-at.y, at.x-target.x), t, look), true)
		return
	}
	at := p.mm(a.FirstSight)
	if !p.shows(at) {
		return
	}
	if a.Status == study.StatusSeen {
		p.askedOf(a.Asked, "in sight", " in sight")
		p.words(" at the start")
	} else {
		p.askedOf(a.Asked, "first sight", " seen")
		p.words(" · ")
		p.distance(a.Length, u)
	}
	t := p.said(from)
	r := ring8{side: 13, up: 14, down: 14, dx: 12, dUp: 8, dDown: 8}
	p.settle(labelKey{rankFirstSight, ""}, t, look, p.around(at, r, p.awayFromWalk(a, at), t, look), true)
}

// askedOf says how much of a face has come into view, or the plain words where any part of it counts.
func (p *pen) askedOf(a study.Asked, plain, seen string) {
	switch {
	case a.Face && a.Seen == plan.SeenAll:
		p.words("whole face")
	case a.Face && a.Seen == plan.SeenShare:
		decimals := 0
		if s := 100 * a.Share; s != math.Trunc(s) {
			decimals = 1
		}
		p.number(100*a.Share, decimals)
		p.words(" % of face")
	default:
		p.words(plain)
		return
	}
	p.words(seen)
}

// awayFromWalk returns the corner place about first sight that lies most away from the walk and from the sight line; of two
// that are about as far, the earlier in reading.
func (p *pen) awayFromWalk(a *study.Approach, at place) int {
	in := vec{}
	if n := len(a.Points); n > 1 {
		u, _ := vec(at).towards(vec(p.mm(a.Points[n-2])))
		in = in.plus(u)
	}
	if t, ok := p.s.Plan.Target(a.Target); ok {
		u, _ := vec(at).towards(vec(p.inView(a, t)))
		in = in.plus(u)
	}
	best, least := northWest, math.Inf(1)
	for _, dir := range [...]int{northWest, northEast, southWest, southEast} {
		if t := towards(in, dir); t < least-0.3 {
			best, least = dir, t
		}
	}
	return best
}

// towards says how much a vector points to one of the eight places.
func towards(v vec, dir int) float64 {
	sin, cos := math.Sincos(float64(dir) * math.Pi / 4)
	return v.x*cos + v.y*sin
}

// placeStart puts a start's name to the right of the person who walks in.
func (p *pen) placeStart(s plan.Start) {
	from := p.say()
	p.words(s.Name)
	t := p.said(from)
	look := textLook{size: labelText, weight: assets.Semibold, colour: p.theme.Ink, halo: labelHalo}
	sin, cos := math.Sincos(p.startHeading(s) * math.Pi / 180)
	w, h := p.matHalf(s)
	r := ring8{side: w + 5, up: h + 6, down: h + 6, dx: -w, dUp: h + 6, dDown: h + 6}
	p.settle(labelKey{rankStart, s.ID}, t, look, p.around(p.mat(s), r, octant(sin, cos), t, look), true)
}

// placeTarget puts a target's name off its face; that of the walk's target on the side away from the walk.
func (p *pen) placeTarget(t plan.Target, main *study.Approach) {
	c := p.targetPlace(t)
	from := p.say()
	p.words(t.Name)
	name := p.said(from)
	look := textLook{size: labelText, weight: assets.Medium, colour: p.theme.Ink, halo: labelHalo}
	first := north
	if normal, ok := p.targetNormal(t); ok {
		sin, cos := math.Sincos(normal * math.Pi / 180)
		first = octant(cos, -sin)
	}
	if t.ID == p.s.Target {
		look.weight, look.colour, look.halo = assets.Semibold, p.theme.Red, redHalo
		if main != nil {
			first = p.sideAway(main, c, first)
		}
	}
	r := ring8{side: 22, up: 21, down: 21, dx: 9, dUp: 12, dDown: 12}
	p.settle(labelKey{rankTarget, t.ID}, name, look, p.around(c, r, first, name, look), true)
}

// sideAway returns the corner place beside the normal that lies away from where the walk and the sight line come in.
func (p *pen) sideAway(a *study.Approach, c place, normal int) int {
	in := vec{}
	if n := len(a.FullPoints); n > 1 {
		in, _ = vec(c).towards(vec(p.mm(a.FullPoints[n-2])))
	}
	if a.Status != study.StatusNone {
		u, d := vec(c).towards(vec(p.mm(a.FirstSight)))
		if d > 0 {
			in = in.plus(u)
		}
	}
	left, right := (normal+7)%8, (normal+1)%8
	if towards(in, left) <= towards(in, right) {
		return left
	}
	return right
}

// placeLetter puts an observer's letter above it.
func (p *pen) placeLetter(o plan.Observer, i int) {
	from := p.say()
	p.letter(i)
	t := p.said(from)
	look := textLook{size: letterText, weight: assets.Bold, colour: p.theme.ObserverColour(colourOf(o, i)), halo: labelHalo}
	r := ring8{side: 19, up: 20, down: 20, dx: 13, dUp: 13, dDown: 13}
	p.settle(labelKey{rankLetter, o.ID}, t, look, p.around(p.point(o.At), r, north, t, look), false)
}

// letter appends the name of observer i: A to Z, then AA and on.
func (l *List) letter(i int) {
	if i >= 26 {
		l.letter(i/26 - 1)
	}
	l.Chars = append(l.Chars, byte('A'+i%26))
}

// placeFigures puts the length of the sight line and of the full walk beside them.
func (p *pen) placeFigures(a *study.Approach) {
	u := unitOf(p.s.Plan)
	look := p.walkFigure(figureText, assets.Medium)
	if t, ok := p.s.Plan.Target(a.Target); ok && a.Status == study.StatusApproach {
		from := p.say()
		p.words("sight ")
		p.distance(a.SightLine, u)
		run := p.said(from)
		line := append(p.work.route[:0], p.mm(a.FirstSight), p.inView(a, t))
		p.settle(labelKey{rankFigure, "sight"}, run, look, p.along(line, run, look), false)
		p.work.route = line
	}
	if a.HasFullWalk && len(a.FullPoints) > 1 {
		from := p.say()
		p.words("full walk ")
		p.distance(a.FullWalk, u)
		run := p.said(from)
		line := p.work.route[:0]
		for _, q := range a.FullPoints {
			line = append(line, p.mm(q))
		}
		p.settle(labelKey{rankFigure, "walk"}, run, look, p.along(line, run, look), false)
		p.work.route = line
	}
	p.placeGap(a)
}

// along returns spots beside a line: at its middle and then further from it, on the lower side first.
func (p *pen) along(line []place, t text, look textLook) []place {
	total := 0.0
	for i := 1; i < len(line); i++ {
		total += math.Hypot(line[i].x-line[i-1].x, line[i].y-line[i-1].y)
	}
	w := p.width(t, look)
	spots := p.work.spots[:0]
	for _, share := range [...]float64{0.5, 0.42, 0.58, 0.34, 0.66, 0.26, 0.74, 0.82, 0.18} {
		c, u := onLine(line, share*total)
		n := u.left()
		if n.y < 0 {
			n = n.times(-1)
		}
		for _, side := range [...]float64{1, -1} {
			spots = append(spots, p.beside(c, n.times(side), w, look))
		}
	}
	p.work.spots = spots
	return spots
}

// beside returns the spot of a text whose box just clears a line through c that runs square to n.
func (p *pen) beside(c place, n vec, w float64, look textLook) place {
	s := look.size * p.k
	h := 0.94 * s
	d := math.Abs(n.x)*w/2 + math.Abs(n.y)*h/2 + 4.5*p.k
	return place{c.x + n.x*d - w/2, c.y + n.y*d + 0.74*s - h/2}
}

// onLine returns the point so many pixels along a line, and the line's direction there.
func onLine(line []place, run float64) (place, vec) {
	u := vec{1, 0}
	for i := 1; i < len(line); i++ {
		a, b := line[i-1], line[i]
		v, length := vec(a).towards(vec(b))
		if length > 0 {
			u = v
		}
		if run <= length {
			return place{a.x + u.x*run, a.y + u.y*run}, u
		}
		run -= length
	}
	return line[len(line)-1], u
}

// placeTicks puts the metres beside every fifth tick of the approach.
func (p *pen) placeTicks(a *study.Approach) {
	u := unitOf(p.s.Plan)
	step := p.tickStep(u)
	look := p.walkFigure(tickText, assets.Semibold)
	eachTickOf(a.Points, step*u.mm, func(i int, q orb.Point, dir vec) {
		c := p.mm(q)
		if i%5 != 0 || !p.frame.holds(c.x, c.y) {
			return
		}
		from := p.say()
		p.number(float64(i)*step, 0)
		p.words(" ")
		p.words(u.name)
		t := p.said(from)
		w := p.width(t, look)
		n := vec{dir.x, -dir.y}.left() // on the picture y points down
		if n.y < 0 {
			n = n.times(-1)
		}
		spots := p.work.spots[:0]
		for _, side := range [...]float64{1, -1} {
			out := n.times(side * fifthLength / 2 * p.k)
			spots = append(spots, p.beside(place{c.x + out.x, c.y + out.y}, n.times(side), w, look))
		}
		p.work.spots = spots
		p.settle(labelKey{rankTick, strconv.Itoa(i)}, t, look, spots, false)
	})
}
