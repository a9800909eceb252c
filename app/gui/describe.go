package gui

import (
	"errors"
	"fmt"
	"math"
	"strings"

	"enfilade/solver/exact"
	"enfilade/solver/plan"
	"enfilade/solver/study"
)

// field is one line of the selection's form.
type field struct {
	group   string // a heading above it; empty for none
	label   string
	unit    string // behind the entry
	wide    bool   // the entry takes the whole width
	choices []string
	text    string                  // what it shows; for choices their index
	chosen  int                     // of choices
	colour  bool                    // a row of colours
	set     func(text string) error // takes a typed text over
	pick    func(i int) error       // takes a choice over
	empty   string                  // what an empty entry means
	note    string                  // beside the entry, in hints' ink
	under   string                  // on a line of its own below the entry, in hints' ink
}

// fact is a figure under the form.
type fact struct{ value, label string }

// card is what the selection's form shows.
type card struct {
	key    string // which item: another key builds the form anew
	title  string // at the right of the heading: "Observer"
	icon   string
	letter string
	colour int // of the icon, as an observer's; -1 for ink
	where  string
	fields []field
	facts  []fact
	reach  []reachRow
	legs   []legRow
	fault  string // the item's problem
	hint   []string
	delete bool

	actions []choice // buttons, two in a row
}

// describe makes the form of the selection.
func (w *window) describe(p *plan.Plan, sel []plan.Ref) card {
	switch len(sel) {
	case 0:
		return w.describeNothing(p)
	case 1:
		c := w.describeOne(p, sel[0])
		c.fields = append(c.fields, w.markFields(p, sel)...)
		return c
	}
	return w.describeMany(p, sel)
}

// headed puts a heading above a field.
func headed(group string, f field) field {
	f.group = group
	return f
}

// errPositive is what a form says of a measure that must be above nothing.
var errPositive = errors.New("more than 0, please")

// within takes v over when it lies between lo and hi.
func (w *window) within(v, lo, hi int32, take func() error) error {
	switch {
	case v < lo && lo > 0:
		return errPositive
	case v < lo:
		return errors.New("0 or more, please")
	case v > hi:
		return fmt.Errorf("%s at most, please", w.host.FormatLength(float64(hi)))
	}
	return take()
}

// height reads a height; an empty one reaches the ceiling.
func (w *window) height(text string) (int32, error) {
	if strings.TrimSpace(text) == "" {
		return plan.Ceiling, nil
	}
	v, err := parseLength(text, w.unit())
	if err == nil && v <= 0 {
		return 0, errPositive
	}
	return v, err
}

func heightText(v int32, unit string) string {
	if v == plan.Ceiling {
		return ""
	}
	return formatLength(v, unit)
}

// lengthField is a field for a length.
func (w *window) lengthField(label string, v int32, set func(int32) error) field {
	return field{label: label, unit: unitMark(w.unit()), text: formatLength(v, w.unit()), set: func(text string) error {
		v, err := parseLength(text, w.unit())
		if err != nil {
			return err
		}
		return set(v)
	}}
}

// heightField is a field for a height, empty for the ceiling.
func (w *window) heightField(v int32, set func(int32) error) field {
	return field{label: "Height", unit: unitMark(w.unit()), text: heightText(v, w.unit()), empty: "ceiling",
		set: func(text string) error {
			v, err := w.height(text)
			if err != nil {
				return err
			}
			return set(v)
		}}
}

// angleField is a field for an angle in degrees.
func angleField(label string, v, lo, hi float64, set func(float64) error) field {
	return field{label: label, unit: "°", text: trimDecimals(v, 0, 3), set: func(text string) error {
		v, err := parseNumber(text)
		switch {
		case err != nil:
			return err
		case v < lo || v > hi:
			return fmt.Errorf("from %g to %g degrees, please", lo, hi)
		}
		return set(v)
	}}
}

// textField is a field for a name.
func textField(label, text string, set func(string) error) field {
	return field{label: label, wide: true, text: text, set: func(t string) error { return set(strings.TrimSpace(t)) }}
}

// doEdit does an edit as the form's step and returns its error in words.
func (w *window) doEdit(e plan.Edit) error {
	err := w.session.Do(e)
	w.acted()
	if err != nil {
		return errors.New(cause(err))
	}
	return nil
}

