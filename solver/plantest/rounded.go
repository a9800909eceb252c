package plantest

import (
	"cmp"
	"fmt"
	"math/big"
	"slices"

	"enfilade/solver/arrange"
	"enfilade/solver/exact"
)

// Rounded is snap rounding by its definition, in exact fractions and quadratic time.
//
// Every end and every crossing makes the pixel it lies in hot (a pixel reaches half a unit to each side of its grid point
// and owns its left and its lower border). A segment becomes the chain through the middles of all hot pixels it passes,
// in the order it passes them. Pieces with the same ends become one edge that stops whatever any of them stops.
//
// Source: Hobby, "Practical segment intersection with finite precision output", CGTA 13 (1999).
func Rounded(o *arrange.Outline) *arrange.Graph {
	hot := hotPixels(o.Segments)
	type key [2]exact.Pt
	type merged struct {
		arrange.Stops
		item  int32
		winds map[int32]int32
	}
	edges := map[key]*merged{}
	for _, s := range o.Segments {
		chain := chainOf(s, hot)
		for i := 1; i < len(chain); i++ {
			k, delta := key{chain[i-1], chain[i]}, int32(1)
			if k[1].Less(k[0]) {
				k, delta = key{k[1], k[0]}, -1
			}
			e := edges[k]
			if e == nil {
				e = &merged{item: s.Item, winds: map[int32]int32{}}
				edges[k] = e
			}
			e.Walk, e.Top, e.item = e.Walk || s.Walk, max(e.Top, s.Top), min(e.item, s.Item)
			if s.Body != arrange.NoBody {
				e.winds[s.Body] += delta
			}
		}
	}
	g := &arrange.Graph{Items: o.Items, Bodies: o.Bodies}
	for k := range edges {
		g.Pts = append(g.Pts, k[0], k[1])
	}
	slices.SortFunc(g.Pts, exact.Pt.Compare)
	g.Pts = slices.Compact(g.Pts)
	index := func(p exact.Pt) int32 {
		i, _ := slices.BinarySearchFunc(g.Pts, p, exact.Pt.Compare)
		return int32(i)
	}
	keys := make([]key, 0, len(edges))
	for k := range edges {
		keys = append(keys, k)
	}
	slices.SortFunc(keys, func(a, b key) int { return cmp.Or(a[0].Compare(b[0]), a[1].Compare(b[1])) })
	for _, k := range keys {
		e := edges[k]
		first := int32(len(g.Winds))
		for body := range int32(len(o.Bodies)) {
			if d := e.winds[body]; d != 0 {
				g.Winds = append(g.Winds, arrange.Wind{Body: body, Delta: d})
			}
		}
		g.Edges = append(g.Edges, arrange.Edge{A: index(k[0]), B: index(k[1]), Stops: e.Stops, Item: e.item,
			Wind0: first, Wind1: int32(len(g.Winds))})
	}
	return g
}

// hotPixels returns the pixels of all ends and crossings, in order.
func hotPixels(segments []arrange.Segment) []exact.Pt {
	var hot []exact.Pt
	for i, s := range segments {
		hot = append(hot, s.A, s.B)
		for _, r := range segments[:i] {
			if x, ok := crossing(s.A, s.B, r.A, r.B); ok {
				hot = append(hot, x)
			}
		}
	}
	slices.SortFunc(hot, exact.Pt.Compare)
	return slices.Compact(hot)
}

// chainOf returns the hot pixels that a segment passes, in the order in which it passes them. A straight line never turns
// back in x or in y, so neither do the middles of the pixels along it, and their order along the segment is that of their
// projections.
func chainOf(s arrange.Segment, hot []exact.Pt) []exact.Pt {
	var chain []exact.Pt
	for _, h := range hot {
		if passes(s.A, s.B, h) {
			chain = append(chain, h)
		}
	}
	d := s.B.Sub(s.A)
	step := exact.Vec{X: int32(exact.Sign(int64(d.X))), Y: int32(exact.Sign(int64(d.Y)))}
	slices.SortFunc(chain, func(a, b exact.Pt) int { return cmp.Compare(step.Dot(a.Sub(s.A)), step.Dot(b.Sub(s.A))) })
	return chain
}

