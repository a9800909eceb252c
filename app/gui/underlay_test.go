package gui

import (
	"bytes"
	"image"
	"image/color"
	"image/png"
	"os"
	"path/filepath"
	"strings"
	"testing"

	"fyne.io/fyne/v2"

	"enfilade/canvas/tool"
	"enfilade/solver/plan"
)

// scan writes a picture of 400 by 300 pixels: white, with a black bar along its lower edge.
func scan(t *testing.T, path string) string {
	t.Helper()
	img := image.NewGray(image.Rect(0, 0, 400, 300))
	for y := range 300 {
		for x := range 400 {
			if y < 250 {
				img.SetGray(x, y, color.Gray{Y: 255})
			}
		}
	}
	var b bytes.Buffer
	if err := png.Encode(&b, img); err != nil {
		t.Fatal(err)
	}
	writeFile(t, path, b.Bytes())
	return path
}

func (r *rig) underlay() plan.Underlay {
	r.t.Helper()
	u := r.session.Plan().Sheet().Underlay
	if u == nil {
		r.t.Fatal("there is no underlay")
	}
	return *u
}

func TestUnderlayIsLaidSavedAndOpened(t *testing.T) {
	r := newRig(t, realSolver)
	dir := t.TempDir()
	r.dropped([]string{scan(t, filepath.Join(dir, "scan.png"))})
	u := r.underlay()
	if _, ok := r.tool.(*tool.Underlay); !ok || r.first.box.Visible() || len(r.session.Selection()) != 1 || r.form.title.text != "Underlay" {
		t.Errorf("laid under with tool %T, form %q", r.tool, r.form.title.text)
	}
	x, y := float64(u.At.X)/10000, float64(u.At.Y)/10000
	m := u.MMPerPixel / 1000
	bar, paper := r.pixel(x+200*m, y+25*m), r.pixel(x+200*m, y+200*m)
	if bar.R > 200 || paper.R < 240 {
		t.Errorf("the bar is %v, the paper %v", bar, paper)
	}
	path := filepath.Join(dir, "a.enfilade")
	r.write(path, nil)
	data, _ := os.ReadFile(path)
	if !strings.Contains(string(data), `"underlay": {"image":"scan.png"`) || r.notice.box.Visible() {
		t.Errorf("saved as\n%s", data)
	}
	r.newPlan()
	r.open(path)
	if r.underlay().Image != filepath.Join(dir, "scan.png") || r.under.photo == nil || r.session.Dirty() {
		t.Errorf("opened as %+v", r.underlay())
	}
	// Saved elsewhere, a copy is offered, once.
	far := filepath.Join(t.TempDir(), "c.enfilade")
	r.write(far, nil)
	if !r.notice.box.Visible() {
		t.Error("no copy is offered")
	}
	r.notice.way.Objects[1].(*pushButton).tapped()
	if r.write(far, nil); r.notice.box.Visible() {
		t.Error("a copy is offered again at the next save")
	}
	// Saved elsewhere, the path is another one, and a copy is offered.
	there := filepath.Join(t.TempDir(), "b.enfilade")
	r.write(there, nil)
	data, _ = os.ReadFile(there)
	if strings.Contains(string(data), `"image":"scan.png"`) || !r.notice.box.Visible() {
		t.Fatalf("notice %q, saved as\n%s", r.notice.text.text, data)
	}
	r.notice.way.Objects[0].(*pushButton).tapped()
	if _, err := os.Stat(filepath.Join(filepath.Dir(there), "scan.png")); err != nil || !r.session.Dirty() {
		t.Errorf("not copied, %v", err)
	}
	r.save(nil)
	if data, _ = os.ReadFile(there); !strings.Contains(string(data), `"image":"scan.png"`) {
		t.Errorf("after copying saved as\n%s", data)
	}
}

func TestMissingUnderlayIsToldAndThePlanOpens(t *testing.T) {
	r := newRig(t, realSolver)
	path := galleryFile(t)
	data, _ := os.ReadFile(path)
	writeFile(t, path, bytes.Replace(data, []byte(`"display_unit"`), []byte(`"underlay": {"image":"gone.png","at":[0,0]}, "display_unit"`), 1))
	r.open(path)
	if !r.notice.box.Visible() || !strings.Contains(r.notice.text.text, filepath.Join(filepath.Dir(path), "gone.png")) {
		t.Errorf("notice %q", r.notice.text.text)
	}
	if r.session.Plan().NumBlocks() == 0 || r.session.Dirty() {
		t.Error("the plan did not open as it is")
	}
	before := text(t, r.session.Plan())
	r.notice.way.Objects[1].(*pushButton).tapped()
	if r.session.Plan().Sheet().Underlay != nil {
		t.Error("not taken away")
	}
	r.undo()
	if text(t, r.session.Plan()) != before {
		t.Error("undo does not bring it back")
	}
}

func TestUnderlayFaults(t *testing.T) {
	r := newGallery(t)
	path := filepath.Join(t.TempDir(), "scan.png")
	writeFile(t, path, []byte("no picture"))
	r.layUnder(path)
	if !strings.Contains(r.notice.text.text, "PNG") || r.session.Plan().Sheet().Underlay != nil {
		t.Errorf("notice %q", r.notice.text.text)
	}
}

