package paint_test

import (
	"flag"
	"os"
	"path/filepath"
	"strings"
	"testing"

	"enfilade/canvas/paint"
	"enfilade/solver/exact"
	"enfilade/solver/plan"
)

var update = flag.Bool("update", false, "write the golden files anew")

// golden compares a display list with the one kept as text.
func golden(t *testing.T, name string, l *paint.List) {
	t.Helper()
	file := filepath.Join("testdata", name+".txt")
	got := l.String()
	if *update {
		if err := os.WriteFile(file, []byte(got), 0o644); err != nil {
			t.Fatal(err)
		}
	}
	want, err := os.ReadFile(file)
	if err != nil {
		t.Fatal(err)
	}
	a, b := strings.Split(got, "\n"), strings.Split(string(want), "\n")
	for i := range max(len(a), len(b)) {
		switch {
		case i >= len(a):
			t.Fatalf("%s: line %d is missing: %s", name, i+1, b[i])
		case i >= len(b):
			t.Fatalf("%s: line %d is too many: %s", name, i+1, a[i])
		case a[i] != b[i]:
			t.Fatalf("%s: line %d\n got %s\nwant %s", name, i+1, a[i], b[i])
		}
	}
}

func TestBaseGolden(t *testing.T) {
	s := sceneOf(t, named(t, twoRooms), 520, 360, 1)
	golden(t, "base", paint.Base(s))
}

func TestOverlayGolden(t *testing.T) {
	p := named(t, twoRooms)
	s := sceneOf(t, p, 520, 360, 1)
	golden(t, "overlay", overlayOf(s))

	s.Theme = paint.Dark()
	s.AllRegions = true
	s.Selected = []plan.Ref{{Kind: plan.KindWall, ID: "W2"}, {Kind: plan.KindStart, ID: "S2"}}
	s.Hover = plan.Ref{Kind: plan.KindBlock, ID: "B2"}
	s.Pointer = &[2]float64{200, 150}
	golden(t, "overlay_dark", overlayOf(s))

	parts := p.Parts()
	pts := parts.Walls[1].Line.Points()
	for i := range pts {
		pts[i].X += 2000
	}
	parts.Walls[1].Line = plan.ChainOf(pts...)
	parts.Observers[1].At = exact.Pt{X: 70000, Y: 20000}
	s = sceneOf(t, plan.From(parts), 520, 360, 1)
	s.Old, s.Dragged = p, []plan.Ref{{Kind: plan.KindWall, ID: "W2"}, {Kind: plan.KindObserver, ID: "O2"}}
	s.Stale = true
	golden(t, "base_dragged", paint.Base(s))
	golden(t, "overlay_dragged", overlayOf(s))
}

// TestOverlayProblems: an eye in a wall is hollow and has its reason beside it, a target that cannot be come to sight of
// has its walk stopped with the reason.
func TestOverlayProblems(t *testing.T) {
	p := named(t, `
		floor 0,0 10,0 10,6 0,6; wall 5,0 5,6 th=0.2
		observer 5,3; target 9,3; start 1,3`)
	s := sceneOf(t, p, 520, 360, 1)
	text := overlayOf(s).String()
	if len(s.Result.Problems) == 0 {
		t.Fatal("an eye in a wall is no problem")
	}
	what, help, _ := strings.Cut(s.Result.Problems[0].Text, "; ")
	if help == "" || !strings.Contains(text, what+`"`) || strings.Contains(text, help) {
		t.Errorf("of %q the part before the semicolon is not told alone in\n%s", s.Result.Problems[0].Text, text)
	}
	if strings.Contains(text, "wash") {
		t.Error("an eye inside a wall has a wash")
	}
	if a := s.Result.Approaches[0]; a.Reason == "" || !strings.Contains(text, a.Reason) {
		t.Errorf("reason %q is not told", a.Reason)
	}
	golden(t, "overlay_problems", overlayOf(s))
}

// TestHidden: hidden items are not drawn, and nothing that belongs to them.
func TestHidden(t *testing.T) {
	parts := named(t, twoRooms).Parts()
	for i := range parts.Observers {
		parts.Observers[i].Hidden = true
	}
	for i := range parts.Targets {
		parts.Targets[i].Hidden = true
	}
	for i := range parts.Starts {
		parts.Starts[i].Hidden = true
	}
	for i := range parts.Walls {
		parts.Walls[i].Hidden = true
	}
	for i := range parts.Blocks {
		parts.Blocks[i].Hidden = true
	}
	for i := range parts.Zones {
		parts.Zones[i].Hidden = true
	}
	s := sceneOf(t, plan.From(parts), 520, 360, 1)
	if text := paint.Base(s).String(); strings.Contains(text, "hard") || strings.Contains(text, "low") {
		t.Errorf("hidden walls and blocks leave ink:\n%s", text)
	}
	text := overlayOf(s).String()
	for _, word := range []string{"wash", "Lamp", "Street", `"A"`, "HALL", "walk"} {
		if strings.Contains(text, word) {
			t.Errorf("%q is drawn though everything is hidden", word)
		}
	}
}
