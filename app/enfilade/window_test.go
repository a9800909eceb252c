//go:build cgo && linux

package main

import (
	"bytes"
	"fmt"
	"image"
	"image/png"
	"os"
	"os/exec"
	"path/filepath"
	"strconv"
	"strings"
	"testing"
	"time"

	"enfilade/assets"
	"enfilade/canvas/paint"
	"enfilade/canvas/view"
	"enfilade/fileio/planfile"
	"enfilade/solver/exact"
	"enfilade/solver/plan"
)

// TestRealWindow starts the built program under a display of its own and uses it as a person would: draws a wall across the
// view, drags the observer, sees the region change, saves, and finds the same plan when it opens the file again.
func TestRealWindow(t *testing.T) {
	s := newScreen(t)
	path := filepath.Join(t.TempDir(), "gallery.enfilade")
	if err := os.WriteFile(path, assets.SamplePlan("gallery"), 0o666); err != nil {
		t.Fatal(err)
	}
	before := s.start(path)
	s.frameOf(before)

	floor, behind := paint.Light().Floor, m(12.3, 14.3)
	s.until("the tide clock's wall is seen", func(img image.Image) bool { return washed(s.colour(img, behind)) })
	s.key("w")
	s.click(m(9.8, 12.5))
	s.click(m(14.2, 12.5))
	s.key("Return")
	s.until("the new wall hides the floor behind it", func(img image.Image) bool { return s.colour(img, behind) == [3]uint8{floor.R, floor.G, floor.B} })

	s.key("Escape")
	s.key("Escape") // lets go of the selection
	eye := m(19.3, 10)
	s.until("the east hall's end is not seen", func(img image.Image) bool { return !washed(s.colour(img, m(22.3, 10.3))) })
	s.drag(before.observer, eye)
	s.until("the region follows the observer", func(img image.Image) bool { return washed(s.colour(img, m(22.3, 10.3))) })

	s.key("ctrl+s")
	saved := s.saved(path, func(p *plan.Plan) bool {
		o, _ := p.Observer("O1")
		return p.NumWalls() == before.NumWalls()+1 && o.At != before.observer
	})
	if o, _ := saved.Observer("O1"); exact.Dist(o.At, eye) > 1500 {
		t.Errorf("the observer was dropped at %v, want within 0.15 m of %v", o.At, eye)
	}
	for _, w := range saved.Walls() {
		if _, old := before.Wall(w.ID); !old && (w.Line.Len() != 2 || exact.Dist(w.Line.At(0), m(9.8, 12.5)) > 1500 || exact.Dist(w.Line.At(1), m(14.2, 12.5)) > 1500) {
			t.Errorf("the drawn wall runs through %v", w.Line.Points())
		}
	}
	s.stop()

	text, err := os.ReadFile(path)
	if err != nil {
		t.Fatal(err)
	}
	s.start(path)
	s.until("the saved plan is shown", func(img image.Image) bool { return washed(s.colour(img, m(22.3, 10.3))) })
	if err := os.Remove(path); err != nil {
		t.Fatal(err)
	}
	s.key("ctrl+s") // writes what was opened
	s.saved(path, func(*plan.Plan) bool { return true })
	if again, err := os.ReadFile(path); err != nil || !bytes.Equal(again, text) {
		t.Errorf("opened and saved again the file differs, %v", err)
	}
}

// m returns the grid point at x, y metres.
func m(x, y float64) exact.Pt { return exact.Pt{X: int32(x * 10000), Y: int32(y * 10000)} }

// washed reports whether a colour is floor under the first observer's wash: bluer than red by more than paper is.
func washed(c [3]uint8) bool { return int(c[2])-int(c[0]) > 12 }

// screen is a display with the program on it.
type screen struct {
	t       *testing.T
	program string // the built binary
	env     []string
	config  string // folder of the program's settings
	cmd     *exec.Cmd
	log     bytes.Buffer
	cam     view.Camera // of the picture in the window
}

// opened is the plan that was opened.
type opened struct {
	*plan.Plan
	observer exact.Pt
}

// Where the picture lies in the window: right of the rail, below the menu bar.
const pictureX, pictureY = 55, 31

// newScreen builds the program and starts a display for it.
func newScreen(t *testing.T) *screen {
	t.Helper()
	return newScreenOf(t, "1440x900")
}

// newScreenOf is newScreen with a display of another size.
func newScreenOf(t *testing.T, size string) *screen {
	t.Helper()
	for _, tool := range []string{"Xvfb", "xdotool", "import"} {
		if _, err := exec.LookPath(tool); err != nil {
			t.Skipf("%s is not installed", tool)
		}
	}
	if testing.Short() {
		t.Skip("drives a real window")
	}
	dir := t.TempDir()
	s := &screen{t: t, program: filepath.Join(dir, "enfilade"), config: filepath.Join(dir, "config")}
	if out, err := exec.Command("go", "build", "-o", s.program, ".").CombinedOutput(); err != nil {
		t.Fatalf("the program does not build: %v\n%s", err, out)
	}
	r, w, err := os.Pipe()
	if err != nil {
		t.Fatal(err)
	}
	x := exec.Command("Xvfb", "-displayfd", "3", "-screen", "0", size+"x24", "-nolisten", "tcp")
	x.ExtraFiles = []*os.File{w}
	if err := x.Start(); err != nil {
		t.Fatal(err)
	}
	t.Cleanup(func() {
		s.stop()
		_ = x.Process.Kill() // it may have ended by itself
		_ = x.Wait()
	})
	w.Close() // the display has its own
	number := make([]byte, 16)
	n, err := r.Read(number)
	if err != nil {
		t.Fatalf("the display did not start: %v", err)
	}
	s.env = append(os.Environ(), "DISPLAY=:"+strings.TrimSpace(string(number[:n])), "WAYLAND_DISPLAY=", "ENFILADE_THEME=light",
		"XDG_CONFIG_HOME="+s.config, "LANG=C.UTF-8", "FYNE_SCALE=1")
	return s
}

