package arrange

import (
	"context"
	"fmt"
	"slices"
	"strconv"

	"enfilade/solver/exact"
	"enfilade/solver/mesh"
	"enfilade/solver/plan"
	"enfilade/solver/pulse"
)

// Site is an outline with its rounded graph and its mesh, which can follow a change of the outline by doing only what the
// change asks for. It is not for concurrent use, and its mesh answers no queries while it follows.
type Site struct {
	Outline *Outline
	Graph   *Graph // its edges are named by Mesh.Constraint; edges that have gone leave a gap
	Mesh    *mesh.Mesh

	segs   []Segment // every segment ever drawn here, by number
	gone   []bool
	number []int32 // the number of each of Outline.Segments; nil while they are the ones first drawn

	*rounding // as first rounded

	later later
}

// later is what following changes has added to a site.
type later struct {
	ready  bool
	segsIn map[int32][]int32 // segments drawn later, by cell
	first  []int32           // the points of cell i, as first rounded, are list[first[i]:first[i+1]]
	list   []int32
	ptsIn  map[int32][]int32 // points that became hot later, by cell
	cold   map[int32]bool    // points that are no longer hot
	chain  map[int32][]int32 // the points of segments that were drawn or changed their way later
	tags   []mesh.Tag
}

// MaxEdges is the greatest number of edges that a plan's graph may have, MaxGrown the greatest number with the outlines that
// keep a walker's body off things.
const (
	MaxEdges = 2_000_000
	MaxGrown = 3 * MaxEdges
)

// TooLarge reports a plan whose graph would have more edges than the limit.
type TooLarge struct {
	Edges, Limit int
	Least        bool // there are more edges still: they were not all counted
}

func (e *TooLarge) Error() string {
	edges := strconv.Itoa(e.Edges)
	if e.Least {
		edges = "more than " + edges
	}
	if e.Limit == MaxGrown {
		return fmt.Sprintf("the plan makes %s edges for a walker with a body and the limit is %d; leave some of it out, or make the walker's radius 0",
			edges, e.Limit)
	}
	return fmt.Sprintf("the plan makes %s edges and the limit is %d; leave some of it out", edges, e.Limit)
}

// tooLarge returns the error for n segments or edges of o, nil when there are not too many.
func (o *Outline) tooLarge(n int) error {
	if limit := o.limit(); n > limit {
		return &TooLarge{Edges: n, Limit: limit}
	}
	return nil
}

// limit returns how many edges the graph of o may have.
func (o *Outline) limit() int {
	if k := len(o.Items); k > 0 && o.Items[k-1].Kind == plan.KindWalker {
		return MaxGrown
	}
	return MaxEdges
}

// NewSite rounds and triangulates an outline, as Round and Build do one after the other. The points are known before the edges:
// they are triangulated while the segments are drawn through them.
//
//   - Errors: *TooLarge; the context's when it is cancelled.
//   - Cost: as Round and Build.
func NewSite(ctx context.Context, o *Outline) (*Site, error) {
	if err := o.tooLarge(len(o.Segments)); err != nil {
		return nil, err
	}
	r, err := heat(pulse.Part(ctx, 0, 0.1), o, o.limit())
	if err != nil {
		return nil, err
	}
	s := &Site{Outline: o, Graph: r.graph, segs: o.Segments, rounding: r}
	var loose *mesh.Loose
	var ends [][2]int32
	var tags []mesh.Tag
	err = pulse.Each(pulse.Part(ctx, 0.1, 0.5), 2, func(ctx context.Context, i int) (err error) {
		if i == 0 {
			loose, err = mesh.TriangulatePoints(ctx, r.graph.Pts)
			return err
		}
		if err := r.draw(ctx, o); err != nil {
			return err
		}
		ends, tags = r.graph.split()
		return o.tooLarge(len(r.graph.Edges))
	})
	if err != nil {
		return nil, err
	}
	r.compact()
	if !r.whole { // rarely: the points that were dropped must not be corners of triangles
		if loose, err = mesh.TriangulatePoints(ctx, r.graph.Pts); err != nil {
			return nil, err
		}
		ends, tags = r.graph.split()
	}
	s.Mesh, err = r.graph.finish(pulse.Part(ctx, 0.5, 1), loose, ends, tags)
	return s, err
}

// Follow makes the site that of outline o, and reports whether it could: it cannot when items or bodies came or went, when
// much changed, or when the change leaves the mesh's rectangle. A site that could not is as it was before when err is nil, and
// must be thrown away when it is not.
//
//   - Result: the same edges and triangles as NewSite(o) would have, but for their numbering.
//   - Cost: O(n) to compare the outlines; everything else in proportion to what lies around the segments that changed.
func (s *Site) Follow(o *Outline) (ok bool, err error) {
	c, ok := s.compare(o)
	if !ok {
		return false, nil
	}
	s.prepare()
	c.draw(o)
	c.heat()
	c.route()
	if err := c.edit(); err != nil {
		return false, err
	}
	s.Outline, s.number = o, c.number
	s.Graph.Items, s.Graph.Bodies, s.Graph.Pts = o.Items, o.Bodies, s.Mesh.Pts
	return true, nil
}

// prepare makes what following needs and building did not. O(n) the first time.
func (s *Site) prepare() {
	l := &s.later
	if l.ready {
		return
	}
	l.ready = true
	l.segsIn, l.ptsIn = map[int32][]int32{}, map[int32][]int32{}
	l.cold, l.chain = map[int32]bool{}, map[int32][]int32{}
	s.segs = slices.Clone(s.segs)
	s.gone = make([]bool, len(s.segs))
	n := s.cells.nx * s.cells.ny
	l.first = make([]int32, n+1)
	for _, p := range s.Graph.Pts {
		l.first[s.cells.of(p)+1]++
	}
	for i := range n {
		l.first[i+1] += l.first[i]
	}
	l.list = make([]int32, len(s.Graph.Pts))
	fill := slices.Clone(l.first[:n])
	for i, p := range s.Graph.Pts {
		c := s.cells.of(p)
		l.list[fill[c]] = int32(i)
		fill[c]++
	}
	l.tags = make([]mesh.Tag, len(s.Graph.Edges))
	for i, e := range s.Graph.Edges {
		l.tags[i] = mesh.Tag{Top: e.Top, Walk: e.Walk}
	}
}

// eachSegment calls do for every segment that may pass the pixel of p.
func (s *Site) eachSegment(p exact.Pt, do func(seg int32)) {
	cell := s.cells.of(p)
	for _, g := range s.cells.seg[s.cells.start[cell]:s.cells.start[cell+1]] {
		if !s.gone[g] {
			do(g)
		}
	}
	for _, g := range s.later.segsIn[cell] {
		if !s.gone[g] {
			do(g)
		}
	}
}

// eachPoint calls do for every hot point in a cell.
func (s *Site) eachPoint(cell int32, do func(pt int32)) {
	l := &s.later
	for _, v := range l.list[l.first[cell]:l.first[cell+1]] {
		if !l.cold[v] {
			do(v)
		}
	}
	for _, v := range l.ptsIn[cell] {
		if !l.cold[v] {
			do(v)
		}
	}
}

// chainOf returns the points of segment g, along it.
func (s *Site) chainOf(g int32) []int32 {
	if c, ok := s.later.chain[g]; ok {
		return c
	}
	list := s.passes[s.start[g]:s.start[g+1]]
	out := make([]int32, len(list))
	for i, p := range list {
		out[i] = p.pt
	}
	return out
}
