package plan

import (
	"fmt"
	"math"
	"slices"
	"strconv"

	"enfilade/solver/exact"
)

// gap is how a wall's end comes near to a piece without touching it.
type gap struct {
	wide float64 // grid units
	to   int32   // the piece
}

// gaps are the ends of walls that lie within the limit of another thing and do not touch it, each with the nearest.
func (c *cells) gaps() (out []Finding) {
	for i := range c.pieces {
		s := &c.pieces[i]
		if c.stopped(i) {
			break
		}
		if s.wall < 0 {
			continue
		}
		w := c.plan.obstacles.walls.at(int(s.wall))
		if w.Line.Closed() {
			continue
		}
		if s.index == 0 {
			out = c.gapAt(out, w, int32(i), true)
		}
		if int(s.index) == w.Line.Len()-2 {
			out = c.gapAt(out, w, int32(i), false)
		}
	}
	return c.once(out)
}

// gapAt appends the gap at one end of a wall, if there is one: when the end touches nothing at all, and something is near.
func (c *cells) gapAt(out []Finding, w *Wall, i int32, start bool) []Finding {
	s := &c.pieces[i]
	inner, end := s.a, s.b
	if start {
		inner, end = end, inner
	}
	best := gap{math.Inf(1), -1}
	touches := false
	look := func(j int32) {
		t := &c.pieces[j]
		if touches || j == i || t.wall == s.wall && (t.index-s.index == 1 || s.index-t.index == 1) {
			return
		}
		d := t.apart(s, inner, end)
		switch {
		case d == 0:
			touches = true
		case d < best.wide || d == best.wide && best.to >= 0 && t.ref.Kind < c.pieces[best.to].ref.Kind:
			best = gap{d, j}
		}
	}
	for _, q := range face(s, inner, end) {
		c.near(exact.Pt{X: int32(math.Round(q[0])), Y: int32(math.Round(q[1]))}, look)
	}
	if touches || best.wide > float64(GapLimit) {
		return out
	}
	t := &c.pieces[best.to]
	f := Finding{Problem: Problem{Kind: ProblemGap, Items: []Ref{{KindWall, w.ID}}, At: end}, Offer: "Close the gap"}
	what := t.ref.String()
	switch {
	case t.wall == s.wall:
		what = "itself"
	case t.ref.Kind == KindFloor:
		what, f.Items = "the edge of the floor", append(f.Items, t.ref)
	default:
		f.Items = append(f.Items, t.ref)
	}
	f.Text = fmt.Sprintf("ends %s mm before %s; close the gap?", strconv.FormatFloat(math.Max(best.wide/exact.PerMM, 0.1), 'f', 1, 64), what)
	f.Fix = closing(c.plan, w, t, inner, end, start)
	return append(out, f)
}

// apart returns how far the end of a wall's piece s is from the body along the piece t, 0 when s touches or crosses that body.
// The body of t is taken square at its ends; that of s is its line and, at its end, its width.
func (t *piece) apart(s *piece, inner, end exact.Pt) float64 {
	// Everything in the frame of t: along it and to its left, from its beginning.
	long := exact.Dist(t.a, t.b)
	d := t.b.Sub(t.a)
	frame := func(q exact.Pt) (x, y float64) {
		v := q.Sub(t.a)
		return float64(v.Dot(d)) / long, float64(d.Cross(v)) / long
	}
	ix, iy := frame(inner)
	ex, ey := frame(end)
	// A wall that ends shortly beyond another one has crossed it: the last stretch, as long as a gap may be, meets its body.
	if k := float64(GapLimit) / exact.Dist(inner, end); k < 1 {
		ix, iy = ex+k*(ix-ex), ey+k*(iy-ey)
	}
	if crosses(ix, iy, ex, ey, long, t.right, t.left) {
		return 0
	}
	best := math.Inf(1)
	for _, q := range face(s, inner, end) {
		dx, dy := q[0]-float64(t.a.X), q[1]-float64(t.a.Y)
		x, y := (dx*float64(d.X)+dy*float64(d.Y))/long, (dy*float64(d.X)-dx*float64(d.Y))/long
		best = min(best, math.Hypot(max(-x, x-long, 0), max(-t.right-y, y-t.left, 0)))
	}
	if best < 0.5 { // corners of bodies are rounded by as much
		return 0
	}
	return best
}

