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
	SnapNone     SnapKind = iota // nothing: the grid point under the pointer
	SnapGrid                     // the snap grid
	SnapCorner                   // a corner or a wall's end
	SnapMiddle                   // the middle of a straight piece, or the centre of a round block
	SnapCrossing                 // where two straight pieces cross
	SnapAlong                    // the line of a wall, or the outline of a block, a zone or the floor
	SnapSquare                   // where the way from the line's beginning meets, or leaves, a straight piece at a right angle
	SnapParallel                 // a way from the line's beginning parallel to a straight piece
	SnapInLine                   // in line with a point, level or upright, or with a straight piece
)

// Set is a set of kinds of snapping.
type Set uint16

// AllSnaps is every kind of snapping.
const AllSnaps = Set(1<<(SnapInLine+1) - 1)

// Has reports whether a kind is in the set.
func (s Set) Has(k SnapKind) bool { return s&(1<<k) != 0 }

// With returns the set with a kind put in or taken out.
func (s Set) With(k SnapKind, in bool) Set {
	if in {
		return s | 1<<k
	}
	return s &^ (1 << k)
}

// Snap is where the pointer's place goes.
type Snap struct {
	At     exact.Pt
	Kind   SnapKind
	Ref    plan.Ref    // what was snapped to, for a corner or along a line
	Edge   [2]exact.Pt // the straight piece: the one lain on, left at a right angle, or followed in parallel
	Guides [2]Guide    // what the place is in line with
}

// Guide is a quiet line that shows what a place is in line with: from a point of the drawing to the place. Its ends are
// equal when there is none.
type Guide struct{ From, To exact.Pt }

// Shown reports whether there is anything to draw.
func (g Guide) Shown() bool { return g.From != g.To }

// SnapTo says what may be snapped to. The zero value snaps to everything.
type SnapTo struct {
	Free bool                // to nothing
	Skip func(plan.Ref) bool // items that do not count: those that are being dragged
	From *exact.Pt           // where a line was begun
	More []exact.Pt          // further corners: those of a line that is being drawn
}

// SnapReach is the farthest that snapping moves a place, in px at 100 %, but for the half unit of rounding to grid points.
const SnapReach = 10

// Reach of snapping by kind, in px at 100 %.
const (
	snapPoint = SnapReach
	snapAlong = 8
	snapGuide = 6
	// guideFar is how far points and pieces are looked at for guide lines.
	guideFar = 240
	// guideLeast is how long a slanted guide line from the line's beginning must be: nearer, every direction is.
	guideLeast = 30
)

// stepLeast is how wide a step of the snap grid is at the least, in px at 100 %.
const stepLeast = 3

// GridStep returns the snap grid's step at this zoom, in grid units: the smallest of 1, 2, 5 times a power of ten, from
// 0.1 mm up, that is at least 3 px wide. At the scale a gallery opens in it is 0.10 m.
func GridStep(cam view.Camera) int32 {
	want := units(cam, stepLeast)
	for step := int64(1); step <= int64(plan.MaxCoord); step *= 10 {
		for _, d := range []int64{1, 2, 5} {
			if float64(d*step) >= want {
				return int32(d * step)
			}
		}
	}
	return plan.MaxCoord
}

// FeetStep is GridStep for plans in feet and inches: half an inch, 1, 3 or 6 inches, or 1, 2, 5 times a power of ten feet;
// nearer than half an inch can be seen, GridStep.
func FeetStep(cam view.Camera) int32 {
	const inch, foot = 254, 3048
	want := units(cam, stepLeast)
	if want <= inch/4 {
		return GridStep(cam)
	}
	for _, step := range []int32{inch / 2, inch, 3 * inch, 6 * inch} {
		if float64(step) >= want {
			return step
		}
	}
	for step := int64(foot); step <= int64(plan.MaxCoord); step *= 10 {
		for _, d := range []int64{1, 2, 5} {
			if float64(d*step) >= want && d*step <= int64(plan.MaxCoord) {
				return int32(d * step)
			}
		}
	}
	return plan.MaxCoord
}

// SnapAt returns where the place under the pixel (x, y) snaps to when everything may be snapped to.
func SnapAt(p *plan.Plan, cam view.Camera, x, y float64, to SnapTo) Snap {
	return (&Snapper{On: AllSnaps}).At(p, cam, x, y, to)
}

// rounded returns the multiple of step nearest to v, inside the legal range.
func rounded(v float64, step int32) int32 {
	n := math.Round(v/float64(step)) * float64(step)
	if n > float64(plan.MaxCoord) || n < -float64(plan.MaxCoord) {
		n = math.Trunc(v/float64(step)) * float64(step)
	}
	return held(n)
}
