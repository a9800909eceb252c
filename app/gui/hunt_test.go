package gui

import (
	"bytes"
	"context"
	"flag"
	"fmt"
	"math/rand/v2"
	"path/filepath"
	"reflect"
	"strings"
	"testing"
	"time"

	"fyne.io/fyne/v2"
	"fyne.io/fyne/v2/driver/desktop"

	"enfilade/assets"
	"enfilade/fileio/planfile"
	"enfilade/solver/plan"
	"enfilade/solver/study"
)

var (
	huntSeeds = flag.Uint64("hunt.seeds", 4, "how many sequences of window events are played")
	huntFrom  = flag.Uint64("hunt.from", 1, "the first sequence")
	huntTime  = flag.Duration("hunt.time", 4*time.Second, "no new sequence is begun after so long")
	huntLong  = flag.Int("hunt.events", 150, "events in a sequence")
)

// TestRandomEvents plays what a user may do in any order: the pointer anywhere, every key, every command, good and bad texts in
// the form. No event may panic. In the end undoing gives back the first plan and redoing the last one, each the very same value
// with the same content; a file gives the plan back; and what the window shows is what a study of that plan alone finds.
func TestRandomEvents(t *testing.T) {
	began, played, plans := time.Now(), 0, 0
	for seed := *huntFrom; seed < *huntFrom+*huntSeeds && time.Since(began) < *huntTime; seed++ {
		t.Run(fmt.Sprint(seed), func(t *testing.T) {
			h := newHunter(t, seed)
			defer func() {
				if v := recover(); v != nil || t.Failed() {
					h.confess()
					if v != nil {
						panic(v)
					}
				}
			}()
			for range *huntLong {
				h.event()
				h.check()
			}
			h.end()
			played, plans = played+1, plans+len(h.kept)
		})
	}
	if played > 1 && plans < 6*played { // 11 on average over many, 7 in the first two, 3 in the first alone
		t.Errorf("%d plans in %d sequences: the events have lost their aim", plans, played)
	}
	t.Logf("%d sequences, %d plans", played, plans)
}

// hunter plays random events in a window.
type hunter struct {
	*rig
	rnd    *rand.Rand
	log    []string
	clock  time.Time
	at     fyne.Position // of the pointer
	opened uint64        // the first revision of the plan that is open
	kept   []keptPlan    // the committed plans so far, since the plan was opened
}

// keptPlan is a plan with what its file said when it was new.
type keptPlan struct {
	plan *plan.Plan
	text string
}

func newHunter(t *testing.T, seed uint64) *hunter {
	h := &hunter{rig: newRig(t, realSolver), rnd: rand.New(rand.NewPCG(seed, 1)), clock: time.Unix(1e9, 0)}
	h.now = func() time.Time { h.clock = h.clock.Add(150 * time.Millisecond); return h.clock }
	h.setRecent([]string{filepath.Join(t.TempDir(), "none.enfilade")})
	if n := h.rnd.IntN(4); n < 3 {
		h.openSample(assets.Samples()[n].Name)
	}
	h.check()
	return h
}

// confess tells the events that led here.
func (h *hunter) confess() {
	for i, s := range h.log {
		h.t.Logf("%d: %s", i, s)
	}
}

func (h *hunter) note(format string, a ...any) { h.log = append(h.log, fmt.Sprintf(format, a...)) }

func pickOne[T any](h *hunter, list []T) T { return list[h.rnd.IntN(len(list))] }

// event does one random thing.
func (h *hunter) event() {
	if h.modal != nil && h.rnd.IntN(3) > 0 {
		i := h.rnd.IntN(len(h.modal.buttons))
		h.note("answer %q", h.modal.buttons[i].text)
		h.modal.choose(i)
		return
	}
	switch n := h.rnd.IntN(100); {
	case n < 45:
		h.pointer()
	case n < 60:
		h.key()
	case n < 75:
		h.letter()
	case n < 88:
		h.command()
	case n < 97:
		h.field()
	default:
		h.size()
	}
	if h.rnd.IntN(12) == 0 {
		h.note("settle")
		h.settle()
	}
}

