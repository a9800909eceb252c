//go:build cgo && linux

package main

import (
	"image"
	"os"
	"path/filepath"
	"testing"
	"time"

	"enfilade/canvas/paint"
	"enfilade/solver/exact"
	"enfilade/solver/plan"
)

// TestRealWindowDrawsARoomByTypedLengths draws a room of four walls and a door in it with the keyboard, but for where the
// first corner lies and which wall the door is in, and finds the typed measures in the saved file.
func TestRealWindowDrawsARoomByTypedLengths(t *testing.T) {
	s := newScreen(t)
	path := filepath.Join(t.TempDir(), "room.enfilade")
	if err := os.WriteFile(path, []byte(`{"enfilade": 1}`), 0o666); err != nil {
		t.Fatal(err)
	}
	s.frameOf(s.start(path))

	poche := paint.Light().Poche
	inked := func(p exact.Pt) func(image.Image) bool {
		return func(img image.Image) bool { return s.colour(img, p) == [3]uint8{poche.R, poche.G, poche.B} }
	}
	s.key("w")
	s.click(m(4, 4))
	for _, side := range [][2]string{{"4.2", "0"}, {"3", "90"}, {"4,2", "180"}, {"300 cm", "270"}} {
		s.typed(side[0])
		s.key("Tab")
		s.typed(side[1])
		s.key("Return")
	}
	s.until("the room's far wall is drawn", inked(m(6, 7)))
	s.key("d")
	s.moveTo(m(5, 4))
	s.typed("0.8")
	s.key("Tab")
	s.typed("0.5")
	s.key("Return")
	s.until("the door is cut", func(img image.Image) bool { return !inked(m(4.9, 4))(img) })

	s.key("ctrl+s")
	p := s.saved(path, func(p *plan.Plan) bool { return p.NumWalls() == 1 && p.NumOpenings() == 1 })
	w, _ := p.Wall("W1")
	if !w.Line.Closed() || w.Line.Len() != 5 {
		t.Fatalf("the room is %v", w.Line.Points())
	}
	for i, want := range []exact.Vec{{X: 42000}, {Y: 30000}, {X: -42000}, {Y: -30000}} {
		if got := w.Line.At(i + 1).Sub(w.Line.At(i)); got != want {
			t.Errorf("side %d runs by %v, want %v", i, got, want)
		}
	}
	for _, o := range p.Openings() {
		if o.Segment != 0 || o.At != 5000 || o.Width != 8000 || o.Leaf != plan.SolidLeaf {
			t.Errorf("door %+v, want 0.80 m wide, 0.50 m from the corner", o)
		}
	}
}

// typed types a text.
func (s *screen) typed(text string) {
	s.run("xdotool", "type", "--delay", "40", text)
	time.Sleep(pause)
}
