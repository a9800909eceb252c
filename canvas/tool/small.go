package tool

import (
	"math"
	"strconv"
	"strings"

	"enfilade/canvas/pick"
	"enfilade/solver/exact"
	"enfilade/solver/plan"
)

// locked reports whether the item may not be moved.
func locked(p *plan.Plan, r plan.Ref) bool {
	m, _ := p.Meta(r)
	return m.Locked
}

// reason is an error as the window says it: the cause without where in the program it was found.
func reason(err error) string {
	s := err.Error()
	if i := strings.LastIndex(s, ": "); i >= 0 {
		s = s[i+2:]
	}
	return s
}

// gridStep returns the snap grid's step, one grid unit where nothing is to snap to it.
func gridStep(h Host, e Pointer) int32 {
	if e.Ctrl || !h.Snapper().On.Has(pick.SnapGrid) {
		return 1
	}
	return h.Snapper().Step(h.Camera())
}

// unitsOf returns how many grid units so many px at 100 % are.
func unitsOf(h Host, px float64) float64 {
	c := h.Camera()
	return px * c.K / c.Scale * exact.PerMM
}

// parseAngle reads a typed angle in degrees; a comma is a decimal point.
func parseAngle(text string) (float64, error) {
	return strconv.ParseFloat(strings.Replace(strings.TrimSuffix(text, "°"), ",", ".", 1), 64)
}

// degrees writes an angle between 0 and 360 with at most one decimal.
func degrees(deg float64) string {
	deg = math.Mod(math.Mod(deg, 360)+360, 360)
	s := strings.TrimSuffix(strconv.FormatFloat(deg, 'f', 1, 64), ".0")
	if s == "360" {
		return "0"
	}
	return s
}

// along returns the grid point nearest to the place that lies the share t of the way from a to b.
func along(a, b exact.Pt, t float64) exact.Pt {
	return exact.Pt{X: a.X + int32(math.Round(t*(float64(b.X)-float64(a.X)))), Y: a.Y + int32(math.Round(t*(float64(b.Y)-float64(a.Y))))}
}

func abs[T int32 | float64](v T) T {
	if v < 0 {
		return -v
	}
	return v
}

func withSign(v, sign int32) int32 {
	if sign < 0 {
		return -v
	}
	return v
}
