package plan

import (
	"fmt"
	"strconv"

	"enfilade/solver/exact"
)

// maxCopies bounds how many items one edit may make.
const maxCopies = 100_000

// Extract returns a plan that holds only the given items of p, with the openings of the walls among them. An opening without
// its wall is left out, and so is what there is only one of, but for the floor.
func Extract(p *Plan, items []Ref) *Plan {
	in := make(map[Ref]bool, len(items))
	for _, r := range items {
		in[r] = true
	}
	parts := Parts{Walker: DefaultWalker(), Sheet: Sheet{Unit: p.sheet.Unit}}
	if in[Ref{Kind: KindFloor}] {
		parts.Floor = p.obstacles.floor
	}
	parts.Walls = only(KindWall, p.obstacles.walls, in)
	for _, o := range p.obstacles.openings.refs() {
		if in[Ref{KindWall, o.Wall}] {
			parts.Openings = append(parts.Openings, *o)
		}
	}
	parts.Blocks = only(KindBlock, p.obstacles.blocks, in)
	parts.Zones = only(KindZone, p.marks.zones, in)
	parts.Observers = only(KindObserver, p.marks.observers, in)
	parts.Targets = only(KindTarget, p.marks.targets, in)
	parts.Starts = only(KindStart, p.marks.starts, in)
	parts.Routes = only(KindRoute, p.marks.routes, in)
	return From(parts)
}

// only returns the items of a list that are in a set.
func only[T any, P identified[T]](kind Kind, l list[T], in map[Ref]bool) (out []T) {
	for _, it := range l.refs() {
		if in[Ref{kind, *P(it).id()}] {
			out = append(out, *it)
		}
	}
	return out
}

// Paste adds everything in a plan to another under new ids, moved by a vector. Openings stay in their walls, and routes go
// between the new starts and targets; a route whose ends are neither pasted with it nor in the plan is left out. A floor is
// taken over by a plan that has none. What was locked is not locked any more.
type Paste struct {
	Clip *Plan
	By   exact.Vec
	Text string // the label; empty for "paste"
}

// Label says what the edit does.
func (e Paste) Label() string {
	if e.Text == "" {
		return "paste"
	}
	return e.Text
}

// Apply fails when an item would leave the legal range.
func (e Paste) Apply(p *Plan) (*Plan, error) {
	q, _, err := paste(p, e.Clip, []exact.Vec{e.By})
	return q, err
}

// Added names the items that applying the edit to p would add, without openings, which go with their walls.
func (e Paste) Added(p *Plan) []Ref {
	_, refs, err := paste(p, e.Clip, []exact.Vec{e.By})
	if err != nil {
		return nil
	}
	return refs
}

// Duplicate adds copies of items beside them, in rows and columns. The items themselves are the first of the first row.
type Duplicate struct {
	Items         []Ref
	Columns, Rows int       // 1 or more each
	Step          exact.Vec // from one column to the next, and from one row to the next
}

// Label names the item when there is but one.
func (e Duplicate) Label() string { return labelled("duplicate", e.Items) }

// Apply fails when an item is not in the plan, a copy would leave the legal range, or there would be too many.
func (e Duplicate) Apply(p *Plan) (*Plan, error) {
	q, _, err := e.run(p)
	return q, err
}

// Added names the items that applying the edit to p would add, without openings.
func (e Duplicate) Added(p *Plan) []Ref {
	_, refs, err := e.run(p)
	if err != nil {
		return nil
	}
	return refs
}

func (e Duplicate) run(p *Plan) (*Plan, []Ref, error) {
	for _, r := range e.Items {
		if !p.Has(r) {
			return nil, nil, missing(r.Kind, r.ID)
		}
	}
	if e.Columns < 1 || e.Rows < 1 {
		return nil, nil, fault(KindPlan, "", "needs one column and one row or more")
	}
	if int64(e.Columns)*int64(e.Rows)*int64(max(1, len(e.Items))) > maxCopies {
		return nil, nil, fault(KindPlan, "", fmt.Sprintf("would get more than %d items at once; make fewer", maxCopies))
	}
	var places []exact.Vec
	for row := range e.Rows {
		for column := range e.Columns {
			x, y := int64(column)*int64(e.Step.X), int64(row)*int64(e.Step.Y)
			if max(x, -x, y, -y) > int64(2*MaxCoord) {
				return nil, nil, fault(KindPlan, "", "has no room for the copies; they would leave the legal range")
			}
			if row > 0 || column > 0 {
				places = append(places, exact.Vec{X: int32(x), Y: int32(y)})
			}
		}
	}
	clip := Extract(p, e.Items)
	clip.obstacles.floor = Chain{} // there is only one
	return paste(p, clip, places)
}

