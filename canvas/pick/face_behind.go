package pick

import (
	"math"

	"enfilade/canvas/view"
	"enfilade/solver/exact"
	"enfilade/solver/plan"
)

// Other returns the face on the other side of the wall or block for the pixel place (x, y), in steps along it. ok is false of the
// floor's outline, which has none.
func (f Face) Other(cam view.Camera, x, y float64, step int32) (other Face, ok bool) {
	return f.across(pointer(cam, x, y), step)
}

// Across returns the face on the other side of the wall or block, at the place over against q. ok is false of the floor's outline.
func (f Face) Across(q exact.Pt) (other Face, ok bool) { return f.across(spotOf(q), 1) }

// Same reports whether both are places on the same face.
func (f Face) Same(g Face) bool { return f.Ref == g.Ref && f.edge == g.edge }

func (f Face) across(s spot, step int32) (Face, bool) {
	behind := f.behind
	if f.body.Len() > 0 {
		behind, s = f.through(s)
	}
	if behind.a == behind.b {
		return Face{}, false
	}
	g := faceFinder{s: s, step: step, best: math.Inf(1)}
	g.side(behind, f.Ref)
	g.face.behind, g.face.body, g.face.Middle = f.edge, f.body, f.Middle
	return g.face, g.ok
}

// through returns the edge by which the line straight into a block from the foot of s on its face leaves it again for the first
// time, and the place where it does; no edge when there is none.
func (f Face) through(s spot) (out edge, at spot) {
	deg := f.edge.normal() * math.Pi / 180
	dx, dy := -math.Cos(deg), -math.Sin(deg)
	from, _ := s.foot(f.edge.a, f.edge.b)
	best := math.Inf(1)
	outward(f.body, clockwise(f.body), func(e edge) {
		ex, ey := float64(e.b.X)-float64(e.a.X), float64(e.b.Y)-float64(e.a.Y)
		leaves := ex*dy - ey*dx // above 0 where the line goes to the edge's free side, its left
		if e == f.edge || leaves <= 0 {
			return
		}
		ax, ay := float64(e.a.X)-from.x, float64(e.a.Y)-from.y
		far := (ex*ay - ey*ax) / leaves   // along the line
		share := (dx*ay - dy*ax) / leaves // along the edge
		if far > 0 && far < best && share >= 0 && share <= 1 {
			best, out, at = far, e, spot{from.x + far*dx, from.y + far*dy}
		}
	})
	return out, at
}

// hangs is how far off a face a thing is that hangs on it, at most, in grid units: 20 mm; and hangsTurned how far from the face's
// normal it looks, in degrees.
const hangs, hangsTurned = 20 * exact.PerMM, 0.5

// Hanging returns the face of a wall or a block on which a thing at a place hangs that looks to a direction in degrees; ok is false
// when it hangs on none.
func Hanging(p *plan.Plan, at exact.Pt, normal float64) (face Face, ok bool) {
	f := faceFinder{s: spotOf(at), step: 1, best: hangs}
	looks := func(e edge) bool { return math.Abs(math.Remainder(e.normal()-normal, 360)) <= hangsTurned }
	for _, w := range p.Walls() {
		right2, left2 := w.Sides2()
		if f.s.apart(w.Line, hangs+float64(max(right2, left2))/2) {
			continue
		}
		edges(w.Line, false, func(_ int, a, b exact.Pt) bool {
			left, right := edge{a, b, float64(left2) / 2}, edge{b, a, float64(right2) / 2}
			for _, e := range [2][2]edge{{left, right}, {right, left}} {
				if looks(e[0]) && f.side(e[0], plan.Ref{Kind: plan.KindWall, ID: w.ID}) {
					f.face.behind = e[1]
				}
			}
			return true
		})
	}
	for _, b := range p.Blocks() {
		if f.s.apart(b.Ring, hangs) {
			continue
		}
		outward(b.Ring, clockwise(b.Ring), func(e edge) {
			if looks(e) && f.side(e, plan.Ref{Kind: plan.KindBlock, ID: b.ID}) {
				f.face.body = b.Ring
			}
		})
	}
	return f.face, f.ok
}

// normal is the direction a face looks to, in degrees.
func (e edge) normal() float64 {
	return math.Atan2(float64(e.b.X)-float64(e.a.X), float64(e.a.Y)-float64(e.b.Y)) * 180 / math.Pi
}
