package arrange

import (
	"enfilade/solver/exact"
	"enfilade/solver/plan"
)

// Draw outlines a plan: lines for what has no body, closed rings for what has one.
//
//   - Lines: walls without thickness, glazing and screens, cut at their openings; a shut leaf in one is a line too.
//   - Bodies: the floor first, then each run of a thick wall between two openings, each shut leaf, each block. Rings run
//     with the inside to the left; what a body stops, its outline stops as a line as well.
//   - Joints: the corners of a chain mitre, and so do two wall ends at one point when kind, thickness and the side the
//     thickness lies on agree; a mitre longer than four times the side's reach is bevelled. All else is a union of bodies.
//   - Corners are rounded once, as vectors from the drawn point they belong to, halves away from zero. The order of the
//     walls does not matter, and shifts by whole units, quarter turns and mirroring carry over exactly. The arithmetic is
//     that of float64 without fused steps, the same on every machine; axis-parallel walls of even thickness are exact.
//   - Problems: an item that cannot be drawn is left out and told; the rest is drawn. They come in a fixed order.
//   - Cost: O(n log n) for n points and openings, the sorting of wall ends and openings; all else is one pass.
func Draw(p *plan.Plan) (*Outline, []plan.Problem) {
	d := &drawer{plan: p, out: &Outline{}}
	d.makeRoom()
	d.drawFloor()
	d.readWalls()
	d.readOpenings()
	d.joinEnds()
	for i := range d.strands {
		d.drawWall(&d.strands[i])
	}
	for _, b := range p.Blocks() {
		d.drawBlock(b)
	}
	return d.out, d.problems
}

// drawer holds an outline in the making.
type drawer struct {
	plan     *plan.Plan
	out      *Outline
	problems []plan.Problem
	strands  []strand // the walls that can be drawn, in the plan's order
	openings []plan.Opening
	points   []exact.Pt // what the strands' points are cut from
	legs     []int32
	ends     []wallEnd
	ring     ringBuffers
	spans    []span
	turned   []span
}

// ringBuffers are reused from one body to the next.
type ringBuffers struct{ right, left, outline []exact.Pt }

// solid is what stops everything.
var solid = Stops{Walk: true, Top: plan.Ceiling}

// makeRoom sets the lists up for a plan of this size, so that they grow seldom: an opening makes four corners more, and a
// wall or a block two for each of its points.
func (d *drawer) makeRoom() {
	bodies := 1 + d.plan.NumWalls() + 2*d.plan.NumOpenings() + d.plan.NumBlocks()
	segments := 4 + 4*d.plan.NumOpenings()
	points, ends := 0, 0
	for _, w := range d.plan.Walls() {
		n := w.Line.Len()
		points, ends = points+n, ends+2
		if right2, left2 := w.Sides2(); right2 == 0 && left2 == 0 {
			segments += n
		} else {
			segments += 2*n + 2
		}
	}
	for _, b := range d.plan.Blocks() {
		segments += b.Ring.Len()
	}
	d.out.Items = make([]plan.Ref, 0, bodies)
	d.out.Bodies = make([]Body, 0, bodies)
	d.out.Segments = make([]Segment, 0, segments)
	d.strands = make([]strand, 0, d.plan.NumWalls())
	d.points, d.legs = make([]exact.Pt, 0, points), make([]int32, 0, points)
	d.ends = make([]wallEnd, 0, ends)
}

func (d *drawer) problem(kind plan.ProblemKind, ref plan.Ref, at exact.Pt, text string) {
	d.problems = append(d.problems, plan.Problem{Kind: kind, Items: []plan.Ref{ref}, At: at, Text: text})
}

func (d *drawer) addItem(kind plan.Kind, id string) int32 {
	d.out.Items = append(d.out.Items, plan.Ref{Kind: kind, ID: id})
	return int32(len(d.out.Items) - 1)
}

func (d *drawer) addBody(stops Stops, item int32) int32 {
	d.out.Bodies = append(d.out.Bodies, Body{Stops: stops, Item: item})
	return int32(len(d.out.Bodies) - 1)
}

// addLine adds one piece of a line.
func (d *drawer) addLine(a, b exact.Pt, stops Stops, item int32) {
	if a != b {
		d.out.Segments = append(d.out.Segments, Segment{A: a, B: b, Stops: stops, Item: item, Body: NoBody})
	}
}

// addRing adds one ring of a body's outline. Neighbours that fell together are dropped; a body so thin that its sides fell
// together still stops as a line, because its segments do.
func (d *drawer) addRing(body int32, ring []exact.Pt) {
	b := d.out.Bodies[body]
	for i, p := range ring {
		q := ring[(i+1)%len(ring)]
		if p != q {
			d.out.Segments = append(d.out.Segments, Segment{A: p, B: q, Stops: b.Stops, Item: b.Item, Body: body})
		}
	}
}
