package plantest

import (
	"math"

	"enfilade/solver/exact"
	"enfilade/solver/plan"
)

// Office returns an office floor of exactly the given number of walls (at least 20): rooms on both sides of corridors,
// corridors ending on cross passages, walls of several thicknesses and thin ones, doors open, shut and glazed, a few
// columns, and furniture. Time and size grow linearly with walls.
func Office(seed uint64, walls int) *plan.Plan {
	o := &office{maker: newMaker(seed, 1)}
	o.layOut(walls)
	for row := range o.rows {
		o.addRow(row)
	}
	o.addOuter()
	for len(o.Walls) < walls {
		o.furnish()
	}
	for range len(o.rooms) / 12 {
		o.column()
	}
	o.putMarks(o.place)
	return plan.From(o.Parts)
}

// room is the free box of one room, corridor door at the end y0 or y1.
type room struct {
	x0, x1, y0, y1 int32
	doorUp         bool // the corridor lies above
}

// office lays out rows of building blocks; a block is a corridor with rooms below and above it.
type office struct {
	*maker
	rows, columns int // blocks up and across
	perRow        int // rooms on each side of a block's corridor
	width, height int32
	rooms         []room
	halls         []room // corridors
}

// layOut chooses how many blocks of how many rooms the walls suffice for, about a fifth left for furniture.
//
// A block of r rooms on each side has 4r + 2 walls, and one more at its back; the outer walls are four.
func (o *office) layOut(walls int) {
	structural := walls*4/5 - 4
	o.perRow = min(7, max(1, (structural-3)/4))
	blocks := max(1, structural/(4*o.perRow+3))
	wide := float64(o.perRow)*4 + passage/metre
	o.rows = max(1, int(math.Round(math.Sqrt(float64(blocks)*wide/14))))
	for o.rows > 1 && blocks/o.rows == 0 {
		o.rows--
	}
	o.columns = max(1, blocks/o.rows)
	o.width = passage + int32(o.columns)*(int32(o.perRow)*roomPitch+passage)
	o.height = int32(o.rows) * rowPitch
}

// The pitches of the layout: a cross passage is 2.4 m, a room takes 4 m of its row, and a row of blocks is 14 m deep with
// its corridor in the middle.
const (
	passage   = 24 * metre / 10
	roomPitch = 4 * metre
	rowPitch  = 14 * metre
)

func (o *office) addOuter() {
	a, b, c, d := pt(0, 0), pt(o.width, 0), pt(o.width, o.height), pt(0, o.height)
	half := int32(metre * 3 / 20)
	o.Floor = plan.ChainOf(pt(-half, -half), pt(o.width+half, -half), pt(o.width+half, o.height+half), pt(-half, o.height+half))
	for _, side := range [][2]exact.Pt{{a, b}, {b, c}, {c, d}, {d, a}} {
		o.wall(plan.Solid, 2*half, plan.Ceiling, side[0], side[1])
	}
}

func (o *office) addRow(row int) {
	low := int32(row) * rowPitch
	middle := low + rowPitch/2
	for column := range o.columns {
		x0 := passage + int32(column)*(int32(o.perRow)*roomPitch+passage)
		x1 := x0 + int32(o.perRow)*roomPitch
		half := o.between(0.8, 1.2)
		o.addRooms(x0, low, middle-half, true)
		o.addRooms(x0, middle+half, low+rowPitch, false)
		if row > 0 {
			o.wall(plan.Solid, o.thickness(), plan.Ceiling, pt(x0, low), pt(x1, low))
		}
		o.halls = append(o.halls, room{x0: x0, x1: x1, y0: middle - half, y1: middle + half})
	}
}

// addRooms adds one side of a corridor: partitions, and for each room its corridor wall with a door.
func (o *office) addRooms(x0, y0, y1 int32, doorUp bool) {
	front, back := y1, y0
	if !doorUp {
		front, back = y0, y1
	}
	thick := o.thickness()
	at := x0
	o.wall(plan.Solid, o.thickness(), plan.Ceiling, pt(at, front), pt(at, back))
	for i := range o.perRow {
		next := x0 + int32(i+1)*roomPitch
		slant := int32(0)
		if i+1 < o.perRow {
			next += o.between(-0.9, 0.9)
			if o.chance(0.2) {
				slant = o.between(-0.3, 0.3)
			}
		}
		o.corridorWall(at, next, front, thick)
		o.wall(plan.Solid, o.thickness(), plan.Ceiling, pt(next, front), pt(next+slant, back))
		o.rooms = append(o.rooms, room{at, next, y0, y1, doorUp})
		at = next
	}
}