// limit is an end of a range of shares: itself left out when open.
type limit struct {
	at   *big.Rat
	open bool
}

// passes reports whether the closed segment ab has a point in the pixel of h.
func passes(a, b, h exact.Pt) bool {
	lo, hi := passing(a, b, h)
	c := lo.at.Cmp(hi.at)
	return c < 0 || c == 0 && !lo.open && !hi.open
}

// passing returns the range of shares k of the way from a to b that lie in the pixel of h; it is empty when lo is beyond
// hi, or at hi with one of them open. The shares obey 0 <= k <= 1 and h - 1/2 <= a + k (b - a) < h + 1/2 in x and in y.
func passing(a, b, h exact.Pt) (lo, hi limit) {
	lo, hi = limit{at: new(big.Rat)}, limit{at: big.NewRat(1, 1)}
	for _, axis := range [2][3]int32{{a.X, b.X, h.X}, {a.Y, b.Y, h.Y}} {
		from, step := 2*(int64(axis[2])-int64(axis[0])), 2*(int64(axis[1])-int64(axis[0])) // in half units
		if step == 0 {
			if from != 0 { // another row or column of whole numbers
				lo = limit{at: big.NewRat(2, 1)}
			}
			continue
		}
		near, far := limit{big.NewRat(from-1, step), false}, limit{big.NewRat(from+1, step), true}
		if step < 0 {
			near, far = far, near
		}
		if c := near.at.Cmp(lo.at); c > 0 || c == 0 && near.open {
			lo = near
		}
		if c := far.at.Cmp(hi.at); c < 0 || c == 0 && far.open {
			hi = far
		}
	}
	return lo, hi
}

// CheckGraph returns what is wrong with a rounded graph: order, edges that meet outside their ends, outlines that are not
// closed.
func CheckGraph(g *arrange.Graph) error {
	for i := 1; i < len(g.Pts); i++ {
		if !g.Pts[i-1].Less(g.Pts[i]) {
			return fmt.Errorf("points %d and %d out of order", i-1, i)
		}
	}
	open := make(map[[2]int32]int32) // by point and body: what winds out of the point less what winds into it
	for i, e := range g.Edges {
		if e.A >= e.B {
			return fmt.Errorf("edge %d runs from point %d to point %d", i, e.A, e.B)
		}
		if i > 0 && cmp.Or(cmp.Compare(g.Edges[i-1].A, e.A), cmp.Compare(g.Edges[i-1].B, e.B)) >= 0 {
			return fmt.Errorf("edges %d and %d out of order", i-1, i)
		}
		for j, f := range g.Edges[:i] {
			if meetInside(g.Pts[e.A], g.Pts[e.B], g.Pts[f.A], g.Pts[f.B]) {
				return fmt.Errorf("edges %d and %d meet outside their ends", j, i)
			}
		}
		for _, d := range g.Winds[e.Wind0:e.Wind1] {
			open[[2]int32{e.A, d.Body}] += d.Delta
			open[[2]int32{e.B, d.Body}] -= d.Delta
		}
	}
	for at, sum := range open {
		if sum != 0 {
			return fmt.Errorf("the outline of body %d is not closed at %v", at[1], g.Pts[at[0]])
		}
	}
	return nil
}

// meetInside reports whether ab and cd share a point that is not an end of both.
func meetInside(a, b, c, d exact.Pt) bool {
	if _, ok := crossing(a, b, c, d); ok {
		return true
	}
	s, r := [2]exact.Pt{a, b}, [2]exact.Pt{c, d}
	return within(s, c) || within(s, d) || within(r, a) || within(r, b)
}
