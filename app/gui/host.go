package gui

import (
	"fmt"
	"math"

	"enfilade/canvas/pick"
	"enfilade/canvas/tool"
	"enfilade/canvas/view"
	"enfilade/solver/exact"
	"enfilade/solver/plan"
)

// host is the window as the tools see it.
type host struct{ w *window }

var _ tool.Host = (*host)(nil)

// Plan is for the tools.
func (h *host) Plan() *plan.Plan { return h.w.session.Committed() }

// Camera is for the tools.
func (h *host) Camera() view.Camera { return h.w.view.cam }

// Selection is for the tools.
func (h *host) Selection() []plan.Ref { return h.w.session.Selection() }

// Select is for the tools.
func (h *host) Select(refs ...plan.Ref) { h.w.session.Select(refs...) }

// Preview is for the tools.
func (h *host) Preview(e plan.Edit) error { return h.w.session.Preview(e) }

// Do is for the tools.
func (h *host) Do(e plan.Edit) error { return h.w.session.Do(e) }

// Cancel is for the tools.
func (h *host) Cancel() { h.w.session.Cancel() }

// Defaults is for the tools.
func (h *host) Defaults() tool.Defaults { return h.w.measures }

// SetDefaults is for the tools.
func (h *host) SetDefaults(d tool.Defaults) { h.w.measures = d }

// Snapper is for the tools. Its grid goes by the plan's display unit.
func (h *host) Snapper() *pick.Snapper {
	h.w.snapper.Feet = h.w.unit() == "ft"
	return &h.w.snapper
}

// Walked is for the tools. What is known may be of the drawing a moment ago.
func (h *host) Walked(route string) (legs [][]exact.Pt) {
	w, ok := h.w.results.route(route)
	if !ok {
		return nil
	}
	for _, l := range w.Legs {
		leg := make([]exact.Pt, 0, l.Last-l.First+1)
		for _, q := range w.Points[l.First : l.Last+1] {
			leg = append(leg, exact.Pt{X: int32(math.Round(q[0] * exact.PerMM)), Y: int32(math.Round(q[1] * exact.PerMM))})
		}
		legs = append(legs, leg)
	}
	return legs
}

// UnderlaySize is for the tools.
func (h *host) UnderlaySize() (int, int) {
	if u := h.w.session.Committed().Sheet().Underlay; u == nil || u.Image != h.w.under.path {
		return 0, 0
	}
	return h.w.photoSize()
}

// ParseLength is for the tools.
func (h *host) ParseLength(text string) (int32, error) { return parseLength(text, h.w.unit()) }

// FormatLength is for the tools.
func (h *host) FormatLength(units float64) string {
	unit := h.w.unit()
	if unit == "ft" {
		return formatFeet(int32(units + 0.5))
	}
	decimals := map[string]int{"m": 2, "cm": 1, "mm": 0}[unitOf(unit)]
	return fmt.Sprintf("%.*f %s", decimals, units/unitSizes[unitOf(unit)], unitOf(unit))
}

// FormatArea is for the tools.
func (h *host) FormatArea(units2 float64) string {
	const foot2 = 3048 * 3048
	if h.w.unit() == "ft" {
		return fmt.Sprintf("%.1f ft²", units2/foot2)
	}
	const metre2 = 1e8
	return fmt.Sprintf("%.2f m²", units2/metre2)
}

// unit is the plan's display unit.
func (w *window) unit() string { return w.session.Plan().Sheet().Unit }

// place returns the pointer's place in device pixels of the picture.
func (v *planView) place() (x, y float64) {
	return float64(v.last.X * v.pix), float64(v.last.Y * v.pix)
}

// emptyPlan reports whether nothing is drawn and nothing put down.
func emptyPlan(p *plan.Plan) bool {
	for range p.Zones() {
		return false
	}
	return p.Sheet().Underlay == nil && p.Floor().Len() == 0 && p.NumWalls() == 0 && p.NumBlocks() == 0 && p.NumObservers() == 0 && p.NumTargets() == 0 &&
		p.NumStarts() == 0
}
