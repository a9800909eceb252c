package gui

import (
	"errors"
	"fmt"
	"iter"
	"strings"

	"enfilade/solver/plan"
)

// mixed is what a field says in which the selected items differ.
const mixed = "mixed"

// manyKey is all that the form of several items depends on.
type manyKey struct {
	plan  *plan.Plan
	first *plan.Ref // of the selection's slice, which is never changed while it is as long
	n     int
	unit  string
}

// describeMany counts what is selected and offers the measures that all of it has, to be changed at once as one step. The form
// of thousands of items is made once, not at each move of the pointer; while they are dragged it shows what they were before.
func (w *window) describeMany(p *plan.Plan, sel []plan.Ref) card {
	if w.session.Previewing() {
		p = w.session.Committed()
	}
	key := manyKey{p, &sel[0], len(sel), w.unit()}
	if w.manyKey == key {
		return w.many
	}
	count := map[plan.Kind]int{}
	for _, r := range sel {
		count[r.Kind]++
	}
	var parts []string
	kinds := ""
	for k := plan.KindFloor; k <= plan.KindUnderlay; k++ {
		if n := count[k]; n > 0 {
			parts = append(parts, counted(n, k.String()))
			kinds += k.Letter()
		}
	}
	c := card{key: fmt.Sprintf("many %d %s %s %v", len(sel), kinds, w.unit(), sel[0]), title: fmt.Sprintf("%d items", len(sel)), colour: -1, delete: true,
		hint: wrapped(parts)}
	if n := len(sel); n == count[plan.KindWall] {
		c.fields = w.manyWalls(p, sel)
	} else if n == count[plan.KindOpening] {
		c.fields = w.manyOpenings(p, sel)
	} else if n == count[plan.KindBlock] {
		c.fields = w.manyBlocks(p, sel)
	} else if n == count[plan.KindZone] {
		c.fields = w.manyZones(p, sel)
	} else if n == count[plan.KindObserver] {
		c.fields = w.manyObservers(p, sel)
	} else if n == count[plan.KindTarget] {
		c.fields = w.manyTargets(p, sel)
	}
	c.fields = append(c.fields, w.markFields(p, sel)...)
	c.key += fmt.Sprint(len(c.fields))
	w.manyKey, w.many = key, c
	return c
}

// wrapped puts a few words into each line of the form.
func wrapped(parts []string) (lines []string) {
	const each = 3
	for len(parts) > each {
		lines, parts = append(lines, strings.Join(parts[:each], ", ")+","), parts[each:]
	}
	return append(lines, strings.Join(parts, ", "))
}

// group is the selected items of one kind, in the plan's order.
type group[T any] struct {
	w     *window
	items []T
	store func(*plan.SetItems, []T) // puts changed items into an edit
	meta  func(*T) *plan.Meta
}

// chosen gathers the selected items of a kind in one pass over the plan.
func chosen[T any](w *window, all iter.Seq2[int, T], kind plan.Kind, p *plan.Plan, sel []plan.Ref, meta func(*T) *plan.Meta, store func(*plan.SetItems, []T)) group[T] {
	in := p.SetOf(sel)
	g := group[T]{w: w, store: store, meta: meta, items: make([]T, 0, len(sel))}
	for i, x := range all {
		if in.At(kind, i) {
			g.items = append(g.items, x)
		}
	}
	return g
}

// errLocked is what the form says when there is nothing it may change.
var errLocked = errors.New("they are locked")

// change changes all items that are not locked, as one step.
func (g group[T]) change(label string, change func(*T)) error {
	items := make([]T, 0, len(g.items))
	for i := range g.items {
		if !g.meta(&g.items[i]).Locked {
			items = append(items, g.items[i])
			change(&items[len(items)-1])
		}
	}
	if len(items) == 0 {
		return errLocked
	}
	e := plan.SetItems{Text: label}
	g.store(&e, items)
	return g.w.doEdit(e)
}

// shared returns what all items have, and whether they have the same.
func shared[T any, V comparable](items []T, get func(*T) V) (v V, same bool) {
	for i := range items {
		x := get(&items[i])
		if i == 0 {
			v = x
		} else if x != v {
			return v, false
		}
	}
	return v, true
}

// blank makes a field of differing items say so.
func blank(f field, same bool) field {
	if !same {
		f.text, f.chosen, f.empty = "", -1, mixed
	}
	return f
}

// length is a field for a length of all items; lo is what it may be at least.
func (g group[T]) length(label, undo string, lo int32, get func(*T) *int32) field {
	v, same := shared(g.items, func(x *T) int32 { return *get(x) })
	hi := plan.MaxCoord
	if label == "Thickness" {
		hi = plan.MaxThickness
	}
	return blank(g.w.lengthField(label, v, func(v int32) error {
		return g.w.within(v, lo, hi, func() error { return g.change(undo, func(x *T) { *get(x) = v }) })
	}), same)
}

