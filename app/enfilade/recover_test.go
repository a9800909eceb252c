//go:build cgo && linux

package main

import (
	"bytes"
	"image"
	"os"
	"os/exec"
	"path/filepath"
	"syscall"
	"testing"
	"time"

	"enfilade/assets"
	"enfilade/canvas/paint"
	"enfilade/fileio/planfile"
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

// TestSignalsKeepTheWork: told to end, and when its terminal hangs up, the program copies unsaved work at once and ends.
func TestSignalsKeepTheWork(t *testing.T) {
	s := newScreen(t)
	path := filepath.Join(t.TempDir(), "gallery.enfilade")
	if err := os.WriteFile(path, assets.SamplePlan("gallery"), 0o666); err != nil {
		t.Fatal(err)
	}
	for _, sig := range []syscall.Signal{syscall.SIGTERM, syscall.SIGHUP} {
		before := s.start(path)
		s.frameOf(before)
		floor, behind := paint.Light().Floor, m(12.3, 14.3)
		s.until("the tide clock's wall is seen", func(img image.Image) bool { return washed(s.colour(img, behind)) })
		s.key("w")
		s.click(m(9.8, 12.5))
		s.click(m(14.2, 12.5))
		s.key("Return")
		s.until("the new wall hides the floor behind it", func(img image.Image) bool { return s.colour(img, behind) == [3]uint8{floor.R, floor.G, floor.B} })
		for _, old := range s.copies() { // one may just have been made in its turn
			if err := os.Remove(old); err != nil {
				t.Fatal(err)
			}
		}
		s.key("o") // an observer more, so that there is something new to keep
		s.click(m(3, 3))
		if err := s.cmd.Process.Signal(sig); err != nil {
			t.Fatal(err)
		}
		ended := make(chan error, 1)
		go func(p *exec.Cmd) { ended <- p.Wait() }(s.cmd)
		select {
		case <-ended:
		case <-time.After(20 * time.Second):
			t.Fatalf("%v: the program goes on", sig)
		}
		s.cmd = nil
		p := planOf(t, s.kept(time.Second))
		if p.NumWalls() != before.NumWalls()+1 || p.NumObservers() != before.NumObservers()+1 {
			t.Errorf("%v: kept %d walls and %d observers", sig, p.NumWalls(), p.NumObservers())
		}
		for _, old := range s.copies() {
			if err := os.Remove(old); err != nil {
				t.Fatal(err)
			}
		}
	}
}

func planOf(t *testing.T, text []byte) *plan.Plan {
	t.Helper()
	p, err := planfile.Read(bytes.NewReader(text), "copy")
	if err != nil {
		t.Fatal(err)
	}
	return p
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
