package pick

import (
	"math"

	"enfilade/canvas/view"
	"enfilade/solver/exact"
	"enfilade/solver/plan"
)

// WallPlace is a place along one straight piece of a wall.
type WallPlace struct {
	Wall    string
	Segment int
	Along   int32    // distance from the start of the piece, grid units, in whole steps
	Length  int32    // of the piece, rounded down
	Left    bool     // the pointer is to the left of the line
	A, B    exact.Pt // the piece
}

// WallAt returns the place on the solid wall under the pixel place (x, y), where an opening may be cut, in steps along it.
func WallAt(p *plan.Plan, cam view.Camera, x, y float64, step int32) (WallPlace, bool) {
	s := pointer(cam, x, y)
	best, out, ok := math.Inf(1), WallPlace{}, false
	for _, w := range p.Walls() {
		right, left := sides(w, units(cam, snapAlong))
		if w.Hidden || w.Locked || w.Kind != plan.Solid && w.Kind != plan.Low || s.apart(w.Line, max(right, left)) {
			continue
		}
		edges(w.Line, false, func(i int, a, b exact.Pt) bool {
			f, along := s.foot(a, b)
			reach := right
			if s.aside(a, b) > 0 {
				reach = left
			}
			if d := s.dist(f); d <= reach && d < best && a != b {
				l := int32(exact.Dist(a, b))
				best, ok = d, true
				out = WallPlace{w.ID, i, min(rounded(along, step), l), l, s.aside(a, b) > 0, a, b}
			}
			return true
		})
	}
	return out, ok
}

// Door is the threshold of an opening on one side of its wall.
type Door struct {
	At     exact.Pt // the middle of the opening, on the wall's face
	Facing float64  // degrees, through the opening towards that side
	Ref    plan.Ref // the opening
}

// doorReach is how near the pointer must come to an opening for a start to take its threshold, in px at 100 %.
const doorReach = 18

// DoorAt returns the threshold of the opening nearest to the pixel place (x, y), on the pointer's side of the wall.
func DoorAt(p *plan.Plan, cam view.Camera, x, y float64) (Door, bool) {
	s := pointer(cam, x, y)
	best, out, ok := units(cam, doorReach), Door{}, false
	for _, o := range p.Openings() {
		w, found := p.Wall(o.Wall)
		if !found || o.Hidden || o.Segment < 0 || o.Segment+1 >= w.Line.Len() {
			continue
		}
		a, b := w.Line.At(o.Segment), w.Line.At(o.Segment+1)
		f, along := s.foot(a, b)
		right2, left2 := w.Sides2()
		off, normal := float64(left2)/2, 90.0
		if s.aside(a, b) < 0 {
			off, normal = -float64(right2)/2, -90
		}
		d := max(math.Abs(along-float64(o.At)-float64(o.Width)/2)-float64(o.Width)/2, s.dist(f)-math.Abs(off))
		if d > best {
			continue
		}
		best, ok = d, true
		dx, dy := float64(b.X)-float64(a.X), float64(b.Y)-float64(a.Y)
		l := math.Hypot(dx, dy)
		m := (float64(o.At) + float64(o.Width)/2) / l
		out = Door{
			At:     spot{float64(a.X) + m*dx - off*dy/l, float64(a.Y) + m*dy + off*dx/l}.grid(),
			Facing: math.Remainder(math.Atan2(dy, dx)*180/math.Pi+normal, 360),
			Ref:    plan.Ref{Kind: plan.KindOpening, ID: o.ID},
		}
	}
	return out, ok
}
