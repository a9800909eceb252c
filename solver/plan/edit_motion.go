package plan

import (
	"errors"
	"math"

	"enfilade/solver/exact"
)

// motion carries the plane onto itself: a turn or a reflection.
type motion struct {
	what  string                          // what it does to an item, for messages: "rotated"
	point func(exact.Pt) (exact.Pt, bool) // rounded to the grid once; false beyond the legal range
	angle func(deg float64) float64
	flips bool // left and right change places
	whole bool // it takes grid points to grid points, so nothing is rounded
}

// carrier is a motion under way.
type carrier struct {
	mover
	motion
}

// apply carries the items, each once however often it is listed, or instead of them copies of theirs. Openings go with their
// wall and keep their place along it.
func (m motion) apply(p *Plan, items []Ref, copies bool) (*Plan, error) {
	if copies {
		paste := Paste{Clip: Extract(p, items)}
		q, err := paste.Apply(p)
		if err != nil {
			return nil, err
		}
		p, items = q, paste.Added(p)
	}
	c := carrier{mover{draft: draftOf(p), moving: p.pick(items)}, m}
	for _, r := range items {
		if !r.Kind.moves() || r.Kind == KindUnderlay && m.flips {
			return nil, fault(r.Kind, r.ID, "cannot be "+m.what)
		}
	}
	if err := errors.Join(c.obstacles(), c.marks(), c.sheet()); err != nil {
		return nil, firstError(err)
	}
	if i := c.moving.lost; i >= 0 {
		return nil, missing(items[i].Kind, items[i].ID)
	}
	return c.draft.plan(), nil
}

func (c *carrier) obstacles() error {
	old := c.draft.old.obstacles
	if c.moving.some(KindFloor) {
		if err := c.ring(&c.draft.obstacles().floor); err != nil {
			return fault(KindFloor, "", err.Error())
		}
	}
	walls, some, err := moved(&c.mover, KindWall, old.walls, c.wall)
	if err != nil {
		return err
	}
	if some {
		c.draft.obstacles().walls = walls
	}
	blocks, some, err := moved(&c.mover, KindBlock, old.blocks, c.block)
	if err != nil {
		return err
	}
	if some {
		c.draft.obstacles().blocks = blocks
	}
	return c.openings()
}

// openings checks that openings go only where their walls go, and hangs doors on the other side when left and right have
// changed places.
func (c *carrier) openings() error {
	old := c.draft.old.obstacles.openings
	now := old.edit()
	for i, o := range old.refs() {
		with := c.moving.has(KindWall, o.Wall)
		if c.moving.at(KindOpening, i) && !with {
			return fault(KindOpening, o.ID, "can only be "+c.what+" with its wall")
		}
		if with && c.flips {
			now.at(i).SideRight = !o.SideRight
		}
	}
	if !c.moving.some(KindWall) {
		return nil
	}
	openings := now.list
	if !c.whole { // a rounded piece may be shorter by a unit
		var err error
		walls := &c.draft.new.obstacles.walls
		if openings, err = fittedAll(openings, walls, func(id string) bool { return c.moving.has(KindWall, id) }); err != nil {
			return err
		}
	}
	c.draft.obstacles().openings = openings
	return nil
}

func (c *carrier) marks() error {
	old, now := c.draft.old.marks, *c.draft.old.marks
	var some [5]bool
	var err [5]error
	now.zones, some[0], err[0] = moved(&c.mover, KindZone, old.zones, func(z *Zone) error { return c.ring(&z.Ring) })
	now.observers, some[1], err[1] = moved(&c.mover, KindObserver, old.observers, func(o *Observer) error {
		o.Heading = c.angle(o.Heading)
		return c.at(&o.At)
	})
	now.targets, some[2], err[2] = moved(&c.mover, KindTarget, old.targets, c.target)
	now.starts, some[3], err[3] = moved(&c.mover, KindStart, old.starts, func(s *Start) error {
		c.turn(&s.Facing)
		return c.at(&s.At)
	})
	now.routes, some[4], err[4] = moved(&c.mover, KindRoute, old.routes, func(r *Route) error { return c.chain(&r.Via) })
	if some != [5]bool{} {
		c.draft.new.marks = &now
	}
	return errors.Join(err[:]...)
}

func (c *carrier) sheet() error {
	old := c.draft.old.sheet.Underlay
	if !c.moving.some(KindUnderlay) {
		return nil
	}
	u := *old
	u.Turn = c.angle(u.Turn)
	if err := c.at(&u.At); err != nil {
		return fault(KindUnderlay, "", err.Error())
	}
	c.draft.sheet().Underlay = &u
	return nil
}

func (c *carrier) wall(w *Wall) error {
	if c.flips {
		w.Justify = w.Justify.flipped()
	}
	return c.chain(&w.Line)
}

// flipped is the place of the body for a line that runs the other way, or is seen in a mirror.
func (j Justify) flipped() Justify { return [...]Justify{Centre: Centre, Left: Right, Right: Left}[j] }

// block carries a round block by its centre when its corners would be rounded each by itself.
func (c *carrier) block(b *Block) error {
	if b.Circle == nil {
		return c.ring(&b.Ring)
	}
	round := *b.Circle
	if err := c.at(&round.At); err != nil {
		return err
	}
	by := round.At.Sub(b.Circle.At)
	b.Circle = &round
	if c.whole {
		return c.ring(&b.Ring)
	}
	return moveChain(&b.Ring, by)
}

func (c *carrier) target(t *Target) error {
	c.turn(&t.Normal)
	if t.Face != nil {
		face := *t.Face
		if c.flips { // its front stays to the left
			face[0], face[1] = face[1], face[0]
		}
		for i := range face {
			if err := c.at(&face[i]); err != nil {
				return err
			}
		}
		t.Face = &face
	}
	return c.at(&t.At)
}

func (c *carrier) turn(deg **float64) {
	if *deg != nil {
		v := c.angle(**deg)
		*deg = &v
	}
}

func (c *carrier) at(p *exact.Pt) error {
	q, ok := c.point(*p)
	if !ok {
		return errRange
	}
	*p = q
	return nil
}

func (c *carrier) chain(ch *Chain) error {
	pts := ch.Points()
	for i := range pts {
		if err := c.at(&pts[i]); err != nil {
			return err
		}
	}
	*ch = Chain{pts}
	return nil
}

// ring carries a ring, which goes on winding the same way and beginning at the same corner.
func (c *carrier) ring(ch *Chain) error {
	if err := c.chain(ch); err != nil {
		return err
	}
	if c.flips {
		pts := ch.pts // a copy of its own
		for i, j := 1, len(pts)-1; i < j; i, j = i+1, j-1 {
			pts[i], pts[j] = pts[j], pts[i]
		}
	}
	return nil
}

// fullTurn brings degrees into [0, 360), and to a millionth, so that there and back again is the same angle.
func fullTurn(deg float64) float64 {
	deg = math.Mod(math.Round(math.Mod(deg, 360)*1e6)/1e6+360, 360)
	return math.Round(deg*1e6) / 1e6
}

// gridPt returns the grid point at x, y, and whether it lies in the legal range.
func gridPt(x, y int64) (exact.Pt, bool) {
	if max(x, -x, y, -y) > int64(MaxCoord) {
		return exact.Pt{}, false
	}
	return exact.Pt{X: int32(x), Y: int32(y)}, true
}
