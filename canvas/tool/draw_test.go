package tool_test

import (
	"slices"
	"strings"
	"testing"

	"enfilade/canvas/tool"
	"enfilade/solver/exact"
	"enfilade/solver/plan"
)

func TestWallByClicks(t *testing.T) {
	h := newHost(t, plan.Parts{})
	w := &tool.Chain{Kind: plan.Solid}
	h.click(w, 0, 0)
	h.move(w, 2.4, 0.02)
	if k := w.Sketch(h); k.Label != "2.40 m · 0°" || len(k.Band) != 2 || k.Band[1] != m(2.4, 0) {
		t.Errorf("rubber band %+v", k)
	}
	if h.shown.NumWalls() != 1 || h.plan.NumWalls() != 0 {
		t.Error("the wall is to be previewed, not done, while it is drawn")
	}
	h.click(w, 2.4, 0.02)
	h.click(w, 2.4, -1.5)
	h.key(w, tool.KeyEnter)
	h.points("W1", h.wall("W1"), m(0, 0), m(2.4, 0), m(2.4, -1.5))
	if q, _ := h.plan.Wall("W1"); q.Thickness != 2000 || q.Height != plan.Ceiling || q.Kind != plan.Solid {
		t.Errorf("wall %+v", q)
	}
	if len(h.selected) != 1 || h.selected[0] != ref(plan.KindWall, "W1") {
		t.Errorf("selected %v, want the new wall", h.selected)
	}
	h.steps("draw wall")
}

func TestWallEnds(t *testing.T) {
	for name, end := range map[string]func(h *host, w tool.Tool){
		"enter":  func(h *host, w tool.Tool) { h.key(w, tool.KeyEnter) },
		"escape": func(h *host, w tool.Tool) { h.key(w, tool.KeyEscape) },
		"double click": func(h *host, w tool.Tool) {
			e := h.at(3, 0)
			e.Clicks = 2
			w.Down(h, e)
			w.Up(h, e)
		},
	} {
		h := newHost(t, plan.Parts{})
		w := &tool.Chain{}
		h.click(w, 0, 0)
		h.click(w, 3, 0)
		end(h, w)
		h.points(name, h.wall("W1"), m(0, 0), m(3, 0))
		h.steps("draw wall")
		if w.Key(h, tool.Key{Name: tool.KeyEscape}) {
			t.Errorf("%s: Escape after the run must be free to leave the tool", name)
		}
	}
}

func TestWallClosesOnItsFirstCorner(t *testing.T) {
	h := newHost(t, plan.Parts{})
	w := &tool.Chain{}
	for _, p := range [][2]float64{{0, 0}, {4, 0}, {4, 3}, {0.15, -0.1}} { // the last one snaps to the first
		h.click(w, p[0], p[1])
	}
	h.points("W1", h.wall("W1"), m(0, 0), m(4, 0), m(4, 3), m(0, 0))
	h.steps("draw wall")
}

func TestWallTooShortIsNothing(t *testing.T) {
	h := newHost(t, plan.Parts{})
	w := &tool.Chain{}
	h.click(w, 0, 0)
	h.move(w, 3, 3)
	h.key(w, tool.KeyEscape)
	h.steps()
	h.click(w, 0, 0)
	w.Stop(h)
	h.steps()
}

func TestWallBackspaceTakesBackACorner(t *testing.T) {
	h := newHost(t, plan.Parts{})
	w := &tool.Chain{}
	h.click(w, 0, 0)
	h.click(w, 3, 0)
	h.click(w, 3, 3)
	h.key(w, tool.KeyBackspace)
	h.click(w, 5, 0)
	h.key(w, tool.KeyEnter)
	h.points("W1", h.wall("W1"), m(0, 0), m(3, 0), m(5, 0))
}

