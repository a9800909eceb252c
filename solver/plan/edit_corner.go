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
	d := draftOf(p)
	done := map[Corner]bool{}
	var walls []Ref
	for _, c := range m.Corners {
		for _, k := range d.sameCorner(c) {
			if done[k] {
				continue
			}
			done[k] = true
			if err := d.moveCorner(k, m.By); err != nil {
				return nil, err
			}
		}
		if c.Item.Kind == KindWall && !slices.Contains(walls, c.Item) {
			walls = append(walls, c.Item)
		}
	}
	for _, r := range walls {
		w, _ := d.new.Wall(r.ID)
		openings, err := fitted(d.new.obstacles.openings, &w)
		if err != nil {
			return nil, err
		}
		d.obstacles().openings = openings
	}
	return d.plan(), nil
}

// sameCorner returns the corner, and with the closing point of a closed wall its twin at the other end.
func (d *draft) sameCorner(c Corner) []Corner {
	w, ok := d.old.Wall(c.Item.ID)
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

func (d *draft) moveCorner(c Corner, by exact.Vec) error {
	r := c.Item
	turn := func(chain *Chain) error {
		if c.Index < 0 || c.Index >= chain.Len() {
			return errCorner
		}
		pts := chain.Points()
		if err := movePoint(&pts[c.Index], by); err != nil {
			return err
		}
		*chain = Chain{pts}
		return nil
	}
	var err error
	switch r.Kind {
	case KindFloor:
		if err = turn(&d.obstacles().floor); err != nil {
			err = fault(r.Kind, r.ID, err.Error())
		}
	case KindWall:
		d.obstacles().walls, err = changed(r, d.new.obstacles.walls, func(w *Wall) error { return turn(&w.Line) })
	case KindBlock:
		d.obstacles().blocks, err = changed(r, d.new.obstacles.blocks, func(b *Block) error {
			b.Circle = nil // it is round no more
			return turn(&b.Ring)
		})
	case KindZone:
		d.marks().zones, err = changed(r, d.new.marks.zones, func(z *Zone) error { return turn(&z.Ring) })
	case KindRoute:
		d.marks().routes, err = changed(r, d.new.marks.routes, func(t *Route) error { return turn(&t.Via) })
	default:
		err = fault(r.Kind, r.ID, "has no corners")
	}
	return err
}

// changed returns the list with one item changed; an error of the change gets the item's name.
func changed[T any, P identified[T]](r Ref, l list[T], change func(P) error) (list[T], error) {
	i := at[T, P](&l, r.ID)
	if i < 0 {
		return l, missing(r.Kind, r.ID)
	}
	e := l.edit()
	if err := change(e.at(i)); err != nil {
		return l, fault(r.Kind, r.ID, err.Error())
	}
	return e.list, nil
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
