package plan

import (
	"cmp"
	"slices"
)

// DuplicateOpening cuts an opening like another one into the same straight piece of wall, as near to it as there is room.
type DuplicateOpening struct{ Opening string }

// Label says what the edit does.
func (e DuplicateOpening) Label() string { return "duplicate opening" }

// Added names the new opening.
func (e DuplicateOpening) Added(p *Plan) Ref { return freshRef(p, KindOpening, "") }

// Apply fails when there is no room for it.
func (e DuplicateOpening) Apply(p *Plan) (*Plan, error) {
	o, ok := p.Opening(e.Opening)
	if !ok {
		return nil, missing(KindOpening, e.Opening)
	}
	n := o
	n.ID, n.Meta = "", Meta{}
	for _, gap := range []int32{o.Width / 4, 0} { // with a nib of wall between them, or without
		for _, n.At = range placesBeside(p, o, gap) {
			if next, err := (AddOpening{n}).Apply(p); err == nil {
				return next, nil
			}
		}
	}
	return nil, fault(KindOpening, e.Opening, "has no room beside it for another as wide")
}

// placesBeside returns the places right beside the openings of a piece, with a gap, the nearest first.
func placesBeside(p *Plan, o Opening, gap int32) (places []int32) {
	for _, q := range p.obstacles.openings.refs() {
		if q.Wall == o.Wall && q.Segment == o.Segment {
			places = append(places, q.At+q.Width+gap, q.At-o.Width-gap)
		}
	}
	slices.SortStableFunc(places, func(a, b int32) int {
		return cmp.Compare(abs64(int64(a)-int64(o.At)), abs64(int64(b)-int64(o.At)))
	})
	return places
}
