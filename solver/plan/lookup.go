package plan

// Opening returns the opening with the given id.
func (p *Plan) Opening(id string) (Opening, bool) {
	return find(p.obstacles.openings, func(o Opening) bool { return o.ID == id })
}

// Block returns the block with the given id.
func (p *Plan) Block(id string) (Block, bool) {
	return find(p.obstacles.blocks, func(b Block) bool { return b.ID == id })
}

// Zone returns the zone with the given id.
func (p *Plan) Zone(id string) (Zone, bool) {
	return find(p.marks.zones, func(z Zone) bool { return z.ID == id })
}

// Route returns the route with the given id.
func (p *Plan) Route(id string) (Route, bool) {
	return find(p.marks.routes, func(r Route) bool { return r.ID == id })
}