func TestWallTypedLengthAndAngle(t *testing.T) {
	h := newHost(t, plan.Parts{})
	w := &tool.Chain{}
	h.click(w, 0, 0)
	h.move(w, 1, 0)
	h.typed(w, "2,5")
	if k := w.Sketch(h); !slices.Equal(k.Fields, []tool.Field{{"length", "2,5", "2.50 m", true}, {"angle", "", "0°", false}}) || k.Band[1] != m(2.5, 0) {
		t.Errorf("typed length: %+v", k)
	}
	h.key(w, tool.KeyEnter)
	h.typed(w, "1.5")
	h.key(w, tool.KeyTab)
	h.typed(w, "90")
	h.key(w, tool.KeyEnter)
	h.key(w, tool.KeyEnter)
	h.points("W1", h.wall("W1"), m(0, 0), m(2.5, 0), m(2.5, 1.5))
	h.steps("draw wall")
}

func TestWallTypingIsTakenBack(t *testing.T) {
	h := newHost(t, plan.Parts{})
	w := &tool.Chain{}
	if w.Key(h, tool.Key{Name: tool.KeyRune, Rune: '2'}) {
		t.Error("a digit before the first corner is not for the wall")
	}
	h.click(w, 0, 0)
	h.move(w, 1, 0)
	if w.Key(h, tool.Key{Name: tool.KeyRune, Rune: 'o'}) {
		t.Error("a letter chooses a tool, it is no length")
	}
	h.typed(w, "25")
	h.key(w, tool.KeyBackspace)
	if k := w.Sketch(h); k.Band[1] != m(2, 0) {
		t.Errorf("after backspace the band ends at %v", k.Band[1])
	}
	h.key(w, tool.KeyEscape)
	if k := w.Sketch(h); k.Fields != nil || k.Band[1] != m(1, 0) {
		t.Errorf("after Escape %+v, want the pointer's place again", k)
	}
}

func TestWallShiftKeepsToEighths(t *testing.T) {
	h := newHost(t, plan.Parts{})
	w := &tool.Chain{}
	h.click(w, 0, 0)
	for _, c := range []struct{ x, y, wx, wy float64 }{{3, 0.9, 3, 0}, {3, 1.6, 2.3, 2.3}, {-1, 4, 0, 4}, {-2, -2.4, -2.2, -2.2}} {
		e := h.at(c.x, c.y)
		e.Shift = true
		w.Move(h, e)
		if k := w.Sketch(h); k.Band[1] != m(c.wx, c.wy) {
			t.Errorf("from %g, %g: %v, want %g, %g", c.x, c.y, k.Band[1], c.wx, c.wy)
		}
	}
}

func TestChainKinds(t *testing.T) {
	for kind, want := range map[plan.WallKind]plan.Wall{
		plan.Glazing: {Kind: plan.Glazing, Height: plan.Ceiling},
		plan.Screen:  {Kind: plan.Screen, Height: plan.Ceiling},
		plan.Low:     {Kind: plan.Low, Thickness: 3000, Height: 9500},
	} {
		h := newHost(t, plan.Parts{})
		w := &tool.Chain{Kind: kind}
		h.click(w, 0, 0)
		h.click(w, 1, 0)
		h.key(w, tool.KeyEnter)
		got, _ := h.plan.Wall("W1")
		if got.Kind != want.Kind || got.Thickness != want.Thickness || got.Height != want.Height {
			t.Errorf("kind %d: %+v", kind, got)
		}
	}
}

func TestFloor(t *testing.T) {
	h := newHost(t, plan.Parts{})
	f := &tool.Chain{Ring: plan.KindFloor}
	h.click(f, 0, 0)
	h.click(f, 4, 0)
	h.move(f, 4, 3)
	if h.shown.Floor().Len() != 3 {
		t.Errorf("previewed floor of %d corners", h.shown.Floor().Len())
	}
	h.click(f, 4, 3)
	h.click(f, 0, 0)
	h.points("floor", h.plan.Floor().Points(), m(0, 0), m(4, 0), m(4, 3))
	h.steps("draw floor")
}

