package arrange

import (
	"cmp"
	"context"
	"math"
	"slices"

	"enfilade/solver/exact"
	"enfilade/solver/pulse"
)

// Round returns the outline's snap rounding: the planar graph of its segments on the grid.
//
// A pixel is the half-open square [x-1/2, x+1/2) × [y-1/2, y+1/2) around a grid point. Pixels that hold an end of a segment
// or a crossing of two are hot, and every segment is drawn through the centres of the hot pixels it passes, in order.
//
//   - Input: every segment has positive length and legal ends.
//   - Cost: O((n + k) log n) for n segments with k crossings, when segments are spread evenly; the cells it uses degrade to
//     O(n²) only when most segments share one cell, and not an end.
//   - Source: Hobby 1999, section 2; the half-open pixel is his.
func Round(o *Outline) *Graph {
	ctx := context.Background()
	r, err := heat(ctx, o, math.MaxInt)
	if err == nil {
		err = r.draw(ctx, o)
	}
	if err != nil {
		panic("arrange: " + err.Error()) // nobody cancels the background
	}
	r.compact()
	return r.graph
}

// rounding is a rounded graph with what led to it.
type rounding struct {
	graph  *Graph
	cells  *cells
	passes []pass // those of segment i are passes[start[i]:start[i+1]]
	start  []int32
	place  []int32 // the points that compact is to drop, if any: see used
	whole  bool    // every hot pixel is a point of the graph
}

// heat is the first step of Round: it finds the hot pixels, which are the points of the graph, but for those that compact drops. It
// gives up with an error once there are many more crossings than edges may be.
func heat(ctx context.Context, o *Outline, limit int) (*rounding, error) {
	r := &rounding{graph: &Graph{Items: o.Items, Bodies: o.Bodies}}
	if len(o.Segments) == 0 {
		return r, nil
	}
	r.cells = makeCells(o.Segments)
	var err error
	r.graph.Pts, err = hotPixels(ctx, o.Segments, r.cells, limit)
	return r, err
}

// draw is the second step: it draws the segments through the hot pixels. It leaves the points as they are.
func (r *rounding) draw(ctx context.Context, o *Outline) (err error) {
	if len(o.Segments) == 0 {
		return nil
	}
	if r.passes, r.start, err = passing(pulse.Part(ctx, 0, 0.6), o.Segments, r.cells, r.graph.Pts); err != nil {
		return err
	}
	if err := r.graph.merge(pulse.Part(ctx, 0.6, 1), o.Segments, r.passes); err != nil {
		return err
	}
	r.place = r.graph.used()
	return nil
}

// compact is the third step: it drops the points that no edge ends at, those of outlines that run there and back.
func (r *rounding) compact() {
	if r.whole = r.cells != nil && r.place == nil; r.place == nil {
		return
	}
	r.graph.compact(r.place)
	r.place = nil
}

// hotPixels returns the centres of the hot pixels, in order, each once.
func hotPixels(ctx context.Context, segs []Segment, c *cells, limit int) ([]exact.Pt, error) {
	keys := make([]uint64, 0, 2*len(segs)+len(segs)/4)
	for _, s := range segs {
		keys = append(keys, key(s.A), key(s.B))
	}
	found, err := pulse.Split(ctx, len(c.start)-1, func(ctx context.Context, lo, hi int) (keys []uint64, err error) {
		full := limit
		for cell := lo; cell < hi && err == nil; cell++ {
			keys = crossings(keys, segs, c.seg[c.start[cell]:c.start[cell+1]])
			if len(keys) > full {
				if keys, err = thin(keys, limit); err != nil {
					return nil, err
				}
				full = len(keys) + limit
			}
			err = pulse.Step(ctx, cell-lo, hi-lo)
		}
		return keys, err
	})
	if err != nil {
		return nil, err
	}
	for _, f := range found {
		keys = append(keys, f...)
	}
	exact.SortKeys(keys, make([]uint64, len(keys)))
	keys = slices.Compact(keys)
	pts := make([]exact.Pt, len(keys))
	for i, k := range keys {
		pts[i] = unkey(k)
	}
	return pts, nil
}

// thin drops the second of equal keys. Every crossing makes at least one edge of its own: more of them than there may be edges
// are too many, whatever comes after.
func thin(keys []uint64, limit int) ([]uint64, error) {
	exact.SortKeys(keys, make([]uint64, len(keys)))
	if keys = slices.Compact(keys); len(keys) > limit {
		return nil, &TooLarge{Edges: len(keys), Limit: limit, Least: true}
	}
	return keys, nil
}

// key packs p so that unsigned order is the order of points.
func key(p exact.Pt) uint64 {
	return uint64(uint32(p.X)^1<<31)<<32 | uint64(uint32(p.Y)^1<<31)
}

func unkey(k uint64) exact.Pt {
	return exact.Pt{X: int32(uint32(k>>32) ^ 1<<31), Y: int32(uint32(k) ^ 1<<31)}
}

