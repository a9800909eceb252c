package paint

import (
	"image/color"
	"slices"

	"enfilade/solver/plan"
	"enfilade/solver/study"
)

// Overlay lists what may change from frame to frame into l, which it empties first: the wash and border of the sight
// region, walks, marks, labels, outlines of what is hovered or selected, and last rulers, scale bar and title slip. It is
// drawn over the base of the same scene. A list that is used again makes no allocation and keeps labels where they were.
func Overlay(s *Scene, l *List) {
	p := newPen(s, l)
	p.findDrawings()
	p.within = Bounds(s.Plan)
	p.floorRing(s.resting())
	p.work.boxes, p.work.legs, p.work.labels = p.work.boxes[:0], p.work.legs[:0], p.work.labels[:0]
	p.work.edges = p.work.edges[:0]
	main := s.approachOf(s.Start, s.Target)
	if main != nil && (main.Problem != "" || !p.walkShown(main)) {
		main = nil
	}
	foot := p.setSlip()
	p.obstruct(main)
	p.obstructRoutes()
	if s.layer(LayerLabels) {
		p.placeLabels(main)
	}

	if s.layer(LayerRegions) {
		p.regions()
	}
	p.draggedLow()
	if s.layer(LayerRegions) {
		p.edges()
	}
	p.draggedBodies()
	p.writeLabels(true)
	p.routes()
	p.walks(main)
	p.marks()
	p.writeLabels(false)
	p.outlines()
	p.problems()
	p.drawSlip(foot)
	if s.layer(LayerRulers) {
		p.rulers()
	}
}

// heldKey says what List.memory.held was drawn from.
type heldKey struct {
	now, before *plan.Obstacles
	parts       int
}

// findDrawings finds or makes the drawing of the resting plan, and that of what is dragged.
func (p *pen) findDrawings() {
	shown := p.s.resting()
	switch {
	case p.s.Drawing != nil:
		// It may lag behind the plan by the frames a new base takes; labels only keep off its ink.
		p.drawing = p.s.Drawing
	case p.memory.drawing.fits(shown):
		p.drawing = p.memory.drawing
	default:
		p.drawing = NewDrawing(shown)
		p.memory.drawing = p.drawing
	}
	if p.s.Old == nil || p.s.Old.Obstacles() == p.s.Plan.Obstacles() {
		return
	}
	key := heldKey{p.s.Plan.Obstacles(), shown.Obstacles(), len(p.s.Dragged)}
	if p.memory.held == nil || p.memory.heldOf != key {
		if held := p.heldRefs(); held != nil {
			p.memory.held, p.memory.heldOf = NewDrawing(heldPlan(held, p.s.Plan)), key
		}
	}
	p.held = p.memory.held
}

// heldRefs returns the obstacles that the drag may reshape. They are the same in all its frames, and finding them looks at every
// wall, so they are kept.
func (p *pen) heldRefs() map[plan.Ref]bool {
	m, resting := &p.memory, p.s.resting()
	if m.heldIn != resting.Obstacles() || !slices.Equal(m.dragged, p.s.Dragged) {
		m.heldIn, m.dragged = resting.Obstacles(), append(m.dragged[:0], p.s.Dragged...)
		m.heldRefs = heldBy(p.s, resting)
	}
	return m.heldRefs
}

// draggedLow draws dragged low bodies in their new place; they lie under region edges as all low bodies do.
func (p *pen) draggedLow() {
	if p.held == nil {
		return
	}
	p.ghosts()
	held := p.heldRefs()
	first := len(p.Ops)
	p.lowBodies(p.held, func(ref plan.Ref) bool { return held[ref] })
	p.above(first)
}

// draggedBodies draws dragged walls, lines and doors in their new place.
func (p *pen) draggedBodies() {
	if p.held == nil {
		return
	}
	held := p.heldRefs()
	keep := func(ref plan.Ref) bool { return held[ref] }
	first := len(p.Ops)
	p.wallBodies(p.held, keep)
	p.plainLines(p.held, keep)
	p.glazing(p.held, keep)
	p.screens(p.held, keep)
	p.doors(p.held, keep)
	p.above(first)
}

// above makes the steps from the given one on lie over the base's ink: in an overlay Ink says under which ink a step lies.
func (p *pen) above(first int) {
	for i := first; i < len(p.Ops); i++ {
		p.Ops[i].Ink = NoInk
	}
}

// ghosts draws the old place of dragged bodies and lines, faintly.
func (p *pen) ghosts() {
	d := p.drawing
	keep := p.s.dragged
	first := len(p.Ops)
	for _, lk := range [...]look{lookWall, lookLow} {
		m := p.begin()
		p.ringsOf(d, lk, keep)
		p.fill(m, at(p.theme.Poche, faint))
	}
	for _, lk := range [...]look{lookWall, lookLow, lookGlazing, lookScreen} {
		m := p.begin()
		p.linesOf(d, lk, 0, keep)
		p.stroke(m, at(p.theme.Poche, faint), screenLine)
	}
	p.above(first)
}

