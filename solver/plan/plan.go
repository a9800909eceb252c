package plan

import (
	"iter"

	"enfilade/solver/exact"
)

// Obstacles is everything that stops sight or walking, and the floor. Two plans with the same *Obstacles have the same mesh.
type Obstacles struct {
	floor    Chain
	walls    list[Wall]
	openings list[Opening]
	blocks   list[Block]
}

// Marks is everything put down on the floor that stops nothing: observers, targets, starts, routes, zones, and the walker.
type Marks struct {
	zones     list[Zone]
	observers list[Observer]
	targets   list[Target]
	starts    list[Start]
	routes    list[Route]
	walker    Walker
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
		obstacles: &Obstacles{p.Floor, listOf(p.Walls), listOf(p.Openings), listOf(p.Blocks)},
		marks:     &Marks{listOf(p.Zones), listOf(p.Observers), listOf(p.Targets), listOf(p.Starts), listOf(p.Routes), p.Walker},
		sheet:     &sheet,
	}
}

// Parts takes the plan apart; the lists are copies.
func (p *Plan) Parts() Parts {
	return Parts{
		Floor: p.obstacles.floor, Walls: p.obstacles.walls.slice(),
		Openings: p.obstacles.openings.slice(), Blocks: p.obstacles.blocks.slice(),
		Zones: p.marks.zones.slice(), Observers: p.marks.observers.slice(),
		Targets: p.marks.targets.slice(), Starts: p.marks.starts.slice(),
		Routes: p.marks.routes.slice(), Walker: p.marks.walker, Sheet: *p.sheet,
	}
}

// Obstacles returns the part that stops sight or walking; compare it to learn whether the mesh is still good.
func (p *Plan) Obstacles() *Obstacles { return p.obstacles }

// Marks returns the part that stops nothing.
func (p *Plan) Marks() *Marks { return p.marks }

// Floor returns the floor's ring, empty when the plan gives none.
func (p *Plan) Floor() Chain { return p.obstacles.floor }

// Walls yields the walls in the plan's order.
func (p *Plan) Walls() iter.Seq2[int, Wall] { return p.obstacles.walls.all() }

// Openings yields the openings in the plan's order.
func (p *Plan) Openings() iter.Seq2[int, Opening] { return p.obstacles.openings.all() }

// Blocks yields the blocks in the plan's order.
func (p *Plan) Blocks() iter.Seq2[int, Block] { return p.obstacles.blocks.all() }

// Zones yields the zones in the plan's order.
func (p *Plan) Zones() iter.Seq2[int, Zone] { return p.marks.zones.all() }

// Observers yields the observers in the plan's order.
func (p *Plan) Observers() iter.Seq2[int, Observer] { return p.marks.observers.all() }

// Targets yields the targets in the plan's order.
func (p *Plan) Targets() iter.Seq2[int, Target] { return p.marks.targets.all() }

// Starts yields the starts in the plan's order.
func (p *Plan) Starts() iter.Seq2[int, Start] { return p.marks.starts.all() }

// Routes yields the routes in the plan's order.
func (p *Plan) Routes() iter.Seq2[int, Route] { return p.marks.routes.all() }

// Walker returns the person who walks.
func (p *Plan) Walker() Walker { return p.marks.walker }

// Sheet returns what the plan says about itself.
func (p *Plan) Sheet() Sheet { return *p.sheet }

// Counts of the lists.
func (p *Plan) NumWalls() int     { return p.obstacles.walls.n }
func (p *Plan) NumOpenings() int  { return p.obstacles.openings.n }
func (p *Plan) NumBlocks() int    { return p.obstacles.blocks.n }
func (p *Plan) NumObservers() int { return p.marks.observers.n }
func (p *Plan) NumTargets() int   { return p.marks.targets.n }
func (p *Plan) NumStarts() int    { return p.marks.starts.n }
func (p *Plan) NumRoutes() int    { return p.marks.routes.n }

// Wall returns the wall with the given id.
func (p *Plan) Wall(id string) (Wall, bool) {
	return pickAt(&p.obstacles.walls, id)
}

// Observer returns the observer with the given id.
func (p *Plan) Observer(id string) (Observer, bool) {
	return pickAt(&p.marks.observers, id)
}

// Target returns the target with the given id.
func (p *Plan) Target(id string) (Target, bool) {
	return pickAt(&p.marks.targets, id)
}

// Start returns the start with the given id.
func (p *Plan) Start(id string) (Start, bool) {
	return pickAt(&p.marks.starts, id)
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
	ProblemClosed                           // nobody can walk a leg of a route
)
