package paint_test

import (
	"strings"
	"testing"

	"enfilade/canvas/paint"
)

// TestLayers: each layer takes its own things out of the picture, and puts nothing else in.
func TestLayers(t *testing.T) {
	p := named(t, twoRooms)
	s := sceneOf(t, p, 520, 360, 1)
	steps := func(l *paint.List) map[string]int {
		n := map[string]int{}
		for _, line := range strings.Split(l.String(), "\n") {
			n[line]++
		}
		return n
	}
	base, overlay := steps(paint.Base(s)), steps(overlayOf(s))
	for layer, word := range map[paint.Layers]string{
		paint.LayerRegions: "wash", paint.LayerLabels: `"Lamp"`, paint.LayerRulers: " free", paint.LayerApproaches: "round",
		paint.LayerFullWalks: "", paint.LayerSightLines: "dash 2-3",
	} {
		s.Without = layer
		got := steps(overlayOf(s))
		gone := 0
		for line, n := range overlay {
			if got[line] < n {
				gone++
			}
		}
		if gone == 0 {
			t.Errorf("without layer %b nothing is gone", layer)
		}
		for line := range got {
			if word == "wash" || word == " free" || word == `"Lamp"` || word == "dash 2-3" {
				if strings.Contains(line, word) {
					t.Errorf("without layer %b there still is %q", layer, line)
				}
			}
			if overlay[line] == 0 && layer != paint.LayerRulers { // without rulers the slip has more room
				t.Errorf("without layer %b there is also %q", layer, line)
			}
		}
	}
	s.Without = paint.LayerGrid
	if got := steps(paint.Base(s)); len(got) >= len(base) {
		t.Errorf("without the grid %d kinds of steps, with it %d", len(got), len(base))
	}
}

// TestPickedRegionsAndWalks: borders and thin walks are those that were picked.
func TestPickedRegionsAndWalks(t *testing.T) {
	s := sceneOf(t, named(t, twoRooms), 520, 360, 1)
	count := func() int { return strings.Count(overlayOf(s).String(), "\nstroke") }
	one := count()
	s.Regions = []string{"O2"}
	if two := count(); two <= one {
		t.Errorf("with another region %d strokes, with one %d", two, one)
	}
	s.Regions = []string{"O1"} // the chosen one
	if same := count(); same != one {
		t.Errorf("the chosen region is drawn twice: %d strokes, want %d", same, one)
	}
	s.Regions = nil
	s.WalkChoice = paint.WalksNone
	none := count()
	s.WalkChoice = paint.WalksPicked
	if picked := count(); picked != none {
		t.Errorf("with no walk picked %d strokes, want %d", picked, none)
	}
	for _, a := range s.Result.Approaches {
		s.Walks = append(s.Walks, paint.Walk{Start: a.Start, Target: a.Target})
	}
	if all := count(); all <= none || len(s.Walks) < 2 {
		t.Errorf("with %d walks picked %d strokes, with none %d", len(s.Walks), all, none)
	}
}
