package plan

import "slices"

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
		openings, s.err = fittedAll(openings, walls, func(id string) bool { return touched[id] })
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
func put[T any, P item[T]](s *setter, kind Kind, list, items []T) []T {
	if len(items) == 0 || s.err != nil {
		return list
	}
	at := make(map[string]int, len(list))
	for i := range list {
		at[*P(&list[i]).id()] = i
	}
	list = slices.Clone(list)
	for i := range items {
		it := P(&items[i])
		k, ok := at[*it.id()]
		if !ok {
			s.err = missing(kind, *it.id())
			return list
		}
		if text := it.fault(); text != "" {
			s.err = fault(kind, *it.id(), text)
			return list
		}
		list[k] = items[i]
	}
	return list
}

// fittedAll is fitted for all walls for which touched holds, in one pass over the openings. An opening that names none of the
// walls is an error when its wall was to be touched.
func fittedAll(openings []Opening, walls []Wall, touched func(id string) bool) ([]Opening, error) {
	own := map[string][]int{}
	for i := range openings {
		if id := openings[i].Wall; touched(id) {
			own[id] = append(own[id], i)
		}
	}
	if len(own) == 0 {
		return openings, nil
	}
	now := slices.Clone(openings)
	for i := range walls {
		w := &walls[i]
		list := own[w.ID]
		if len(list) == 0 {
			continue
		}
		delete(own, w.ID)
		few := make([]Opening, len(list))
		for k, at := range list {
			few[k] = openings[at]
		}
		few, err := fitted(few, w)
		if err != nil {
			return nil, err
		}
		for k, at := range list {
			now[at] = few[k]
		}
	}
	for i := range openings { // in the plan's order, so that the same plan gives the same error
		if o := &openings[i]; len(own[o.Wall]) > 0 {
			return nil, fault(KindOpening, o.ID, "names wall \""+o.Wall+"\", which is not in the plan")
		}
	}
	return now, nil
}
