package study

import (
	"context"
	"slices"

	"enfilade/solver/exact"
	"enfilade/solver/plan"
	"enfilade/solver/sight"
)

// look is where a target is looked for on one ground, and from where it is seen there.
type look struct {
	at    exact.Pt
	fault string // why it cannot be looked for, to be said after the target's name
	asked Asked
	lim   sight.Limits
	clip  sight.Clip   // of the cones
	cones []sight.Cone // of the point, or of the face's middle; they do not know of distances
	view  *view        // the places that count; nil when they are the cones
}

// lookFor finds the places that see as much of a target as the walker must see, in the plane of the walker's eye. The pieces
// may be of the lean mesh when lean says so. The cones stay valid.
func (sc *scene) lookFor(ctx context.Context, g *ground, f *sight.Finder, t plan.Target, w plan.Walker, lean bool) (look, error) {
	k := look{asked: askedOf(t, w)}
	at := targetPoint(t)
	foot := sc.stand(at, sc.plain.sighted(w.Eye))
	if k.at = foot.at; !foot.ok {
		k.fault = foot.text
		return k, nil
	}
	if k.lim, k.fault = sc.limitsOf(t, foot.at); k.fault != "" {
		return k, nil
	}
	drawn, isFace := faceOf(t)
	if k.clip = clipOf(&k.lim); isFace {
		k.clip = sight.Front(drawn.A, drawn.B)
	}
	cones, err := f.Cones(foot.at, w.Eye, k.clip)
	k.cones = slices.Clone(cones)
	if isFace {
		p := g.place(f, drawn, at, foot.at, w.Eye)
		if k.fault = p.fault; k.fault != "" {
			return k, nil
		}
		e, err := g.eyesOf(ctx, f, w.Eye)
		if err != nil {
			return k, err
		}
		v, err := viewOf(ctx, e, p.face, k.asked, &k.lim, lean)
		k.view = &v
		return k, err
	}
	if err != nil {
		k.fault = "is seen from nowhere: it stands on a wall and faces into it; turn it round"
		return k, nil
	}
	if k.lim.Far != nil || k.lim.Near != nil {
		k.view = &view{pieces: f.Limited(nil, sight.Pieces(foot.at, k.cones, k.clip), &k.lim), on: f}
	}
	return k, nil
}

// triangles lists the triangles that hold places that count.
func (k *look) triangles() []int32 {
	var list []int32
	if k.view == nil {
		for _, c := range k.cones {
			list = append(list, c.Tri)
		}
		return list
	}
	for i := range k.view.pieces {
		list = append(list, k.view.pieces[i].Tri)
	}
	return list
}

// seenBy reports whether any part of a target is seen by an eye within its clip, and within the target's own limits.
func (sc *scene) seenBy(t plan.Target, eye exact.Pt, height int32, clip sight.Clip) bool {
	at := targetPoint(t)
	foot := sc.stand(at, sc.plain.sighted(height))
	if !foot.ok {
		return false
	}
	lim, fault := sc.limitsOf(t, foot.at)
	if fault != "" || !lim.Holds(eye) {
		return false
	}
	drawn, isFace := faceOf(t)
	if !isFace {
		return sc.sight.SeesWithin(eye, foot.at, height, clip)
	}
	p := sc.plain.place(sc.sight, drawn, at, foot.at, height)
	return p.fault == "" && sc.sight.SeesPart(eye, p.face, height, clip)
}
