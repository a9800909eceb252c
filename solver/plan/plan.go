package plan

import (
	"iter"
	"slices"

	"enfilade/solver/exact"
)

// Obstacles is everything that stops sight or walking, and the floor. Two plans with the same *Obstacles have the same mesh.
type Obstacles struct {
	floor    Chain
	walls    []Wall
	openings []Opening
	blocks   []Block
	ids      *obstacleIDs
}

// Marks is everything put down on the floor that stops nothing: observers, targets, starts, routes, zones, and the walker.
type Marks struct {
	zones     []Zone
	observers []Observer
	targets   []Target
	starts    []Start
	routes    []Route
	walker    Walker
	ids       *markIDs
}

// Plan is one state of the drawing. It never changes.
type Plan struct {
	obstacles *Obstacles
	marks     *Marks
	sheet     *Sheet
}

// Parts is a plan taken apart, for readers, writers and tests.
type Parts struct {
	Floor     Chain // ring, first point not repeated; empty when the plan gives none
	Walls     []Wall
	Openings  []Opening
	Blocks    []Block
	Zones     []Zone
	Observers []Observer
	Targets   []Target
	Starts    []Start
	Routes    []Route
	Walker    Walker
	Sheet     Sheet
}

// New returns an empty plan.
func New() *Plan { return From(Parts{Walker: DefaultWalker(), Sheet: Sheet{Unit: "m"}}) }

// From puts a plan together; the lists are copied.
func From(p Parts) *Plan {
	sheet := p.Sheet
	return &Plan{
		obstacles: &Obstacles{p.Floor, slices.Clone(p.Walls), slices.Clone(p.Openings), slices.Clone(p.Blocks), new(obstacleIDs)},
		marks: &Marks{slices.Clone(p.Zones), slices.Clone(p.Observers), slices.Clone(p.Targets),
			slices.Clone(p.Starts), slices.Clone(p.Routes), p.Walker, new(markIDs)},
		sheet: &sheet,
	}
}

// Parts takes the plan apart; the lists are copies.
func (p *Plan) Parts() Parts {
	return Parts{
		Floor: p.obstacles.floor, Walls: slices.Clone(p.obstacles.walls),
		Openings: slices.Clone(p.obstacles.openings), Blocks: slices.Clone(p.obstacles.blocks),
		Zones: slices.Clone(p.marks.zones), Observers: slices.Clone(p.marks.observers),
		Targets: slices.Clone(p.marks.targets), Starts: slices.Clone(p.marks.starts),
		Routes: slices.Clone(p.marks.routes), Walker: p.marks.walker, Sheet: *p.sheet,
	}
}

// Obstacles returns the part that stops sight or walking; compare it to learn whether the mesh is still good.
func (p *Plan) Obstacles() *Obstacles { return p.obstacles }

// Marks returns the part that stops nothing.
func (p *Plan) Marks() *Marks { return p.marks }

// Floor returns the floor's ring, empty when the plan gives none.
func (p *Plan) Floor() Chain { return p.obstacles.floor }

// Walls yields the walls in the plan's order.
func (p *Plan) Walls() iter.Seq2[int, Wall] { return slices.All(p.obstacles.walls) }

// Openings yields the openings in the plan's order.
func (p *Plan) Openings() iter.Seq2[int, Opening] { return slices.All(p.obstacles.openings) }

// Blocks yields the blocks in the plan's order.
func (p *Plan) Blocks() iter.Seq2[int, Block] { return slices.All(p.obstacles.blocks) }

// Zones yields the zones in the plan's order.
func (p *Plan) Zones() iter.Seq2[int, Zone] { return slices.All(p.marks.zones) }

// Observers yields the observers in the plan's order.
func (p *Plan) Observers() iter.Seq2[int, Observer] { return slices.All(p.marks.observers) }

// Targets yields the targets in the plan's order.
func (p *Plan) Targets() iter.Seq2[int, Target] { return slices.All(p.marks.targets) }

// Starts yields the starts in the plan's order.
func (p *Plan) Starts() iter.Seq2[int, Start] { return slices.All(p.marks.starts) }

// Routes yields the routes in the plan's order.
func (p *Plan) Routes() iter.Seq2[int, Route] { return slices.All(p.marks.routes) }

// Walker returns the person who walks.
func (p *Plan) Walker() Walker { return p.marks.walker }

// Sheet returns what the plan says about itself.
func (p *Plan) Sheet() Sheet { return *p.sheet }

// Counts of the lists.
func (p *Plan) NumWalls() int     { return len(p.obstacles.walls) }
func (p *Plan) NumOpenings() int  { return len(p.obstacles.openings) }
func (p *Plan) NumBlocks() int    { return len(p.obstacles.blocks) }
func (p *Plan) NumObservers() int { return len(p.marks.observers) }
func (p *Plan) NumTargets() int   { return len(p.marks.targets) }
func (p *Plan) NumStarts() int    { return len(p.marks.starts) }
func (p *Plan) NumRoutes() int    { return len(p.marks.routes) }

// Wall returns the wall with the given id.
func (p *Plan) Wall(id string) (Wall, bool) {
	return pickAt(&p.obstacles.ids.walls, p.obstacles.walls, id)
}

// Observer returns the observer with the given id.
func (p *Plan) Observer(id string) (Observer, bool) {
	return pickAt(&p.marks.ids.observers, p.marks.observers, id)
}

// Target returns the target with the given id.
func (p *Plan) Target(id string) (Target, bool) {
	return pickAt(&p.marks.ids.targets, p.marks.targets, id)
}

// Start returns the start with the given id.
func (p *Plan) Start(id string) (Start, bool) {
	return pickAt(&p.marks.ids.starts, p.marks.starts, id)
}

// Problem is one fault of the drawing: data, not an error.
type Problem struct {
	Kind  ProblemKind
	Items []Ref    // the items at fault, the first one to blame
	At    exact.Pt // where to look
	Text  string   // what is wrong and what would be right, one sentence in lower case without the item's name
}

// ProblemKind sorts problems.
type ProblemKind uint8

// The kinds of problem.
const (
	ProblemInside    ProblemKind = iota + 1 // a mark stands inside a body
	ProblemOutside                          // an item lies outside the floor
	ProblemShape                            // a ring or chain that encloses or spans nothing
	ProblemOpening                          // an opening that does not fit its wall
	ProblemMissing                          // an item names another that is not there
	ProblemLow                              // a low wall without a height
	ProblemMoved                            // a mark less than 1 mm inside a face was moved to the free side
	ProblemTight                            // no room for the walker's body where a walk begins
	ProblemGap                              // a wall ends shortly before another thing
	ProblemDouble                           // walls lie on one another
	ProblemUnreached                        // nobody can walk to a place that sees a target
)
