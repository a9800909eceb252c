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
	case g.handle():
		return handleEdit(h, g, e)
	case g.hit.Part == pick.Corner:
		return cornerEdit(h, g, e)
	case g.hit.Ref == theUnderlay:
		return carryEdit(h, g), nil
	case g.hit.Ref.Kind == plan.KindOpening:
		return slideEdit(h, g, e), nil
	case len(h.Selection()) == 1 && g.hit.Ref.Kind == plan.KindTarget:
		return targetEdit(h, g, e)
	case len(h.Selection()) == 1 && g.hit.Ref.Kind == plan.KindStart:
		return startEdit(h, g, e)
	}
	return moveEdit(h, g, e)
}

// handle reports whether a handle of a mark is held.
func (g *grip) handle() bool { return g.hit.Part != pick.Body && g.hit.Part != pick.Corner }

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
	refs := g.moving(h)
	if len(refs) == 0 {
		return nil, nil
	}
	anchor := anchorOf(h, g)
	ax, ay := h.Camera().Pixel(anchor)
	to := pick.SnapTo{Free: e.Ctrl, Skip: g.moves.Has, From: &anchor}
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

// slideEdit moves an opening along its wall, or into another one under the pointer.
func slideEdit(h Host, g *grip, e Pointer) plan.Edit {
	o, ok := h.Plan().Opening(g.hit.Ref.ID)
	w, found := h.Plan().Wall(o.Wall)
	if !ok || !found || o.Segment < 0 || o.Segment+1 >= w.Line.Len() {
		return nil
	}
	a, b := w.Line.At(o.Segment), w.Line.At(o.Segment+1)
	step := gridStep(h, e)
	old := o
	if p, ok := pick.WallAt(h.Plan(), h.Camera(), e.X, e.Y, step); ok && (p.Wall != o.Wall || p.Segment != o.Segment) && p.Length >= o.Width {
		o.Wall, o.Segment = p.Wall, p.Segment
		o.At = max(0, min(p.Along-o.Width/2, p.Length-o.Width))
		a, b = p.A, p.B
	} else {
		by := alongOf(h, a, b, e.X, e.Y) - alongOf(h, a, b, g.x, g.y)
		at := int32(math.Round((float64(o.At)+by)/float64(step))) * step
		o.At = max(0, min(at, int32(exact.Dist(a, b))-o.Width))
	}
	if o == old {
		return nil
	}
	rest := int32(exact.Dist(a, b)) - o.At - o.Width
	g.label = h.FormatLength(float64(o.At)) + "  |  " + h.FormatLength(float64(o.Width)) + "  |  " + h.FormatLength(float64(rest))
	g.to = along(a, b, (float64(o.At)+float64(o.Width)/2)/exact.Dist(a, b))
	return Named("move opening", plan.SetOpening{Opening: o})
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
	to, snap := (&Mark{Kind: plan.KindTarget}).facePlace(h, e)
	g.to = to.at
	if to.at == pick.TargetAt(p) {
		return nil, snap
	}
	p.At, p.Normal = to.at, to.facing
	if p.Face != nil {
		face := carried(*p.Face, to.at, to.face)
		p.Face, p.Normal, p.At = &face, nil, along(face[0], face[1], 0.5)
	}
	return relabelled{plan.SetTarget{Target: p}, "move target"}, snap
}

// startEdit moves a start; in an opening it takes the threshold.
func startEdit(h Host, g *grip, e Pointer) (plan.Edit, *pick.Snap) {
	p, ok := h.Plan().Start(g.hit.Ref.ID)
	if !ok {
		return nil, nil
	}
	to, snap := (&Mark{Kind: plan.KindStart}).startPlace(h, e)
	if to.facing == nil {
		to.facing = p.Facing
	}
	g.to = to.at
	if to.at == p.At {
		return nil, snap
	}
	p.At, p.Facing = to.at, to.facing
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
	if g.handle() || g.hit.Ref.Kind == plan.KindOpening {
		return []plan.Ref{g.hit.Ref}
	}
	return g.moving(h)
}

// moving returns what moves when the selection is dragged.
func (g *grip) moving(h Host) []plan.Ref {
	if g.refs == nil {
		g.refs = movable(h.Plan(), h.Selection())
		g.moves = h.Plan().SetOf(g.refs)
	}
	return g.refs
}

// dragLabel is the measure beside the pointer.
func dragLabel(h Host, g *grip) string {
	if g.edit == nil {
		return ""
	}
	switch {
	case g.label != "":
		return g.label
	case g.hit.Part == pick.Corner:
		return h.FormatLength(exact.Dist(g.hit.At, g.to))
	}
	return h.FormatLength(exact.Dist(anchorOf(h, g), g.to))
}

// movable returns the refs without what is locked, and without openings, which go with their walls.
func movable(p *plan.Plan, refs []plan.Ref) []plan.Ref {
	return slices.DeleteFunc(slices.Clone(refs), func(r plan.Ref) bool { return r.Kind == plan.KindOpening || locked(p, r) })
}
