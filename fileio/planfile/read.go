package planfile

import (
	"fmt"
	"io"
	"strconv"

	"enfilade/solver/plan"
)

// version is the newest version of the format this package knows.
const version = 1

// maxSize bounds the size of a plan file: 256 MB.
const maxSize = 256 << 20

// units are the display units, the first one for a plan that names none.
var units = []string{"m", "cm", "mm", "ft"}

// Read reads a plan. The name is the file's, for messages only.
//
//   - Errors: a *Fault, the first one found, if the text is no plan; the reader's own error, wrapped, if it fails.
//   - An item without an id gets the next free one of its kind; a block drawn as a circle without a ring gets a ring of 24
//     corners on the circle.
//   - Cost: linear in the size of the text.
func Read(r io.Reader, name string) (*plan.Plan, error) {
	text, err := io.ReadAll(io.LimitReader(r, maxSize+1))
	if err != nil {
		return nil, fmt.Errorf("%s: %w", name, err)
	}
	p, fault := parse(text)
	if fault != nil {
		fault.File = name
		return nil, fault
	}
	return p, nil
}

func parse(text []byte) (*plan.Plan, *Fault) {
	if len(text) > maxSize {
		return nil, faultf("", "is larger than %d MB, which no plan is", maxSize>>20)
	}
	if fault := checkSyntax(text); fault != nil {
		return nil, fault
	}
	for isSpace(text[0]) {
		text = text[1:]
	}
	if text[0] != '{' {
		return nil, faultf("", `is %s, must be an object that begins {"enfilade": 1`, kindOf(text))
	}
	var fault *Fault
	top := object{fault: &fault, where: func() string { return "" }}
	top.open(text)
	p := readPlan(&top)
	if fault == nil {
		fault = fitOpenings(p)
	}
	if fault != nil {
		return nil, fault
	}
	return plan.From(p), nil
}

func readPlan(top *object) plan.Parts {
	readVersion(top)
	var p plan.Parts
	p.Sheet.Title = top.text("title", "")
	p.Sheet.Place = top.text("place", "")
	p.Sheet.Unit = units[choice[uint8](top, "display_unit", units...)]
	p.Floor = top.ring("floor", false)
	p.Walls = readList(top, walls)
	p.Openings = readList(top, openings)
	p.Blocks = readList(top, blocks)
	p.Zones = readList(top, zones)
	p.Observers = readList(top, observers)
	p.Targets = readList(top, targets)
	p.Starts = readList(top, starts)
	p.Routes = readList(top, routes)
	p.Walker = plan.DefaultWalker()
	if value, ok := top.typed("walker", "{", "an object"); ok {
		p.Walker = readWalker(top.within("walker", value))
	}
	if value, ok := top.typed("brief", "[", "a list"); ok {
		p.Sheet.Brief = string(compact(nil, value))
	}
	if value, ok := top.typed("underlay", "{", "an object"); ok {
		p.Sheet.Underlay = readUnderlay(top.within("underlay", value))
	}
	p.Sheet.Extra = top.rest()
	return p
}

// readVersion asks for the member that says what the file is.
func readVersion(top *object) {
	switch v := top.whole("enfilade", 0, 1_000_000, -1); {
	case v < 0:
		top.fail("enfilade", `is missing; a plan begins {"enfilade": 1`)
	case v == 0:
		top.fail("enfilade", "is 0, must be %d", version)
	case v > version:
		top.fail("enfilade", "is version %d, newer than version %d, which this program reads; open it with a newer Enfilade", v, version)
	}
}

// readList reads one list of the plan and gives ids to the items that have none.
func readList[T any](top *object, k kind[T]) []T {
	value, ok := top.typed(k.list, "[", "a list of objects")
	if !ok {
		return nil
	}
	items := make([]T, 0, count(value))
	id := ""
	o := object{fault: top.fault, where: func() string {
		if id == "" {
			return fmt.Sprintf("%v number %d", k.kind, len(items)+1)
		}
		return plan.Ref{Kind: k.kind, ID: id}.String()
	}}
	seen := make(map[string]bool, cap(items))
	for c := inside(value); *top.fault == nil; {
		v, more := c.value()
		if !more {
			break
		}
		id = ""
		if v[0] != '{' {
			o.fail("", "is %s, must be an object", kindOf(v))
			break
		}
		o.open(v)
		id = o.text("id", "")
		if seen[id] && id != "" {
			o.fail("id", "is there twice; each of the %s needs its own", k.list)
		}
		seen[id] = true
		item := k.read(&o)
		*k.id(&item) = id
		*k.meta(&item) = o.meta()
		items = append(items, item)
	}
	if seen[""] {
		k.giveIDs(items)
	}
	return items
}

// giveIDs numbers the items without an id on from the highest number in use.
func (k kind[T]) giveIDs(items []T) {
	highest := 0
	for i := range items {
		highest = max(highest, plan.Ref{Kind: k.kind, ID: *k.id(&items[i])}.Number())
	}
	for i := range items {
		if id := k.id(&items[i]); *id == "" {
			highest++
			*id = k.kind.Letter() + strconv.Itoa(highest)
		}
	}
}

// fitOpenings says which opening has no such wall, does not fit it, or lies over another; nil when none.
func fitOpenings(p plan.Parts) *Fault {
	if len(p.Openings) == 0 {
		return nil
	}
	byID := make(map[string]int, len(p.Walls))
	for i := range p.Walls {
		byID[p.Walls[i].ID] = i
	}
	in := make(map[int][]int) // the openings of a wall
	for i, o := range p.Openings {
		where := plan.Ref{Kind: plan.KindOpening, ID: o.ID}.String()
		w, ok := byID[o.Wall]
		if !ok {
			return faultf(where+", wall", "names wall %q, which is not in the file", o.Wall)
		}
		if _, fault := p.Walls[w].Fit(o); fault != "" {
			field := ", at"
			if line := p.Walls[w].Line; o.Segment+1 >= line.Len() || line.At(o.Segment) == line.At(o.Segment+1) {
				field = ", segment"
			}
			return faultf(where+field, "%s", fault)
		}
		for _, j := range in[w] {
			if o.Over(p.Openings[j]) {
				return faultf(where+", at", "lies over opening %s; openings in one wall must not overlap", p.Openings[j].ID)
			}
		}
		in[w] = append(in[w], i)
	}
	return nil
}
