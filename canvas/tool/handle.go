package tool

import (
	"math"

	"enfilade/canvas/pick"
	"enfilade/solver/exact"
	"enfilade/solver/plan"
)

// knobs returns the places of the handles of the selected marks, but for the one that turns an observer, which the picture
// has itself.
func knobs(h Host) [][2]float64 {
	var out [][2]float64
	for _, r := range alone(h) {
		if r.Kind != plan.KindObserver && r.Kind != plan.KindTarget && r.Kind != plan.KindRoute || locked(h.Plan(), r) {
			continue
		}
		for _, k := range pick.Knobs(h.Plan(), h.Camera(), r, h.Walked) {
			if k.Part != pick.Heading {
				out = append(out, [2]float64{k.X, k.Y})
			}
		}
	}
	return out
}

// handleEdit returns the edit that the drag of a handle means.
func handleEdit(h Host, g *grip, e Pointer) (plan.Edit, *pick.Snap) {
	if g.hit.Part == pick.FaceEnd {
		return faceEndEdit(h, g, e)
	}
	if g.hit.Part == pick.LegMiddle {
		return legEdit(h, g, e)
	}
	o, ok := h.Plan().Observer(g.hit.Ref.ID)
	to := h.Camera().Grid(e.X, e.Y)
	if !ok || to == o.At {
		return nil, nil
	}
	deg := bearing(o.At, to)
	old, label := o, "turn observer"
	switch g.hit.Part {
	case pick.Heading:
		o.Heading = turned(deg, e.Shift)
		g.label = degrees(o.Heading) + "°"
	case pick.View:
		o.View, label = opened(deg-o.Heading, e.Shift), "change view angle"
		g.label = "view " + viewText(o.View)
	case pick.Range:
		o.Range, label = reached(h, o, to, e), "change range"
		g.label = "range " + h.FormatLength(float64(o.Range))
	}
	if o == old {
		return nil, nil
	}
	return Named(label, plan.SetObserver{Observer: o}), nil
}

// opened returns the view angle whose side lies off degrees from the heading, in whole degrees or steps of 15; next to behind
// is all round.
func opened(off float64, coarse bool) float64 {
	half := math.Abs(math.Remainder(off, 360))
	const behind = 177
	if half >= behind {
		return 360
	}
	step := 1.0
	if coarse {
		step = 15
	}
	return max(step, math.Round(2*half/step)*step)
}

func viewText(view float64) string {
	if view == 360 {
		return "all round"
	}
	return degrees(view) + "°"
}

// reached returns the range that ends where the pointer is along the heading, in steps of the grid.
func reached(h Host, o plan.Observer, to exact.Pt, e Pointer) int32 {
	sin, cos := math.Sincos(o.Heading * math.Pi / 180)
	d := (float64(to.X)-float64(o.At.X))*cos + (float64(to.Y)-float64(o.At.Y))*sin
	step := float64(gridStep(h, e))
	return int32(min(max(math.Round(d/step)*step, step), float64(plan.MaxCoord)))
}

// faceEndEdit moves one end of a target's face: along the wall it hangs on, else anywhere.
func faceEndEdit(h Host, g *grip, e Pointer) (plan.Edit, *pick.Snap) {
	t, ok := h.Plan().Target(g.hit.Ref.ID)
	if !ok || t.Face == nil {
		return nil, nil
	}
	x, y := h.Camera().Pixel(t.Face[1-g.hit.Index])
	var snap pick.Snap
	if f, ok := pick.FaceAt(h.Plan(), h.Camera(), x, y, gridStep(h, e)); ok && !e.Ctrl && straight(f, *t.Face) {
		snap = pick.Snap{At: f.Place(h.Camera(), e.X, e.Y, gridStep(h, e)), Kind: pick.SnapAlong, Ref: f.Ref, Edge: f.Ends}
	} else {
		from := t.Face[1-g.hit.Index]
		snap = h.Snapper().At(h.Plan(), h.Camera(), e.X, e.Y, pick.SnapTo{Free: e.Ctrl, From: &from})
	}
	face := *t.Face
	face[g.hit.Index] = snap.At
	g.to = snap.At
	if face == *t.Face || face[0] == face[1] {
		return nil, &snap
	}
	t.Face, t.At = &face, along(face[0], face[1], 0.5)
	g.label = "face of " + h.FormatLength(exact.Dist(face[0], face[1]))
	return Named("change face", plan.SetTarget{Target: t}), &snap
}

// straight reports whether a target's face lies along a wall's face, to within the rounding of both.
func straight(f pick.Face, face [2]exact.Pt) bool {
	d := exact.Dist(f.Ends[0], f.Ends[1])
	return d > 0 && math.Abs(float64(exact.Area2(f.Ends[0], f.Ends[1], face[0])))/d < 4 && math.Abs(float64(exact.Area2(f.Ends[0], f.Ends[1], face[1])))/d < 4
}

// carried returns a target's face carried to another place: with its middle there, turned along the wall's face if there is
// one.
func carried(face [2]exact.Pt, at exact.Pt, on *pick.Face) [2]exact.Pt {
	v := face[1].Sub(face[0])
	if on != nil {
		way := on.Ends[1].Sub(on.Ends[0])
		k := math.Sqrt(float64(v.Len2()) / float64(way.Len2()))
		v = exact.Vec{X: int32(math.Round(float64(way.X) * k)), Y: int32(math.Round(float64(way.Y) * k))}
	}
	a := at.Add(exact.Vec{X: -v.X / 2, Y: -v.Y / 2})
	return [2]exact.Pt{a, a.Add(v)}
}
