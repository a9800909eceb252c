package gui

import (
	"strings"
	"testing"

	"enfilade/assets"
	"enfilade/solver/plan"
)

// TestFiguresInThePlansUnit: the table, the strip and the form tell lengths and areas in the unit that the plan is set to,
// as the picture does, as soon as it is chosen.
func TestFiguresInThePlansUnit(t *testing.T) {
	r := newRig(t, realSolver)
	r.openSample("gallery")
	r.settle()
	for _, c := range []struct{ unit, length, area string }{{"ft", " ft", "ft²"}, {"cm", " cm", "m²"}, {"mm", " mm", "m²"}, {"m", " m", "m²"}} {
		sheet := r.session.Plan().Sheet()
		sheet.Unit = c.unit
		if err := r.doEdit(plan.SetSheet{Sheet: sheet}); err != nil && c.unit != r.unit() {
			t.Fatal(err)
		}
		r.session.Select(plan.Ref{Kind: plan.KindObserver, ID: r.results.observer})
		r.acted()
		r.settle()
		if step := formatLength(r.host.Snapper().Step(r.view.cam), c.unit); !strings.Contains(r.status.snap.text, step) {
			t.Errorf("%s: the status line says %q of a grid of %s", c.unit, r.status.snap.text, step)
		}
		for _, row := range r.table.rows {
			if row.full != "–" && !strings.HasSuffix(row.full, c.length) {
				t.Errorf("%s: the table says %q", c.unit, row.full)
			}
		}
		cells := r.table.columns.Objects
		for i, text := range []string{"62345 mm", "62345 mm"} {
			weight, size := assets.Bold, float32(12.5)
			if i == 1 {
				weight, size = assets.Regular, 12
			}
			if need := textSize(text, weight, size).Width; c.unit == "mm" && cells[2+i].Size().Width < need+2 {
				t.Errorf("a column of %g px for a figure of %g", cells[2+i].Size().Width, need)
			}
		}
		if line := r.foot.line.text; !strings.Contains(line, c.length+" (") || c.unit != "m" && strings.Contains(line, " m ") {
			t.Errorf("%s: the strip says %q", c.unit, line)
		}
		if got := r.form.facts[0].label.text; got != c.area+" seen" {
			t.Errorf("%s: the form says %q", c.unit, got)
		}
		if got := r.form.facts[2].value.text; !strings.HasSuffix(got, c.length) {
			t.Errorf("%s: the open border is %q", c.unit, got)
		}
	}
}

// TestFigures: each unit with the digits that the picture gives it.
func TestFigures(t *testing.T) {
	for _, c := range []struct{ unit, far, wide, area string }{
		{"m", "9.9 m", "9.86 m", "10.0 m²"}, {"", "9.9 m", "9.86 m", "10.0 m²"}, {"cm", "986 cm", "986 cm", "10.0 m²"},
		{"mm", "9862 mm", "9862 mm", "10.0 m²"}, {"ft", "32.4 ft", "32.36 ft", "107.6 ft²"},
	} {
		if far, wide, area := farText(c.unit, 9862), wideText(c.unit, 9862), areaWords(c.unit, 10, 1); far != c.far || wide != c.wide || area != c.area {
			t.Errorf("%q: %s, %s, %s; want %s, %s, %s", c.unit, far, wide, area, c.far, c.wide, c.area)
		}
	}
}
