package plan

import (
	"cmp"
	"slices"
)

// SetItems replaces many items at once, each the one with its id, in one pass over the lists.
type SetItems struct {
	Text      string // the label
	Walls     []Wall // shortened walls slide their openings along
	Openings  []Opening
	Blocks    []Block
	Zones     []Zone
	Observers []Observer
	Targets   []Target
	Starts    []Start
	Routes    []Route
}

// Label returns the text given.
func (e SetItems) Label() string { return e.Text }

// Apply replaces all items or none: an item that is not in the plan or is illegal, or an opening that does not fit, is an
// error.
func (e SetItems) Apply(p *Plan) (*Plan, error) {
	d := draftOf(p)
	s := setter{}
	walls := put(&s, KindWall, p.obstacles.walls, e.Walls)
	openings := put(&s, KindOpening, p.obstacles.openings, e.Openings)
	blocks := put(&s, KindBlock, p.obstacles.blocks, e.Blocks)
	if s.err == nil && len(e.Walls)+len(e.Openings) > 0 {
		touched := make(map[string]bool, len(e.Walls)+len(e.Openings))
		for i := range e.Walls {
			touched[e.Walls[i].ID] = true
		}
		for i := range e.Openings {
			touched[e.Openings[i].Wall] = true
		}
		openings, s.err = fittedAll(openings, &walls, func(id string) bool { return touched[id] })
	}
	if len(e.Walls)+len(e.Openings)+len(e.Blocks) > 0 {
		o := d.obstacles()
		o.walls, o.openings, o.blocks = walls, openings, blocks
	}
	if len(e.Zones)+len(e.Observers)+len(e.Targets)+len(e.Starts)+len(e.Routes) > 0 {
		m := d.marks()
		m.zones = put(&s, KindZone, m.zones, e.Zones)
		m.observers = put(&s, KindObserver, m.observers, e.Observers)
		m.targets = put(&s, KindTarget, m.targets, e.Targets)
		m.starts = put(&s, KindStart, m.starts, e.Starts)
		m.routes = put(&s, KindRoute, m.routes, e.Routes)
	}
	return d.done(s.err)
}

type setter struct{ err error }

// put returns the list with some items replaced, the list itself when there are none.
func put[T any, P item[T]](s *setter, kind Kind, l list[T], items []T) list[T] {
	e := l.edit()
	for i := 0; i < len(items) && s.err == nil; i++ {
		it := P(&items[i])
		k := at[T, P](&l, *it.id())
		if k < 0 {
			s.err = missing(kind, *it.id())
		} else if text := it.fault(); text != "" {
			s.err = fault(kind, *it.id(), text)
		} else {
			*e.at(k) = items[i]
		}
	}
	return e.list
}

// fittedAll is fitted for all walls for which touched holds, in one pass over the openings. An opening that names none of the
// walls is an error when its wall was to be touched.
func fittedAll(openings list[Opening], walls *list[Wall], touched func(id string) bool) (list[Opening], error) {
	type hung struct{ wall, opening int }
	var own []hung
	lost := -1 // the first whose wall is not there
	for i, o := range openings.refs() {
		if !touched(o.Wall) {
			continue
		}
		if k := at(walls, o.Wall); k >= 0 {
			own = append(own, hung{k, i})
		} else if lost < 0 {
			lost = i
		}
	}
	// In the plan's order, so that the same plan gives the same error.
	slices.SortFunc(own, func(a, b hung) int { return cmp.Or(cmp.Compare(a.wall, b.wall), cmp.Compare(a.opening, b.opening)) })
	e := openings.edit()
	var list []int
	for n := 0; n < len(own); {
		k := own[n].wall
		for list = list[:0]; n < len(own) && own[n].wall == k; n++ {
			list = append(list, own[n].opening)
		}
		if err := fitOwn(&e, list, walls.at(k)); err != nil {
			return openings, err
		}
	}
	if lost >= 0 {
		o := openings.at(lost)
		return openings, fault(KindOpening, o.ID, "names wall \""+o.Wall+"\", which is not in the plan")
	}
	return e.list, nil
}
