package walk

// Gaps returns how many gaps there are.
func (w *Widths) Gaps() int { return len(w.gaps) }

// Steps returns how many steps it took to find the gaps.
func (w *Widths) Steps() int64 { return w.steps }

// LimitSteps sets how many steps the search for gaps may take, and returns what takes the limit back.
func LimitSteps(n int64) (restore func()) {
	per, few := stepsPerTri, fewSteps
	stepsPerTri, fewSteps = 0, n
	return func() { stepsPerTri, fewSteps = per, few }
}
