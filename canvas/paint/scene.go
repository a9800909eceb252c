package paint

import (
	"slices"

	"github.com/paulmach/orb"

	"enfilade/canvas/view"
	"enfilade/solver/exact"
	"enfilade/solver/plan"
	"enfilade/solver/study"
)

// Scene is all that a picture of the plan depends on.
type Scene struct {
	Plan   *plan.Plan
	Result *study.Result // nil, or of this plan, or of an older one while a new one is being solved
	Stale  bool          // the result has been old for a while: wash at half strength, its border hidden
	Camera view.Camera
	Theme  *Theme

	Observer, Start, Target string // ids of what is chosen: its wash and approach are drawn; empty for none
	SeenFrom                string // id of a target: the places that see it are washed, in place of what the observer sees; empty for none
	Selected                []plan.Ref
	Hover                   plan.Ref // the part under the pointer; its ID is empty for none
	AllRegions              bool     // also the borders of the other observers' regions

	Contours    []study.Contour // lines of equal walking distance from the chosen start; none when empty
	ContourStep float64         // mm from one to the next
	ContoursOld bool            // they have been out of date for a while

	Without    Layers     // what is left out of the picture
	Regions    []string   // ids of observers whose regions' borders are drawn too
	WalkChoice WalkChoice // which approaches are drawn beside the chosen one
	Walks      []Walk     // those of WalksPicked

	Photo *Photo // the plan's underlay; nil for none, or where there is no picture to be had

	Old     *plan.Plan  // the plan before a drag, nil when there is none: the dragged parts show faintly in their old place
	Dragged []plan.Ref  // parts that move: left out of the base, drawn in the overlay
	Pointer *[2]float64 // device pixels, for the marks on the rulers; nil when the pointer is elsewhere

	Drawing *Drawing // List.Drawing of the base under this frame; nil to draw the plan anew
}

// Choose returns what the first picture of a plan shows: its first observer, start and target. An id is empty where the
// plan has none.
func Choose(p *plan.Plan) (observer, start, target string) {
	for _, o := range p.Observers() {
		observer = o.ID
		break
	}
	for _, s := range p.Starts() {
		start = s.ID
		break
	}
	for _, t := range p.Targets() {
		target = t.ID
		break
	}
	return observer, start, target
}

// floorMargin is by how much the floor reaches beyond everything drawn when a plan gives none.
const floorMargin = 2000 * exact.PerMM

// Bounds returns what a fitted picture of the plan shows, in mm: its floor and all that is drawn or marked. An empty plan
// gives bounds whose Max is below its Min.
func Bounds(p *plan.Plan) orb.Bound {
	lo, hi, some := plan.Bounds(p)
	if !some {
		return orb.Bound{Min: orb.Point{1, 1}, Max: orb.Point{-1, -1}}
	}
	margin := int32(0)
	if p.Floor().Len() == 0 {
		margin = floorMargin
	}
	return orb.Bound{
		Min: orb.Point{float64(lo.X-margin) / exact.PerMM, float64(lo.Y-margin) / exact.PerMM},
		Max: orb.Point{float64(hi.X+margin) / exact.PerMM, float64(hi.Y+margin) / exact.PerMM},
	}
}

// pen is a scene being listed.
type pen struct {
	*List
	s       *Scene
	theme   *Theme
	cam     view.Camera
	frame   frame
	k       float64
	drawing *Drawing // of the plan without what is dragged
	held    *Drawing // of the obstacles that are dragged; nil for none
	within  orb.Bound
}

func newPen(s *Scene, l *List) pen {
	c := s.Camera
	l.Reset(c.W, c.H, c.K)
	l.Left = int(view.Ruler*c.K + 0.5)
	if !s.layer(LayerRulers) {
		l.Left = 0
	}
	return pen{List: l, s: s, theme: s.Theme, cam: c, frame: frameOf(c.W, c.H, c.K), k: c.K}
}

// resting returns the plan that the base shows: while something is dragged, the one before.
func (s *Scene) resting() *plan.Plan {
	if s.Old != nil {
		return s.Old
	}
	return s.Plan
}

// shows reports whether a mark at a place may reach into the picture.
func (p *pen) shows(c place) bool { return p.frame.holds(c.x, c.y) }

// grid returns the place of a point in grid units that need not be whole.
func (p *pen) grid(v vec) place {
	x, y := p.cam.PixelMM(orb.Point{v.x / exact.PerMM, v.y / exact.PerMM})
	return place{x, y}
}

func (p *pen) point(q exact.Pt) place {
	x, y := p.cam.Pixel(q)
	return place{x, y}
}

func (p *pen) mm(q orb.Point) place {
	x, y := p.cam.PixelMM(q)
	return place{x, y}
}

// dragged reports whether a part is being dragged.
func (s *Scene) dragged(ref plan.Ref) bool { return slices.Contains(s.Dragged, ref) }

func (s *Scene) selected(ref plan.Ref) bool { return slices.Contains(s.Selected, ref) }
