package plan

import (
	"errors"
	"math"

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
	for _, r := range m.Items {
		if !r.Kind.moves() {
			return nil, fault(r.Kind, r.ID, "cannot be moved")
		}
	}
	v := mover{draft: draftOf(p), moving: p.pick(m.Items), by: m.By}
	if err := errors.Join(v.obstacles(), v.marks(), v.sheet()); err != nil {
		return nil, firstError(err)
	}
	if i := v.moving.lost; i >= 0 {
		return nil, missing(m.Items[i].Kind, m.Items[i].ID)
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
	moving picked
	by     exact.Vec
}

func (v *mover) obstacles() error {
	old := v.draft.old.obstacles
	if v.moving.some(KindFloor) {
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
	return v.openings()
}

func (v *mover) marks() error {
	old, now := v.draft.old.marks, *v.draft.old.marks
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
	if !v.moving.some(KindUnderlay) {
		return nil
	}
	u := *old
	if err := movePoint(&u.At, v.by); err != nil {
		return fault(KindUnderlay, "", err.Error())
	}
	v.draft.sheet().Underlay = &u
	return nil
}

// moved returns the list with what moves moved, the list itself when nothing does. Cost: that of what moves.
func moved[T any, P identified[T]](v *mover, kind Kind, l list[T], move func(P) error) (now list[T], some bool, err error) {
	e := l.edit()
	for i := range v.moving.places(kind) {
		it := P(e.at(i))
		if err := move(it); err != nil {
			return l, false, fault(kind, *it.id(), err.Error())
		}
	}
	return e.list, e.touched(), nil
}

// openings slides the openings that move without their walls, one after the other.
func (v *mover) openings() error {
	old := &v.draft.old.obstacles.openings
	var moving []int
	for i := range v.moving.places(KindOpening) {
		if !v.moving.has(KindWall, old.at(i).Wall) {
			moving = append(moving, i)
		}
	}
	if len(moving) == 0 {
		return nil
	}
	s := slider{walls: &v.draft.new.obstacles.walls, edit: old.edit(), beside: map[string][]int{}, by: v.by}
	for _, i := range moving {
		s.beside[old.at(i).Wall] = nil
	}
	for i, o := range old.refs() {
		if list, ok := s.beside[o.Wall]; ok {
			s.beside[o.Wall] = append(list, i)
		}
	}
	for _, i := range moving {
		if err := s.slide(i); err != nil {
			return err
		}
	}
	v.draft.obstacles().openings = s.edit.list
	return nil
}

// slider moves openings along their walls.
type slider struct {
	walls  *list[Wall]
	edit   listEdit[Opening]
	beside map[string][]int // the openings of each wall in which one moves
	by     exact.Vec
}

// slide moves opening i, which must lie over none of the others where they are by then.
func (s *slider) slide(i int) error {
	o := s.edit.at(i)
	k := at(s.walls, o.Wall)
	if k < 0 {
		return fault(KindOpening, o.ID, "names wall \""+o.Wall+"\", which is not in the plan")
	}
	w := s.walls.at(k)
	if last := w.lastPlace(*o); last >= 0 {
		along := w.Line.At(o.Segment + 1).Sub(w.Line.At(o.Segment))
		step := math.Round(float64(along.Dot(s.by)) / math.Sqrt(float64(along.Len2())))
		o.At = int32(min(max(0, int64(o.At)+int64(step)), int64(last)))
	}
	if _, text := w.Fit(*o); text != "" {
		return fault(KindOpening, o.ID, text)
	}
	for _, j := range s.beside[o.Wall] {
		if q := s.edit.list.at(j); j != i && q.Over(*o) {
			return fault(KindOpening, o.ID, "would lie over opening "+q.ID)
		}
	}
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
