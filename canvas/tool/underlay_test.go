package tool_test

import (
	"math"
	"testing"

	"enfilade/canvas/tool"
	"enfilade/solver/exact"
	"enfilade/solver/plan"
)

// traced is a host whose plan has an underlay of 400 by 300 pixels, 10 mm each, at 0, 0: 4 m by 3 m.
func traced(t *testing.T, change func(*plan.Underlay)) (*host, *tool.Underlay) {
	t.Helper()
	u := plan.Underlay{Image: "scan.png", MMPerPixel: 10, Opacity: 0.4}
	if change != nil {
		change(&u)
	}
	h := newHost(t, plan.Parts{})
	p, err := plan.SetUnderlay{Underlay: u}.Apply(h.plan)
	if err != nil {
		t.Fatal(err)
	}
	h.plan, h.shown = p, p
	h.photo = [2]int{400, 300}
	return h, &tool.Underlay{}
}

func (h *host) underlay() plan.Underlay { return *h.plan.Sheet().Underlay }

func TestUnderlayIsDragged(t *testing.T) {
	h, u := traced(t, nil)
	h.drag(u, 3, 2, 4.5, 1)
	if got := h.underlay().At; got != m(1.5, -1) {
		t.Errorf("it lies at %v", got)
	}
	h.steps("move underlay")
	h.drag(u, 9, 9, 10, 10) // beside it
	h.press(u, 3, 2)
	h.dragTo(u, 5, 5)
	h.key(u, tool.KeyEscape)
	h.steps("move underlay")
	h.key(u, tool.KeyLeft)
	if got := h.underlay().At; got != m(1.4, -1) {
		t.Errorf("nudged to %v", got)
	}
}

func TestUnderlayIsDraggedWhereItIsTurned(t *testing.T) {
	h, u := traced(t, func(u *plan.Underlay) { u.Turn = 90 }) // it lies from -3 to 0 m and from 0 to 4 m
	h.drag(u, 2, 2, 3, 3)
	h.steps()
	h.drag(u, -2, 3.5, -1, 3.5)
	h.steps("move underlay")
}

func TestLockedUnderlayStays(t *testing.T) {
	h, u := traced(t, func(u *plan.Underlay) { u.Locked = true })
	for _, job := range []tool.UnderlayJob{tool.MoveUnderlay, tool.ScaleUnderlay, tool.StraightenUnderlay} {
		u.Job = job
		h.drag(u, 1, 1, 2, 1.2)
		h.typed(u, "3")
		h.key(u, tool.KeyEnter, tool.KeyLeft)
	}
	h.steps()
	h.selected = []plan.Ref{{Kind: plan.KindUnderlay}}
	h.key(&tool.Select{}, tool.KeyLeft) // chosen in its form, with the select tool in hand
	if got := h.underlay().At; got != m(0, 0) {
		t.Errorf("the select tool nudged it to %v", got)
	}
}

func TestUnderlayScale(t *testing.T) {
	h, u := traced(t, func(u *plan.Underlay) { u.Turn = 20; u.At = m(-1, -2) })
	done := 0
	u.Job, u.Done = tool.ScaleUnderlay, func() { done++ }
	h.click(u, 1, 1)
	h.click(u, 4, 5) // 5 m as it lies
	h.move(u, 9, 9)  // the line waits
	h.typed(u, "x")
	h.key(u, tool.KeyEnter)
	h.steps("set underlay's scale") // nothing typed: as it is
	h.plan = h.shown
	h.click(u, 1, 1)
	h.click(u, 4, 5)
	h.typed(u, "10,0")
	if s := u.Sketch(h); len(s.Fields) != 1 || s.Fields[0].Text != "10,0" || !s.Types || len(s.Band) != 2 {
		t.Errorf("the sketch is %+v", s)
	}
	h.key(u, tool.KeyEnter)
	got := h.underlay()
	if got.MMPerPixel != 20 || got.At != m(-3, -5) || got.Turn != 20 || done != 2 {
		t.Errorf("scaled to %+v, done %d times; want 20 mm a pixel about the first click", got, done)
	}
	h.click(u, 1, 1)
	h.key(u, tool.KeyEscape)
	if s := u.Sketch(h); len(s.Band) != 0 {
		t.Error("Escape does not step back")
	}
}

func TestUnderlayScaleFaults(t *testing.T) {
	h, u := traced(t, nil)
	u.Job = tool.ScaleUnderlay
	h.click(u, 1, 1)
	h.click(u, 1, 1) // the same place twice
	if s := u.Sketch(h); len(s.Band) != 0 || s.Fields != nil {
		t.Error("no distance is taken for one")
	}
	h.click(u, 1.5, 1)
	for _, text := range []string{"0", "9999999"} {
		h.typed(u, text)
		h.key(u, tool.KeyEnter)
		if u.Sketch(h).Fault == "" {
			t.Errorf("%s is not told as a fault", text)
		}
		for range text {
			h.key(u, tool.KeyBackspace)
		}
	}
	h.steps()
}

// TestUnderlayStraight: the line that was clicked becomes level or upright, whichever is nearer; the first end stays.
func TestUnderlayStraight(t *testing.T) {
	for _, c := range []struct{ x, y, turn float64 }{
		{3, 0.3, -5.71}, {-3, -0.3, -5.71}, {0.3, 3, 5.71}, {3, -0.3, 5.71}, {2, 2.1, 43.6},
	} {
		h, u := traced(t, func(u *plan.Underlay) { u.At = m(-1, -2) })
		u.Job = tool.StraightenUnderlay
		h.click(u, 1, 1)
		h.click(u, 1+c.x, 1+c.y)
		h.steps("straighten underlay")
		got := h.underlay()
		if math.Abs(got.Turn-c.turn) > 0.01 {
			t.Errorf("line %g, %g: turned by %g°, want %g°", c.x, c.y, got.Turn, c.turn)
		}
		// The picture's place under the second click now lies level with, or above, the first.
		sin, cos := math.Sincos(got.Turn * math.Pi / 180)
		back := func(p exact.Pt) (float64, float64) { // a place of the picture before, where it is now
			x, y := float64(p.X)+10000, float64(p.Y)+20000
			return float64(got.At.X) + x*cos - y*sin, float64(got.At.Y) + x*sin + y*cos
		}
		ax, ay := back(m(1, 1))
		bx, by := back(m(1+c.x, 1+c.y))
		if math.Abs(ax-10000) > 1 || math.Abs(ay-10000) > 1 || math.Min(math.Abs(ax-bx), math.Abs(ay-by)) > 1 {
			t.Errorf("line %g, %g: now from %.1f, %.1f to %.1f, %.1f", c.x, c.y, ax, ay, bx, by)
		}
	}
}
