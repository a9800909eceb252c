package study

import (
	"context"
	"fmt"
	"math"

	"enfilade/solver/arrange"
	"enfilade/solver/exact"
	"enfilade/solver/mesh"
	"enfilade/solver/plan"
)

// ground is a mesh, and what runs along its edges: that of a plan's obstacles as drawn, or grown for a walker with a body.
type ground struct {
	site  *arrange.Site  // as drawn
	grown *arrange.Grown // or grown
	mesh  *mesh.Mesh
	items []plan.Ref
	eyes  []*eyes // for each height that faces are looked for at, once asked for
}

// makeGround rounds and triangulates an outline.
func makeGround(ctx context.Context, o *arrange.Outline) (*ground, error) {
	site, err := arrange.NewSite(ctx, o)
	if err != nil {
		return nil, fmt.Errorf("study: %w", err)
	}
	return groundOf(site), nil
}

func groundOf(s *arrange.Site) *ground {
	return &ground{site: s, mesh: s.Mesh, items: s.Outline.Items}
}

// grow makes the ground for walkers of a radius, whose polygon has so many sides, from the ground as drawn.
func (g *ground) grow(ctx context.Context, radius int32, sides int) (*ground, error) {
	grown, err := arrange.NewGrown(ctx, g.site.Outline, g.mesh, radius, sides)
	if err != nil {
		return nil, fmt.Errorf("study: %w", err)
	}
	return &ground{grown: grown, mesh: grown.Mesh, items: grown.Items}, nil
}

// line returns what runs along an edge of the ground's graph: an index into items, and whether a line there stops walking.
func (g *ground) line(con int32) (item int32, walk bool) {
	if g.grown != nil {
		return g.grown.Line(con)
	}
	e := &g.site.Graph.Edges[con]
	return e.Item, e.Walk
}

// itemAlong returns the item that runs along an edge of the ground's graph.
func (g *ground) itemAlong(con int32) plan.Ref {
	item, _ := g.line(con)
	return g.items[item]
}

// demand is what a mark asks of the place it stands at.
type demand struct {
	shut func(tri int32) bool     // whether a triangle does not give it
	by   func(arrange.Stops) bool // whether a body takes it away
}

// sighted asks for a place that is not solid at the height of an eye.
func (g *ground) sighted(eye int32) demand {
	return demand{func(tri int32) bool { return g.mesh.Solid[tri] >= eye }, func(s arrange.Stops) bool { return s.Top >= eye }}
}

// standing asks for a place on which someone can stand.
func (g *ground) standing() demand {
	return demand{g.shut, func(s arrange.Stops) bool { return s.Walk }}
}

// shut says of a triangle whether nobody stands in it.
func (g *ground) shut(tri int32) bool { return g.mesh.Tris[tri].Flags&mesh.FlagNoWalk != 0 }

// free reports whether some triangle that holds p is not shut.
func (g *ground) free(p exact.Pt, shut func(int32) bool) bool {
	some := false
	g.holding(p, func(t int32) { some = some || !shut(t) })
	return some
}

// holding calls do for every triangle that holds p.
func (g *ground) holding(p exact.Pt, do func(tri int32)) {
	place, ok := g.mesh.Locate(p)
	switch {
	case !ok:
	case place.Corner >= 0:
		g.mesh.Around(mesh.EdgeOf(place.Tri, place.Corner), func(e mesh.Edge) { do(e.Tri()) })
	case place.Edge != mesh.None:
		do(place.Tri)
		if twin := g.mesh.Twin(place.Edge); twin != mesh.None {
			do(twin.Tri())
		}
	default:
		do(place.Tri)
	}
}

// parted reports whether p is more than one place for walkers, which are not connected through it, and what parts them.
func (g *ground) parted(p exact.Pt) (plan.Ref, bool) {
	place, ok := g.mesh.Locate(p)
	if !ok {
		return plan.Ref{}, false
	}
	places, by := 0, int32(-1) // how many free sectors begin at an edge that stops walking
	begins := func(e mesh.Edge) {
		if !g.shut(e.Tri()) && g.mesh.Tris[e.Tri()].StopsWalk(e.Corner()) {
			places++
			by = g.mesh.Constraint(e)
		}
	}
	switch {
	case place.Corner >= 0:
		g.mesh.Around(mesh.EdgeOf(place.Tri, place.Corner), begins)
	case place.Edge != mesh.None && g.mesh.Twin(place.Edge) != mesh.None:
		begins(place.Edge)
		begins(g.mesh.Twin(place.Edge))
	}
	if places < 2 || by < 0 {
		return plan.Ref{}, places > 1
	}
	return g.itemAlong(by), true
}

// holder returns the item, the first in the plan, of the bodies that wind about the solid place p and stop what stops says,
// by the crossings of a ray to the right with the rounded graph of the ground as drawn. O(n).
func (g *ground) holder(p exact.Pt, stops func(arrange.Stops) bool) plan.Ref {
	graph := g.site.Graph
	wind := make([]int32, len(graph.Bodies))
	for i := range g.mesh.Tris {
		for k := range 3 {
			e := mesh.EdgeOf(int32(i), k)
			con := g.mesh.Constraint(e)
			if con < 0 {
				continue
			}
			a, b := g.mesh.Ends(e)
			if !(a.Y <= p.Y && b.Y > p.Y && exact.Orient(a, b, p) > 0) {
				continue // the half-edges that lead up; their twins lead down
			}
			edge := &graph.Edges[con]
			sign := int32(1)
			if g.mesh.Pts[edge.A] != a {
				sign = -1
			}
			for _, w := range graph.Winds[edge.Wind0:edge.Wind1] {
				wind[w.Body] += sign * w.Delta
			}
		}
	}
	best := int32(-1)
	for i, b := range graph.Bodies {
		if i > 0 && wind[i] != 0 && stops(b.Stops) && (best < 0 || b.Item < best) {
			best = b.Item
		}
	}
	if best < 0 {
		return plan.Ref{Kind: plan.KindFloor}
	}
	return g.items[best]
}

// roomNear returns the distance from p to the nearest place on which the walker can stand, +Inf if there is none. It looks
// through the triangles from p outwards, nearest edges first.
func (g *ground) roomNear(p exact.Pt) float64 {
	place, ok := g.mesh.Locate(p)
	if !ok {
		return math.Inf(1)
	}
	type entry struct {
		tri  int32
		dist float64
	}
	open, seen := []entry{{place.Tri, 0}}, map[int32]bool{place.Tri: true}
	for len(open) > 0 {
		k := 0
		for i, e := range open {
			if e.dist < open[k].dist {
				k = i
			}
		}
		now := open[k]
		open[k] = open[len(open)-1]
		open = open[:len(open)-1]
		if !g.shut(now.tri) {
			return now.dist
		}
		t := &g.mesh.Tris[now.tri]
		for i := range 3 {
			if n := t.N[i]; n != mesh.None && !seen[n.Tri()] {
				seen[n.Tri()] = true
				open = append(open, entry{n.Tri(), max(now.dist, distance(p, t.P[i], t.P[mesh.Inc(i)]))})
			}
		}
	}
	return math.Inf(1)
}

// distance returns the distance of p from the segment ab in grid units; it only measures.
func distance(p, a, b exact.Pt) float64 {
	d := b.Sub(a)
	t := min(max(float64(p.Sub(a).Dot(d))/float64(d.Len2()), 0), 1)
	return math.Hypot(float64(p.X-a.X)-t*float64(d.X), float64(p.Y-a.Y)-t*float64(d.Y))
}
