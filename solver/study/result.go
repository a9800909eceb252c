package study

import (
	"github.com/paulmach/orb"

	"enfilade/solver/plan"
)

// EdgeKind says what a piece of a region's border is.
type EdgeKind uint8

// The kinds of border.
const (
	EdgeWall      EdgeKind = iota // on something that stops sight
	EdgeOccluding                 // open floor goes on behind it
	EdgeClip                      // a side of the view angle or the arc of the range
)

// Sight is the region seen from one observer, or the places that see one target, in the plane of the eye.
type Sight struct {
	Item        plan.Ref
	Name        string
	At          orb.Point  // where the eye was taken to be, mm; it differs from the item's place when that was moved to a face's free side
	Eye         float64    // height of the eye, mm
	Problem     string     // why nothing was solved for this item; empty when it was
	Area        float64    // m²
	Perimeter   float64    // m, the whole border
	Wall        float64    // m, border on things that stop sight
	Occluding   float64    // m, border where floor goes on
	Clip        float64    // m, border on the sides of the view angle and the arc of the range
	Boundary    orb.Ring   // mm, counter-clockwise, first point not repeated
	Kinds       []EdgeKind // Kinds[i] is the border from Boundary[i] to the next point
	More        []Border   // the region's other rings: further parts counter-clockwise, holes clockwise
	TargetsSeen []string   // observers only: ids of the targets of which any part is in the region, in the plan's order
	Asked       Asked      // targets only: how much of it must be in view
}

// Border is a closed ring: points in mm, the first not repeated, and Kinds[i] the border from point i to the next.
type Border struct {
	Ring  orb.Ring
	Kinds []EdgeKind
}

// Status says how an approach ends.
type Status uint8

// The ends of an approach.
const (
	StatusNone     Status = iota // no walk leads to a place that sees the target
	StatusSeen                   // the start already sees it
	StatusApproach               // a walk of positive length
)

// Approach is the shortest walk from a start to first sight of a target, and the full walk to the target itself.
type Approach struct {
	Start, Target string
	Problem       string // why this pair was not solved; empty when it was
	Status        Status
	Length        float64     // mm, to first sight
	FirstSight    orb.Point   // mm
	Points        []orb.Point // mm, the walk from start to first sight; one point when the start sees the target
	Asked         Asked       // how much of the target must be in view
	SightLine     float64     // mm, from first sight to SightTo
	SightTo       orb.Point   // mm, the target, or the part of its face that is in view from first sight
	HasFullWalk   bool
	FullWalk      float64     // mm
	FullPoints    []orb.Point // mm
	Reason        string      // why there is no approach or no full walk: what closes the way
	Seconds       float64     // of the approach at the walker's pace
	Ties          bool        // another way is equally short

	// The widest body that can make some walk to first sight, and to the target itself, in mm: how wide the tightest gap on the
	// widest way is. They are of the drawing, not of the walker. Without a number where there is no way, or where no two things
	// stand so near each other that the way has to pass between them.
	ClearWidth, FullClearWidth       float64
	HasClearWidth, HasFullClearWidth bool
	// WidthsUnknown says that clear widths were given up: the plan's walls stand so that to find them would take too long.
	WidthsUnknown bool
	// Tightest are the two points of the gap that FullClearWidth is of, mm; where nobody stands at the target, of ClearWidth.
	Tightest [2]orb.Point
}

// Reach is how far it is from a start to a zone, by the shortest walk: to its nearest point and to its farthest. Both are of the
// floor in the zone on which the walker can stand and to which a walk leads.
type Reach struct {
	Start, Zone           string
	Problem               string    // why this pair was not solved; empty when it was
	Found                 bool      // a walk leads to the zone; the rest is zero otherwise
	Nearest, Farthest     float64   // mm
	NearestAt, FarthestAt orb.Point // mm
	Cut                   bool      // to some of the zone's floor no walk leads
}

// Route is a route as it is walked: each of its legs, from one of its points to the next, is the shortest walk.
type Route struct {
	ID, From, To string
	Problem      string      // why it, or what follows on Legs, was not solved; empty when it was
	Legs         []Leg       // those that can be walked, up to the first that cannot
	Points       []orb.Point // mm, the walk from the start on, all legs in one
	Length       float64     // mm, of the legs together
	Seconds      float64     // of the legs together, at the walker's pace
	Closed       int         // which leg no walk leads over, from 1; 0 when there is none, or none could begin
	ClosedTo     string      // where that leg leads: "waypoint 2"
	Reason       string      // what closes it; empty where Problem says what is wrong with the place it leads to
}

// Leg is one leg of a route: Points[First] to Points[Last].
type Leg struct {
	To          string  // "waypoint 2", "target T1"
	Length      float64 // mm
	Seconds     float64
	First, Last int
}

// Result is everything studied about one plan.
type Result struct {
	Sight      []Sight    // one for each observer, in the plan's order
	SeenFrom   []Sight    // one for each target
	Approaches []Approach // one for each start and target, starts outermost
	Reach      []Reach    // one for each start and zone, starts outermost
	Routes     []Route    // one for each route, in the plan's order
	WalkerEye  float64    // mm
	// WalkerRadius is the radius that walks keep clear of everything that stops walking; the polygon that stands for the
	// walker's disc encloses it and reaches at most RadiusExcess beyond. Both in mm.
	WalkerRadius, RadiusExcess float64
	Problems                   []plan.Problem
	// Doubts are what else looks wrong, though all was solved: targets and legs that no walk leads to, walls that nearly meet or
	// lie on one another, items off the floor.
	Doubts []plan.Problem
}
