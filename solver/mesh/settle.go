package mesh

// settle gives back what only changes of the mesh ask for and what can be made again from the triangles as queries read them:
// a quarter of the memory, and most of it while the rest is still to be made. O(n).
func (m *Mesh) settle() {
	m.con = make([][3]int32, len(m.raw.tris))
	for t := range m.con {
		m.con[t] = m.raw.tris[t].c
	}
	m.raw.tris, m.raw.out = nil, nil
	m.raw.work, m.raw.free, m.raw.log = nil, nil, nil
}

// unsettle makes again what settle gave back. O(n) the first time, nothing from then on.
func (m *Mesh) unsettle() {
	if m.con == nil {
		return
	}
	tr := m.raw
	tr.tris = make([]rawTri, len(m.con), len(m.con)+len(m.con)/8)
	for t := range tr.tris {
		q := &m.Tris[t]
		tr.tris[t] = rawTri{q.V, q.N, m.con[t]}
	}
	m.con = nil
}

// Fix gives back what only changes of the mesh ask for: from then on no Editor can be made of it.
func (m *Mesh) Fix() { m.tags = nil }
