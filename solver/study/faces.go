package study

import (
	"context"
	"fmt"
	"math"

	"enfilade/solver/exact"
	"enfilade/solver/mesh"
	"enfilade/solver/plan"
	"enfilade/solver/pulse"
	"enfilade/solver/sight"
)

// Asked says how much of a target's face must be in view. The zero Asked is that of a point.
type Asked struct {
	Face  bool // the target has a face
	Seen  plan.SeenKind
	Share float64 // when Seen is plan.SeenShare: of the face, in one stretch
	// ShareError says how exact a share is: places that see less do not count, those that see wider by it do.
	ShareError float64
}

// askedOf returns how much of a target the walker must see. All of a face, as a share, is all of it.
func askedOf(t plan.Target, w plan.Walker) Asked {
	c, ok := faceOf(t)
	switch {
	case !ok:
		return Asked{}
	case w.Seen == plan.SeenShare && w.Share >= 1:
		return Asked{Face: true, Seen: plan.SeenAll}
	case w.Seen == plan.SeenShare:
		return Asked{Face: true, Seen: w.Seen, Share: w.Share, ShareError: sight.ShareError(c, w.Share)}
	}
	return Asked{Face: true, Seen: w.Seen}
}

// faceOf returns a target's face, if it has one.
func faceOf(t plan.Target) (sight.Face, bool) {
	if t.Face == nil || t.Face[0] == t.Face[1] {
		return sight.Face{}, false
	}
	return sight.Face{A: t.Face[0], B: t.Face[1]}, true
}

// eyes is a mesh to look for faces on, at one height: all of it, and of it only what stops sight at that height.
type eyes struct {
	height int32
	all    *sight.Finder
	lean   *sight.Finder
}

// eyesOf returns the eyes of a ground at a height; all is the finder of its mesh. The lean mesh is built when it is first asked
// for.
func (g *ground) eyesOf(ctx context.Context, all *sight.Finder, height int32) (*eyes, error) {
	for _, e := range g.eyes {
		if e.height == height && e.all == all {
			return e, nil
		}
	}
	open := func(t int32) bool { return g.mesh.Solid[t] < height }
	stops := func(e mesh.Edge) bool { return g.mesh.Tris[e.Tri()].Top[e.Corner()] >= height }
	m, err := mesh.Lean(ctx, g.mesh, open, stops, mesh.Tag{Top: mesh.Ceiling}, true)
	if err != nil {
		return nil, fmt.Errorf("study: %w", err)
	}
	e := &eyes{height: height, all: all, lean: all}
	if m != g.mesh {
		e.lean = sight.New(m)
	}
	g.eyes = append(g.eyes, e)
	return e, nil
}

// placed is a face as it can be seen on one ground at one height: its front is free.
type placed struct {
	face  sight.Face
	fault string // why there is none
	item  plan.Ref
	cut   bool // it is only the free part of the face that was drawn
}

// place finds the free front of a face: the face itself; else as a whole less than 1 mm farther out, on the free side of what it
// is in; else its free part around its middle, for which a footing has been found.
func (g *ground) place(f *sight.Finder, drawn sight.Face, middle, footing exact.Pt, height int32) placed {
	if f.Free(drawn, height) {
		return placed{face: drawn}
	}
	out := drawn.B.Sub(drawn.A).Left()
	for _, v := range nearby {
		if c := (sight.Face{A: drawn.A.Add(v), B: drawn.B.Add(v)}); out.Dot(v) >= 0 && f.Free(c, height) {
			return placed{face: c}
		}
	}
	v := footing.Sub(middle)
	c := sight.Face{A: drawn.A.Add(v), B: drawn.B.Add(v)}
	lo, hi, ok := f.FreeAround(c, footing, height)
	if !ok || out.Dot(v) < 0 {
		return placed{fault: "faces into the wall it hangs on; turn its face round"}
	}
	stop := hi
	if stop == mesh.None {
		stop = lo
	}
	p := placed{face: c, cut: true, item: g.itemAt(stop)}
	line := exact.Through(c.A, c.B)
	for back := 0; back < nearEnd; back = 2*back + 1 {
		part := c
		if lo != mesh.None {
			part.A = g.before(line, lo, -back)
		}
		if hi != mesh.None {
			part.B = g.before(line, hi, back)
		}
		if c.B.Sub(c.A).Dot(part.B.Sub(part.A)) > 0 && f.Free(part, height) {
			p.face = part
			return p
		}
	}
	p.fault = "has next to nothing of its face before the wall it runs into; move it out"
	return p
}

// nearEnd is how far before a thing that a face runs into its free part is looked for, in grid units: 100 mm, which is far
// more than rounding its end takes unless the thing all but lies along the face.
const nearEnd = 100 * exact.PerMM

