package plan

import (
	"strconv"
	"strings"
)

// kinds holds each kind's name and the letter its ids begin with, in the order of the constants.
var kinds = [...]struct{ name, letter string }{
	KindPlan: {"plan", ""}, KindFloor: {"floor", ""}, KindWall: {"wall", "W"}, KindOpening: {"opening", "D"},
	KindBlock: {"block", "B"}, KindZone: {"zone", "Z"}, KindObserver: {"observer", "O"}, KindTarget: {"target", "T"},
	KindStart: {"start", "S"}, KindRoute: {"route", "R"}, KindWalker: {"walker", ""}, KindUnderlay: {"underlay", ""},
}

// String returns the kind's name, as in messages.
func (k Kind) String() string { return kinds[k].name }

// Letter returns what fresh ids of the kind begin with; empty for what there is only one of.
func (k Kind) Letter() string { return kinds[k].letter }

// String names the item: "wall W3", or "floor".
func (r Ref) String() string {
	if r.ID == "" {
		return r.Kind.String()
	}
	return r.Kind.String() + " " + r.ID
}

// Number returns the number of an id of the form its kind's fresh ids have, and 0 for any other id.
func (r Ref) Number() int {
	rest, ok := strings.CutPrefix(r.ID, r.Kind.Letter())
	if !ok || rest == "" || rest[0] == '+' || rest[0] == '-' {
		return 0
	}
	n, err := strconv.Atoi(rest)
	if err != nil || n >= 1<<40 {
		return 0
	}
	return n
}

// NextID returns the next free id of a kind: its letter and the number after the highest in use.
func NextID(p *Plan, kind Kind) string {
	switch kind {
	case KindWall:
		return nextID(kind, &p.obstacles.walls)
	case KindOpening:
		return nextID(kind, &p.obstacles.openings)
	case KindBlock:
		return nextID(kind, &p.obstacles.blocks)
	case KindZone:
		return nextID(kind, &p.marks.zones)
	case KindObserver:
		return nextID(kind, &p.marks.observers)
	case KindTarget:
		return nextID(kind, &p.marks.targets)
	case KindStart:
		return nextID(kind, &p.marks.starts)
	case KindRoute:
		return nextID(kind, &p.marks.routes)
	}
	return ""
}

func nextID[T any, P identified[T]](kind Kind, l *list[T]) string {
	if l.n == 0 {
		return kind.Letter() + "1"
	}
	next := l.ids.next.Load()
	if next == 0 {
		for _, it := range l.refs() {
			next = max(next, int64(Ref{kind, *P(it).id()}.Number()))
		}
		next++
		l.ids.next.Store(next)
	}
	return kind.Letter() + strconv.FormatInt(next, 10)
}

// identified is a pointer to an item with an id.
type identified[T any] interface {
	*T
	id() *string
}

func (w *Wall) id() *string     { return &w.ID }
func (o *Opening) id() *string  { return &o.ID }
func (b *Block) id() *string    { return &b.ID }
func (z *Zone) id() *string     { return &z.ID }
func (o *Observer) id() *string { return &o.ID }
func (t *Target) id() *string   { return &t.ID }
func (s *Start) id() *string    { return &s.ID }
func (r *Route) id() *string    { return &r.ID }
