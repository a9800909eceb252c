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
	gone := p.pick(e.Items)
	for i, r := range e.Items {
		if !r.Kind.moves() {
			return nil, fault(r.Kind, r.ID, "cannot be deleted")
		}
		if i == gone.lost {
			return nil, missing(r.Kind, r.ID)
		}
	}
	d := draftOf(p)
	if gone.some(KindFloor) {
		d.obstacles().floor = Chain{}
	}
	if gone.some(KindUnderlay) {
		d.sheet().Underlay = nil
	}
	o, m := p.obstacles, p.marks
	walls, w := o.walls.without(func(i int, _ *Wall) bool { return gone.at(KindWall, i) })
	openings, c := o.openings.without(func(i int, o *Opening) bool { return gone.at(KindOpening, i) || gone.has(KindWall, o.Wall) })
	blocks, b := o.blocks.without(func(i int, _ *Block) bool { return gone.at(KindBlock, i) })
	if w || c || b {
		n := d.obstacles()
		n.walls, n.openings, n.blocks = walls, openings, blocks
	}
	zones, z := m.zones.without(func(i int, _ *Zone) bool { return gone.at(KindZone, i) })
	observers, v := m.observers.without(func(i int, _ *Observer) bool { return gone.at(KindObserver, i) })
	targets, t := m.targets.without(func(i int, _ *Target) bool { return gone.at(KindTarget, i) })
	starts, s := m.starts.without(func(i int, _ *Start) bool { return gone.at(KindStart, i) })
	routes, r := m.routes.without(func(i int, r *Route) bool {
		return gone.at(KindRoute, i) || gone.has(KindStart, r.From) || gone.has(KindTarget, r.To)
	})
	if z || v || t || s || r {
		n := d.marks()
		n.zones, n.observers, n.targets, n.starts, n.routes = zones, observers, targets, starts, routes
	}
	return d.plan(), nil
}

// Has reports whether the item is in the plan. The plan itself and the walker always are.
func (p *Plan) Has(r Ref) bool { return p.place(r) >= 0 }