// crossing returns the centre of the pixel in which the interiors of s and t cross at one point. Ends that lie on another
// segment need none: their pixels are hot already.
func crossing(s, t *Segment) (exact.Pt, bool) {
	// How far each box reaches beyond the other's far side, on all four sides: one negative number parts them. Numbers are put
	// together before they are asked, as each answer by itself is as often yes as no.
	if (max(t.A.X, t.B.X)-min(s.A.X, s.B.X))|(max(s.A.X, s.B.X)-min(t.A.X, t.B.X))|
		(max(t.A.Y, t.B.Y)-min(s.A.Y, s.B.Y))|(max(s.A.Y, s.B.Y)-min(t.A.Y, t.B.Y)) < 0 {
		return exact.Pt{}, false
	}
	a, b := exact.Area2(t.A, t.B, s.A), exact.Area2(t.A, t.B, s.B)
	c, e := exact.Area2(s.A, s.B, t.A), exact.Area2(s.A, s.B, t.B)
	if a^b >= 0 || c^e >= 0 || a == 0 || b == 0 || c == 0 || e == 0 {
		return exact.Pt{}, false
	}
	// The crossing is s.A + n/d (s.B - s.A), and floor(x + 1/2) = s.A.X + floor((2 n dx + d) / 2d).
	n, d := a, a-b
	if d < 0 {
		n, d = -n, -d
	}
	v := s.B.Sub(s.A)
	half := exact.Int128{Lo: uint64(d)}
	x := exact.Mul(2*int64(v.X), n).Add(half).FloorDiv(2 * d)
	y := exact.Mul(2*int64(v.Y), n).Add(half).FloorDiv(2 * d)
	return s.A.Add(exact.Vec{X: int32(x), Y: int32(y)}), true
}

// passes reports whether segment ab passes the half-open pixel around c.
func passes(a, b, c exact.Pt) bool {
	if (c.X-min(a.X, b.X))|(max(a.X, b.X)-c.X)|(c.Y-min(a.Y, b.Y))|(max(a.Y, b.Y)-c.Y) < 0 {
		return false // outside the box; ends are whole, pixel borders are halves: reaching the pixel in x or y means reaching its centre's row or column
	}
	d := b.Sub(a)
	// In units of halves, the corners of the pixel lie at 2·Area2 ± d.X ± d.Y from the line.
	f := 2 * exact.Area2(a, b, c)
	m := abs64(int64(d.X)) + abs64(int64(d.Y))
	if f > -m && f < m {
		return true
	}
	// A line through one corner only passes when it is the lower left one, the one corner that belongs to the pixel.
	return (f == m || f == -m) && f == int64(d.X)-int64(d.Y)
}

func abs64(v int64) int64 {
	if v < 0 {
		return -v
	}
	return v
}

// pass says that a segment passes a hot pixel.
type pass struct {
	seg, pt int32
}

// passing returns which segment passes which hot pixels: by segment, then along it. Those of segment i are
// out[start[i]:start[i+1]].
func passing(ctx context.Context, segs []Segment, c *cells, hot []exact.Pt) (out []pass, start []int32, err error) {
	parts, err := pulse.Split(ctx, len(hot), func(ctx context.Context, lo, hi int) ([]pass, error) {
		found := make([]pass, 0, 3*(hi-lo))
		for i, p := range hot[lo:hi] {
			if err := pulse.Step(ctx, i, hi-lo); err != nil {
				return nil, err
			}
			cell := c.of(p)
			for _, s := range c.seg[c.start[cell]:c.start[cell+1]] {
				if passes(segs[s].A, segs[s].B, p) {
					found = append(found, pass{s, int32(lo + i)})
				}
			}
		}
		return found, nil
	})
	if err != nil {
		return nil, nil, err
	}
	start = make([]int32, len(segs)+1)
	total := 0
	for _, found := range parts {
		total += len(found)
		for _, f := range found {
			start[f.seg+1]++
		}
	}
	for i := 1; i < len(start); i++ {
		start[i] += start[i-1]
	}
	out = make([]pass, total)
	fill := slices.Clone(start[:len(segs)])
	for _, found := range parts {
		for _, f := range found {
			out[fill[f.seg]] = f
			fill[f.seg]++
		}
	}
	_, err = pulse.Split(ctx, len(segs), func(_ context.Context, lo, hi int) (none struct{}, err error) {
		for s := lo; s < hi; s++ {
			sortAlong(&segs[s], out[start[s]:start[s+1]], hot)
		}
		return none, nil
	})
	return out, start, err
}

