package tool_test

import (
	"math"
	"slices"
	"strconv"
	"strings"
	"testing"

	"enfilade/canvas/pick"
	"enfilade/canvas/tool"
	"enfilade/canvas/view"
	"enfilade/solver/exact"
	"enfilade/solver/plan"
)

// host is a host for tests: it keeps the committed plan, what is previewed, and the labels of what was done.
type host struct {
	t        *testing.T
	plan     *plan.Plan
	shown    *plan.Plan
	selected []plan.Ref
	done     []string
	snapper  pick.Snapper
	defaults tool.Defaults
	walked   [][]exact.Pt // of every route
	photo    [2]int       // size of the underlay's picture
}

func newHost(t *testing.T, parts plan.Parts) *host {
	p := plan.From(parts)
	return &host{t: t, plan: p, shown: p, snapper: pick.Snapper{On: pick.AllSnaps}, defaults: tool.StandardDefaults()}
}

func (h *host) Plan() *plan.Plan            { return h.plan }
func (h *host) Selection() []plan.Ref       { return h.selected }
func (h *host) Select(r ...plan.Ref)        { h.selected = slices.Clone(r) }
func (h *host) Cancel()                     { h.shown = h.plan }
func (h *host) Defaults() tool.Defaults     { return h.defaults }
func (h *host) SetDefaults(d tool.Defaults) { h.defaults = d }
func (h *host) Snapper() *pick.Snapper      { return &h.snapper }

func (h *host) UnderlaySize() (int, int) { return h.photo[0], h.photo[1] }

func (h *host) Walked(string) [][]exact.Pt { return h.walked }

// Camera is 40 px to the metre, with 0, 0 at the picture's centre.
func (h *host) Camera() view.Camera { return view.Camera{Scale: 0.04, W: 1000, H: 800, K: 1} }

func (h *host) Preview(e plan.Edit) error {
	p, err := e.Apply(h.plan)
	if err == nil {
		h.shown = p
	}
	return err
}

func (h *host) Do(e plan.Edit) error {
	p, err := e.Apply(h.plan)
	if err == nil {
		h.plan = p
		h.done = append(h.done, e.Label())
	}
	h.shown = h.plan
	return err
}

func (h *host) ParseLength(text string) (int32, error) {
	if feet, inches, ok := strings.Cut(strings.TrimSuffix(text, `"`), "'"); ok {
		f, err := strconv.ParseFloat(feet, 64)
		i, _ := strconv.ParseFloat("0"+strings.TrimSpace(inches), 64)
		return int32(math.Round(f*3048 + i*254)), err
	}
	v, err := strconv.ParseFloat(strings.Replace(text, ",", ".", 1), 64)
	return int32(math.Round(v * 10000)), err
}

func (h *host) FormatLength(units float64) string {
	return strconv.FormatFloat(units/10000, 'f', 2, 64) + " m"
}

func (h *host) FormatArea(units2 float64) string {
	return strconv.FormatFloat(units2/1e8, 'f', 2, 64) + " m²"
}

// m returns the grid point at x, y metres.
func m(x, y float64) exact.Pt {
	return exact.Pt{X: int32(math.Round(x * 10000)), Y: int32(math.Round(y * 10000))}
}

// at returns the pointer over x, y metres.
func (h *host) at(x, y float64) tool.Pointer {
	px, py := h.Camera().Pixel(m(x, y))
	return tool.Pointer{X: px, Y: py, Clicks: 1}
}

// move, click and drag send what the window sends.
func (h *host) move(t tool.Tool, x, y float64) { t.Move(h, h.at(x, y)) }

func (h *host) click(t tool.Tool, x, y float64) {
	h.move(t, x, y)
	t.Down(h, h.at(x, y))
	t.Up(h, h.at(x, y))
}

func (h *host) press(t tool.Tool, x, y float64) {
	h.move(t, x, y)
	t.Down(h, h.at(x, y))
}

func (h *host) drag(t tool.Tool, x, y, tox, toy float64) {
	h.press(t, x, y)
	h.dragTo(t, (x+tox)/2, (y+toy)/2)
	h.dragTo(t, tox, toy)
	t.Up(h, h.at(tox, toy))
}

func (h *host) dragTo(t tool.Tool, x, y float64) {
	e := h.at(x, y)
	e.Pressed = true
	t.Move(h, e)
}

func (h *host) key(t tool.Tool, names ...tool.KeyName) {
	for _, n := range names {
		t.Key(h, tool.Key{Name: n})
	}
}

func (h *host) typed(t tool.Tool, text string) {
	for _, r := range text {
		t.Key(h, tool.Key{Name: tool.KeyRune, Rune: r})
	}
}

// wall returns the points of a wall.
func (h *host) wall(id string) []exact.Pt {
	h.t.Helper()
	w, ok := h.plan.Wall(id)
	if !ok {
		h.t.Fatalf("no wall %s", id)
	}
	return w.Line.Points()
}

func (h *host) steps(want ...string) {
	h.t.Helper()
	if !slices.Equal(h.done, want) {
		h.t.Errorf("steps %q, want %q", h.done, want)
	}
	if h.shown != h.plan {
		h.t.Error("a preview is left over")
	}
}

func (h *host) points(what string, got []exact.Pt, want ...exact.Pt) {
	h.t.Helper()
	if !slices.Equal(got, want) {
		h.t.Errorf("%s: %v, want %v", what, got, want)
	}
}
