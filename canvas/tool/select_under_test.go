package tool_test

import (
	"slices"
	"testing"

	"enfilade/canvas/tool"
	"enfilade/solver/plan"
)

func TestAClickWhereNothingElseLiesPicksTheUnderlay(t *testing.T) {
	h, _ := traced(t, nil)
	if err := h.Do(plan.AddWall{Wall: plan.Wall{Line: plan.ChainOf(m(1, 1), m(3, 1)), Thickness: 2000, Height: plan.Ceiling}}); err != nil {
		t.Fatal(err)
	}
	wall, under := ref(plan.KindWall, "W1"), plan.Ref{Kind: plan.KindUnderlay}
	s := &tool.Select{}
	picked := func(what string, want ...plan.Ref) {
		t.Helper()
		if !slices.Equal(h.selected, want) {
			t.Errorf("%s: selected %v, want %v", what, h.selected, want)
		}
	}
	h.move(s, 2, 2)
	if got := s.Hint(h); got != "click to pick the underlay, or drag a box around items" {
		t.Errorf("over the picture the hint is %q", got)
	}
	h.click(s, 2, 2)
	picked("a click on the picture", under)
	if got := s.Hint(h); got != "drag to move the underlay, arrows nudge by 0.1 m; click again to let go of it" {
		t.Errorf("over the picked picture the hint is %q", got)
	}
	h.click(s, 2, 1)
	picked("a click on the wall over it", wall)
	h.click(s, 2, 2)
	h.click(s, 9, 9)
	picked("a click beside the picture")
	h.drag(s, 0.5, 0.5, 3.5, 2)
	picked("a box over the picture", wall)
	h.click(s, 2, 2)
	h.drag(s, 2, 2, 2.513, 2)
	if got := h.underlay().At; got != m(0.513, 0) {
		t.Errorf("dragged it lies at %v", got)
	}
	h.key(s, tool.KeyUp)
	if got := h.underlay().At; got != m(0.513, 0.1) {
		t.Errorf("nudged it lies at %v", got)
	}
	h.steps("draw wall", "move underlay", "move underlay")
	h.click(s, 2, 2)
	picked("a second click on it")
}

func TestALockedOrHiddenUnderlayIsNotPicked(t *testing.T) {
	for name, change := range map[string]func(*plan.Underlay){
		"locked": func(u *plan.Underlay) { u.Locked = true },
		"hidden": func(u *plan.Underlay) { u.Hidden = true },
	} {
		h, _ := traced(t, change)
		s := &tool.Select{}
		h.click(s, 2, 2)
		if len(h.selected) != 0 {
			t.Errorf("%s it is picked", name)
		}
		h.drag(s, 2, 2, 3, 3)
		h.steps()
	}
}