// limit is a field for a length that may be without one: none is what it is then, and the word for it.
func (g group[T]) limit(label, undo string, none int32, word string, get func(*T) *int32) field {
	v, same := shared(g.items, func(x *T) int32 { return *get(x) })
	return blank(g.w.boundField(label, v, none, word, func(v int32) error {
		return g.change(undo, func(x *T) { *get(x) = v })
	}), same)
}

// boundField is a field for a length that may be without one; it can be emptied, or the word be typed.
func (w *window) boundField(label string, v, none int32, word string, put func(int32) error) field {
	f := field{label: label, unit: unitMark(w.unit()), empty: word, note: "or " + word}
	if v != none {
		f.text = formatLength(v, w.unit())
	}
	f.set = func(text string) error {
		v := none
		if t := strings.TrimSpace(text); t != "" && !strings.EqualFold(t, word) {
			var err error
			if v, err = parseLength(t, w.unit()); err != nil {
				return err
			}
		}
		if v <= 0 && v != none {
			return errPositive
		}
		return put(v)
	}
	return f
}

// angle is a field for an angle of all items.
func (g group[T]) angle(label, undo string, lo, hi float64, get func(*T) *float64) field {
	v, same := shared(g.items, func(x *T) float64 { return *get(x) })
	return blank(angleField(label, v, lo, hi, func(v float64) error { return g.change(undo, func(x *T) { *get(x) = v }) }), same)
}

// choice is a field for one of a few choices of all items.
func (g group[T]) choice(label, undo string, choices []string, get func(*T) int, put func(*T, int)) field {
	v, same := shared(g.items, get)
	return blank(field{label: label, choices: choices, chosen: v, pick: func(i int) error {
		return g.change(undo, func(x *T) { put(x, i) })
	}}, same)
}

func (w *window) manyWalls(p *plan.Plan, sel []plan.Ref) []field {
	g := chosen(w, p.Walls(), plan.KindWall, p, sel, func(x *plan.Wall) *plan.Meta { return &x.Meta },
		func(e *plan.SetItems, items []plan.Wall) { e.Walls = items })
	fields := []field{
		g.choice("Kind", "change kind of walls", wallKinds, func(x *plan.Wall) int { return int(x.Kind) },
			func(x *plan.Wall, i int) { w.setKind(x, plan.WallKind(i)) }),
		g.length("Thickness", "change thickness", 0, func(x *plan.Wall) *int32 { return &x.Thickness }),
	}
	switch kind, same := shared(g.items, func(x *plan.Wall) plan.WallKind { return x.Kind }); {
	case same && kind == plan.Solid:
		fields = append(fields, g.limit("Height", "change height", plan.Ceiling, "ceiling", func(x *plan.Wall) *int32 { return &x.Height }))
	case same && kind == plan.Low:
		fields = append(fields, g.length("Height", "change height", 1, func(x *plan.Wall) *int32 { return &x.Height }))
	}
	return append(fields, g.choice("Body", "move bodies of walls", []string{"centred on its line", "left of its line", "right of its line"},
		func(x *plan.Wall) int { return int(x.Justify) }, func(x *plan.Wall, i int) { x.Justify = plan.Justify(i) }))
}

func (w *window) manyOpenings(p *plan.Plan, sel []plan.Ref) []field {
	g := chosen(w, p.Openings(), plan.KindOpening, p, sel, func(x *plan.Opening) *plan.Meta { return &x.Meta },
		func(e *plan.SetItems, items []plan.Opening) { e.Openings = items })
	fields := []field{
		g.length("Width", "change width", 1, func(x *plan.Opening) *int32 { return &x.Width }),
		g.choice("Leaf", "change leaves", []string{"none, a plain gap", "solid leaf", "glazed leaf"}, func(x *plan.Opening) int { return int(x.Leaf) },
			func(x *plan.Opening, i int) { x.Leaf = plan.Leaf(i) }),
	}
	if bare, same := shared(g.items, func(x *plan.Opening) bool { return x.Leaf == plan.NoLeaf }); same && bare {
		return fields
	}
	state := func(x *plan.Opening) int {
		if x.Shut {
			return 1
		}
		return 0
	}
	return append(fields, g.choice("State", "open or shut doors", []string{"open", "shut"}, state, func(x *plan.Opening, i int) { x.Shut = i == 1 }),
		g.choice("Hinges", "hang doors", []string{"near end, opens left", "near end, opens right", "far end, opens left", "far end, opens right"},
			func(x *plan.Opening) int { return hinge(*x) }, func(x *plan.Opening, i int) { x.HingeEnd, x.SideRight = i >= 2, i%2 == 1 }))
}

