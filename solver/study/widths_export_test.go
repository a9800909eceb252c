package study

// GiveUpWidths makes the solver take the gaps of the plan it has at hand for too crowded.
func (s *Solver) GiveUpWidths() { s.scene.gaps, s.scene.crowded = nil, true }
