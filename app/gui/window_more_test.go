package gui

import (
	"os"
	"testing"
	"time"

	"fyne.io/fyne/v2"
	"fyne.io/fyne/v2/driver/desktop"
	"fyne.io/fyne/v2/test"
	"fyne.io/fyne/v2/theme"

	"enfilade/solver/plan"
)

// TestSilentSystemIsLight: what the toolkit takes a system to want that says nothing does not count; what it says does.
func TestSilentSystemIsLight(t *testing.T) {
	l := &look{choice: themeSystem, silent: true}
	if l.dark(theme.VariantDark) {
		t.Error("a system that says nothing is dark")
	}
	if l.choice = themeDark; !l.dark(theme.VariantLight) {
		t.Error("dark was chosen and is light")
	}
	r := newRig(t, realSolver)
	r.desk.hearSystem()
	r.desk.setLook(look{choice: themeSystem, silent: true})
	r.setTheme(themeSystem)
	r.until("nothing is queued", func() bool { return len(r.queue) == 0 })
	if !r.look.silent {
		t.Error("choosing in the menu was taken for the system's word")
	}
	r.app.Settings().SetTheme(r.look) // as the toolkit does when the system speaks
	r.until("the system is heard", func() bool { return !r.look.silent })
	if !r.look.dark(theme.VariantDark) || r.desk.look != r.look {
		t.Error("the system wants dark and gets light")
	}
}

func alt(v desktop.Keyable, between ...fyne.KeyName) {
	v.KeyDown(&fyne.KeyEvent{Name: desktop.KeyAltLeft})
	for _, k := range between {
		v.KeyDown(&fyne.KeyEvent{Name: k})
		v.KeyUp(&fyne.KeyEvent{Name: k})
	}
	v.KeyUp(&fyne.KeyEvent{Name: desktop.KeyAltLeft})
}

// TestAltAlone opens the first menu and closes it again; Alt with another key, or with a press of the mouse, does nothing.
func TestAltAlone(t *testing.T) {
	r := newGallery(t)
	alt(r.view)
	if !r.bar.drop.Visible() || r.bar.drop.at != 0 {
		t.Fatal("Alt alone opened no menu")
	}
	alt(r.bar.drop)
	if r.bar.drop.Visible() {
		t.Error("Alt alone did not close the menu")
	}
	if alt(r.view, fyne.KeyX); r.bar.drop.Visible() {
		t.Error("Alt with X opened a menu")
	}
	r.view.KeyDown(&fyne.KeyEvent{Name: desktop.KeyAltLeft})
	r.click(11.35, 8.75)
	r.view.KeyUp(&fyne.KeyEvent{Name: desktop.KeyAltLeft})
	if r.bar.drop.Visible() {
		t.Error("a click with Alt opened a menu")
	}
}

// TestFreshRows: after a wall has moved, the rows whose figures have changed show it for a while and no others; with less
// motion none.
func TestFreshRows(t *testing.T) {
	for _, reduced := range []bool{false, true} {
		r := newGallery(t)
		if reduced {
			r.toggleStill()
		}
		clock := time.Now()
		r.now = func() time.Time { return clock }
		fresh := func() (n int) {
			for _, x := range r.table.rows {
				if x.fresh {
					n++
				}
			}
			return n
		}
		if fresh() != 0 {
			t.Fatal("rows of a plan just opened are shown as changed")
		}
		before := append([]row(nil), r.table.rows...)
		x, _ := r.session.Plan().Block("B26") // the case in the east hall
		pts := x.Ring.Points()
		for i := range pts {
			pts[i].Y -= 6000
		}
		x.Ring = plan.ChainOf(pts...)
		if err := r.session.Do(set(x)); err != nil {
			t.Fatal(err)
		}
		r.settle()
		for i, x := range r.table.rows {
			changed := x.first != before[i].first || x.full != before[i].full
			if x.fresh != (changed && !reduced) {
				t.Errorf("%s to %s: %s, %s, before %s, %s: shown as changed %v", x.from, x.to, x.first, x.full, before[i].first, before[i].full, x.fresh)
			}
		}
		if n := fresh(); !reduced && (n == 0 || n == len(r.table.rows)) {
			t.Errorf("%d rows changed, too many or too few to tell", n)
		}
		clock = clock.Add(freshTime)
		r.table.settle()
		if fresh() != 0 {
			t.Error("rows are shown as changed for ever")
		}
	}
}

// TestTableGroups: the rows of a start stand under its heading, which chooses the start.
func TestTableGroups(t *testing.T) {
	r := newGallery(t)
	if n := len(r.table.lines); n != 16 || r.table.lines[0] != -1 || r.table.lines[1] != 0 || r.table.lines[8] != -8 || r.table.lines[9] != 7 {
		t.Fatalf("lines %v", r.table.lines)
	}
	line := newTableRow(r.table)
	line.putHead(r.table.rows[7])
	if line.from.text != "from South stair" || !line.head {
		t.Errorf("heading %q", line.from.text)
	}
	target := r.results.target
	line.Tapped(nil)
	if r.results.start != "S2" || r.results.target != target {
		t.Errorf("the heading chose %s to %s", r.results.start, r.results.target)
	}
	line.put(r.table.rows[3])
	if line.head || line.walk.text != "Great lens" {
		t.Errorf("a line of the list used again is %+v", line)
	}
}

// TestScale: the size is remembered and taken up at the next start, unless the environment says otherwise.
func TestScale(t *testing.T) {
	t.Setenv(scaleEnv, "")
	r := newRig(t, realSolver)
	r.setScale(1.5)
	if got := r.app.Preferences().Float(prefScale); got != 1.5 || os.Getenv(scaleEnv) != "1.5" || scaleNow() != 1.5 {
		t.Errorf("remembered %v, the toolkit is told %q", got, os.Getenv(scaleEnv))
	}
	t.Setenv(scaleEnv, "")
	startScale(r.app.Preferences())
	if scaleNow() != 1.5 {
		t.Errorf("the next start draws at %v", scaleNow())
	}
	t.Setenv(scaleEnv, "2")
	startScale(r.app.Preferences())
	if scaleNow() != 2 {
		t.Errorf("against the environment the start draws at %v", scaleNow())
	}
}

// TestWheelOverTheForm: the wheel scrolls the form also where a text field is under the pointer; another item's form begins at
// its top, a change of the same one stays where it is.
func TestWheelOverTheForm(t *testing.T) {
	r := newGallery(t)
	over := r.line("Title").entry
	at := r.app.Driver().AbsolutePositionForObject(over).AddXY(20, 10)
	test.Scroll(r.win.Canvas(), at, 0, -200)
	y := r.form.scroll.Offset.Y
	if y < 100 {
		t.Fatalf("the form is scrolled by %v", y)
	}
	if err := r.line("Seen is").field.pick(1); err != nil {
		t.Fatal(err)
	}
	if r.form.scroll.Offset.Y != y {
		t.Errorf("after a field has come the form is scrolled by %v, want %v", r.form.scroll.Offset.Y, y)
	}
	r.click(11.35, 8.75)
	if r.form.scroll.Offset.Y != 0 {
		t.Errorf("another form begins at %v", r.form.scroll.Offset.Y)
	}
}
