package plan

// The adding edits give the item the next free id of its kind when it has none.
type (
	AddWall     struct{ Wall }     // draws a wall
	AddOpening  struct{ Opening }  // cuts an opening into a wall
	AddBlock    struct{ Block }    // draws a block
	AddZone     struct{ Zone }     // draws a zone
	AddObserver struct{ Observer } // places an observer
	AddTarget   struct{ Target }   // places a target
	AddStart    struct{ Start }    // places a start
	AddRoute    struct{ Route }    // draws a route
)

// Label names the kind of wall.
func (a AddWall) Label() string {
	return "draw " + [...]string{Solid: "wall", Glazing: "glazing", Screen: "screen", Low: "low wall"}[a.Kind]
}

// Label says what the edit does.
func (a AddOpening) Label() string {
	if a.Leaf == NoLeaf {
		return "cut gap"
	}
	return "cut door"
}

// Label says what the edit does.
func (a AddBlock) Label() string {
	if a.Circle != nil {
		return "draw column"
	}
	return "draw block"
}

// Label says what the edit does.
func (a AddZone) Label() string { return "draw zone" }

// Label says what the edit does.
func (a AddObserver) Label() string { return "place observer" }

// Label says what the edit does.
func (a AddTarget) Label() string { return "place target" }

// Label says what the edit does.
func (a AddStart) Label() string { return "place start" }

// Label says what the edit does.
func (a AddRoute) Label() string { return "draw route" }

// Added names the wall that applying the edit to p would add.
func (a AddWall) Added(p *Plan) Ref { return freshRef(p, KindWall, a.Wall.ID) }

// Added names the opening that applying the edit to p would add.
func (a AddOpening) Added(p *Plan) Ref { return freshRef(p, KindOpening, a.Opening.ID) }

// Added names the block that applying the edit to p would add.
func (a AddBlock) Added(p *Plan) Ref { return freshRef(p, KindBlock, a.Block.ID) }

// Added names the zone that applying the edit to p would add.
func (a AddZone) Added(p *Plan) Ref { return freshRef(p, KindZone, a.Zone.ID) }

// Added names the observer that applying the edit to p would add.
func (a AddObserver) Added(p *Plan) Ref { return freshRef(p, KindObserver, a.Observer.ID) }

// Added names the target that applying the edit to p would add.
func (a AddTarget) Added(p *Plan) Ref { return freshRef(p, KindTarget, a.Target.ID) }

// Added names the start that applying the edit to p would add.
func (a AddStart) Added(p *Plan) Ref { return freshRef(p, KindStart, a.Start.ID) }

// Added names the route that applying the edit to p would add.
func (a AddRoute) Added(p *Plan) Ref { return freshRef(p, KindRoute, a.Route.ID) }

func freshRef(p *Plan, kind Kind, id string) Ref {
	if id == "" {
		id = NextID(p, kind)
	}
	return Ref{kind, id}
}

// Apply adds the wall.
func (a AddWall) Apply(p *Plan) (*Plan, error) {
	d := draftOf(p)
	var err error
	d.obstacles().walls, err = added(KindWall, p.obstacles.walls, a.Wall)
	return d.done(err)
}

// Apply also asks whether the opening fits its wall beside the others.
func (a AddOpening) Apply(p *Plan) (*Plan, error) {
	list, err := added(KindOpening, p.obstacles.openings, a.Opening)
	if err != nil {
		return nil, err
	}
	return withOpenings(p, list, *list.at(list.n - 1))
}

// Apply adds the block.
func (a AddBlock) Apply(p *Plan) (*Plan, error) {
	d := draftOf(p)
	var err error
	d.obstacles().blocks, err = added(KindBlock, p.obstacles.blocks, a.Block)
	return d.done(err)
}

// Apply adds the zone.
func (a AddZone) Apply(p *Plan) (*Plan, error) {
	d := draftOf(p)
	var err error
	d.marks().zones, err = added(KindZone, p.marks.zones, a.Zone)
	return d.done(err)
}

// Apply adds the observer.
func (a AddObserver) Apply(p *Plan) (*Plan, error) {
	d := draftOf(p)
	var err error
	d.marks().observers, err = added(KindObserver, p.marks.observers, a.Observer)
	return d.done(err)
}

// Apply adds the target.
func (a AddTarget) Apply(p *Plan) (*Plan, error) {
	d := draftOf(p)
	var err error
	d.marks().targets, err = added(KindTarget, p.marks.targets, a.Target)
	return d.done(err)
}

// Apply adds the start.
func (a AddStart) Apply(p *Plan) (*Plan, error) {
	d := draftOf(p)
	var err error
	d.marks().starts, err = added(KindStart, p.marks.starts, a.Start)
	return d.done(err)
}

// Apply adds the route.
func (a AddRoute) Apply(p *Plan) (*Plan, error) {
	d := draftOf(p)
	var err error
	d.marks().routes, err = added(KindRoute, p.marks.routes, a.Route)
	return d.done(err)
}

// withOpenings returns the plan with another list of openings, of which one is new and must fit its wall.
func withOpenings(p *Plan, openings list[Opening], o Opening) (*Plan, error) {
	w, ok := p.Wall(o.Wall)
	if !ok {
		return nil, fault(KindOpening, o.ID, "names wall \""+o.Wall+"\", which is not in the plan")
	}
	if _, text := w.Fit(o); text != "" {
		return nil, fault(KindOpening, o.ID, text)
	}
	for _, q := range openings.refs() {
		if q.Wall == o.Wall && q.ID != o.ID && q.Over(o) {
			return nil, fault(KindOpening, o.ID, "would lie over opening "+q.ID)
		}
	}
	d := draftOf(p)
	d.obstacles().openings = openings
	return d.plan(), nil
}