// TestUnderlayScaleAndTurn: the form's buttons take the tools in hand; two clicks and a typed distance set the scale.
func TestUnderlayScaleAndTurn(t *testing.T) {
	r := newRig(t, realSolver)
	r.layUnder(scan(t, filepath.Join(t.TempDir(), "scan.png")))
	u := r.underlay()
	x, y, m := float64(u.At.X)/10000, float64(u.At.Y)/10000, u.MMPerPixel/1000
	r.action("Set the scale…")
	r.click(x+100*m, y+100*m)
	r.click(x+300*m, y+100*m)
	r.runes("5.00")
	r.keys(fyne.KeyReturn)
	if got := r.underlay().MMPerPixel; got < 24.8 || got > 25.2 {
		t.Errorf("200 pixels for 5 m are %g mm each", got)
	}
	u = r.underlay()
	x, y, m = float64(u.At.X)/10000, float64(u.At.Y)/10000, u.MMPerPixel/1000
	r.action("Straighten…")
	r.click(x+100*m, y+100*m)
	r.click(x+300*m, y+120*m)
	if got := r.underlay().Turn; got > -5.4 || got < -6 {
		t.Errorf("turned by %g°", got)
	}
	r.action("Lock")
	if !r.underlay().Locked || r.find("Set the scale…") != nil {
		t.Error("not locked")
	}
	r.keys(fyne.KeyEscape)
	if _, ok := r.tool.(*tool.Select); !ok || len(r.session.Selection()) != 0 {
		t.Errorf("Escape leads back to %T", r.tool)
	}
	r.underlayOrAsk()
	if r.modal != nil || r.form.title.text != "Underlay" {
		t.Error("the menu does not lead to the form")
	}
	r.action("Unlock")
	r.action("Hide")
	if !r.underlay().Hidden {
		t.Error("not hidden")
	}
	r.typedKey(fyne.KeyDelete)
	if _, ok := r.tool.(*tool.Select); !ok || r.session.Plan().Sheet().Underlay != nil {
		t.Errorf("deleted with %T in hand", r.tool)
	}
}

// TestUnderlayFollowsTheDrag: while it is dragged the picture moves, and Escape puts it back.
func TestUnderlayFollowsTheDrag(t *testing.T) {
	r := newRig(t, realSolver)
	r.layUnder(scan(t, filepath.Join(t.TempDir(), "scan.png")))
	u := r.underlay()
	x, y, m := float64(u.At.X)/10000, float64(u.At.Y)/10000, u.MMPerPixel/1000
	r.press(x+200*m, y+200*m)
	r.dragTo(x+200*m, y+230*m)
	r.dragTo(x+200*m, y+260*m)
	if k := keyOf(r.picture.scene()); k.underlay == nil || k.underlay.At == u.At {
		t.Error("the base does not follow")
	}
	r.keys(fyne.KeyEscape)
	if r.underlay().At != u.At {
		t.Error("Escape does not put it back")
	}
}

// action presses a button of the form.
func (r *rig) action(text string) {
	r.t.Helper()
	b := r.find(text)
	if b == nil {
		r.t.Fatalf("the form has no button %q", text)
	}
	b.tapped()
}

// find returns a button of the form, nil when there is none.
func (r *rig) find(text string) *pushButton {
	var found *pushButton
	var walk func(o fyne.CanvasObject)
	walk = func(o fyne.CanvasObject) {
		switch x := o.(type) {
		case *pushButton:
			if x.text.text == text {
				found = x
			}
		case *fyne.Container:
			for _, c := range x.Objects {
				walk(c)
			}
		}
	}
	walk(r.form.page)
	return found
}

// TestUnderlayThatNeverEnds: a plan may name a device as its picture; it is told and not read.
func TestUnderlayThatNeverEnds(t *testing.T) {
	if _, err := os.Stat("/dev/zero"); err != nil {
		t.Skip("there is no such device here")
	}
	if _, err := readPhoto("/dev/zero"); err == nil || !strings.Contains(err.Error(), "is a device") {
		t.Errorf("%v", err)
	}
}

func TestUnderlayIsPickedByAClick(t *testing.T) {
	r := newRig(t, realSolver)
	r.dropped([]string{scan(t, filepath.Join(t.TempDir(), "scan.png"))})
	r.keys(fyne.KeyEscape)
	u := r.underlay()
	m := u.MMPerPixel / 1000
	x, y := float64(u.At.X)/10000+200*m, float64(u.At.Y)/10000+150*m
	r.click(x, y)
	if r.form.title.text != "Underlay" {
		t.Fatalf("a click on the picture shows the form of %q", r.form.title.text)
	}
	r.runes("w") // what is drawn over it is picked before it
	r.click(x+1, y)
	r.click(x+3, y)
	r.keys(fyne.KeyReturn, fyne.KeyEscape)
	r.click(x+2, y)
	if r.form.title.text != "Wall W1" {
		t.Errorf("a click on the wall over it shows the form of %q", r.form.title.text)
	}
}
