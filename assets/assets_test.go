package assets_test

import (
	"bytes"
	"encoding/xml"
	"image/png"
	"math"
	"strings"
	"testing"

	"enfilade/assets"
)

func TestFaces(t *testing.T) {
	for w := assets.Light; w <= assets.Bold; w++ {
		f := assets.FaceOf(w)
		digit := f.Width([]byte("0"), 1, 0)
		if w != assets.Light && digit != 1160.0/2000 {
			t.Errorf("%v: a digit is %g em wide, want 0.58", w, digit)
		}
		for _, r := range "123456789" {
			if got := f.Width([]byte(string(r)), 1, 0); w != assets.Light && got != digit {
				t.Errorf("%v: %q is %g em wide, the other digits %g: columns would not align", w, r, got, digit)
			}
		}
		missing, _ := f.Glyph('\uE000')
		for _, r := range "m²°′″×·–−→≥≤äöüßéŁ" {
			if g, _ := f.Glyph(r); g == missing {
				t.Errorf("%v has no %q", w, r)
			}
		}
	}
}

func TestWidth(t *testing.T) {
	f := assets.FaceOf(assets.Regular)
	a, v, av := f.Width([]byte("A"), 100, 0), f.Width([]byte("V"), 100, 0), f.Width([]byte("AV"), 100, 0)
	if got := av - a - v; math.Abs(got-(-5.4)) > 1e-9 {
		t.Errorf("AV is kerned by %g at 100 px, want -5.4", got)
	}
	if plain, spaced := f.Width([]byte("East"), 10, 0), f.Width([]byte("East"), 10, 1.5); math.Abs(spaced-plain-4.5) > 1e-9 {
		t.Errorf("spacing added %g to four letters, want it after all but the last", spaced-plain)
	}
	if got := f.Width(nil, 10, 1.5); got != 0 {
		t.Errorf("nothing is %g wide", got)
	}
}

func TestWidthAllocates(t *testing.T) {
	f, text := assets.FaceOf(assets.Medium), []byte("first sight · 9.9 m")
	f.Width(text, 11, 0)
	if n := testing.AllocsPerRun(100, func() { f.Width(text, 11, 0) }); n != 0 {
		t.Errorf("measuring known letters allocates %g times", n)
	}
}

func TestIcons(t *testing.T) {
	names := assets.Icons()
	if len(names) < 30 {
		t.Errorf("only %d icons: %v", len(names), names)
	}
	for _, name := range names {
		var svg struct {
			ViewBox string `xml:"viewBox,attr"`
			Paths   []struct {
				Fill   string `xml:"fill,attr"`
				Stroke string `xml:"stroke,attr"`
			} `xml:"path"`
		}
		if err := xml.Unmarshal(assets.Icon(name), &svg); err != nil {
			t.Errorf("%s: %v", name, err)
		}
		if svg.ViewBox != "0 0 20 20" || len(svg.Paths) != 1 || svg.Paths[0].Fill != "#000000" || svg.Paths[0].Stroke != "" {
			t.Errorf("%s: %+v: want one black path without stroke on 20 by 20", name, svg)
		}
		if red := assets.IconIn(name, "#BC4213"); !bytes.Contains(red, []byte(`fill="#BC4213"`)) {
			t.Errorf("%s did not take another colour", name)
		}
	}
}

func TestAppIcon(t *testing.T) {
	im, err := png.Decode(bytes.NewReader(assets.AppIcon()))
	if err != nil || im.Bounds().Dx() != 256 || im.Bounds().Dy() != 256 {
		t.Fatalf("the program's icon: %v, %v", im.Bounds(), err)
	}
	if r, g, b, _ := im.At(128, 196).RGBA(); r>>8 != 0xBC || g>>8 != 0x42 || b>>8 != 0x13 {
		t.Errorf("its point is %02x%02x%02x, want the red", r>>8, g>>8, b>>8)
	}
	if !strings.Contains(string(assets.AppIconSVG()), "#BC4213") {
		t.Error("the drawn icon has no red point")
	}
}

func TestFontLicence(t *testing.T) {
	if l := assets.FontLicence(); !strings.Contains(l, "SIL OPEN FONT LICENSE Version 1.1") || !strings.Contains(l, "Lukasz Dziedzic") {
		t.Error("the licence text is not the fonts' own")
	}
}
