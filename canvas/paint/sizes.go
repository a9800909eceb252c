package paint

// Sizes of glyphs, in px at 100 %, centred on their model point: what the picture draws, and what a hand may hit.
const (
	ObserverRadius  = 8.5  // the disc
	ObserverHalo    = 10.1 // the disc of floor colour under it
	ObserverSlot    = 2.6  // width of the slot that points along the heading
	ObserverRing    = 14   // ring of the selected observer
	HandleDistance  = 34   // from the observer's centre to the handle that turns it
	HandleRadius    = 3.5
	ViewArc         = 16 // radius of the arc over a view angle below 360°
	TargetRadius    = 5.2
	TargetTick      = 15 // length of the tick along the target's normal, from its centre
	TargetDot       = 2.3
	FaceEnd         = 5  // the ticks at the ends of a target's face, on its front
	MatWidth        = 16 // a start's mat along the way in
	MatLength       = 26 // and across it
	FirstSight      = 7.5
	FirstSightHalo  = 9.5
	FirstSightSmall = 5 // of approaches that are not chosen
	ProblemRadius   = 16
	GripSize        = 8 // side of the square handles of a selected body
	SelectedOffset  = 4 // distance of the selection's outline from the body
	HoverOffset     = 3
)

// MatDistance is how far a start's mat lies before its point when the start has a facing, in mm: the point stands on the
// inner face of the wall and the mat outside the door. It never comes nearer than MatLeast px, so that the point shows.
const (
	MatDistance = 780
	MatLeast    = 15
)

// Weights of lines, in px.
const (
	thinBody     = 1.5 // bodies never get thinner
	thinWall     = 2.0
	glazingLine  = 1.0
	glazingGap   = 55 // mm from the middle to either line
	screenLine   = 2.4
	lowOutline   = 1.0
	hatchLine    = 0.9
	lowHatchGap  = 3.6
	lowHatch     = 0.26 // strength
	leafLine     = 1.8
	swingLine    = 0.7
	threshold    = 0.7
	regionSolid  = 3.2 // half of it lies under the ink
	regionDash   = 1.15
	approachLine = 2.8
	casing       = 6.0
	tickLine     = 1.2
	tickLength   = 8
	fifthLength  = 14
	sightLine    = 1.1
	fullWalkLine = 1.3
	otherLine    = 1.3
	gapLine      = 1.8 // ticks at the tightest spot of a walk
	gapTick      = 10  // their length
)

// Sizes of text and its halo, in px.
const (
	labelText  = 11.5
	letterText = 12
	figureText = 10.5
	tickText   = 10
	roomText   = 10
	roomSpace  = 1.5
	rulerText  = 10
	titleText  = 15
	placeText  = 11.5
	labelHalo  = 3.4
	roomHalo   = 6
	redHalo    = 5
)
