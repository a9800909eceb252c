package tool

import (
	"math"
	"slices"

	"enfilade/canvas/pick"
	"enfilade/solver/exact"
	"enfilade/solver/plan"
)

// dragEdit returns the edit a drag means with the pointer where it is, nil when it comes to nothing.
func dragEdit(h Host, g *grip, e Pointer) (plan.Edit, *pick.Snap) {
	switch {
	case locked(h.Plan(), g.hit.Ref):
		return nil, nil
	case g.hit.Part == pick.Heading:
		return turnEdit(h, g, e), nil
	case g.hit.Part == pick.Corner:
		return cornerEdit(h, g, e)
	case g.hit.Ref.Kind == plan.KindOpening:
		return slideEdit(h, g, e), nil
	case len(h.Selection()) == 1 && g.hit.Ref.Kind == plan.KindTarget:
		return targetEdit(h, g, e)
	case len(h.Selection()) == 1 && g.hit.Ref.Kind == plan.KindStart:
		return startEdit(h, g, e)
	}
	return moveEdit(h, g, e)
}

// turnEdit points the observer at the pointer, in whole degrees, with Shift in steps of 15.
func turnEdit(h Host, g *grip, e Pointer) plan.Edit {
	o, ok := h.Plan().Observer(g.hit.Ref.ID)
	at := h.Camera().Grid(e.X, e.Y)
	if !ok || at == o.At {
		return nil
	}
	deg := math.Atan2(float64(at.Y)-float64(o.At.Y), float64(at.X)-float64(o.At.X)) * 180 / math.Pi
	step := 1.0
	if e.Shift {
		step = 15
	}
	deg = math.Mod(math.Round(deg/step)*step+360, 360)
	g.heading = deg
	o.Heading = deg
	return relabelled{plan.SetObserver{Observer: o}, "turn observer"}
}

// cornerEdit moves the corner and every corner that lies on it.
func cornerEdit(h Host, g *grip, e Pointer) (plan.Edit, *pick.Snap) {
	corners := pick.CornersAt(h.Plan(), g.hit.At)
	skip := func(r plan.Ref) bool {
		return slices.ContainsFunc(corners, func(c plan.Corner) bool { return c.Item == r })
	}
	from := g.hit.At
	snap := h.Snapper().At(h.Plan(), h.Camera(), e.X, e.Y, pick.SnapTo{Free: e.Ctrl, Skip: skip, From: &from})
	g.to = snap.At
	if snap.At == g.hit.At || len(corners) == 0 {
		return nil, &snap
	}
	return plan.MoveCorners{Corners: corners, By: snap.At.Sub(g.hit.At)}, &snap
}

// moveEdit moves the selected items so that the held one's anchor snaps.
func moveEdit(h Host, g *grip, e Pointer) (plan.Edit, *pick.Snap) {
	refs := movable(h.Plan(), h.Selection())
	if len(refs) == 0 {
		return nil, nil
	}
	anchor := anchorOf(h, g)
	ax, ay := h.Camera().Pixel(anchor)
	to := pick.SnapTo{Free: e.Ctrl, Skip: func(r plan.Ref) bool { return slices.Contains(refs, r) }, From: &anchor}
	var snap pick.Snap
	if g.hit.Ref.Kind == plan.KindObserver {
		// Eyes stand on floor: a wall's line lies inside its body, so they snap to the grid alone.
		snap = h.Snapper().At(plan.New(), h.Camera(), ax+e.X-g.x, ay+e.Y-g.y, pick.SnapTo{Free: e.Ctrl})
	} else {
		snap = h.Snapper().At(h.Plan(), h.Camera(), ax+e.X-g.x, ay+e.Y-g.y, to)
	}
	g.to = snap.At
	if snap.At == anchor {
		return nil, &snap
	}
	return plan.MoveItems{Items: refs, By: snap.At.Sub(anchor)}, &snap
}