// face returns the corners and the middle of the face of a wall's end, where its piece s ends.
func face(s *piece, inner, end exact.Pt) (pts [3][2]float64) {
	right, left := s.right, s.left
	if inner != s.a { // the line runs the other way
		right, left = left, right
	}
	l := exact.Dist(inner, end)
	ux, uy := (float64(end.X)-float64(inner.X))/l, (float64(end.Y)-float64(inner.Y))/l
	for i, off := range [3]float64{-right, 0, left} {
		pts[i] = [2]float64{float64(end.X) - off*uy, float64(end.Y) + off*ux}
	}
	return pts
}

// crosses reports whether a segment meets the closed box from 0 to long and from -right to left, by clipping it.
func crosses(ax, ay, bx, by, long, right, left float64) bool {
	from, to := 0.0, 1.0
	clip := func(p, d, lo, hi float64) bool {
		if d == 0 {
			return p >= lo && p <= hi
		}
		t1, t2 := (lo-p)/d, (hi-p)/d
		from, to = max(from, min(t1, t2)), min(to, max(t1, t2))
		return from <= to
	}
	return clip(ax, bx-ax, 0, long) && clip(ay, by-ay, -right, left)
}

// closing returns the edit that closes a gap: onto the other wall's own end when that is as near, straight on when the wall
// points at the other's line, else by the shortest way. nil where the two lines are the same place already.
func closing(p *Plan, w *Wall, t *piece, inner, end exact.Pt, start bool) Edit {
	at := footOn(t.a, t.b, end)
	reach := float64(GapLimit) + max(t.right, t.left)
	if t.wall >= 0 {
		other := p.obstacles.walls.at(int(t.wall))
		first, last := ends(other)
		for _, q := range [2]exact.Pt{first, last} {
			if q != end && (q == t.a || q == t.b) && exact.Dist(q, end) <= float64(GapLimit) {
				at = q
			}
		}
		straight := Lengthen{Wall: w.ID, To: other.ID, Start: start}
		onEnd := at == first || at == last
		if d := Reach(w.Line, other.Line, start); !onEnd && d <= 2*reach && t.wall >= 0 && other.ID != w.ID {
			return named{straight, "close gap"}
		}
	}
	index := w.Line.Len() - 1
	if start {
		index = 0
	}
	if at == end || at == inner {
		return nil
	}
	return named{MoveCorner{Corner: Corner{Ref{KindWall, w.ID}, index}, To: at, Along: true}, "close gap"}
}

// once drops the second of two gaps that are the same one seen from both its sides.
func (c *cells) once(list []Finding) []Finding {
	told := map[[3]string]bool{}
	return slices.DeleteFunc(list, func(f Finding) bool {
		last := f.Items[len(f.Items)-1]
		if last.Kind != KindWall {
			return false
		}
		a, b := f.Items[0].ID, last.ID
		near := f.At
		if b < a {
			a, b = b, a
		}
		// Ends that meet end to end lie within the limit of one another: the same cell of a coarse grid, or its neighbour.
		coarse := func(dx, dy int32) string {
			const side = 4 * GapLimit
			return fmt.Sprint(floorDiv(near.X, side)+dx, " ", floorDiv(near.Y, side)+dy)
		}
		for dx := int32(-1); dx <= 1; dx++ {
			for dy := int32(-1); dy <= 1; dy++ {
				if told[[3]string{a, b, coarse(dx, dy)}] {
					return true
				}
			}
		}
		told[[3]string{a, b, coarse(0, 0)}] = true
		return false
	})
}

func floorDiv(a, b int32) int32 {
	q := a / b
	if a%b < 0 {
		q--
	}
	return q
}
