package pick

import (
	"math"

	"enfilade/canvas/view"
	"enfilade/solver/exact"
	"enfilade/solver/plan"
)

// Face is a place on the free side of a face: of a wall, a block, or the floor's outline.
type Face struct {
	At     exact.Pt
	Normal float64 // degrees, away from the wall
	Ref    plan.Ref
	Ends   [2]exact.Pt // of the face, on its free side, which is to the left of the way from the first to the second
	Middle bool        // the pointer is in the middle between this face and the one behind it, which could be meant as well

	edge   edge       // that it belongs to
	behind edge       // that the face behind it belongs to; of a wall only
	body   plan.Chain // the ring of the block whose face it is; of a block only
}

// edge is a face as its finder knows it: it lies off grid units to the left of the way from a to b.
type edge struct {
	a, b exact.Pt
	off  float64
}

// middleReach is how near the pointer is to the middle of a wall to be in it, in px at 100 %: the pixel right on it.
const middleReach = 0.5

// faceReach is how near the pointer must come to a face to stick to it, in px at 100 %.
const faceReach = 16

// standOff is how far from a slanted face its free grid points are sought, in grid units. The corners of a slanted body
// are rounded by half a unit in x and in y, and so is the place: 1.5 units out leaves it outside by at least a tenth.
const standOff = 1.5

// FaceAt returns the nearest face of a wall, a block or the floor's inside within reach of the pixel place (x, y), and the
// grid point on its free side; in the middle of a wall the face that looks up, or of an upright wall to the left. On a level or
// upright face of whole grid units the point lies on the face itself; along it the point takes steps. Screens and glazing have
// faces too; openings are not looked at.
func FaceAt(p *plan.Plan, cam view.Camera, x, y float64, step int32) (Face, bool) {
	s := pointer(cam, x, y)
	f := faceFinder{s: s, step: step, best: units(cam, faceReach), middle: units(cam, middleReach)}
	for _, w := range p.Walls() {
		right2, left2 := w.Sides2()
		if w.Hidden || s.apart(w.Line, f.best+float64(max(right2, left2))/2) {
			continue
		}
		edges(w.Line, false, func(_ int, a, b exact.Pt) bool {
			f.wall(edge{a, b, float64(left2) / 2}, edge{b, a, float64(right2) / 2}, plan.Ref{Kind: plan.KindWall, ID: w.ID})
			return true
		})
	}
	for _, b := range p.Blocks() {
		if !b.Hidden && !s.apart(b.Ring, f.best) {
			f.ring(b.Ring, clockwise(b.Ring), plan.Ref{Kind: plan.KindBlock, ID: b.ID}, b.Ring)
		}
	}
	if p.Floor().Len() > 0 {
		f.ring(p.Floor(), !clockwise(p.Floor()), plan.Ref{Kind: plan.KindFloor}, plan.Chain{})
	}
	return f.face, f.ok
}

type faceFinder struct {
	s      spot
	step   int32
	best   float64
	middle float64 // how near the middle of a wall is in it
	face   Face
	ok     bool
}

// ring offers the edges of a ring, with the free side to their left when left says so. body is the ring of a block, empty for the
// floor.
func (f *faceFinder) ring(c plan.Chain, left bool, ref plan.Ref, body plan.Chain) {
	outward(c, left, func(e edge) {
		if f.side(e, ref) {
			f.face.body = body
		}
	})
}

// outward yields the edges of a ring with their free side to the left; it is there already when left says so.
func outward(c plan.Chain, left bool, yield func(edge)) {
	edges(c, true, func(_ int, a, b exact.Pt) bool {
		if left {
			yield(edge{a, b, 0})
		} else {
			yield(edge{b, a, 0})
		}
		return true
	})
}

// wall offers the face of a piece of wall that is on the pointer's side of its middle; within the wall it is the nearer one.
func (f *faceFinder) wall(left, right edge, ref plan.Ref) {
	beyond := f.s.aside(left.a, left.b) - (left.off-right.off)/2
	near, behind := left, right
	middle := math.Abs(beyond) <= f.middle
	if beyond < 0 && !middle || middle && !looksUp(left) {
		near, behind = right, left
	}
	if f.side(near, ref) {
		f.face.behind, f.face.Middle = behind, middle
	}
}

// looksUp reports whether a face looks up, or straight to the left.
func looksUp(e edge) bool {
	if e.a.X == e.b.X {
		return e.b.Y > e.a.Y
	}
	return e.b.X > e.a.X
}

// side offers a face and reports whether it is the nearest so far; its free side is the left one.
func (f *faceFinder) side(e edge, ref plan.Ref) bool {
	a, b, off := e.a, e.b, e.off
	dx, dy := float64(b.X)-float64(a.X), float64(b.Y)-float64(a.Y)
	l := math.Hypot(dx, dy)
	if l == 0 {
		return false
	}
	nx, ny := -dy/l, dx/l
	// The foot is sought from the pointer brought back to the line, so it is the foot on the face too.
	foot, _ := spot{f.s.x - nx*off, f.s.y - ny*off}.foot(a, b)
	on := spot{foot.x + nx*off, foot.y + ny*off}
	d := f.s.dist(on)
	if d > f.best {
		return false
	}
	f.best, f.ok = d, true
	end := func(q exact.Pt) exact.Pt {
		if off == math.Trunc(off) && (a.X == b.X || a.Y == b.Y) {
			return lifted(q, nx, ny, off)
		}
		return spot{float64(q.X) + nx*(off+standOff), float64(q.Y) + ny*(off+standOff)}.grid()
	}
	f.face = Face{At: f.free(on, a, b, nx, ny, off), Normal: math.Atan2(ny, nx) * 180 / math.Pi, Ref: ref, Ends: [2]exact.Pt{end(a), end(b)},
		edge: e}
	return true
}

// free returns the grid point for a place on a face.
func (f *faceFinder) free(on spot, a, b exact.Pt, nx, ny, off float64) exact.Pt {
	whole := off == math.Trunc(off)
	switch {
	case whole && a.Y == b.Y:
		return alongEdge(on, lifted(a, nx, ny, off), lifted(b, nx, ny, off), f.step)
	case whole && a.X == b.X:
		return alongEdge(on, lifted(a, nx, ny, off), lifted(b, nx, ny, off), f.step)
	}
	return spot{on.x + nx*standOff, on.y + ny*standOff}.grid()
}

// lifted returns a moved by off along a unit vector that is level or upright.
func lifted(a exact.Pt, nx, ny, off float64) exact.Pt {
	return spot{float64(a.X) + nx*off, float64(a.Y) + ny*off}.grid()
}

// clockwise reports whether a ring runs clockwise, by twice its area in floats.
func clockwise(c plan.Chain) bool {
	sum := 0.0
	edges(c, true, func(_ int, a, b exact.Pt) bool {
		sum += float64(a.X)*float64(b.Y) - float64(a.Y)*float64(b.X)
		return true
	})
	return sum < 0
}
