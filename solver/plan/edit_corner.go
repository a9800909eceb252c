package plan

import (
	"slices"

	"enfilade/solver/exact"
)

// Corner is one corner of an item: a point of a wall's line, of a block's or zone's ring, or of the floor.
type Corner struct {
	Item  Ref
	Index int
}

// MoveCorner moves one corner to a place. A closed wall stays closed. With Along set, the corners of all walls that lie at
// the same point come along, so that walls that meet there go on meeting.
type MoveCorner struct {
	Corner
	To    exact.Pt
	Along bool
}

// MoveCorners moves several corners by one vector.
type MoveCorners struct {
	Corners []Corner
	By      exact.Vec
}

// Label says what the edit does.
func (m MoveCorner) Label() string { return "move corner" }

// Label says what the edit does.
func (m MoveCorners) Label() string { return "move corner" }

// Apply fails when there is no such corner, the place is out of range, or an opening fits its wall no more.
func (m MoveCorner) Apply(p *Plan) (*Plan, error) {
	c, err := p.chain(m.Item)
	if err != nil {
		return nil, err
	}
	if m.Index < 0 || m.Index >= c.Len() {
		return nil, fault(m.Item.Kind, m.Item.ID, "has no such corner")
	}
	if !InRange(m.To) {
		return nil, fault(m.Item.Kind, m.Item.ID, outOfRange)
	}
	from := c.At(m.Index)
	corners := []Corner{m.Corner}
	if m.Along {
		corners = append(corners, p.wallCornersAt(from, m.Corner)...)
	}
	return MoveCorners{corners, m.To.Sub(from)}.Apply(p)
}

// wallCornersAt returns the corners of walls at a point, but for one.
func (p *Plan) wallCornersAt(at exact.Pt, but Corner) []Corner {
	var list []Corner
	for _, w := range p.obstacles.walls.refs() {
		for k, q := range w.Line.pts {
			if q != at {
				continue
			}
			if c := (Corner{Ref{KindWall, w.ID}, k}); c != but {
				list = append(list, c)
			}
		}
	}
	return list
}

// Apply moves each corner once, however often it is listed, or none when one is missing, out of range, or an opening fits its
// wall no more.
func (m MoveCorners) Apply(p *Plan) (*Plan, error) {
	o, k := p.obstacles, p.marks
	c := cornerMover{draft: draftOf(p), by: m.By, walls: o.walls.edit(), blocks: o.blocks.edit(), zones: k.zones.edit(), routes: k.routes.edit()}
	done := map[Corner]bool{}
	var walls []int
	for _, corner := range m.Corners {
		for _, twin := range p.sameCorner(corner) {
			if done[twin] {
				continue
			}
			done[twin] = true
			if err := c.move(twin); err != nil {
				return nil, err
			}
		}
		if i := p.place(corner.Item); corner.Item.Kind == KindWall && !slices.Contains(walls, i) {
			walls = append(walls, i)
		}
	}
	return c.plan(walls)
}

// sameCorner returns the corner, and with the closing point of a closed wall its twin at the other end.
func (p *Plan) sameCorner(c Corner) []Corner {
	w, ok := p.Wall(c.Item.ID)
	if c.Item.Kind != KindWall || !ok || !w.Line.Closed() {
		return []Corner{c}
	}
	switch last := w.Line.Len() - 1; c.Index {
	case 0:
		return []Corner{c, {c.Item, last}}
	case last:
		return []Corner{c, {c.Item, 0}}
	}
	return []Corner{c}
}

// cornerMover moves corners.
type cornerMover struct {
	draft  *draft
	by     exact.Vec
	walls  listEdit[Wall]
	blocks listEdit[Block]
	zones  listEdit[Zone]
	routes listEdit[Route]
}

func (m *cornerMover) move(c Corner) error {
	chain, err := m.chain(c.Item)
	if err != nil {
		return err
	}
	if c.Index < 0 || c.Index >= chain.Len() {
		return fault(c.Item.Kind, c.Item.ID, errCorner.Error())
	}
	pts := chain.Points()
	if err := movePoint(&pts[c.Index], m.by); err != nil {
		return fault(c.Item.Kind, c.Item.ID, err.Error())
	}
	*chain = Chain{pts}
	return nil
}

// chain returns an item's corners, to be replaced.
func (m *cornerMover) chain(r Ref) (*Chain, error) {
	i := m.draft.old.place(r)
	if i < 0 && r.Kind != KindFloor {
		return nil, missing(r.Kind, r.ID)
	}
	switch r.Kind {
	case KindFloor:
		return &m.draft.obstacles().floor, nil
	case KindWall:
		return &m.walls.at(i).Line, nil
	case KindBlock:
		b := m.blocks.at(i)
		b.Circle = nil // it is round no more
		return &b.Ring, nil
	case KindZone:
		return &m.zones.at(i).Ring, nil
	case KindRoute:
		return &m.routes.at(i).Via, nil
	}
	return nil, fault(r.Kind, r.ID, "has no corners")
}

// plan returns the plan with the corners moved; the openings of the walls at some places are made to fit.
func (m *cornerMover) plan(walls []int) (*Plan, error) {
	d := m.draft
	openings := d.old.obstacles.openings
	for _, i := range walls {
		var err error
		if openings, err = fitted(openings, m.walls.list.at(i)); err != nil {
			return nil, err
		}
	}
	if m.walls.touched() || m.blocks.touched() {
		o := d.obstacles()
		o.walls, o.blocks, o.openings = m.walls.list, m.blocks.list, openings
	}
	if m.zones.touched() || m.routes.touched() {
		k := d.marks()
		k.zones, k.routes = m.zones.list, m.routes.list
	}
	return d.plan(), nil
}

// chain returns an item's corners.
func (p *Plan) chain(r Ref) (Chain, error) {
	switch r.Kind {
	case KindFloor:
		return p.obstacles.floor, nil
	case KindWall:
		if i := at(&p.obstacles.walls, r.ID); i >= 0 {
			return p.obstacles.walls.at(i).Line, nil
		}
	case KindBlock:
		if i := at(&p.obstacles.blocks, r.ID); i >= 0 {
			return p.obstacles.blocks.at(i).Ring, nil
		}
	case KindZone:
		if i := at(&p.marks.zones, r.ID); i >= 0 {
			return p.marks.zones.at(i).Ring, nil
		}
	case KindRoute:
		if i := at(&p.marks.routes, r.ID); i >= 0 {
			return p.marks.routes.at(i).Via, nil
		}
	default:
		return Chain{}, fault(r.Kind, r.ID, "has no corners")
	}
	return Chain{}, missing(r.Kind, r.ID)
}
