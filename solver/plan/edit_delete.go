package plan

// Delete takes items out of the plan. The openings of a wall go with it, and the routes from a start or to a target.
type Delete struct{ Items []Ref }

// Label names the item when there is but one.
func (e Delete) Label() string {
	if len(e.Items) == 1 {
		return "delete " + e.Items[0].Kind.String()
	}
	return "delete items"
}

// Apply fails when an item is not in the plan.
func (e Delete) Apply(p *Plan) (*Plan, error) {
	gone := make(map[Ref]bool, len(e.Items))
	for _, r := range e.Items {
		if !r.Kind.moves() {
			return nil, fault(r.Kind, r.ID, "cannot be deleted")
		}
		if !p.Has(r) {
			return nil, missing(r.Kind, r.ID)
		}
		gone[r] = true
	}
	d := draftOf(p)
	if gone[Ref{Kind: KindFloor}] {
		d.obstacles().floor = Chain{}
	}
	if gone[Ref{Kind: KindUnderlay}] {
		d.sheet().Underlay = nil
	}
	o, m := p.obstacles, p.marks
	walls, w := o.walls.without(func(w *Wall) bool { return gone[Ref{KindWall, w.ID}] })
	openings, c := o.openings.without(func(o *Opening) bool {
		return gone[Ref{KindOpening, o.ID}] || gone[Ref{KindWall, o.Wall}]
	})
	blocks, b := o.blocks.without(func(b *Block) bool { return gone[Ref{KindBlock, b.ID}] })
	if w || c || b {
		n := d.obstacles()
		n.walls, n.openings, n.blocks = walls, openings, blocks
	}
	zones, z := m.zones.without(func(z *Zone) bool { return gone[Ref{KindZone, z.ID}] })
	observers, v := m.observers.without(func(o *Observer) bool { return gone[Ref{KindObserver, o.ID}] })
	targets, t := m.targets.without(func(t *Target) bool { return gone[Ref{KindTarget, t.ID}] })
	starts, s := m.starts.without(func(s *Start) bool { return gone[Ref{KindStart, s.ID}] })
	routes, r := m.routes.without(func(r *Route) bool {
		return gone[Ref{KindRoute, r.ID}] || gone[Ref{KindStart, r.From}] || gone[Ref{KindTarget, r.To}]
	})
	if z || v || t || s || r {
		n := d.marks()
		n.zones, n.observers, n.targets, n.starts, n.routes = zones, observers, targets, starts, routes
	}
	return d.plan(), nil
}

// Has reports whether the item is in the plan. The plan itself and the walker always are.
func (p *Plan) Has(r Ref) bool {
	switch r.Kind {
	case KindFloor:
		return r.ID == "" && p.obstacles.floor.Len() > 0
	case KindWall:
		return at(&p.obstacles.walls, r.ID) >= 0
	case KindOpening:
		return at(&p.obstacles.openings, r.ID) >= 0
	case KindBlock:
		return at(&p.obstacles.blocks, r.ID) >= 0
	case KindZone:
		return at(&p.marks.zones, r.ID) >= 0
	case KindObserver:
		return at(&p.marks.observers, r.ID) >= 0
	case KindTarget:
		return at(&p.marks.targets, r.ID) >= 0
	case KindStart:
		return at(&p.marks.starts, r.ID) >= 0
	case KindRoute:
		return at(&p.marks.routes, r.ID) >= 0
	case KindUnderlay:
		return r.ID == "" && p.sheet.Underlay != nil
	}
	return r.ID == ""
}