// pointer moves the pointer to some place, mostly near or on something, and may press or release.
func (h *hunter) pointer() {
	switch h.rnd.IntN(4) {
	case 0:
		s := h.view.Size()
		h.at = fyne.NewPos(h.rnd.Float32()*s.Width*1.1-10, h.rnd.Float32()*s.Height*1.1-10)
	case 1:
		h.at = h.at.AddXY(h.rnd.Float32()*60-30, h.rnd.Float32()*60-30)
	case 2:
		h.at = h.at.AddXY(float32(h.rnd.IntN(3)*40-40), float32(h.rnd.IntN(3)*40-40))
	default:
		h.at = h.corner()
	}
	e := mouse(h.at, desktop.MouseButtonPrimary)
	if h.rnd.IntN(20) == 0 {
		e.Button = pickOne(h, []desktop.MouseButton{desktop.MouseButtonSecondary, desktop.MouseButtonTertiary})
	}
	n := h.rnd.IntN(12)
	h.note("pointer %v %d button %d", h.at, n, e.Button)
	v := h.view
	switch {
	case n < 2:
		v.MouseMoved(e)
	case n < 4:
		v.MouseMoved(e)
		v.MouseDown(e)
	case n < 5:
		v.MouseUp(e)
	case n < 7:
		v.Dragged(&fyne.DragEvent{PointEvent: fyne.PointEvent{Position: h.at}, Dragged: fyne.NewDelta(3, 3)})
	case n < 8:
		v.MouseUp(e)
		v.DragEnd()
	case n < 9:
		v.MouseOut()
	case n < 10:
		for range 2 {
			v.MouseDown(e)
			v.MouseUp(e)
		}
	case n < 11:
		v.Scrolled(&fyne.ScrollEvent{PointEvent: fyne.PointEvent{Position: h.at}, Scrolled: fyne.NewDelta(0, h.rnd.Float32()*100-50)})
	default:
		v.MouseMoved(e)
		v.MouseDown(e)
		v.MouseUp(e)
	}
}

// corner is the place of some corner or mark of the plan.
func (h *hunter) corner() fyne.Position {
	var all []fyne.Position
	add := func(c plan.Chain) {
		for i := range c.Len() {
			x, y := h.view.cam.Pixel(c.At(i))
			all = append(all, fyne.NewPos(float32(x)/h.view.pix, float32(y)/h.view.pix))
		}
	}
	p := h.session.Plan()
	for _, w := range p.Walls() {
		add(w.Line)
	}
	for _, b := range p.Blocks() {
		add(b.Ring)
	}
	for _, z := range p.Zones() {
		add(z.Ring)
	}
	for _, o := range p.Observers() {
		add(plan.ChainOf(o.At))
	}
	for _, s := range p.Starts() {
		add(plan.ChainOf(s.At))
	}
	for _, o := range p.Targets() {
		add(plan.ChainOf(o.At))
	}
	add(p.Floor())
	if len(all) == 0 {
		return h.at
	}
	return pickOne(h, all)
}

// key types a key without a character into whatever has the focus.
func (h *hunter) key() {
	name := pickOne(h, []fyne.KeyName{fyne.KeyTab, fyne.KeyReturn, fyne.KeyReturn, fyne.KeyEscape, fyne.KeyLeft, fyne.KeyRight, fyne.KeyUp,
		fyne.KeyDown, fyne.KeyDelete, fyne.KeyBackspace, fyne.KeyHome, fyne.KeyPageUp, fyne.KeyPageDown, fyne.KeyF10, fyne.KeySpace})
	h.typeKey(name)
}

func (h *hunter) typeKey(name fyne.KeyName) {
	c := h.win.Canvas()
	f := c.Focused()
	h.note("key %s to %T", name, f)
	e := &fyne.KeyEvent{Name: name}
	if tab, ok := f.(fyne.Tabbable); name == fyne.KeyTab && !(ok && tab.AcceptsTab()) {
		c.FocusNext()
		return
	}
	k, held := f.(desktop.Keyable)
	if held {
		k.KeyDown(e)
	}
	if f != nil {
		f.TypedKey(e)
	} else {
		h.typedKey(name)
	}
	if held && (name != fyne.KeySpace || h.rnd.IntN(3) > 0) {
		k.KeyUp(e)
	}
}

