package plan

import (
	"fmt"

	"enfilade/solver/exact"
)

// SplitWall parts a wall in two at a point of one of its straight pieces, the second with a new id. The openings stay where
// they are. A closed wall is parted there and at its first corner.
type SplitWall struct {
	Wall    string
	Segment int
	At      exact.Pt // a grid point on the piece, as NearestOn gives it
}

// Label says what the edit does.
func (e SplitWall) Label() string { return "split wall" }

// Added names the second wall.
func (e SplitWall) Added(p *Plan) Ref { return freshRef(p, KindWall, "") }

// Apply fails when the point does not lie on the piece, is an end of the wall, or an opening lies across it.
func (e SplitWall) Apply(p *Plan) (*Plan, error) {
	i := at(&p.obstacles.walls, e.Wall)
	if i < 0 {
		return nil, missing(KindWall, e.Wall)
	}
	w := *p.obstacles.walls.at(i)
	pieces := w.Line.Len() - 1
	if e.Segment < 0 || e.Segment >= pieces || !OnPiece(w.Line.At(e.Segment), w.Line.At(e.Segment+1), e.At) {
		return nil, fault(KindWall, e.Wall, "does not run through the place; click on its line")
	}
	seg := e.Segment
	if e.At == w.Line.At(seg+1) {
		seg++
	}
	corner := e.At == w.Line.At(seg)
	if corner && (seg == 0 || seg == pieces) {
		return nil, fault(KindWall, e.Wall, "ends there; click between its ends to split it")
	}
	first, second := w, w
	first.Line = Chain{append(w.Line.Points()[:seg+1:seg+1], e.At)}
	if corner {
		first.Line = Chain{w.Line.Points()[:seg+1]}
	}
	from := seg + 1
	second.Line = Chain{append([]exact.Pt{e.At}, w.Line.pts[from:]...)}
	second.ID, second.Extra = NextID(p, KindWall), ""
	openings, err := e.openings(p, &first, &second, seg, corner)
	if err != nil {
		return nil, err
	}
	d := draftOf(p)
	o := d.obstacles()
	o.walls = o.walls.put(i, first).with(second)
	o.openings = openings
	return d.plan(), nil
}

// openings hands the openings to the two walls.
func (e SplitWall) openings(p *Plan, first, second *Wall, seg int, corner bool) (list[Opening], error) {
	list := p.obstacles.openings
	now := list.edit()
	for i, o := range list.refs() {
		if o.Wall != e.Wall || o.Segment < seg {
			continue
		}
		if o.Segment == seg && !corner {
			near := first.Line.At(seg)
			len2 := exact.Dist2(near, e.At)
			if upTo(len2, int64(o.At)+int64(o.Width)) {
				continue
			}
			if int64(o.At)*int64(o.At) < len2 {
				return list, errAcross(o)
			}
			o = now.at(i)
			o.Wall, o.Segment = second.ID, 0
			o.shifted(second, -exact.Dist(near, e.At))
			continue
		}
		o = now.at(i)
		o.Wall, o.Segment = second.ID, o.Segment-seg
	}
	list = now.list
	for _, w := range []*Wall{first, second} {
		var err error
		if list, err = fitted(list, w); err != nil {
			return list, err
		}
	}
	return list, nil
}

// CloseWall leads a wall's line back to its first corner.
type CloseWall struct{ Wall string }

// Label says what the edit does.
func (e CloseWall) Label() string { return "close wall" }

// Apply fails when the wall is closed already, or has fewer than three corners.
func (e CloseWall) Apply(p *Plan) (*Plan, error) {
	i := at(&p.obstacles.walls, e.Wall)
	if i < 0 {
		return nil, missing(KindWall, e.Wall)
	}
	w := *p.obstacles.walls.at(i)
	switch n := w.Line.Len(); {
	case w.Line.Closed():
		return nil, fault(KindWall, e.Wall, "is closed already")
	case n < 3:
		return nil, fault(KindWall, e.Wall, fmt.Sprintf("has %d corners; a closed wall needs three", n))
	}
	w.Line = Chain{append(w.Line.Points(), w.Line.At(0))}
	d := draftOf(p)
	d.obstacles().walls = p.obstacles.walls.put(i, w)
	return d.plan(), nil
}
