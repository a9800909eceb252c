package tool

import (
	"enfilade/canvas/pick"
	"enfilade/canvas/view"
	"enfilade/solver/exact"
	"enfilade/solver/plan"
)

// Host is what a tool works on. All calls come from the window's goroutine.
type Host interface {
	// Plan returns the committed plan.
	Plan() *plan.Plan
	// Camera returns what the picture shows.
	Camera() view.Camera
	// Selection returns the selected items; the caller does not change the slice.
	Selection() []plan.Ref
	// Select makes refs the selection.
	Select(refs ...plan.Ref)
	// Preview shows an edit of the committed plan without doing it.
	Preview(plan.Edit) error
	// Do does an edit as one step of the history and ends the preview.
	Do(plan.Edit) error
	// Cancel ends the preview.
	Cancel()
	// Defaults returns the measures of new items.
	Defaults() Defaults
	// SetDefaults changes the measures of new items.
	SetDefaults(Defaults)
	// Snapper returns what finds where places snap, with the kinds of snapping that are switched on.
	Snapper() *pick.Snapper
	// Walked returns the legs of the route with an id as they are walked, as far as that is known.
	Walked(route string) [][]exact.Pt
	// UnderlaySize returns the size of the picture to trace over, in its pixels; nothing when none is shown.
	UnderlaySize() (w, h int)
	// ParseLength reads a typed length in the plan's display unit, as grid units.
	ParseLength(text string) (int32, error)
	// FormatLength writes a length of grid units in the plan's display unit, with the unit's name.
	FormatLength(units float64) string
	// FormatArea writes an area of square grid units, with its unit.
	FormatArea(units2 float64) string
}

// Defaults are the measures of new items, in grid units.
type Defaults struct {
	Thickness    int32 // of walls
	Thin         bool  // walls are lines without a body; their thickness is kept for when they are not
	Justify      plan.Justify
	Height       int32 // of walls and blocks
	LowThickness int32 // of low walls
	LowHeight    int32
	DoorWidth    int32
	ColumnRadius int32
	Eye          int32 // of observers
	Leaf         plan.Leaf
	Shut         bool // doors are drawn shut
	HingeEnd     bool // at the far jamb, seen along the wall
}

// StandardDefaults are the measures a new window begins with.
func StandardDefaults() Defaults {
	return Defaults{Thickness: 2000, Height: plan.Ceiling, LowThickness: 3000, LowHeight: 9500, DoorWidth: 9000,
		ColumnRadius: 2000, Eye: 16000, Leaf: plan.SolidLeaf}
}

// Pointer is the pointer's state at an event.
type Pointer struct {
	X, Y    float64 // device pixels of the picture
	Shift   bool
	Ctrl    bool // nothing snaps
	Pressed bool // the primary button is down
	Clicks  int  // of a press: 1, or 2 for the second of a double click
}

// KeyName names a key that a tool may use.
type KeyName string

// The keys tools use; a printable character is a Key with its Rune.
const (
	KeyEscape    KeyName = "escape"
	KeyEnter     KeyName = "enter"
	KeyDelete    KeyName = "delete"
	KeyBackspace KeyName = "backspace"
	KeyTab       KeyName = "tab"
	KeyLeft      KeyName = "left"
	KeyRight     KeyName = "right"
	KeyUp        KeyName = "up"
	KeyDown      KeyName = "down"
	KeyRune      KeyName = "rune"
	KeyUndo      KeyName = "undo" // takes back the last point of what is being drawn
)

// Key is one key press.
type Key struct {
	Name  KeyName
	Rune  rune // of KeyRune
	Shift bool
	Ctrl  bool
}

// Tool is one tool's state machine. Move comes with and without a pressed button; every Down is followed by an Up or by
// Stop.
type Tool interface {
	Down(h Host, e Pointer)
	Move(h Host, e Pointer)
	Up(h Host, e Pointer)
	// Key reports whether the tool used the key.
	Key(h Host, k Key) bool
	// Stop leaves what is half done: the tool is put away, or the pointer's grip was lost.
	Stop(h Host)
	// Leave is told when the pointer leaves the picture with no button pressed.
	Leave(h Host)
	// Sketch returns what is to be drawn over the picture now.
	Sketch(h Host) Sketch
	// Hint says in a few words what the next click does.
	Hint(h Host) string
}

// Finisher is a tool that ends what it is in the midst of, as far as it has come, when another tool is taken in hand.
type Finisher interface{ Finish(h Host) }

// Sketch is what a tool draws over the picture: it says what, the window says how.
type Sketch struct {
	Band    []exact.Pt   // rubber band: a line through these points
	Box     *[2]exact.Pt // the box being drawn for picking
	Snap    *pick.Snap   // where the pointer snapped
	Label   string       // the measure beside the pointer
	LabelAt exact.Pt
	Types   bool         // digits typed now, and Tab, are for the fields
	Fields  []Field      // at the pointer in place of Label, while a measure is typed
	Knobs   [][2]float64 // round handles: the device pixels of what turns, opens or stretches a selected mark
	Hover   plan.Ref     // the item under the pointer; its Kind is KindPlan when there is none
	Handles []exact.Pt   // square handles: the corners of selected items
	Dragged []plan.Ref   // items whose place follows the pointer
	Show    plan.Ref     // the previewed observer whose region is to be shown; Kind is KindPlan when there is none
	Fault   string       // why the preview cannot be done, in words
	Grip    Grip
}

// Grip is the shape the pointer takes.
type Grip uint8

// The pointer's shapes.
const (
	GripArrow Grip = iota
	GripHand       // over something that can be dragged
	GripCross      // where the next click puts a point
)

// Is reports whether a ref names an item at all.
func Is(r plan.Ref) bool { return r.Kind != plan.KindPlan }