// before returns the grid point next to where a face's line meets half-edge e, back units before it, on the front or level.
func (g *ground) before(line exact.Line, e mesh.Edge, back int) exact.Pt {
	num, den := line.Meet(exact.Through(g.mesh.Ends(e)))
	length := math.Sqrt(float64(line.Dir.Len2()))
	x, y := line.Point(line.At, float64(num)/float64(den)-float64(back)/length)
	at := exact.Vec{X: int32(math.Round(x)), Y: int32(math.Round(y))}
	for line.Dir.Cross(at) < 0 { // a step to the left, along the axis that the line runs more across
		left := line.Dir.Left()
		if max(left.X, -left.X) > max(left.Y, -left.Y) {
			at.X += int32(exact.Sign(int64(left.X)))
		} else {
			at.Y += int32(exact.Sign(int64(left.Y)))
		}
	}
	return line.At.Add(at)
}

// itemAt returns the item that a half-edge of the ground's mesh belongs to.
func (g *ground) itemAt(e mesh.Edge) plan.Ref {
	con := g.mesh.Constraint(e)
	if con < 0 {
		return plan.Ref{Kind: plan.KindFloor}
	}
	return g.itemAlong(con)
}

// tellFace appends the problem of a face that had to be moved, or of which only a part can be seen.
func (sc *scene) tellFace(all []plan.Problem, t plan.Target, foot footing, height int32) []plan.Problem {
	drawn, ok := faceOf(t)
	if !ok || !foot.ok {
		return all
	}
	at := targetPoint(t)
	p := sc.plain.place(sc.sight, drawn, at, foot.at, height)
	problem := plan.Problem{Kind: plan.ProblemMoved, Items: []plan.Ref{{Kind: plan.KindTarget, ID: t.ID}}, At: at}
	switch {
	case p.fault != "" || p.face == drawn:
		return all
	case p.cut:
		problem.Items = append(problem.Items, p.item)
		problem.Text = fmt.Sprintf("its face runs into %s; what is looked for is the part from %s to %s", sc.nameOf(p.item),
			millimetres(p.face.A), millimetres(p.face.B))
	case foot.at == at: // else the move of its middle is told
		problem.Text = fmt.Sprintf("its face is less than 1 mm inside another; taken to be from %s to %s, on its free side",
			millimetres(p.face.A), millimetres(p.face.B))
	default:
		return all
	}
	return append(all, problem)
}

// view is the places that see enough of a target.
type view struct {
	pieces []sight.Piece
	on     *sight.Finder // of the mesh that the pieces are of
	face   sight.Face
	found  []sight.Piece // any part: the pieces as they were found, by Origin
	within *sight.Finder // and of the mesh they were found on
	parts  []sight.Face  // a share: the windows, by Origin
}

// viewOf finds the places that see as much of a face as is asked, within limits. On the lean mesh they are fewer and their border
// is the same; walkers need them on the whole one.
func viewOf(ctx context.Context, e *eyes, c sight.Face, a Asked, lim *sight.Limits, lean bool) (view, error) {
	v := view{face: c, on: e.all}
	var err error
	switch a.Seen {
	case plan.SeenAll:
		v.pieces, err = e.all.Whole(nil, c, e.height)
	case plan.SeenShare:
		v.pieces, v.parts, err = e.all.Share(ctx, nil, c, a.Share, e.height)
	default:
		v.within = e.lean
		if v.found, err = e.lean.Partly(ctx, nil, c, e.height); err != nil {
			return v, err
		}
		v.pieces = e.lean.Reduced(e.lean.Limited(nil, v.found, lim))
		if v.on = e.lean; !lean {
			v.pieces, v.on = e.all.Onto(nil, v.pieces, e.lean), e.all
		}
		return v, nil
	}
	if ctx.Err() != nil {
		return v, ctx.Err()
	}
	if err != nil { // nothing is open before the face: nobody sees it
		v.pieces = nil
		return v, nil
	}
	v.pieces = e.all.Limited(nil, v.pieces, lim)
	return v, pulse.Tell(ctx, 1)
}

// inView returns the point of the target that is in view from the point (x, y) of one of the view's pieces, all in grid units:
// of a face seen whole or by a share its middle or that of the window, else what comes into view there.
func (v *view) inView(piece int, x, y float64) (float64, float64) {
	k := v.pieces[piece].Origin
	switch {
	case v.found != nil:
		return v.within.Glimpse(v.face, &v.found[k], x, y)
	case v.parts != nil:
		return middleOf(v.parts[k])
	}
	return middleOf(v.face)
}

func middleOf(c sight.Face) (x, y float64) {
	return (float64(c.A.X) + float64(c.B.X)) / 2, (float64(c.A.Y) + float64(c.B.Y)) / 2
}
