package planfile

import (
	"bytes"
	"math"
	"strconv"

	"enfilade/solver/exact"
	"enfilade/solver/plan"
)

// object is one JSON object with the members that have not been asked for yet. After the first fault every question gets a
// zero answer, so that a reader may ask on and look for the fault once.
type object struct {
	fault   **Fault       // the reader's first fault
	where   func() string // names the object: "wall W3", or nothing for the plan itself
	members []member
	names   map[string]bool // of the members, once there are many
	pts     []exact.Pt      // reused from list to list
}

type member struct {
	name  []byte
	quote []byte // the name as it stands in the file
	value []byte
	used  bool
}

// fail notes a fault of one member; an empty name stands for the object itself.
func (o *object) fail(name, format string, args ...any) {
	if *o.fault != nil {
		return
	}
	where := o.where()
	if where != "" && name != "" {
		where += ", "
	}
	*o.fault = faultf(where+name, format, args...)
}

// open reads the members of an object into o, reusing their list.
func (o *object) open(text []byte) {
	o.members = o.members[:0]
	for c := inside(text); ; {
		quote, value, ok := c.member()
		if !ok {
			return
		}
		name := quote[1 : len(quote)-1]
		if hasEscape(name) {
			s, whole := unquote(quote)
			if !whole {
				o.fail("", "has a member whose name holds half of a surrogate pair")
				return
			}
			name = []byte(s)
		}
		if o.has(name) {
			o.fail(string(name), "is there twice; a name may stand once in an object")
			return
		}
		o.members = append(o.members, member{name: name, quote: quote, value: value})
		if len(o.members) >= manyMembers {
			o.index(len(o.members) == manyMembers)
		}
	}
}

// manyMembers is from how many on the members of an object are looked up in a map: no plan has as many that are known, and
// comparing all with all would take minutes for a file of a million.
const manyMembers = 64

// has reports whether a member of this name has been read.
func (o *object) has(name []byte) bool {
	if len(o.members) >= manyMembers {
		return o.names[string(name)]
	}
	for i := range o.members {
		if bytes.Equal(o.members[i].name, name) {
			return true
		}
	}
	return false
}

// index notes the name of the last member, or of all so far when it begins.
func (o *object) index(begin bool) {
	last := o.members[len(o.members)-1:]
	if begin {
		o.names, last = make(map[string]bool, 4*manyMembers), o.members
	}
	for _, m := range last {
		o.names[string(m.name)] = true
	}
}

// take returns the text of a member and marks it as known. A null counts as missing.
func (o *object) take(name string) (value []byte, ok bool) {
	if *o.fault != nil {
		return nil, false
	}
	for i := range o.members {
		if m := &o.members[i]; string(m.name) == name {
			m.used = true
			return m.value, m.value[0] != 'n'
		}
	}
	return nil, false
}

// rest returns the members nobody asked for, word for word, as an object; empty when there are none.
func (o *object) rest() string {
	var out []byte
	for i := range o.members {
		if m := &o.members[i]; !m.used {
			out = append(out, ',')
			out = append(out, m.quote...)
			out = append(out, ':')
			out = compact(out, m.value)
		}
	}
	if len(out) == 0 {
		return ""
	}
	out[0] = '{'
	return string(append(out, '}'))
}

// kindOf names the type of a JSON value.
func kindOf(value []byte) string {
	switch value[0] {
	case '"':
		return "a string"
	case '{':
		return "an object"
	case '[':
		return "a list"
	case 't', 'f':
		return "true or false"
	case 'n':
		return "null"
	}
	return "a number"
}

// typed returns a member of the wanted type, which is named by what its text may begin with.
func (o *object) typed(name, begins, want string) (value []byte, ok bool) {
	value, ok = o.take(name)
	if !ok {
		return nil, false
	}
	for i := range len(begins) {
		if value[0] == begins[i] {
			return value, true
		}
	}
	o.fail(name, "is %s, must be %s", kindOf(value), want)
	return nil, false
}

const numeric = "-0123456789"

func (o *object) text(name, otherwise string) string {
	value, ok := o.typed(name, `"`, "a string")
	if !ok {
		return otherwise
	}
	s, whole := unquote(value)
	if !whole {
		o.fail(name, "holds half of a surrogate pair; write the whole character")
	}
	return s
}

func (o *object) flag(name string) bool {
	value, ok := o.typed(name, "tf", "true or false")
	return ok && value[0] == 't'
}

// choice returns the place of a member's word in words; the first word stands for a missing member.
func choice[T ~uint8](o *object, name string, words ...string) T {
	value, ok := o.typed(name, `"`, "a string")
	if !ok {
		return 0
	}
	for i, w := range words {
		if string(value[1:len(value)-1]) == w {
			return T(i)
		}
	}
	list := ""
	for i, w := range words {
		switch {
		case i > 0 && i == len(words)-1:
			list += " or "
		case i > 0:
			list += ", "
		}
		list += w
	}
	o.fail(name, "is %s, must be %s", brief(value), list)
	return 0
}