func TestDoor(t *testing.T) {
	parts := plan.Parts{Walls: []plan.Wall{{ID: "W1", Line: plan.ChainOf(m(0, 0), m(6, 0)), Thickness: 2000}}}
	h := newHost(t, parts)
	d := &tool.Door{}
	h.move(d, 3, 2)
	if h.shown != h.plan {
		t.Error("away from walls there is no door")
	}
	h.move(d, 3, 0.1)
	if h.shown.NumOpenings() != 1 {
		t.Error("over a wall the door is previewed")
	}
	h.click(d, 3, 0.1)
	o, _ := firstOpening(h.plan)
	if o.Wall != "W1" || o.At != 25500 || o.Width != 9000 || o.Leaf != plan.SolidLeaf || o.SideRight || o.Shut {
		t.Errorf("door %+v", o)
	}
	h.click(d, 3.2, 0.1)
	if h.plan.NumOpenings() != 1 || d.Sketch(h).Fault == "" {
		t.Error("a door over another one must be refused, with a reason")
	}
	h.drag(d, 4, -0.1, 5.5, -0.1)
	if h.plan.NumOpenings() != 2 {
		t.Fatal("no door was dragged out")
	}
	for _, o := range h.plan.Openings() {
		if o.At == 40000 && (o.Width != 15000 || !o.SideRight) {
			t.Errorf("dragged door %+v", o)
		}
	}
	e := h.at(1, 0)
	e.Shift = true
	d.Move(h, e)
	d.Down(h, e)
	d.Up(h, e)
	if h.plan.NumOpenings() != 3 {
		t.Error("no gap was made")
	}
}

// TestDoorTyped: a typed width holds for the next doors, and the distance counts from the nearer corner.
func TestDoorTyped(t *testing.T) {
	h := newHost(t, plan.Parts{Walls: []plan.Wall{{ID: "W1", Line: plan.ChainOf(m(0, 0), m(8, 0)), Thickness: 2000}}})
	d := &tool.Door{}
	h.move(d, 6.5, 0.1)
	h.typed(d, "1,2")
	h.key(d, tool.KeyTab)
	h.typed(d, "0.5")
	if k := d.Sketch(h); k.Label != "6.30 m  |  1.20 m  |  0.50 m" {
		t.Errorf("label %q", k.Label)
	}
	h.key(d, tool.KeyEnter)
	h.click(d, 1.6, 0.1)
	var got []int32
	for _, o := range h.plan.Openings() {
		got = append(got, o.At, o.Width)
	}
	if want := []int32{63000, 12000, 10000, 12000}; !slices.Equal(got, want) {
		t.Errorf("doors at %v, want %v", got, want)
	}
	h.move(d, 4.1, 0) // near the middle
	if k := d.Sketch(h); k.Label != "3.40 m  |  1.20 m  |  3.40 m" {
		t.Errorf("near the middle: %q", k.Label)
	}
}

// TestDoorKeys: the keys change the next doors, and a gap has no hinges.
func TestDoorKeys(t *testing.T) {
	h := newHost(t, plan.Parts{Walls: []plan.Wall{{ID: "W1", Line: plan.ChainOf(m(0, 0), m(8, 0)), Thickness: 2000}}})
	d := &tool.Door{}
	h.move(d, 2, 0.1)
	h.typed(d, "jhku")
	h.click(d, 2, 0.1)
	if o, _ := firstOpening(h.plan); !o.SideRight || !o.HingeEnd || o.Leaf != plan.GlazedLeaf || !o.Shut {
		t.Errorf("door %+v, want a shut glazed one, hinged at the far jamb, to the right", o)
	}
	h.typed(d, "k")
	h.click(d, 5, 0.1)
	for _, o := range h.plan.Openings() {
		if o.At > 40000 && (o.Leaf != plan.NoLeaf || o.Shut || o.HingeEnd) {
			t.Errorf("gap %+v", o)
		}
	}
}

