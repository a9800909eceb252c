package session

import (
	"strconv"
	"testing"

	"enfilade/solver/plan"
)

func TestHistoryDropsOldestSteps(t *testing.T) {
	h := newHistory(plan.New())
	var plans []*plan.Plan
	for i := range maxSteps + 5 {
		p := plan.New()
		plans = append(plans, p)
		h.push(strconv.Itoa(i), p)
	}
	if len(h.steps) != maxSteps+1 || h.plan() != plans[len(plans)-1] {
		t.Fatalf("%d plans kept, want %d and the newest current", len(h.steps), maxSteps+1)
	}
	n := 0
	for h.back() {
		n++
	}
	if n != maxSteps || h.plan() != plans[4] {
		t.Errorf("%d undos, want %d ending at the fifth plan pushed", n, maxSteps)
	}
}

func TestHistoryDropsByBytes(t *testing.T) {
	h := newHistory(plan.New())
	big := plan.Parts{Walls: make([]plan.Wall, 1000)}
	for range 20 {
		h.push("grow", plan.From(big))
	}
	each := h.bytes / 20
	h.trim(maxSteps, 7*each)
	if len(h.steps) != 8 || h.at != 7 || h.bytes != 7*each {
		t.Errorf("%d plans, at %d, %d bytes; want 8, 7, %d", len(h.steps), h.at, h.bytes, 7*each)
	}
	h.trim(maxSteps, 1)
	if !h.back() || h.back() {
		t.Error("one undo, and only one, must survive the smallest limit")
	}
}

func TestHistoryCountsBytesOfUndoneStepsOut(t *testing.T) {
	h := newHistory(plan.New())
	for range 5 {
		h.push("a", plan.From(plan.Parts{Walls: make([]plan.Wall, 10)}))
	}
	one := h.bytes / 5
	h.back()
	h.back()
	h.push("b", plan.From(plan.Parts{Walls: make([]plan.Wall, 10)}))
	if h.bytes != 4*one {
		t.Errorf("%d bytes, want %d", h.bytes, 4*one)
	}
}