// length returns a member in grid units between lo and hi; ok is false when it is missing or null.
func (o *object) length(name string, lo, hi int32) (units int32, ok bool) {
	value, ok := o.typed(name, numeric, "a number of mm")
	if !ok {
		return 0, false
	}
	return o.units(name, value, lo, hi)
}

// units reads a number of millimetres between lo and hi grid units.
func (o *object) units(name string, value []byte, lo, hi int32) (int32, bool) {
	n, big, offGrid := tenths(value)
	switch {
	case big || n < int64(lo) || n > int64(hi):
		o.fail(name, "is %s, must be from %s to %s mm", brief(value), appendMM(nil, lo), appendMM(nil, hi))
	case offGrid:
		o.fail(name, "is %s, which is off the grid of 0.1 mm; give mm with at most one decimal", brief(value))
	default:
		return int32(n), true
	}
	return 0, false
}

// brief shortens what is quoted in a message.
func brief(value []byte) string {
	if len(value) > 40 {
		return string(value[:36]) + " ..."
	}
	return string(value)
}

// real returns a float between lo and hi; ok is false when it is missing or null.
func (o *object) real(name string, lo, hi float64, what string) (v float64, ok bool) {
	value, ok := o.typed(name, numeric, "a number")
	if !ok {
		return 0, false
	}
	v, err := strconv.ParseFloat(string(value), 64)
	if err != nil || v < lo || v > hi {
		o.fail(name, "is %s, must be %s", brief(value), what)
		return 0, false
	}
	if v == 0 {
		v = 0 // never the negative zero, which would not read back the same
	}
	return v, true
}

// whole returns a whole number between lo and hi, or otherwise when it is missing.
func (o *object) whole(name string, lo, hi, otherwise int) int {
	value, ok := o.typed(name, numeric, "a whole number")
	if !ok {
		return otherwise
	}
	v, err := strconv.ParseFloat(string(value), 64)
	if err != nil || v != math.Trunc(v) || v < float64(lo) || v > float64(hi) {
		o.fail(name, "is %s, must be a whole number from %d to %d", brief(value), lo, hi)
		return otherwise
	}
	return int(v)
}

// place returns a member [x, y], which must be there.
func (o *object) place(name string) exact.Pt {
	value, ok := o.typed(name, "[", "a place [x, y] in mm")
	if !ok {
		o.fail(name, "is missing; give its place as [x, y] in mm")
		return exact.Pt{}
	}
	return o.point(name, value)
}

func (o *object) point(name string, value []byte) exact.Pt {
	if value[0] != '[' {
		o.fail(name, "holds %s where a point [x, y] must be", kindOf(value))
		return exact.Pt{}
	}
	var xy [2]int32
	n := 0
	for c := inside(value); ; n++ {
		v, ok := c.value()
		if !ok {
			break
		}
		if n >= 2 {
			continue
		}
		if v[0] != '-' && !isDigit(v[0]) {
			o.fail(name, "holds %s where a coordinate in mm must be", kindOf(v))
			return exact.Pt{}
		}
		if xy[n], ok = o.units(name, v, -plan.MaxCoord, plan.MaxCoord); !ok {
			return exact.Pt{}
		}
	}
	if n != 2 {
		o.fail(name, "holds a point of %d numbers; a point is [x, y]", n)
	}
	return exact.Pt{X: xy[0], Y: xy[1]}
}

// points returns a list of points of at least the given number; a missing list counts as an empty one.
func (o *object) points(name string, least int) plan.Chain {
	value, ok := o.typed(name, "[", "a list of points [[x, y], ...] in mm")
	pts := o.pts[:0]
	if ok {
		for c := inside(value); ; {
			v, more := c.value()
			if !more || *o.fault != nil {
				break
			}
			pts = append(pts, o.point(name, v))
		}
	}
	if len(pts) < least {
		o.fail(name, "needs %s points or more, has %d", [...]string{"no", "one", "two", "three"}[least], len(pts))
	}
	o.pts = pts
	return plan.ChainOf(pts...)
}

// ring returns a list of three points or more; unless it must be there it may be missing or empty.
func (o *object) ring(name string, must bool) plan.Chain {
	if c := o.points(name, 0); c.Len() == 0 && !must {
		return c
	}
	return o.points(name, 3)
}

// within returns the object that is the value of a member.
func (o *object) within(name string, value []byte) *object {
	inner := &object{fault: o.fault, where: func() string {
		if outer := o.where(); outer != "" {
			return outer + ", " + name
		}
		return name
	}}
	inner.open(value)
	return inner
}

// meta returns what any item may carry; it is asked for last, since it takes what nobody knew.
func (o *object) meta() plan.Meta {
	return plan.Meta{Locked: o.flag("locked"), Hidden: o.flag("hidden"), Extra: o.rest()}
}
