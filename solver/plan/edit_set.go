package plan

import "strings"

// The setting edits replace the item with the same id.
type (
	SetWall     struct{ Wall }       // changes a wall; a shortened wall slides its openings along
	SetOpening  struct{ Opening }    // changes an opening
	SetBlock    struct{ Block }      // changes a block
	SetZone     struct{ Zone }       // changes a zone
	SetObserver struct{ Observer }   // changes an observer
	SetTarget   struct{ Target }     // changes a target
	SetStart    struct{ Start }      // changes a start
	SetRoute    struct{ Route }      // changes a route
	SetWalker   struct{ Walker }     // changes the walker
	SetFloor    struct{ Ring Chain } // draws the floor anew; an empty ring takes it away
	SetSheet    struct{ Sheet }      // changes what the plan says about itself
)

// Label says what the edit does.
func (s SetWall) Label() string { return "change wall" }

// Label says what the edit does.
func (s SetOpening) Label() string { return "change opening" }

// Label says what the edit does.
func (s SetBlock) Label() string { return "change block" }

// Label says what the edit does.
func (s SetZone) Label() string { return "change zone" }

// Label says what the edit does.
func (s SetObserver) Label() string { return "change observer" }

// Label says what the edit does.
func (s SetTarget) Label() string { return "change target" }

// Label says what the edit does.
func (s SetStart) Label() string { return "change start" }

// Label says what the edit does.
func (s SetRoute) Label() string { return "change route" }

// Label says what the edit does.
func (s SetWalker) Label() string { return "change walker" }

// Label says what the edit does.
func (s SetFloor) Label() string { return "draw floor" }

// Label says what the edit does.
func (s SetSheet) Label() string { return "change title" }

// Apply replaces the wall.
func (s SetWall) Apply(p *Plan) (*Plan, error) {
	walls, err := replaced(KindWall, p.obstacles.walls, s.Wall)
	if err != nil {
		return nil, err
	}
	openings, err := fitted(p.obstacles.openings, &s.Wall)
	if err != nil {
		return nil, err
	}
	d := draftOf(p)
	d.obstacles().walls, d.obstacles().openings = walls, openings
	return d.plan(), nil
}

// Apply replaces the opening.
func (s SetOpening) Apply(p *Plan) (*Plan, error) {
	list, err := replaced(KindOpening, p.obstacles.openings, s.Opening)
	if err != nil {
		return nil, err
	}
	return withOpenings(p, list, s.Opening)
}

// Apply replaces the block.
func (s SetBlock) Apply(p *Plan) (*Plan, error) {
	d := draftOf(p)
	var err error
	d.obstacles().blocks, err = replaced(KindBlock, p.obstacles.blocks, s.Block)
	return d.done(err)
}

// Apply replaces the zone.
func (s SetZone) Apply(p *Plan) (*Plan, error) {
	d := draftOf(p)
	var err error
	d.marks().zones, err = replaced(KindZone, p.marks.zones, s.Zone)
	return d.done(err)
}

// Apply replaces the observer.
func (s SetObserver) Apply(p *Plan) (*Plan, error) {
	d := draftOf(p)
	var err error
	d.marks().observers, err = replaced(KindObserver, p.marks.observers, s.Observer)
	return d.done(err)
}

// Apply replaces the target.
func (s SetTarget) Apply(p *Plan) (*Plan, error) {
	d := draftOf(p)
	var err error
	d.marks().targets, err = replaced(KindTarget, p.marks.targets, s.Target)
	return d.done(err)
}

// Apply replaces the start.
func (s SetStart) Apply(p *Plan) (*Plan, error) {
	d := draftOf(p)
	var err error
	d.marks().starts, err = replaced(KindStart, p.marks.starts, s.Start)
	return d.done(err)
}

// Apply replaces the route.
func (s SetRoute) Apply(p *Plan) (*Plan, error) {
	d := draftOf(p)
	var err error
	d.marks().routes, err = replaced(KindRoute, p.marks.routes, s.Route)
	return d.done(err)
}

// Apply replaces the walker.
func (s SetWalker) Apply(p *Plan) (*Plan, error) {
	if text := s.Walker.fault(); text != "" {
		return nil, fault(KindWalker, "", text)
	}
	d := draftOf(p)
	d.marks().walker = s.Walker
	return d.plan(), nil
}

// Apply replaces the floor.
func (s SetFloor) Apply(p *Plan) (*Plan, error) {
	if s.Ring.Len() > 0 {
		if text := chainFault(s.Ring, 3); text != "" {
			return nil, fault(KindFloor, "", text)
		}
	}
	d := draftOf(p)
	d.obstacles().floor = s.Ring
	return d.plan(), nil
}

// Apply replaces the sheet.
func (s SetSheet) Apply(p *Plan) (*Plan, error) {
	switch s.Unit {
	case "m", "cm", "mm", "ft":
	default:
		return nil, fault(KindPlan, "", "needs a display unit: m, cm, mm or ft")
	}
	if !strings.HasPrefix(s.Brief, "[") && s.Brief != "" {
		return nil, fault(KindPlan, "", "needs a brief that is a list")
	}
	d := draftOf(p)
	*d.sheet() = s.Sheet
	return d.plan(), nil
}

// done returns the plan, unless the edit failed.
func (d *draft) done(err error) (*Plan, error) {
	if err != nil {
		return nil, err
	}
	return d.plan(), nil
}
