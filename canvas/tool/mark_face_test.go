package tool_test

import (
	"math"
	"slices"
	"strings"
	"testing"

	"enfilade/canvas/tool"
	"enfilade/solver/exact"
	"enfilade/solver/plan"
)

// oneWall is a level wall along the x axis, 0.2 m thick, and an upright one along x = 6.
func oneWall(t *testing.T) *host {
	return newHost(t, plan.Parts{Walls: []plan.Wall{
		{ID: "W1", Line: plan.ChainOf(m(-4, 0), m(4, 0)), Thickness: 2000},
		{ID: "W2", Line: plan.ChainOf(m(6, -4), m(6, 4)), Thickness: 2000}}})
}

func TestAMarkSaysOnWhichFaceItHangs(t *testing.T) {
	for name, c := range map[string]struct {
		x, y   float64
		keys   string
		atX    float64
		atY    float64
		normal float64
		hint   string
	}{
		"above the wall":            {1, 0.15, "", 1, 0.1, 90, "click to hang the target on the wall's upper face; J: its lower"},
		"within it, below the line": {1, -0.05, "", 1, -0.1, -90, "click to hang the target on the wall's lower face; J: its upper"},
		"in the middle":             {1, 0, "", 1, 0.1, 90, "the wall's middle: click to hang the target on its upper face, J: its lower"},
		"in an upright one":         {6, 1, "", 5.9, 1, 180, "the wall's middle: click to hang the target on its left face, J: its right"},
		"the other by J":            {1, 0.15, "j", 1, -0.1, -90, "click to hang the target on the wall's lower face; J: its upper"},
		"and back by J":             {1, 0.15, "jj", 1, 0.1, 90, "click to hang the target on the wall's upper face; J: its lower"},
		"from the middle by J":      {1, 0, "j", 1, -0.1, -90, "click to hang the target on the wall's lower face; J: its upper"},
	} {
		h := oneWall(t)
		tg := &tool.Mark{Kind: plan.KindTarget}
		h.move(tg, c.x, c.y)
		h.typed(tg, c.keys)
		if got := tg.Hint(h); got != c.hint {
			t.Errorf("%s: the hint is %q, want %q", name, got, c.hint)
		}
		if q, ok := h.shown.Target("T1"); !ok || q.At != m(c.atX, c.atY) || q.Normal == nil || *q.Normal != c.normal {
			t.Errorf("%s: the preview is %+v", name, q)
		}
		h.click(tg, c.x, c.y)
		if q, _ := h.plan.Target("T1"); q.At != m(c.atX, c.atY) || q.Normal == nil || *q.Normal != c.normal {
			t.Errorf("%s: the target is %+v", name, q)
		}
	}
}

func TestTheFaceThatJAskedForStaysWhileItsWallIsNear(t *testing.T) {
	h := oneWall(t)
	s := &tool.Mark{Kind: plan.KindStart}
	h.move(s, 1, 0.15)
	h.typed(s, "J")
	for _, y := range []float64{0.15, 0.02, -0.02, -0.15} {
		h.move(s, 2, y)
		if q, _ := h.shown.Start("S1"); q.At != m(2, -0.1) {
			t.Errorf("with the pointer at y = %v the start is at %v", y, q.At)
		}
	}
	h.move(s, 2, 3) // away from the wall
	h.move(s, 2, 0.15)
	if q, _ := h.shown.Start("S1"); q.At != m(2, 0.1) {
		t.Errorf("back at the wall the start is at %v", q.At)
	}
	h.click(s, 2, 0.15)
	h.move(s, -2, 0.15)
	if q, _ := h.shown.Start("S2"); q.At != m(-2, 0.1) {
		t.Errorf("the next start is at %v", q.At)
	}
}