// letter types a character, which may choose a tool or be a measure.
func (h *hunter) letter() {
	text := pickOne(h, []string{"w", "r", "d", "g", "s", "l", "c", "c", "z", "z", "f", "f", "o", "t", "b", "p", "m", "0", "9", "+", "-",
		"2", "2.5", "-1", "1e9", "0", ",", "3 m", "90", "3' 6\"", "×"})
	f := h.win.Canvas().Focused()
	h.note("type %q to %T", text, f)
	for _, r := range text {
		if f := h.win.Canvas().Focused(); f != nil {
			f.TypedRune(r)
		} else {
			h.typedRune(r)
		}
	}
}

// never are the commands that a hunt leaves alone: they end the window or change the toolkit for good.
var never = map[string]bool{"Quit": true, "Close the window": true, "New window": true, "Open in a new window…": true}

// command does a command of a menu, those that undo and redo more often than others.
func (h *hunter) command() {
	m := pickOne(h, append(h.menus(), menu{"Edit", h.editMenu}, menu{"Edit", h.editMenu}, menu{"Edit", h.editMenu}))
	list := m.commands()
	c := pickOne(h, list)
	if h.rnd.IntN(3) == 0 {
		c = list[0]
	}
	if c.do == nil || c.dead || never[c.label] || h.modal != nil {
		return
	}
	if m.title == "Help" && h.rnd.IntN(4) > 0 {
		return
	}
	h.note("command %s", c.label)
	c.do()
}

// texts are what is typed into fields.
var texts = []string{"", "0", "1", "2.5", "0,3", "-1", "90", "360", "-0", "1e9", "1e400", "NaN", "Inf", "tall", " 3 m ", "30 cm", "5' 6 1/2\"", "999999", "0.00001", "104", "\u00a0", "x\x00y", "Gate \"7\"", "é\u202e", "0x10", "1/0", "5'-3"}

// field types a text into a field of the form or the panel, or makes a choice.
func (h *hunter) field() {
	if p := h.panel; p != nil {
		r := pickOne(h, p.rows)
		if r.entry != nil {
			text := pickOne(h, texts)
			h.note("panel %s: %q", r.label, text)
			r.entry.SetText(text)
		} else {
			i := h.rnd.IntN(len(r.choices))
			h.note("panel %s: %s", r.label, r.choices[i])
			r.pick.picked(i)
		}
		return
	}
	if len(h.form.rows) == 0 {
		return
	}
	x := pickOne(h, h.form.rows)
	switch {
	case x.pick != nil:
		i := h.rnd.IntN(len(x.pick.choices))
		h.note("choose %s: %s", x.field.label, x.pick.choices[i])
		x.pick.picked(i)
	case x.dots != nil:
		h.note("choose %s", x.field.label)
		x.dots.picked(h.rnd.IntN(8))
	case x.entry != nil:
		text := pickOne(h, texts)
		h.note("field %s: %q", x.field.label, text)
		h.win.Canvas().Focus(x.entry)
		x.entry.SetText(text)
		if h.rnd.IntN(3) > 0 {
			x.entry.TypedKey(&fyne.KeyEvent{Name: pickOne(h, []fyne.KeyName{fyne.KeyReturn, fyne.KeyReturn, fyne.KeyEscape})})
		}
	}
}

// size makes the window another size.
func (h *hunter) size() {
	s := fyne.NewSize(float32(500+h.rnd.IntN(1200)), float32(340+h.rnd.IntN(700)))
	h.note("size %v", s)
	h.win.Resize(s)
}

// check takes over what workers hand in and looks whether the plan is one that may be.
func (h *hunter) check() {
	for {
		select {
		case f := <-h.queue:
			f()
			continue
		default:
		}
		break
	}
	h.frame()
	p := h.session.Committed()
	if h.opened != h.results.opened {
		h.opened, h.kept = h.results.opened, nil
	}
	for i := range h.kept {
		if h.kept[i].plan == p {
			return
		}
	}
	h.kept = append(h.kept, keptPlan{p, h.fileOf(p)})
}

