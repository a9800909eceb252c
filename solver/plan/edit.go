package plan

import (
	"fmt"
	"slices"
)

// Edit makes a new plan from an old one.
type Edit interface {
	// Label says what the edit does, for "Undo ...": a few words in lower case.
	Label() string
	// Apply returns the changed plan. The old one stays as it is, and every part the edit does not touch is shared, so an
	// edit of marks alone keeps the obstacles' pointer. Errors name the item and leave nothing changed.
	Apply(*Plan) (*Plan, error)
}

// Adder is an edit that adds one item.
type Adder interface {
	Edit
	// Added names the item that applying the edit to p would add.
	Added(p *Plan) Ref
}

// Steps are several edits done as one, each on what the one before made.
type Steps struct {
	Text  string // the label
	Edits []Edit
}

// Label returns the text given.
func (s Steps) Label() string { return s.Text }

// Apply applies all edits in turn, or none.
func (s Steps) Apply(p *Plan) (*Plan, error) {
	var err error
	for _, e := range s.Edits {
		if p, err = e.Apply(p); err != nil {
			return nil, err
		}
	}
	return p, nil
}

// draft is a plan in the making: parts and lists are copied when they are first touched.
type draft struct {
	old *Plan
	new Plan
}

func draftOf(p *Plan) *draft { return &draft{old: p, new: *p} }

// obstacles returns the draft's own obstacles; their lists are still shared and must be replaced, not changed.
func (d *draft) obstacles() *Obstacles {
	if d.new.obstacles == d.old.obstacles {
		o := *d.old.obstacles
		o.ids = new(obstacleIDs)
		d.new.obstacles = &o
	}
	return d.new.obstacles
}

func (d *draft) marks() *Marks {
	if d.new.marks == d.old.marks {
		m := *d.old.marks
		m.ids = new(markIDs)
		d.new.marks = &m
	}
	return d.new.marks
}

func (d *draft) sheet() *Sheet {
	if d.new.sheet == d.old.sheet {
		s := *d.old.sheet
		d.new.sheet = &s
	}
	return d.new.sheet
}

func (d *draft) plan() *Plan { return &d.new }

// item is a pointer to an item that can check itself.
type item[T any] interface {
	identified[T]
	fault() string // what is illegal about the item by itself and what would be right; empty when nothing
}

// fault wraps what is wrong with an item.
func fault(kind Kind, id, text string) error { return fmt.Errorf("%v: %s", Ref{kind, id}, text) }

func missing(kind Kind, id string) error { return fault(kind, id, "is not in the plan") }

// added returns the list with an item more, which gets the next free id if it has none.
func added[T any, P item[T]](kind Kind, list []T, it T) ([]T, error) {
	id := P(&it).id()
	if *id == "" {
		*id = nextID[T, P](kind, list)
	} else if indexOf[T, P](list, *id) >= 0 {
		return nil, fault(kind, *id, "is in the plan already; each needs its own id")
	}
	if text := P(&it).fault(); text != "" {
		return nil, fault(kind, *id, text)
	}
	return append(slices.Clip(list), it), nil
}

// replaced returns the list with the item of the same id replaced.
func replaced[T any, P item[T]](kind Kind, list []T, it T) ([]T, error) {
	id := *P(&it).id()
	i := indexOf[T, P](list, id)
	if i < 0 {
		return nil, missing(kind, id)
	}
	if text := P(&it).fault(); text != "" {
		return nil, fault(kind, id, text)
	}
	list = slices.Clone(list)
	list[i] = it
	return list, nil
}

// indexOf returns the index of the first item with an id, -1 when there is none. It looks at the items where they lie: a copy
// of each would be put on the heap.
func indexOf[T any, P identified[T]](list []T, id string) int {
	for i := range list {
		if *P(&list[i]).id() == id {
			return i
		}
	}
	return -1
}
