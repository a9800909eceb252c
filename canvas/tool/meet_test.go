package tool_test

import (
	"strings"
	"testing"

	"enfilade/canvas/tool"
	"enfilade/solver/plan"
)

// crossing is a plan of a level wall W1 from -4 to 4 m, an upright one W2 through it at x = 3, and W3 upright at x = 6.
func crossing(t *testing.T) *host {
	wall := func(id string, ax, ay, bx, by float64) plan.Wall {
		return plan.Wall{ID: id, Line: plan.ChainOf(m(ax, ay), m(bx, by)), Height: plan.Ceiling, Thickness: 2000}
	}
	return newHost(t, plan.Parts{Walls: []plan.Wall{wall("W1", -4, 0, 4, 0), wall("W2", 3, -5, 3, 5), wall("W3", 6, -5, 6, 5)}})
}

func wallRef(id string) plan.Ref { return plan.Ref{Kind: plan.KindWall, ID: id} }

// line is a wall's line in whole and half metres.
func (h *host) line(id string) plan.Chain {
	h.t.Helper()
	w, ok := h.shown.Wall(id)
	if !ok {
		h.t.Fatalf("no wall %s", id)
	}
	return w.Line
}

func (h *host) wantLine(id string, xy ...float64) {
	h.t.Helper()
	c := h.line(id)
	for i := range c.Len() {
		if 2*i+1 >= len(xy) || c.At(i) != m(xy[2*i], xy[2*i+1]) {
			h.t.Fatalf("wall %s runs %v, want %v", id, c, xy)
		}
	}
	if c.Len() != len(xy)/2 {
		h.t.Fatalf("wall %s runs %v, want %v", id, c, xy)
	}
}

func TestCutBackTo(t *testing.T) {
	h, cut := crossing(t), &tool.Meet{}
	h.move(cut, 3, 4)
	if f := cut.Sketch(h).Fault; !strings.Contains(f, "select a wall first") {
		t.Errorf("nothing selected: %q", f)
	}
	h.Select(wallRef("W1"))
	h.move(cut, 3, 4)
	h.wantLine("W1", -4, 0, 3, 0)
	if s := cut.Sketch(h); s.Hover != wallRef("W2") || h.plan != h.shown && len(s.Dragged) != 1 {
		t.Errorf("sketch %+v", s)
	}
	e := h.at(3, 4)
	e.Shift = true
	cut.Move(h, e)
	h.wantLine("W1", 3, 0, 4, 0)
	h.move(cut, 0, 4)
	h.wantLine("W1", -4, 0, 4, 0)
	h.move(cut, 6, 4)
	if f := cut.Sketch(h).Fault; !strings.Contains(f, "does not cross wall W3") {
		t.Errorf("a wall it does not cross: %q", f)
	}
	h.click(cut, 3, 4)
	if !cut.Done() || len(h.done) != 1 || h.done[0] != "cut back wall" {
		t.Errorf("done %v, %v", cut.Done(), h.done)
	}
	h.wantLine("W1", -4, 0, 3, 0)
}

func TestLengthenTo(t *testing.T) {
	h, tl := crossing(t), &tool.Meet{Lengthen: true}
	h.Select(wallRef("W1"))
	h.click(tl, 6, 4)
	h.wantLine("W1", -4, 0, 6, 0)
	if !tl.Done() || h.done[0] != "lengthen wall" {
		t.Errorf("done %v, %v", tl.Done(), h.done)
	}
}

func TestMeetManyWalls(t *testing.T) {
	h, cut := crossing(t), &tool.Meet{}
	h.Select(wallRef("W1"), wallRef("W2"), wallRef("W3"))
	h.click(cut, 3, 4)
	h.wantLine("W1", -4, 0, 3, 0)
	h.wantLine("W3", 6, -5, 6, 5)
}

func TestSplitTool(t *testing.T) {
	h, s := crossing(t), &tool.Split{}
	h.move(s, 0, 3)
	if k := s.Sketch(h); k.Snap != nil {
		t.Errorf("over no wall: %+v", k)
	}
	h.move(s, 1, 0.02)
	if k := s.Sketch(h); k.Label != "5.00 m" || k.Snap.At != m(1, 0) {
		t.Errorf("label %q at %+v", k.Label, k.Snap)
	}
	h.click(s, 1, 0.02)
	h.wantLine("W1", -4, 0, 1, 0)
	h.wantLine("W4", 1, 0, 4, 0)
	if !s.Done() || h.done[0] != "split wall" || h.selected[0] != wallRef("W4") {
		t.Errorf("done %v %v, selected %v", s.Done(), h.done, h.selected)
	}
}

func TestBesideTool(t *testing.T) {
	h, b := crossing(t), &tool.Beside{}
	h.click(b, -2, 0)
	if h.selected[0] != wallRef("W1") || len(h.done) > 0 {
		t.Fatalf("the first click chooses the wall: %v, %v", h.selected, h.done)
	}
	h.move(b, -2, -1.5)
	h.wantLine("W4", -4, -1.5, 4, -1.5)
	for _, r := range "0.8" {
		b.Key(h, tool.Key{Name: tool.KeyRune, Rune: r})
	}
	h.wantLine("W4", -4, -0.8, 4, -0.8)
	if s := b.Sketch(h); len(s.Fields) != 1 || s.Fields[0] != (tool.Field{Label: "distance", Text: "0.8", Live: "0.80 m", Here: true}) {
		t.Errorf("sketch %+v", s)
	}
	b.Key(h, tool.Key{Name: tool.KeyEnter})
	if h.done[0] != "parallel wall" {
		t.Fatal(h.done)
	}
	h.click(b, 0, -2.8) // the next one is parallel to the one just drawn
	h.wantLine("W5", -4, -2.8, 4, -2.8)
	b.Stop(h)
	if h.plan != h.shown {
		t.Error("a preview is left behind")
	}
}
