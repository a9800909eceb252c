package tool_test

import (
	"strings"
	"testing"

	"enfilade/canvas/tool"
	"enfilade/solver/exact"
	"enfilade/solver/plan"
)

// TestNudgesAreNaturalInThePlansUnit: whole centimetres where people measure in metres, halves of an inch where in feet.
func TestNudgesAreNaturalInThePlansUnit(t *testing.T) {
	for _, c := range []struct {
		feet bool
		key  tool.Key
		says string
		by   int32
	}{
		{false, tool.Key{}, "0.1 m", 1000},
		{false, tool.Key{Shift: true}, "0.1 m", 10000},
		{false, tool.Key{Ctrl: true}, "0.1 m", 100},
		{true, tool.Key{}, "1 in", 254},
		{true, tool.Key{Shift: true}, "1 in", 3048},
		{true, tool.Key{Ctrl: true}, "1 in", 127},
	} {
		h := newHost(t, plan.Parts{Blocks: []plan.Block{{ID: "B1", Ring: plan.ChainOf(m(0, 0), m(1, 0), m(1, 1), m(0, 1)), Height: plan.Ceiling}}})
		h.snapper.Feet = c.feet
		h.Select(ref(plan.KindBlock, "B1"))
		s := &tool.Select{}
		for _, d := range []struct {
			name tool.KeyName
			way  exact.Vec
		}{{tool.KeyRight, exact.Vec{X: 1}}, {tool.KeyUp, exact.Vec{Y: 1}}, {tool.KeyLeft, exact.Vec{X: -1}}, {tool.KeyDown, exact.Vec{Y: -1}}} {
			was, _ := h.plan.Block("B1")
			k := c.key
			k.Name = d.name
			s.Key(h, k)
			now, _ := h.plan.Block("B1")
			if got, want := now.Ring.At(0).Sub(was.Ring.At(0)), (exact.Vec{X: d.way.X * c.by, Y: d.way.Y * c.by}); got != want {
				t.Errorf("in feet %v: %s by %v, want %v", c.feet, d.name, got, want)
			}
		}
		if got := s.Hint(h); !strings.Contains(got, "arrows nudge by "+c.says) {
			t.Errorf("in feet %v the hint is %q", c.feet, got)
		}
	}
}