// cause is the last part of an error: what is wrong, without where in the plan.
func cause(err error) string {
	s := err.Error()
	if i := strings.LastIndex(s, ": "); i >= 0 {
		return s[i+2:]
	}
	return s
}

// set returns the edit that puts an item in the place of the one with its id.
func set(item any) plan.Edit {
	switch x := item.(type) {
	case plan.Wall:
		return plan.SetWall{Wall: x}
	case plan.Opening:
		return plan.SetOpening{Opening: x}
	case plan.Block:
		return plan.SetBlock{Block: x}
	case plan.Zone:
		return plan.SetZone{Zone: x}
	case plan.Observer:
		return plan.SetObserver{Observer: x}
	case plan.Target:
		return plan.SetTarget{Target: x}
	case plan.Start:
		return plan.SetStart{Start: x}
	}
	panic(fmt.Sprintf("gui: no edit sets a %T", item))
}

func (w *window) describeOne(p *plan.Plan, r plan.Ref) card {
	c := card{key: fmt.Sprint(r, w.unit()), colour: -1, delete: true}
	switch r.Kind {
	case plan.KindObserver:
		if o, ok := p.Observer(r.ID); ok {
			w.describeObserver(&c, p, o)
		}
	case plan.KindTarget:
		if t, ok := p.Target(r.ID); ok {
			w.describeTarget(&c, p, t)
		}
	case plan.KindStart:
		if s, ok := p.Start(r.ID); ok {
			w.describeStart(&c, p, s)
		}
	case plan.KindWall:
		if x, ok := p.Wall(r.ID); ok {
			w.describeWall(&c, x)
		}
	case plan.KindOpening:
		if x, ok := p.Opening(r.ID); ok {
			w.describeOpening(&c, x)
		}
	case plan.KindBlock:
		if x, ok := p.Block(r.ID); ok {
			w.describeBlock(&c, x)
		}
	case plan.KindZone:
		if x, ok := p.Zone(r.ID); ok {
			w.describeZone(&c, x)
		}
	case plan.KindRoute:
		if x, ok := p.Route(r.ID); ok {
			w.describeRoute(&c, p, x)
		}
	case plan.KindUnderlay:
		if u := p.Sheet().Underlay; u != nil {
			w.describeUnderlay(&c, *u)
		}
	case plan.KindFloor:
		c.title, c.icon = "Floor", "floor"
		c.where = "the outline within which all happens"
	}
	if nameless(p, r) {
		c.title += " " + r.ID
	}
	return c
}

// nameless reports whether people have no name for an item: then its sign says which one is meant, in the form as in problems.
func nameless(p *plan.Plan, r plan.Ref) bool {
	switch r.Kind {
	case plan.KindWall, plan.KindOpening, plan.KindBlock, plan.KindRoute:
		return true
	case plan.KindZone:
		return itemName(p, r) == ""
	}
	return false
}

// at writes where a mark stands, and in which room.
func (w *window) at(p *plan.Plan, q exact.Pt) string {
	s := fmt.Sprintf("at %s, %s %s", formatLength(q.X, w.unit()), formatLength(q.Y, w.unit()), unitMark(w.unit()))
	if room := roomAt(p, q); room != "" {
		s += " in " + room
	}
	return strings.TrimSpace(s)
}

// problemOf returns the first problem of the drawing that names the item.
func problemOf(r *study.Result, ref plan.Ref) string {
	if r == nil {
		return ""
	}
	for _, p := range r.Problems {
		for _, i := range p.Items {
			if i == ref {
				return p.Text
			}
		}
	}
	return ""
}

// lengthOf returns the length of a wall's line in grid units.
func lengthOf(c plan.Chain) (sum float64) {
	for i := 1; i < c.Len(); i++ {
		sum += exact.Dist(c.At(i-1), c.At(i))
	}
	return sum
}

// ringArea returns the area of a ring in m².
func ringArea(c plan.Chain) float64 {
	sum, n := 0.0, c.Len()
	for i := range n {
		a, b := c.At(i), c.At((i+1)%n)
		sum += float64(a.X)*float64(b.Y) - float64(a.Y)*float64(b.X)
	}
	const perMetre = 1000 * exact.PerMM
	return math.Abs(sum) / 2 / perMetre / perMetre
}