func TestDoorNearTheWallsEnd(t *testing.T) {
	h := newHost(t, plan.Parts{Walls: []plan.Wall{{ID: "W1", Line: plan.ChainOf(m(0, 0), m(0.6, 0)), Thickness: 2000}}})
	d := &tool.Door{}
	h.click(d, 0.5, 0)
	if o, _ := firstOpening(h.plan); o.At != 0 || o.Width != 6000 {
		t.Errorf("door %+v, want the whole wall", o)
	}
}

func TestBlocks(t *testing.T) {
	h := newHost(t, plan.Parts{})
	b := &tool.Rect{Kind: plan.KindBlock}
	h.drag(b, 3, 2, 1, 1)
	h.click(b, -2, -2) // by two clicks
	h.move(b, -1, 0)
	if k := b.Sketch(h); k.Label != "1.00 m × 2.00 m" || h.shown.NumBlocks() != 2 {
		t.Errorf("between the clicks: %q, %d blocks", k.Label, h.shown.NumBlocks())
	}
	h.click(b, -1, 0)
	c := &tool.Chain{Ring: plan.KindBlock}
	for _, p := range [][2]float64{{5, 5}, {6, 5}, {5, 6}, {5, 5}} {
		h.click(c, p[0], p[1])
	}
	var got []plan.Block
	for _, k := range h.plan.Blocks() {
		got = append(got, k)
	}
	if len(got) != 3 {
		t.Fatalf("%d blocks", len(got))
	}
	h.points("dragged", got[0].Ring.Points(), m(1, 1), m(3, 1), m(3, 2), m(1, 2))
	h.points("clicked", got[1].Ring.Points(), m(-2, -2), m(-1, -2), m(-1, 0), m(-2, 0))
	h.points("by corners", got[2].Ring.Points(), m(5, 5), m(6, 5), m(5, 6))
	h.steps("draw block", "draw block", "draw block")
}

func TestColumns(t *testing.T) {
	h := newHost(t, plan.Parts{})
	c := &tool.Round{}
	h.move(c, -2, -2)
	if h.shown.NumBlocks() != 1 {
		t.Error("a column on the pointer is to be previewed")
	}
	h.click(c, -2, -2)
	h.drag(c, 1, 1, 1.5, 1)
	h.move(c, 3, 3)
	h.typed(c, "0,3")
	if k := c.Sketch(h); len(k.Fields) != 1 || k.Fields[0] != (tool.Field{"radius", "0,3", "0.30 m", true}) {
		t.Errorf("fields %+v", k.Fields)
	}
	h.key(c, tool.KeyEnter)
	h.click(c, 5, 5) // with the radius of the last one
	var got []plan.Circle
	for _, b := range h.plan.Blocks() {
		got = append(got, *b.Circle)
	}
	if want := []plan.Circle{{At: m(-2, -2), Radius: 2000}, {At: m(1, 1), Radius: 5000}, {At: m(3, 3), Radius: 3000}, {At: m(5, 5), Radius: 3000}}; !slices.Equal(got, want) {
		t.Errorf("columns %+v, want %+v", got, want)
	}
	h.steps("draw column", "draw column", "draw column", "draw column")
}

func TestRoom(t *testing.T) {
	h := newHost(t, plan.Parts{})
	r := &tool.Rect{Kind: plan.KindWall}
	h.click(r, 0, 0)
	h.move(r, -1, 1)
	h.typed(r, "4.2")
	h.key(r, tool.KeyTab)
	h.typed(r, "3")
	h.typed(r, "j") // the body to the left of the walls: inside
	h.key(r, tool.KeyEnter)
	h.points("W1", h.wall("W1"), m(-4.2, 0), m(0, 0), m(0, 3), m(-4.2, 3), m(-4.2, 0))
	if w, _ := h.plan.Wall("W1"); w.Justify != plan.Left || w.Thickness != 2000 {
		t.Errorf("room of %+v", w)
	}
	h.steps("draw room")
}