// anchorOf returns the point of the held item that snaps: a mark's own place, else the corner nearest to where it is held.
func anchorOf(h Host, g *grip) exact.Pt {
	c, ok := pick.Points(h.Plan(), g.hit.Ref)
	if !ok {
		return g.hit.At
	}
	best := c.At(0)
	for _, q := range c.All() {
		if exact.Dist2(g.from, q) < exact.Dist2(g.from, best) {
			best = q
		}
	}
	return best
}

// slideEdit moves an opening along its wall.
func slideEdit(h Host, g *grip, e Pointer) plan.Edit {
	o, ok := h.Plan().Opening(g.hit.Ref.ID)
	w, found := h.Plan().Wall(o.Wall)
	if !ok || !found || o.Segment < 0 || o.Segment+1 >= w.Line.Len() {
		return nil
	}
	a, b := w.Line.At(o.Segment), w.Line.At(o.Segment+1)
	step := gridStep(h, e)
	by := alongOf(h, a, b, e.X, e.Y) - alongOf(h, a, b, g.x, g.y)
	at := int32(math.Round((float64(o.At)+by)/float64(step))) * step
	at = max(0, min(at, int32(exact.Dist(a, b))-o.Width))
	if at == o.At {
		return nil
	}
	o.At = at
	return relabelled{plan.SetOpening{Opening: o}, "move opening"}
}

// alongOf returns how far along the line from a to b the pixel place lies, in grid units.
func alongOf(h Host, a, b exact.Pt, x, y float64) float64 {
	v, w := b.Sub(a), h.Camera().Grid(x, y).Sub(a)
	return float64(v.Dot(w)) / math.Sqrt(float64(v.Len2()))
}

// targetEdit moves a target; near a face it sticks to it and takes its normal.
func targetEdit(h Host, g *grip, e Pointer) (plan.Edit, *pick.Snap) {
	p, ok := h.Plan().Target(g.hit.Ref.ID)
	if !ok {
		return nil, nil
	}
	at, normal, snap := targetPlace(h, e)
	g.to = at
	if at == p.At {
		return nil, snap
	}
	p.At, p.Normal = at, normal
	return relabelled{plan.SetTarget{Target: p}, "move target"}, snap
}

// startEdit moves a start; in an opening it takes the threshold.
func startEdit(h Host, g *grip, e Pointer) (plan.Edit, *pick.Snap) {
	p, ok := h.Plan().Start(g.hit.Ref.ID)
	if !ok {
		return nil, nil
	}
	at, facing, snap := startPlace(h, e)
	if facing == nil {
		facing = p.Facing
	}
	g.to = at
	if at == p.At {
		return nil, snap
	}
	p.At, p.Facing = at, facing
	return relabelled{plan.SetStart{Start: p}, "move start"}, snap
}

// draggedBy returns the items whose picture follows the pointer.
func draggedBy(h Host, g *grip) []plan.Ref {
	if g.hit.Part == pick.Corner {
		var out []plan.Ref
		for _, c := range pick.CornersAt(h.Plan(), g.hit.At) {
			if !slices.Contains(out, c.Item) {
				out = append(out, c.Item)
			}
		}
		return out
	}
	if g.hit.Part == pick.Heading || g.hit.Ref.Kind == plan.KindOpening {
		return []plan.Ref{g.hit.Ref}
	}
	return movable(h.Plan(), h.Selection())
}

// dragLabel is the measure beside the pointer.
func dragLabel(h Host, g *grip) string {
	if g.edit == nil {
		return ""
	}
	switch g.hit.Part {
	case pick.Heading:
		return degrees(g.heading) + "°"
	case pick.Corner:
		return h.FormatLength(exact.Dist(g.hit.At, g.to))
	}
	if g.hit.Ref.Kind == plan.KindOpening {
		return ""
	}
	return h.FormatLength(exact.Dist(anchorOf(h, g), g.to))
}

// movable returns the refs without what is locked, and without openings, which go with their walls.
func movable(p *plan.Plan, refs []plan.Ref) []plan.Ref {
	return slices.DeleteFunc(slices.Clone(refs), func(r plan.Ref) bool { return r.Kind == plan.KindOpening || locked(p, r) })
}
