package plan

import (
	"math"

	"enfilade/solver/exact"
)

// ParallelWall draws a wall like another one beside it, its line at a distance from the other's. It has no openings.
type ParallelWall struct {
	Wall     string
	Distance int32 // grid units, above 0
	Right    bool  // to the right of the line instead of the left
}

// Label says what the edit does.
func (e ParallelWall) Label() string { return "parallel wall" }

// Added names the new wall.
func (e ParallelWall) Added(p *Plan) Ref { return freshRef(p, KindWall, "") }

// Apply fails when a piece of the wall is too short for a parallel one at that distance.
func (e ParallelWall) Apply(p *Plan) (*Plan, error) {
	w, ok := p.Wall(e.Wall)
	switch {
	case !ok:
		return nil, missing(KindWall, e.Wall)
	case e.Distance <= 0 || e.Distance > MaxCoord:
		return nil, fault(KindWall, e.Wall, "needs a distance above 0 to its parallel")
	}
	by := float64(e.Distance)
	if e.Right {
		by = -by
	}
	line, text := beside(w.Line, by)
	if text != "" {
		return nil, fault(KindWall, e.Wall, text)
	}
	w.ID, w.Line, w.Meta = "", line, Meta{}
	return AddWall{w}.Apply(p)
}

// beside returns a chain at a distance to the left of another, each corner rounded to the grid once.
func beside(c Chain, by float64) (Chain, string) {
	var pts []exact.Pt // without pieces of no length
	for _, q := range c.pts {
		if len(pts) == 0 || pts[len(pts)-1] != q {
			pts = append(pts, q)
		}
	}
	n := len(pts)
	if n < 2 {
		return Chain{}, "spans nothing, so nothing is parallel to it"
	}
	closed := Chain{pts}.Closed()
	normal := func(i int) (x, y float64) {
		d := pts[i+1].Sub(pts[i])
		l := math.Hypot(float64(d.X), float64(d.Y))
		return -float64(d.Y) / l, float64(d.X) / l
	}
	var out []exact.Pt
	var at []int // the first of the new points of each old one
	for i := range pts {
		before, after := i-1, i
		switch {
		case i == 0 && closed:
			before = n - 2
		case i == 0:
			before = 0
		case i == n-1 && closed:
			after = 0
		case i == n-1:
			after = n - 2
		}
		ux, uy := normal(before)
		vx, vy := normal(after)
		at = append(at, len(out))
		for _, v := range mitre(ux, uy, vx, vy) {
			q, ok := gridPt(int64(math.Round(float64(pts[i].X)+by*v[0])), int64(math.Round(float64(pts[i].Y)+by*v[1])))
			if !ok {
				return Chain{}, "has no parallel within the legal range at that distance"
			}
			out = append(out, q)
		}
	}
	for i := range n - 1 { // the inner side of a corner must not turn a piece about
		if was, now := pts[i+1].Sub(pts[i]), out[at[i+1]].Sub(out[at[i+1]-1]); was.Dot(now) <= 0 {
			return Chain{}, "has a piece too short for a parallel wall at that distance; take a smaller one"
		}
	}
	if closed {
		out = out[:at[n-1]+1] // where it began, even with two corners there
	}
	return Chain{out}, ""
}

// mitre returns the corner, for a distance of 1, between two pieces with these normals, or two corners where a mitre would
// reach farther than four times the distance.
func mitre(ux, uy, vx, vy float64) [][2]float64 {
	// The mitre reaches sqrt(2/(1+cos)) times the distance, which is 4 where 1+cos is 1/8.
	cos := ux*vx + uy*vy
	if 1+cos < 1.0/8 {
		return [][2]float64{{ux, uy}, {vx, vy}}
	}
	return [][2]float64{{(ux + vx) / (1 + cos), (uy + vy) / (1 + cos)}}
}
