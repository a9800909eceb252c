package tool

import (
	"math"

	"enfilade/solver/exact"
	"enfilade/solver/plan"
)

// relabelled is an edit under another name.
type relabelled struct {
	plan.Edit
	label string
}

// Label returns the other name.
func (r relabelled) Label() string { return r.label }

// adding is an edit that adds an item, under another name.
type adding struct {
	plan.Adder
	label string
}

// Label returns the other name.
func (a adding) Label() string { return a.label }

// Named returns an edit under another label, for where its own says too little.
func Named(label string, e plan.Edit) plan.Edit {
	if a, ok := e.(plan.Adder); ok {
		return adding{a, label}
	}
	return relabelled{e, label}
}

// added returns the item that an edit of the committed plan adds.
func added(h Host, e plan.Edit) (plan.Ref, bool) {
	if a, ok := e.(plan.Adder); ok {
		return a.Added(h.Plan()), true
	}
	return plan.Ref{}, false
}

// doAdd does an edit, selects the item it adds, and returns why it could not be done.
func doAdd(h Host, e plan.Edit) (fault string) {
	ref, ok := added(h, e)
	if err := h.Do(e); err != nil {
		return reason(err)
	}
	if ok {
		h.Select(ref)
	}
	return ""
}

// polar returns the vector of a direction in degrees and a length, rounded to the grid.
func polar(deg, r float64) exact.Vec {
	sin, cos := math.Sincos(deg * math.Pi / 180)
	return exact.Vec{X: int32(math.Round(r * cos)), Y: int32(math.Round(r * sin))}
}