// fileOf returns the plan as its file, and looks whether the file gives the same file again.
func (h *hunter) fileOf(p *plan.Plan) string {
	h.t.Helper()
	written := text(h.t, p)
	back, err := planfile.Read(bytes.NewReader([]byte(written)), "x.enfilade")
	if err != nil {
		h.t.Fatalf("the plan cannot be read back: %v", err)
	}
	if again := text(h.t, back); again != written {
		h.t.Fatalf("the plan was read back as another one: %s", parting(written, again))
	}
	return written
}

// end leaves everything that is open and compares.
func (h *hunter) end() {
	h.t.Helper()
	h.note("end")
	for h.modal != nil {
		h.modal.choose(len(h.modal.buttons) - 1)
	}
	h.view.DragEnd()
	h.view.grab()
	h.choose(0)
	h.session.Cancel()
	h.check()
	h.compare()
	h.history()
	h.compare()
}

// history undoes everything and does it again.
func (h *hunter) history() {
	h.t.Helper()
	known := map[*plan.Plan]string{}
	for _, k := range h.kept {
		known[k.plan] = k.text
	}
	last := h.session.Committed()
	for h.session.Redo() { // what is undone now is part of the history too
	}
	top := h.session.Committed()
	way := []*plan.Plan{top}
	for {
		if _, ok := h.session.UndoLabel(); !ok {
			break
		}
		h.undo()
		way = append(way, h.session.Committed())
	}
	if h.session.Committed() != h.kept[0].plan {
		h.t.Error("undoing everything did not give the first plan")
	}
	for i := len(way) - 2; i >= 0; i-- {
		h.redo()
		if h.session.Committed() != way[i] {
			h.t.Errorf("redo gave another plan than undo, %d steps from the last", i)
		}
	}
	seen := false
	for _, p := range way {
		want, ok := known[p]
		if got := text(h.t, p); ok && got != want {
			h.t.Errorf("a plan changed after it was made: %s", parting(want, got))
		}
		seen = seen || p == last
	}
	if !seen {
		h.t.Error("the last plan is not in the history")
	}
}

// compare holds what the window shows against a study of the plan alone.
func (h *hunter) compare() {
	h.t.Helper()
	if h.results.stopped {
		h.session.Listen(h.changed)
	}
	h.settle()
	p, got, ctx := h.session.Plan(), h.results.result, context.Background()
	s := study.NewSolver()
	want, err := s.Solve(ctx, p)
	if err != nil {
		h.t.Fatal(err)
	}
	for name, pair := range map[string][2]any{
		"sights": {got.Sight, want.Sight}, "places that see": {got.SeenFrom, want.SeenFrom}, "approaches": {got.Approaches, want.Approaches},
		"eye": {got.WalkerEye, want.WalkerEye}, "problems": {got.Problems, want.Problems},
	} {
		if !reflect.DeepEqual(pair[0], pair[1]) && (reflect.ValueOf(pair[0]).Kind() != reflect.Slice || reflect.ValueOf(pair[0]).Len()+reflect.ValueOf(pair[1]).Len() > 0) {
			h.t.Errorf("%s: the window shows\n%+v\nalone it is\n%+v\nof\n%s", name, pair[0], pair[1], text(h.t, p))
		}
	}
	found, err := s.Findings(ctx, p, want.Approaches, want.Routes)
	if err == nil && h.problems.rev == h.session.Rev() && len(found)+len(h.problems.found) > 0 && !reflect.DeepEqual(found, h.problems.found) {
		h.t.Errorf("the window lists\n%+v\nalone it is\n%+v", h.problems.found, found)
	}
}

// parting returns the first lines in which two texts differ.
func parting(a, b string) string {
	x, y := strings.Split(a, "\n"), strings.Split(b, "\n")
	for i := range min(len(x), len(y)) {
		if x[i] != y[i] {
			return fmt.Sprintf("line %d\n%s\n%s", i+1, x[i], y[i])
		}
	}
	return fmt.Sprintf("%d and %d lines", len(x), len(y))
}