// sortAlong sorts the passes of segment s by where along it they lie.
func sortAlong(s *Segment, list []pass, hot []exact.Pt) {
	if len(list) == 2 { // its ends
		if hot[list[0].pt] != s.A {
			list[0], list[1] = list[1], list[0]
		}
		return
	}
	d := s.B.Sub(s.A)
	slices.SortFunc(list, func(p, q pass) int {
		return cmp.Compare(hot[p.pt].Sub(s.A).Dot(d), hot[q.pt].Sub(s.A).Dot(d))
	})
}

// link is one rounded piece of a segment: from its point to the point b, which comes after it.
type link struct {
	b    int32
	seg  int32
	back bool // the segment runs from b to the point
}

// merge makes the edges: the pieces between consecutive hot pixels, those with the same ends made one. The pieces are
// gathered by their first point; few share one. O(n).
func (g *Graph) merge(ctx context.Context, segs []Segment, passes []pass) error {
	start := make([]int32, len(g.Pts)+1)
	eachLink(passes, func(a int32, _ link) { start[a+1]++ })
	for i := 1; i < len(start); i++ {
		start[i] += start[i-1]
	}
	links := make([]link, start[len(g.Pts)])
	fill := slices.Clone(start[:len(g.Pts)])
	eachLink(passes, func(a int32, l link) {
		links[fill[a]] = l
		fill[a]++
	})
	g.Edges = make([]Edge, 0, len(links))
	g.Winds = make([]Wind, 0, len(links))
	for a := range g.Pts {
		if err := pulse.Step(ctx, a, len(g.Pts)); err != nil {
			return err
		}
		list := links[start[a]:start[a+1]]
		if len(list) > 1 {
			slices.SortStableFunc(list, func(l, m link) int { return cmp.Compare(l.b, m.b) })
		}
		for i := 0; i < len(list); {
			j := i + 1
			for j < len(list) && list[j].b == list[i].b {
				j++
			}
			g.mergeLinks(int32(a), segs, list[i:j])
			i = j
		}
	}
	return nil
}

// eachLink calls f with every piece and the one of its ends that comes first.
func eachLink(passes []pass, f func(a int32, l link)) {
	for i := 1; i < len(passes); i++ {
		p, q := passes[i-1], passes[i]
		switch {
		case p.seg != q.seg:
		case p.pt < q.pt:
			f(p.pt, link{q.pt, p.seg, false})
		default:
			f(q.pt, link{p.pt, p.seg, true})
		}
	}
}

// mergeLinks appends the one edge that the pieces from point a to one other make: it stops what any of them stops, and the
// windings of one body add up.
func (g *Graph) mergeLinks(a int32, segs []Segment, links []link) {
	e := Edge{A: a, B: links[0].b, Wind0: int32(len(g.Winds)), Item: segs[links[0].seg].Item}
	line := false
	for _, l := range links {
		s := &segs[l.seg]
		line = line || s.Body == NoBody
		e.Walk = e.Walk || s.Walk
		e.Top = max(e.Top, s.Top)
		e.Item = min(e.Item, s.Item)
		if s.Body != NoBody {
			delta := int32(1)
			if l.back {
				delta = -1
			}
			g.addWind(int(e.Wind0), Wind{s.Body, delta})
		}
	}
	if len(links) > 1 {
		kept := slices.DeleteFunc(g.Winds[e.Wind0:], func(w Wind) bool { return w.Delta == 0 })
		g.Winds = g.Winds[:int(e.Wind0)+len(kept)]
	}
	e.Wind1 = int32(len(g.Winds))
	if line || e.Walk || e.Top > 0 || e.Wind0 < e.Wind1 { // else the outline of a body runs there and back
		g.Edges = append(g.Edges, e)
	}
}

// used returns which number each point would have if those that no edge ends at were dropped, -1 for these, and nil when there
// are none.
func (g *Graph) used() (place []int32) {
	place = make([]int32, len(g.Pts))
	for _, e := range g.Edges {
		place[e.A], place[e.B] = 1, 1
	}
	n := int32(0)
	for i, used := range place {
		if place[i] = -1; used == 1 {
			place[i] = n
			n++
		}
	}
	if int(n) == len(place) {
		return nil
	}
	return place
}

// compact drops points as used tells.
func (g *Graph) compact(place []int32) {
	n := 0
	for i, k := range place {
		if k >= 0 {
			g.Pts[k] = g.Pts[i]
			n++
		}
	}
	g.Pts = g.Pts[:n]
	for i := range g.Edges {
		e := &g.Edges[i]
		e.A, e.B = place[e.A], place[e.B]
	}
}

// addWind adds a winding to those of the edge being made, which begin at from and are kept in the order of their bodies: in which
// segments come, so that it is near the end that it looks for its place.
func (g *Graph) addWind(from int, w Wind) {
	i := len(g.Winds)
	for i > from && g.Winds[i-1].Body > w.Body {
		i--
	}
	if i > from && g.Winds[i-1].Body == w.Body {
		g.Winds[i-1].Delta += w.Delta
		return
	}
	g.Winds = slices.Insert(g.Winds, i, w)
}
