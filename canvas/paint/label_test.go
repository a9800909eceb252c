package paint_test

import (
	"math/rand/v2"
	"strings"
	"testing"

	"enfilade/assets"
	"enfilade/canvas/paint"
	"enfilade/solver/exact"
	"enfilade/solver/plan"
)

// textBox is the box of a text's capitals, without air.
func textBox(l *paint.List, t paint.TextStyle) (x0, y0, x1, y1 float64) {
	w := assets.FaceOf(t.Weight).Width(l.Chars[t.Chars[0]:t.Chars[1]], float64(t.Size), float64(t.Spacing))
	return float64(t.At.X), float64(t.At.Y) - 0.72*float64(t.Size), float64(t.At.X) + w, float64(t.At.Y)
}

func labels(l *paint.List) (texts []paint.TextStyle) {
	for _, op := range l.Ops {
		if op.Kind == paint.Text && !op.Free { // those on the rulers are free
			texts = append(texts, l.Texts[op.Style])
		}
	}
	return texts
}

// TestLabelsApart: with room for all, no two labels overlap, and every name is there.
func TestLabelsApart(t *testing.T) {
	l := overlayOf(sceneOf(t, named(t, twoRooms), 1000, 700, 1))
	texts := labels(l)
	for i, a := range texts {
		ax0, ay0, ax1, ay1 := textBox(l, a)
		for _, b := range texts[:i] {
			bx0, by0, bx1, by1 := textBox(l, b)
			if ax0 < bx1 && bx0 < ax1 && ay0 < by1 && by0 < ay1 {
				t.Errorf("%q lies over %q", l.Chars[a.Chars[0]:a.Chars[1]], l.Chars[b.Chars[0]:b.Chars[1]])
			}
		}
	}
	text := l.String()
	for _, name := range []string{"Lamp", "Orrery", "Street door", "Stool", `"A"`, `"B"`, "STUDY", "HALL", "first sight", "full walk", "Two rooms", "in the plane of the eye, 1.60 m"} {
		if !strings.Contains(text, name) {
			t.Errorf("%s is missing", name)
		}
	}
}

// TestLabelsRank: where there is no room, names of starts and targets stay and those of rooms go.
func TestLabelsRank(t *testing.T) {
	l := overlayOf(sceneOf(t, named(t, twoRooms), 190, 160, 1))
	text := l.String()
	for _, name := range []string{"Lamp", "Orrery", "Street door", "Stool", "first sight"} {
		if !strings.Contains(text, name) {
			t.Errorf("%s was dropped", name)
		}
	}
	if strings.Contains(text, "STUDY") && strings.Contains(text, "HALL") && strings.Contains(text, "full walk") {
		t.Error("nothing was dropped: the test shows nothing")
	}
}

// TestLabelsStay: a label keeps its place while what it belongs to creeps along, until it collides.
func TestLabelsStay(t *testing.T) {
	p := named(t, "floor 0,0 10,0 10,6 0,6; observer 5,3; target 3,3; start 1,1")
	s := sceneOf(t, p, 800, 520, 1)
	var l paint.List
	offset := func() (dx, dy float64) {
		paint.Overlay(s, &l)
		x, y := s.Camera.Pixel(s.Plan.Parts().Observers[0].At)
		for _, tx := range labels(&l) {
			if string(l.Chars[tx.Chars[0]:tx.Chars[1]]) == "A" {
				return float64(tx.At.X) - x, float64(tx.At.Y) - y
			}
		}
		t.Fatal("the observer's letter is missing")
		return 0, 0
	}
	wantX, wantY := offset()
	if wantY > -15 {
		t.Errorf("the letter stands %g px below its observer, want above", wantY)
	}
	for i := range 12 {
		parts := p.Parts()
		parts.Observers[0].At = exact.Pt{X: 50000 + int32(i)*1000, Y: 30000}
		s.Plan = plan.From(parts)
		if x, y := offset(); x < wantX-0.01 || x > wantX+0.01 || y < wantY-0.01 || y > wantY+0.01 {
			t.Fatalf("step %d: the letter jumped from %g,%g to %g,%g", i, wantX, wantY, x, y)
		}
	}
}

// TestNames: an odd name is written as it is, one that is empty is not written.
func TestNames(t *testing.T) {
	parts := named(t, "floor 0,0 10,0 10,6 0,6; target 3,3; target 7,3").Parts()
	parts.Targets[0].Name, parts.Targets[1].Name = "Ærø → “Łódź”\n²", ""
	l := overlayOf(sceneOf(t, plan.From(parts), 800, 520, 1))
	if text := l.String(); !strings.Contains(text, `Ærø → “Łódź”`) || strings.Contains(text, `""`) {
		t.Errorf("names in\n%s", text)
	}
}

func TestOverlayAllocates(t *testing.T) {
	s := sceneOf(t, named(t, twoRooms), 800, 520, 1)
	base := paint.Base(s)
	s.Drawing = base.Drawing
	var l paint.List
	paint.Overlay(s, &l)
	if n := testing.AllocsPerRun(50, func() { paint.Overlay(s, &l) }); n != 0 {
		t.Errorf("a reused list allocates %g times a frame", n)
	}
}

// TestFarZoom: at every zoom and place all coordinates stay near the picture, and a wash keeps covering its middle.
func TestFarZoom(t *testing.T) {
	s := sceneOf(t, named(t, twoRooms), 800, 520, 1)
	start := s.Camera
	rng := rand.New(rand.NewPCG(4, 2))
	var l paint.List
	for range 200 {
		s.Camera = start
		for range 1 + rng.IntN(8) {
			s.Camera = s.Camera.ZoomAt(rng.Float64()*800, rng.Float64()*520, 1+rng.Float64()*12)
		}
		base := paint.Base(s)
		paint.Overlay(s, &l)
		for _, list := range []*paint.List{base, &l} {
			for _, q := range list.Points {
				if !(q.X > -500 && q.X < 1300 && q.Y > -500 && q.Y < 1020) {
					t.Fatalf("a point at %v, zoomed to %g px per metre", q, s.Camera.PerMetre())
				}
			}
		}
	}
}