func TestTurnRound(t *testing.T) {
	up, free := 90.0, 30.0
	face := func(ax, ay, bx, by float64) plan.Target {
		tg := plan.Target{ID: "T1", Face: ptrFace(ax, ay, bx, by), At: m((ax+bx)/2, (ay+by)/2)}
		return tg
	}
	for name, c := range map[string]struct{ from, want plan.Target }{
		"a point on the face":      {plan.Target{ID: "T1", At: m(1, 0.1), Normal: &up}, plan.Target{At: m(1, -0.1)}},
		"a point 10 mm off it":     {plan.Target{ID: "T1", At: m(1, 0.11), Normal: &up}, plan.Target{At: m(1, -0.1)}},
		"a point too far off":      {plan.Target{ID: "T1", At: m(1, 0.13), Normal: &up}, plan.Target{At: m(1, 0.13)}},
		"a point that looks aside": {plan.Target{ID: "T1", At: m(1, 0.1), Normal: &free}, plan.Target{At: m(1, 0.1)}},
		"a face on the wall":       {face(1, 0.1, 2, 0.1), face(2, -0.1, 1, -0.1)},
		"a free face":              {face(1, 3, 2, 3), face(2, 3, 1, 3)},
	} {
		h := oneWall(t)
		c.from.Colour = -1
		if err := h.Do(plan.AddTarget{Target: c.from}); err != nil {
			t.Fatal(err)
		}
		h.Select(plan.Ref{Kind: plan.KindTarget, ID: "T1"})
		s := &tool.Select{}
		h.typed(s, "j")
		q, _ := h.plan.Target("T1")
		if q.At != c.want.At || (q.Face == nil) != (c.want.Face == nil) || q.Face != nil && *q.Face != *c.want.Face {
			t.Errorf("%s: %+v", name, q)
		}
		if q.Face == nil && (q.Normal == nil || *q.Normal-*c.from.Normal != -180) {
			t.Errorf("%s: it looks to %v", name, *q.Normal)
		}
		if got := h.done[len(h.done)-1]; strings.Contains(name, "wall") != strings.Contains(got, "other face") && c.from.Face != nil {
			t.Errorf("%s: the step is %q", name, got)
		}
		h.typed(s, "j")
		if q, _ := h.plan.Target("T1"); c.from.Face != nil && *q.Face != *c.from.Face {
			t.Errorf("%s: twice is %+v", name, q)
		}
	}
	h := oneWall(t)
	if e := tool.TurnRound(h.plan, plan.Ref{Kind: plan.KindTarget, ID: "T9"}); e != nil {
		t.Error("a target that is none is turned")
	}
}

// TestABlocksOtherFace: of a block the face behind is the one that the line straight through it comes out by.
func TestABlocksOtherFace(t *testing.T) {
	ring := plan.ChainOf(m(0, 0), m(4, 0), m(4, 1), m(2, 1), m(2, 3), m(0, 3)) // an L
	for _, reversed := range []bool{false, true} {
		pts := ring.Points()
		if reversed {
			slices.Reverse(pts)
		}
		for _, c := range []struct{ x, y, toX, toY, normal float64 }{
			{3, -0.1, 3, 1, 90}, {1, -0.1, 1, 3, 90}, {-0.1, 2, 2, 2, 0}, {-0.1, 0.5, 4, 0.5, 0}, {3, 1.1, 3, 0, -90}, {2.1, 2, 0, 2, 180},
		} {
			h := newHost(t, plan.Parts{Blocks: []plan.Block{{ID: "B1", Ring: plan.ChainOf(pts...), Height: plan.Ceiling}}})
			tg := &tool.Mark{Kind: plan.KindTarget}
			h.move(tg, c.x, c.y)
			was, _ := h.shown.Target("T1")
			h.typed(tg, "j")
			q, _ := h.shown.Target("T1")
			if q.At != m(c.toX, c.toY) || q.Normal == nil || math.Abs(math.Remainder(*q.Normal-c.normal, 360)) > 1e-9 {
				t.Errorf("reversed %v: from %v, %v to %v, looking to %v", reversed, c.x, c.y, q.At, *q.Normal)
			}
			h.click(tg, c.x, c.y)
			h.Select(plan.Ref{Kind: plan.KindTarget, ID: "T1"})
			h.typed(&tool.Select{}, "j")
			if q, _ := h.plan.Target("T1"); q.At != was.At {
				t.Errorf("reversed %v: back from %v, %v it hangs at %v, not %v", reversed, c.toX, c.toY, q.At, was.At)
			}
		}
	}
}

func ptrFace(ax, ay, bx, by float64) *[2]exact.Pt { return &[2]exact.Pt{m(ax, ay), m(bx, by)} }
