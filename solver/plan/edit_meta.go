package plan

// Mark locks, frees, hides or shows items. What is locked is not moved, changed or deleted by hand; what is hidden is left out
// of the picture, never out of the study.
type Mark struct {
	Items          []Ref
	Locked, Hidden *bool // nil leaves it as it is
}

// Label says what the edit does.
func (e Mark) Label() string {
	switch {
	case e.Locked != nil && *e.Locked:
		return labelled("lock", e.Items)
	case e.Locked != nil:
		return labelled("unlock", e.Items)
	case e.Hidden != nil && *e.Hidden:
		return labelled("hide", e.Items)
	}
	return labelled("show", e.Items)
}

// Apply marks all items or none. The floor, the walker and the plan itself cannot be marked.
func (e Mark) Apply(p *Plan) (*Plan, error) {
	v := mover{draft: draftOf(p), moving: p.pick(e.Items)}
	for _, r := range e.Items {
		if !r.Kind.moves() || r.Kind == KindFloor {
			return nil, fault(r.Kind, r.ID, "cannot be locked or hidden")
		}
	}
	if i := v.moving.lost; i >= 0 {
		return nil, missing(e.Items[i].Kind, e.Items[i].ID)
	}
	m := marker{&v, e, [2]bool{}}
	o, k := *p.obstacles, *p.marks
	o.walls = marked(&m, 0, KindWall, o.walls, func(w *Wall) *Meta { return &w.Meta })
	o.openings = marked(&m, 0, KindOpening, o.openings, func(o *Opening) *Meta { return &o.Meta })
	o.blocks = marked(&m, 0, KindBlock, o.blocks, func(b *Block) *Meta { return &b.Meta })
	k.zones = marked(&m, 1, KindZone, k.zones, func(z *Zone) *Meta { return &z.Meta })
	k.observers = marked(&m, 1, KindObserver, k.observers, func(o *Observer) *Meta { return &o.Meta })
	k.targets = marked(&m, 1, KindTarget, k.targets, func(t *Target) *Meta { return &t.Meta })
	k.starts = marked(&m, 1, KindStart, k.starts, func(s *Start) *Meta { return &s.Meta })
	k.routes = marked(&m, 1, KindRoute, k.routes, func(r *Route) *Meta { return &r.Meta })
	if m.touched[0] {
		*v.draft.obstacles() = o
	}
	if m.touched[1] {
		*v.draft.marks() = k
	}
	if u := p.sheet.Underlay; u != nil && v.moving.some(KindUnderlay) {
		now := *u
		e.put(&now.Meta)
		v.draft.sheet().Underlay = &now
	}
	return v.draft.plan(), nil
}

func (e Mark) put(m *Meta) {
	if e.Locked != nil {
		m.Locked = *e.Locked
	}
	if e.Hidden != nil {
		m.Hidden = *e.Hidden
	}
}

type marker struct {
	*mover
	edit    Mark
	touched [2]bool // the obstacles, the marks
}

func marked[T any, P identified[T]](m *marker, part int, kind Kind, l list[T], meta func(P) *Meta) list[T] {
	now, some, _ := moved(m.mover, kind, l, func(it P) error {
		m.edit.put(meta(it))
		return nil
	})
	m.touched[part] = m.touched[part] || some
	return now
}

// Meta returns what an item carries besides its own fields; ok is false for what is not in the plan or carries nothing.
func (p *Plan) Meta(r Ref) (m Meta, ok bool) {
	switch r.Kind {
	case KindWall:
		return metaOf(&p.obstacles.walls, r.ID, func(w *Wall) Meta { return w.Meta })
	case KindOpening:
		return metaOf(&p.obstacles.openings, r.ID, func(o *Opening) Meta { return o.Meta })
	case KindBlock:
		return metaOf(&p.obstacles.blocks, r.ID, func(b *Block) Meta { return b.Meta })
	case KindZone:
		return metaOf(&p.marks.zones, r.ID, func(z *Zone) Meta { return z.Meta })
	case KindObserver:
		return metaOf(&p.marks.observers, r.ID, func(o *Observer) Meta { return o.Meta })
	case KindTarget:
		return metaOf(&p.marks.targets, r.ID, func(t *Target) Meta { return t.Meta })
	case KindStart:
		return metaOf(&p.marks.starts, r.ID, func(s *Start) Meta { return s.Meta })
	case KindRoute:
		return metaOf(&p.marks.routes, r.ID, func(t *Route) Meta { return t.Meta })
	case KindUnderlay:
		if p.sheet.Underlay != nil {
			return p.sheet.Underlay.Meta, true
		}
	}
	return Meta{}, false
}

func metaOf[T any, P identified[T]](l *list[T], id string, meta func(P) Meta) (Meta, bool) {
	if i := at[T, P](l, id); i >= 0 {
		return meta(l.at(i)), true
	}
	return Meta{}, false
}