// TestWallBody: J and H change where the body of new walls lies, before the first corner and between two.
func TestWallBody(t *testing.T) {
	h := newHost(t, plan.Parts{})
	w := &tool.Chain{}
	h.typed(w, "j")
	h.click(w, 0, 0)
	h.typed(w, "j")
	if hint := w.Hint(h); !strings.Contains(hint, "right of the line (J)") {
		t.Errorf("hint %q does not say where the body is", hint)
	}
	h.click(w, 3, 0)
	h.key(w, tool.KeyEnter)
	h.typed(w, "h")
	h.click(w, 0, 3)
	h.click(w, 3, 3)
	h.key(w, tool.KeyEnter)
	h.typed(w, "h")
	h.click(w, 0, 5)
	h.click(w, 3, 5)
	h.key(w, tool.KeyEnter)
	for id, want := range map[string]plan.Wall{"W1": {Justify: plan.Right, Thickness: 2000}, "W2": {Justify: plan.Right}, "W3": {Justify: plan.Right, Thickness: 2000}} {
		if got, _ := h.plan.Wall(id); got.Justify != want.Justify || got.Thickness != want.Thickness {
			t.Errorf("%s: %+v", id, got)
		}
	}
	if (&tool.Chain{Kind: plan.Screen}).Key(h, tool.Key{Name: tool.KeyRune, Rune: 'j'}) {
		t.Error("a screen has no body to lie anywhere")
	}
}

// TestWallUndoAndFinish: undo in the middle of a run takes back its last corner; another tool finishes it.
func TestWallUndoAndFinish(t *testing.T) {
	h := newHost(t, plan.Parts{})
	w := &tool.Chain{}
	if w.Key(h, tool.Key{Name: tool.KeyUndo}) {
		t.Error("with nothing begun undo is not the tool's")
	}
	h.click(w, 0, 0)
	h.click(w, 3, 0)
	h.click(w, 3, 3)
	h.key(w, tool.KeyUndo)
	w.Finish(h)
	h.points("W1", h.wall("W1"), m(0, 0), m(3, 0))
	h.steps("draw wall")
	w.Finish(h)
	h.steps("draw wall")
}

// TestBackspaceLeavesTheFieldsFirst: an emptied field costs no corner, and Enter in an empty one puts the corner at the pointer.
func TestBackspaceLeavesTheFieldsFirst(t *testing.T) {
	h := newHost(t, plan.Parts{})
	w := &tool.Chain{}
	h.click(w, 0, 0)
	h.click(w, 2, 0)
	h.move(w, 2, 3)
	h.typed(w, "1")
	h.key(w, tool.KeyBackspace)
	if k := w.Sketch(h); len(k.Handles) != 2 || k.Fields == nil {
		t.Errorf("after the digit: %d corners, fields %v", len(k.Handles), k.Fields)
	}
	h.key(w, tool.KeyBackspace)
	if k := w.Sketch(h); len(k.Handles) != 2 || k.Fields != nil {
		t.Errorf("after the empty field: %d corners, fields %v", len(k.Handles), k.Fields)
	}
	h.key(w, tool.KeyBackspace)
	if k := w.Sketch(h); len(k.Handles) != 1 {
		t.Errorf("after the corner: %d corners", len(k.Handles))
	}
	h.key(w, tool.KeyTab, tool.KeyEnter, tool.KeyEnter)
	h.points("W1", h.wall("W1"), m(0, 0), m(2, 3))
	r := &tool.Rect{Kind: plan.KindZone}
	h.click(r, 0, 0)
	h.move(r, 1, 1)
	h.typed(r, "4")
	h.key(r, tool.KeyBackspace, tool.KeyBackspace)
	if k := r.Sketch(h); len(k.Handles) != 1 {
		t.Error("an emptied field took the rectangle's first corner")
	}
}

