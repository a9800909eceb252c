package pick

import (
	"math"

	"enfilade/canvas/view"
	"enfilade/solver/exact"
	"enfilade/solver/plan"
)

// Knob is a handle of a selected mark, at a place of the picture.
type Knob struct {
	Part  Part
	Index int
	X, Y  float64 // device pixels
}

// rangeLeast is how far from the eye, in px at 100 %, an observer's range must end for it to have a handle there.
const rangeLeast = 50

// faceLeast is how long, in px at 100 %, a target's face must be to have handles at its ends: between those of a shorter one
// nothing would be left to move it by.
const faceLeast = 40

// Knobs returns the handles of a mark: of an observer those that turn it, open its view angle, and stretch its range when it
// has one; of a target with a face those at the face's ends; of a route those half way along its legs.
func Knobs(p *plan.Plan, cam view.Camera, r plan.Ref, walks ...Walks) []Knob {
	switch r.Kind {
	case plan.KindObserver:
		if o, ok := p.Observer(r.ID); ok && !o.Hidden {
			return observerKnobs(o, cam)
		}
	case plan.KindTarget:
		if t, ok := p.Target(r.ID); ok && !t.Hidden && t.Face != nil {
			x0, y0 := cam.Pixel(t.Face[0])
			x1, y1 := cam.Pixel(t.Face[1])
			if math.Hypot(x1-x0, y1-y0) < faceLeast*cam.K {
				return nil
			}
			return []Knob{{FaceEnd, 0, x0, y0}, {FaceEnd, 1, x1, y1}}
		}
	case plan.KindRoute:
		if x, ok := p.Route(r.ID); ok && !x.Hidden {
			return routeKnobs(p, cam, x, walks)
		}
	}
	return nil
}

func observerKnobs(o plan.Observer, cam view.Camera) []Knob {
	x, y := cam.Pixel(o.At)
	at := func(part Part, index int, deg, far float64) Knob {
		sin, cos := math.Sincos(deg * math.Pi / 180)
		return Knob{part, index, x + cos*far, y - sin*far}
	}
	out := []Knob{at(Heading, 0, o.Heading, HandleDist*cam.K), at(View, 0, o.Heading+o.View/2, ViewDist*cam.K)}
	if o.View < 360 {
		out = append(out, at(View, 1, o.Heading-o.View/2, ViewDist*cam.K))
	}
	if far := cam.Length(o.Range); far >= rangeLeast*cam.K {
		out = append(out, at(Range, 0, o.Heading, far))
	}
	return out
}

// knob finds the handle under the pointer, of the selected marks.
func knob(p *plan.Plan, cam view.Camera, s spot, selected []plan.Ref, walks []Walks) (Hit, bool) {
	var n nearest
	for _, r := range selected {
		for _, k := range Knobs(p, cam, r, walks...) {
			h := Hit{Ref: r, Part: k.Part, Index: k.Index}
			if o, ok := p.Observer(r.ID); ok && r.Kind == plan.KindObserver {
				h.At = o.At
			} else if t, ok := p.Target(r.ID); ok && r.Kind == plan.KindTarget {
				h.At = t.Face[k.Index]
			} else if r.Kind == plan.KindRoute {
				h.At = cam.Grid(k.X, k.Y)
			}
			n.offer(s.dist(pointer(cam, k.X, k.Y)), units(cam, handleReach), h)
		}
	}
	return n.hit, n.ok
}

// Place returns the point of a face nearest to the pixel place (x, y), on the face's free side: along a level or upright
// face in steps, along a slanted one at the nearest grid point.
func (f Face) Place(cam view.Camera, x, y float64, step int32) exact.Pt {
	foot, _ := pointer(cam, x, y).foot(f.Ends[0], f.Ends[1])
	return alongEdge(foot, f.Ends[0], f.Ends[1], step)
}
