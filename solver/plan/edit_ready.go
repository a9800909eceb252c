package plan

// Maker is an edit that adds items.
type Maker interface {
	Edit
	// Added names the items that applying the edit to p would add.
	Added(p *Plan) []Ref
}

// Ready is an edit that has been applied to a plan already, on whichever goroutine: applying it to that plan costs nothing.
type Ready struct {
	Maker
	from, to *Plan
	added    []Ref
	err      error
}

// Prepare applies an edit to a plan.
func Prepare(e Maker, p *Plan) *Ready {
	r := &Ready{Maker: e, from: p, added: e.Added(p)}
	r.to, r.err = e.Apply(p)
	return r
}

// Apply returns what was made before of the plan the edit was prepared for; any other plan it is applied to now.
func (r *Ready) Apply(p *Plan) (*Plan, error) {
	if p == r.from {
		return r.to, r.err
	}
	return r.Maker.Apply(p)
}

// Added names the items that applying the edit to p would add.
func (r *Ready) Added(p *Plan) []Ref {
	if p == r.from {
		return r.added
	}
	return r.Maker.Added(p)
}