// paste adds a plan's items once for each place.
func paste(p, clip *Plan, places []exact.Vec) (*Plan, []Ref, error) {
	d := draftOf(p)
	s := paster{old: p, next: map[Kind]int{}}
	o, m := *p.obstacles, *p.marks
	c, k := clip.obstacles, clip.marks
	for _, by := range places {
		s.names = map[Ref]string{}
		o.walls = pasted(&s, KindWall, o.walls, c.walls, func(w *Wall) error { w.Locked = false; return moveChain(&w.Line, by) })
		o.openings = pasted(&s, KindOpening, o.openings, c.openings, func(x *Opening) error {
			x.Locked, x.Wall = false, s.names[Ref{KindWall, x.Wall}]
			return nil
		})
		o.blocks = pasted(&s, KindBlock, o.blocks, c.blocks, func(b *Block) error { b.Locked = false; return b.move(by) })
		m.zones = pasted(&s, KindZone, m.zones, k.zones, func(z *Zone) error { z.Locked = false; return moveChain(&z.Ring, by) })
		m.observers = pasted(&s, KindObserver, m.observers, k.observers, func(v *Observer) error { v.Locked = false; return movePoint(&v.At, by) })
		m.targets = pasted(&s, KindTarget, m.targets, k.targets, func(t *Target) error { t.Locked = false; return t.move(by) })
		m.starts = pasted(&s, KindStart, m.starts, k.starts, func(t *Start) error { t.Locked = false; return movePoint(&t.At, by) })
		m.routes = pasted(&s, KindRoute, m.routes, s.kept(k.routes), func(r *Route) error {
			r.Locked, r.From, r.To = false, s.renamed(KindStart, r.From), s.renamed(KindTarget, r.To)
			return moveChain(&r.Via, by)
		})
		if o.floor.Len() == 0 && c.floor.Len() > 0 {
			o.floor = c.floor
			s.note(moveChain(&o.floor, by), KindFloor, "")
		}
	}
	if s.err != nil {
		return nil, nil, s.err
	}
	if o.walls.n > p.obstacles.walls.n || o.openings.n > p.obstacles.openings.n || o.blocks.n > p.obstacles.blocks.n ||
		o.floor.Len() > p.obstacles.floor.Len() {
		*d.obstacles() = o
	}
	if s.marked {
		*d.marks() = m
	}
	return d.plan(), s.added, nil
}

// paster gives pasted items their ids.
type paster struct {
	old    *Plan
	next   map[Kind]int   // the number of the next free id, once asked for
	names  map[Ref]string // of what is pasted at the present place, by its old name
	added  []Ref
	marked bool // something was added that stops nothing
	err    error
}

func (s *paster) note(err error, kind Kind, id string) {
	if err != nil && s.err == nil {
		s.err = fault(kind, id, err.Error())
	}
}

func (s *paster) id(kind Kind) string {
	n := s.next[kind]
	if n == 0 {
		n = Ref{kind, NextID(s.old, kind)}.Number()
	}
	s.next[kind] = n + 1
	return kind.Letter() + strconv.Itoa(n)
}

// renamed returns the new id of what was pasted along, else the id itself.
func (s *paster) renamed(kind Kind, id string) string {
	if name, ok := s.names[Ref{kind, id}]; ok {
		return name
	}
	return id
}

// kept returns the routes whose ends will be in the plan.
func (s *paster) kept(routes list[Route]) list[Route] {
	there := func(kind Kind, id string) bool {
		_, along := s.names[Ref{kind, id}]
		return along || id == "" || s.old.Has(Ref{kind, id})
	}
	routes, _ = routes.without(func(_ int, r *Route) bool { return !there(KindStart, r.From) || !there(KindTarget, r.To) })
	return routes
}

// pasted appends the items of a clip under new ids, changed.
func pasted[T any, P item[T]](s *paster, kind Kind, l, clip list[T], change func(P) error) list[T] {
	items := clip.slice()
	for i := range items {
		id := P(&items[i]).id()
		name := s.id(kind)
		s.names[Ref{kind, *id}] = name
		*id = name
		s.note(change(&items[i]), kind, name)
		if kind != KindOpening {
			s.added = append(s.added, Ref{kind, name})
			s.marked = s.marked || kind >= KindZone
		}
	}
	return l.with(items...)
}
