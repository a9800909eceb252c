package plan

// Opening returns the opening with the given id.
func (p *Plan) Opening(id string) (Opening, bool) {
	return pickAt(&p.obstacles.openings, id)
}

// Block returns the block with the given id.
func (p *Plan) Block(id string) (Block, bool) {
	return pickAt(&p.obstacles.blocks, id)
}

// Zone returns the zone with the given id.
func (p *Plan) Zone(id string) (Zone, bool) {
	return pickAt(&p.marks.zones, id)
}

// Route returns the route with the given id.
func (p *Plan) Route(id string) (Route, bool) {
	return pickAt(&p.marks.routes, id)
}
