package plan

import (
	"math"

	"enfilade/solver/exact"
)

// Ceiling is the height of what reaches the ceiling: above every eye.
const Ceiling int32 = math.MaxInt32

// Kind says which list of the plan an item belongs to.
type Kind uint8

// The kinds of item, in the order of the plan file.
const (
	KindPlan Kind = iota
	KindFloor
	KindWall
	KindOpening
	KindBlock
	KindZone
	KindObserver
	KindTarget
	KindStart
	KindRoute
	KindWalker
	KindUnderlay
)

// Ref names one item of a plan.
type Ref struct {
	Kind Kind
	ID   string
}

// Meta is what any item may carry besides its own fields.
type Meta struct {
	Locked bool
	Hidden bool   // hidden from the picture, never from the solver
	Extra  string // unknown members of the file, kept word for word: a JSON object, or empty
}

// WallKind says what a wall is made of, and so what it stops.
type WallKind uint8

// The kinds of wall.
const (
	Solid   WallKind = iota // stops sight and walking
	Glazing                 // stops walking, not sight
	Screen                  // stops sight, not walking
	Low                     // stops walking, and sight up to its height
)

// Justify says where a wall's thickness lies, seen along its line.
type Justify uint8

// The places of a wall's body beside its line.
const (
	Centre Justify = iota
	Left
	Right
)

// Wall is a chain of straight pieces with one thickness.
//
// A closed chain repeats its first point. Thickness 0 is a line that blocks from both sides; glazing and screens are
// always lines, and their thickness is only drawn.
type Wall struct {
	ID        string
	Kind      WallKind
	Line      Chain
	Thickness int32
	Height    int32 // Ceiling when none is given
	Justify   Justify
	Meta
}

// Leaf is what fills a door when it is shut.
type Leaf uint8

// The leaves of an opening.
const (
	NoLeaf     Leaf = iota // a plain gap
	SolidLeaf              // shut, it stops sight and walking
	GlazedLeaf             // shut, it stops walking only
)

// Opening is a door or a plain gap in one straight piece of a wall. It cuts the wall's whole thickness, with jambs square
// to the line.
type Opening struct {
	ID        string
	Wall      string
	Segment   int   // index of the wall's straight piece, from 0
	At        int32 // distance from the start of the piece to the near jamb, along the line
	Width     int32
	Leaf      Leaf
	Shut      bool
	HingeEnd  bool // hinged at the far jamb instead of the near one
	SideRight bool // opens to the right of the line instead of the left
	Meta
}

// Circle remembers that a block's ring was drawn as a circle.
type Circle struct {
	At     exact.Pt
	Radius int32
	Extra  string // unknown members of the file, as in Meta
}

// Block is a body: column, plinth, case, crate.
type Block struct {
	ID     string
	Ring   Chain // simple ring, first point not repeated
	Height int32 // Ceiling when none is given
	Circle *Circle
	Meta
}

// Zone is a named area that stops nothing.
type Zone struct {
	ID   string
	Name string
	Ring Chain
	Room bool // a room: its name is drawn in capitals
	Meta
}

// Observer is an eye.
type Observer struct {
	ID      string
	Name    string
	At      exact.Pt
	Eye     int32   // height of the eye above the floor
	Heading float64 // degrees
	View    float64 // view angle in degrees, 360 for all round
	Range   int32   // 0 for no limit
	Colour  int     // index of the observer's colour, from 0; -1 when none is given
	Meta
}

// Target is a thing to be seen: a point, or a face with a front.
type Target struct {
	ID       string
	Name     string
	At       exact.Pt
	Face     *[2]exact.Pt // the front lies to the left of the face as written
	Normal   *float64     // degrees; the side a point target is seen from, for the picture
	Bottom   *int32
	Top      *int32
	MaxAngle *float64
	Near     *int32
	Far      *int32
	Colour   int // -1 when none is given
	Meta
}

// Start is a place where a walk begins.
type Start struct {
	ID     string
	Name   string
	At     exact.Pt
	Facing *float64 // degrees
	Meta
}

// Route is a walk with waypoints.
type Route struct {
	ID   string
	From string
	Via  Chain
	To   string
	Meta
}

// SeenKind says how much of a target must be in view.
type SeenKind uint8

// How much of a target counts as seen.
const (
	SeenAny SeenKind = iota
	SeenAll
	SeenShare
)

// Walker is the person who walks.
type Walker struct {
	Radius int32
	Pace   float64 // metres per second
	Eye    int32
	Seen   SeenKind
	Share  float64 // share of the face, 0 to 1, when Seen is SeenShare
	Meta
}

// DefaultWalker is the walker of a plan that names none.
//
// The pace is the design walking speed of FHWA-RD-98-107 (1998), section 2.2.
func DefaultWalker() Walker { return Walker{Pace: 1.2, Eye: 1600 * exact.PerMM} }

// Underlay is a picture to trace over. It is not changed in place.
type Underlay struct {
	Image      string   // path; in a plan file relative to it
	At         exact.Pt // where the picture's lower left corner lies
	MMPerPixel float64  // how wide and high a pixel is
	Opacity    float64  // 0 to 1
	Turn       float64  // degrees counter-clockwise about At
	Meta
}

// Sheet is what the plan says about itself: title, place, display unit, brief and underlay.
type Sheet struct {
	Title    string
	Place    string
	Unit     string // display unit: "m", "cm", "mm" or "ft"
	Brief    string // the brief's JSON array, kept word for word; empty when there is none
	Underlay *Underlay
	Extra    string // unknown members of the file's top object
}
