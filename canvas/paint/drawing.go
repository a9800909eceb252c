package paint

import (
	"enfilade/solver/arrange"
	"enfilade/solver/exact"
	"enfilade/solver/plan"
)

// Drawing is what a plan's obstacles look like: their bodies and lines, ready to be drawn at any zoom, and an index that
// tells labels where there is ink. It never changes, so a worker may make it and any goroutine may use it.
type Drawing struct {
	obstacles *plan.Obstacles
	eye       int32 // what is lower than this is drawn low

	bodies []body
	rings  [][2]int32 // a ring is pts[ring[0]:ring[1]]
	pts    []exact.Pt
	lines  []inkLine
	doors  []door
	refs   map[plan.Ref]span
	ink    inkIndex
}

// span is a run of bodies, a run of lines, and of an opening its door, counted from 1.
type span struct{ body0, body1, line0, line1, door int32 }

// look is how a body or line is drawn.
type look uint8

const (
	lookWall    look = iota // ink
	lookLow                 // outline and hatch
	lookGlazing             // two lines with ticks
	lookScreen              // dashes
	lookShut                // a shut leaf, drawn with its door
)

type body struct {
	look   look
	hidden bool
	item   plan.Ref
	rings  [2]int32
	thick  float64 // its thickness in grid units where that is known, else 0
}

type inkLine struct {
	look   look
	hidden bool
	item   plan.Ref
	pts    [2]int32
}

// NewDrawing draws the obstacles of a plan. What is lower than the walker's eye is drawn low.
func NewDrawing(p *plan.Plan) *Drawing {
	o, _ := arrange.Draw(p)
	d := &Drawing{obstacles: p.Obstacles(), eye: p.Walker().Eye, refs: make(map[plan.Ref]span, len(o.Items))}
	d.pts = make([]exact.Pt, 0, len(o.Segments))
	traits := newTraits(p)
	for i := 0; i < len(o.Segments); {
		j := i + 1
		for j < len(o.Segments) && o.Segments[j].Body == o.Segments[i].Body && o.Segments[j].Item == o.Segments[i].Item {
			j++
		}
		if o.Segments[i].Body != 0 { // the floor is drawn by itself
			d.addShape(o, o.Segments[i:j], &traits)
		}
		i = j
	}
	d.doors = doorsOf(p)
	for i := range d.doors {
		sp := d.refs[d.doors[i].item]
		sp.door = int32(i) + 1
		d.refs[d.doors[i].item] = sp
	}
	d.ink = newInkIndex(d)
	return d
}

// fits reports whether the drawing shows the obstacles of p.
func (d *Drawing) fits(p *plan.Plan) bool {
	return d != nil && d.obstacles == p.Obstacles() && d.eye == p.Walker().Eye
}

// addShape adds the segments of one body, or of one item's lines.
func (d *Drawing) addShape(o *arrange.Outline, segs []arrange.Segment, traits *traits) {
	item := o.Items[segs[0].Item]
	t := traits.of(item)
	sp, known := d.refs[item]
	if !known {
		sp = span{int32(len(d.bodies)), int32(len(d.bodies)), int32(len(d.lines)), int32(len(d.lines)), 0}
	}
	if b := segs[0].Body; b == arrange.NoBody {
		d.addLines(segs, inkLine{look: t.lineLook, hidden: t.hidden, item: item})
		sp.line1 = int32(len(d.lines))
	} else {
		first := int32(len(d.rings))
		d.addRings(segs)
		d.bodies = append(d.bodies, body{look: d.bodyLook(item, o.Bodies[b].Stops), hidden: t.hidden, item: item,
			rings: [2]int32{first, int32(len(d.rings))}, thick: t.thick})
		sp.body1 = int32(len(d.bodies))
	}
	d.refs[item] = sp
}

func (d *Drawing) bodyLook(item plan.Ref, s arrange.Stops) look {
	switch {
	case item.Kind == plan.KindOpening:
		return lookShut
	case s.Top < d.eye:
		return lookLow
	}
	return lookWall
}

// addRings adds the rings of a body: segments that follow each other, each ring up to where it began.
func (d *Drawing) addRings(segs []arrange.Segment) {
	first := int32(len(d.pts))
	for i, s := range segs {
		d.pts = append(d.pts, s.A)
		if i+1 == len(segs) || segs[i+1].A != s.B || s.B == d.pts[first] {
			d.rings = append(d.rings, [2]int32{first, int32(len(d.pts))})
			first = int32(len(d.pts))
		}
	}
}

// addLines adds chains of segments that follow each other.
func (d *Drawing) addLines(segs []arrange.Segment, line inkLine) {
	for i, s := range segs {
		if i == 0 || segs[i-1].B != s.A {
			line.pts[0] = int32(len(d.pts))
			d.pts = append(d.pts, s.A)
		}
		d.pts = append(d.pts, s.B)
		if i+1 == len(segs) || segs[i+1].A != s.B {
			line.pts[1] = int32(len(d.pts))
			d.lines = append(d.lines, line)
		}
	}
}

// trait is what an item's look depends on besides its outline.
type trait struct {
	lineLook look
	hidden   bool
	thick    float64
}

// traits finds the trait of any obstacle of a plan.
type traits struct {
	list map[plan.Ref]trait
}

func newTraits(p *plan.Plan) traits {
	t := traits{make(map[plan.Ref]trait, p.NumWalls()+p.NumOpenings()+p.NumBlocks())}
	kinds := make(map[string]look, p.NumWalls())
	for _, w := range p.Walls() {
		lk := lookWall
		switch w.Kind {
		case plan.Glazing:
			lk = lookGlazing
		case plan.Screen:
			lk = lookScreen
		case plan.Low:
			if w.Height < p.Walker().Eye {
				lk = lookLow
			}
		}
		kinds[w.ID] = lk
		right2, left2 := w.Sides2()
		t.list[plan.Ref{Kind: plan.KindWall, ID: w.ID}] = trait{lk, w.Hidden, float64(right2+left2) / 2}
	}
	for _, o := range p.Openings() {
		t.list[plan.Ref{Kind: plan.KindOpening, ID: o.ID}] = trait{lookShut, o.Hidden, 0}
	}
	for _, b := range p.Blocks() {
		t.list[plan.Ref{Kind: plan.KindBlock, ID: b.ID}] = trait{lookWall, b.Hidden, 0}
	}
	return t
}

func (t *traits) of(item plan.Ref) trait { return t.list[item] }
