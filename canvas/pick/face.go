package pick

import (
	"math"

	"enfilade/canvas/view"
	"enfilade/solver/exact"
	"enfilade/solver/plan"
)

// Face is a place on the free side of a wall's face.
type Face struct {
	At     exact.Pt
	Normal float64 // degrees, away from the wall
	Ref    plan.Ref
	Ends   [2]exact.Pt // of the face, on its free side, which is to the left of the way from the first to the second
}

// faceReach is how near the pointer must come to a face to stick to it, in px at 100 %.
const faceReach = 16

// standOff is how far from a slanted face its free grid points are sought, in grid units. The corners of a slanted body
// are rounded by half a unit in x and in y, and so is the place: 1.5 units out leaves it outside by at least a tenth.
const standOff = 1.5

// FaceAt returns the nearest face of a wall, a block or the floor's inside within reach of the pixel place (x, y), and the
// grid point on its free side. On a level or upright face of whole grid units the point lies on the face itself; along it
// the point takes steps. Screens and glazing have faces too; openings are not looked at.
func FaceAt(p *plan.Plan, cam view.Camera, x, y float64, step int32) (Face, bool) {
	s := pointer(cam, x, y)
	f := faceFinder{s: s, step: step, best: units(cam, faceReach)}
	for _, w := range p.Walls() {
		right2, left2 := w.Sides2()
		if w.Hidden || s.apart(w.Line, f.best+float64(max(right2, left2))/2) {
			continue
		}
		edges(w.Line, false, func(_ int, a, b exact.Pt) bool {
			f.side(a, b, float64(left2)/2, plan.Ref{Kind: plan.KindWall, ID: w.ID})
			f.side(b, a, float64(right2)/2, plan.Ref{Kind: plan.KindWall, ID: w.ID})
			return true
		})
	}
	for _, b := range p.Blocks() {
		if !b.Hidden && !s.apart(b.Ring, f.best) {
			f.ring(b.Ring, clockwise(b.Ring), plan.Ref{Kind: plan.KindBlock, ID: b.ID})
		}
	}
	if p.Floor().Len() > 0 {
		f.ring(p.Floor(), !clockwise(p.Floor()), plan.Ref{Kind: plan.KindFloor})
	}
	return f.face, f.ok
}

type faceFinder struct {
	s    spot
	step int32
	best float64
	face Face
	ok   bool
}

// ring offers the edges of a ring, with the free side to their left when left says so.
func (f *faceFinder) ring(c plan.Chain, left bool, ref plan.Ref) {
	edges(c, true, func(_ int, a, b exact.Pt) bool {
		if left {
			f.side(a, b, 0, ref)
		} else {
			f.side(b, a, 0, ref)
		}
		return true
	})
}

// side offers the face that lies off units to the left of ab; its free side is the left one.
func (f *faceFinder) side(a, b exact.Pt, off float64, ref plan.Ref) {
	dx, dy := float64(b.X)-float64(a.X), float64(b.Y)-float64(a.Y)
	l := math.Hypot(dx, dy)
	if l == 0 {
		return
	}
	nx, ny := -dy/l, dx/l
	// The foot is sought from the pointer brought back to the line, so it is the foot on the face too.
	foot, _ := spot{f.s.x - nx*off, f.s.y - ny*off}.foot(a, b)
	on := spot{foot.x + nx*off, foot.y + ny*off}
	// On a tie between the two faces of a line the one on the pointer's side is meant.
	d := f.s.dist(on)
	if behind := f.s.aside(a, b) < off; behind && off == 0 {
		d = math.Nextafter(d, math.Inf(1))
	}
	if d > f.best {
		return
	}
	f.best, f.ok = d, true
	end := func(q exact.Pt) exact.Pt {
		if off == math.Trunc(off) && (a.X == b.X || a.Y == b.Y) {
			return lifted(q, nx, ny, off)
		}
		return spot{float64(q.X) + nx*(off+standOff), float64(q.Y) + ny*(off+standOff)}.grid()
	}
	f.face = Face{At: f.free(on, a, b, nx, ny, off), Normal: math.Atan2(ny, nx) * 180 / math.Pi, Ref: ref, Ends: [2]exact.Pt{end(a), end(b)}}
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
