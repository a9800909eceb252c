package plan

import "fmt"

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

// draft is a plan in the making: parts are copied when they are first touched.
type draft struct {
	old *Plan
	new Plan
}

func draftOf(p *Plan) *draft { return &draft{old: p, new: *p} }

// obstacles returns the draft's own obstacles; their lists are still shared and must be replaced, not changed.
func (d *draft) obstacles() *Obstacles {
	if d.new.obstacles == d.old.obstacles {
		o := *d.old.obstacles
		d.new.obstacles = &o
	}
	return d.new.obstacles
}

func (d *draft) marks() *Marks {
	if d.new.marks == d.old.marks {
		m := *d.old.marks
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
func added[T any, P item[T]](kind Kind, l list[T], it T) (list[T], error) {
	id := P(&it).id()
	if *id == "" {
		*id = nextID[T, P](kind, &l)
	} else if at[T, P](&l, *id) >= 0 {
		return l, fault(kind, *id, "is in the plan already; each needs its own id")
	}
	if text := P(&it).fault(); text != "" {
		return l, fault(kind, *id, text)
	}
	return l.with(it), nil
}

// replaced returns the list with the item of the same id replaced.
func replaced[T any, P item[T]](kind Kind, l list[T], it T) (list[T], error) {
	id := *P(&it).id()
	i := at[T, P](&l, id)
	if i < 0 {
		return l, missing(kind, id)
	}
	if text := P(&it).fault(); text != "" {
		return l, fault(kind, id, text)
	}
	return l.put(i, it), nil
}