func (w *window) manyBlocks(p *plan.Plan, sel []plan.Ref) []field {
	g := chosen(w, p.Blocks(), plan.KindBlock, p, sel, func(x *plan.Block) *plan.Meta { return &x.Meta },
		func(e *plan.SetItems, items []plan.Block) { e.Blocks = items })
	var fields []field
	if round, same := shared(g.items, func(x *plan.Block) bool { return x.Circle != nil }); same && round {
		v, alike := shared(g.items, func(x *plan.Block) int32 { return x.Circle.Radius })
		fields = append(fields, blank(w.lengthField("Radius", v, func(v int32) error {
			return w.within(v, 1, plan.MaxRound, func() error {
				return g.change("change radius", func(x *plan.Block) {
					x.Circle = &plan.Circle{At: x.Circle.At, Radius: v, Extra: x.Circle.Extra}
					x.Ring = plan.CircleRing(x.Circle.At, v, max(x.Ring.Len()/4*4, 4))
				})
			})
		}), alike))
	}
	return append(fields, g.limit("Height", "change height", plan.Ceiling, "ceiling", func(x *plan.Block) *int32 { return &x.Height }))
}

func (w *window) manyZones(p *plan.Plan, sel []plan.Ref) []field {
	g := chosen(w, p.Zones(), plan.KindZone, p, sel, func(x *plan.Zone) *plan.Meta { return &x.Meta },
		func(e *plan.SetItems, items []plan.Zone) { e.Zones = items })
	room := func(x *plan.Zone) int {
		if x.Room {
			return 0
		}
		return 1
	}
	return []field{g.choice("Kind", "change kind of zones", []string{"room", "area"}, room, func(x *plan.Zone, i int) { x.Room = i == 0 })}
}

func (w *window) manyObservers(p *plan.Plan, sel []plan.Ref) []field {
	g := chosen(w, p.Observers(), plan.KindObserver, p, sel, func(x *plan.Observer) *plan.Meta { return &x.Meta },
		func(e *plan.SetItems, items []plan.Observer) { e.Observers = items })
	return []field{
		g.length("Eye height", "change eye height", 1, func(x *plan.Observer) *int32 { return &x.Eye }),
		g.angle("Heading", "turn observers", -360, 360, func(x *plan.Observer) *float64 { return &x.Heading }),
		g.angle("View angle", "change view angle", 0.1, 360, func(x *plan.Observer) *float64 { return &x.View }),
		g.limit("Range", "change range", 0, "no limit", func(x *plan.Observer) *int32 { return &x.Range }),
	}
}

func (w *window) manyTargets(p *plan.Plan, sel []plan.Ref) []field {
	g := chosen(w, p.Targets(), plan.KindTarget, p, sel, func(x *plan.Target) *plan.Meta { return &x.Meta },
		func(e *plan.SetItems, items []plan.Target) { e.Targets = items })
	// A limit is a pointer in the plan; the form sees 0 for none, and makes new pointers, for the old ones are another plan's.
	limit := func(label, undo string, get func(*plan.Target) **int32) field {
		v, same := shared(g.items, func(x *plan.Target) int32 {
			if l := *get(x); l != nil {
				return *l
			}
			return 0
		})
		return blank(w.boundField(label, v, 0, "no limit", func(v int32) error {
			return g.change(undo, func(x *plan.Target) {
				if *get(x) = nil; v > 0 {
					n := v
					*get(x) = &n
				}
			})
		}), same)
	}
	return []field{limit("Not nearer", "change near limit", func(x *plan.Target) **int32 { return &x.Near }),
		limit("Not farther", "change far limit", func(x *plan.Target) **int32 { return &x.Far })}
}

// markFields lock and hide what is selected.
func (w *window) markFields(p *plan.Plan, sel []plan.Ref) []field {
	var refs []plan.Ref
	for _, r := range sel {
		if r.Kind != plan.KindFloor && r.Kind.Letter() != "" {
			refs = append(refs, r)
		}
	}
	if len(refs) == 0 {
		return nil
	}
	isHidden, isLocked := flags(p, refs)
	flag := func(label string, choices []string, set map[plan.Ref]bool, edit func(yes *bool) plan.Mark) field {
		on, same := shared(refs, func(r *plan.Ref) bool { return set[*r] })
		f := field{label: label, choices: choices, pick: func(i int) error {
			yes := i == 1
			return w.doEdit(edit(&yes))
		}}
		if on {
			f.chosen = 1
		}
		return blank(f, same)
	}
	return []field{
		headed("In the window", flag("Changes", []string{"allowed", "locked"}, isLocked, func(yes *bool) plan.Mark { return plan.Mark{Items: refs, Locked: yes} })),
		flag("Picture", []string{"shown", "hidden"}, isHidden, func(yes *bool) plan.Mark { return plan.Mark{Items: refs, Hidden: yes} }),
	}
}

// flags tells which items are hidden and which are locked: one by one for a few, else in one pass over the plan.
func flags(p *plan.Plan, refs []plan.Ref) (hidden, locked map[plan.Ref]bool) {
	const few = 16
	hidden, locked = map[plan.Ref]bool{}, map[plan.Ref]bool{}
	if len(refs) <= few {
		for _, r := range refs {
			m, _ := p.Meta(r)
			hidden[r], locked[r] = m.Hidden, m.Locked
		}
		return hidden, locked
	}
	h, l := marked(p)
	for _, r := range h {
		hidden[r] = true
	}
	for _, r := range l {
		locked[r] = true
	}
	return hidden, locked
}
