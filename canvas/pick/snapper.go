package pick

import (
	"enfilade/canvas/view"
	"enfilade/solver/exact"
	"enfilade/solver/plan"
)

// Snapper finds where places snap to. It keeps its scratch space from call to call, so that a move of the pointer allocates
// nothing, and the boxes around what the last plan has to snap to.
type Snapper struct {
	On   Set  // the kinds of snapping that are switched on
	Feet bool // the grid goes by feet and inches
	kept kept
	near []nearEdge
}

// nearEdge is a straight piece within reach.
type nearEdge struct {
	ref  plan.Ref
	a, b exact.Pt
}

// mostNear bounds how many pieces within reach are tried against each other for crossings: where more lie under one
// fingertip, one has to zoom in.
const mostNear = 128

// At returns where the place under the pixel (x, y) snaps to: a near end, else the nearest middle or crossing, else a near
// line, else what it is in line with, else the grid.
func (n *Snapper) At(p *plan.Plan, cam view.Camera, x, y float64, to SnapTo) Snap {
	s := pointer(cam, x, y)
	if to.Free {
		return Snap{At: s.grid()}
	}
	f := search{n: n, s: s, cam: cam, to: to, step: 1, reach: units(cam, snapPoint), guide: units(cam, snapGuide)}
	if n.On.Has(SnapGrid) {
		f.step = n.Step(cam)
	}
	f.end.best, f.point.best, f.along.best = f.reach, f.reach, units(cam, snapAlong)
	n.near = n.near[:0]
	f.gather(p)
	f.crossings()
	switch {
	case f.end.ok:
		return f.end.snap
	case f.point.ok:
		return f.point.snap
	case f.along.ok:
		return f.onEdge()
	}
	return f.inLine()
}

// Step returns the snap grid's step at this zoom, in grid units.
func (n *Snapper) Step(cam view.Camera) int32 {
	if n.Feet {
		return FeetStep(cam)
	}
	return GridStep(cam)
}

// search is one search for where a place snaps to.
type search struct {
	n     *Snapper
	s     spot
	cam   view.Camera
	to    SnapTo
	step  int32   // of the grid; 1 when the grid is off
	reach float64 // in grid units, as all that follows
	guide float64
	far   float64
	least float64
	begun float64 // how far the place is from the line's beginning

	end   closest // ends and corners
	point closest // middles and crossings
	along closest // lines
	up    ray     // in line with a point above or below
	level ray     // in line with a point beside
	slant ray     // in line with, parallel to or square to a slanted piece
}

// closest keeps the snap with the smallest distance, the later one on a tie.
type closest struct {
	snap Snap
	best float64
	ok   bool
}

func (c *closest) offer(d float64, s Snap) {
	if d <= c.best {
		c.snap, c.best, c.ok = s, d, true
	}
}

// gather looks at everything near the place once.
func (f *search) gather(p *plan.Plan) {
	f.far, f.least = units(f.cam, guideFar), units(f.cam, guideLeast)
	if f.to.From != nil {
		f.begun = f.s.dist(spotOf(*f.to.From))
	}
	f.n.kept.of(p)
	window := f.window(f.far)
	for i, b := range f.n.kept.boxes {
		if b.hi.X < window.lo.X || b.lo.X > window.hi.X || b.hi.Y < window.lo.Y || b.lo.Y > window.hi.Y {
			continue
		}
		if sh := &f.n.kept.shapes[i]; f.to.Skip == nil || !f.to.Skip(sh.ref) {
			f.shape(sh)
		}
	}
	anywhere := units(f.cam, 1e9)
	for i, q := range f.to.More {
		f.corner(q, plan.Ref{}, anywhere)
		if i > 0 {
			f.edge(f.to.More[i-1], q, plan.Ref{})
		}
	}
	if f.to.From != nil && (f.n.On.Has(SnapInLine) || f.n.On.Has(SnapParallel)) {
		f.lineUp(*f.to.From, anywhere)
	}
}

// window returns the box of what lies no farther than so many units in x and in y.
func (f *search) window(far float64) box {
	return box{spot{f.s.x - far, f.s.y - far}.grid(), spot{f.s.x + far, f.s.y + far}.grid()}
}

// shape offers all that a shape has.
func (f *search) shape(sh *shape) {
	if sh.centre != nil {
		f.middle(*sh.centre, Snap{Ref: sh.ref})
		return
	}
	n := sh.pts.Len()
	for i := range n {
		q := sh.pts.At(i)
		f.corner(q, sh.ref, f.far)
		switch {
		case i+1 < n:
			f.edge(q, sh.pts.At(i+1), sh.ref)
		case sh.ring:
			f.edge(q, sh.pts.At(0), sh.ref)
		}
	}
}

// corner offers a corner.
func (f *search) corner(q exact.Pt, ref plan.Ref, far float64) {
	if f.n.On.Has(SnapCorner) && !f.s.off(q, q, f.reach) {
		f.end.offer(f.s.dist(spotOf(q)), Snap{At: q, Kind: SnapCorner, Ref: ref})
	}
	if f.n.On.Has(SnapInLine) {
		f.lineUp(q, far)
	}
}

// edge offers a straight piece: its middle, itself, and the guide lines it gives.
func (f *search) edge(a, b exact.Pt, ref plan.Ref) {
	if a == b {
		return
	}
	if !f.s.off(a, b, f.reach) {
		f.close(a, b, ref)
	}
	if a.X != b.X && a.Y != b.Y {
		f.slanted(a, b)
	}
}

// close offers a piece that may be within reach.
func (f *search) close(a, b exact.Pt, ref plan.Ref) {
	foot, _ := f.s.foot(a, b)
	if d := f.s.dist(foot); d <= f.reach {
		f.middle(middleOf(a, b), Snap{Ref: ref, Edge: [2]exact.Pt{a, b}})
		if f.n.On.Has(SnapAlong) {
			f.along.offer(d, Snap{Kind: SnapAlong, Ref: ref, Edge: [2]exact.Pt{a, b}})
		}
		if len(f.n.near) <= mostNear {
			f.n.near = append(f.n.near, nearEdge{ref, a, b})
		}
	}
}

func (f *search) middle(m exact.Pt, s Snap) {
	if f.n.On.Has(SnapMiddle) {
		s.At, s.Kind = m, SnapMiddle
		f.point.offer(f.s.dist(spotOf(m)), s)
	}
}

// crossings offers every crossing of two pieces within reach.
func (f *search) crossings() {
	near := f.n.near
	if !f.n.On.Has(SnapCrossing) || len(near) > mostNear {
		return
	}
	for i, e := range near {
		for _, g := range near[:i] {
			if at, ok := crossing(e.a, e.b, g.a, g.b); ok {
				f.point.offer(f.s.dist(spotOf(at)), Snap{At: at, Kind: SnapCrossing, Ref: e.ref, Edge: [2]exact.Pt{e.a, e.b}})
			}
		}
	}
}

// inLine returns where the place goes when nothing is near: onto the guide lines it is in line with, else the grid.
func (f *search) inLine() Snap {
	if s, ok := f.guided(); ok {
		return s
	}
	if !f.n.On.Has(SnapGrid) {
		return Snap{At: f.s.grid()}
	}
	return Snap{At: exact.Pt{X: rounded(f.s.x, f.step), Y: rounded(f.s.y, f.step)}, Kind: SnapGrid}
}
