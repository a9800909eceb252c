package plan

import (
	"errors"
	"math"
	"slices"

	"enfilade/solver/exact"
)

// MoveItems moves items by a vector, each once however often it is listed. Openings slide along their wall by what of the
// vector lies along it, as far as the wall goes, and stay in place when their wall moves too.
type MoveItems struct {
	Items []Ref
	By    exact.Vec
}

// Label names the item when there is but one.
func (m MoveItems) Label() string {
	if len(m.Items) == 1 {
		return "move " + m.Items[0].Kind.String()
	}
	return "move items"
}

// Apply moves all items or none: an item that is not in the plan, would leave the legal range, or an opening that would lie
// over another, is an error. Cost: one pass over the lists, and one over the openings for each that is moved.
func (m MoveItems) Apply(p *Plan) (*Plan, error) {
	moving := make(map[Ref]bool, len(m.Items))
	for _, r := range m.Items {
		if !r.Kind.moves() {
			return nil, fault(r.Kind, r.ID, "cannot be moved")
		}
		moving[r] = true
	}
	v := mover{draft: draftOf(p), moving: moving, by: m.By}
	for r := range moving {
		v.kinds[r.Kind]++
	}
	if err := errors.Join(v.obstacles(), v.marks(), v.sheet()); err != nil {
		return nil, firstError(err)
	}
	if v.found < len(moving) {
		for _, r := range m.Items {
			if !p.Has(r) {
				return nil, missing(r.Kind, r.ID)
			}
		}
	}
	return v.draft.plan(), nil
}

func (k Kind) moves() bool { return k != KindPlan && k != KindWalker }

// firstError returns the first of joined errors.
func firstError(err error) error {
	if many, ok := err.(interface{ Unwrap() []error }); ok {
		return many.Unwrap()[0]
	}
	return err
}

// mover is a move under way.
type mover struct {
	draft  *draft
	moving map[Ref]bool
	kinds  [len(kinds)]int // how many of each kind
	by     exact.Vec
	found  int // of what is to move
}

func (v *mover) obstacles() error {
	old := v.draft.old.obstacles
	if v.moving[Ref{Kind: KindFloor}] && old.floor.Len() > 0 {
		v.found++
		if err := moveChain(&v.draft.obstacles().floor, v.by); err != nil {
			return fault(KindFloor, "", err.Error())
		}
	}
	walls, some, err := moved(v, KindWall, old.walls, func(w *Wall) error { return moveChain(&w.Line, v.by) })
	if err != nil {
		return err
	}
	if some {
		v.draft.obstacles().walls = walls
	}
	blocks, some, err := moved(v, KindBlock, old.blocks, func(b *Block) error { return b.move(v.by) })
	if err != nil {
		return err
	}
	if some {
		v.draft.obstacles().blocks = blocks
	}
	for i := 0; i < len(old.openings) && v.kinds[KindOpening] > 0; i++ {
		o := &old.openings[i]
		if !v.moving[Ref{KindOpening, o.ID}] {
			continue
		}
		v.found++
		if v.moving[Ref{KindWall, o.Wall}] {
			continue
		}
		if err := v.draft.slide(*o, v.by); err != nil {
			return err
		}
	}
	return nil
}

func (v *mover) marks() error {
	old, now := v.draft.old.marks, *v.draft.old.marks
	now.ids = new(markIDs)
	var some [5]bool
	var err [5]error
	now.zones, some[0], err[0] = moved(v, KindZone, old.zones, func(z *Zone) error { return moveChain(&z.Ring, v.by) })
	now.observers, some[1], err[1] = moved(v, KindObserver, old.observers, func(o *Observer) error { return movePoint(&o.At, v.by) })
	now.targets, some[2], err[2] = moved(v, KindTarget, old.targets, func(t *Target) error { return t.move(v.by) })
	now.starts, some[3], err[3] = moved(v, KindStart, old.starts, func(s *Start) error { return movePoint(&s.At, v.by) })
	now.routes, some[4], err[4] = moved(v, KindRoute, old.routes, func(r *Route) error { return moveChain(&r.Via, v.by) })
	if some != [5]bool{} {
		v.draft.new.marks = &now
	}
	return errors.Join(err[:]...)
}

func (v *mover) sheet() error {
	old := v.draft.old.sheet.Underlay
	if old == nil || !v.moving[Ref{Kind: KindUnderlay}] {
		return nil
	}
	v.found++
	u := *old
	if err := movePoint(&u.At, v.by); err != nil {
		return fault(KindUnderlay, "", err.Error())
	}
	v.draft.sheet().Underlay = &u
	return nil
}

// moved returns the list with what moves moved, the list itself when nothing does.
func moved[T any, P identified[T]](v *mover, kind Kind, list []T, move func(P) error) (now []T, some bool, err error) {
	now = list
	for i := 0; i < len(list) && v.kinds[kind] > 0; i++ {
		id := *P(&list[i]).id()
		if !v.moving[Ref{kind, id}] {
			continue
		}
		v.found++
		if !some {
			now, some = slices.Clone(list), true
		}
		if err := move(&now[i]); err != nil {
			return nil, false, fault(kind, id, err.Error())
		}
	}
	return now, some, nil
}

// slide moves an opening along its wall.
func (d *draft) slide(o Opening, by exact.Vec) error {
	w, ok := d.new.Wall(o.Wall)
	if !ok {
		return fault(KindOpening, o.ID, "names wall \""+o.Wall+"\", which is not in the plan")
	}
	if last := w.lastPlace(o); last >= 0 {
		along := w.Line.At(o.Segment + 1).Sub(w.Line.At(o.Segment))
		step := math.Round(float64(along.Dot(by)) / math.Sqrt(float64(along.Len2())))
		o.At = int32(min(max(0, int64(o.At)+int64(step)), int64(last)))
	}
	list := slices.Clone(d.new.obstacles.openings)
	list[indexOf(list, o.ID)] = o
	next, err := withOpenings(&d.new, list, o)
	if err != nil {
		return err
	}
	d.obstacles().openings = next.obstacles.openings
	return nil
}

func (b *Block) move(by exact.Vec) error {
	if b.Circle != nil {
		round := *b.Circle
		if err := movePoint(&round.At, by); err != nil {
			return err
		}
		b.Circle = &round
	}
	return moveChain(&b.Ring, by)
}

func (t *Target) move(by exact.Vec) error {
	if t.Face != nil {
		face := *t.Face
		for i := range face {
			if err := movePoint(&face[i], by); err != nil {
				return err
			}
		}
		t.Face = &face
	}
	return movePoint(&t.At, by)
}

// What is wrong with an item that is being changed; its name is put before it.
var (
	errRange  = errors.New(outOfRange)
	errCorner = errors.New("has no such corner")
)

func movePoint(p *exact.Pt, by exact.Vec) error {
	x, y := int64(p.X)+int64(by.X), int64(p.Y)+int64(by.Y)
	if max(x, -x, y, -y) > int64(MaxCoord) {
		return errRange
	}
	*p = exact.Pt{X: int32(x), Y: int32(y)}
	return nil
}

func moveChain(c *Chain, by exact.Vec) error {
	pts := c.Points()
	for i := range pts {
		if err := movePoint(&pts[i], by); err != nil {
			return err
		}
	}
	*c = Chain{pts}
	return nil
}