func TestWallTypedInFeet(t *testing.T) {
	h := newHost(t, plan.Parts{})
	w := &tool.Chain{}
	h.click(w, 0, 0)
	h.move(w, 1, 0)
	h.typed(w, `10'6"`)
	h.key(w, tool.KeyTab)
	h.typed(w, "90")
	h.key(w, tool.KeyEnter)
	h.typed(w, "2-")
	if k := w.Sketch(h); k.Fault == "" {
		t.Error("a text that is no length is not told")
	}
	h.key(w, tool.KeyEnter)
	if k := w.Sketch(h); len(k.Handles) != 2 {
		t.Error("a text that is no length put a corner")
	}
	h.key(w, tool.KeyEscape, tool.KeyEscape)
	h.points("W1", h.wall("W1"), m(0, 0), exact.Pt{Y: 10*3048 + 6*254})
}

func TestRectEscapeAndFlat(t *testing.T) {
	h := newHost(t, plan.Parts{})
	b := &tool.Rect{Kind: plan.KindZone}
	h.press(b, 0, 0)
	h.dragTo(b, 2, 2)
	h.key(b, tool.KeyEscape)
	b.Up(h, h.at(2, 2))
	h.drag(b, 0, 0, 3, 0) // flat
	h.steps()
	h.drag(b, 0, 0, 3, 2)
	h.steps("draw zone")
}

func TestMarks(t *testing.T) {
	h := newHost(t, plan.Parts{Walls: []plan.Wall{{ID: "W1", Line: plan.ChainOf(m(-4, 0), m(4, 0)), Thickness: 2000}}})
	o := &tool.Mark{Kind: plan.KindObserver}
	h.move(o, 1.02, 2)
	if k := o.Sketch(h); k.Show != ref(plan.KindObserver, "O1") || h.shown.NumObservers() != 1 {
		t.Errorf("an observer on the pointer is previewed and shown: %+v", k)
	}
	o.Leave(h)
	if h.shown != h.plan {
		t.Error("off the picture the preview ends")
	}
	h.click(o, 1.02, 2)
	if q, _ := h.plan.Observer("O1"); q.At != m(1, 2) || q.Eye != 16000 || q.View != 360 {
		t.Errorf("observer %+v", q)
	}
	h.click(&tool.Mark{Kind: plan.KindTarget}, 2, -0.2)
	if q, _ := h.plan.Target("T1"); q.At != m(2, -0.1) || q.Normal == nil || *q.Normal != -90 {
		t.Errorf("target %+v", q)
	}
	h.click(&tool.Mark{Kind: plan.KindStart}, -2, -3)
	if q, _ := h.plan.Start("S1"); q.At != m(-2, -3) || q.Facing != nil {
		t.Errorf("start %+v", q)
	}
	h.steps("place observer", "place target", "place start")
	if h.selected[0] != ref(plan.KindStart, "S1") {
		t.Errorf("selected %v", h.selected)
	}
}

func TestMeasureChangesNothing(t *testing.T) {
	h := newHost(t, plan.Parts{})
	g := &tool.Measure{}
	h.click(g, 0, 0)
	h.move(g, 3, 4)
	if k := g.Sketch(h); k.Label != "5.00 m · 53.1°" {
		t.Errorf("measure %+v", k)
	}
	h.click(g, 3, 4)
	h.move(g, 9, 9)
	if k := g.Sketch(h); k.Band[1] != m(3, 4) {
		t.Error("a finished measure must stay")
	}
	h.steps()
}

// TestHints: every tool says what the next click does, in every state it starts in.
func TestHints(t *testing.T) {
	h := newHost(t, corner())
	for _, u := range []tool.Tool{&tool.Select{}, &tool.Chain{}, &tool.Chain{Ring: plan.KindFloor}, &tool.Door{}, &tool.Rect{Kind: plan.KindZone},
		&tool.Mark{Kind: plan.KindStart}, &tool.Measure{}} {
		if u.Hint(h) == "" {
			t.Errorf("%T has no hint", u)
		}
	}
}