// start opens a plan in the program's window.
func (s *screen) start(path string) opened {
	s.t.Helper()
	s.cmd = exec.Command(s.program, path)
	s.cmd.Env, s.cmd.Stderr = s.env, &s.log
	if err := s.cmd.Start(); err != nil {
		s.t.Fatal(err)
	}
	p := s.read(path)
	o, _ := p.Observer("O1")
	s.until("the window is drawn", func(img image.Image) bool {
		r, _, _, _ := img.At(720, 15).RGBA()
		return r>>8 == uint32(paint.Light().Chrome.R)
	})
	return opened{p, o.At}
}

// frameOf works out where the picture shows what: the whole plan, fitted into what the window leaves.
func (s *screen) frameOf(p opened) {
	// The picture ends at the right column and at the rule above the walk.
	img := s.shot()
	rule := paint.Light().Rule
	bottom := 860
	for ; bottom > 700; bottom-- {
		if r, g, b, _ := img.At(400, bottom).RGBA(); uint8(r>>8) == rule.R && uint8(g>>8) == rule.G && uint8(b>>8) == rule.B {
			break
		}
	}
	s.cam = view.Fit(paint.Bounds(p.Plan), 1440-320-pictureX, bottom-pictureY, 1)
}

// pixel returns where a point of the plan is on the screen.
func (s *screen) pixel(p exact.Pt) (x, y int) {
	px, py := s.cam.Pixel(p)
	return int(px) + pictureX, int(py) + pictureY
}

func (s *screen) colour(img image.Image, p exact.Pt) [3]uint8 {
	r, g, b, _ := img.At(s.pixel(p)).RGBA()
	return [3]uint8{uint8(r >> 8), uint8(g >> 8), uint8(b >> 8)}
}

func (s *screen) run(name string, args ...string) []byte {
	s.t.Helper()
	cmd := exec.Command(name, args...)
	cmd.Env = s.env
	out, err := cmd.Output()
	if err != nil {
		s.t.Fatalf("%s %s: %v\n%s", name, strings.Join(args, " "), err, s.log.String())
	}
	return out
}

// shot returns what is on the screen.
func (s *screen) shot() image.Image {
	s.t.Helper()
	img, err := png.Decode(bytes.NewReader(s.run("import", "-window", "root", "png:-")))
	if err != nil {
		s.t.Fatal(err)
	}
	return img
}

// pause gives the program time for one frame, as a person would.
const pause = 150 * time.Millisecond

func (s *screen) key(name string) {
	s.run("xdotool", "key", name)
	time.Sleep(pause)
}

func (s *screen) moveTo(p exact.Pt) {
	x, y := s.pixel(p)
	s.run("xdotool", "mousemove", strconv.Itoa(x), strconv.Itoa(y))
	time.Sleep(pause)
}

func (s *screen) click(p exact.Pt) {
	s.moveTo(p)
	s.run("xdotool", "click", "1")
	time.Sleep(pause)
}

// drag drags from one point of the plan to another in ten steps.
func (s *screen) drag(from, to exact.Pt) {
	s.moveTo(from)
	s.run("xdotool", "mousedown", "1")
	for i := int32(1); i <= 10; i++ {
		s.moveTo(exact.Pt{X: from.X + (to.X-from.X)/10*i, Y: from.Y + (to.Y-from.Y)/10*i})
	}
	s.run("xdotool", "mouseup", "1")
	time.Sleep(pause)
}

// until waits for something to be seen on the screen.
func (s *screen) until(what string, seen func(image.Image) bool) {
	s.t.Helper()
	end := time.Now().Add(60 * time.Second)
	var img image.Image
	for time.Now().Before(end) {
		if img = s.shot(); seen(img) {
			return
		}
		time.Sleep(pause)
	}
	left := filepath.Join(os.TempDir(), fmt.Sprintf("enfilade-window-%d.png", os.Getpid()))
	var b bytes.Buffer
	if png.Encode(&b, img) == nil && os.WriteFile(left, b.Bytes(), 0o666) == nil {
		what += "; the screen is in " + left
	}
	s.t.Fatalf("not within a minute: %s\n%s", what, s.log.String())
}

func (s *screen) read(path string) *plan.Plan {
	s.t.Helper()
	f, err := os.Open(path)
	if err != nil {
		s.t.Fatal(err)
	}
	defer f.Close()
	p, err := planfile.Read(f, path)
	if err != nil {
		s.t.Fatal(err)
	}
	return p
}

// saved waits until the file holds a plan that is right. Saving replaces the file whole, so what is read is never half a
// plan.
func (s *screen) saved(path string, right func(*plan.Plan) bool) *plan.Plan {
	s.t.Helper()
	end := time.Now().Add(30 * time.Second)
	for time.Now().Before(end) {
		if _, err := os.Stat(path); err == nil {
			if p := s.read(path); right(p) {
				return p
			}
		}
		time.Sleep(pause)
	}
	s.t.Fatalf("the file was not saved within 30 s\n%s", s.log.String())
	return nil
}

// stop ends the program.
func (s *screen) stop() {
	if s.cmd != nil {
		_ = s.cmd.Process.Kill() // it may have ended by itself
		_ = s.cmd.Wait()
		s.cmd = nil
	}
}
