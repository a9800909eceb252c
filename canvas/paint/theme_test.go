package paint_test

import (
	"image/color"
	"math"
	"testing"

	"enfilade/canvas/paint"
)

// luminance is the relative luminance of WCAG 2.1, section 3.
func luminance(c color.NRGBA) float64 {
	lin := func(v uint8) float64 {
		s := float64(v) / 255
		if s <= 0.04045 {
			return s / 12.92
		}
		return math.Pow((s+0.055)/1.055, 2.4)
	}
	return 0.2126*lin(c.R) + 0.7152*lin(c.G) + 0.0722*lin(c.B)
}

// contrast is the contrast ratio of WCAG 2.1, section 3.
func contrast(a, b color.NRGBA) float64 {
	x, y := luminance(a), luminance(b)
	return (max(x, y) + 0.05) / (min(x, y) + 0.05)
}

// over lays a over b at a strength.
func over(a, b color.NRGBA, strength float64) color.NRGBA {
	mix := func(x, y uint8) uint8 { return uint8(math.Round(float64(x)*strength + float64(y)*(1-strength))) }
	return color.NRGBA{R: mix(a.R, b.R), G: mix(a.G, b.G), B: mix(a.B, b.B), A: 255}
}

// densest is the floor under the strongest wash of an observer, at the eye.
func densest(t *paint.Theme, colour int) color.NRGBA {
	return over(t.WashOf(colour), t.Floor, t.WashNear)
}

func TestContrast(t *testing.T) {
	type row struct {
		name    string
		of      func(*paint.Theme) color.NRGBA
		grounds func(*paint.Theme) []color.NRGBA
		least   [2]float64 // light, dark
	}
	all := func(p *paint.Theme) []color.NRGBA {
		return []color.NRGBA{p.Chrome, p.Panel, p.Field, p.Ground, p.Floor}
	}
	panels := func(p *paint.Theme) []color.NRGBA { return []color.NRGBA{p.Panel, p.Field, p.Ground, p.Floor} }
	rows := []row{
		{"ink", func(p *paint.Theme) color.NRGBA { return p.Ink }, all, [2]float64{11.9, 11.2}},
		{"ink 2", func(p *paint.Theme) color.NRGBA { return p.Ink2 }, all, [2]float64{6.5, 7.5}},
		{"ink 3", func(p *paint.Theme) color.NRGBA { return p.Ink3 }, all, [2]float64{4.7, 5.5}},
		{"red", func(p *paint.Theme) color.NRGBA { return p.Red }, panels, [2]float64{4.7, 4.5}},
		{"pass", func(p *paint.Theme) color.NRGBA { return p.Pass }, panels, [2]float64{7.0, 4.7}},
		{"field border on panel", func(p *paint.Theme) color.NRGBA { return p.FieldBorder },
			func(p *paint.Theme) []color.NRGBA { return []color.NRGBA{p.Panel} }, [2]float64{3.2, 3.8}},
		{"tool icon on its fill", func(p *paint.Theme) color.NRGBA { return p.ToolIcon },
			func(p *paint.Theme) []color.NRGBA { return []color.NRGBA{p.ToolFill} }, [2]float64{11, 11}},
		{"walls", func(p *paint.Theme) color.NRGBA { return p.Poche }, panels, [2]float64{7, 7}},
	}
	for i := range 4 {
		rows = append(rows, row{"observer", func(p *paint.Theme) color.NRGBA { return p.Observers[i] },
			func(p *paint.Theme) []color.NRGBA { return []color.NRGBA{p.Panel, p.Ground, p.Floor} }, [2]float64{4.6, 4.8}})
	}
	for i, theme := range []*paint.Theme{paint.Light(), paint.Dark()} {
		for _, r := range rows {
			worst := math.Inf(1)
			for _, g := range r.grounds(theme) {
				worst = min(worst, contrast(r.of(theme), g))
			}
			if worst < r.least[i]-0.05 {
				t.Errorf("%s: %s: contrast %.2f, want at least %.1f", theme.Name, r.name, worst, r.least[i])
			}
		}
	}
}

// TestContrastOnWash: text on the densest wash stays readable; red text carries a halo in floor colour instead.
func TestContrastOnWash(t *testing.T) {
	for i, theme := range []*paint.Theme{paint.Light(), paint.Dark()} {
		for _, r := range []struct {
			name  string
			of    color.NRGBA
			least [2]float64
		}{{"ink", theme.Ink, [2]float64{10.1, 7.0}}, {"ink 2", theme.Ink2, [2]float64{5.5, 4.7}}, {"red", theme.Red, [2]float64{3.7, 2.8}}} {
			got := contrast(r.of, densest(theme, 0))
			if got < r.least[i]-0.05 {
				t.Errorf("%s: %s on the densest wash: contrast %.2f, want at least %.1f", theme.Name, r.name, got, r.least[i])
			}
		}
		for colour := range 8 {
			if got := contrast(theme.Ink, densest(theme, colour)); got < 4.5 {
				t.Errorf("%s: ink on the wash of observer %d: contrast %.2f", theme.Name, colour+1, got)
			}
		}
		if halo := contrast(theme.Red, theme.Floor); halo < 4.5 {
			t.Errorf("%s: red text on its halo: contrast %.2f", theme.Name, halo)
		}
	}
}