// walkShown reports whether neither end of a walk is hidden or gone.
func (p *pen) walkShown(a *study.Approach) bool {
	s, ok1 := p.s.Plan.Start(a.Start)
	t, ok2 := p.s.Plan.Target(a.Target)
	return ok1 && ok2 && !s.Hidden && !t.Hidden
}

// walks draws approaches: the chosen one whole, those that are shown beside it thin.
func (p *pen) walks(main *study.Approach) {
	if p.s.Result == nil {
		return
	}
	for i := range p.s.Result.Approaches {
		a := &p.s.Result.Approaches[i]
		if !p.s.layer(LayerApproaches) || !p.s.beside(a) || !p.walkShown(a) {
			continue
		}
		target, _ := p.s.Plan.Target(a.Target)
		p.otherApproach(a)
		if a.Status == study.StatusApproach {
			p.firstSight(p.mm(a.FirstSight), p.inView(a, target), FirstSightSmall, FirstSightSmall+1.6, p.theme.Red)
		}
	}
	target, ok := p.s.Plan.Target(p.s.Target)
	if main == nil || !ok {
		return
	}
	if p.s.layer(LayerFullWalks) {
		p.fullWalk(main)
	}
	if p.s.layer(LayerSightLines) {
		p.sight(main)
	}
	if !p.s.layer(LayerApproaches) {
		return
	}
	p.approach(main)
	p.tightMark(main)
	if main.Status != study.StatusNone {
		p.firstSight(p.mm(main.FirstSight), p.inView(main, target), FirstSight, FirstSightHalo, p.theme.Red)
	}
}

// marks draws targets, starts and observers; what is dragged also faintly in its old place.
func (p *pen) marks() {
	p.ghostMarks()
	seen, seenIn := p.seen()
	for _, t := range p.s.Plan.Targets() {
		if t.Hidden || !p.shows(p.targetPlace(t)) {
			continue
		}
		ring := p.theme.Ink
		if t.ID == p.s.Target {
			ring = p.theme.Red
		}
		var dot *color.NRGBA
		for _, id := range seen {
			if id == t.ID {
				dot = &seenIn
			}
		}
		p.target(t, ring, dot, 1)
	}
	for _, s := range p.s.Plan.Starts() {
		if !s.Hidden && p.shows(p.mat(s)) {
			p.start(s, 1)
		}
	}
	for i, o := range p.s.Plan.Observers() {
		if !o.Hidden && p.shows(p.point(o.At)) {
			r := p.s.sightOf(o.ID)
			p.observer(o, colourOf(o, i), o.ID == p.s.Observer, r != nil && r.Problem != "", 1)
		}
	}
}

// seen returns the targets that the chosen observer sees, and its colour.
func (p *pen) seen() ([]string, color.NRGBA) {
	for i, o := range p.s.Plan.Observers() {
		if r := p.s.sightOf(o.ID); o.ID == p.s.Observer && r != nil {
			return r.TargetsSeen, p.theme.ObserverColour(colourOf(o, i))
		}
	}
	return nil, color.NRGBA{}
}

func (p *pen) ghostMarks() {
	if p.s.Old == nil {
		return
	}
	for _, t := range p.s.Old.Targets() {
		if !t.Hidden && p.s.dragged(plan.Ref{Kind: plan.KindTarget, ID: t.ID}) && p.shows(p.targetPlace(t)) {
			p.target(t, p.theme.Ink, nil, faint)
		}
	}
	for _, s := range p.s.Old.Starts() {
		if !s.Hidden && p.s.dragged(plan.Ref{Kind: plan.KindStart, ID: s.ID}) && p.shows(p.mat(s)) {
			p.start(s, faint)
		}
	}
	for i, o := range p.s.Old.Observers() {
		if !o.Hidden && p.s.dragged(plan.Ref{Kind: plan.KindObserver, ID: o.ID}) && p.shows(p.point(o.At)) {
			p.observer(o, colourOf(o, i), false, false, faint)
		}
	}
}

// writeLabels draws the labels that have found a place: the names of rooms, or all others.
func (p *pen) writeLabels(rooms bool) {
	for _, lb := range p.work.labels {
		if lb.room == rooms {
			mid := place{lb.at.x + p.width(lb.text, lb.look)/2, lb.at.y - 0.36*lb.look.size*p.k}
			lb.look.onGround = !p.onFloor(mid)
			p.put(lb.text, lb.at.x, lb.at.y, lb.look)
		}
	}
}

// problems draws a ring about each faulty spot.
func (p *pen) problems() {
	if p.s.Result == nil {
		return
	}
	for i := range p.s.Result.Problems {
		if pr := &p.s.Result.Problems[i]; ringed(pr) && p.shows(p.point(pr.At)) {
			p.problemRing(pr.At)
		}
	}
}
