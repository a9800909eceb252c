//go:build cgo && linux

package main

import (
	"fmt"
	"image"
	"io"
	"log"
	"math"
	"os"
	"os/exec"
	"path/filepath"
	"slices"
	"strings"
	"testing"
	"time"

	"github.com/jezek/xgb"
	"github.com/jezek/xgb/xproto"
	"github.com/jezek/xgb/xtest"

	"enfilade/assets"
)

// TestFeelOfWindow measures, when ENFILADE_FEEL is set, the whole time from an event to the screen in the real window: from the
// pointer's motion to the first changed pixel where the dragged observer must appear, and the same for the spot in a window that
// has nothing else, on the same display.
func TestFeelOfWindow(t *testing.T) {
	if os.Getenv("ENFILADE_FEEL") == "" {
		t.Skip("measures for a minute; make feel runs it")
	}
	s := newScreen(t)
	path := filepath.Join(t.TempDir(), "gallery.enfilade")
	if err := os.WriteFile(path, assets.SamplePlan("gallery"), 0o666); err != nil {
		t.Fatal(err)
	}
	p := newProbe(t, s.env)
	before := s.start(path)
	s.frameOf(before)
	s.until("the region is seen", func(img image.Image) bool { return washed(s.colour(img, m(12.3, 14.3))) })
	x, y := s.pixel(before.observer)
	p.move(x, y)
	time.Sleep(500 * time.Millisecond)
	p.input(xproto.ButtonPress, 1)
	p.measure("enfilade, an observer of the gallery dragged", x, y)
	p.input(xproto.ButtonRelease, 1)
	s.stop()

	empty := filepath.Join(t.TempDir(), "empty")
	if out, err := exec.Command("go", "build", "-o", empty, "./testdata/empty").CombinedOutput(); err != nil {
		t.Fatalf("%v\n%s", err, out)
	}
	s.cmd = exec.Command(empty)
	s.cmd.Env, s.cmd.Stderr = s.env, &s.log
	if err := s.cmd.Start(); err != nil {
		t.Fatal(err)
	}
	s.until("the empty window is drawn", func(img image.Image) bool { r, _, _, _ := img.At(1300, 800).RGBA(); return r>>8 == 255 })
	p.measure("a window with nothing but a spot", x, y)
}

// probe moves the pointer of a display and watches pixels of its screen, over a connection of its own.
type probe struct {
	t    *testing.T
	conn *xgb.Conn
	root xproto.Window
}

func newProbe(t *testing.T, env []string) *probe {
	t.Helper()
	xgb.Logger = log.New(io.Discard, "", 0) // it tells that the display asks for no password
	display := ""
	for _, e := range env {
		if d, ok := strings.CutPrefix(e, "DISPLAY="); ok {
			display = d
		}
	}
	c, err := xgb.NewConnDisplay(display)
	if err != nil {
		t.Fatal(err)
	}
	t.Cleanup(c.Close)
	if err := xtest.Init(c); err != nil {
		t.Fatal(err)
	}
	return &probe{t, c, xproto.Setup(c).DefaultScreen(c).Root}
}

// input presses or lets go of a button where the pointer is.
func (p *probe) input(kind, button byte) {
	if err := xtest.FakeInputChecked(p.conn, kind, button, 0, p.root, 0, 0, 0).Check(); err != nil {
		p.t.Fatal(err)
	}
}

func (p *probe) move(x, y int) {
	if err := xtest.FakeInputChecked(p.conn, xproto.MotionNotify, 0, 0, p.root, int16(x), int16(y), 0).Check(); err != nil {
		p.t.Fatal(err)
	}
}

// pixel returns the colour bytes of a pixel of the screen.
func (p *probe) pixel(x, y int) [3]byte {
	r, err := xproto.GetImage(p.conn, xproto.ImageFormatZPixmap, xproto.Drawable(p.root), int16(x), int16(y), 1, 1, math.MaxUint32).Reply()
	if err != nil {
		p.t.Fatal(err)
	}
	return [3]byte(r.Data)
}

// measure moves the pointer a hundred times about a place and tells how long each takes to be seen where it goes.
func (p *probe) measure(what string, x, y int) {
	const moves, radius, seen = 100, 40, 40
	var times []time.Duration
	for i := range moves + 5 {
		sin, cos := math.Sincos(float64(i) * 2)
		tx, ty := x+int(radius*cos), y+int(radius*sin)
		time.Sleep(120 * time.Millisecond) // what the move before set going has come to rest
		was, began := p.pixel(tx, ty), time.Now()
		p.move(tx, ty)
		for change := 0; change < seen; {
			if time.Since(began) > 5*time.Second {
				p.t.Fatalf("%s: move %d to %d, %d is not seen", what, i, tx, ty)
			}
			change = 0
			for c, v := range p.pixel(tx, ty) {
				change = max(change, int(v)-int(was[c]), int(was[c])-int(v))
			}
		}
		if i >= 5 { // the first ones warm up
			times = append(times, time.Since(began))
		}
	}
	slices.Sort(times)
	at := func(q float64) float64 { return float64(times[int(q*float64(moves-1))].Microseconds()) / 1000 }
	fmt.Printf("window: %-46s median %6.1f ms   95%% %6.1f ms   longest %6.1f ms\n", what, at(0.5), at(0.95), at(1))
}
