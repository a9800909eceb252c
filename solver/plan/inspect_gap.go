package plan

import (
	"fmt"
	"math"
	"strconv"

	"enfilade/solver/exact"
)

// gaps are the ends of walls that lie within the limit of another thing and do not touch it, each with the nearest.
func (s *survey) gaps() (out []Finding) {
	t := s.newTips()
	for i := range s.pieces {
		if s.stopped(i * 8) { // a piece may be near to many ends
			break
		}
		t.near(&s.pieces[i], 1, func(p *tip) { s.look(p, int32(i)) })
	}
	for i := range t.list {
		if s.stopped(i) {
			break
		}
		if p := &t.list[i]; !p.touches && p.best.wide <= float64(GapLimit) {
			out = append(out, s.tellGap(p))
		}
	}
	return s.once(out)
}

// look takes a piece for the one nearest to a wall's end, if it is.
func (s *survey) look(p *tip, i int32) {
	own, q := &s.pieces[p.piece], &s.pieces[i]
	if i == p.piece || q.wall == own.wall && (q.index-own.index == 1 || own.index-q.index == 1) {
		return
	}
	s.compared++
	d := q.apart(own, p.inner, p.end)
	switch {
	case d == 0:
		p.touches = true
	case d < p.best.wide || d == p.best.wide && p.best.to >= 0 && q.ref.Kind < s.pieces[p.best.to].ref.Kind:
		p.best = gap{d, i}
	}
}

// tellGap tells of the gap between a wall's end and what is nearest to it.
func (s *survey) tellGap(p *tip) Finding {
	q := &s.pieces[p.best.to]
	f := Finding{Problem: Problem{Kind: ProblemGap, Items: []Ref{{KindWall, p.wall.ID}}, At: p.end}, Offer: "Close the gap"}
	what := q.ref.String()
	switch {
	case q.wall == s.pieces[p.piece].wall:
		what = "itself"
	case q.ref.Kind == KindFloor:
		what, f.Items = "the edge of the floor", append(f.Items, q.ref)
	default:
		f.Items = append(f.Items, q.ref)
	}
	wide := strconv.FormatFloat(math.Max(p.best.wide/exact.PerMM, 0.1), 'f', 1, 64)
	f.Text = fmt.Sprintf("ends %s mm before %s; close the gap?", wide, what)
	f.Fix = closing(s.plan, p.wall, q, p.inner, p.end, p.start)
	return f
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

// seam is a gap between two walls, first in the order of names, in a cell of a coarse grid.
type seam struct {
	a, b string
	x, y int32
}

// once drops the second of two gaps that are the same one seen from both its sides.
func (s *survey) once(list []Finding) (out []Finding) {
	told := map[seam]bool{}
	for i, f := range list {
		if s.stopped(i) {
			break
		}
		if last := f.Items[len(f.Items)-1]; last.Kind != KindWall || !tellSeam(told, f.Items[0].ID, last.ID, f.At) {
			out = append(out, f)
		}
	}
	return out
}

// tellSeam reports whether the gap between two walls near a point has been told, and notes it if not. Ends that meet end to end
// lie within the limit of one another: in the same cell of a coarse grid, or in its neighbour.
func tellSeam(told map[seam]bool, a, b string, near exact.Pt) bool {
	if b < a {
		a, b = b, a
	}
	const side = 4 * GapLimit
	k := seam{a, b, floorDiv(near.X, side), floorDiv(near.Y, side)}
	for dx := int32(-1); dx <= 1; dx++ {
		for dy := int32(-1); dy <= 1; dy++ {
			if told[seam{a, b, k.x + dx, k.y + dy}] {
				return true
			}
		}
	}
	told[k] = true
	return false
}

func floorDiv(a, b int32) int32 {
	q := a / b
	if a%b < 0 {
		q--
	}
	return q
}