// corridorWall adds a room's wall to the corridor: solid or glazing, with one door.
func (o *office) corridorWall(x0, x1, y, thick int32) {
	width := o.between(0.8, 1.0)
	at := o.between(0.3, float64(x1-x0)/metre-1.35)
	if o.chance(0.15) { // a glazed front, the door a gap in it
		o.wall(plan.Glazing, 0, plan.Ceiling, pt(x0, y), pt(x0+at, y))
		o.wall(plan.Solid, thick, plan.Ceiling, pt(x0+at+width, y), pt(x1, y))
		return
	}
	id := o.wall(plan.Solid, thick, plan.Ceiling, pt(x0, y), pt(x1, y))
	d := plan.Opening{Wall: id, At: at, Width: width, Leaf: plan.SolidLeaf}
	switch o.IntN(10) {
	case 0, 1:
		d.Shut = true
	case 2:
		d.Leaf, d.Shut = plan.GlazedLeaf, true
	case 3:
		d.Leaf = plan.NoLeaf
	}
	o.door(d)
}

func (o *office) thickness() int32 {
	return [...]int32{0, 0, metre / 10, 12 * metre / 100, 24 * metre / 100}[o.IntN(5)]
}

// furnish adds one wall in the back half of a room: a partition, a counter, a curtain or a glass screen.
func (o *office) furnish() {
	r := o.rooms[o.IntN(len(o.rooms))]
	w, h := float64(r.x1-r.x0)/metre, float64(r.y1-r.y0)/metre
	a := pt(r.x0+o.between(0.6, w-0.6), r.y0+o.between(0.4, h/2-0.3))
	b := pt(r.x0+o.between(0.6, w-0.6), a.Y)
	if o.chance(0.4) {
		b = pt(a.X, r.y0+o.between(0.4, h/2-0.3))
	}
	if o.chance(0.3) {
		b = pt(r.x0+o.between(0.6, w-0.6), r.y0+o.between(0.4, h/2-0.3))
	}
	if !r.doorUp { // the door is below, so the back half lies above
		a.Y, b.Y = r.y0+r.y1-a.Y, r.y0+r.y1-b.Y
	}
	if a == b {
		b.X += metre / 4
	}
	switch o.IntN(6) {
	case 0:
		o.wall(plan.Low, 0, o.lowHeight(), a, b)
	case 1:
		o.wall(plan.Screen, 0, plan.Ceiling, a, b)
	case 2:
		o.wall(plan.Glazing, 0, plan.Ceiling, a, b)
	case 3:
		o.wall(plan.Solid, metre/10, plan.Ceiling, a, b)
	default:
		o.wall(plan.Solid, 0, plan.Ceiling, a, b)
	}
}

// column adds a column or a low case in the back half of a room.
func (o *office) column() {
	r := o.rooms[o.IntN(len(o.rooms))]
	x := r.x0 + o.between(0.6, float64(r.x1-r.x0)/metre-1.2)
	y := r.y0 + o.between(0.4, float64(r.y1-r.y0)/metre/2-0.9)
	if !r.doorUp {
		y = r.y0 + r.y1 - y - metre/2
	}
	height := plan.Ceiling
	if o.chance(0.5) {
		height = o.lowHeight()
	}
	side := o.between(0.2, 0.5)
	o.block(height, pt(x, y), pt(x+side, y), pt(x+side, y+side), pt(x, y+side))
}

// place draws a place in a corridor or in the front half of a room, clear of walls and furniture.
func (o *office) place() exact.Pt {
	if o.chance(0.3) {
		h := o.halls[o.IntN(len(o.halls))]
		return pt(h.x0+o.between(0, float64(h.x1-h.x0)/metre), (h.y0+h.y1)/2+o.between(-0.5, 0.5))
	}
	r := o.rooms[o.IntN(len(o.rooms))]
	h := float64(r.y1-r.y0) / metre
	y := r.y0 + o.between(h/2+0.2, h-0.3)
	if !r.doorUp {
		y = r.y0 + r.y1 - y
	}
	return pt(r.x0+o.between(0.6, float64(r.x1-r.x0)/metre-0.6), y)
}
