package pick

import (
	"math"

	"enfilade/canvas/view"
	"enfilade/solver/exact"
	"enfilade/solver/plan"
)

// SnapKind says what a place snapped to.
type SnapKind uint8

// What a place can snap to.
const (
	SnapNone   SnapKind = iota // nothing: the grid point under the pointer
	SnapGrid                   // the snap grid
	SnapCorner                 // a corner or a wall's end
	SnapAlong                  // the line of a wall, or the outline of a block, a zone or the floor
)

// Snap is where the pointer's place goes.
type Snap struct {
	At   exact.Pt
	Kind SnapKind
	Ref  plan.Ref    // what was snapped to, for a corner or along a line
	Edge [2]exact.Pt // the straight piece, along a line
}

// SnapTo says what may be snapped to. The zero value snaps to everything.
type SnapTo struct {
	Free bool                // to nothing
	Skip func(plan.Ref) bool // items that do not count: those that are being dragged
	From *exact.Pt           // where a line was begun: its x and y are taken over when near
	More []exact.Pt          // further corners: those of a line that is being drawn
}

// Reach of snapping, in px at 100 %.
const (
	snapCorner = 10
	snapAlong  = 8
)

// GridStep returns the snap grid's step at this zoom, in grid units: the smallest of 1, 2, 5 times a power of ten, from
// 0.1 mm up, that is at least 3 px wide. At the scale a gallery opens in it is 0.10 m.
func GridStep(cam view.Camera) int32 {
	const least = 3
	want := units(cam, least)
	for step := int64(1); step <= int64(plan.MaxCoord); step *= 10 {
		for _, d := range []int64{1, 2, 5} {
			if float64(d*step) >= want {
				return int32(d * step)
			}
		}
	}
	return plan.MaxCoord
}

// SnapAt returns where the place under the pixel (x, y) snaps to: a near corner, else a near line, else the grid.
func SnapAt(p *plan.Plan, cam view.Camera, x, y float64, to SnapTo) Snap {
	s := pointer(cam, x, y)
	if to.Free {
		return Snap{At: s.grid()}
	}
	if c, ok := snapToCorner(p, cam, s, to); ok {
		return c
	}
	if a, ok := snapToLine(p, cam, s, to); ok {
		return a
	}
	return snapToGrid(cam, s, to)
}

func snapToCorner(p *plan.Plan, cam view.Camera, s spot, to SnapTo) (Snap, bool) {
	best, out := units(cam, snapCorner), Snap{}
	offer := func(q exact.Pt, ref plan.Ref) {
		if d := s.dist(spotOf(q)); d <= best {
			best, out = d, Snap{At: q, Kind: SnapCorner, Ref: ref}
		}
	}
	for sh := range shapes(p) {
		if to.Skip != nil && to.Skip(sh.ref) || s.apart(sh.pts, best) {
			continue
		}
		for _, q := range sh.pts.All() {
			offer(q, sh.ref)
		}
	}
	for _, q := range to.More {
		offer(q, plan.Ref{})
	}
	return out, out.Kind == SnapCorner
}

func snapToLine(p *plan.Plan, cam view.Camera, s spot, to SnapTo) (Snap, bool) {
	best, out := units(cam, snapAlong), Snap{}
	for sh := range shapes(p) {
		if to.Skip != nil && to.Skip(sh.ref) || s.apart(sh.pts, best) {
			continue
		}
		edges(sh.pts, sh.ring, func(_ int, a, b exact.Pt) bool {
			f, _ := s.foot(a, b)
			if d := s.dist(f); d <= best {
				best, out = d, Snap{At: onEdge(cam, f, a, b, to.From), Kind: SnapAlong, Ref: sh.ref, Edge: [2]exact.Pt{a, b}}
			}
			return true
		})
	}
	return out, out.Kind == SnapAlong
}

// onEdge returns the grid point for a foot on an edge: on a level or upright edge it takes the snap grid along it, and
// the place straight across from where a line was begun.
func onEdge(cam view.Camera, f spot, a, b exact.Pt, from *exact.Pt) exact.Pt {
	at := f.grid()
	if a.X != b.X && a.Y != b.Y {
		return at
	}
	step := GridStep(cam)
	along := func(v float64, lo, hi int32, begun *int32) int32 {
		n := rounded(v, step)
		if begun != nil && math.Abs(v-float64(*begun)) <= units(cam, snapAlong) {
			n = *begun
		}
		return min(max(n, min(lo, hi)), max(lo, hi))
	}
	var fx, fy *int32
	if from != nil {
		fx, fy = &from.X, &from.Y
	}
	if a.Y == b.Y {
		return exact.Pt{X: along(f.x, a.X, b.X, fx), Y: a.Y}
	}
	return exact.Pt{X: a.X, Y: along(f.y, a.Y, b.Y, fy)}
}

func snapToGrid(cam view.Camera, s spot, to SnapTo) Snap {
	step := GridStep(cam)
	at := exact.Pt{X: rounded(s.x, step), Y: rounded(s.y, step)}
	if to.From != nil {
		if math.Abs(s.x-float64(to.From.X)) <= units(cam, snapAlong) {
			at.X = to.From.X
		}
		if math.Abs(s.y-float64(to.From.Y)) <= units(cam, snapAlong) {
			at.Y = to.From.Y
		}
	}
	return Snap{At: at, Kind: SnapGrid}
}

// rounded returns the multiple of step nearest to v, inside the legal range.
func rounded(v float64, step int32) int32 {
	n := math.Round(v/float64(step)) * float64(step)
	if n > float64(plan.MaxCoord) || n < -float64(plan.MaxCoord) {
		n = math.Trunc(v/float64(step)) * float64(step)
	}
	return held(n)
}
