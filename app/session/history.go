package session

import "enfilade/solver/plan"

// What the history keeps at most: whichever of the two is reached first drops the oldest steps.
const (
	maxSteps = 10_000
	maxBytes = 256 << 20
)

// step is a plan and the label of the edit that made it from the step before.
type step struct {
	label string
	plan  *plan.Plan
	bytes int // of the parts it does not share with the step before
}

// history is a row of plans with one of them current: those before it can be undone to, those after it redone to.
// steps[0] is the oldest plan kept; its label and size count for nothing.
type history struct {
	steps []step
	at    int
	bytes int // sum over steps[1:]
}

func newHistory(p *plan.Plan) history { return history{steps: []step{{plan: p}}} }

func (h *history) plan() *plan.Plan { return h.steps[h.at].plan }

// push makes p the current plan; what had been undone is gone.
func (h *history) push(label string, p *plan.Plan) {
	for _, gone := range h.steps[h.at+1:] {
		h.bytes -= gone.bytes
	}
	clear(h.steps[h.at+1:]) // let go of the plans
	s := step{label, p, plan.Unshared(h.plan(), p)}
	h.steps = append(h.steps[:h.at+1], s)
	h.at++
	h.bytes += s.bytes
	h.trim(maxSteps, maxBytes)
}

// trim drops the oldest steps beyond the limits, but never the last one, so one undo always works. It is called when
// nothing is left to redo.
func (h *history) trim(steps, bytes int) {
	drop := 0
	for n := len(h.steps) - 1; n-drop > 1 && (n-drop > steps || h.bytes > bytes); drop++ {
		h.bytes -= h.steps[drop+1].bytes
	}
	if drop == 0 {
		return
	}
	n := copy(h.steps, h.steps[drop:])
	clear(h.steps[n:])
	h.steps = h.steps[:n]
	h.at -= drop
}

func (h *history) back() bool {
	if h.at == 0 {
		return false
	}
	h.at--
	return true
}

func (h *history) forth() bool {
	if h.at == len(h.steps)-1 {
		return false
	}
	h.at++
	return true
}

func (h *history) undoLabel() (string, bool) {
	if h.at == 0 {
		return "", false
	}
	return h.steps[h.at].label, true
}

func (h *history) redoLabel() (string, bool) {
	if h.at == len(h.steps)-1 {
		return "", false
	}
	return h.steps[h.at+1].label, true
}
