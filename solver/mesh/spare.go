package mesh

// Spare gives back the memory of what only sight, shortest walks and changes of the mesh need. What is left answers Locate,
// Twin, Ends and Around, and Tris may be read: a third of the memory.
func (m *Mesh) Spare() {
	m.tags, m.con, m.turn.at, m.turn.places, m.turn.sectors = nil, nil, nil, nil, nil
	m.raw = &Triangulation{Pts: m.raw.Pts, box: m.raw.box}
}
