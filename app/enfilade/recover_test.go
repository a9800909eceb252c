//go:build cgo && linux

package main

import (
	"bytes"
	"image"
	"os"
	"path/filepath"
	"testing"
	"time"

	"enfilade/assets"
	"enfilade/canvas/paint"
	"enfilade/solver/exact"
	"enfilade/solver/plan"
)

// TestRecoversWhatWasKilled draws a wall in the real window, waits until its work is kept, kills the program without a
// chance, starts it again, takes up the offer, and finds the same plan; the file is untouched until it is saved.
func TestRecoversWhatWasKilled(t *testing.T) {
	s := newScreen(t)
	path := filepath.Join(t.TempDir(), "gallery.enfilade")
	original := assets.SamplePlan("gallery")
	if err := os.WriteFile(path, original, 0o666); err != nil {
		t.Fatal(err)
	}
	before := s.start(path)
	s.frameOf(before)
	floor, behind := paint.Light().Floor, m(12.3, 14.3)
	hidden := func(img image.Image) bool { return s.colour(img, behind) == [3]uint8{floor.R, floor.G, floor.B} }
	s.until("the tide clock's wall is seen", func(img image.Image) bool { return washed(s.colour(img, behind)) })
	s.key("w")
	s.click(m(9.8, 12.5))
	s.click(m(14.2, 12.5))
	s.key("Return")
	s.until("the new wall hides the floor behind it", hidden)
	kept := s.kept(40 * time.Second)
	s.stop() // by SIGKILL

	if now, err := os.ReadFile(path); err != nil || !bytes.Equal(now, original) {
		t.Fatalf("the file was touched, %v", err)
	}
	s.start(path)
	s.until("the offer lies over the window", func(img image.Image) bool {
		panel := paint.Light().Panel
		return s.colour(img, m(12.3, 9)) == [3]uint8{panel.R, panel.G, panel.B}
	})
	s.key("Return")
	s.until("the wall is there again", hidden)
	if now, err := os.ReadFile(path); err != nil || !bytes.Equal(now, original) {
		t.Fatalf("the file was written before it was saved, %v", err)
	}
	s.key("ctrl+s")
	s.saved(path, func(p *plan.Plan) bool { return p.NumWalls() == before.NumWalls()+1 })
	now, err := os.ReadFile(path)
	if err != nil || !bytes.Equal(now, kept) {
		t.Errorf("saved\n%s\nwant what was kept\n%s", now, kept)
	}
	for _, w := range s.read(path).Walls() {
		if _, old := before.Wall(w.ID); !old && exact.Dist(w.Line.At(0), m(9.8, 12.5)) > 1500 {
			t.Errorf("the recovered wall runs through %v", w.Line.Points())
		}
	}
	end := time.Now().Add(10 * time.Second)
	for len(s.copies()) > 0 && time.Now().Before(end) {
		time.Sleep(pause)
	}
	if left := s.copies(); len(left) > 0 {
		t.Errorf("left behind after saving: %v", left)
	}
}

// copies returns the files in which unsaved work is kept.
func (s *screen) copies() []string {
	s.t.Helper()
	list, err := filepath.Glob(filepath.Join(s.config, "enfilade", "unsaved", "*.kept"))
	if err != nil {
		s.t.Fatal(err)
	}
	return list
}

// kept waits until the one window's unsaved work is kept, and returns the plan as its file would hold it.
func (s *screen) kept(limit time.Duration) []byte {
	s.t.Helper()
	for end := time.Now().Add(limit); time.Now().Before(end); time.Sleep(pause) {
		if list := s.copies(); len(list) == 1 {
			data, err := os.ReadFile(list[0])
			if err != nil {
				s.t.Fatal(err)
			}
			_, body, _ := bytes.Cut(data, []byte{'\n'})
			return body
		}
	}
	s.t.Fatalf("unsaved work was not kept within %v\n%s", limit, s.log.String())
	return nil
}
